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
	best, fits := choose(pairs)
	if best < 0 {
		return wording.NewError("curve-not-rising", "pairs", wording.Params{"scale": string(s.Definition.Scale)})
	}
	for _, f := range fits {
		c := Candidate{Form: f.form, Refused: f.refused}
		if f.refused != "" {
			c.Reason = wording.Say(f.refused, wording.Params{"n": float64(len(pairs)), "least": float64(leastQuadratic)}).Message
		} else {
			per := f.chiSquare / float64(f.dof)
			c.ChiSquare, c.AICc, c.LeaveOneOut = &per, &f.aicc, f.leaveOneOut(pairs)
		}
		s.Fit.Candidates = append(s.Fit.Candidates, c)
	}
	chosen := &s.Fit.Candidates[best]
	s.Fit.Form, s.Fit.AICc, s.Fit.LeaveOneOut = chosen.Form, chosen.AICc, chosen.LeaveOneOut
	s.use(fits[best], pairs, order)
	return nil
}

// choose fits each form to pairs, which stand in the order of their readings, and
// finds the best; best is below 0 where every form is refused.
func choose(pairs []Pair) (best int, fits [3]*fitted) {
	excess := math.Inf(1)
	for i, form := range [...]Form{Straight, Power, Quadratic} {
		fits[i] = fitForm(form, pairs)
		if f := fits[i]; f.refused == "" {
			excess = min(excess, f.chiSquare/float64(f.dof))
		}
	}
	best = -1
	for i, f := range fits {
		if f.refused != "" {
			continue
		}
		f.aicc = f.criterion(max(1, excess))
		if best < 0 || f.aicc < fits[best].aicc {
			best = i
		}
	}
	return best, fits
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
		p := &pairs[n]
		best, others := choose(without(n, pairs)) // which may come to another form
		if best < 0 {
			continue
		}
		other := others[best]
		apart, limit := other.apart(p)
		influence := (f.value(p.HL) - other.value(p.HL)) / s.standard(p.HL, 0)
		if finite(apart, influence) {
			s.Fit.Residuals[i].LeftOut, s.Fit.Residuals[i].Influence = &apart, &influence
			if beyond := math.Abs(apart) / limit; beyond > s.far.beyond {
				s.far = farPair{i, beyond}
			}
		}
	}
}

// fitted is a form fitted to pairs.
type fitted struct {
	form      Form
	line      *stats.Polynomial // of a power, in the logarithms
	chiSquare float64           // in the coordinates of the pairs, so that forms compare
	n, dof    int               // pairs, and less parameters
	aicc      float64
	refused   string // code of the reason why it cannot be used; "" if it can
}

// fitForm fits a form, and says whether it can be used.
func fitForm(form Form, pairs []Pair) *fitted {
	f := fitPairs(form, pairs)
	var code string
	switch {
	case form == Quadratic && len(pairs) < leastQuadratic:
		code = "form-few-pairs"
	case f == nil:
		code = "form-no-fit"
	case !f.rises(pairs[0].HL, pairs[len(pairs)-1].HL):
		code = "form-not-rising"
	}
	if code != "" {
		return &fitted{form: form, refused: code}
	}
	return f
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
	f := &fitted{form: form, line: line, n: len(pairs), dof: line.DoF}
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
	n, p := float64(f.n), float64(f.n-f.dof) // pairs and parameters
	return f.chiSquare/excess + 2*p + 2*p*(p+1)/(n-p-1)
}

// without is the pairs but for one.
func without(i int, pairs []Pair) []Pair {
	return append(append(make([]Pair, 0, len(pairs)), pairs[:i]...), pairs[i+1:]...)
}

// leaveOneOut is the root mean square of what each pair differs by from the
// curve through the others; nil where one cannot be left out.
func (f *fitted) leaveOneOut(pairs []Pair) *float64 {
	sum := 0.0
	for i := range pairs {
		w := fitPairs(f.form, without(i, pairs))
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

// farPair is the pair that lies farthest off the curve through the others, in
// units of how far it may.
type farPair struct {
	index  int
	beyond float64
}

// farOff is how many units of uncertainty a pair may lie off the curve through
// the others (common practice, no source).
const farOff = 3.0

// apart is how far a pair lies above a curve that was fitted without it, in units
// of the uncertainty of that, and how far it may: farther where that uncertainty
// is itself only known from the pairs.
func (f *fitted) apart(p *Pair) (apart, limit float64) {
	u := math.Hypot(math.Sqrt(f.variance(p)), f.standard(p.HL))
	limit = farOff
	if per := f.chiSquare / float64(f.dof); per > 1 {
		u *= math.Sqrt(per)
		const level = 0.05 // that any of the pairs is taken for one by chance
		limit = max(limit, stats.StudentFactor(1-level/float64(f.n+1), float64(f.dof)))
	}
	return (p.Value - f.value(p.HL)) / u, limit
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
