package curve

import (
	"errors"
	"math"
	"testing"
)

func TestRoot(t *testing.T) {
	power := func(n, root float64) func(float64) float64 {
		return func(x float64) float64 { return math.Pow(x-root, n) }
	}
	line := power(1, 2)
	for _, c := range []struct {
		name         string
		f            func(float64) float64
		lo, hi, want float64
	}{
		{"line", line, 0, 5, 2},
		{"falling line", func(x float64) float64 { return 2 - x }, 0, 5, 2},
		{"ends exchanged", line, 5, 0, 2},
		{"zero at the lower end", line, 2, 5, 2},
		{"zero at the upper end", line, 0, 2, 2},
		{"zero at both ends", line, 2, 2, 2},
		{"parabola", func(x float64) float64 { return x*x - 2 }, 0, 2, math.Sqrt2},
		{"Wallis's cubic", func(x float64) float64 { return x*x*x - 2*x - 5 }, 2, 3, 2.0945514815423266},
		{"fixed point of the cosine", func(x float64) float64 { return math.Cos(x) - x }, 0, 1, 0.73908513321516064},
		{"flat", power(9, 1), -1, 2, 1},
		{"steep", math.Cbrt, -1, 2, 0},
		{"steeper", func(x float64) float64 { return math.Atan(1e12 * (x - 0.7)) }, -1, 1, 0.7},
		{"flat, then steep", func(x float64) float64 { return math.Exp(x) - 1e200 }, -2000, 700, 200 * math.Ln10},
		{"far from one", func(x float64) float64 { return x*x - 1e200 }, 1, 1e120, 1e100},
		{"close to nothing", func(x float64) float64 { return x - 1e-200 }, -1, 1, 1e-200},
		{"beside zero", func(x float64) float64 { return 1e300*x - 1e-24 }, 0, 1, 0},
		{"jump at zero", func(x float64) float64 { return math.Copysign(1, x) }, -1, 1, 0},
		{"jump", func(x float64) float64 { return math.Copysign(1, x-0.3) }, -1, 1, 0.3},
	} {
		t.Run(c.name, func(t *testing.T) {
			got, err := Root(c.f, c.lo, c.hi)
			if err != nil || math.Abs(got-c.want) > 1e-15*math.Abs(c.want)+1e-299 {
				t.Errorf("%.17g (%v), want %.17g", got, err, c.want)
			}
		})
	}
}

func TestNoRoot(t *testing.T) {
	nan := math.NaN()
	for _, c := range []struct {
		name   string
		f      func(float64) float64
		lo, hi float64
	}{
		{"above zero", func(x float64) float64 { return x*x + 1 }, -1, 1},
		{"below zero", func(x float64) float64 { return x - 2 }, 0, 1},
		{"touches zero between", func(x float64) float64 { return x * x }, -1, 2},
		{"no width", func(x float64) float64 { return x - 2 }, 3, 3},
		{"undefined at the lower end", math.Log, -1, 2},
		{"undefined at the upper end", func(x float64) float64 { return math.Log(1 - x) }, -1, 2},
		{"undefined between", func(x float64) float64 {
			if math.Abs(x) < 1 {
				return nan
			}
			return x
		}, -2, 2},
		{"an end is no number", func(x float64) float64 { return x }, -1, nan},
	} {
		t.Run(c.name, func(t *testing.T) {
			if got, err := Root(c.f, c.lo, c.hi); !errors.Is(err, ErrNoRoot) || !math.IsNaN(got) {
				t.Errorf("%g (%v), want none", got, err)
			}
		})
	}
}

// The answer is where the cubic is zero but for what rounding makes of it.
func FuzzRoot(f *testing.F) {
	f.Add(1.0, 0.0, -2.0, -5.0, 2.0, 3.0)
	f.Add(1.0, -3.0, 3.0, -1.0, 0.0, 4.0)
	f.Add(0.0, 0.0, 1.0, 0.0, -1.0, 1.0)
	f.Add(-1e6, 1e-6, 3.0, 1e6, -100.0, 100.0)
	f.Fuzz(func(t *testing.T, a, b, c, d, lo, hi float64) {
		for _, v := range []float64{a, b, c, d, lo, hi} {
			if !(v == 0 || math.Abs(v) > 1e-30 && math.Abs(v) < 1e30) {
				t.Skip("so small or large a number that a power of it is 0 or infinite")
			}
		}
		cubic := func(x float64) float64 { return ((a*x+b)*x+c)*x + d }
		x, err := Root(cubic, lo, hi)
		if err != nil {
			if crosses := cubic(lo) > 0 != (cubic(hi) > 0); crosses || !errors.Is(err, ErrNoRoot) {
				t.Fatalf("%v between %g and %g", err, cubic(lo), cubic(hi))
			}
			return
		}
		if !(x >= min(lo, hi) && x <= max(lo, hi)) {
			t.Fatalf("%g, outside %g to %g", x, lo, hi)
		}
		size := ((math.Abs(a*x)+math.Abs(b))*math.Abs(x)+math.Abs(c))*math.Abs(x) + math.Abs(d)
		if !(math.Abs(cubic(x)) <= 1e-14*size) {
			t.Fatalf("%g at %g, the sum of its parts %g", cubic(x), x, size)
		}
	})
}

func BenchmarkRoot(b *testing.B) {
	cubic := func(x float64) float64 { return x*x*x - 2*x - 5 }
	for b.Loop() {
		if _, err := Root(cubic, 2, 3); err != nil {
			b.Fatal(err)
		}
	}
}
