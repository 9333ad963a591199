package stats

import (
	"math"
	"math/rand/v2"
	"slices"
	"testing"
)

// analyzed is the analysis of groups of readings.
func analyzed(groups [][]float64) OneWay {
	var all []Summary
	for _, g := range groups {
		all = append(all, Summarize(g))
	}
	return Analyze(all)
}

func TestAnalyzeAgainstNIST(t *testing.T) {
	groups := make([][]float64, 5)
	for _, row := range reference(t, "nist_sirstv.csv").Rows {
		i := int(row.Number("instrument")) - 1
		groups[i] = append(groups[i], row.Number("value"))
	}
	a := analyzed(groups)
	if a.Groups != 5 || a.N != 25 || a.BetweenDoF != 4 || a.WithinDoF != 20 {
		t.Errorf("%+v", a)
	}
	if d := digits(a.F, 1.18046237440255); d < 10 {
		t.Errorf("F = %.15g has %.1f digits", a.F, d)
	}
}

// Designed data with a known answer, in the manner of NIST's SmLs sets: groups
// of 21 readings, one at the group's mean and twenty a tenth to either side of
// it; of the nine groups' means, one lies at the offset and eight lie a tenth to
// either side of that. So the squares between are 21 * 8 * 0.01 = 1.68 with 8
// degrees of freedom, those within 9 * 20 * 0.01 = 1.8 with 180, and F is 21.
func TestAnalyzeFarFromZero(t *testing.T) {
	for _, c := range []struct {
		offset float64
		share  float64 // tolerance: what the rounding of the readings themselves leaves
	}{{1.4, 1e-13}, {600, 1e-10}, {1e6, 1e-8}} {
		var groups [][]float64
		for g := range 9 {
			mean := c.offset
			if g > 0 {
				mean += 0.1 * float64(1-2*(g%2))
			}
			group := []float64{mean}
			for range 10 {
				group = append(group, mean-0.1, mean+0.1)
			}
			groups = append(groups, group)
		}
		a := analyzed(groups)
		if !near(c.share, a.F, 21) || !near(c.share, a.Between, 0.21) || !near(c.share, a.Within, 0.01) || !near(1e-15, a.GrandMean, c.offset) {
			t.Errorf("offset %g: %+v", c.offset, a)
		}
	}
}

func TestExceedanceOfF(t *testing.T) {
	for _, row := range reference(t, "f_exceedance.csv").Rows {
		f, between, within := row.Number("f"), row.Number("between"), row.Number("within")
		if got, want := exceedanceOfF(f, between, within), row.Number("p"); !near(1e-9, got, want) {
			t.Errorf("F(%g, %g) above %g: %g, want %g", between, within, f, got, want)
		}
	}
}

// randomGroups makes groups of readings, some of one reading.
func randomGroups(rng *rand.Rand) [][]float64 {
	groups := make([][]float64, 2+rng.IntN(10))
	for i := range groups {
		level := 600 + 5*rng.NormFloat64()
		for range 1 + rng.IntN(8) {
			groups[i] = append(groups[i], level+4*rng.NormFloat64())
		}
	}
	groups[0] = append(groups[0], 611, 614) // so that one at least scatters
	return groups
}

// F and p ask neither where zero lies, nor for the unit, nor for the order.
func TestAnalyzeProperties(t *testing.T) {
	rng := rand.New(rand.NewPCG(31, 32))
	for range 500 {
		groups := randomGroups(rng)
		want := analyzed(groups)
		if !(want.F >= 0) || !(want.P >= 0 && want.P <= 1) {
			t.Fatalf("%v: %+v", groups, want)
		}
		changed := func(what string, change func(v float64) float64, shift, factor float64) {
			t.Helper()
			var other [][]float64
			for _, g := range groups {
				var h []float64
				for _, v := range g {
					h = append(h, change(v))
				}
				rng.Shuffle(len(h), func(i, j int) { h[i], h[j] = h[j], h[i] })
				other = append(other, h)
			}
			rng.Shuffle(len(other), func(i, j int) { other[i], other[j] = other[j], other[i] })
			other = slices.Insert(other, rng.IntN(len(other)), nil) // a spot without readings
			got := analyzed(other)
			if !near(1e-9, got.F, want.F) || !near(1e-7, got.P, want.P) ||
				!near(1e-12, got.GrandMean, want.GrandMean*factor+shift) || !near(1e-9, got.Within, want.Within*factor*factor) {
				t.Fatalf("%s: %+v, was %+v", what, got, want)
			}
		}
		changed("order", func(v float64) float64 { return v }, 0, 1)
		changed("shift", func(v float64) float64 { return v + 250 }, 250, 1)
		changed("scale", func(v float64) float64 { return v * 0.25 }, 0, 0.25)
	}
}

// Of two groups, F is the square of Student's t (pooled), and p its two-sided one.
func TestAnalyzeTwoGroupsIsStudent(t *testing.T) {
	rng := rand.New(rand.NewPCG(33, 34))
	for range 100 {
		a, b := scatter(rng, 2+rng.IntN(8)), scatter(rng, 2+rng.IntN(8))
		x, y := Summarize(a), Summarize(b)
		n, m := float64(x.N), float64(y.N)
		pooled := ((n-1)*x.SD*x.SD + (m-1)*y.SD*y.SD) / (n + m - 2)
		student := math.Abs(x.Mean-y.Mean) / math.Sqrt(pooled*(1/n+1/m))
		got := analyzed([][]float64{a, b})
		if p := 2 * (1 - StudentCDF(student, n+m-2)); !near(1e-9, got.F, student*student) || math.Abs(got.P-p) > 1e-12 {
			t.Fatalf("%+v, want F %g, p %g", got, student*student, p)
		}
	}
}

func TestAnalyzeHasNothingToSay(t *testing.T) {
	for name, c := range map[string]struct {
		groups            [][]float64
		between, within   bool // whether there is such a mean square
		groupsN, between0 int
	}{
		"nothing":       {nil, false, false, 0, 0},
		"empty groups":  {[][]float64{nil, {}}, false, false, 0, 0},
		"one group":     {[][]float64{{600, 602}}, false, true, 1, 0},
		"one reading":   {[][]float64{{600}, {602}}, true, false, 2, 1},
		"all alike":     {[][]float64{{600, 600}, {602, 602}}, true, true, 2, 1},
		"one and empty": {[][]float64{{600, 602}, nil}, false, true, 1, 0},
	} {
		t.Run(name, func(t *testing.T) {
			a := analyzed(c.groups)
			if a.Groups != c.groupsN || a.BetweenDoF != c.between0 || !math.IsNaN(a.F) || !math.IsNaN(a.P) ||
				math.IsNaN(a.Between) == c.between || math.IsNaN(a.Within) == c.within {
				t.Errorf("%+v", a)
			}
		})
	}
}

func BenchmarkAnalyze(b *testing.B) {
	rng := rand.New(rand.NewPCG(35, 36))
	var groups []Summary
	for range 1000 {
		groups = append(groups, Summarize(scatter(rng, 5)))
	}
	for b.Loop() {
		Analyze(groups)
	}
}
