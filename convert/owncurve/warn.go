package owncurve

import (
	"math"

	"strikebook/convert/wording"
)

const (
	bunchedFrom = 0.5  // share of the span without a pair
	narrowSpan  = 0.05 // of the reading
	farFrom     = 3.0  // units of uncertainty that curve and model may lie apart
)

// find adds a warning.
func (s *Solution) find(code, field string, params wording.Params) {
	w := wording.Say(code, params)
	s.Fit.Warnings = append(s.Fit.Warnings, Warning{
		Code: code, Level: w.Kind, Field: field, Message: w.Message, Remedy: w.Remedy, Params: params, Source: w.Source,
	})
}

// warn says what the user has to know about the curve.
func (s *Solution) warn() {
	if s.Definition.Kind == Own {
		s.warnOfPlaces()
		s.warnOfFarPair()
	}
	s.warnOfModel()
}

// warnOfPlaces warns of pairs that stand close together, or in a bunch.
func (s *Solution) warnOfPlaces() {
	scale := string(s.readingScale())
	order := byReading(s.Definition.Pairs)
	gap, from, to := 0.0, 0.0, 0.0
	for n, i := range order[1:] {
		a, b := s.Definition.Pairs[order[n]].HL, s.Definition.Pairs[i].HL
		if b-a > gap {
			gap, from, to = b-a, a, b
		}
	}
	span := s.hi - s.lo
	switch {
	case span < narrowSpan*s.hi:
		s.find("pairs-narrow", "pairs", wording.Params{"span": span, "lo": s.lo, "hi": s.hi, "scale": scale})
	case gap > bunchedFrom*span:
		s.find("pairs-bunched", "pairs", wording.Params{"from": from, "to": to, "percent": gap / span * 100, "scale": scale})
	}
}

// warnOfFarPair warns of the pair that lies farthest off the curve through the
// others, if that is far.
func (s *Solution) warnOfFarPair() {
	if s.far.beyond <= 1 {
		return
	}
	i := s.far.index
	p, r := &s.Definition.Pairs[i], &s.Fit.Residuals[i]
	s.find("pair-far-off", inPair(i, "value"), wording.Params{
		"pair": float64(i + 1), "hl": p.HL, "value": p.Value, "scale": string(s.Definition.Scale),
		"times": math.Abs(*r.LeftOut), "influence": math.Abs(*r.Influence)})
}

// warnOfModel warns of a curve that lies farther from the built-in model than
// both their uncertainties explain.
func (s *Solution) warnOfModel() {
	hl := (s.lo + s.hi) / 2
	if s.model == nil {
		return
	}
	value, u, ok := s.at(hl)
	model := s.modelAt(hl)
	slope, err := s.model.Slope(hl)
	if !ok || model == nil || err != nil {
		return
	}
	hv, _ := s.model.At(hl)
	uModel := s.byModel.StandardUncertainty(hl, hv) * slope // HV
	if s.Leg != nil {
		v, _ := s.Leg.At(hv)
		uModel = math.Hypot(uModel*v.Slope, v.Standard)
	}
	if math.Abs(value-*model) > farFrom*math.Hypot(u, uModel) {
		s.find("curve-far-from-model", "pairs", wording.Params{
			"hl": hl, "reading": string(s.readingScale()), "value": s.scale.Quote(value), "model": s.scale.Quote(*model),
			"scale": string(s.Definition.Scale), "metal": s.group.Name})
	}
}
