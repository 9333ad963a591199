package owncurve

import (
	"math"
	"strings"

	"strikebook/convert/curve"
	"strikebook/convert/stats"
	"strikebook/convert/wording"
)

// leastQuadratic is how many pairs a quadratic takes.
const leastQuadratic = 7

// own fits each form to the pairs and takes the one with the least corrected
// criterion of Akaike.
//
// H. Akaike (1974), N. Sugiura (1978); C. M. Hurvich and C.-L. Tsai, Biometrika 76
// (1989) 297, from memory. Where no form explains the pairs within their
// uncertainties, these are taken to be too small by the same factor for every
// form.
func (s *Solution) own() error {
	pairs := make([]Pair, 0, len(s.Definition.Pairs))
	order := byReading(s.Definition.Pairs)
	for _, i := range order {
		pairs = append(pairs, s.Definition.Pairs[i])
	}
	fits := map[Form]*fitted{}
	excess := math.Inf(1)
	for _, form := range []Form{Straight, Power, Quadratic} {
		f, refused := fitForm(form, pairs)
		c := Candidate{Form: form, Refused: refused}
		if refused != "" {
			c.Reason = wording.Say(refused, wording.Params{"n": float64(len(pairs)), "least": float64(leastQuadratic)}).Message
		} else {
			fits[form] = f
			per := f.chiSquare / float64(f.dof)
			c.ChiSquare, excess = &per, min(excess, per)
		}
		s.Fit.Candidates = append(s.Fit.Candidates, c)
	}
	var chosen *Candidate
	for i := range s.Fit.Candidates {
		c := &s.Fit.Candidates[i]
		f := fits[c.Form]
		if f == nil {
			continue
		}
		aicc := f.criterion(max(1, excess))
		c.AICc, c.LeaveOneOut = &aicc, f.leaveOneOut(pairs)
		if chosen == nil || aicc < *chosen.AICc {
			chosen = c
		}
	}
	if chosen == nil {
		return wording.NewError("curve-not-rising", "pairs", wording.Params{"scale": string(s.Definition.Scale)})
	}
	s.Fit.Form, s.Fit.AICc, s.Fit.LeaveOneOut = chosen.Form, chosen.AICc, chosen.LeaveOneOut
	s.use(fits[chosen.Form], pairs, order)
	return nil
}

// use makes a form the curve.
func (s *Solution) use(f *fitted, pairs []Pair, order []int) {
	s.Fit.DoF = f.dof
	scatter := 0.0
	if s.widen(f.chiSquare) {
		weight := 0.0
		for i := range pairs {
			weight += 1 / f.variance(&pairs[i])
		}
		mean := float64(len(pairs)) / weight // of the pairs' variances
		scatter = math.Sqrt((s.Fit.Birge*s.Fit.Birge - 1) * mean)
		s.dof = stats.DoF(f.dof) // how wide is only known from the pairs
	}
	s.Fit.Scatter = scatter
	birge := s.Fit.Birge
	s.Fit.Parameters, s.Fit.Covariance = f.line.Parameters()
	for _, row := range s.Fit.Covariance {
		for j := range row {
			row[j] *= birge * birge
		}
	}
	s.Fit.Equation = f.equation(string(s.Definition.Scale), string(s.readingScale()), s.Fit.Parameters)
	s.Curve = curve.Law{Lo: s.lo, Hi: s.hi, Value: f.value, Derivative: f.slope}
	s.standard = func(hl, _ float64) float64 { return math.Hypot(birge*f.standard(hl), scatter) }
	for n, i := range order {
		without, p := f.without(n, pairs), &pairs[n]
		if without == nil {
			continue
		}
		apart := without.apart(p)
		influence := (f.value(p.HL) - without.value(p.HL)) / s.standard(p.HL, 0)
		if finite(apart, influence) {
			s.Fit.Residuals[i].LeftOut, s.Fit.Residuals[i].Influence = &apart, &influence
		}
	}
}

// fitted is a form fitted to pairs.
type fitted struct {
	form      Form
	line      *stats.Polynomial // of a power, in the logarithms
	chiSquare float64           // in the coordinates of the pairs, so that forms compare
	dof       int
}

// fitForm fits a form. Where it cannot be used, refused is the code of the reason.
func fitForm(form Form, pairs []Pair) (f *fitted, refused string) {
	var code string
	switch f = fitPairs(form, pairs); {
	case form == Quadratic && len(pairs) < leastQuadratic:
		code = "form-few-pairs"
	case f == nil:
		code = "form-no-fit"
	case !f.rises(pairs[0].HL, pairs[len(pairs)-1].HL):
		code = "form-not-rising"
	}
	return f, code
}

// fitPairs fits a form; nil where that fails.
func fitPairs(form Form, pairs []Pair) *fitted {
	points := make([]stats.Point, len(pairs))
	for i, p := range pairs {
		points[i] = stats.Point{X: p.HL, UX: p.UHL, Y: p.Value, UY: p.UValue}
		if form == Power {
			points[i] = stats.Point{X: math.Log(p.HL), UX: p.UHL / p.HL, Y: math.Log(p.Value), UY: p.UValue / p.Value}
		}
	}
	degree := 1
	if form == Quadratic {
		degree = 2
	}
	line := stats.FitPolynomial(degree, points)
	if line == nil || line.DoF < 1 {
		return nil
	}
	f := &fitted{form: form, line: line, dof: line.DoF}
	for i := range pairs {
		p := &pairs[i]
		r := p.Value - f.value(p.HL)
		f.chiSquare += r * r / f.variance(p)
	}
	if !finite(f.chiSquare) {
		return nil
	}
	return f
}

func (f *fitted) value(hl float64) float64 {
	if f.form == Power {
		return math.Exp(f.line.Value(math.Log(hl)))
	}
	return f.line.Value(hl)
}

func (f *fitted) slope(hl float64) float64 {
	if f.form == Power {
		return f.value(hl) * f.line.Slope(math.Log(hl)) / hl
	}
	return f.line.Slope(hl)
}

// standard is the standard uncertainty of a value that the pairs' uncertainties
// leave.
func (f *fitted) standard(hl float64) float64 {
	if f.form == Power {
		return f.value(hl) * math.Sqrt(f.line.Variance(math.Log(hl)))
	}
	return math.Sqrt(f.line.Variance(hl))
}

// variance is the variance of a pair's value about the curve, from both sides of
// the pair.
func (f *fitted) variance(p *Pair) float64 {
	u := f.slope(p.HL) * p.UHL
	return p.UValue*p.UValue + u*u
}

// rises reports whether the form rises strictly between two readings, through
// hardness that can be.
func (f *fitted) rises(lo, hi float64) bool {
	// The slope of a power keeps its sign, that of a quadratic is straight.
	return f.slope(lo) > 0 && f.slope(hi) > 0 && f.value(lo) > 0 && f.value(hi) <= mostValue && f.value(hi) > f.value(lo)
}

// criterion is Akaike's, corrected for few pairs, with the variances of the
// pairs excess times as large.
func (f *fitted) criterion(excess float64) float64 {
	p := 2.0 // parameters
	if f.form == Quadratic {
		p = 3
	}
	n := p + float64(f.dof)
	return f.chiSquare/excess + 2*p + 2*p*(p+1)/(n-p-1)
}

// without is the form fitted to all pairs but one; nil where that fails.
func (f *fitted) without(i int, pairs []Pair) *fitted {
	return fitPairs(f.form, append(append(make([]Pair, 0, len(pairs)), pairs[:i]...), pairs[i+1:]...))
}

// leaveOneOut is the root mean square of what each pair differs by from the
// curve through the others; nil where one cannot be left out.
func (f *fitted) leaveOneOut(pairs []Pair) *float64 {
	sum := 0.0
	for i := range pairs {
		w := f.without(i, pairs)
		if w == nil {
			return nil
		}
		d := pairs[i].Value - w.value(pairs[i].HL)
		sum += d * d
	}
	rms := math.Sqrt(sum / float64(len(pairs)))
	if !finite(rms) {
		return nil
	}
	return &rms
}

// apart is how far a pair lies above a curve that was fitted without it, in units
// of the uncertainty of that.
func (f *fitted) apart(p *Pair) float64 {
	birge := math.Sqrt(max(1, f.chiSquare/float64(f.dof)))
	return (p.Value - f.value(p.HL)) / (birge * math.Hypot(math.Sqrt(f.variance(p)), f.standard(p.HL)))
}

// equation writes the form for reading.
func (f *fitted) equation(to, from string, p []float64) string {
	if f.form == Power {
		return to + " = " + shown(math.Exp(p[0])) + " × " + from + "^" + shown(p[1])
	}
	text := to + " = " + shown(p[0]) + " + " + shown(p[1]) + " " + from
	if f.form == Quadratic {
		text += " + " + shown(p[2]) + " " + from + "²"
	}
	return strings.ReplaceAll(text, "+ -", "- ")
}
