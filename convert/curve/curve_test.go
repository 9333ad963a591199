package curve

import (
	"errors"
	"math"
	"math/rand/v2"
	"slices"
	"testing"
)

// near reports whether got is want up to a share of it. NaN is not.
func near(share, got, want float64) bool {
	return math.Abs(got-want) <= share*math.Abs(want)
}

func mustTable(t testing.TB, xs, ys []float64) *Table {
	t.Helper()
	table, err := NewTable(xs, ys)
	if err != nil {
		t.Fatal(err)
	}
	return table
}

func mustNarrow(t testing.TB, c Curve, lo, hi float64) Narrowed {
	t.Helper()
	part, err := Narrow(c, lo, hi)
	if err != nil {
		t.Fatal(err)
	}
	return part
}

func at(t testing.TB, c Curve, x float64) float64 {
	t.Helper()
	y, err := c.At(x)
	if err != nil {
		t.Fatal(err)
	}
	return y
}

// reciprocal is a falling law.
var reciprocal = Law{
	Lo: 1, Hi: 4,
	Value:      func(x float64) float64 { return 1 / x },
	Derivative: func(x float64) float64 { return -1 / (x * x) },
}

// everyKind calls do for curves of each kind, rising and falling.
func everyKind(t *testing.T, do func(t *testing.T, c Curve)) {
	t.Helper()
	rising := mustTable(t, []float64{10, 20, 21, 50}, []float64{100, 110, 150, 151})
	falling := mustTable(t, []float64{-1, 0, 3}, []float64{5, 2, -7})
	for name, c := range map[string]Curve{
		"rising table":          rising,
		"falling table":         falling,
		"table of two points":   mustTable(t, []float64{1, 2}, []float64{3, 4}),
		"law":                   reciprocal,
		"part of rising table":  mustNarrow(t, rising, 15, 40),
		"part of falling table": mustNarrow(t, falling, -0.5, 10),
		"part of law":           mustNarrow(t, reciprocal, 2, 3),
	} {
		t.Run(name, func(t *testing.T) { do(t, c) })
	}
}

// inside returns arguments from one end of a curve to the other.
func inside(c Curve) []float64 {
	const parts = 100
	lo, hi := c.Domain()
	xs := make([]float64, parts+1)
	for i := range xs {
		xs[i] = lo + (hi-lo)*float64(i)/parts
	}
	xs[parts] = hi
	return xs
}

// beside returns arguments that lie outside a range.
func beside(lo, hi float64) []float64 {
	return []float64{math.Nextafter(lo, math.Inf(-1)), math.Nextafter(hi, math.Inf(1)), lo - 1, hi + 1, math.Inf(-1), math.Inf(1), math.NaN()}
}

func TestInsideTheRange(t *testing.T) {
	everyKind(t, func(t *testing.T, c Curve) {
		least, greatest := Values(c)
		lo, hi := c.Domain()
		first, last := at(t, c, lo), at(t, c, hi)
		if least != min(first, last) || greatest != max(first, last) {
			t.Errorf("values from %g to %g, at the ends %g and %g", least, greatest, first, last)
		}
		xs := inside(c)
		for i, x := range xs {
			y := at(t, c, x)
			if !(y >= least && y <= greatest) {
				t.Errorf("%g at %g, outside %g to %g", y, x, least, greatest)
			}
			if i > 0 && !((y-at(t, c, xs[i-1]))*(last-first) > 0) {
				t.Errorf("%g at %g turns back", y, x)
			}
			if back, err := c.Inverse(y); err != nil || back < lo || back > hi || math.Abs(back-x) > 1e-9 {
				t.Errorf("%g -> %g -> %g (%v)", x, y, back, err)
			}
		}
	})
}

func TestSlopeIsTheDerivative(t *testing.T) {
	const h = 1e-6
	everyKind(t, func(t *testing.T, c Curve) {
		for _, x := range inside(c)[1:100] {
			slope, err := c.Slope(x)
			difference := (at(t, c, x+h) - at(t, c, x-h)) / (2 * h)
			if err != nil || math.Abs(slope-difference) > 1e-4*(1+math.Abs(difference)) {
				t.Errorf("%g: slope %g (%v), difference %g", x, slope, err, difference)
			}
		}
	})
}

func TestOutsideTheRange(t *testing.T) {
	everyKind(t, func(t *testing.T, c Curve) {
		lo, hi := c.Domain()
		least, greatest := Values(c)
		for _, f := range []struct {
			name   string
			f      func(float64) (float64, error)
			lo, hi float64
		}{
			{"at", c.At, lo, hi},
			{"slope", c.Slope, lo, hi},
			{"inverse", c.Inverse, least, greatest},
		} {
			for _, x := range beside(f.lo, f.hi) {
				got, err := f.f(x)
				var outside *OutsideError
				if !errors.As(err, &outside) || !math.IsNaN(got) {
					t.Errorf("%s %g: %g (%v), want no value", f.name, x, got, err)
					continue
				}
				if outside.Lo != f.lo || outside.Hi != f.hi || outside.Above() != (x > f.hi) {
					t.Errorf("%s %g: %v, above %t, want outside %g to %g", f.name, x, outside, outside.Above(), f.lo, f.hi)
				}
			}
		}
	})
}

func TestOutsideErrorReads(t *testing.T) {
	err := &OutsideError{Value: 39.5, Lo: 40, Hi: 450}
	if got, want := err.Error(), "39.5 lies outside 40 to 450"; got != want {
		t.Errorf("%q, want %q", got, want)
	}
}

// randomPoints returns points that rise, or fall, by steps of very different sizes.
func randomPoints(random *rand.Rand, sign float64) (xs, ys []float64) {
	x, y := 1000*random.NormFloat64(), 1000*random.NormFloat64()
	for range 2 + random.IntN(30) {
		xs, ys = append(xs, x), append(ys, y)
		x += math.Exp(3 * random.NormFloat64())
		y += sign * math.Exp(3*random.NormFloat64())
	}
	return xs, ys
}

func TestRandomTables(t *testing.T) {
	random := rand.New(rand.NewPCG(1, 2))
	for name, sign := range map[string]float64{"rising": 1, "falling": -1} {
		t.Run(name, func(t *testing.T) {
			for range 300 {
				xs, ys := randomPoints(random, sign)
				table := mustTable(t, xs, ys)
				meetsPoints(t, table, xs, ys)
				turnsNowhere(t, table, xs, sign)
			}
		})
	}
}

func meetsPoints(t *testing.T, c Curve, xs, ys []float64) {
	t.Helper()
	for i, x := range xs {
		if got := at(t, c, x); !near(1e-13, got, ys[i]) && math.Abs(got-ys[i]) > 1e-12 {
			t.Fatalf("%g at point %d of %v %v", got, i+1, xs, ys)
		}
	}
}

func turnsNowhere(t *testing.T, c Curve, xs []float64, sign float64) {
	t.Helper()
	const noise = 1e-11
	for i := 1; i < len(xs); i++ {
		before := at(t, c, xs[i-1])
		for part := 1.0; part <= 8; part++ {
			x := min(xs[i], xs[i-1]+(xs[i]-xs[i-1])*part/8)
			value := at(t, c, x)
			if slope, err := c.Slope(x); err != nil || sign*slope < -noise || sign*(value-before) < -noise {
				t.Fatalf("turns from %g to %g at %g, slope %g (%v)", before, value, x, slope, err)
			}
			before = value
		}
	}
}

func TestNewTableRefuses(t *testing.T) {
	nan := math.NaN()
	for _, c := range []struct {
		name   string
		xs, ys []float64
	}{
		{"nothing", nil, nil},
		{"one point", []float64{1}, []float64{1}},
		{"more arguments than values", []float64{1, 2, 3}, []float64{1, 2}},
		{"more values than arguments", []float64{1, 2}, []float64{1, 2, 3}},
		{"an argument twice", []float64{1, 2, 2}, []float64{1, 2, 3}},
		{"arguments that fall", []float64{1, 3, 2}, []float64{1, 2, 3}},
		{"a value twice", []float64{1, 2, 3}, []float64{1, 2, 2}},
		{"the first value twice", []float64{1, 2, 3}, []float64{1, 1, 2}},
		{"values that turn", []float64{1, 2, 3}, []float64{1, 3, 2}},
		{"an argument that is no number", []float64{1, nan, 3}, []float64{1, 2, 3}},
		{"a first argument that is no number", []float64{nan, 2, 3}, []float64{1, 2, 3}},
		{"a value that is no number", []float64{1, 2, 3}, []float64{1, 2, nan}},
		{"an endless argument", []float64{0, math.Inf(1)}, []float64{0, 1}},
		{"an endless value", []float64{0, 1}, []float64{0, math.Inf(1)}},
		{"a span without end", []float64{-1e308, 1e308}, []float64{0, 1}},
		{"a first value that is no number", []float64{1, 2, 3}, []float64{nan, 2, 3}},
	} {
		t.Run(c.name, func(t *testing.T) {
			if table, err := NewTable(c.xs, c.ys); err == nil || table != nil {
				t.Errorf("%v %v made a curve", c.xs, c.ys)
			}
		})
	}
}

func TestNewTableCopies(t *testing.T) {
	xs, ys := []float64{1, 2, 3}, []float64{1, 4, 9}
	table := mustTable(t, xs, ys)
	before := at(t, table, 2.5)
	clear(xs)
	clear(ys)
	if lo, hi := table.Domain(); lo != 1 || hi != 3 || at(t, table, 2.5) != before || at(t, table, 3) != 9 {
		t.Error("the curve changes with the caller's slices")
	}
	if back, err := table.Inverse(4); err != nil || !near(1e-15, back, 2) {
		t.Errorf("4 -> %g (%v), want 2", back, err)
	}
}

func TestNarrow(t *testing.T) {
	table := mustTable(t, []float64{10, 20}, []float64{1, 2})
	for _, c := range []struct {
		name           string
		lo, hi         float64
		wantLo, wantHi float64
	}{
		{"a part", 12, 18, 12, 18},
		{"its lower end", 0, 15, 10, 15},
		{"its upper end", 15, 30, 15, 20},
		{"all of it", 10, 20, 10, 20},
		{"more than all of it", math.Inf(-1), math.Inf(1), 10, 20},
	} {
		t.Run(c.name, func(t *testing.T) {
			part := mustNarrow(t, table, c.lo, c.hi)
			if lo, hi := part.Domain(); lo != c.wantLo || hi != c.wantHi {
				t.Errorf("from %g to %g, want %g to %g", lo, hi, c.wantLo, c.wantHi)
			}
			if x := (c.wantLo + c.wantHi) / 2; at(t, part, x) != at(t, table, x) {
				t.Errorf("%g: %g, on the whole curve %g", x, at(t, part, x), at(t, table, x))
			}
		})
	}
}

func TestNarrowLeavesNothing(t *testing.T) {
	table := mustTable(t, []float64{10, 20}, []float64{1, 2})
	for _, c := range []struct {
		name   string
		lo, hi float64
		above  bool
	}{
		{"below", 0, 5, false},
		{"above", 25, 30, true},
		{"touching from above", 20, 30, true},
		{"touching from below", 0, 10, false},
		{"a point", 12, 12, false},
		{"exchanged", 18, 12, false},
		{"no number", math.NaN(), 15, false},
	} {
		t.Run(c.name, func(t *testing.T) {
			part, err := Narrow(table, c.lo, c.hi)
			var outside *OutsideError
			if !errors.As(err, &outside) || outside.Lo != 10 || outside.Hi != 20 || outside.Above() != c.above {
				t.Errorf("%+v (%v), want outside 10 to 20, above %t", part, err, c.above)
			}
		})
	}
}

// Whatever points make a curve, it answers inside their range.
func FuzzTableInverse(f *testing.F) {
	f.Add(1.0, 1.0, 1.0, 1.0, 1.0, 1.0, 0.5)
	f.Add(1e-3, 1e3, 1.0, 1e3, 1e-3, 1.0, 0.01)
	f.Add(5.0, 3.0, 2.0, -1.0, -30.0, -0.1, 0.9)
	f.Fuzz(func(t *testing.T, dx1, dx2, dx3, dy1, dy2, dy3, share float64) {
		for _, step := range []float64{dx1, dx2, dx3, dy1, dy2, dy3} {
			if !(math.Abs(step) > 1e-6 && math.Abs(step) < 1e6) {
				t.Skip("a step that no table of hardness takes")
			}
		}
		xs, ys := []float64{0, dx1, dx1 + dx2, dx1 + dx2 + dx3}, []float64{0, dy1, dy1 + dy2, dy1 + dy2 + dy3}
		table, err := NewTable(xs, ys)
		if err != nil {
			t.Skip(err)
		}
		least, greatest := Values(table)
		y := least + (greatest-least)*share
		x, err := table.Inverse(y)
		if !(y >= least && y <= greatest) {
			if err == nil {
				t.Fatalf("%g, outside %g to %g, gave %g", y, least, greatest, x)
			}
			return
		}
		if err != nil || !(x >= xs[0] && x <= xs[3]) {
			t.Fatalf("%v %v: %g -> %g (%v)", xs, ys, y, x, err)
		}
		if back := at(t, table, x); math.Abs(back-y) > 1e-9*slices.Max([]float64{1, math.Abs(least), math.Abs(greatest)}) {
			t.Fatalf("%v %v: %g -> %g -> %g", xs, ys, y, x, back)
		}
	})
}

func BenchmarkTable(b *testing.B) {
	table := mustTable(b, []float64{100, 200, 350, 500, 940}, []float64{350, 480, 610, 710, 890})
	b.Run("at", func(b *testing.B) {
		for b.Loop() {
			at(b, table, 348)
		}
	})
	b.Run("inverse", func(b *testing.B) {
		for b.Loop() {
			if _, err := table.Inverse(610); err != nil {
				b.Fatal(err)
			}
		}
	})
}
