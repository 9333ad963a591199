// Package curve holds strictly monotone curves that know the range they hold
// in and never answer outside it.
package curve

import (
	"errors"
	"fmt"
	"math"
	"slices"

	"gonum.org/v1/gonum/interp"
)

// Curve is a strictly rising or falling function on a closed range.
type Curve interface {
	// Domain returns the least and greatest argument.
	Domain() (lo, hi float64)
	// At returns the value at x, or an *OutsideError.
	At(x float64) (float64, error)
	// Slope returns the derivative at x, or an *OutsideError.
	Slope(x float64) (float64, error)
	// Inverse returns the argument of the value y, or an *OutsideError in terms of y.
	Inverse(y float64) (float64, error)
}

// OutsideError says that an argument lies outside a curve's range.
type OutsideError struct {
	Value, Lo, Hi float64
}

func (e *OutsideError) Error() string {
	return fmt.Sprintf("%g lies outside %g to %g", e.Value, e.Lo, e.Hi)
}

// Above reports on which side of the range the argument lies.
func (e *OutsideError) Above() bool { return e.Value > e.Hi }

func checkInside(x, lo, hi float64) error {
	if !(x >= lo && x <= hi) { // NaN is outside, too
		return &OutsideError{Value: x, Lo: lo, Hi: hi}
	}
	return nil
}

// Table is a curve through tabulated points. Between them it is the cubic of
// Fritsch and Butland (SIAM J. Sci. Stat. Comput. 5 (1984) 300), which meets
// every point and rises or falls wherever the points do.
type Table struct {
	xs, ys []float64
	spline interp.FritschButland
}

// NewTable makes a curve through the points (xs[i], ys[i]). The arguments must
// rise strictly, the values rise or fall strictly, and there must be two
// points at least. The slices are copied.
func NewTable(xs, ys []float64) (*Table, error) {
	if len(xs) != len(ys) || len(xs) < 2 {
		return nil, fmt.Errorf("a curve needs two points or more, with a value each: it has %d arguments and %d values", len(xs), len(ys))
	}
	if span := xs[len(xs)-1] - xs[0] + math.Abs(ys[len(ys)-1]-ys[0]); math.IsInf(span, 0) {
		return nil, errors.New("a curve needs finite points, and a finite span")
	}
	rises := ys[1] > ys[0]
	for i := 1; i < len(xs); i++ {
		if !(xs[i] > xs[i-1]) || !(ys[i] != ys[i-1]) || (ys[i] > ys[i-1]) != rises {
			return nil, fmt.Errorf("a curve must rise or fall strictly: point %d (%g, %g) does not follow from (%g, %g)",
				i+1, xs[i], ys[i], xs[i-1], ys[i-1])
		}
	}
	t := &Table{xs: slices.Clone(xs), ys: slices.Clone(ys)}
	if err := t.spline.Fit(t.xs, t.ys); err != nil {
		return nil, err
	}
	return t, nil
}

// Domain implements Curve.
func (t *Table) Domain() (lo, hi float64) { return t.xs[0], t.xs[len(t.xs)-1] }

// At implements Curve.
func (t *Table) At(x float64) (float64, error) {
	lo, hi := t.Domain()
	if err := checkInside(x, lo, hi); err != nil {
		return math.NaN(), err
	}
	return t.spline.Predict(x), nil
}

// Slope implements Curve.
func (t *Table) Slope(x float64) (float64, error) {
	lo, hi := t.Domain()
	if err := checkInside(x, lo, hi); err != nil {
		return math.NaN(), err
	}
	return t.spline.PredictDerivative(x), nil
}

// Inverse implements Curve.
func (t *Table) Inverse(y float64) (float64, error) {
	if i := slices.Index(t.ys, y); i >= 0 {
		return t.xs[i], nil // a search would miss it by the last bit
	}
	return inverse(t.spline.Predict, t.xs, y, t.ys[0], t.ys[len(t.ys)-1])
}

// Law is a curve given by a formula on a range.
type Law struct {
	Lo, Hi     float64
	Value      func(x float64) float64
	Derivative func(x float64) float64
}

// Domain implements Curve.
func (l Law) Domain() (lo, hi float64) { return l.Lo, l.Hi }

// At implements Curve.
func (l Law) At(x float64) (float64, error) {
	if err := checkInside(x, l.Lo, l.Hi); err != nil {
		return math.NaN(), err
	}
	return l.Value(x), nil
}

// Slope implements Curve.
func (l Law) Slope(x float64) (float64, error) {
	if err := checkInside(x, l.Lo, l.Hi); err != nil {
		return math.NaN(), err
	}
	return l.Derivative(x), nil
}

// Inverse implements Curve.
func (l Law) Inverse(y float64) (float64, error) {
	return inverse(l.Value, []float64{l.Lo, l.Hi}, y, l.Value(l.Lo), l.Value(l.Hi))
}

// inverse finds the argument of y between the first and the last of xs, whose
// values are first and last.
func inverse(f func(float64) float64, xs []float64, y, first, last float64) (float64, error) {
	if err := checkInside(y, min(first, last), max(first, last)); err != nil {
		return math.NaN(), err
	}
	return Root(func(x float64) float64 { return f(x) - y }, xs[0], xs[len(xs)-1])
}

// Narrowed is a curve on a part of its range.
type Narrowed struct {
	Curve
	lo, hi float64
}

// Narrow restricts a curve to the arguments between lo and hi that it covers.
// When none is left, it answers an *OutsideError.
func Narrow(c Curve, lo, hi float64) (Narrowed, error) {
	from, to := c.Domain()
	n := Narrowed{Curve: c, lo: max(lo, from), hi: min(hi, to)}
	if !(n.lo < n.hi) {
		asked := hi // which lies below the curve
		if lo >= to {
			asked = max(lo, hi)
		}
		return n, &OutsideError{Value: asked, Lo: from, Hi: to}
	}
	return n, nil
}

// Domain implements Curve.
func (n Narrowed) Domain() (lo, hi float64) { return n.lo, n.hi }

// At implements Curve.
func (n Narrowed) At(x float64) (float64, error) {
	if err := checkInside(x, n.lo, n.hi); err != nil {
		return math.NaN(), err
	}
	return n.Curve.At(x)
}

// Slope implements Curve.
func (n Narrowed) Slope(x float64) (float64, error) {
	if err := checkInside(x, n.lo, n.hi); err != nil {
		return math.NaN(), err
	}
	return n.Curve.Slope(x)
}

// Inverse implements Curve.
func (n Narrowed) Inverse(y float64) (float64, error) {
	first, err := n.Curve.At(n.lo)
	if err != nil {
		return math.NaN(), err
	}
	last, err := n.Curve.At(n.hi)
	if err != nil {
		return math.NaN(), err
	}
	if err := checkInside(y, min(first, last), max(first, last)); err != nil {
		return math.NaN(), err
	}
	x, err := n.Curve.Inverse(y)
	return min(n.hi, max(n.lo, x)), err
}

// MeanSlope returns the slope of a curve over u to either side of x, as far as
// its range goes: JCGM 100, 5.1.3, note 2. Between points that were rounded the
// slope at x alone says more of the rounding than of the curve.
func MeanSlope(c Curve, x, u float64) (float64, error) {
	lo, hi := c.Domain()
	if err := checkInside(x, lo, hi); err != nil {
		return math.NaN(), err
	}
	from, to := max(lo, x-u), min(hi, x+u)
	if !(to-from > 1e-6*(hi-lo)) { // too narrow for a difference
		return c.Slope(x)
	}
	first, err := c.At(from)
	if err != nil {
		return math.NaN(), err
	}
	last, err := c.At(to)
	return (last - first) / (to - from), err
}

// Values returns the least and the greatest value of a curve.
func Values(c Curve) (lo, hi float64) {
	from, to := c.Domain()
	first, _ := c.At(from)
	last, _ := c.At(to)
	return min(first, last), max(first, last)
}
