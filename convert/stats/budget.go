package stats

import (
	"math"
	"strconv"
)

// DoF is a number of degrees of freedom. An infinite one (a term that is known
// beforehand, not estimated from readings) is null in JSON.
//
//contract:ts number | null
type DoF float64

// Infinite is the degrees of freedom of what is not estimated from readings.
var Infinite = DoF(math.Inf(1))

// MarshalJSON writes a finite number, or null.
func (d DoF) MarshalJSON() ([]byte, error) {
	if math.IsInf(float64(d), 1) {
		return []byte("null"), nil
	}
	return strconv.AppendFloat(nil, float64(d), 'g', -1, 64), nil
}

// Term is one contribution to an uncertainty.
type Term struct {
	Name         string       `json:"name"`     // "repeatability", "resolution", "model", "second leg", ...
	Standard     float64      `json:"standard"` // standard uncertainty, in Scale
	Scale        string       `json:"scale"`    // what Standard is in
	DoF          DoF          `json:"dof"`      // degrees of freedom; null: infinite
	Distribution Distribution `json:"distribution"`
	Sensitivity  float64      `json:"sensitivity"`  // change of the result per unit of Scale
	Contribution float64      `json:"contribution"` // to the result's standard uncertainty: |Sensitivity| Standard, set by Combine
	Share        float64      `json:"share"`        // of the result's variance, 0 to 1, set by Combine
	Source       string       `json:"source"`       // where it comes from
}

// Repeatability is the name of the term that the scatter of the readings makes.
const Repeatability = "repeatability"

// RepeatabilityTerm is the uncertainty of the mean of n readings whose standard
// deviation is sd, in their own scale.
func RepeatabilityTerm(n int, sd float64) Term {
	return Term{
		Name: Repeatability, Standard: sd / math.Sqrt(float64(n)), DoF: DoF(n - 1), Distribution: Student,
		Source: "Standard deviation of the mean of the readings, JCGM 100, 4.2",
	}
}

// Uncertainty is a combined uncertainty with the budget it comes from.
type Uncertainty struct {
	Standard float64  `json:"standard"` // combined standard uncertainty
	Expanded float64  `json:"expanded"` // K times Standard
	K        float64  `json:"k"`        // coverage factor for the confidence asked
	DoF      DoF      `json:"dof"`      // effective degrees of freedom; null: infinite
	Coverage Coverage `json:"coverage"` // where K comes from
	Terms    []Term   `json:"terms"`

	sum sum // of the terms, where Coverage is ByTerms
}

// Coverage says where a coverage factor comes from.
type Coverage string

// Where a coverage factor can come from.
const (
	ByDoF   Coverage = "degrees-of-freedom" // Student's factor, JCGM 100, G.4
	ByTerms Coverage = "distributions"      // the distributions of the terms themselves, JCGM 101
)

// Combine combines independent terms by the law of propagation (JCGM 100,
// 5.1.2), with effective degrees of freedom by Welch and Satterthwaite (G.4),
// expanded to the confidence (0 to 1) by Student's factor. Where that is known
// to miss the coverage by more than 3 %, the terms' own distributions are added
// up instead, as JCGM 101 does by drawing from them. Degrees of freedom must be
// above zero. The slice is copied.
func Combine(terms []Term, confidence float64) Uncertainty {
	terms = append([]Term{}, terms...)
	var variance, welch float64
	for i, t := range terms {
		c := math.Abs(t.Sensitivity) * t.Standard
		terms[i].Contribution = c
		variance += c * c
		if c > 0 {
			welch += c * c * c * c / float64(t.DoF) // an infinite one adds nothing
		}
	}
	u := Uncertainty{Standard: math.Sqrt(variance), DoF: Infinite, Coverage: ByDoF, Terms: terms}
	if welch > 0 {
		u.DoF = DoF(variance * variance / welch)
	}
	u.K = StudentFactor(confidence, float64(u.DoF))
	for i, t := range terms {
		terms[i].Share = t.Contribution * t.Contribution / max(variance, math.SmallestNonzeroFloat64)
	}
	if u.Standard > 0 && !closedFormHolds(terms) {
		u.Coverage, u.sum = ByTerms, newSum(terms)
		u.K = u.sum.coverage(confidence, u.K*u.Standard) / u.Standard
	}
	u.Expanded = u.K * u.Standard
	return u
}

// CombineStandard is the combined standard uncertainty of independent terms,
// and nothing else.
func CombineStandard(terms []Term) float64 {
	variance := 0.0
	for _, t := range terms {
		c := t.Sensitivity * t.Standard
		variance += c * c
	}
	return math.Sqrt(variance)
}

// closedFormHolds reports whether Student's factor for the effective degrees of
// freedom meets the coverage of the sum within 3 %. It is too small where few
// readings carry much of the variance, too large where one rectangular term
// does; the bounds were found by comparison (TestClosedForm).
func closedFormHolds(terms []Term) bool {
	tails := 0.0
	for _, t := range terms {
		if t.Distribution == Uniform && t.Share > 0.35 {
			return false
		}
		tails += t.tail() * (1 - t.Share) // alone, it is the sum, and Student's factor its own
	}
	return tails <= 1
}

// CDF is the probability that the result is too large by no more than x, from
// the distribution that K comes from.
func (u Uncertainty) CDF(x float64) float64 {
	if math.IsInf(x, 0) {
		return max(0, math.Copysign(1, x))
	}
	if u.Coverage == ByTerms {
		p, _ := u.sum.cdf(x)
		return p
	}
	return StudentCDF(x/u.Standard, float64(u.DoF))
}

// tail is how much a sum feels that a small term of it is heavier in its tails
// than a normal one: above 1, by more than 3 % of its coverage.
func (t Term) tail() float64 {
	if t.Distribution != Student {
		return 0
	}
	return 600 * t.Share / float64(t.DoF*t.DoF)
}

// Rectangular returns the standard uncertainty of a value that lies anywhere
// within halfWidth to either side (JCGM 100, 4.3.7).
func Rectangular(halfWidth float64) float64 { return halfWidth / math.Sqrt(3) }
