package stats

import (
	"math"
	"sync"

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
type node struct {
	weight, variance, sd float64
	spread               float64 // weighted squares about variance of those it was merged from
}

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
	if half == 0 {
		return distuv.UnitNormal.CDF(x / sd), bell(x/sd) / sd
	}
	if sd < 1e-6*half {
		return min(1, max(0, (x/half+1)/2)), 1 / (2 * half)
	}
	a, b := (x-half)/sd, (x+half)/sd
	pa, pb := distuv.UnitNormal.CDF(a), distuv.UnitNormal.CDF(b)
	// The integral of the normal CDF up to z is z CDF(z) + density(z).
	return sd / (2 * half) * (b*pb + bell(b) - a*pa - bell(a)), (pb - pa) / (2 * half)
}

// bell is the density of the normal distribution. The library's takes twice as
// long, over the logarithm.
func bell(z float64) float64 { return math.Exp(-z*z/2) / math.Sqrt(2*math.Pi) }

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
		if math.Abs(next-x) < 1e-4*x { // the next step would be about its square
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
		// A small one is as good as normal (of its kurtosis, -1.2, the sum keeps the
		// square of its share), and would only cost time.
		if t.Distribution == Uniform && t.Share > 0.02 && (rectangle < 0 || t.Contribution > terms[rectangle].Contribution) {
			rectangle = i
		}
	}
	var s sum
	normal := 0.0
	for i, t := range terms {
		switch {
		case i == rectangle:
			s.half = t.Contribution * math.Sqrt(3)
		case !t.isMixed():
			normal += t.Contribution * t.Contribution
		}
	}
	s.nodes = []node{{weight: 1, variance: normal}}
	for _, t := range terms {
		if t.isMixed() {
			s.mix(t.Contribution, float64(t.DoF))
		}
	}
	for i, n := range s.nodes {
		s.nodes[i].sd = math.Sqrt(n.variance)
	}
	return s
}

// isMixed reports whether the term's tails are heavy enough to be added up as
// such.
func (t Term) isMixed() bool { return t.tail() > 0.1 }

// mix adds Student's distribution of a scale to the mixture.
func (s *sum) mix(scale, dof float64) {
	const many = 32 // more than there usually are
	parts := make([]node, 0, many)
	for _, n := range unitNodes(dof) {
		n.variance *= scale * scale
		parts = appendNode(parts, n, s.nodes[0].variance)
	}
	all, spare := make([]node, 0, many), make([]node, 0, many)
	for _, n := range s.nodes {
		all, spare = interleave(spare[:0], all, parts, n), all
	}
	s.nodes = all
}

// interleave appends to all the nodes and the sums that one more makes with each
// of the parts, in the order of their variances, in which they come.
func interleave(all, nodes, parts []node, one node) []node {
	for _, p := range parts {
		p = node{weight: one.weight * p.weight, variance: one.variance + p.variance, spread: one.weight*p.spread + p.weight*one.spread}
		for len(nodes) > 0 && nodes[0].variance < p.variance {
			all = appendNode(all, nodes[0], 0)
			nodes = nodes[1:]
		}
		all = appendNode(all, p, 0)
	}
	for _, n := range nodes {
		all = appendNode(all, n, 0)
	}
	return all
}

// appendNode appends a node, or merges it with the last one if the two hardly
// differ in variance (with what is to be added to it), or hardly weigh anything.
// That keeps weight and variance; what it adds to a probability is less than the
// weighted square of the relative spread that is lost, and a coverage moves by
// about 1e-4 of itself. Most of a mixture lies close together, and its nodes are
// what adding up costs.
func appendNode(nodes []node, n node, added float64) []node {
	const lost = 1e-5
	if len(nodes) == 0 {
		return append(nodes, n)
	}
	last := &nodes[len(nodes)-1]
	weight := last.weight + n.weight
	d := n.variance - last.variance
	mean := last.variance + d*n.weight/weight
	spread := last.spread + n.spread + d*d*last.weight*n.weight/weight
	if spread > lost*(added+mean)*(added+mean) {
		return append(nodes, n)
	}
	*last = node{weight: weight, variance: mean, spread: spread}
	return nodes
}

// unitNodes is Student's distribution of scale 1 as a mixture, in the order of
// the variances: it is normal with the variance 1/g, where g is a chi-square of
// dof degrees over dof. The nodes stand evenly in ln g, over which the
// trapezoidal rule converges faster than any power of their distance.
func unitNodes(dof float64) []node {
	if known, ok := knownNodes.Load(dof); ok {
		return known.([]node)
	}
	const least = 1e-8             // weight, against the heaviest
	step := 0.6 * math.Sqrt(2/dof) // in widths of ln g
	weight := func(u float64) float64 { return math.Exp(dof / 2 * (u - math.Exp(u) + 1)) }
	u := 0.0
	for weight(u+step) > least {
		u += step
	}
	var nodes []node
	total := 0.0
	for w := weight(u); w > least; w = weight(u) {
		nodes = append(nodes, node{weight: w, variance: math.Exp(-u)})
		total += w
		u -= step
	}
	for i := range nodes {
		nodes[i].weight /= total
	}
	knownNodes.Store(dof, nodes)
	return nodes
}

// knownNodes remembers what unitNodes has answered: few readings have few
// degrees of freedom.
var knownNodes sync.Map
