package owncurve_test

import (
	"errors"
	"math"
	"math/rand/v2"
	"regexp"
	"slices"
	"strings"
	"testing"

	"strikebook/convert/curve"
	"strikebook/convert/device"
	"strikebook/convert/edition"
	"strikebook/convert/metal"
	"strikebook/convert/owncurve"
	"strikebook/convert/rebound"
	"strikebook/convert/record/recordtest"
	"strikebook/convert/scale"
	"strikebook/convert/strict"
	"strikebook/convert/wording"
)

// bolts are offcuts of turbine bolts measured in a laboratory: invented.
func bolts() owncurve.Definition {
	d := owncurve.Definition{
		Name: "Turbine bolts", Device: "D", Group: "low-alloy-steel", Scale: scale.HBW, Kind: owncurve.Own,
		Source: "report 1187", Serial: "A-1", Date: "2026-03-01",
	}
	for _, p := range [][4]float64{
		{452.1, 1.6, 163, 2.5}, {478.4, 1.8, 185, 2.5}, {505.9, 1.5, 209, 3}, {531.2, 1.9, 233, 3},
		{559.6, 1.4, 262, 3}, {583, 1.7, 289, 3.5}, {611.5, 1.6, 322, 4}, {640.2, 1.8, 361, 4},
	} {
		d.Pairs = append(d.Pairs, owncurve.Pair{HL: p[0], UHL: p[1], Value: p[2], UValue: p[3]})
	}
	return d
}

func mustMake(t testing.TB, d owncurve.Definition) owncurve.Fitted {
	t.Helper()
	f, err := owncurve.Make(d)
	if err != nil {
		t.Fatal(err)
	}
	return f
}

func mustSolve(t testing.TB, d owncurve.Definition) *owncurve.Solution {
	t.Helper()
	if err := d.Check(""); err != nil {
		t.Fatal(err)
	}
	s, err := d.Solve()
	if err != nil {
		t.Fatal(err)
	}
	return s
}

func mustMarshal(t testing.TB, v any) string {
	t.Helper()
	text, err := strict.Marshal(v)
	if err != nil {
		t.Fatal(err)
	}
	return string(text)
}

// at is the curve at a reading, with its standard uncertainty.
func at(t testing.TB, s *owncurve.Solution, hl float64) (value, standard float64) {
	t.Helper()
	value, err := s.At(hl)
	if err != nil {
		t.Fatal(err)
	}
	return value, s.Term(hl, value).Standard
}

func near(tolerance, got, want float64) bool {
	return math.Abs(got-want) <= tolerance*math.Abs(want)
}

func codes(f owncurve.Fitted) string {
	var all []string
	for _, w := range f.Warnings {
		all = append(all, w.Code)
	}
	return strings.Join(all, " ")
}

// about makes pairs about a law, in Vickers.
func about(random *rand.Rand, n int, law func(hl float64) float64, noise float64) owncurve.Definition {
	const uHL, uValue = 2.0, 3.0
	d := owncurve.Definition{Device: "D", Group: "low-alloy-steel", Scale: scale.HV, Kind: owncurve.Own}
	for i := range n {
		hl := 420 + 260*(float64(i)+0.5*random.Float64())/float64(n)
		d.Pairs = append(d.Pairs, owncurve.Pair{
			HL: hl + noise*uHL*random.NormFloat64(), UHL: uHL, Value: law(hl) + noise*uValue*random.NormFloat64(), UValue: uValue})
	}
	return d
}

func straight(hl float64) float64  { return -330 + 1.05*hl }
func power(hl float64) float64     { return 348 * math.Pow(hl/610, 2.6) }
func quadratic(hl float64) float64 { return 640 - 2.6*hl + 0.0035*hl*hl }

// Exact pairs give back the form they were made with, and its parameters.
func TestFormIsFound(t *testing.T) {
	random := rand.New(rand.NewPCG(1, 2))
	for _, c := range []struct {
		form owncurve.Form
		law  func(float64) float64
		want []float64
	}{
		{owncurve.Straight, straight, []float64{-330, 1.05}},
		{owncurve.Power, power, []float64{math.Log(348) - 2.6*math.Log(610), 2.6}},
		{owncurve.Quadratic, quadratic, []float64{640, -2.6, 0.0035}},
	} {
		f := mustMake(t, about(random, 9, c.law, 0))
		if f.Form != c.form {
			t.Errorf("%s: found %s of %s", c.form, f.Form, mustMarshal(t, f.Candidates))
			continue
		}
		for i, want := range c.want {
			if !near(1e-6, f.Parameters[i], want) {
				t.Errorf("%s: parameters %v, want %v", c.form, f.Parameters, c.want)
			}
		}
	}
}

// The parameters of a quadratic are recovered within two standard uncertainties,
// and its band covers what the pairs were made with as often as it says.
func TestQuadraticIsRecovered(t *testing.T) {
	const trials = 100
	recovered, covered, points, chosen := 0, 0, 0, 0
	for trial := range trials {
		random := rand.New(rand.NewPCG(uint64(trial), 7))
		f := mustMake(t, about(random, 12, quadratic, 1))
		if f.Form != owncurve.Quadratic {
			continue
		}
		chosen++
		inside := true
		for i, want := range []float64{640, -2.6, 0.0035} {
			inside = inside && math.Abs(f.Parameters[i]-want) < 2*math.Sqrt(f.Covariance[i][i])
		}
		if inside {
			recovered++
		}
		for _, p := range f.Plot {
			points++
			if want := quadratic(p.HL); p.Low < want && want < p.High {
				covered++
			}
		}
	}
	share := float64(covered) / float64(points)
	t.Logf("quadratic chosen in %d of %d, all parameters within 2 standard uncertainties in %d, band covers %.1f %%", chosen, trials, recovered, 100*share)
	if chosen < trials || recovered < 90 || share < 0.90 || share > 0.98 {
		t.Error("a quadratic is not recovered as it should be")
	}
}

// Over many trials the band keeps its promise whichever form made the pairs, and
// whichever is chosen.
func TestBandCovers(t *testing.T) {
	const trials = 1000
	for form, law := range map[owncurve.Form]func(float64) float64{owncurve.Straight: straight, owncurve.Power: power, owncurve.Quadratic: quadratic} {
		covered, points, right := 0, 0, 0
		for trial := range trials {
			f := mustMake(t, about(rand.New(rand.NewPCG(uint64(trial), 11)), 8, law, 1))
			if f.Form == form {
				right++
			}
			for _, p := range f.Plot {
				points++
				if want := law(p.HL); p.Low < want && want < p.High {
					covered++
				}
			}
		}
		share := float64(covered) / float64(points)
		t.Logf("%s: chosen in %d of %d, band covers %.1f %%", form, right, trials, 100*share)
		if share < 0.90 || share > 0.98 {
			t.Errorf("%s: the band of 95 %% covers %.1f %%", form, 100*share)
		}
	}
}

// The order of the pairs changes nothing at all.
func TestOrderDoesNotMatter(t *testing.T) {
	random := rand.New(rand.NewPCG(3, 4))
	for range 200 {
		d := recordtest.Definition(random)
		if d.Check("") != nil {
			continue
		}
		f, err := owncurve.Make(d)
		order := random.Perm(len(d.Pairs))
		other := d
		other.Pairs = make([]owncurve.Pair, len(order))
		for to, from := range order {
			other.Pairs[to] = d.Pairs[from]
		}
		g, err2 := owncurve.Make(other)
		if err != nil || err2 != nil {
			if (err == nil) != (err2 == nil) {
				t.Fatalf("%v in one order, %v in another", err, err2)
			}
			continue
		}
		for to, from := range order {
			if mustMarshal(t, g.Residuals[to]) != mustMarshal(t, f.Residuals[from]) {
				t.Fatalf("residual %d is\n%s in one order,\n%s in another", from, mustMarshal(t, f.Residuals[from]), mustMarshal(t, g.Residuals[to]))
			}
		}
		f.Pairs, g.Pairs, f.Residuals, g.Residuals, f.Warnings, g.Warnings = nil, nil, nil, nil, nil, nil
		if a, b := mustMarshal(t, f), mustMarshal(t, g); a != b {
			t.Fatalf("in another order\n%.900s\nbecame\n%.900s", a, b)
		}
	}
}

// Values in a unit of another size come to the same form, and to values and
// uncertainties of that size.
func TestSizeOfTheUnitDoesNotMatter(t *testing.T) {
	random := rand.New(rand.NewPCG(5, 6))
	for trial := range 100 {
		d := about(random, 5+random.IntN(8), []func(float64) float64{straight, power, quadratic}[trial%3], 1)
		factor := 0.5 + 2*random.Float64()
		other := d
		other.Pairs = slices.Clone(d.Pairs)
		for i := range other.Pairs {
			other.Pairs[i].Value *= factor
			other.Pairs[i].UValue *= factor
		}
		f, g := mustMake(t, d), mustMake(t, other)
		if f.Form != g.Form || !near(1e-6, *g.AICc, *f.AICc) || !near(1e-6, *g.LeaveOneOut, factor**f.LeaveOneOut) ||
			!near(1e-6, *g.Residual, factor**f.Residual) || !near(1e-6, *g.ChiSquare, *f.ChiSquare) {
			t.Fatalf("times %g: %s %g became %s %g", factor, f.Form, *f.AICc, g.Form, *g.AICc)
		}
		for i, p := range f.Plot {
			q := g.Plot[i]
			if !near(1e-7, q.Value, factor*p.Value) || !near(1e-5, q.High-q.Low, factor*(p.High-p.Low)) {
				t.Fatalf("times %g: %+v became %+v", factor, p, q)
			}
		}
	}
}

// model is the built-in model of device D on low-alloy steel.
func model(t testing.TB) rebound.Leg {
	t.Helper()
	d, _ := device.ByKey("D")
	g, _ := metal.ByKey("low-alloy-steel")
	leg, err := rebound.For(d, g)
	if err != nil {
		t.Fatal(err)
	}
	return leg
}

func anchor(t testing.TB, pairs ...owncurve.Pair) owncurve.Definition {
	t.Helper()
	return owncurve.Definition{Name: "anchor", Device: "D", Group: "low-alloy-steel", Scale: scale.HV, Kind: owncurve.Anchor, Pairs: pairs}
}

// timesModel is a pair whose value is a ratio times the model's, uncertain by a
// share of it.
func timesModel(t testing.TB, hl, ratio, share float64) owncurve.Pair {
	t.Helper()
	hv, err := model(t).At(hl)
	if err != nil {
		t.Fatal(err)
	}
	return owncurve.Pair{HL: hl, Value: ratio * hv, UValue: share * ratio * hv}
}

// Worked by hand: the anchored curve is k times the model; relative standard
// uncertainty sqrt(u_k^2 + 0.03^2), and 0.03 more with each 15 % of HL outside.
func TestAnchorByHand(t *testing.T) {
	for _, c := range []struct {
		name  string
		pairs []owncurve.Pair
		k, u  float64 // of k, relative
		share map[float64]float64
	}{
		{"one pair, 5 % above the model within 1 %", []owncurve.Pair{timesModel(t, 600, 1.05, 0.01)}, 1.05, 0.01, map[float64]float64{
			600: math.Sqrt(0.0001 + 0.0009),        // 0.0316
			690: math.Sqrt(0.0001+0.0009) + 0.03,   // 15 % above the pair
			510: math.Sqrt(0.0001+0.0009) + 0.03,   // 15 % below it
			450: math.Sqrt(0.0001+0.0009) + 0.05,   // 25 % below
			870: math.Sqrt(0.0001+0.0009) + 0.03*3, // 45 % above
		}},
		// Weights 1/0.01^2 and 1/0.02^2 are 4 to 1; u_k = 1/sqrt(10000 + 2500).
		{"two pairs of different weight", []owncurve.Pair{timesModel(t, 500, 1.02, 0.01), timesModel(t, 700, 1.05, 0.02)},
			math.Exp((4*math.Log(1.02) + math.Log(1.05)) / 5), 1 / math.Sqrt(12500), map[float64]float64{
				500: math.Sqrt(1/12500.0 + 0.0009),
				600: math.Sqrt(1/12500.0 + 0.0009), // between the pairs
				805: math.Sqrt(1/12500.0+0.0009) + 0.03,
			}},
		// Of four equal ones u_k is half. The ratios lie 2 % apart, which the model's
		// shape alone allows.
		{"four pairs", []owncurve.Pair{timesModel(t, 450, 0.99, 0.02), timesModel(t, 500, 1.01, 0.02), timesModel(t, 550, 0.99, 0.02), timesModel(t, 600, 1.01, 0.02)},
			math.Sqrt(0.99 * 1.01), 0.01, map[float64]float64{520: math.Sqrt(0.0001 + 0.0009)}},
		// Two pairs 20 % apart are not explained by 1 % each and 3 % of shape:
		// chi-square = 2 (ln 1.2 / 2)^2 / (0.01^2 + 0.03^2) = 16.62, u_k is 4.077 times as wide.
		{"two pairs that disagree", []owncurve.Pair{timesModel(t, 500, 1, 0.01), timesModel(t, 600, 1.2, 0.01)},
			math.Sqrt(1.2), 0.01 / math.Sqrt2 * math.Log(1.2) / math.Sqrt2 / math.Sqrt(0.001), nil},
	} {
		t.Run(c.name, func(t *testing.T) {
			f, s := mustMake(t, anchor(t, c.pairs...)), mustSolve(t, anchor(t, c.pairs...))
			if f.Form != owncurve.Anchored || !near(1e-9, f.Parameters[0], c.k) || !near(1e-9, math.Sqrt(f.Covariance[0][0])/f.Parameters[0], c.u) {
				t.Errorf("k %v, covariance %v, want %g within %g of it", f.Parameters, f.Covariance, c.k, c.u)
			}
			for hl, want := range c.share {
				hv, err := model(t).At(hl)
				if err != nil {
					t.Fatal(err)
				}
				value, standard := at(t, s, hl)
				if !near(1e-9, value, c.k*hv) || !near(1e-9, standard, want*c.k*hv) {
					t.Errorf("%g HLD: %g ± %g, want %g ± %g", hl, value, standard, c.k*hv, want*c.k*hv)
				}
			}
			if disagree := c.u > 0.015; disagree != strings.Contains(codes(f), "pairs-disagree") {
				t.Errorf("warnings %s", codes(f))
			}
		})
	}
}

// Both sides of a pair count: 6 HL through the slope of the model, 2 % of HBW
// through that of the table.
func TestAnchorInBrinell(t *testing.T) {
	d := anchor(t, owncurve.Pair{HL: 610, UHL: 6, Value: 330, UValue: 6.6})
	d.Scale = scale.HBW
	f := mustMake(t, d)
	// The model is calibrated to 348 HV at 610 HLD, which is 330 HBW by ASTM E140.
	if math.Abs(f.Parameters[0]-1) > 0.002 {
		t.Errorf("k = %g, want 1 at the point the model is calibrated to", f.Parameters[0])
	}
	hv, err1 := model(t).At(610)
	slope, err2 := curve.MeanSlope(model(t), 610, 6)
	if err := errors.Join(err1, err2); err != nil {
		t.Fatal(err)
	}
	// HV per HBW is 1.06 there: 348/330, the slope of the table.
	want := math.Hypot(6*slope/hv, 6.6*1.06/348)
	if u := math.Sqrt(f.Covariance[0][0]); math.Abs(u-want) > 0.001 {
		t.Errorf("u(k) = %g, want %g", u, want)
	}
	if r := f.Residuals[0]; math.Abs(*r.Residual) > 1e-9 {
		t.Errorf("a single pair lies %g off its own anchor", *r.Residual)
	}
	if lo, hi := f.Range[0], f.Range[1]; lo > 350 || hi != 890 {
		t.Errorf("the anchored curve covers %g to %g HLD, not the range of model and device", lo, hi)
	}
}

func TestTable(t *testing.T) {
	d := owncurve.Definition{
		Name: "house table", Device: "DL", Group: "low-alloy-steel", Scale: scale.HRC, Kind: owncurve.Table, Source: "standard of the works, table 4", UPercent: 2,
		Pairs: []owncurve.Pair{{HL: 700, Value: 32}, {HL: 540, Value: 20}, {HL: 620, Value: 26.5}, {HL: 820, Value: 41}},
	}
	s := mustSolve(t, d)
	for _, p := range d.Pairs {
		if p.HL < 560 {
			if _, err := s.At(p.HL); err == nil {
				t.Errorf("%g HLDL lies outside the device's range", p.HL)
			}
			continue
		}
		if value, standard := at(t, s, p.HL); value != p.Value || !near(1e-12, standard, 0.02*p.Value) {
			t.Errorf("%g HLDL: %g ± %g, want %g within 2 %%", p.HL, value, standard, p.Value)
		}
	}
	f := mustMake(t, d)
	if f.Form != owncurve.Tabulated || f.Range[0] != 560 || f.Range[1] != 820 || len(f.Parameters) != 0 || f.AICc != nil || f.Plot[0].Model != nil {
		t.Errorf("%s", mustMarshal(t, f))
	}
	for i := 1; i < len(f.Plot); i++ {
		if !(f.Plot[i].Value > f.Plot[i-1].Value) {
			t.Errorf("the table does not rise from %+v to %+v", f.Plot[i-1], f.Plot[i])
		}
	}
}

// A pair's readings are its mean and uncertainty.
func TestReadingsOfAPair(t *testing.T) {
	d := bolts()
	d.Pairs[3] = owncurve.Pair{Value: 233, UValue: 3, Readings: []float64{529, 533, 531, 528, 534}}
	p := mustMake(t, d).Pairs[3]
	if want := math.Hypot(math.Sqrt(26.0/4/5), 0.5/math.Sqrt(3)); p.HL != 531 || !near(1e-12, p.UHL, want) || len(p.Readings) != 5 {
		t.Errorf("%+v, want 531 ± %g", p, want)
	}
}

func TestKindByNumber(t *testing.T) {
	for n := 1; n <= 8; n++ {
		d := bolts()
		d.Kind, d.Pairs = "", d.Pairs[:n]
		want := owncurve.Own
		if n <= 4 {
			want = owncurve.Anchor
		}
		if f := mustMake(t, d); f.Kind != want {
			t.Errorf("%d pairs make an %s", n, f.Kind)
		}
	}
}

func TestWarnings(t *testing.T) {
	const n = 9
	change := func(do func(d *owncurve.Definition)) owncurve.Definition {
		d := about(rand.New(rand.NewPCG(9, 10)), n, power, 0.5)
		do(&d)
		return d
	}
	for _, c := range []struct {
		name, want, field string
		d                 owncurve.Definition
	}{
		{"none", "", "", change(func(*owncurve.Definition) {})},
		{"none of the bolts", "", "", bolts()},
		{"one far off", "pairs-disagree pair-far-off", "pairs[4].value", change(func(d *owncurve.Definition) { d.Pairs[4].Value += 24 })},
		{"in two bunches", "pairs-bunched", "pairs", change(func(d *owncurve.Definition) {
			for i := range d.Pairs {
				hl := 430 + float64(i)
				if i > 4 {
					hl += 220
				}
				d.Pairs[i] = owncurve.Pair{HL: hl, UHL: 2, Value: power(hl), UValue: 3}
			}
		})},
		{"in a narrow place", "pairs-narrow", "pairs", change(func(d *owncurve.Definition) {
			for i := range d.Pairs {
				hl := 600 + 2*float64(i)
				d.Pairs[i] = owncurve.Pair{HL: hl, UHL: 2, Value: power(hl), UValue: 3}
			}
		})},
		{"uncertainties too small", "pairs-disagree", "pairs", change(func(d *owncurve.Definition) {
			for i := range d.Pairs {
				d.Pairs[i].UHL, d.Pairs[i].UValue = 0.1, 0.3
			}
		})},
		{"another scale's", "curve-far-from-model", "pairs", change(func(d *owncurve.Definition) {
			for i := range d.Pairs {
				d.Pairs[i].Value *= 1.5
			}
		})},
	} {
		t.Run(c.name, func(t *testing.T) {
			f := mustMake(t, c.d)
			if codes(f) != c.want {
				t.Fatalf("%s, want %s", codes(f), c.want)
			}
			for i, w := range f.Warnings {
				if i == len(f.Warnings)-1 && w.Field != c.field || w.Message == "" || w.Remedy == "" || w.Level == wording.Stop || unfilled.MatchString(w.Message+w.Remedy) {
					t.Errorf("%+v", w)
				}
			}
		})
	}
}

// Chi-square above 1 widens the uncertainty, and beyond chance becomes a scatter
// of its own; below 1 nothing is narrowed.
func TestBirge(t *testing.T) {
	at600 := func(u float64) (f owncurve.Fitted, standard float64) {
		d := about(rand.New(rand.NewPCG(9, 10)), 9, power, 1)
		for i := range d.Pairs {
			d.Pairs[i].UHL *= u
			d.Pairs[i].UValue *= u
		}
		f = mustMake(t, d)
		_, standard = at(t, mustSolve(t, d), 600)
		return f, standard
	}
	wide, uWide := at600(4)
	if wide.Birge != 1 || wide.Scatter != 0 || *wide.ChiSquare > 0.5 {
		t.Errorf("generous uncertainties: Birge ratio %g, scatter %g, chi-square %g", wide.Birge, wide.Scatter, *wide.ChiSquare)
	}
	narrow, uNarrow := at600(0.25)
	if !near(1e-12, narrow.Birge, math.Sqrt(*narrow.ChiSquare)) || narrow.Birge < 2 || !(narrow.Scatter > 1) {
		t.Errorf("mean uncertainties: Birge ratio %g, scatter %g, chi-square %g", narrow.Birge, narrow.Scatter, *narrow.ChiSquare)
	}
	// The same residuals in smaller uncertainties leave the parameters as they were.
	narrower, uNarrower := at600(0.125)
	if !near(0.08, uNarrower, uNarrow) || !near(0.08, narrower.Scatter, narrow.Scatter) || !near(0.01, narrower.Covariance[0][0], narrow.Covariance[0][0]) {
		t.Errorf("standard uncertainty %g, with half the uncertainties %g; scatter %g and %g", uNarrow, uNarrower, narrow.Scatter, narrower.Scatter)
	}
	t.Logf("standard uncertainty at 600 HLD: %.2f HV of generous, %.2f HV of mean uncertainties", uWide, uNarrow)
}

// A form is only chosen where it rises over the whole range.
func TestFormsThatDoNotRise(t *testing.T) {
	d := about(rand.New(rand.NewPCG(1, 2)), 9, func(hl float64) float64 { return 200 + 0.004*(hl-480)*(hl-480) }, 0)
	f := mustMake(t, d)
	i := slices.IndexFunc(f.Candidates, func(c owncurve.Candidate) bool { return c.Form == owncurve.Quadratic })
	if c := f.Candidates[i]; c.Refused != "form-not-rising" || c.AICc != nil || c.Reason == "" || f.Form == owncurve.Quadratic {
		t.Errorf("a parabola with its foot inside: %s", mustMarshal(t, f.Candidates))
	}
	falling := about(rand.New(rand.NewPCG(1, 2)), 9, func(hl float64) float64 { return 900 - hl }, 0)
	_, err := owncurve.Make(falling)
	refused(t, err, "curve-not-rising", "pairs")
	few := bolts()
	few.Pairs = few.Pairs[:6]
	if c := mustMake(t, few).Candidates[2]; c.Form != owncurve.Quadratic || c.Refused != "form-few-pairs" {
		t.Errorf("a quadratic through six pairs: %+v", c)
	}
}

var unfilled = regexp.MustCompile(`\{\w*(:\d*)?\}|<nil>|%!|no sentence`)

// refused makes sure that an error has a code and a field, and says so in a
// sentence with all its place-holders filled.
func refused(t *testing.T, err error, code, field string) {
	t.Helper()
	var e *wording.Error
	if !errors.As(err, &e) || e.Code != code || e.Field != field {
		t.Fatalf("%#v, want %s at %q", err, code, field)
	}
	if unfilled.MatchString(e.Message) || !strings.HasSuffix(e.Message, ".") || len(e.Message) > 400 {
		t.Errorf("no whole sentence: %q", e.Message)
	}
}

func TestRefused(t *testing.T) {
	const head = `"device":"D","group":"low-alloy-steel","scale":"HBW"`
	five := func(last string) string {
		return `{` + head + `,"kind":"own","pairs":[{"hl":450,"u_hl":2,"value":163,"u_value":3},{"hl":480,"u_hl":2,"value":186,"u_value":3},` +
			`{"hl":510,"u_hl":2,"value":213,"u_value":3},{"hl":540,"u_hl":2,"value":242,"u_value":3},` + last + `]}`
	}
	table := func(fields, pairs string) string {
		return `{` + head + `,"kind":"table","pairs":[` + pairs + `]` + fields + `}`
	}
	long := strings.Repeat("é", 2001)
	for _, c := range []struct{ name, data, code, field string }{
		{"nothing", ``, "curve-not-json", ""},
		{"cut off", `{` + head + `,"pairs":[{"hl":500`, "curve-not-json", "pairs[0]"},
		{"an unknown field", `{"colour":"red"}`, "curve-unknown-field", "colour"},
		{"an unknown field of a pair", `{"pairs":[{"hv":3}]}`, "curve-unknown-field", "pairs[0].hv"},
		{"a field twice", `{"name":"a","name":"b"}`, "duplicate-field", "name"},
		{"text for a value", `{"pairs":[{"hl":500},{"value":"241"}]}`, "wrong-type", "pairs[1].value"},
		{"too large", strings.Repeat(" ", owncurve.MaxBytes) + `{}`, "curve-too-large", ""},

		{"no device", `{}`, "unknown-choice", "device"},
		{"an unknown device", `{"device":"Q"}`, "unknown-choice", "device"},
		{"no metal", `{"device":"D"}`, "unknown-choice", "group"},
		{"no scale", `{"device":"D","group":"brass"}`, "unknown-choice", "scale"},
		{"an unknown scale", `{"device":"D","group":"brass","scale":"HX"}`, "unknown-choice", "scale"},
		{"a scale that the metal has not", `{"device":"D","group":"brass","scale":"HRC"}`, "curve-scale", "scale"},
		{"a rebound scale", `{"device":"D","group":"brass","scale":"HLD"}`, "curve-scale", "scale"},
		{"an unknown kind", `{` + head + `,"kind":"guess"}`, "unknown-choice", "kind"},
		{"a long name", `{` + head + `,"name":"` + long + `"}`, "text-too-long", "name"},
		{"a long label", `{` + head + `,"pairs":[{"label":"` + long + `"}]}`, "text-too-long", "pairs[0].label"},
		{"a date in words", `{` + head + `,"date":"last May"}`, "not-a-date", "date"},
		{"a date that does not exist", `{` + head + `,"pairs":[{"date":"2026-02-29"}]}`, "not-a-date", "pairs[0].date"},

		{"no pairs", `{` + head + `,"pairs":[]}`, "pairs-none", "pairs"},
		{"pairs left out", `{` + head + `}`, "pairs-none", "pairs"},
		{"too many pairs", `{` + head + `,"pairs":[` + strings.Repeat(`{"hl":500},`, 200) + `{"hl":500}]}`, "pairs-too-many", "pairs"},
		{"an own curve of one pair", `{` + head + `,"kind":"own","pairs":[{"hl":500,"u_hl":2,"value":200,"u_value":3}]}`, "own-few-pairs", "kind"},
		{"an anchor of five", strings.Replace(five(`{"hl":570,"u_hl":2,"value":273,"u_value":3}`), "own", "anchor", 1), "anchor-many-pairs", "kind"},
		{"an anchor of a device without a model", `{"device":"DL","group":"low-alloy-steel","scale":"HBW","pairs":[{"hl":700,"u_hl":2,"value":241,"u_value":3}]}`, "anchor-no-model", "kind"},
		{"an anchor where the model ends", `{"device":"D","group":"aluminium","scale":"HV","pairs":[{"hl":800,"u_hl":2,"value":180,"u_value":3}]}`, "anchor-outside-model", "pairs[0].hl"},
		{"an anchor where the table ends", `{"device":"D","group":"brass","scale":"HBW","pairs":[{"hl":400,"u_hl":2,"value":100,"u_value":3},{"hl":400,"u_hl":2,"value":300,"u_value":3}]}`, "anchor-outside-table", "pairs[1].value"},

		{"no reading", five(`{"u_hl":2,"value":241,"u_value":3}`), "out-of-bounds", "pairs[4].hl"},
		{"a reading outside the device's range", five(`{"hl":891,"u_hl":2,"value":600,"u_value":3}`), "out-of-bounds", "pairs[4].hl"},
		{"no value", five(`{"hl":570,"u_hl":2,"u_value":3}`), "out-of-bounds", "pairs[4].value"},
		{"a value outside its scale", five(`{"hl":570,"u_hl":2,"value":651,"u_value":3}`), "out-of-bounds", "pairs[4].value"},
		{"a negative uncertainty", five(`{"hl":570,"u_hl":2,"value":273,"u_value":-3}`), "out-of-bounds", "pairs[4].u_value"},
		{"a negative uncertainty of the reading", five(`{"hl":570,"u_hl":-2,"value":273,"u_value":3}`), "out-of-bounds", "pairs[4].u_hl"},
		{"an uncertainty above the value", five(`{"hl":570,"u_hl":2,"value":273,"u_value":274}`), "out-of-bounds", "pairs[4].u_value"},
		{"no uncertainty at all", five(`{"hl":570,"value":273}`), "pair-certain", "pairs[4].u_value"},
		{"as good as none", five(`{"hl":570,"u_hl":1e-9,"value":273,"u_value":1e-300}`), "pair-certain", "pairs[4].u_value"},
		{"two readings", five(`{"readings":[570,571],"value":273,"u_value":3}`), "pair-readings", "pairs[4].readings"},
		{"a reading that is none", five(`{"readings":[570,571,0],"value":273,"u_value":3}`), "out-of-bounds", "pairs[4].readings[2]"},
		{"one value repeated", `{` + head + `,"pairs":[` + strings.Repeat(`{"hl":500,"u_hl":2,"value":200,"u_value":3},`, 4) + `{"hl":520,"u_hl":2,"value":200,"u_value":3}]}`, "pairs-one-value", "pairs"},
		{"two places", `{` + head + `,"pairs":[` + strings.Repeat(`{"hl":500,"u_hl":2,"value":200,"u_value":3},`, 4) + `{"hl":520,"u_hl":2,"value":220,"u_value":3}]}`, "pairs-few-places", "pairs"},

		{"a table of one point", table(`,"u_percent":2,"source":"s"`, `{"hl":500,"value":200}`), "table-few-points", "pairs"},
		{"a table without a source", table(`,"u_percent":2,"source":" "`, `{"hl":500,"value":200},{"hl":600,"value":300}`), "table-no-source", "source"},
		{"a table without an uncertainty", table(`,"source":"s"`, `{"hl":500,"value":200},{"hl":600,"value":300}`), "out-of-bounds", "u_percent"},
		{"a table that falls", table(`,"u_percent":2,"source":"s"`, `{"hl":500,"value":200},{"hl":700,"value":300},{"hl":600,"value":400}`), "table-not-rising", "pairs[1].value"},
		{"a point twice", table(`,"u_percent":2,"source":"s"`, `{"hl":500,"value":200},{"hl":500,"value":200}`), "table-not-rising", "pairs[1].value"},
		{"a table outside the device's range", table(`,"u_percent":2,"source":"s"`, `{"hl":100,"value":200},{"hl":200,"value":300}`), "table-outside-device", "pairs"},
	} {
		t.Run(c.name, func(t *testing.T) {
			d, err := owncurve.Decode([]byte(c.data))
			if err == nil {
				_, err = owncurve.Make(d)
			}
			refused(t, err, c.code, c.field)
		})
	}
}

// What Make answers is what a record carries, and Decode takes it again.
func TestAnswerIsTaken(t *testing.T) {
	random := rand.New(rand.NewPCG(11, 12))
	for range 300 {
		d := recordtest.Definition(random)
		f, err := owncurve.Make(d)
		if err != nil {
			continue
		}
		text := mustMarshal(t, f)
		if carried := mustMarshal(t, f.Curve()); carried != text {
			t.Fatalf("the answer\n%s\nis carried as\n%s", text, carried)
		}
		again, err := owncurve.Decode([]byte(text))
		if err != nil {
			t.Fatal(err)
		}
		if got := mustMarshal(t, mustMake(t, again)); got != text {
			t.Fatalf("from its own answer\n%s\nbecame\n%s", text, got)
		}
	}
}

func TestAltered(t *testing.T) {
	fit := mustMake(t, bolts()).Fit
	fresh := func() *owncurve.Curve { return mustMake(t, bolts()).Curve() }
	clone := func(c *owncurve.Curve) *owncurve.Curve {
		copied := *c.Fit
		copied.Parameters, copied.Range = slices.Clone(copied.Parameters), slices.Clone(copied.Range)
		c.Fit = &copied
		return c
	}
	for _, c := range []struct {
		name   string
		change func(c *owncurve.Curve)
		want   bool
	}{
		{"as it was", func(*owncurve.Curve) {}, false},
		{"the last bits", func(c *owncurve.Curve) { c.Parameters[0] *= 1 + 1e-9 }, false},
		{"a parameter", func(c *owncurve.Curve) { c.Parameters[1] *= 1 + 3e-6 }, true},
		{"a parameter too many", func(c *owncurve.Curve) { c.Parameters = append(c.Parameters, 0) }, true},
		{"another form", func(c *owncurve.Curve) { c.Form = owncurve.Straight }, true},
		{"a wider range", func(c *owncurve.Curve) { c.Range[1] += 30 }, true},
		{"a smaller covariance", func(c *owncurve.Curve) { c.Covariance = [][]float64{{0, 0}, {0, 0}} }, true},
		{"no figures", func(c *owncurve.Curve) { c.Parameters, c.Covariance, c.Range = nil, nil, nil }, false},
		{"no fit", func(c *owncurve.Curve) { c.Fit = nil }, false},
		{"another edition", func(c *owncurve.Curve) { c.Edition = "2031.1"; c.Parameters[0] = 5 }, false},
		{"no edition", func(c *owncurve.Curve) { c.Edition = ""; c.Parameters[0] = 5 }, true},
	} {
		changed := clone(fresh())
		c.change(changed)
		if got := changed.Altered(fit); got != c.want {
			t.Errorf("%s: altered %t", c.name, got)
		}
		if packed := changed.Packed(); (packed.Fit != nil) != c.want {
			t.Errorf("%s: packed with its fit %t", c.name, packed.Fit != nil)
		}
	}
}

func TestPacked(t *testing.T) {
	var none *owncurve.Curve
	if none.Packed() != nil || none.Unpacked() != nil {
		t.Error("no curve became one")
	}
	whole := mustMake(t, bolts()).Curve()
	packed := whole.Packed()
	if packed.Fit != nil || packed.Edition != edition.Current {
		t.Errorf("%s", mustMarshal(t, packed))
	}
	if got, want := mustMarshal(t, packed.Unpacked()), mustMarshal(t, whole); got != want {
		t.Errorf("unpacked\n%s\nwant\n%s", got, want)
	}
	bare := &owncurve.Curve{Definition: bolts()}
	if bare.Packed() != bare || bare.Unpacked() != bare {
		t.Error("a curve without its fit changed")
	}
	old := mustMake(t, bolts()).Curve()
	old.Edition = "2025.3"
	if again := old.Packed().Unpacked(); again.Edition != edition.Current || again.Fit == nil {
		t.Errorf("a curve of an older edition is unpacked as %s", mustMarshal(t, again))
	}
}

// Whatever is handed in, the answer is an error that names a code, or a curve
// whose JSON holds nothing but numbers, which rises and comes back.
func FuzzMake(f *testing.F) {
	random := rand.New(rand.NewPCG(13, 14))
	for range 8 {
		f.Add([]byte(mustMarshal(f, recordtest.Curve(random))))
	}
	f.Add([]byte(`{"device":"D","group":"low-alloy-steel","scale":"HV","pairs":[{"hl":500,"u_hl":1e-3,"value":200,"u_value":200},{"hl":500.0001,"u_hl":500,"value":200.1}]}`))
	f.Fuzz(func(t *testing.T, data []byte) {
		d, err := owncurve.Decode(data)
		if err == nil {
			var fitted owncurve.Fitted
			if fitted, err = owncurve.Make(d); err == nil {
				check(t, fitted)
				return
			}
		}
		var e *wording.Error
		if !errors.As(err, &e) || e.Code == "" || e.Message == "" {
			t.Errorf("the error is %#v", err)
		}
	})
}

// check makes sure that a curve is one.
func check(t testing.TB, f owncurve.Fitted) {
	t.Helper()
	text := mustMarshal(t, f) // refuses what is no number
	d, err := owncurve.Decode([]byte(text))
	if err != nil {
		t.Fatal(err)
	}
	if again := mustMarshal(t, mustMake(t, d)); again != text {
		t.Fatalf("%s\nbecame\n%s", text, again)
	}
	if f.Birge < 1 || !(f.Range[0] < f.Range[1]) || len(f.Residuals) != len(f.Pairs) {
		t.Errorf("%s", text)
	}
	for i, p := range f.Plot {
		if i > 0 && !(p.Value >= f.Plot[i-1].Value) || !(p.Low <= p.Value && p.Value <= p.High) {
			t.Fatalf("point %d of %s", i, text)
		}
	}
}

func BenchmarkFit(b *testing.B) {
	d := about(rand.New(rand.NewPCG(1, 2)), 12, quadratic, 1)
	for i := 0; b.Loop(); i++ {
		d.Pairs[0].Label = []string{"a", "b"}[i%2] // a definition that is not the last one
		if _, err := owncurve.Make(d); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkSolveAgain(b *testing.B) {
	d := bolts()
	for b.Loop() {
		if _, err := d.Solve(); err != nil {
			b.Fatal(err)
		}
	}
}

// Pairs at the very edges of what is taken make a curve of numbers, or a
// sentence.
func TestExtremePairs(t *testing.T) {
	random := rand.New(rand.NewPCG(15, 16))
	pick := func(choices ...float64) float64 { return choices[random.IntN(len(choices))] }
	curves := 0
	for range 8000 {
		d := bolts()
		d.Scale = []scale.Key{scale.HV, scale.HBW, scale.HRC}[random.IntN(3)]
		d.Kind = []owncurve.CurveKind{"", owncurve.Own, owncurve.Table}[random.IntN(3)]
		d.UPercent = pick(0.01, 1, 50)
		lo, hi := 1.0, 5000.0
		if d.Scale == scale.HRC {
			lo, hi = 20, 70
		}
		d.Pairs = d.Pairs[:1+random.IntN(8)]
		for i := range d.Pairs {
			p := &d.Pairs[i]
			p.HL = pick(300, 300.0000001, 600, math.Nextafter(600, 700), 889.999, 890, 300+590*random.Float64())
			p.Value = pick(lo, math.Nextafter(lo, hi), hi, 25, lo+(hi-lo)*random.Float64(), lo+(hi-lo)*(p.HL-300)/590)
			p.UHL = p.HL * pick(0, 1e-300, 1e-6, 1e-3, 1, random.Float64())
			p.UValue = p.Value * pick(0, 1e-300, 1e-6, 1e-3, 1, random.Float64())
		}
		f, err := owncurve.Make(d)
		var e *wording.Error
		switch {
		case err == nil:
			curves++
			check(t, f)
		case !errors.As(err, &e) || e.Code == "internal":
			t.Fatalf("%s: %v", mustMarshal(t, d), err)
		}
		if t.Failed() {
			t.Fatal(mustMarshal(t, d))
		}
	}
	t.Logf("%d of 8000 are curves", curves)
	if curves < 400 {
		t.Error("the test has lost its subject")
	}
}
