package scale

import (
	"errors"
	"math"
	"math/rand/v2"
	"slices"
	"strings"
	"testing"

	"strikebook/convert/curve"
	"strikebook/convert/metal"
	"strikebook/convert/stats"
)

func mustGroup(t testing.TB, key string) metal.Group {
	t.Helper()
	g, ok := metal.ByKey(key)
	if !ok {
		t.Fatalf("no metal group %q", key)
	}
	return g
}

func mustLeg(t testing.TB, group string, key Key) Leg {
	t.Helper()
	for _, leg := range Legs(mustGroup(t, group)) {
		if leg.Scale.Key == key {
			return leg
		}
	}
	t.Fatalf("no leg to %s on %s", key, group)
	return Leg{}
}

func mustScale(t testing.TB, key Key) Scale {
	t.Helper()
	s, ok := ByKey(key)
	if !ok {
		t.Fatalf("no scale %q", key)
	}
	return s
}

// value is what a leg makes of a hardness where it must serve it.
func value(t testing.TB, l Leg, hv float64) Value {
	t.Helper()
	v, err := l.At(hv)
	if err != nil {
		t.Fatal(err)
	}
	return v
}

// mustBack turns a leg round on its whole range.
func mustBack(t testing.TB, l Leg) Back {
	t.Helper()
	back, err := l.Back(l.Domain())
	if err != nil {
		t.Fatal(err)
	}
	return back
}

// everyLeg calls do for each leg of each metal.
func everyLeg(t *testing.T, do func(*testing.T, Leg)) {
	t.Helper()
	for _, g := range metal.All() {
		for _, l := range Legs(g) {
			t.Run(g.Key+" "+string(l.Scale.Key), func(t *testing.T) { do(t, l) })
		}
	}
}

// grid returns n+1 hardnesses from one end of a leg to the other.
func grid(l Leg, n int) []float64 {
	lo, hi := l.Domain()
	hvs := make([]float64, n+1)
	for i := range hvs {
		hvs[i] = lo + (hi-lo)*float64(i)/float64(n)
	}
	hvs[n] = hi
	return hvs
}

func TestLegsOfEachMetal(t *testing.T) {
	for group, want := range map[string]string{ // the methods, in the order they are shown
		"low-alloy-steel":       "HBW 10/3000, HRC, HRB, HRA, HS, Rm",
		"tool-steel":            "HBW 10/3000, HRC, HRB, HRA, HS",
		"martensitic-stainless": "HBW 10/3000, HRC, HRB, HRA, HS",
		"austenitic-stainless":  "HBW, HRB",
		"duplex-stainless":      "HBW",
		"grey-iron":             "HBW",
		"ductile-iron":          "HBW",
		"aluminium":             "HBW 10/500, HRB",
		"brass":                 "HBW 10/500, HRB, HRF",
		"bronze":                "HBW",
		"copper":                "HBW",
		"nickel-alloy":          "HBW 10/3000, HRC, HRB, HRA",
		"titanium":              "HBW",
	} {
		var methods []string
		for _, l := range Legs(mustGroup(t, group)) {
			methods = append(methods, l.Method)
		}
		if got := strings.Join(methods, ", "); got != want {
			t.Errorf("%s: %s, want %s", group, got, want)
		}
	}
	if legs := Legs(metal.Group{Key: "glass"}); legs != nil {
		t.Errorf("glass is no metal, yet has %d legs", len(legs))
	}
}

// What may never be shown, on whatever metal: ISO 6508-1 and ISO 6506-1.
func TestLegsKeepToTheirScales(t *testing.T) {
	const noise = 1e-9
	limits := map[Key]struct{ lo, hi float64 }{HRC: {20, 70}, HRB: {55, 100}, HBW: {0, 650}}
	everyLeg(t, func(t *testing.T, l Leg) {
		lo, hi, ok := l.Span(l.Domain())
		if !ok || lo < l.Scale.Lo-noise || hi > l.Scale.Hi+noise {
			t.Errorf("from %g to %g, the scale from %g to %g", lo, hi, l.Scale.Lo, l.Scale.Hi)
		}
		if limit, ok := limits[l.Scale.Key]; ok && (lo < limit.lo-noise || hi > limit.hi+noise) {
			t.Errorf("from %g to %g, never below %g nor above %g", lo, hi, limit.lo, limit.hi)
		}
	})
}

func TestNothingOutsideALeg(t *testing.T) {
	everyLeg(t, func(t *testing.T, l Leg) {
		lo, hi := l.Domain()
		for _, c := range []struct {
			hv    float64
			above bool
		}{
			{math.Nextafter(lo, 0), false}, {0, false}, {-5, false}, {math.Inf(-1), false},
			{math.Nextafter(hi, 2*hi), true}, {1e9, true}, {math.Inf(1), true},
		} {
			v, err := l.At(c.hv)
			var outside *curve.OutsideError
			if !errors.As(err, &outside) || outside.Above() != c.above || v != (Value{}) {
				t.Errorf("%g HV: %+v, error %v, want outside, above %t", c.hv, v, err, c.above)
			}
		}
		if v, err := l.At(math.NaN()); err == nil {
			t.Errorf("NaN HV: %+v", v)
		}
	})
}

func TestLegsRise(t *testing.T) {
	everyLeg(t, func(t *testing.T, l Leg) {
		before := math.Inf(-1)
		for _, hv := range grid(l, 2000) {
			v := value(t, l, hv)
			for name, figure := range map[string]float64{"value": v.Value, "slope": v.Slope, "uncertainty": v.Standard} {
				if !(figure > 0) || math.IsInf(figure, 1) {
					t.Fatalf("%g HV: %s %g, want above 0 and finite", hv, name, figure)
				}
			}
			if !(v.Value > before) {
				t.Fatalf("%g HV: %g does not rise from %g", hv, v.Value, before)
			}
			before = v.Value
		}
	})
}

// Across a join the slope is the steeper one of the tables beside it, on
// purpose (see bridge); everywhere else it is the derivative.
func TestSlopeIsTheDerivative(t *testing.T) {
	const h, share = 1e-4, 1e-4
	everyLeg(t, func(t *testing.T, l Leg) {
		random := rand.New(rand.NewPCG(1, 2))
		lo, hi := l.Domain()
		for range 500 {
			hv := lo + h + (hi-lo-2*h)*random.Float64()
			slope := value(t, l, hv).Slope
			difference := (value(t, l, hv+h).Value - value(t, l, hv-h).Value) / (2 * h)
			if hv >= l.gap.lo && hv <= l.gap.hi {
				difference = max(difference, l.gap.slope)
			}
			if !near(share, slope, difference) {
				t.Fatalf("%g HV: slope %.8g, difference %.8g", hv, slope, difference)
			}
		}
	})
}

func TestBackIsTheInverse(t *testing.T) {
	everyLeg(t, func(t *testing.T, l Leg) {
		back := mustBack(t, l)
		for _, hv := range grid(l, 200) {
			v := value(t, l, hv)
			if got := at(t, back, v.Value); !near(1e-9, got, hv) {
				t.Fatalf("%g HV -> %g -> %g HV", hv, v.Value, got)
			}
			if got, err := back.Inverse(hv); err != nil || got != v.Value {
				t.Fatalf("%g HV: inverse of the inverse %g (%v), want %g", hv, got, err, v.Value)
			}
			if slope, err := back.Slope(v.Value); err != nil || !near(1e-4, slope*v.Slope, 1) {
				t.Fatalf("%g HV: slope %g there (%v), %g back", hv, v.Slope, err, slope)
			}
		}
		lo, hi := back.Domain()
		for _, outside := range []float64{math.Nextafter(lo, 0), math.Nextafter(hi, 2*hi), math.NaN()} {
			if hv, err := back.At(outside); err == nil {
				t.Errorf("%g gave %g HV", outside, hv)
			}
			if slope, err := back.Slope(outside); err == nil {
				t.Errorf("%g gave the slope %g", outside, slope)
			}
		}
	})
}

// The ends of a leg are reached, though they are found by a search.
func TestEndsOfALeg(t *testing.T) {
	for _, c := range []struct {
		group string
		scale Key
		value float64
	}{
		{"nickel-alloy", HRC, 20}, {"low-alloy-steel", HRC, 20}, {"low-alloy-steel", HBW, 650}, {"low-alloy-steel", HRB, 100}, {"brass", HRB, 55},
	} {
		back := mustBack(t, mustLeg(t, c.group, c.scale))
		if _, err := back.At(c.value); err != nil {
			t.Errorf("%s: %g %s: %v", c.group, c.value, c.scale, err)
		}
	}
}

func TestPartsOfALeg(t *testing.T) {
	leg := mustLeg(t, "duplex-stainless", HBW) // HBW = 0.97 HV, HBW 40 to 450
	for _, c := range []struct {
		name           string
		from, to       float64
		lo, hi         float64
		served, beyond bool // beyond: what is asked for lies above the leg
	}{
		{name: "inside", from: 200, to: 300, lo: 194, hi: 291, served: true},
		{name: "more than the leg", from: 0, to: 1000, lo: 40, hi: 450, served: true},
		{name: "its lower end", from: 0, to: 100, lo: 40, hi: 97, served: true},
		{name: "below", from: 10, to: 20},
		{name: "above", from: 500, to: 600, beyond: true},
	} {
		t.Run(c.name, func(t *testing.T) {
			lo, hi, ok := leg.Span(c.from, c.to)
			back, err := leg.Back(c.from, c.to)
			if !c.served {
				var outside *curve.OutsideError
				if ok || !errors.As(err, &outside) || outside.Above() != c.beyond {
					t.Errorf("%t, error %v, want none, above %t", ok, err, c.beyond)
				}
				return
			}
			if !ok || !near(1e-12, lo, c.lo) || !near(1e-12, hi, c.hi) {
				t.Errorf("from %g to %g, want %g to %g", lo, hi, c.lo, c.hi)
			}
			if from, to := back.Domain(); err != nil || from != lo || to != hi {
				t.Errorf("back from %g to %g (%v), there %g to %g", from, to, err, lo, hi)
			}
		})
	}
}

// Two standards against each other, within what they are known to differ by: in
// the Rockwell B range E140 puts HBW equal to HV, ISO 18265 at 0.95 HV.
func TestE140AgainstISO18265(t *testing.T) {
	const c = 240 // HV from where the Rockwell C range goes up
	for _, r := range []struct {
		name            string
		scale           Key
		from, to        float64 // HV
		absolute, share float64
	}{
		{"HRC", HRC, 0, 1000, 0.2, 0},
		{"HRB", HRB, 0, 1000, 2, 0},
		{"HBW, Rockwell B range", HBW, 0, c, 0, 0.06},
		{"HBW, Rockwell C range", HBW, c, 1000, 0, 0.015},
	} {
		t.Run(r.name, func(t *testing.T) {
			leg, iso := mustLeg(t, "low-alloy-steel", r.scale), printed(t, r.scale, "iso18265-A1")
			lo, hi := leg.Domain()
			compared, worst := 0, 0.0
			for i, hv := range iso.hvs {
				if hv < max(lo, r.from) || hv > min(hi, r.to) {
					continue
				}
				got, want := value(t, leg, hv).Value, iso.values[i]
				off := math.Abs(got - want)
				if !(off <= r.absolute+r.share*want) {
					t.Errorf("%g HV: %.2f, ISO 18265 %g", hv, got, want)
				}
				compared, worst = compared+1, max(worst, off)
			}
			if compared < 10 {
				t.Errorf("only %d values could be compared", compared)
			}
			t.Logf("largest difference of %d: %.2f %s", compared, worst, r.scale)
		})
	}
}

// A table's rounding or disagreement is a half-width or a range, taken as
// rectangular; a table that stands alone is worth 1.5 %, similarity 3 %.
func TestStandardUncertainty(t *testing.T) {
	for _, c := range []struct {
		name, group string
		scale       Key
		hv          float64
		want        float64
	}{
		{"HBW printed to 1", "low-alloy-steel", HBW, 260, stats.Rectangular(0.5)},
		{"HBW 200 against 190", "low-alloy-steel", HBW, 200, stats.Rectangular(10)},
		{"HRC by ISO 18265, printed to 0.1", "low-alloy-steel", HRC, 940, stats.Rectangular(0.05)},
		{"HRC where HV, printed to 1, is coarser", "low-alloy-steel", HRC, 238, stats.Rectangular(0.2 / 2)},
		{"Rm printed to 5", "low-alloy-steel", Rm, 340, stats.Rectangular(2.5)},
		{"nickel, 38 HRC", "nickel-alloy", HRC, 362, 0.015 * 38},
		{"brass, 89 HRF", "brass", HRF, 100, 0.015 * 89},
		{"similarity", "titanium", HBW, 300, 0.03 * 0.97 * 300},
		// dHRB/dln HBW = 130 - HRB, so that 3 % of HBW are 0.9 HRB at 100 HRB.
		{"austenitic, 100 HRB", "austenitic-stainless", HRB, 1 / (0.0001304 * 30 * 0.97), math.Hypot(0.015*100, 0.03*30)},
	} {
		t.Run(c.name, func(t *testing.T) {
			if got := value(t, mustLeg(t, c.group, c.scale), c.hv).Standard; !near(1e-4, got, c.want) {
				t.Errorf("%g HV: %.5f %s, want %.5f", c.hv, got, c.scale, c.want)
			}
		})
	}
}

// What the tables disagree by is part of the uncertainty.
func TestUncertaintyCoversTheDisagreement(t *testing.T) {
	for _, key := range []Key{HBW, HRC, HRB, HRA} {
		leg := mustLeg(t, "low-alloy-steel", key)
		for _, p := range find(key, steelTables) {
			for i, hv := range p.hvs {
				v, err := leg.At(hv)
				if err != nil {
					continue // outside the leg
				}
				if off := math.Abs(v.Value - p.values[i]); v.Standard < off/math.Sqrt(3)*(1-1e-12) {
					t.Errorf("%g HV: %s differs by %.2f %s, uncertainty %.3f", hv, p.title(), off, key, v.Standard)
				}
			}
		}
	}
}

// The tables' ranges overlap at the join and they disagree there. The curve
// leaves the one and meets the other without a step.
func TestJoin(t *testing.T) {
	const step = 0.1 // HV
	for _, key := range []Key{HBW, HRA} {
		t.Run(string(key), func(t *testing.T) {
			leg := mustLeg(t, "low-alloy-steel", key)
			lower, upper := printed(t, key, "e140-2"), printed(t, key, "e140-1")
			for _, end := range []struct {
				p  published
				hv float64
			}{{lower, leg.gap.lo}, {upper, leg.gap.hi}} {
				if got, want := value(t, leg, end.hv).Value, at(t, end.p.curve, end.hv); got != want {
					t.Errorf("%g HV: %g, %s %g", end.hv, got, end.p.title(), want)
				}
			}
			for hv := leg.gap.lo; hv < leg.gap.hi; hv += step {
				if rise := value(t, leg, hv+step).Value - value(t, leg, hv).Value; rise > upper.step/2 {
					t.Errorf("%g HV: rises by %g %s within %g HV", hv, rise, key, step)
				}
			}
			for _, c := range []struct {
				hv   float64
				want string
			}{
				{leg.gap.lo, lower.source},
				{leg.gap.hi, upper.source},
				{(leg.gap.lo + leg.gap.hi) / 2, "Across the join of ASTM E140, Table 2 and ASTM E140, Table 1"},
			} {
				if steps := leg.Steps(c.hv); len(steps) != 1 || !strings.HasPrefix(steps[0].Source, c.want) {
					t.Errorf("%g HV: %+v, want %q", c.hv, steps, c.want)
				}
			}
		})
	}
}

func TestStepsNameTheirSource(t *testing.T) {
	everyLeg(t, func(t *testing.T, l Leg) {
		back := mustBack(t, l)
		for _, hv := range grid(l, 50) {
			there, here := l.Steps(hv), back.Steps(hv)
			slices.Reverse(here)
			reached := "HV"
			for i, s := range there {
				from, to, _ := strings.Cut(s.Step, " to ")
				if from != reached || s.Source == "" || s.Basis != Standard && s.Basis != Similar {
					t.Fatalf("%g HV, step %d from %s: %+v", hv, i+1, reached, s)
				}
				s.Step = to + " to " + from
				if here[i] != s {
					t.Fatalf("%g HV: back by %+v, want %+v", hv, here[i], s)
				}
				reached = to
			}
			if reached != string(l.Scale.Key) {
				t.Fatalf("%g HV: the steps lead to %s", hv, reached)
			}
		}
	})
}

// ASTM E140, from memory: 1/HBW = 0.0001304 (130 - HRB), 256 HBW at 100 HRB.
func TestAusteniticSteel(t *testing.T) {
	brinell := mustLeg(t, "austenitic-stainless", HBW)
	rockwell := mustBack(t, mustLeg(t, "austenitic-stainless", HRB))
	if lo, hi := rockwell.Domain(); !near(1e-12, lo, 60) || !near(1e-12, hi, 100) {
		t.Errorf("HRB from %g to %g, want 60 to 100", lo, hi)
	}
	lo, hi := rockwell.Domain()
	for _, hrb := range []float64{lo, 70, 80, 90, hi} {
		got := value(t, brinell, at(t, rockwell, hrb)).Value
		if want := 1 / (0.0001304 * (130 - hrb)); !near(1e-12, got, want) {
			t.Errorf("%g HRB: %g HBW, want %g", hrb, got, want)
		}
	}
	if got := brinell.Scale.Quote(value(t, brinell, at(t, rockwell, hi)).Value); got != "256" {
		t.Errorf("100 HRB: %s HBW, want 256", got)
	}
}

// Values that can be read off the published tables.
func TestPrintedEquivalents(t *testing.T) {
	for _, c := range []struct {
		group string
		scale Key
		hv    float64
		want  string
	}{
		{"low-alloy-steel", HBW, 348, "330"}, // between 345 (327) and 354 (336): the model's calibration point
		{"low-alloy-steel", HRC, 513, "50.0"},
		{"low-alloy-steel", HRB, 150, "80.0"},
		{"low-alloy-steel", Rm, 340, "1095"},
		{"nickel-alloy", HRC, 362, "38.0"},
		{"brass", HRF, 100, "89.0"},
		{"aluminium", HBW, 123, "105"},
		{"titanium", HBW, 300, "291"}, // by similarity
	} {
		leg := mustLeg(t, c.group, c.scale)
		if got := leg.Scale.Quote(value(t, leg, c.hv).Value); got != c.want {
			t.Errorf("%s, %g HV: %s %s, want %s", c.group, c.hv, got, c.scale, c.want)
		}
	}
}

func TestToItself(t *testing.T) {
	leg := ToItself(mustScale(t, HV), 90, 940)
	if lo, hi := leg.Domain(); lo != 90 || hi != 940 {
		t.Errorf("from %g to %g HV, want 90 to 940", lo, hi)
	}
	for _, hv := range []float64{90, 348, 940} {
		if v := value(t, leg, hv); v != (Value{Value: hv, Slope: 1}) || leg.Steps(hv) != nil {
			t.Errorf("%g HV: %+v by %v, want itself without a step", hv, v, leg.Steps(hv))
		}
	}
	if v, err := leg.At(941); err == nil {
		t.Errorf("941 HV: %+v", v)
	}
}

func BenchmarkLegs(b *testing.B) {
	steel := mustGroup(b, "low-alloy-steel")
	b.Run("made", func(b *testing.B) {
		for b.Loop() {
			makeLegs(steel.Tables)
		}
	})
	b.Run("kept", func(b *testing.B) {
		for b.Loop() {
			Legs(steel)
		}
	})
}

func BenchmarkLeg(b *testing.B) {
	leg := mustLeg(b, "low-alloy-steel", HBW)
	b.Run("at", func(b *testing.B) {
		for b.Loop() {
			value(b, leg, 348)
		}
	})
	b.Run("back", func(b *testing.B) {
		back := mustBack(b, leg)
		for b.Loop() {
			at(b, back, 330)
		}
	})
}
