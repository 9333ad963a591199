package stats

import (
	"math"
	"math/rand/v2"
	"slices"
	"testing"
)

func norris(t *testing.T) []Point {
	var points []Point
	for _, row := range reference(t, "nist_norris.csv").Rows {
		points = append(points, Point{X: row.Number("x"), Y: row.Number("y"), UY: 1})
	}
	return points
}

func pearson(t *testing.T) []Point {
	var points []Point
	for _, row := range reference(t, "pearson_york.csv").Rows {
		points = append(points, Point{
			X: row.Number("x"), UX: 1 / math.Sqrt(row.Number("wx")),
			Y: row.Number("y"), UY: 1 / math.Sqrt(row.Number("wy"))})
	}
	return points
}

func mustFit(t testing.TB, degree int, points []Point) *Polynomial {
	t.Helper()
	p := FitPolynomial(degree, points)
	if p == nil {
		t.Fatalf("degree %d through %d points: no fit", degree, len(points))
	}
	return p
}

// With errors in one coordinate alone, all alike, the line is the ordinary one.
func TestStraightLineAgainstNIST(t *testing.T) {
	points := norris(t)
	p := mustFit(t, 1, points)
	c, covariance := p.Parameters()
	sd := math.Sqrt(p.ChiSquare / float64(p.DoF))
	for _, row := range []struct {
		name            string
		got, want, most float64
	}{
		{"intercept", c[0], -0.262323073774029, 1e-10},
		{"slope", c[1], 1.00211681802045, 1e-13},
		{"residual standard deviation", sd, 0.884796396144373, 1e-12},
		{"standard deviation of the intercept", sd * math.Sqrt(covariance[0][0]), 0.232818234301152, 1e-11},
		{"standard deviation of the slope", sd * math.Sqrt(covariance[1][1]), 0.429796848199937e-3, 1e-14},
	} {
		if math.Abs(row.got-row.want) > row.most {
			t.Errorf("%s: %.15g, certified %.15g, off by %.1e", row.name, row.got, row.want, row.got-row.want)
		}
	}
	if len(points) != 36 || p.DoF != 34 {
		t.Errorf("%d points, %d degrees of freedom", len(points), p.DoF)
	}
}

func TestStraightLineAgainstYork(t *testing.T) {
	p := mustFit(t, 1, pearson(t))
	c, covariance := p.Parameters()
	for _, row := range []struct {
		name            string
		got, want, most float64 // half the last printed place
	}{
		{"slope", c[1], -0.480533407, 5e-10},
		{"intercept", c[0], 5.479910224, 5e-10},
		{"u(slope)", math.Sqrt(covariance[1][1]), 0.057985009, 5e-10},
		{"u(intercept)", math.Sqrt(covariance[0][0]), 0.294970735, 5e-10},
		{"S", p.ChiSquare, 11.8663532, 5e-8},
	} {
		if math.Abs(row.got-row.want) > row.most {
			t.Errorf("%s: %.10g, published %.10g", row.name, row.got, row.want)
		}
	}
}

// moved is the points, each put somewhere else.
func moved(points []Point, to func(Point) Point) []Point {
	all := make([]Point, len(points))
	for i, p := range points {
		all[i] = to(p)
	}
	return all
}

// A line with errors in both coordinates is the same seen from either axis.
func TestStraightLineFromEitherAxis(t *testing.T) {
	points := pearson(t)
	c, covariance := mustFit(t, 1, points).Parameters()
	d, other := mustFit(t, 1, moved(points, func(p Point) Point { return Point{p.Y, p.X, p.UY, p.UX} })).Parameters()
	if !near(1e-10, d[1], 1/c[1]) || !near(1e-10, d[0], -c[0]/c[1]) {
		t.Errorf("%v from the other axis is %v", c, d)
	}
	if got, want := math.Sqrt(other[1][1])/math.Abs(d[1]), math.Sqrt(covariance[1][1])/math.Abs(c[1]); !near(1e-9, got, want) {
		t.Errorf("relative uncertainty of the slope %g, from the other axis %g", want, got)
	}
}

// bend is points about a parabola, or a line where it is not bent.
func bend(random *rand.Rand, n int, bent, ux, uy float64) []Point {
	points := make([]Point, n)
	for i := range points {
		x := 400 + 300*(float64(i)+random.Float64())/float64(n)
		y := -120 + 0.5*x + bent*x*x
		points[i] = Point{X: x + ux*random.NormFloat64(), Y: y + uy*random.NormFloat64(), UX: ux, UY: uy}
	}
	return points
}

func TestExactParabola(t *testing.T) {
	points := bend(rand.New(rand.NewPCG(1, 2)), 9, 0.0007, 0, 0)
	for i := range points {
		points[i].UX, points[i].UY = 2, 3
	}
	p := mustFit(t, 2, points)
	c, _ := p.Parameters()
	for i, want := range []float64{-120, 0.5, 0.0007} {
		if !near(1e-8, c[i], want) {
			t.Errorf("coefficient %d: %g, want %g", i, c[i], want)
		}
	}
	if p.ChiSquare > 1e-15 {
		t.Errorf("chi-square %g through exact points", p.ChiSquare)
	}
}

// The order of the points does not matter, nor the units of either axis, nor
// where its zero is.
func TestPolynomialProperties(t *testing.T) {
	random := rand.New(rand.NewPCG(3, 4))
	for range 200 {
		degree := 1 + random.IntN(2)
		points := bend(random, 5+random.IntN(10), 0.0005*float64(degree-1), 3*random.Float64(), 0.5+4*random.Float64())
		p := mustFit(t, degree, points)
		shuffled := slices.Clone(points)
		random.Shuffle(len(shuffled), func(i, j int) { shuffled[i], shuffled[j] = shuffled[j], shuffled[i] })
		fx, fy, dx, dy := math.Exp(4*random.NormFloat64()), math.Exp(4*random.NormFloat64()), 1000*random.NormFloat64(), 1000*random.NormFloat64()
		other := mustFit(t, degree, moved(shuffled, func(p Point) Point {
			return Point{X: fx*p.X + dx, Y: fy * (p.Y + dy), UX: fx * p.UX, UY: fy * p.UY}
		}))
		if !near(1e-6, other.ChiSquare, p.ChiSquare) {
			t.Fatalf("chi-square %g became %g", p.ChiSquare, other.ChiSquare)
		}
		for x := 400.0; x <= 700; x += 50 {
			if got, want := other.Value(fx*x+dx)/fy-dy, p.Value(x); math.Abs(got-want) > 1e-8*(math.Abs(want)+math.Abs(dy)) {
				t.Fatalf("value at %g: %.12g became %.12g", x, want, got)
			}
			if got, want := other.Variance(fx*x+dx)/(fy*fy), p.Variance(x); !near(1e-5, got, want) {
				t.Fatalf("variance at %g: %.12g became %.12g", x, want, got)
			}
		}
	}
}

// The coefficients of a parabola are recovered within their uncertainties, and
// these are as large as the scatter from one set of points to the next.
func TestParabolaIsRecovered(t *testing.T) {
	const trials = 2000
	random := rand.New(rand.NewPCG(5, 6))
	var inside [3]int
	chiSquare := 0.0
	for range trials {
		p := mustFit(t, 2, bend(random, 10, 0.0007, 2, 3))
		c, covariance := p.Parameters()
		for i, want := range []float64{-120, 0.5, 0.0007} {
			if math.Abs(c[i]-want) < 2*math.Sqrt(covariance[i][i]) {
				inside[i]++
			}
		}
		chiSquare += p.ChiSquare / float64(p.DoF) / trials
	}
	t.Logf("within 2 standard uncertainties: %v of %d; mean chi-square per degree of freedom %.3f", inside, trials, chiSquare)
	for i, n := range inside {
		if n < 940*trials/1000 || n > 968*trials/1000 {
			t.Errorf("coefficient %d: %d of %d within 2 standard uncertainties, expected 954 in 1000", i, n, trials)
		}
	}
	if math.Abs(chiSquare-1) > 0.05 {
		t.Errorf("mean chi-square per degree of freedom %g", chiSquare)
	}
}

func TestNoFit(t *testing.T) {
	point := func(x, y float64) Point { return Point{X: x, Y: y, UX: 1, UY: 1} }
	nan := math.NaN()
	for _, c := range []struct {
		name   string
		degree int
		points []Point
	}{
		{"nothing", 1, nil},
		{"one point", 1, []Point{point(1, 2)}},
		{"two points for a parabola", 2, []Point{point(1, 2), point(2, 3)}},
		{"all at one place", 1, []Point{point(1, 2), point(1, 3), point(1, 4)}},
		{"two places for a parabola", 2, []Point{point(1, 2), point(2, 3), point(1, 4), point(2, 5)}},
		{"no number", 1, []Point{point(1, 2), point(nan, 3), point(3, 4)}},
		{"no value", 1, []Point{point(1, 2), point(2, nan), point(3, 4)}},
		{"without end", 1, []Point{point(1, 2), point(math.Inf(1), 3), point(3, 4)}},
		{"certain and level", 1, []Point{{X: 1, Y: 2}, {X: 2, Y: 2}, {X: 3, Y: 2}}},
	} {
		if p := FitPolynomial(c.degree, c.points); p != nil {
			t.Errorf("%s: %+v", c.name, *p)
		}
	}
}

// The 95 % points of chi-square per degree of freedom, from printed tables.
func TestChiSquareLimit(t *testing.T) {
	for dof, want := range map[int]float64{3: 7.815, 5: 11.070, 9: 16.919, 20: 31.410, 100: 124.342} {
		if got := ChiSquareLimit(dof) * float64(dof); !near(0.01, got, want) {
			t.Errorf("%d: %g, printed %g", dof, got, want)
		}
	}
}

func BenchmarkFitPolynomial(b *testing.B) {
	points := bend(rand.New(rand.NewPCG(1, 2)), 12, 0.0007, 2, 3)
	for degree := 1; degree <= 2; degree++ {
		b.Run([]string{"straight", "bent"}[degree-1], func(b *testing.B) {
			for b.Loop() {
				FitPolynomial(degree, points)
			}
		})
	}
}
