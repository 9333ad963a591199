package stats

import (
	"math"
	"math/rand/v2"
	"testing"
)

// allNodes adds up terms with nodes that stand twice as close, reach farther out
// and are not merged: what newSum spares.
func allNodes(terms []Term) sum {
	s := sum{nodes: []node{{weight: 1}}}
	normal := 0.0
	for _, t := range terms {
		switch {
		case t.Distribution == Uniform:
			s.half = t.Contribution * math.Sqrt(3)
		case t.isMixed():
			var all []node
			dof := float64(t.DoF)
			total := 0.0
			for u := -30.0; u < 4; u += 0.3 * math.Sqrt(2/dof) {
				total += math.Exp(dof / 2 * (u - math.Exp(u)))
			}
			for u := -30.0; u < 4; u += 0.3 * math.Sqrt(2/dof) {
				if w := math.Exp(dof/2*(u-math.Exp(u))) / total; w > 1e-12 {
					for _, n := range s.nodes {
						all = append(all, node{weight: w * n.weight, variance: n.variance + t.Contribution*t.Contribution*math.Exp(-u)})
					}
				}
			}
			s.nodes = all
		default:
			normal += t.Contribution * t.Contribution
		}
	}
	for i := range s.nodes {
		s.nodes[i].sd = math.Sqrt(s.nodes[i].variance + normal)
	}
	return s
}

// What is merged or left out for speed moves no coverage by what anyone could
// see: a budget is known to a tenth at best.
func TestNodesSpared(t *testing.T) {
	allowed := map[float64]float64{0.68: 5e-4, 0.95: 5e-4, 0.99: 1e-3, 0.999: 4e-3}
	rng := rand.New(rand.NewPCG(37, 38))
	worst := map[float64]float64{}
	nodes, sums := 0, 0
	for range 300 {
		first, second, rectangular := rng.Float64()*rng.Float64(), 0.2*rng.Float64(), 0.5*rng.Float64()*rng.Float64()
		terms := append(mixed(first, rectangular, float64(2+rng.IntN(8))), mixed(second, 0, float64(2+rng.IntN(4)))[1])
		terms[0].Standard = math.Sqrt(max(0, 1-first-second-rectangular))
		for confidence, share := range allowed {
			u := Combine(terms, confidence)
			if u.Coverage != ByTerms {
				continue
			}
			sums++
			nodes += len(u.sum.nodes)
			off := math.Abs(u.Expanded/allNodes(u.Terms).coverage(confidence, u.Expanded) - 1)
			if worst[confidence] = max(worst[confidence], off); off > share {
				t.Errorf("confidence %g, shares %g and %g with %g and %g degrees of freedom, rectangular %g: off by %g", confidence,
					first, second, float64(terms[1].DoF), float64(terms[3].DoF), rectangular, off)
			}
		}
	}
	if mean := nodes / sums; mean > 60 {
		t.Errorf("%d nodes on average: nothing is spared", mean)
	}
	t.Logf("largest differences %v, %d nodes on average", worst, nodes/sums)
}

func BenchmarkCombineTwoStudents(b *testing.B) {
	terms := []Term{
		{Standard: 12.8, DoF: Infinite, Distribution: Normal, Sensitivity: 1},
		{Standard: 2.56, DoF: 4, Distribution: Student, Sensitivity: 1},
		{Standard: 1.15, DoF: 2, Distribution: Student, Sensitivity: 1},
		{Standard: 0.29, DoF: Infinite, Distribution: Uniform, Sensitivity: 1},
	}
	b.ReportAllocs()
	for b.Loop() {
		Combine(terms, 0.95)
	}
}
