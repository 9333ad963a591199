package stats

import (
	"encoding/json"
	"math"
	"math/rand/v2"
	"slices"
	"testing"
)

func TestRectangular(t *testing.T) {
	if got := Rectangular(3); !near(1e-15, got, math.Sqrt(3)) {
		t.Errorf("half-width 3: %g, want the square root of 3", got)
	}
	if got := Rectangular(0); got != 0 {
		t.Errorf("half-width 0: %g, want 0", got)
	}
}

func TestCombineByHand(t *testing.T) {
	inf := math.Inf(1)
	for _, c := range []struct {
		name          string
		terms         []Term
		standard, dof float64
		contributions []float64
	}{
		{"no terms", nil, 0, inf, nil},
		{"a term of no size", []Term{{Standard: 0, Sensitivity: 1, DoF: 4}}, 0, inf, []float64{0}},
		{"one term keeps its own", []Term{{Standard: 3, Sensitivity: 1, DoF: 4}}, 3, 4, []float64{3}},
		{"known beforehand", []Term{
			{Standard: 3, Sensitivity: 1, DoF: Infinite},
			{Standard: 4, Sensitivity: 1, DoF: Infinite}}, 5, inf, []float64{3, 4}},
		{"a falling result", []Term{
			{Standard: 1.5, Sensitivity: -2, DoF: Infinite},
			{Standard: 8, Sensitivity: 0.5, DoF: Infinite}}, 5, inf, []float64{3, 4}},
		{"one of two is estimated: 5^4/(3^4/9)", []Term{
			{Standard: 3, Sensitivity: 1, DoF: 9},
			{Standard: 4, Sensitivity: 1, DoF: Infinite}}, 5, 625.0 / 9, []float64{3, 4}},
		{"both are: 5^4/(3^4/9 + 4^4/4)", []Term{
			{Standard: 3, Sensitivity: 1, DoF: 9},
			{Standard: 4, Sensitivity: 1, DoF: 4}}, 5, 625.0 / 73, []float64{3, 4}},
		{"alike: the degrees of freedom add up", []Term{
			{Standard: 2, Sensitivity: 1, DoF: 5},
			{Standard: 2, Sensitivity: 1, DoF: 5}}, math.Sqrt(8), 10, []float64{2, 2}},
	} {
		t.Run(c.name, func(t *testing.T) {
			u := Combine(c.terms, 0.95)
			if !near(1e-15, u.Standard, c.standard) || !sameDoF(u.DoF, c.dof) {
				t.Errorf("standard %g with dof %g, want %g with %g", u.Standard, u.DoF, c.standard, c.dof)
			}
			if k := StudentFactor(0.95, c.dof); !near(1e-14, u.K, k) || u.Expanded != u.K*u.Standard {
				t.Errorf("k %g, expanded %g, want k %g", u.K, u.Expanded, k)
			}
			for i, want := range c.contributions {
				if got := u.Terms[i].Contribution; got != want {
					t.Errorf("contribution %d: %g, want %g", i, got, want)
				}
			}
		})
	}
}

func sameDoF(got DoF, want float64) bool {
	return float64(got) == want || near(1e-14, float64(got), want)
}

func TestCombineAgainstGUM(t *testing.T) {
	var terms []Term
	for _, row := range reference(t, "gum_h1.csv").Rows {
		terms = append(terms, Term{
			Name: row.Text("name"), Standard: row.Number("standard"), DoF: DoF(row.Number("dof")), Sensitivity: 1})
	}
	u := Combine(terms, 0.99)
	for _, c := range []struct {
		name                    string
		got, printed, tolerance float64 // how far the Guide's own rounding carries
	}{
		{"standard", u.Standard, 32, 0.5},
		{"effective degrees of freedom", float64(u.DoF), 16.7, 0.1},
		{"expanded", u.Expanded, 93, 1.1},
	} {
		if math.Abs(c.got-c.printed) > c.tolerance {
			t.Errorf("%s: %.3f, printed %g", c.name, c.got, c.printed)
		}
	}
}

// budget returns some terms, a third of them known beforehand.
func budget(random *rand.Rand) []Term {
	terms := make([]Term, 1+random.IntN(6))
	for i := range terms {
		terms[i] = Term{
			Name: "term", Scale: "HV", Source: "test", Sensitivity: random.NormFloat64(),
			Standard: 10 * random.Float64(), DoF: DoF(1 + random.IntN(20))}
		if random.IntN(3) == 0 {
			terms[i].DoF = Infinite
		}
	}
	return terms
}

func TestCombineProperties(t *testing.T) {
	random := rand.New(rand.NewPCG(1, 2))
	for range 500 {
		terms := budget(random)
		given := slices.Clone(terms)
		u := Combine(terms, 0.95)
		if !slices.Equal(terms, given) {
			t.Fatalf("the terms given were changed: %+v", terms)
		}
		if len(u.Terms) != len(terms) {
			t.Fatalf("%d terms became %d", len(terms), len(u.Terms))
		}

		least, sum := float64(Infinite), 0.0
		for _, term := range terms {
			least, sum = min(least, float64(term.DoF)), sum+float64(term.DoF)
		}
		if dof := float64(u.DoF); dof < least*(1-1e-14) || dof > sum*(1+1e-14) && !math.IsInf(sum, 1) {
			t.Errorf("dof %g, want from the least of the terms' %g to their sum %g", dof, least, sum)
		}

		random.Shuffle(len(terms), func(i, j int) { terms[i], terms[j] = terms[j], terms[i] })
		if shuffled := Combine(terms, 0.95); !alike(shuffled, u, 1) {
			t.Errorf("in another order %+v became %+v", u, shuffled)
		}

		const factor = 10 // the same result in a unit a tenth the size
		for i := range terms {
			terms[i].Sensitivity *= factor
		}
		if scaled := Combine(terms, 0.95); !alike(scaled, u, factor) {
			t.Errorf("times %d: %+v became %+v", factor, u, scaled)
		}
	}
}

// alike reports whether got is want, but for a factor.
func alike(got, want Uncertainty, factor float64) bool {
	return near(1e-13, got.Standard, factor*want.Standard) && near(1e-13, got.Expanded, factor*want.Expanded) &&
		near(1e-13, got.K, want.K) && (got.DoF == want.DoF || near(1e-13, float64(got.DoF), float64(want.DoF)))
}

func TestDoFInJSON(t *testing.T) {
	for _, c := range []struct {
		dof  DoF
		want string
	}{{Infinite, "null"}, {4, "4"}, {16.75, "16.75"}} {
		got, err := json.Marshal(struct {
			DoF DoF `json:"dof"`
		}{c.dof})
		if want := `{"dof":` + c.want + `}`; err != nil || string(got) != want {
			t.Errorf("%g: %s (%v), want %s", c.dof, got, err, want)
		}
	}
	if got, err := json.Marshal(DoF(math.NaN())); err == nil {
		t.Errorf("NaN: %s, want an error", got)
	}
}

func BenchmarkCombine(b *testing.B) {
	terms := []Term{
		{Name: "repeatability", Standard: 2.1, Sensitivity: 1, DoF: 4},
		{Name: "resolution", Standard: 0.3, Sensitivity: 1, DoF: Infinite},
		{Name: "model", Standard: 12, Sensitivity: 1, DoF: Infinite},
		{Name: "second leg", Standard: 1.5, Sensitivity: 1, DoF: Infinite},
	}
	for b.Loop() {
		Combine(terms, 0.95)
	}
}
