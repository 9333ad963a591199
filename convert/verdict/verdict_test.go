package verdict

import (
	"fmt"
	"math"
	"math/rand/v2"
	"slices"
	"testing"

	"strikebook/convert/scale"
	"strikebook/convert/stats"
)

var inf = math.Inf(1)

// All numbers are parts of two, so that every sum and difference is exact.
func TestOutcomeAtTheEdges(t *testing.T) {
	const g, step = 0.25, 1.0 / 1024
	after := func(x float64) float64 { return x + step }
	before := func(x float64) float64 { return x - step }
	upper, lower, both := Band{-inf, 4}, Band{2, inf}, Band{2, 4}
	for _, c := range []struct {
		name  string
		band  Band
		guard float64
		value float64
		want  Outcome
	}{
		{"far below a maximum", upper, g, -1000, Conforms},
		{"a guard below a maximum", upper, g, 4 - g, Conforms},
		{"just less than a guard below a maximum", upper, g, after(4 - g), NotProven},
		{"at a maximum", upper, g, 4, NotProven},
		{"a guard above a maximum", upper, g, 4 + g, NotProven},
		{"just more than a guard above a maximum", upper, g, after(4 + g), DoesNotConform},
		{"far above a maximum", upper, g, 1000, DoesNotConform},

		{"far above a minimum", lower, g, 1000, Conforms},
		{"a guard above a minimum", lower, g, 2 + g, Conforms},
		{"just less than a guard above a minimum", lower, g, before(2 + g), NotProven},
		{"at a minimum", lower, g, 2, NotProven},
		{"a guard below a minimum", lower, g, 2 - g, NotProven},
		{"just more than a guard below a minimum", lower, g, before(2 - g), DoesNotConform},
		{"far below a minimum", lower, g, -1000, DoesNotConform},

		{"in the middle", both, g, 3, Conforms},
		{"a guard above the lower of two", both, g, 2 + g, Conforms},
		{"a guard below the upper of two", both, g, 4 - g, Conforms},
		{"just below that", both, g, before(2 + g), NotProven},
		{"just above that", both, g, after(4 - g), NotProven},
		{"a guard above the upper of two", both, g, 4 + g, NotProven},
		{"just outside the lower of two", both, g, before(2 - g), DoesNotConform},
		{"just outside the upper of two", both, g, after(4 + g), DoesNotConform},
		{"the guard fills the band", both, 1, 3, Conforms},
		{"the guard fills the band, off the middle", both, 1, after(3), NotProven},
		{"the guard is wider than the band", both, 1.5, 3, NotProven},
		{"the guard is wider than the band, and outside", both, 1.5, after(5.5), DoesNotConform},

		{"no guard, at a maximum", upper, 0, 4, Conforms},
		{"no guard, just above a maximum", upper, 0, after(4), DoesNotConform},
		{"no guard, at a minimum", lower, 0, 2, Conforms},
		{"no guard, just below a minimum", lower, 0, before(2), DoesNotConform},
		{"one value alone conforms", Band{3, 3}, 0, 3, Conforms},
		{"beside the one value", Band{3, 3}, 0, after(3), DoesNotConform},
		{"one value alone, never proven", Band{3, 3}, g, 3, NotProven},
		{"nothing bounds", Band{-inf, inf}, g, 3, Conforms},
	} {
		t.Run(c.name, func(t *testing.T) {
			if got := c.band.Outcome(c.value, c.guard); got != c.want {
				t.Errorf("%g with a guard of %g in %+v: %s, want %s", c.value, c.guard, c.band, got, c.want)
			}
			mirrored := Band{-c.band.Max, -c.band.Min}
			if got := mirrored.Outcome(-c.value, c.guard); got != c.want {
				t.Errorf("mirrored: %s, want %s", got, c.want)
			}
		})
	}
}

// Where the edges of each rule lie: a standard uncertainty of 10 and normal
// factors, as handbooks print them, from memory.
func TestRules(t *testing.T) {
	const u, limit = 10, 350
	guards := []struct {
		rule  Rule
		guard float64
	}{{Guarded, 19.59964}, {"", 19.59964}, {OneSided95, 16.44854}, {Simple, 0}}
	for _, g := range guards {
		t.Run("rule "+string(g.rule), func(t *testing.T) {
			for _, side := range []float64{1, -1} { // a maximum, and mirrored a minimum
				decided := func(distance float64) Decision {
					c := known(limit+side*distance, u, stats.Infinite)
					c.Rule = g.rule
					if side > 0 {
						c.Band.Max = limit
					} else {
						c.Band.Min = limit
					}
					return c.Decide()
				}
				const near = 1e-3
				if got := decided(0).Guard; math.Abs(got-g.guard) > 1e-5 {
					t.Errorf("guard %g, want %g", got, g.guard)
				}
				for _, c := range []struct {
					distance float64 // outwards from the limit
					want     Outcome
				}{
					{-g.guard - 5, Conforms}, {-g.guard - near, Conforms},
					{g.guard + near, DoesNotConform}, {g.guard + 5, DoesNotConform},
				} {
					if got := decided(c.distance).Outcome; got != c.want {
						t.Errorf("side %g, %g outwards: %s, want %s", side, c.distance, got, c.want)
					}
				}
				if g.rule == Simple {
					if got := decided(0).Outcome; got != Conforms {
						t.Errorf("side %g, at the limit: %s", side, got)
					}
					continue
				}
				for _, distance := range []float64{-g.guard + near, 0, g.guard - near} {
					if got := decided(distance).Outcome; got != NotProven {
						t.Errorf("side %g, %g outwards: %s", side, distance, got)
					}
				}
			}
		})
	}
}

// The guarded rule asks for the confidence of the record, the others do not.
func TestConfidenceOfTheRules(t *testing.T) {
	guard := func(rule Rule, confidence float64) float64 {
		c := known(300, 10, stats.Infinite)
		c.Rule, c.Confidence = rule, confidence
		return c.Decide().Guard
	}
	for _, c := range []struct {
		rule       Rule
		confidence float64
		want       float64
	}{
		{Guarded, 0.99, 25.75829}, {Guarded, 0.68, 9.94458}, {OneSided95, 0.99, 16.44854}, {OneSided95, 0.68, 16.44854}, {Simple, 0.99, 0},
	} {
		if got := guard(c.rule, c.confidence); math.Abs(got-c.want) > 1e-5 {
			t.Errorf("%s at %g: guard %g, want %g", c.rule, c.confidence, got, c.want)
		}
	}
}

// random is a comparison as it could come about.
func random(rng *rand.Rand) Comparison {
	c := Comparison{Value: 100 + 500*rng.Float64(), Confidence: 0.95, Band: Band{-inf, inf}}
	u := 5 + 25*rng.Float64()
	c.Terms = []stats.Term{
		{Name: stats.Repeatability, Standard: u * (0.2 + 0.8*rng.Float64()), DoF: stats.DoF(2 + rng.IntN(9)), Distribution: stats.Student, Sensitivity: 1},
		{Name: "permissible error", Standard: u * rng.Float64(), DoF: stats.Infinite, Distribution: stats.Uniform, Sensitivity: -1},
		{Name: "model", Standard: 1 + u*rng.Float64(), DoF: stats.Infinite, Distribution: stats.Normal, Sensitivity: 0.5 + rng.Float64()},
	}
	kind := rng.IntN(3)
	if kind != 0 {
		c.Band.Max = c.Value + 100*(rng.Float64()-0.5)
	}
	if kind != 1 {
		c.Band.Min = c.Value + 100*(rng.Float64()-0.5)
	}
	if c.Band.Min > c.Band.Max {
		c.Band.Min, c.Band.Max = c.Band.Max, c.Band.Min
	}
	return c
}

func byRule(c Comparison, rule Rule) Decision {
	c.Rule = rule
	return c.Decide()
}

// What is proven with the wider guard is proven with the narrower one, and the
// mean alone then agrees.
func TestStricterRulesProveLess(t *testing.T) {
	rng := rand.New(rand.NewPCG(31, 32))
	seen := map[[2]Outcome]int{}
	for range 5000 {
		c := random(rng)
		guarded, oneSided, simple := byRule(c, Guarded), byRule(c, OneSided95), byRule(c, Simple)
		if !(guarded.Guard > oneSided.Guard && oneSided.Guard > 0 && simple.Guard == 0) {
			t.Fatalf("%+v: guards %g, %g, %g", c, guarded.Guard, oneSided.Guard, simple.Guard)
		}
		if guarded.Outcome != NotProven && guarded.Outcome != oneSided.Outcome {
			t.Fatalf("%+v: guarded %s, one-sided %s", c, guarded.Outcome, oneSided.Outcome)
		}
		if oneSided.Outcome != NotProven && oneSided.Outcome != simple.Outcome {
			t.Fatalf("%+v: one-sided %s, simple %s", c, oneSided.Outcome, simple.Outcome)
		}
		if simple.Outcome == NotProven {
			t.Fatalf("%+v: simple says %s", c, simple.Outcome)
		}
		if guarded.Probability != simple.Probability || guarded.Probability != oneSided.Probability {
			t.Fatalf("%+v: the probability depends on the rule", c)
		}
		seen[[2]Outcome{guarded.Outcome, simple.Outcome}]++
	}
	if len(seen) != 4 { // two proofs, and not proven either way
		t.Errorf("seen only %v", seen)
	}
}

func TestMirrored(t *testing.T) {
	rng := rand.New(rand.NewPCG(33, 34))
	for range 2000 {
		c := random(rng)
		m := c
		m.Value, m.Band = -c.Value, Band{-c.Band.Max, -c.Band.Min}
		for _, rule := range Rules() {
			a, b := byRule(c, rule), byRule(m, rule)
			if a.Outcome != b.Outcome || a.Guard != b.Guard || math.Abs(a.Probability-b.Probability) > 1e-12 {
				t.Fatalf("%+v, %s: %s with %g, mirrored %s with %g", c, rule, a.Outcome, a.Probability, b.Outcome, b.Probability)
			}
		}
	}
}

func TestProbabilityRisesAsTheBandWidens(t *testing.T) {
	rng := rand.New(rand.NewPCG(35, 36))
	for range 2000 {
		c := random(rng)
		narrow := c.Decide()
		wide := c
		wide.Band.Min -= 10 * rng.Float64()
		wide.Band.Max += 10 * rng.Float64()
		p := wide.Decide()
		if !(narrow.Probability >= 0 && p.Probability <= 1 && p.Probability >= narrow.Probability) {
			t.Fatalf("%+v: %g becomes %g in %+v", c, narrow.Probability, p.Probability, wide.Band)
		}
		if narrow.Outcome == Conforms && p.Outcome != Conforms {
			t.Fatalf("%+v: %s in the wider band %+v", c, p.Outcome, wide.Band)
		}
		if p.Outcome == DoesNotConform && narrow.Outcome != DoesNotConform {
			t.Fatalf("%+v: %s, and outside the wider band %+v", c, narrow.Outcome, wide.Band)
		}
	}
	if p := known(300, 10, 4).Decide().Probability; p != 1 {
		t.Errorf("without bounds the probability is %g", p)
	}
}

func TestBandOfALimit(t *testing.T) {
	for _, c := range []struct {
		limit Limit
		want  Band
	}{
		{Limit{}, Band{-inf, inf}},
		{Limit{Max: new(225.0)}, Band{-inf, 225}},
		{Limit{Min: new(190.0)}, Band{190, inf}},
		{Limit{Min: new(190.0), Max: new(250.0)}, Band{190, 250}},
	} {
		if got := c.limit.Band(); got != c.want {
			t.Errorf("%+v, want %+v", got, c.want)
		}
	}
}

// scattered is a comparison that the scatter of n readings alone makes
// uncertain, sd in the reading's scale, and each unit of it two of the value.
func scattered(n int, sd float64, rest ...stats.Term) Comparison {
	term := stats.RepeatabilityTerm(n, sd)
	term.Sensitivity = 2
	return Comparison{
		Band: Band{-inf, inf}, Value: 300, Confidence: 0.95, Terms: append([]stats.Term{term}, rest...)}
}

// By hand, with Student's factors as handbooks print them: the guard of n
// readings is t 2 sd/sqrt(n).
func TestReadingsFor(t *testing.T) {
	// Beside the readings, 2 (to the value: 4) known beforehand. Of 30 readings:
	// sqrt(4^2 + (2 3/sqrt(30))^2) = 4.147, over 5000 degrees of freedom, times 1.960.
	floor := stats.Term{Standard: 2, DoF: stats.Infinite, Distribution: stats.Normal, Sensitivity: -2}
	for _, c := range []struct {
		name       string
		comparison Comparison
		rule       Rule
		wanted, sd float64
		from       int
		n          int // 0: none
		best       float64
	}{
		{"seven", scattered(5, 3), Guarded, 6, 3, 6, 7, 2.447 * 6 / math.Sqrt(7)},
		{"six would not do", scattered(5, 3), Guarded, 2.571 * 6 / math.Sqrt(6) * 1.001, 3, 6, 6, 2.571 * 6 / math.Sqrt(6)},
		{"from where it is asked", scattered(5, 3), Guarded, 6, 3, 10, 10, 2.262 * 6 / math.Sqrt(10)},
		{"thirty", scattered(5, 3), Guarded, 2.2415, 3, 6, 30, 2.045 * 6 / math.Sqrt(30)},
		{"more than thirty", scattered(5, 3), Guarded, 2.23, 3, 6, 0, 2.045 * 6 / math.Sqrt(30)},
		{"one-sided", scattered(5, 3), OneSided95, 6, 3, 3, 5, 2.132 * 6 / math.Sqrt(5)},
		{"simple", scattered(5, 3), Simple, 0, 3, 6, 6, 0},
		{"another scatter than that of the terms", scattered(5, 30), Guarded, 6, 3, 3, 7, 2.447 * 6 / math.Sqrt(7)},
		{"something stays", scattered(5, 3, floor), Guarded, 8, 3, 6, 0, 1.960 * 4.1473},
		{"nothing", scattered(5, 3), Guarded, 0, 3, 6, 0, 2.045 * 6 / math.Sqrt(30)},
		{"no scatter", scattered(5, 3, floor), Guarded, 7.85, 0, 3, 3, 1.960 * 4},
	} {
		t.Run(c.name, func(t *testing.T) {
			c.comparison.Rule = c.rule
			before := fmt.Sprint(c.comparison)
			n, best, ok := c.comparison.ReadingsFor(c.wanted, c.sd, c.from)
			if n != c.n || ok != (c.n > 0) || math.Abs(best-c.best) > 1e-3*c.best {
				t.Errorf("%d readings (%t), guard %g, want %d, %g", n, ok, best, c.n, c.best)
			}
			if after := fmt.Sprint(c.comparison); after != before {
				t.Errorf("the comparison changes from %s to %s", before, after)
			}
		})
	}
}

// The least number is the least: one reading less would not do.
func TestReadingsForIsTheLeast(t *testing.T) {
	rng := rand.New(rand.NewPCG(37, 38))
	reached := 0
	for range 2000 {
		c := random(rng)
		sd := 40 * rng.Float64()
		wanted := c.withReadings(30, sd).Decide().Guard * (0.9 + 0.5*rng.Float64())
		n, best, ok := c.ReadingsFor(wanted, sd, 3)
		if !ok {
			if best <= wanted {
				t.Fatalf("%+v: %g would reach %g", c, best, wanted)
			}
			continue
		}
		reached++
		if best > wanted || math.Abs(c.withReadings(n, sd).Decide().Guard-best) > 0 {
			t.Fatalf("%+v: %d readings reach %g, wanted %g", c, n, best, wanted)
		}
		if n > 3 && c.withReadings(n-1, sd).Decide().Guard <= wanted {
			t.Fatalf("%+v: %d readings would do, and %d are asked for", c, n-1, n)
		}
	}
	if reached < 500 {
		t.Errorf("reached only %d times", reached)
	}
}

func TestRulesAreOffered(t *testing.T) {
	if got := Rules(); got[0] != Guarded || len(got) != 3 || !slices.Contains(got, Simple) || !slices.Contains(got, OneSided95) {
		t.Errorf("%v", got)
	}
}

func TestPublishedLimits(t *testing.T) {
	seen := map[string]bool{}
	for _, l := range All() {
		t.Run(l.Key, func(t *testing.T) {
			if l.Key == "" || l.Text == "" || seen[l.Key] || seen[l.Text] {
				t.Errorf("key %q and text %q must be there once", l.Key, l.Text)
			}
			seen[l.Key], seen[l.Text] = true, true
			s, ok := scale.ByKey(l.Scale)
			if !ok || s.Leeb {
				t.Fatalf("scale %q", l.Scale)
			}
			if l.Source == "" {
				t.Error("no source")
			}
			bounds := 0
			for _, bound := range []float64{l.Min, l.Max} {
				if math.IsNaN(bound) {
					continue
				}
				bounds++
				if !(bound > 0 && bound >= s.Lo && bound <= s.Hi) {
					t.Errorf("%g %s lies outside the scale, %g to %g", bound, s.Key, s.Lo, s.Hi)
				}
			}
			if bounds == 0 || bounds == 2 && !(l.Min < l.Max) {
				t.Errorf("from %g to %g", l.Min, l.Max)
			}
		})
	}
	if len(seen) == 0 {
		t.Error("no limit is offered")
	}
}

func TestCallersKeepTheirHandsOff(t *testing.T) {
	All()[0].Key = "changed"
	Rules()[0] = "changed"
	if All()[0].Key == "changed" || Rules()[0] == "changed" {
		t.Error("the caller can change the limits or the rules")
	}
}
