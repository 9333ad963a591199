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
	Name         string  `json:"name"`         // "repeatability", "resolution", "model", "second leg", ...
	Standard     float64 `json:"standard"`     // standard uncertainty, in Scale
	Scale        string  `json:"scale"`        // what Standard is in
	DoF          DoF     `json:"dof"`          // degrees of freedom; null: infinite
	Sensitivity  float64 `json:"sensitivity"`  // change of the result per unit of Scale
	Contribution float64 `json:"contribution"` // to the result's standard uncertainty: |Sensitivity| Standard, set by Combine
	Source       string  `json:"source"`       // where it comes from
}

// Uncertainty is a combined uncertainty with the budget it comes from.
type Uncertainty struct {
	Standard float64 `json:"standard"` // combined standard uncertainty
	Expanded float64 `json:"expanded"` // K times Standard
	K        float64 `json:"k"`        // coverage factor for the confidence asked
	DoF      DoF     `json:"dof"`      // effective degrees of freedom; null: infinite
	Terms    []Term  `json:"terms"`
}

// Combine combines independent terms by the law of propagation (JCGM 100,
// 5.1.2), with effective degrees of freedom by Welch and Satterthwaite (G.4),
// expanded to the confidence (0 to 1) by Student's factor. Degrees of freedom
// must be above zero. The slice is copied.
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
	u := Uncertainty{Standard: math.Sqrt(variance), DoF: Infinite, Terms: terms}
	if welch > 0 {
		u.DoF = DoF(variance * variance / welch)
	}
	u.K = StudentFactor(confidence, float64(u.DoF))
	u.Expanded = u.K * u.Standard
	return u
}

// Rectangular returns the standard uncertainty of a value that lies anywhere
// within halfWidth to either side (JCGM 100, 4.3.7).
func Rectangular(halfWidth float64) float64 { return halfWidth / math.Sqrt(3) }
