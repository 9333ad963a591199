package owncurve

import (
	"math"
	"strconv"

	"strikebook/convert/curve"
	"strikebook/convert/scale"
	"strikebook/convert/stats"
	"strikebook/convert/wording"
)

const (
	// What the shape of the model may be wrong by, relative to HV, at the pairs,
	// and by how much more with every growthPer of HL outside them (engineering
	// estimate).
	shapeShare = 0.03
	growthPer  = 0.15
)

// anchor scales the rebound model to the pairs: HV = k HV(model). k is the
// weighted mean of the logarithms of the pairs' ratios.
func (s *Solution) anchor() error {
	pairs := s.Definition.Pairs
	logs, weights := make([]float64, len(pairs)), make([]float64, len(pairs))
	var sum, weight float64
	for _, i := range byReading(pairs) {
		ratio, u, err := s.ratio(i, &pairs[i])
		if err != nil {
			return err
		}
		logs[i], weights[i] = math.Log(ratio), 1/(u*u)
		sum += logs[i] * weights[i]
		weight += weights[i]
	}
	ln, u := sum/weight, 1/math.Sqrt(weight)
	s.Fit.Form, s.Fit.DoF = Anchored, len(pairs)-1
	chiSquare := 0.0 // what the model's shape allows is no disagreement of the pairs
	for _, i := range byReading(pairs) {
		chiSquare += (logs[i] - ln) * (logs[i] - ln) / (1/weights[i] + shapeShare*shapeShare)
	}
	s.widen(chiSquare)
	u *= s.Fit.Birge
	k := math.Exp(ln)
	s.Fit.Parameters, s.Fit.Covariance = []float64{k}, [][]float64{{u * k * u * k}}
	s.Fit.Equation = "HV = " + shown(k) + " × model(" + string(s.readingScale()) + ")"

	s.To = scale.HV
	lo, hi := s.model.Domain()
	times := func(f func(float64) (float64, error)) func(float64) float64 {
		return func(hl float64) float64 {
			v, err := f(hl)
			if err != nil {
				return math.NaN() // the law below is asked for nothing outside
			}
			return k * v
		}
	}
	s.Curve = curve.Law{Lo: lo, Hi: hi, Value: times(s.model.At), Derivative: times(s.model.Slope)}
	within := math.Hypot(u, shapeShare)
	s.standard = func(hl, hv float64) float64 { return hv * (within + shapeShare*s.Outside(hl)/growthPer) }
	return nil
}

// ratio is by how much the hardness of a pair exceeds the model, with its
// relative standard uncertainty from both sides of the pair.
func (s *Solution) ratio(i int, p *Pair) (ratio, u float64, err error) {
	model, slope, ok := through(s.model, p.HL, p.UHL)
	if !ok {
		return 0, 0, s.outside("anchor-outside-model", inPair(i, "hl"), p.HL, s.readingScale(), s.model)
	}
	hv, perValue := p.Value, 1.0
	if s.Leg != nil {
		back, err := s.Leg.Back(s.Leg.Domain())
		if err != nil {
			panic(err) // a test turns every leg round
		}
		if hv, perValue, ok = through(back, p.Value, p.UValue); !ok {
			return 0, 0, s.outside("anchor-outside-table", inPair(i, "value"), p.Value, s.Definition.Scale, back)
		}
	}
	return hv / model, math.Hypot(perValue*p.UValue/hv, slope*p.UHL/model), nil
}

// through leads x, which is uncertain by u, over a curve. ok is false outside it.
func through(c curve.Curve, x, u float64) (value, slope float64, ok bool) {
	value, err := c.At(x)
	if err != nil {
		return 0, 0, false
	}
	slope, err = curve.MeanSlope(c, x, u)
	return value, slope, err == nil
}

// outside refuses a number that an anchor's curve is not given for.
func (s *Solution) outside(code, field string, got float64, scale scale.Key, c curve.Curve) error {
	lo, hi := c.Domain()
	return wording.NewError(code, field, wording.Params{
		"path": field, "got": got, "lo": lo, "hi": hi, "scale": string(scale), "metal": s.group.Name})
}

// widen takes chi-square into account: by the Birge ratio where it exceeds its
// expectation, and as a scatter of its own where it does so beyond chance.
// R. T. Birge, Phys. Rev. 40 (1932) 207.
func (s *Solution) widen(chiSquare float64) (beyondChance bool) {
	if s.Fit.DoF < 1 {
		return false
	}
	per := chiSquare / float64(s.Fit.DoF)
	s.Fit.ChiSquare = &per
	s.Fit.Birge = math.Sqrt(max(1, per))
	if per <= stats.ChiSquareLimit(s.Fit.DoF) {
		return false
	}
	s.find("pairs-disagree", "pairs", wording.Params{"times": s.Fit.Birge})
	return true
}

// shown writes a number for reading.
func shown(v float64) string { return strconv.FormatFloat(v, 'g', 5, 64) }

func plural(n int, noun string) string {
	if n != 1 {
		noun += "s"
	}
	return strconv.Itoa(n) + " " + noun
}
