package convert

import (
	"errors"
	"math"
	"slices"

	"strikebook/convert/curve"
	"strikebook/convert/scale"
	"strikebook/convert/stats"
	"strikebook/convert/wording"
)

// convert writes the rows of the sheet: the reading's own scale, then every
// scale readings can be converted to, with a value or the reason for none.
func (e *evaluation) convert() {
	if e.brief {
		e.convertForBook()
		return
	}
	e.sheet.Uncertainty = e.combineReading()
	if e.own.Key != "" {
		e.addRow(e.ownRow())
	}
	for _, s := range scale.Converted() {
		if s.Key != e.own.Key {
			e.addRow(e.convertedRow(s))
		}
	}
}

// convertForBook writes the rows that a book shows.
func (e *evaluation) convertForBook() {
	wanted, otherwise := bookScales(e.record)
	for _, key := range wanted {
		if s, _ := scale.ByKey(key); key == e.own.Key {
			e.addRow(e.ownRow())
		} else if !s.Leeb {
			e.addRow(e.convertedRow(s))
		}
	}
	if otherwise != "" && !slices.ContainsFunc(e.sheet.Scales, func(r Row) bool { return r.Status == OK }) {
		e.addRow(e.ownRow())
	}
}

func (e *evaluation) addRow(r Row) { e.sheet.Scales = append(e.sheet.Scales, r) }

// combineReading is the uncertainty of the mean as a measure of hardness: the
// readings and the first leg, in the reading's scale.
func (e *evaluation) combineReading() *stats.Uncertainty {
	if e.summary.N == 0 {
		return nil
	}
	terms := e.leading()
	switch {
	case e.placed && e.curve != nil:
		terms = append(terms, e.ownCurveTerm())
	case e.placed:
		terms = append(terms, e.first.terms(e.mean, e.hv)...)
	}
	u := stats.Combine(terms, e.record.Confidence)
	return &u
}

// ownRow is the row of the scale the readings are in: nothing is converted.
func (e *evaluation) ownRow() Row {
	r := newRow(e.own)
	r.Device = e.device.Key
	lo, hi := e.ownRange()
	if e.first != nil {
		lo, hi = e.first.Domain()
		lo, hi = lo+e.carried(), hi+e.carried()
	}
	r.setRange(e.own, lo, hi)
	switch {
	case e.summary.N == 0:
		r.refuse(None, "scale-no-readings", nil)
	case e.side != OK:
		e.refuseSide(&r, e.side)
	case math.IsNaN(e.mean):
		r.refuse(None, "scale-withheld", nil)
	default:
		r.Path = []scale.Step{measuredStep(e.own.Key)}
		r.accept(e.own, e.own.Key, e.mean, e.combine(e.own.Key, e.terms))
	}
	return r
}

// convertedRow is the row of a scale the mean is converted to.
func (e *evaluation) convertedRow(s scale.Scale) Row {
	r := newRow(s)
	leg, ok := e.legTo(s)
	if !ok {
		code := "scale-no-table"
		if e.group.Key == "" {
			code = "scale-withheld"
		}
		r.refuse(None, code, wording.Params{"scale": string(s.Key)})
		return r
	}
	r.Method = leg.Method
	if e.curve != nil && s.Key == e.curve.served {
		r.Method = string(s.Key) // with whatever force the user measured
	}
	lo, hi, ok := e.reach(leg)
	if !ok {
		r.refuse(None, "scale-outside", wording.Params{"scale": string(s.Key)})
		return r
	}
	r.setRange(s, lo, hi)
	switch {
	case e.summary.N == 0:
		r.refuse(None, "scale-no-readings", nil)
	case e.side != OK:
		e.refuseSide(&r, e.side)
	case e.stopped() || !e.placed:
		r.refuse(None, "scale-withheld", nil)
	default:
		e.fill(&r, leg)
	}
	return r
}

// legTo returns the leg from HV to a scale on the metal.
func (e *evaluation) legTo(s scale.Scale) (scale.Leg, bool) {
	if e.group.Key == "" {
		return scale.Leg{}, false
	}
	if s.Key == scale.HV {
		return scale.ToItself(s, e.group.Lo, e.group.Hi), true
	}
	i := slices.IndexFunc(e.legs, func(l scale.Leg) bool { return l.Scale.Key == s.Key })
	if i < 0 {
		return scale.Leg{}, false
	}
	return e.legs[i], true
}

// reach returns the least and the greatest value that the readings' scale can
// lead to over a leg. ok is false where it leads to none.
func (e *evaluation) reach(leg scale.Leg) (lo, hi float64, ok bool) {
	from, to := e.group.Lo, e.group.Hi
	if e.curve != nil {
		return e.curve.ownReach(leg)
	}
	if e.first != nil {
		from, to = curve.Values(e.first)
	}
	return leg.Span(from, to)
}

// fill gives a row its value: over the first leg to HV, over the second to the scale.
func (e *evaluation) fill(r *Row, leg scale.Leg) {
	value, terms, err := e.over(leg)
	if err != nil {
		e.refuseSide(r, sideOf(err.Above()))
		return
	}
	if e.curve != nil {
		r.Path = e.ownPath(leg)
	} else {
		r.Path = e.first.steps(e.hv)
		if leg.Scale.Key != scale.HV {
			r.Path = append(r.Path, leg.Steps(e.hv)...)
		}
	}
	r.accept(leg.Scale, e.own.Key, value, e.combine(leg.Scale.Key, terms))
}

// combine combines the terms of the value in a scale, and keeps what comes out:
// the verdict needs it again.
func (e *evaluation) combine(key scale.Key, terms []stats.Term) stats.Uncertainty {
	u := stats.Combine(terms, e.record.Confidence)
	if l := e.record.Limit; l != nil && l.Scale == key {
		e.inLimit = &u
	}
	return u
}

// over leads from the mean, which has been placed, over a leg: to its value and
// all that makes it uncertain.
func (e *evaluation) over(leg scale.Leg) (value float64, terms []stats.Term, outside *curve.OutsideError) {
	if e.curve != nil {
		return e.overOwnCurve(leg)
	}
	v, err := leg.At(e.hv)
	if errors.As(err, &outside) {
		return math.NaN(), nil, outside
	}
	const legs = 2 // terms that they add
	terms = append(make([]stats.Term, 0, len(e.terms)+legs), e.terms...)
	terms = append(terms, e.first.terms(e.mean, e.hv)...)
	u := stats.CombineStandard(terms)
	toHV, err1 := curve.MeanSlope(e.first, e.mean, u)
	fromHV, err2 := leg.Carry(e.hv, u*math.Abs(toHV))
	if err := errors.Join(err1, err2); err != nil {
		panic(err) // place has found the mean inside the first leg, At inside the second
	}
	for i := range terms {
		terms[i].Sensitivity *= toHV * fromHV
	}
	if leg.Scale.Key != scale.HV {
		terms = append(terms, secondLegTerm(leg, e.hv))
	}
	return v.Value, terms, nil
}

func newRow(s scale.Scale) Row {
	return Row{
		Scale: s.Key, Name: s.Name, Method: string(s.Key), Status: None, Decimals: s.Decimals, DoF: stats.Infinite,
		Terms: []stats.Term{}, Range: []float64{}, ShownRange: []string{}, Path: []scale.Step{}, ReasonParams: wording.Params{},
	}
}

func (r *Row) setRange(s scale.Scale, lo, hi float64) {
	r.Range = []float64{lo, hi}
	r.ShownRange = []string{s.QuoteUp(lo), s.QuoteDown(hi)}
}

// refuse says why the row has no value.
func (r *Row) refuse(status Status, code string, params wording.Params) {
	r.Status = status
	r.ReasonCode = code
	if params != nil {
		r.ReasonParams = params
	}
	r.Reason = wording.Say(code, params).Message
}

// refuseSide refuses a row whose range the spot lies below or above.
func (e *evaluation) refuseSide(r *Row, side Status) {
	params := wording.Params{"scale": string(r.Scale), "lo": r.ShownRange[0], "hi": r.ShownRange[1]}
	r.refuse(side, "scale-"+string(side), params)
}

// accept gives the row its value.
func (r *Row) accept(s scale.Scale, measured scale.Key, value float64, u stats.Uncertainty) {
	r.Status = OK
	r.Value, r.Standard, r.Expanded, r.K = &value, &u.Standard, &u.Expanded, &u.K
	r.DoF, r.Coverage, r.Terms = u.DoF, u.Coverage, u.Terms
	low, high := value-u.Expanded, value+u.Expanded
	r.LowCut, r.HighCut = low < r.Range[0], high > r.Range[1]
	low, high = max(low, r.Range[0]), min(high, r.Range[1])
	r.Low, r.High = &low, &high
	r.ShownValue = s.Quote(value)
	r.Shown = s.Notation(r.ShownValue, measured)
	r.ShownExpanded = s.QuoteUp(u.Expanded)
	r.ShownLow, r.ShownHigh = s.QuoteDown(low), s.QuoteUp(high)
	if r.LowCut {
		r.ShownLow = r.ShownRange[0]
	}
	if r.HighCut {
		r.ShownHigh = r.ShownRange[1]
	}
}
