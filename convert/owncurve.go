package convert

import (
	"errors"
	"math"
	"slices"
	"strings"

	"strikebook/convert/curve"
	"strikebook/convert/metal"
	"strikebook/convert/owncurve"
	"strikebook/convert/scale"
	"strikebook/convert/stats"
	"strikebook/convert/wording"
)

// curveAge is how many days the pairs of a curve may be older than the readings
// (common practice, no source).
const curveAge = 365.0

// ownLeg is a first leg of the user's own. It leads to the scale of its curve or,
// where that is an anchor, to HV.
type ownLeg struct {
	*owncurve.Solution
	served scale.Key  // what the curve's values are in
	back   scale.Back // from there to HV; not set for HV itself
}

// findOwnCurve finds out whether the record's own curve may be used. Where it
// may not, a finding says so, and nothing is converted.
func (e *evaluation) findOwnCurve() {
	c := e.record.Curve
	if c == nil {
		return
	}
	if !e.curveFits() {
		g, _ := metal.ByKey(c.Group)
		params := wording.Params{"name": c.Label(), "curveDevice": c.Device, "curveMetal": g.Name, "device": "–", "metal": "–"}
		if e.device.Key != "" {
			params["device"] = e.device.Key
		}
		if e.group.Key != "" {
			params["metal"] = e.group.Name
		}
		e.find("wrong-curve", "curve", params)
		return
	}
	if e.own.Key == "" || e.group.Key == "" {
		return // nothing is converted before both are chosen
	}
	s, err := c.Solve()
	if err != nil {
		e.find("curve-unusable", "curve", wording.Params{"name": c.Label()})
		return
	}
	if c.Altered(s.Fit) {
		e.find("curve-altered", "curve", wording.Params{"name": c.Label()})
		return
	}
	e.curve = &ownLeg{Solution: s, served: c.Scale}
	if s.Leg != nil {
		if e.curve.back, err = s.Leg.Back(e.group.Lo, e.group.Hi); err != nil {
			panic(err) // a test holds that every leg of a group serves a part of its range
		}
	}
	for _, w := range s.Fit.Warnings {
		w.Field = "curve." + w.Field
		e.addFinding(Finding(w))
	}
	e.judgeCurveAge(c)
	if e.offsetInCurve() {
		e.find("offset-in-curve", "serial", wording.Params{"name": c.Label(), "serial": e.record.Serial})
	}
}

// addFinding adds a finding that has its words.
func (e *evaluation) addFinding(f Finding) {
	if e.brief {
		f = Finding{Code: f.Code, Level: f.Level}
	}
	e.sheet.Findings = append(e.sheet.Findings, f)
}

// curveFits reports whether the record's own curve was made with its device on
// its metal, as far as these are chosen.
func (e *evaluation) curveFits() bool {
	c := e.record.Curve
	return (e.own.Key == "" || c.Device == e.device.Key) && (e.group.Key == "" || c.Group == e.group.Key)
}

func (e *evaluation) judgeCurveAge(c *owncurve.Curve) {
	made, ok1 := c.Oldest()
	taken, ok2 := e.record.TakenAt()
	if days := taken.Sub(made).Hours() / 24; ok1 && ok2 && c.Kind != owncurve.Table && days > curveAge {
		e.find("curve-old", "curve", wording.Params{"name": c.Label(), "days": math.Floor(days)})
	}
}

// offsetInCurve reports whether the pairs of the own curve were taken with the
// very instrument of the record, so that they carry its offset.
func (e *evaluation) offsetInCurve() bool {
	if e.curve == nil || e.curve.Definition.Kind == owncurve.Table {
		return false
	}
	mine := strings.TrimSpace(e.record.Serial)
	return mine != "" && strings.EqualFold(mine, strings.TrimSpace(e.curve.Definition.Serial))
}

// byOwnCurve leads from a reading by a curve of the user's own.
func (e *evaluation) byOwnCurve() *firstLeg {
	if e.curve == nil {
		return nil // a finding says why
	}
	return &firstLeg{Curve: e.curve} // its steps and terms are those of the curve
}

// ownCurveTerm is what the own curve leaves in doubt, as the readings would have
// to scatter to leave as much.
func (e *evaluation) ownCurveTerm() stats.Term {
	t := e.curve.Term(e.argument(), e.value)
	t.Sensitivity = 1 / must(curve.MeanSlope(e.curve, e.argument(), stats.CombineStandard(e.leading())))
	return t
}

// leading are the terms of the mean's uncertainty that go over the first leg:
// all, but for those of the instrument where the curve carries its offset.
func (e *evaluation) leading() []stats.Term {
	terms := slices.Clone(e.terms)
	if !e.offsetInCurve() {
		return terms
	}
	return slices.DeleteFunc(terms, func(t stats.Term) bool { return slices.Contains(instrumentTerms, t.Name) })
}

// instrumentTerms are the names of what a block check, or none, leaves in doubt
// of the instrument.
var instrumentTerms = []string{"permissible error", "block certificate", "block readings", "block offset"}

// argument is the mean that goes over the first leg: as corrected, but for the
// instrument's offset where the curve carries it.
func (e *evaluation) argument() float64 { return e.mean - e.carried() }

// carried is the correction for the instrument's offset that is not to enter the
// first leg, because the curve carries it.
func (e *evaluation) carried() float64 {
	if e.offsetInCurve() {
		return e.sheet.Corrected.Block
	}
	return 0
}

// placeByOwnCurve finds the hardness that the mean stands for by a curve of the
// user's own.
func (e *evaluation) placeByOwnCurve() {
	hl := e.argument()
	value, err := e.curve.At(hl)
	lo, hi := e.curve.Domain()
	params := wording.Params{"name": e.curve.Definition.Label(), "mean": hl, "scale": string(e.own.Key), "lo": lo, "hi": hi}
	if outside := (*curve.OutsideError)(nil); errors.As(err, &outside) {
		e.side = sideOf(outside.Above())
		e.find("outside-curve-range", "readings", params)
		return
	}
	if share := e.curve.Outside(hl); share > 0 && e.curve.Definition.Kind == owncurve.Anchor {
		params["percent"] = share * 100
		params["lo"], params["hi"] = e.curve.Span()
		e.find("outside-pairs", "readings", params)
	}
	e.value, e.hv, e.placed = value, value, true
	if e.curve.To != scale.HV {
		e.hv, _ = e.curve.back.At(value) // NaN outside: only the curve's own scale has a value
	}
}

// overOwnCurve is over for a curve of the user's own. A value in the curve's own
// scale carries none of the second leg's doubt.
func (e *evaluation) overOwnCurve(leg scale.Leg) (value float64, terms []stats.Term, outside *curve.OutsideError) {
	c, hl, to := e.curve, e.argument(), leg.Scale.Key
	terms = e.leading()
	carry(terms, must(curve.MeanSlope(c, hl, stats.CombineStandard(terms))))
	terms = append(terms, c.Term(hl, e.value))
	if to == c.To && to == c.served {
		return e.value, terms, nil
	}
	if math.IsNaN(e.hv) {
		_, err := c.back.At(e.value)
		errors.As(err, &outside)
		return math.NaN(), nil, outside
	}
	v := scale.Value{Value: e.hv}
	if to != scale.HV {
		var err error
		if v, err = leg.At(e.hv); errors.As(err, &outside) {
			return math.NaN(), nil, outside
		}
	}
	if c.To != scale.HV {
		carry(terms, must(curve.MeanSlope(c.back, e.value, stats.CombineStandard(terms))))
	}
	if to == c.served { // an anchor, whose pairs were led to HV by this very leg
		carry(terms, must(leg.Carry(e.hv, stats.CombineStandard(terms))))
		return v.Value, terms, nil
	}
	if c.served != scale.HV {
		terms = append(terms, c.servedTerm(e.hv, stats.CombineStandard(terms)))
	}
	if to != scale.HV {
		carry(terms, must(leg.Carry(e.hv, stats.CombineStandard(terms))))
		terms = append(terms, secondLegTerm(leg, e.hv))
	}
	return v.Value, terms, nil
}

// servedTerm is the doubt, in a hardness in HV that is uncertain by u, of the leg
// between it and the scale of the curve's values. Where an anchor leads beyond
// that leg, the doubt at its end stands.
func (c *ownLeg) servedTerm(hv, u float64) stats.Term {
	lo, hi := c.Leg.Domain()
	hv = min(hi, max(lo, hv))
	t := secondLegTerm(*c.Leg, hv)
	t.Sensitivity = 1 / must(c.Leg.Carry(hv, u))
	return t
}

// carry carries terms on by a change of the result per what they were in.
func carry(terms []stats.Term, slope float64) {
	for i := range terms {
		terms[i].Sensitivity *= slope
	}
}

// must is for what has been found inside a range.
func must(v float64, err error) float64 {
	if err != nil {
		panic(err)
	}
	return v
}

// ownPath says how a value in a scale comes about by a curve of the user's own.
func (e *evaluation) ownPath(leg scale.Leg) []scale.Step {
	c, to := e.curve, leg.Scale.Key
	path := []scale.Step{{Step: string(e.own.Key) + " to " + string(c.To), Basis: c.Basis(), Source: c.Cite()}}
	if to == c.To {
		return path
	}
	if c.To != scale.HV {
		path = append(path, c.back.Steps(e.hv)...)
	}
	return append(path, leg.Steps(e.hv)...)
}

// ownReach is reach for a curve of the user's own: what it leads to, over HV or
// directly.
func (c *ownLeg) ownReach(leg scale.Leg) (lo, hi float64, ok bool) {
	lo, hi = curve.Values(c)
	if leg.Scale.Key == c.To {
		return lo, hi, true
	}
	if c.To != scale.HV {
		least, greatest := c.back.Domain()
		lo, hi = max(lo, least), min(hi, greatest)
		if !(lo < hi) {
			return math.NaN(), math.NaN(), false
		}
		lo, hi = must(c.back.At(lo)), must(c.back.At(hi))
	}
	return leg.Span(lo, hi)
}
