package curve

import (
	"errors"
	"math"
)

// ErrNoRoot says that a function has the same sign at both ends of the
// interval it was searched in.
var ErrNoRoot = errors.New("the function does not cross zero between the two ends")

// Root returns where a continuous function crosses zero between lo and hi, to
// the last few bits. It keeps the root bracketed and falls back on halving, so
// it cannot diverge; without a sign change it answers ErrNoRoot.
//
// Method: T. R. Chandrupatla, Advances in Engineering Software 28 (1997) 145:
// inverse quadratic interpolation where that is safe, bisection elsewhere.
func Root(f func(float64) float64, lo, hi float64) (float64, error) {
	const (
		relative = 4e-16
		absolute = 1e-300 // beside zero no relative step is small enough
	)
	a, b := hi, lo
	fa, fb := f(a), f(b)
	switch {
	case fa == 0:
		return a, nil
	case fb == 0:
		return b, nil
	case math.IsNaN(fa) || math.IsNaN(fb) || (fa > 0) == (fb > 0):
		return math.NaN(), ErrNoRoot
	}
	for t := 0.5; ; {
		x := a + t*(b-a)
		fx := f(x)
		if math.IsNaN(fx) {
			return math.NaN(), ErrNoRoot
		}
		c, fc := a, fa // the point that leaves the bracket still bends the parabola
		if (fx > 0) != (fa > 0) {
			c, fc, b, fb = b, fb, a, fa
		}
		a, fa = x, fx
		best, fbest := a, fa
		if math.Abs(fb) < math.Abs(fa) {
			best, fbest = b, fb
		}
		least := (relative*math.Abs(best) + absolute) / math.Abs(b-a)
		if fbest == 0 || least > 0.5 || a == b {
			return best, nil
		}
		t = 0.5
		xi, phi := (a-b)/(c-b), (fa-fb)/(fc-fb)
		if 1-math.Sqrt(1-xi) < phi && phi < math.Sqrt(xi) {
			t = fa/(fb-fa)*fc/(fb-fc) + (c-a)/(b-a)*fa/(fc-fa)*fb/(fc-fb)
		}
		t = min(1-least, max(least, t))
	}
}
