// Package stats holds the statistics of a set of readings and the budget of an
// uncertainty, on gonum.
package stats

import (
	"math"

	"gonum.org/v1/gonum/floats"
	"gonum.org/v1/gonum/stat"
	"gonum.org/v1/gonum/stat/distuv"
)

// Summary describes a set of readings.
type Summary struct {
	N             int
	Mean          float64
	SD            float64 // sample standard deviation; NaN for fewer than two readings
	Min, Max      float64
	Range         float64 // Max - Min
	StandardError float64 // of the mean, SD/sqrt(N); NaN like SD
}

// Summarize describes a set of readings. Without readings, every figure but N is NaN.
func Summarize(values []float64) Summary {
	nan := math.NaN()
	if len(values) == 0 {
		return Summary{Mean: nan, SD: nan, Min: nan, Max: nan, Range: nan, StandardError: nan}
	}
	s := Summary{N: len(values), SD: nan, Min: floats.Min(values), Max: floats.Max(values), StandardError: nan}
	s.Range = s.Max - s.Min
	if s.N == 1 {
		s.Mean = values[0]
		return s
	}
	s.Mean, s.SD = stat.MeanStdDev(values, nil)
	s.StandardError = stat.StdErr(s.SD, float64(s.N))
	return s
}

// StudentFactor returns the two-sided coverage factor k of Student's
// distribution: the interval of k standard uncertainties to either side covers
// the share confidence (0 to 1) with dof degrees of freedom, which may be
// infinite and need not be whole.
func StudentFactor(confidence, dof float64) float64 {
	p := (1 + confidence) / 2
	if math.IsInf(dof, 1) {
		return distuv.UnitNormal.Quantile(p)
	}
	student := distuv.StudentsT{Mu: 0, Sigma: 1, Nu: dof}
	if dof < fewDoF {
		return student.Quantile(p)
	}
	t := expandedQuantile(distuv.UnitNormal.Quantile(p), dof)
	if dof > manyDoF {
		return t
	}
	// Newton's steps from there cost a tenth of the library's search.
	for range 10 {
		step := (student.CDF(t) - p) / student.Prob(t)
		t -= step
		if math.Abs(step) < 1e-9*t { // the next step would be its square
			return t
		}
	}
	return student.Quantile(p)
}

// StudentCDF returns the probability that a value of Student's distribution with
// dof degrees of freedom, which may be infinite, is at most t.
func StudentCDF(t, dof float64) float64 {
	if math.IsInf(dof, 1) {
		return distuv.UnitNormal.CDF(t)
	}
	if dof > 1e5 { // where the library loses digits; Abramowitz and Stegun, 26.7.8, from memory
		return distuv.UnitNormal.CDF(t * (1 - 1/(4*dof)) / math.Sqrt(1+t*t/(2*dof)))
	}
	return distuv.StudentsT{Mu: 0, Sigma: 1, Nu: dof}.CDF(t)
}

// Where Student's quantile is taken from its expansion as it is (exact there to
// 1e-11; the search loses more digits from 1e6 on), and where the expansion is
// no use.
const (
	manyDoF = 300
	fewDoF  = 3
)

// expandedQuantile is Student's quantile for many degrees of freedom, from the
// normal quantile z. Abramowitz and Stegun, 26.7.5, from memory.
func expandedQuantile(z, dof float64) float64 {
	z2 := z * z
	g1 := z * (z2 + 1) / 4
	g2 := z * ((5*z2+16)*z2 + 3) / 96
	g3 := z * (((3*z2+19)*z2+17)*z2 - 15) / 384
	g4 := z * ((((79*z2+776)*z2+1482)*z2-1920)*z2 - 945) / 92160
	return z + (g1+(g2+(g3+g4/dof)/dof)/dof)/dof
}

// GrubbsCritical returns the two-sided critical value of Grubbs' test for n
// readings (n >= 3) at the significance level alpha.
//
// F. E. Grubbs, Technometrics 11 (1969) 1, in the form with Student's t:
//
//	G = (n-1)/sqrt(n) sqrt(t^2 / (n-2+t^2)),  t = t(alpha/(2n), n-2)
func GrubbsCritical(n int, alpha float64) float64 {
	if n < 3 {
		return math.NaN()
	}
	m := float64(n)
	t := StudentFactor(1-alpha/m, m-2)
	return (m - 1) / math.Sqrt(m) * math.Sqrt(t*t/(m-2+t*t))
}

// GrubbsLevel is the significance level at which a reading is called suspect.
const GrubbsLevel = 0.05

// Outlier is the outcome of Grubbs' test on the reading farthest from the mean.
type Outlier struct {
	Index    int     // of that reading
	G        float64 // its distance from the mean in standard deviations
	Critical float64
	Suspect  bool // whether G exceeds Critical
}

// Grubbs tests the reading farthest from the mean, two-sided at GrubbsLevel.
// Fewer than three readings, or readings all alike, have no suspect. step is
// what the values are rounded to, 0 if they are not: rounding hides a scatter
// of its own, without which two equal readings of three would make any third
// one suspect.
func Grubbs(values []float64, step float64) Outlier {
	s := Summarize(values)
	if s.N < 3 || s.SD == 0 {
		return Outlier{Index: -1, G: math.NaN(), Critical: GrubbsCritical(s.N, GrubbsLevel)}
	}
	o := Outlier{Critical: GrubbsCritical(s.N, GrubbsLevel)}
	scatter := math.Hypot(s.SD, Rectangular(step/2))
	for i, v := range values {
		if g := math.Abs(v-s.Mean) / scatter; g > o.G {
			o.Index, o.G = i, g
		}
	}
	o.Suspect = o.G > o.Critical
	return o
}
