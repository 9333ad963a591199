package stats

import (
	"math"

	"gonum.org/v1/gonum/stat/distuv"
)

// Distribution is what is known of the values a term can take.
type Distribution string

// The distributions.
const (
	Normal  Distribution = "normal"
	Uniform Distribution = "rectangular" // anywhere between two bounds, no more likely here than there
	Student Distribution = "student"     // estimated from as many readings as its degrees of freedom say
)

// sum is the distribution of a sum of independent terms about its mean: one
// that is rectangular, and a mixture of normal ones, which the rest makes.
type sum struct {
	half  float64 // half-width of the rectangular one; 0 for none
	nodes []node
}

// node is one normal distribution of a mixture.
type node struct{ weight, variance, sd float64 }

// cdf is the probability of a deviation up to x, and its density there.
func (s sum) cdf(x float64) (p, density float64) {
	for _, n := range s.nodes {
		pn, dn := blurred(x, n.sd, s.half)
		p += n.weight * pn
		density += n.weight * dn
	}
	return p, density
}

// blurred is the probability up to x, and the density there, of a normal
// deviation of standard deviation sd plus a rectangular one of half-width half.
func blurred(x, sd, half float64) (p, density float64) {
	normal := distuv.UnitNormal
	if half == 0 {
		return normal.CDF(x / sd), normal.Prob(x/sd) / sd
	}
	if sd < 1e-6*half {
		return min(1, max(0, (x/half+1)/2)), 1 / (2 * half)
	}
	a, b := (x-half)/sd, (x+half)/sd
	pa, pb := normal.CDF(a), normal.CDF(b)
	// The integral of the normal CDF up to z is z CDF(z) + density(z).
	return sd / (2 * half) * (b*pb + normal.Prob(b) - a*pa - normal.Prob(a)), (pb - pa) / (2 * half)
}

// coverage returns the half-width of the interval about the mean that covers
// the share confidence, searched by Newton's steps from a first guess. Right of
// its middle the distribution bends downwards, so that the steps close in from
// the left.
func (s sum) coverage(confidence, guess float64) float64 {
	p := (1 + confidence) / 2
	x := guess
	for range 50 {
		at, density := s.cdf(x)
		next := max(x/2, x-(at-p)/density)
		if math.Abs(next-x) < 1e-9*x {
			return next
		}
		x = next
	}
	return x
}

// newSum adds up terms whose contributions and shares are set.
func newSum(terms []Term) sum {
	rectangle := -1
	for i, t := range terms {
		// A tiny one is as good as normal, and would only cost digits.
		if t.Distribution == Uniform && t.Share > 1e-4 && (rectangle < 0 || t.Contribution > terms[rectangle].Contribution) {
			rectangle = i
		}
	}
	s := sum{nodes: []node{{weight: 1}}}
	normal := 0.0
	for i, t := range terms {
		switch {
		case i == rectangle:
			s.half = t.Contribution * math.Sqrt(3)
		case t.tail() > 0.1:
			s.mix(t.Contribution, float64(t.DoF))
		default:
			normal += t.Contribution * t.Contribution
		}
	}
	for i := range s.nodes {
		s.nodes[i].sd = math.Sqrt(s.nodes[i].variance + normal)
	}
	return s
}

// mix adds Student's distribution of a scale to the mixture. It is itself one:
// normal with the variance scale^2/g, where g is a chi-square of dof degrees
// over dof. The nodes stand evenly in ln g, over which the trapezoidal rule
// converges faster than any power of their distance.
func (s *sum) mix(scale, dof float64) {
	step := 0.6 * math.Sqrt(2/dof) // in widths of ln g
	density := func(u float64) float64 { return math.Exp(dof / 2 * (u - math.Exp(u) + 1)) }
	var parts []node
	total := 0.0
	for _, direction := range []float64{-step, step} {
		for u := min(direction, 0); density(u) > 1e-8; u += direction {
			parts = append(parts, node{weight: density(u), variance: scale * scale * math.Exp(-u)})
			total += density(u)
		}
	}
	mixed := make([]node, 0, len(s.nodes)*len(parts))
	for _, a := range s.nodes {
		for _, b := range parts {
			mixed = append(mixed, node{weight: a.weight * b.weight / total, variance: a.variance + b.variance})
		}
	}
	s.nodes = mixed
}
