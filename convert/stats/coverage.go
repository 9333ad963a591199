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
// Student's, one rectangular, and the rest, which is taken as normal.
type sum struct {
	normal  float64 // standard deviation of the rest
	half    float64 // half-width of the rectangular one; 0 for none
	student float64 // scale of Student's; 0 for none
	dof     float64 // its degrees of freedom
	nodes   []node  // the mixture of normal ones that Student's and the rest make
}

// node is one normal distribution of a mixture.
type node struct{ weight, sd float64 }

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

// newSum splits terms, whose contributions and shares are set, into the three.
func newSum(terms []Term) sum {
	var s sum
	student, rectangle := -1, -1
	for i, t := range terms {
		switch {
		case t.tail() > 0.3 && (student < 0 || t.Contribution > terms[student].Contribution):
			student = i
		case t.Distribution == Uniform && (rectangle < 0 || t.Contribution > terms[rectangle].Contribution):
			rectangle = i
		}
	}
	variance := 0.0
	for i, t := range terms {
		switch i {
		case student:
			s.student, s.dof = t.Contribution, float64(t.DoF)
		case rectangle:
			s.half = t.Contribution * math.Sqrt(3)
		default:
			variance += t.Contribution * t.Contribution
		}
	}
	s.normal = math.Sqrt(variance)
	s.nodes = s.mixture()
	return s
}

// mixture writes Student's distribution plus the normal rest as a mixture of
// normal ones: Student's is normal with the variance student^2/g, where g is a
// chi-square of dof degrees over dof. The nodes stand evenly in ln g, over
// which the trapezoidal rule converges faster than any power of their distance.
func (s sum) mixture() []node {
	if s.student == 0 {
		return []node{{1, s.normal}}
	}
	const step = 0.5
	density := func(u float64) float64 { return math.Exp(s.dof / 2 * (u - math.Exp(u) + 1)) }
	var nodes []node
	total := 0.0
	for _, direction := range []float64{-step, step} {
		for u := min(direction, 0); ; u += direction {
			w := density(u)
			if w < 1e-9 {
				break
			}
			total += w
			nodes = append(nodes, node{w, math.Sqrt(s.normal*s.normal + s.student*s.student*math.Exp(-u))})
		}
	}
	for i := range nodes {
		nodes[i].weight /= total
	}
	return nodes
}
