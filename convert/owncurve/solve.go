package owncurve

import (
	"errors"
	"math"
	"sync/atomic"

	"strikebook/convert/curve"
	"strikebook/convert/device"
	"strikebook/convert/edition"
	"strikebook/convert/metal"
	"strikebook/convert/rebound"
	"strikebook/convert/scale"
	"strikebook/convert/stats"
	"strikebook/convert/strict"
	"strikebook/convert/wording"
)

// Solution is a definition ready to be used.
type Solution struct {
	curve.Curve            // from the reading, in To
	To          scale.Key  // the definition's scale; for an anchor HV
	Leg         *scale.Leg // from HV to the definition's scale; nil for HV itself
	Definition  Definition // with what was left open filled in
	Fit         Fit        // without plot

	body     device.Device
	group    metal.Group
	scale    scale.Scale
	model    curve.Curve // the built-in one of device and metal; nil where there is none
	byModel  rebound.Leg
	standard func(hl, value float64) float64 // standard uncertainty of a value, in To
	dof      stats.DoF
	lo, hi   float64 // span of the pairs
	far      farPair
}

// Make fits a definition, and works out what there is to see of it. An error is
// a *wording.Error that names the field and the remedy.
func Make(d Definition) (Fitted, error) {
	if err := d.Check(""); err != nil {
		return Fitted{}, err
	}
	s, err := d.Solve()
	if err != nil {
		return Fitted{}, err
	}
	f := Fitted{s.Definition, s.Fit}
	f.Edition = edition.Current
	f.Plot = s.plot()
	return f, nil
}

// Solve fits a definition that Check has passed. An error is a *wording.Error:
// nothing useful goes through its pairs.
func (d Definition) Solve() (*Solution, error) {
	d.Edition = ""
	text, err := strict.Marshal(d)
	if err != nil {
		return nil, err // Check has passed the numbers
	}
	if known := last.Load(); known != nil && known.text == string(text) {
		return known.solution, known.err
	}
	s := newSolution(d.filled())
	err = s.solve()
	last.Store(&solved{string(text), s, err})
	return s, err
}

// last is the definition that was solved last: a book of thousands of spots
// uses one.
var last atomic.Pointer[solved]

type solved struct {
	text     string // of the definition
	solution *Solution
	err      error
}

func newSolution(d Definition) *Solution {
	s := &Solution{
		Definition: d, To: d.Scale, dof: stats.Infinite, lo: math.Inf(1), hi: math.Inf(-1),
		// Lists are never nil, so that a curve comes back from its JSON as it was.
		Fit: Fit{
			Parameters: []float64{}, Covariance: [][]float64{}, Birge: 1,
			Candidates: []Candidate{}, Warnings: []Warning{}, Plot: []PlotPoint{}, Residuals: make([]Residual, len(d.Pairs)),
		},
	}
	s.group, _ = metal.ByKey(d.Group)
	s.scale, _ = scale.ByKey(d.Scale)
	legs := scale.Legs(s.group)
	for i := range legs {
		if legs[i].Scale.Key == d.Scale {
			s.Leg = &legs[i]
		}
	}
	s.body, _ = device.ByKey(d.Device)
	if s.body.BuiltInCurve {
		leg, err := rebound.For(s.body, s.group)
		if err != nil {
			panic(err) // a test solves the model for every device and group there is
		}
		within, err := curve.Narrow(leg, s.body.Lo, s.body.Hi)
		if err != nil {
			panic(err) // a test holds that every group meets every device's range
		}
		s.model, s.byModel = within, leg
	}
	for i := range d.Pairs {
		s.lo, s.hi = min(s.lo, d.Pairs[i].HL), max(s.hi, d.Pairs[i].HL)
	}
	return s
}

func (s *Solution) solve() error {
	var err error
	switch s.Definition.Kind {
	case Anchor:
		err = s.anchor()
	case Own:
		err = s.own()
	case Table:
		err = s.table()
	}
	if err != nil {
		return err
	}
	lo, hi := s.Domain()
	reading, _ := scale.ByKey(s.readingScale())
	s.Fit.Range, s.Fit.ShownRange = []float64{lo, hi}, []string{reading.QuoteUp(lo), reading.QuoteDown(hi)}
	s.describePairs()
	s.warn()
	return nil
}

// readingScale is the scale of the device's readings.
func (s *Solution) readingScale() scale.Key { return scale.Key(s.body.Scale) }

// table goes through the points as they are.
func (s *Solution) table() error {
	var hls, values []float64
	for _, i := range byReading(s.Definition.Pairs) {
		p := &s.Definition.Pairs[i]
		hls, values = append(hls, p.HL), append(values, p.Value)
	}
	through, err := curve.NewTable(hls, values)
	if err != nil {
		return err // Check has passed the points
	}
	within, err := curve.Narrow(through, s.body.Lo, s.body.Hi)
	if err != nil {
		return wording.NewError("table-outside-device", "pairs", wording.Params{
			"lo": s.body.Lo, "hi": s.body.Hi, "scale": s.body.Scale, "device": s.body.Key})
	}
	s.Curve, s.Fit.Form = within, Tabulated
	s.lo, s.hi = within.Domain()
	share := s.Definition.UPercent / 100
	s.standard = func(_, value float64) float64 { return share * value }
	return nil
}

// Term is the uncertainty of the curve at a reading that it gives a value, in
// To.
func (s *Solution) Term(hl, value float64) stats.Term {
	t := stats.Term{
		Standard: s.standard(hl, value), Scale: string(s.To), DoF: s.dof,
		Distribution: stats.Normal, Sensitivity: 1,
	}
	if !math.IsInf(float64(s.dof), 1) {
		t.Distribution = stats.Student
	}
	switch s.Definition.Kind {
	case Anchor:
		t.Name, t.Source = "anchor", "Spread of the anchoring ratio, and 3 % for the model's shape, growing by 3 % with every 15 % of HL outside the pairs: engineering estimate"
	case Own:
		t.Name, t.Source = "own curve", "Covariance of the fitted curve, and the scatter about it that the pairs' uncertainties do not explain: D. York et al. (2004), R. T. Birge (1932)"
	case Table:
		t.Name, t.Source = "own table", "Percent of the value, as stated with the table"
	}
	return t
}

// Basis is what the curve makes a conversion rest on.
func (s *Solution) Basis() scale.Basis {
	switch s.Definition.Kind {
	case Anchor:
		return scale.Anchored
	case Own:
		return scale.Own
	}
	return scale.OwnTable
}

// Cite names the curve and where it comes from.
func (s *Solution) Cite() string {
	text := s.Definition.Label()
	if source := shorten(s.Definition.Source); source != "" && source != text {
		text += ", " + source
	}
	n := len(s.Definition.Pairs)
	switch {
	case s.Definition.Kind == Table:
		return text + " (a table the user owns)"
	case s.Definition.Kind == Own:
		return text + " (" + plural(n, "pair") + " of the user's own)"
	}
	return text + " (" + rebound.Source + "; scaled to " + plural(n, "pair") + " of the user's own)"
}

// Outside is how far a reading lies outside the span of the pairs, as a share
// of the nearest one's; 0 inside.
func (s *Solution) Outside(hl float64) float64 {
	return max(0, (s.lo-hl)/s.lo, (hl-s.hi)/s.hi)
}

// Span is the span of the pairs' readings.
func (s *Solution) Span() (lo, hi float64) { return s.lo, s.hi }

// inScale is a value of the curve in the definition's scale: the value itself,
// but for an anchor, which leads to HV. ok is false where the scale has none.
func (s *Solution) inScale(value float64) (converted, slope float64, ok bool) {
	if s.To == s.Definition.Scale {
		return value, 1, true
	}
	v, err := s.Leg.At(value)
	return v.Value, v.Slope, err == nil
}

// at is the curve at a reading in the definition's scale, with its standard
// uncertainty.
func (s *Solution) at(hl float64) (value, standard float64, ok bool) {
	in, err := s.At(hl)
	if err != nil {
		return math.NaN(), math.NaN(), false
	}
	value, slope, ok := s.inScale(in)
	return value, s.standard(hl, in) * math.Abs(slope), ok
}

// slopeAt is the change of the value per HL, in the definition's scale.
func (s *Solution) slopeAt(hl float64) float64 {
	in, err1 := s.At(hl)
	slope, err2 := s.Slope(hl)
	_, factor, ok := s.inScale(in)
	if errors.Join(err1, err2) != nil || !ok {
		return 0
	}
	return slope * factor
}

// modelAt is what the built-in model gives at a reading in the definition's
// scale; nil where it gives nothing.
func (s *Solution) modelAt(hl float64) *float64 {
	if s.model == nil {
		return nil
	}
	hv, err := s.model.At(hl)
	if err != nil {
		return nil
	}
	if s.Leg != nil {
		v, err := s.Leg.At(hv)
		if err != nil {
			return nil
		}
		hv = v.Value
	}
	return &hv
}

const (
	bandConfidence = 0.95
	plotPoints     = 60
)

// plot is the curve at points evenly over its range, with its band.
func (s *Solution) plot() []PlotPoint {
	k := stats.StudentFactor(bandConfidence, float64(s.dof))
	lo, hi := s.Domain()
	points := make([]PlotPoint, 0, plotPoints)
	for i := range plotPoints {
		hl := lo + (hi-lo)*float64(i)/(plotPoints-1)
		if i == plotPoints-1 {
			hl = hi // whatever the arithmetic makes of it
		}
		value, u, ok := s.at(hl)
		if ok && finite(value, u) {
			points = append(points, PlotPoint{HL: hl, Value: value, Low: value - k*u, High: value + k*u, Model: s.modelAt(hl)})
		}
	}
	return points
}

// describePairs says what each pair says of the curve.
func (s *Solution) describePairs() {
	k := stats.StudentFactor(bandConfidence, math.Inf(1))
	bar := func(v, u float64) []float64 { return []float64{v - k*u, v + k*u} }
	sum := 0.0
	for _, i := range byReading(s.Definition.Pairs) {
		p, r := &s.Definition.Pairs[i], &s.Fit.Residuals[i]
		uHL, uValue := p.UHL, p.UValue
		if s.Definition.Kind == Table {
			uHL, uValue = 0, s.Definition.UPercent/100*p.Value
		}
		r.HLBar, r.ValueBar = bar(p.HL, uHL), bar(p.Value, uValue)
		fitted, _, ok := s.at(p.HL)
		if !ok {
			continue
		}
		residual, standard := p.Value-fitted, math.Hypot(uValue, s.slopeAt(p.HL)*uHL)
		r.Fitted, r.Residual, r.Standard = &fitted, &residual, &standard
		sum += residual * residual
	}
	if s.Fit.DoF > 0 {
		residual := math.Sqrt(sum / float64(s.Fit.DoF))
		s.Fit.Residual = &residual
	}
}
