package verdict

import (
	"math"
	"os"
	"testing"

	"strikebook/convert/stats"
	"strikebook/convert/table"
)

// open is a bound of a limit as a data file gives it: infinite where it is blank.
func open(bound float64, sign int) float64 {
	if math.IsNaN(bound) {
		return math.Inf(sign)
	}
	return bound
}

// known is a value whose uncertainty is one term of so many degrees of freedom.
func known(value, standard float64, dof stats.DoF) Comparison {
	distribution := stats.Student
	if dof == stats.Infinite {
		distribution = stats.Normal
	}
	return Comparison{
		Band:       Band{math.Inf(-1), math.Inf(1)},
		Value:      value,
		Terms:      []stats.Term{{Standard: standard, DoF: dof, Distribution: distribution, Sensitivity: 1}},
		Confidence: 0.95,
	}
}

func TestProbabilityAgainstSciPy(t *testing.T) {
	content, err := os.ReadFile("../../testdata/conformity.csv")
	if err != nil {
		t.Fatal(err)
	}
	worst, n := 0.0, 0
	for _, row := range table.MustRead("conformity.csv", content).Rows {
		c := known(row.Number("value"), row.Number("standard"), stats.DoF(row.Number("dof")))
		c.Band = Band{open(row.Number("min"), -1), open(row.Number("max"), 1)}
		got, want := c.Decide().Probability, row.Number("probability")
		off := math.Abs(got - want)
		if !(off <= 1e-9) {
			t.Errorf("%g ± %g (dof %g) within %+v: %.12g, want %.12g", c.Value, c.Terms[0].Standard, c.Terms[0].DoF, c.Band, got, want)
		}
		worst, n = max(worst, off), n+1
	}
	if n < 500 {
		t.Errorf("only %d cases", n)
	}
	t.Logf("%d cases, largest difference %.1e", n, worst)
}

// The examples of JCGM 106, as printed there, from memory.
func TestProbabilityAsPrinted(t *testing.T) {
	for _, c := range []struct {
		name            string
		value, standard float64
		band            Band
		want            float64 // to two decimals
	}{
		{"breakdown voltage, V", -5.47, 0.05, Band{math.Inf(-1), -5.40}, 0.92},
		{"viscosity, mm2/s", 13.6, 1.8, Band{12.5, 16.3}, 0.66},
	} {
		comparison := known(c.value, c.standard, stats.Infinite)
		comparison.Band = c.band
		if got := comparison.Decide().Probability; math.Abs(got-c.want) > 0.005 {
			t.Errorf("%s: %.4f, printed %.2f", c.name, got, c.want)
		}
	}
}
