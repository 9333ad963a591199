// Package owncurve makes conversions that the user owns: from pairs of a mean
// reading and a hardness measured by the specified method on the same piece, or
// from a published table that the user holds. One to four pairs scale the
// rebound model, five or more replace it.
//
// It stands beside package curve, and not in it, because an anchor needs the
// rebound model and the second leg, and both are made of curves.
package owncurve

import (
	"math"

	"strikebook/convert/edition"
	"strikebook/convert/scale"
	"strikebook/convert/stats"
	"strikebook/convert/wording"
)

// Curve is a conversion that the user owns, as it travels inside a record: what
// it is made of, and what came of it. The second part is only ever compared with
// what comes of it here, see Altered; it may be missing.
type Curve struct {
	Definition
	*Fit
}

// Fitted is a curve with what came of it.
type Fitted struct {
	Definition
	Fit
}

// Curve returns the curve as a record carries it.
func (f Fitted) Curve() *Curve { return &Curve{f.Definition, &f.Fit} }

// Definition is what a curve is made of.
type Definition struct {
	Name     string    `json:"name,omitempty"`      // the user's own: "P22 header, lab HBW"
	Device   string    `json:"device"`              // key of the impact device that took the readings
	Group    string    `json:"group"`               // key of the metal group
	Scale    scale.Key `json:"scale"`               // what the pairs' values are in
	Kind     CurveKind `json:"kind"`                // an anchor for up to four pairs, else own, unless told
	Pairs    []Pair    `json:"pairs"`               // in any order
	Source   string    `json:"source,omitempty"`    // where the values come from; of a table it must be there
	Serial   string    `json:"serial,omitempty"`    // of the instrument that took the readings
	Date     string    `json:"date,omitempty"`      // when they were taken: 2026-12-01
	UPercent float64   `json:"u_percent,omitempty"` // of a table: standard uncertainty of its values, percent
	Edition  string    `json:"edition,omitempty"`   // of the data and methods it was fitted with
}

// CurveKind is the kind of a curve.
type CurveKind string

// The kinds of curves.
const (
	Anchor CurveKind = "anchor" // the rebound model, scaled to one to four pairs
	Own    CurveKind = "own"    // a curve through five pairs or more
	Table  CurveKind = "table"  // a published table, whose points are taken as exact
)

// Pair is a reading and what it stands for. Of a table, the uncertainties are
// not looked at.
type Pair struct {
	HL       float64   `json:"hl"`                 // mean reading, in the device's scale, as if struck vertically down
	UHL      float64   `json:"u_hl"`               // its standard uncertainty
	Value    float64   `json:"value"`              // in the curve's scale
	UValue   float64   `json:"u_value"`            // its standard uncertainty
	Readings []float64 `json:"readings,omitempty"` // three or more, which hl and u_hl are then computed from
	Label    string    `json:"label,omitempty"`    // of the piece
	Date     string    `json:"date,omitempty"`     // when the reading was taken, unless as the curve's: 2026-12-01
}

// Fit is what came of a definition.
type Fit struct {
	Form       Form        `json:"form"`
	Equation   string      `json:"equation"`   // for reading, rounded: "HBW = -212.3 + 0.8741 HLD"; "" for a table
	Range      []float64   `json:"range"`      // least and greatest reading that it is given for
	ShownRange []string    `json:"shownRange"` // the same, rounded inwards
	Parameters []float64   `json:"parameters"` // see Form; [] for a table
	Covariance [][]float64 `json:"covariance"` // of the parameters, widened by birge^2; [] for a table

	DoF         int      `json:"dof"`         // pairs less parameters
	Residual    *float64 `json:"residual"`    // standard deviation of the pairs about the curve, in its scale; null without degrees of freedom
	ChiSquare   *float64 `json:"chiSquare"`   // per degree of freedom, of an anchor with the 3 % of the model's shape; null like it
	Birge       float64  `json:"birge"`       // what the uncertainty was widened by because of it, 1 or more
	Scatter     float64  `json:"scatter"`     // standard deviation of pieces about the curve that the pairs' uncertainties do not explain, in its scale; 0 unless chi-square is beyond chance (5 %)
	LeaveOneOut *float64 `json:"leaveOneOut"` // root mean square of what each pair differs by from the curve through the others; null but for an own curve
	AICc        *float64 `json:"aicc"`        // of the form chosen; null but for an own curve

	Candidates []Candidate `json:"candidates"` // the forms that were tried; [] but for an own curve
	Residuals  []Residual  `json:"residuals"`  // of each pair, in their order
	Warnings   []Warning   `json:"warnings"`
	Plot       []PlotPoint `json:"plot"` // evenly over the range
}

// Form is the form of a curve.
type Form string

// The forms, with their parameters p.
const (
	Straight  Form = "straight"  // value = p0 + p1 HL
	Power     Form = "power"     // ln value = p0 + p1 ln HL
	Quadratic Form = "quadratic" // value = p0 + p1 HL + p2 HL^2
	Anchored  Form = "anchored"  // HV = p0 times the rebound model
	Tabulated Form = "table"     // monotone through the points
)

// Candidate is a form that was tried.
type Candidate struct {
	Form        Form     `json:"form"`
	AICc        *float64 `json:"aicc"`        // Akaike's criterion, corrected: the least is chosen; null where refused, and so are the next two
	ChiSquare   *float64 `json:"chiSquare"`   // per degree of freedom
	LeaveOneOut *float64 `json:"leaveOneOut"` // as the fit's
	Refused     string   `json:"refused"`     // code of the reason why it cannot be chosen; "" if it can
	Reason      string   `json:"reason"`      // the reason, one sentence
}

// Residual is what one pair says of the curve.
type Residual struct {
	HLBar     []float64 `json:"hlBar"`     // interval of the reading at 95 %
	ValueBar  []float64 `json:"valueBar"`  // interval of the value at 95 %
	Fitted    *float64  `json:"fitted"`    // the curve at the reading; null where the curve gives none, and so are the next two
	Residual  *float64  `json:"residual"`  // value - fitted
	Standard  *float64  `json:"standard"`  // standard uncertainty of the residual from both sides of the pair
	LeftOut   *float64  `json:"leftOut"`   // value less the curve through the other pairs, in units of its uncertainty; null but for an own curve
	Influence *float64  `json:"influence"` // by how much the pair moves the curve at its reading, in units of the curve's standard uncertainty; null like it
}

// Warning is something the user has to know about a curve. It is a finding of
// every sheet that the curve is used for.
type Warning struct {
	Code    string         `json:"code"`
	Level   wording.Kind   `json:"level"` // warn or note
	Field   string         `json:"field"` // path in the curve
	Message string         `json:"message"`
	Remedy  string         `json:"remedy"`
	Params  wording.Params `json:"params"`
	Source  string         `json:"source"`
}

// PlotPoint is a point of the curve.
type PlotPoint struct {
	HL    float64  `json:"hl"`
	Value float64  `json:"value"`
	Low   float64  `json:"low"`   // of the band at 95 %
	High  float64  `json:"high"`  // of the band at 95 %
	Model *float64 `json:"model"` // what the built-in model gives there; null where it gives nothing
}

// filled is the definition with what it leaves open filled in.
func (d Definition) filled() Definition {
	if d.Kind == "" {
		d.Kind = Own
		if len(d.Pairs) <= mostAnchors {
			d.Kind = Anchor
		}
	}
	pairs := make([]Pair, len(d.Pairs))
	for i, p := range d.Pairs {
		if len(p.Readings) > 0 {
			s := stats.Summarize(p.Readings)
			p.HL, p.UHL = s.Mean, math.Hypot(s.StandardError, stats.Rectangular(0.5)) // displays show whole HL
		}
		pairs[i] = p
	}
	d.Pairs = pairs
	return d
}

// Altered reports whether a curve carries figures that do not follow from its
// pairs. Those of another edition are not looked at.
func (c Curve) Altered(fit Fit) bool {
	if c.Fit == nil || c.Edition != "" && c.Edition != edition.Current {
		return false
	}
	covariance := func(f Fit) (all []float64) {
		for _, row := range f.Covariance {
			all = append(all, row...)
		}
		return all
	}
	return c.Form != fit.Form && c.Form != "" ||
		differ(c.Range, fit.Range) || differ(c.Parameters, fit.Parameters) || differ(covariance(*c.Fit), covariance(fit))
}

// differ reports whether stored figures, if there are any, differ from those
// computed here by more than the arithmetic of another machine explains.
func differ(stored, computed []float64) bool {
	const most = 1e-6
	if len(stored) == 0 {
		return false
	}
	if len(stored) != len(computed) {
		return true
	}
	for i, v := range computed {
		if !(math.Abs(stored[i]-v) <= most*math.Abs(v)) {
			return true
		}
	}
	return false
}

// Packed is the curve without what can be computed again from the rest, for a
// link. A curve that has been altered stays whole, so that it can be found out.
func (c *Curve) Packed() *Curve {
	if c == nil || c.Fit == nil {
		return c
	}
	if s, err := c.Solve(); err == nil && c.Altered(s.Fit) {
		return c
	}
	packed := &Curve{Definition: c.Definition}
	if packed.Edition == "" {
		packed.Edition = edition.Current // the sign that there was a fit
	}
	return packed
}

// Unpacked is the packed curve with what came of it in this edition.
func (c *Curve) Unpacked() *Curve {
	if c == nil || c.Fit != nil || c.Edition == "" {
		return c
	}
	fitted, err := Make(c.Definition)
	if err != nil {
		return c // the sheet will say so
	}
	return fitted.Curve()
}
