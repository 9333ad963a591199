package stats

import (
	"math"
	"math/rand/v2"
	"os"
	"slices"
	"testing"

	"gonum.org/v1/gonum/stat/distuv"

	"strikebook/convert/table"
)

// reference reads a case from outside. Its first line names the source.
func reference(t *testing.T, file string) table.Table {
	t.Helper()
	content, err := os.ReadFile("../../testdata/" + file)
	if err != nil {
		t.Fatal(err)
	}
	return table.MustRead(file, content)
}

// readings reads a case that is one column of values.
func readings(t *testing.T, file string) []float64 {
	t.Helper()
	var values []float64
	for _, row := range reference(t, file).Rows {
		values = append(values, row.Number("value"))
	}
	return values
}

// near reports whether got is want up to a share of it. NaN is not.
func near(share, got, want float64) bool {
	return math.Abs(got-want) <= share*math.Abs(want)
}

// digits is how many significant digits of want got has right.
func digits(got, want float64) float64 { return -math.Log10(math.Abs(got/want - 1)) }

// numAcc3 follows the rule of NIST's data set: 1000000.2, then 1000000.1 and
// 1000000.3 in turn, 1001 values in all.
func numAcc3() []float64 {
	values := []float64{1000000.2}
	for len(values) < 1001 {
		values = append(values, 1000000.1, 1000000.3)
	}
	return values
}

func TestSummarizeAgainstNIST(t *testing.T) {
	for _, c := range []struct {
		name     string
		values   []float64
		mean, sd float64 // certified
		// Tolerances. NumAcc3's deviations keep nine digits of their values' sixteen.
		meanShare, sdShare float64
	}{
		{"NumAcc1", readings(t, "nist_numacc1.csv"), 10000002, 1, 0, 0},
		{"NumAcc3", numAcc3(), 1000000.2, 0.1, 1e-14, 1e-9},
	} {
		t.Run(c.name, func(t *testing.T) {
			s := Summarize(c.values)
			if !near(c.meanShare, s.Mean, c.mean) || !near(c.sdShare, s.SD, c.sd) {
				t.Errorf("mean %.17g, sd %.17g, certified %g and %g", s.Mean, s.SD, c.mean, c.sd)
			}
			t.Logf("digits: mean %.1f, sd %.1f", digits(s.Mean, c.mean), digits(s.SD, c.sd))
		})
	}
}

func TestSummarize(t *testing.T) {
	nan := math.NaN()
	for _, c := range []struct {
		name   string
		values []float64
		want   Summary
	}{
		{"none", nil, Summary{0, nan, nan, nan, nan, nan, nan}},
		{"one", []float64{610}, Summary{1, 610, nan, 610, 610, 0, nan}},
		{"two", []float64{612, 608}, Summary{2, 610, math.Sqrt(8), 608, 612, 4, 2}},
		{"alike", []float64{22.3, 22.3, 22.3}, Summary{3, 22.3, 0, 22.3, 22.3, 0, 0}},
	} {
		t.Run(c.name, func(t *testing.T) {
			if got := Summarize(c.values); !slices.EqualFunc(figures(got), figures(c.want), same) {
				t.Errorf("%+v, want %+v", got, c.want)
			}
		})
	}
}

func figures(s Summary) []float64 {
	return []float64{float64(s.N), s.Mean, s.SD, s.Min, s.Max, s.Range, s.StandardError}
}

// same holds two NaNs to be alike.
func same(got, want float64) bool {
	return near(1e-15, got, want) || math.IsNaN(got) && math.IsNaN(want)
}

// scatter returns n readings to one decimal, as an instrument would show them.
func scatter(random *rand.Rand, n int) []float64 {
	values := make([]float64, n)
	for i := range values {
		values[i] = math.Round(10*(600+12*random.NormFloat64())) / 10
	}
	return values
}

// Readings in another unit, from another zero, tell the same story.
func TestShiftAndScale(t *testing.T) {
	random := rand.New(rand.NewPCG(1, 2))
	for range 500 {
		values := scatter(random, 3+random.IntN(13))
		factor, shift := 10*random.NormFloat64(), 1000*random.NormFloat64()
		moved := make([]float64, len(values))
		for i, v := range values {
			moved[i] = factor*v + shift
		}
		was, is := Summarize(values), Summarize(moved)
		if math.Abs(is.Mean-(factor*was.Mean+shift)) > 1e-10 ||
			!near(1e-9, is.SD, math.Abs(factor)*was.SD) || !near(1e-9, is.Range, math.Abs(factor)*was.Range) {
			t.Fatalf("%v times %g plus %g: %+v became %+v", values, factor, shift, was, is)
		}
		if before, after := Grubbs(values, 0), Grubbs(moved, 0); !near(1e-9, after.G, before.G) {
			t.Fatalf("%v times %g plus %g: G %g became %g", values, factor, shift, before.G, after.G)
		}
	}
}

func TestStudentFactorAgainstPrintedTables(t *testing.T) {
	for _, row := range reference(t, "student_t.csv").Rows {
		confidence, dof, want := row.Number("confidence"), row.Number("dof"), row.Number("t")
		if got := StudentFactor(confidence, dof); math.Abs(got-want) > 0.0005 {
			t.Errorf("%g of dof %g: %.5f, printed %.3f", confidence, dof, got, want)
		}
	}
}

// With one and two degrees of freedom the quantile is elementary.
func TestStudentFactorAgainstClosedForms(t *testing.T) {
	for _, c := range confidences {
		for dof, want := range map[float64]float64{1: math.Tan(math.Pi / 2 * c), 2: c * math.Sqrt(2/(1-c*c))} {
			if got := StudentFactor(c, dof); !near(1e-12, got, want) {
				t.Errorf("%g of dof %g: %.16g, want %.16g", c, dof, got, want)
			}
		}
	}
}

// The grid steps on every way in which the factor is found, and beside where
// one gives way to the next.
var (
	confidences = []float64{0.5, 0.6, 0.6827, 0.7, 0.8, 0.9, 0.95, 0.9545, 0.99, 0.9973, 0.999}
	dofs        = func() []float64 {
		all := []float64{fewDoF - 0.001, fewDoF, manyDoF, manyDoF + 0.001}
		for dof := 0.5; dof <= 1e5; dof *= 1.05 {
			all = append(all, dof)
		}
		slices.Sort(all)
		return all
	}()
)

func TestStudentFactorAgainstGonum(t *testing.T) {
	worst := 0.0
	for _, dof := range dofs {
		for _, confidence := range confidences {
			want := distuv.StudentsT{Mu: 0, Sigma: 1, Nu: dof}.Quantile((1 + confidence) / 2)
			got := StudentFactor(confidence, dof)
			if !near(1e-9, got, want) {
				t.Errorf("%g of dof %g: %.15g, gonum %.15g", confidence, dof, got, want)
			}
			worst = max(worst, math.Abs(got/want-1))
		}
	}
	t.Logf("largest relative difference: %.1e", worst)
}

// At few enough degrees of freedom every term of the expansion still shows.
func TestExpandedQuantile(t *testing.T) {
	const dof = 60
	for _, confidence := range []float64{0.5, 0.6827, 0.8, 0.9, 0.95} {
		p := (1 + confidence) / 2
		got := expandedQuantile(distuv.UnitNormal.Quantile(p), dof)
		if want := (distuv.StudentsT{Mu: 0, Sigma: 1, Nu: dof}.Quantile(p)); !near(1e-9, got, want) {
			t.Errorf("%g: %.12g, gonum %.12g, off by %.1e", confidence, got, want, got/want-1)
		}
	}
}

func TestStudentFactorIsMonotone(t *testing.T) {
	for i, dof := range dofs {
		for j, confidence := range confidences {
			k := StudentFactor(confidence, dof)
			if i > 0 && !(k < StudentFactor(confidence, dofs[i-1])) {
				t.Errorf("%g: k does not fall from dof %g to %g", confidence, dofs[i-1], dof)
			}
			if j > 0 && !(k > StudentFactor(confidences[j-1], dof)) {
				t.Errorf("dof %g: k does not rise from %g to %g", dof, confidences[j-1], confidence)
			}
			if normal := StudentFactor(confidence, math.Inf(1)); !(k > normal) {
				t.Errorf("%g of dof %g: k %g is not above the normal %g", confidence, dof, k, normal)
			}
		}
	}
}

func TestStudentFactorAtTheEnds(t *testing.T) {
	for _, dof := range []float64{0.5, 4, 1000, math.Inf(1)} {
		if got := StudentFactor(0, dof); got != 0 {
			t.Errorf("no confidence, dof %g: %g, want 0", dof, got)
		}
		if got := StudentFactor(1, dof); !math.IsInf(got, 1) {
			t.Errorf("certainty, dof %g: %g, want +Inf", dof, got)
		}
	}
}

func TestGrubbsCriticalAgainstPrintedTable(t *testing.T) {
	for _, row := range reference(t, "grubbs_critical.csv").Rows {
		n, want := row.Number("n"), row.Number("critical")
		if got := GrubbsCritical(int(n), GrubbsLevel); math.Abs(got-want) > 0.000051 { // n = 4 is 1.48125 exactly
			t.Errorf("n %g: %.6f, printed %.4f", n, got, want)
		}
	}
	// One-sided at 5 % is two-sided at 10 %.
	if got := GrubbsCritical(8, 0.10); math.Abs(got-2.032) > 0.0005 {
		t.Errorf("n 8, one-sided: %.5f, NIST/SEMATECH e-Handbook 2.032", got)
	}
}

func TestGrubbsCritical(t *testing.T) {
	for n := range 3 {
		if got := GrubbsCritical(n, GrubbsLevel); !math.IsNaN(got) {
			t.Errorf("n %d: %g, want NaN", n, got)
		}
	}
	before := 0.0
	for n := 3; n <= 100; n++ {
		got := GrubbsCritical(n, GrubbsLevel)
		if most := float64(n-1) / math.Sqrt(float64(n)); !(got > before && got < most) {
			t.Errorf("n %d: %g, want above %g (n - 1) and below %g (the most G can be)", n, got, before, most)
		}
		before = got
	}
}

func TestGrubbs(t *testing.T) {
	negated := func(values []float64) []float64 {
		values = slices.Clone(values)
		for i := range values {
			values[i] = -values[i]
		}
		return values
	}
	venus := readings(t, "grubbs_venus.csv")
	for _, c := range []struct {
		name      string
		values    []float64
		index     int
		g         float64
		tolerance float64 // half the last printed place
		suspect   bool
	}{
		{"wire", readings(t, "grubbs_wire.csv"), 9, 2.390, 0.0005, true},
		{"handbook", readings(t, "grubbs_handbook.csv"), 7, 2.4688, 0.00005, true},
		{"Venus", venus, 0, 2.574, 0.0005, true},
		{"Venus, sides exchanged", negated(venus), 0, 2.574, 0.0005, true},
		{"Venus without the suspect", venus[1:], 13, 2.219, 0.0005, false}, // by hand
		{"three, two of them alike", []float64{600, 600, 700}, 2, 2 / math.Sqrt(3), 1e-12, true},
		{"evenly spaced", []float64{600, 610, 620, 630}, 0, 3 / math.Sqrt(20.0/3), 1e-12, false},
	} {
		t.Run(c.name, func(t *testing.T) {
			got := Grubbs(c.values, 0)
			if got.Index != c.index || math.Abs(got.G-c.g) > c.tolerance || got.Suspect != c.suspect {
				t.Errorf("%+v, want index %d, G %g, suspect %t", got, c.index, c.g, c.suspect)
			}
			if want := GrubbsCritical(len(c.values), GrubbsLevel); got.Critical != want {
				t.Errorf("critical %g, want %g", got.Critical, want)
			}
		})
	}
}

// The published figures behind G. Grubbs tests the farthest reading alone, so
// the other side of Venus is only here.
func TestGrubbsPublishedFigures(t *testing.T) {
	wire := Summarize(readings(t, "grubbs_wire.csv"))
	if !near(1e-15, wire.Mean, 575.2) || math.Abs(wire.SD-8.702) > 0.0005 {
		t.Errorf("wire: mean %g, sd %.5f, published 575.2 and 8.702", wire.Mean, wire.SD)
	}
	venus := Summarize(readings(t, "grubbs_venus.csv"))
	if g := (venus.Max - venus.Mean) / venus.SD; math.Abs(g-1.801) > 0.0005 {
		t.Errorf("Venus, high side: G %.5f, published 1.801", g)
	}
}

func TestGrubbsHasNothingToTest(t *testing.T) {
	for name, values := range map[string][]float64{
		"none": nil, "one": {600}, "two": {600, 900}, "alike": {22.3, 22.3, 22.3},
	} {
		t.Run(name, func(t *testing.T) {
			if got := Grubbs(values, 0); got.Index != -1 || got.Suspect || !math.IsNaN(got.G) {
				t.Errorf("%+v, want no index, no G, no suspect", got)
			}
		})
	}
}

func BenchmarkStudentFactor(b *testing.B) {
	for _, c := range []struct {
		name string
		dof  float64
	}{{"library", 2}, {"steps", 9.3}, {"expansion", 1000}, {"normal", math.Inf(1)}} {
		b.Run(c.name, func(b *testing.B) {
			for b.Loop() {
				StudentFactor(0.95, c.dof)
			}
		})
	}
}

func BenchmarkGrubbs(b *testing.B) {
	values := scatter(rand.New(rand.NewPCG(1, 2)), 10)
	for b.Loop() {
		Grubbs(values, 0)
	}
}
