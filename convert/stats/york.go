package stats

import "math"

// Point is a measured point with the standard uncertainties of its two
// coordinates. One of the two may be zero.
type Point struct{ X, Y, UX, UY float64 }

// Polynomial is a polynomial fitted to points.
type Polynomial struct {
	ChiSquare float64 // sum of the squared residuals, each in units of its uncertainty
	DoF       int     // points less coefficients

	// About the centre and in units of the half-width of the points, where neither
	// the coefficients nor their covariance lose digits.
	centre, half float64
	coefficients triple
	covariance   [most]triple
	n            int // coefficients
}

const most = 3 // coefficients

type triple = [most]float64

// FitPolynomial fits a polynomial of degree 1 or 2 to points with errors in both
// coordinates. It minimizes the sum of both, each in units of its uncertainty. It
// answers nil where the points determine no such polynomial, or the search does
// not settle.
//
// D. York, N. M. Evensen, M. López Martínez and J. De Basabe Delgado, Am. J. Phys.
// 72 (2004) 367: each point is adjusted along its errors on to the line, and the
// adjusted points carry the normal equations and the covariance. For a straight
// line this is their solution; a bent one is replaced by its tangents at the
// adjusted points, so that the weights are 1/(UY^2 + slope^2 UX^2).
func FitPolynomial(degree int, points []Point) *Polynomial {
	p := &Polynomial{n: degree + 1, DoF: len(points) - degree - 1}
	lo, hi := math.Inf(1), math.Inf(-1)
	for _, at := range points {
		lo, hi = min(lo, at.X), max(hi, at.X)
	}
	p.centre, p.half = lo/2+hi/2, hi/2-lo/2
	if p.DoF < 0 || !(p.half > 0) {
		return nil
	}
	if !p.solve(points, func(at *Point) (x, y, weight float64) { return at.X, at.Y, 1 }) {
		return nil
	}
	const (
		settled   = 1e-12 // change of a coefficient, against the largest
		mostSteps = 200
	)
	for range mostSteps {
		before := p.coefficients
		if !p.solve(points, p.adjusted) {
			return nil
		}
		largest, change := 0.0, 0.0
		for i, c := range p.coefficients {
			largest, change = max(largest, math.Abs(c)), max(change, math.Abs(c-before[i]))
		}
		if change <= settled*largest {
			return p.withChiSquare(points)
		}
	}
	return nil
}

// withChiSquare sums up the residuals; nil where they have no sum.
func (p *Polynomial) withChiSquare(points []Point) *Polynomial {
	for i := range points {
		x, y, w := p.adjusted(&points[i])
		r := y - p.Value(x)
		p.ChiSquare += w * r * r
	}
	if math.IsInf(p.ChiSquare, 0) || math.IsNaN(p.ChiSquare) {
		return nil
	}
	return p
}

// adjusted is a point moved along its errors on to the curve: where it comes to
// lie, what the tangent there makes of its Y, and its weight.
func (p *Polynomial) adjusted(at *Point) (x, y, weight float64) {
	x = at.X
	for range 3 { // the tangent moves with the point; a straight line needs one step
		slope := p.Slope(x)
		weight = 1 / (at.UY*at.UY + slope*slope*at.UX*at.UX)
		x = at.X + at.UX*at.UX*slope*weight*(at.Y-p.Value(x)-slope*(at.X-x))
		if p.n == 2 {
			break
		}
	}
	slope := p.Slope(x)
	return x, at.Y - slope*(at.X-x), 1 / (at.UY*at.UY + slope*slope*at.UX*at.UX)
}

// solve sets coefficients and covariance by the normal equations of the points
// as seen says they are. It reports whether the equations have a solution.
func (p *Polynomial) solve(points []Point, seen func(*Point) (x, y, weight float64)) bool {
	var normal [most]triple
	var right triple
	for i := range points {
		x, y, w := seen(&points[i])
		g := p.powers(x)
		for i := range p.n {
			for j := range p.n {
				normal[i][j] += w * g[i] * g[j]
			}
			right[i] += w * g[i] * y
		}
	}
	if !invert(&normal, p.n) {
		return false
	}
	p.covariance = normal
	p.coefficients = triple{}
	for i := range p.n {
		for j := range p.n {
			p.coefficients[i] += normal[i][j] * right[j]
		}
	}
	return true
}

// invert inverts the upper left n by n of a symmetric positive matrix in place
// (Gauss and Jordan). It reports whether that is one.
func invert(m *[most]triple, n int) bool {
	scale := triple{}
	for k := range n {
		scale[k] = m[k][k]
	}
	for k := range n {
		pivot := m[k][k]
		if !(pivot > 1e-13*scale[k]) || math.IsInf(pivot, 0) { // true for NaN
			return false
		}
		m[k][k] = 1
		for j := range n {
			m[k][j] /= pivot
		}
		for i := range n {
			if i == k {
				continue
			}
			factor := m[i][k]
			m[i][k] = 0
			for j := range n {
				m[i][j] -= factor * m[k][j]
			}
		}
	}
	return true
}

// powers are those that the coefficients are of, at x.
func (p *Polynomial) powers(x float64) triple {
	t := (x - p.centre) / p.half
	return triple{1, t, t * t}
}

// Value is the polynomial at x.
func (p *Polynomial) Value(x float64) float64 {
	c, g := p.coefficients, p.powers(x)
	return c[0] + c[1]*g[1] + c[2]*g[2]
}

// Slope is its derivative at x.
func (p *Polynomial) Slope(x float64) float64 {
	c, g := p.coefficients, p.powers(x)
	return (c[1] + 2*c[2]*g[1]) / p.half
}

// Variance is the variance of the value at x that the uncertainties of the
// points leave.
func (p *Polynomial) Variance(x float64) float64 {
	g := p.powers(x)
	sum := 0.0
	for i := range p.n {
		for j := range p.n {
			sum += g[i] * p.covariance[i][j] * g[j]
		}
	}
	return max(0, sum)
}

// Parameters returns the coefficients of 1, x and, for degree 2, x^2, with their
// covariance.
func (p *Polynomial) Parameters() (coefficients []float64, covariance [][]float64) {
	c, h := p.centre, p.half
	// t = (x - c)/h and t^2 in powers of x.
	turn := [most]triple{{1, -c / h, c * c / (h * h)}, {0, 1 / h, -2 * c / (h * h)}, {0, 0, 1 / (h * h)}}
	coefficients, covariance = make([]float64, p.n), make([][]float64, p.n)
	for i := range p.n {
		covariance[i] = make([]float64, p.n)
		for k := range p.n {
			coefficients[i] += turn[i][k] * p.coefficients[k]
			for j := range p.n {
				for l := range p.n {
					covariance[i][j] += turn[i][k] * p.covariance[k][l] * turn[j][l]
				}
			}
		}
	}
	return coefficients, covariance
}

// ChiSquareLimit is what chi-square per degree of freedom exceeds by chance in
// one case of twenty. E. B. Wilson and M. M. Hilferty, PNAS 17 (1931) 684, within
// 1 % from three degrees of freedom on.
func ChiSquareLimit(dof int) float64 {
	const normal95 = 1.6448536269514722
	spread := 2 / (9 * float64(dof))
	root := 1 - spread + normal95*math.Sqrt(spread)
	return root * root * root
}
