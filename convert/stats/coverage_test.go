package stats

import (
	"math"
	"math/rand/v2"
	"slices"
	"testing"

	"gonum.org/v1/gonum/stat/distuv"
)

// mixed is a budget of a normal, a Student's and a rectangular term, which have
// these shares of a variance of 1.
func mixed(student, rectangular, dof float64) []Term {
	term := func(share float64, dof DoF, d Distribution) Term {
		return Term{Standard: math.Sqrt(share), DoF: dof, Distribution: d, Sensitivity: 1}
	}
	return []Term{
		term(max(0, 1-student-rectangular), Infinite, Normal),
		term(student, DoF(dof), Student),
		term(rectangular, Infinite, Uniform),
	}
}

// drawn is the half-width of the interval that covers the share confidence of
// drawn sums of the terms (JCGM 101, with 200,000 draws).
func drawn(terms []Term, confidence float64, rng *rand.Rand) float64 {
	const draws = 200_000
	sums := make([]float64, draws)
	for i := range sums {
		sums[i] = math.Abs(draw(terms, rng))
	}
	slices.Sort(sums)
	return sums[int(confidence*draws)]
}

// draw draws a sum of the terms.
func draw(terms []Term, rng *rand.Rand) float64 {
	total := 0.0
	for _, t := range terms {
		c := t.Sensitivity * t.Standard
		switch t.Distribution {
		case Student:
			total += c * distuv.StudentsT{Sigma: 1, Nu: float64(t.DoF), Src: rng}.Rand()
		case Uniform:
			total += c * math.Sqrt(3) * (2*rng.Float64() - 1)
		default:
			total += c * rng.NormFloat64()
		}
	}
	return total
}

// The expanded uncertainty against draws from the terms, JCGM 101, within 3 %.
func TestExpandedAgainstDraws(t *testing.T) {
	rng := rand.New(rand.NewPCG(1, 2))
	worst := 0.0
	for _, confidence := range []float64{0.68, 0.95, 0.99} {
		for _, dof := range []float64{2, 4, 9} {
			for _, student := range []float64{0, 0.02, 0.2, 0.6} {
				for _, rectangular := range []float64{0, 0.2, 0.4} {
					terms := mixed(student, rectangular, dof)
					u := Combine(terms, confidence)
					want := drawn(terms, confidence, rng)
					off := math.Abs(u.Expanded/want - 1)
					if worst = max(worst, off); off > 0.03 {
						t.Errorf("confidence %g, dof %g, shares %g and %g: expanded %g by %s, drawn %g", confidence, dof, student, rectangular, u.Expanded, u.Coverage, want)
					}
				}
			}
		}
	}
	t.Logf("largest difference %.2f %%", worst*100)
}

// Where the closed form is kept, it is within 3 % of the sum's own coverage.
func TestClosedForm(t *testing.T) {
	kept, left := 0, 0
	for _, dof := range []float64{2, 3, 4, 6, 9, 19} {
		for student := 0.0; student <= 1; student += 0.005 {
			for rectangular := 0.0; student+rectangular <= 1; rectangular += 0.05 {
				terms := mixed(student, rectangular, dof)
				u := Combine(terms, 0.95)
				if u.Coverage != ByDoF {
					left++
					continue
				}
				kept++
				if exact := newSum(u.Terms).coverage(0.95, u.Expanded); math.Abs(u.Expanded/exact-1) > 0.03 {
					t.Errorf("dof %g, shares %g and %g: %g, exactly %g", dof, student, rectangular, u.Expanded, exact)
				}
			}
		}
	}
	if kept < 100 || left < 100 {
		t.Errorf("the closed form was kept %d times and left %d times", kept, left)
	}
}

// Alone, each distribution has its own factor.
func TestCoverageOfOneTerm(t *testing.T) {
	for _, c := range []struct {
		name string
		term Term
		want float64
	}{
		{"rectangular", Term{Standard: 1, DoF: Infinite, Distribution: Uniform, Sensitivity: 1}, 0.95 * math.Sqrt(3)},
		{"student, 4", Term{Standard: 1, DoF: 4, Distribution: Student, Sensitivity: 1}, StudentFactor(0.95, 4)},
		{"student, 2", Term{Standard: 1, DoF: 2, Distribution: Student, Sensitivity: 1}, StudentFactor(0.95, 2)},
		{"normal", Term{Standard: 1, DoF: Infinite, Distribution: Normal, Sensitivity: 1}, StudentFactor(0.95, math.Inf(1))},
	} {
		u := Combine([]Term{c.term}, 0.95)
		if math.Abs(u.K-c.want) > 1e-4*c.want {
			t.Errorf("%s: k = %g, want %g", c.name, u.K, c.want)
		}
	}
}

func TestCoverageRisesWithConfidence(t *testing.T) {
	terms := mixed(0.3, 0.5, 3)
	last := 0.0
	for _, confidence := range []float64{0.5, 0.68, 0.9, 0.95, 0.99, 0.999} {
		u := Combine(terms, confidence)
		if u.Expanded <= last {
			t.Errorf("at %g: %g after %g", confidence, u.Expanded, last)
		}
		last = u.Expanded
	}
}

func BenchmarkCombineByTerms(b *testing.B) {
	terms := mixed(0.3, 0.5, 4)
	for b.Loop() {
		Combine(terms, 0.95)
	}
}
