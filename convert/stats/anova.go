package stats

import (
	"math"

	"gonum.org/v1/gonum/mathext"
	"gonum.org/v1/gonum/stat"
)

// OneWay is a one-way analysis of variance: whether groups of readings differ
// by more than the readings within a group scatter.
type OneWay struct {
	Groups     int     // those with a reading
	N          int     // readings in all
	GrandMean  float64 // of the readings; NaN without any
	BetweenDoF int     // Groups - 1
	WithinDoF  int     // N - Groups
	Between    float64 // mean square between the groups; NaN for fewer than two
	Within     float64 // mean square within the groups; NaN where none has two readings
	F          float64 // Between/Within; NaN where either is NaN, or Within is 0
	P          float64 // the probability of so great an F if all groups had one mean; NaN like F
}

// Analyze analyses the variance of groups of readings, of each of which only
// number, mean and standard deviation count. The squares between the groups are
// taken about the grand mean, and corrected for what its rounding leaves over,
// so that no digits cancel where the groups lie close together.
func Analyze(groups []Summary) OneWay {
	var means, sizes []float64
	a := OneWay{GrandMean: math.NaN(), Between: math.NaN(), Within: math.NaN(), F: math.NaN(), P: math.NaN()}
	within := 0.0
	for _, g := range groups {
		if g.N == 0 {
			continue
		}
		a.Groups++
		a.N += g.N
		means, sizes = append(means, g.Mean), append(sizes, float64(g.N))
		if g.N > 1 {
			within += float64(g.N-1) * g.SD * g.SD
		}
	}
	a.BetweenDoF, a.WithinDoF = max(0, a.Groups-1), a.N-a.Groups
	if a.WithinDoF > 0 {
		a.Within = within / float64(a.WithinDoF)
	}
	if a.N > 0 {
		a.GrandMean = stat.Mean(means, sizes)
	}
	if a.BetweenDoF == 0 {
		return a
	}
	var between, left float64
	for i, mean := range means {
		d := mean - a.GrandMean
		between += sizes[i] * d * d
		left += sizes[i] * d
	}
	a.Between = (between - left*left/float64(a.N)) / float64(a.BetweenDoF)
	if a.Within > 0 { // false for NaN
		a.F = a.Between / a.Within
		a.P = exceedanceOfF(a.F, float64(a.BetweenDoF), float64(a.WithinDoF))
	}
	return a
}

// exceedanceOfF is the probability that a value of Fisher's F distribution is
// at least f. It comes from the incomplete beta function's own lower tail, so
// that a small one keeps its digits.
func exceedanceOfF(f, between, within float64) float64 {
	return mathext.RegIncBeta(within/2, between/2, within/(within+between*f))
}
