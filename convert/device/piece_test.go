package device

import (
	"math"
	"math/rand/v2"
	"slices"
	"strings"
	"testing"
)

// steel is the density of steel, kg/m3.
const steel = 7850.0

func kinds(all []Shortfall) string {
	var names []string
	for _, s := range all {
		names = append(names, string(s.Kind))
	}
	return strings.Join(names, " ")
}

func keys(all []Device) string {
	var names []string
	for _, d := range all {
		names = append(names, d.Key)
	}
	return strings.Join(names, " ")
}

// same reports whether two numbers are equal within a share; NaN is NaN.
func same(got, want, share float64) bool {
	return math.IsNaN(got) && math.IsNaN(want) || math.Abs(got-want) <= share*math.Abs(want)
}

func TestMass(t *testing.T) {
	plate := func(length, width float64) *Shape {
		return &Shape{Kind: Plate, LengthMm: &length, WidthMm: &width}
	}
	bar := func(diameter, length float64) *Shape {
		return &Shape{Kind: Bar, OuterDiameterMm: &diameter, LengthMm: &length}
	}
	pipe := func(diameter, wall, length float64) *Shape {
		return &Shape{Kind: Pipe, OuterDiameterMm: &diameter, WallMm: &wall, LengthMm: &length}
	}
	nan := math.NaN()
	for _, c := range []struct {
		name    string
		piece   *Piece
		density float64
		want    float64 // kg
		within  float64 // share of want
	}{
		// By hand: volume in mm3 x 7850e-9 kg.
		{"plate of 200 x 100 x 10", &Piece{ThicknessMm: new(10.0), Shape: plate(200, 100)}, steel, 1.57, 1e-12},
		{"aluminium plate of 1000 x 500 x 20", &Piece{ThicknessMm: new(20.0), Shape: plate(1000, 500)}, 2700, 27, 1e-12},
		{"bar of 20 x 1000", &Piece{Shape: bar(20, 1000)}, steel, 0.785 * math.Pi, 1e-12},
		{"pipe of 100 x 10 x 1000", &Piece{Shape: pipe(100, 10, 1000)}, steel, 7.065 * math.Pi, 1e-12},
		{"pipe with the wall as its thickness", &Piece{ThicknessMm: new(10.0), Shape: &Shape{Kind: Pipe, OuterDiameterMm: new(100.0), LengthMm: new(1000.0)}}, steel, 7.065 * math.Pi, 1e-12},
		{"pipe that is all wall", &Piece{Shape: pipe(20, 10, 1000)}, steel, 0.785 * math.Pi, 1e-12},
		// Tables of weights, kg/m, as printed. ASME B36.10M and EN 10060, from memory.
		{"pipe NPS 4 schedule 40", &Piece{Shape: pipe(114.3, 6.02, 1000)}, steel, 16.08, 5e-4},
		{"pipe NPS 6 schedule 40", &Piece{Shape: pipe(168.3, 7.11, 1000)}, steel, 28.26, 5e-4},
		{"pipe NPS 12 schedule 80", &Piece{Shape: pipe(323.8, 17.48, 1000)}, steel, 132.05, 5e-4},
		{"round bar of 50", &Piece{Shape: bar(50, 1000)}, steel, 15.4, 2e-3},

		{"stated mass first", &Piece{MassKg: new(3.0), Shape: bar(50, 1000)}, steel, 3, 0},
		{"nothing", nil, steel, nan, 0},
		{"no density", &Piece{Shape: bar(50, 1000)}, 0, nan, 0},
		{"unknown density", &Piece{Shape: bar(50, 1000)}, nan, nan, 0},
		{"no kind", &Piece{ThicknessMm: new(10.0), Shape: &Shape{LengthMm: new(10.0), WidthMm: new(10.0), OuterDiameterMm: new(10.0), WallMm: new(1.0)}}, steel, nan, 0},
		{"no shape", &Piece{ThicknessMm: new(10.0), Shape: &Shape{Kind: NoShape, LengthMm: new(10.0), WidthMm: new(10.0), OuterDiameterMm: new(10.0), WallMm: new(1.0)}}, steel, nan, 0},
		{"plate without thickness", &Piece{Shape: plate(200, 100)}, steel, nan, 0},
		{"bar without length", &Piece{Shape: &Shape{Kind: Bar, OuterDiameterMm: new(50.0)}}, steel, nan, 0},
		{"wall above the radius", &Piece{Shape: pipe(20, 10.1, 1000)}, steel, nan, 0},
		{"negative length", &Piece{Shape: bar(20, -1000)}, steel, nan, 0},
		{"length without end", &Piece{Shape: bar(20, math.Inf(1))}, steel, nan, 0},
		{"negative mass, known shape", &Piece{MassKg: new(-3.0), Shape: bar(20, 1000)}, steel, 0.785 * math.Pi, 1e-12},
	} {
		m := c.piece.Measures(c.density)
		computed := !math.IsNaN(c.want) && (c.piece.MassKg == nil || *c.piece.MassKg < 0)
		if !same(m.Mass.Value, c.want, c.within) || m.MassComputed != computed {
			t.Errorf("%s: %g kg (computed: %t), want %g (%t)", c.name, m.Mass.Value, m.MassComputed, c.want, computed)
		}
	}
}

func TestThicknessAndRadius(t *testing.T) {
	nan := math.NaN()
	shape := func(kind ShapeKind) *Shape {
		return &Shape{Kind: kind, OuterDiameterMm: new(100.0), WallMm: new(8.0)}
	}
	for _, c := range []struct {
		name                  string
		piece                 *Piece
		thickness, radius     float64
		thicknessAt, radiusAt string
		wall                  bool
	}{
		{"nothing", nil, nan, nan, "piece.thickness_mm", "piece.radius_mm", false},
		{"stated", &Piece{ThicknessMm: new(20.0), RadiusMm: new(70.0)}, 20, 70, "piece.thickness_mm", "piece.radius_mm", false},
		{"plate", &Piece{ThicknessMm: new(20.0), Shape: shape(Plate)}, 20, nan, "piece.thickness_mm", "piece.radius_mm", false},
		{"none", &Piece{ThicknessMm: new(20.0), Shape: shape(NoShape)}, 20, nan, "piece.thickness_mm", "piece.radius_mm", false},
		{"pipe", &Piece{Shape: shape(Pipe)}, 8, 50, "piece.shape.wall_mm", "piece.shape.outer_diameter_mm", true},
		{"pipe, thinner at the spot", &Piece{ThicknessMm: new(6.0), Shape: shape(Pipe)}, 6, 50, "piece.thickness_mm", "piece.shape.outer_diameter_mm", true},
		{"pipe with the thickness of the whole", &Piece{ThicknessMm: new(100.0), Shape: shape(Pipe)}, 8, 50, "piece.shape.wall_mm", "piece.shape.outer_diameter_mm", true},
		{"pipe, thickness of the wall", &Piece{ThicknessMm: new(6.0), Shape: &Shape{Kind: Pipe}}, 6, nan, "piece.thickness_mm", "piece.shape.outer_diameter_mm", true},
		{"pipe, bad thickness", &Piece{ThicknessMm: new(-6.0), Shape: shape(Pipe)}, 8, 50, "piece.shape.wall_mm", "piece.shape.outer_diameter_mm", true},
		{"bar", &Piece{Shape: shape(Bar)}, 100, 50, "piece.shape.outer_diameter_mm", "piece.shape.outer_diameter_mm", false},
		{"bar with flats", &Piece{ThicknessMm: new(80.0), RadiusMm: new(1000.0), Shape: shape(Bar)}, 80, 1000, "piece.thickness_mm", "piece.radius_mm", false},
	} {
		m := c.piece.Measures(steel)
		if !same(m.Thickness.Value, c.thickness, 0) || !same(m.Radius.Value, c.radius, 0) || m.Wall != c.wall {
			t.Errorf("%s: thickness %g, radius %g, wall %t", c.name, m.Thickness.Value, m.Radius.Value, m.Wall)
		}
		if !math.IsNaN(c.thickness) && m.Thickness.Field != c.thicknessAt || !math.IsNaN(c.radius) && m.Radius.Field != c.radiusAt {
			t.Errorf("%s: taken from %s and %s", c.name, m.Thickness.Field, m.Radius.Field)
		}
	}
}

// The columns of the file, each with the piece it judges and what falls short.
var requiredOf = []struct {
	column string
	kind   ShortfallKind
	piece  func(v float64) *Piece
}{
	{"mass_free_kg", TooLight, func(v float64) *Piece { return &Piece{MassKg: &v} }},
	{"mass_free_kg", TooLight, func(v float64) *Piece { return &Piece{MassKg: &v, Support: Free} }},
	{"mass_supported_kg", TooLight, func(v float64) *Piece { return &Piece{MassKg: &v, Support: Supported} }},
	{"mass_coupled_kg", TooLight, func(v float64) *Piece { return &Piece{MassKg: &v, Support: Coupled} }},
	{"thickness_uncoupled_mm", TooThin, func(v float64) *Piece { return &Piece{ThicknessMm: &v} }},
	{"thickness_uncoupled_mm", TooThin, func(v float64) *Piece { return &Piece{ThicknessMm: &v, Support: Free} }},
	{"thickness_uncoupled_mm", TooThin, func(v float64) *Piece { return &Piece{ThicknessMm: &v, Support: Supported} }},
	{"thickness_coupled_mm", TooThin, func(v float64) *Piece { return &Piece{ThicknessMm: &v, Support: Coupled} }},
	{"thickness_uncoupled_mm", TooThin, func(v float64) *Piece {
		return &Piece{RadiusMm: new(100.0), Shape: &Shape{Kind: Bar, OuterDiameterMm: &v}}
	}},
	{"thickness_uncoupled_mm", WallTooThin, func(v float64) *Piece { return &Piece{Shape: &Shape{Kind: Pipe, WallMm: &v}} }},
	{"thickness_coupled_mm", WallTooThin, func(v float64) *Piece {
		return &Piece{MassKg: new(1000.0), Support: Coupled, Shape: &Shape{Kind: Pipe, WallMm: &v, OuterDiameterMm: new(500.0)}}
	}},
	{"case_depth_mm", CaseTooThin, func(v float64) *Piece { return &Piece{CaseMm: &v} }},
	{"max_ra_um", TooRough, func(v float64) *Piece { return &Piece{RaUm: &v} }},
	{"min_radius_mm", RadiusTooSmall, func(v float64) *Piece { return &Piece{RadiusMm: &v} }},
	{"min_spacing_mm", SpacingTooClose, func(v float64) *Piece { return &Piece{SpacingMm: &v} }},
	{"min_edge_mm", EdgeTooNear, func(v float64) *Piece { return &Piece{EdgeMm: &v} }},
}

// Each requirement as the file has it, just met and just missed.
func TestRequirements(t *testing.T) {
	for _, row := range devicesTable.Rows {
		d := mustDevice(t, row.Text("device"))
		for _, c := range requiredOf {
			need := row.Number(c.column)
			if math.IsNaN(need) {
				if d.Key != "G" || c.column != "case_depth_mm" {
					t.Errorf("%s requires no %s: the sentences count on one", d.Key, c.column)
				}
				if got := kinds(d.Shortfalls(c.piece(1e-6).Measures(steel))); got != "" {
					t.Errorf("%s, %s is not given: falls short in %s", d.Key, c.column, got)
				}
				continue
			}
			missed := math.Nextafter(need, 0)
			if c.kind == TooRough {
				missed = math.Nextafter(need, 2*need)
			}
			if got := kinds(d.Shortfalls(c.piece(need).Measures(steel))); got != "" {
				t.Errorf("%s, %s of %g: falls short in %s", d.Key, c.column, need, got)
			}
			short := d.Shortfalls(c.piece(missed).Measures(steel))
			if kinds(short) != string(c.kind) || short[0].Have != missed || short[0].Need != need || !strings.HasPrefix(short[0].Field, "piece.") {
				t.Errorf("%s, %s of %g: falls short in %+v, want %s", d.Key, c.column, missed, short, c.kind)
			}
		}
	}
}

func TestTemperature(t *testing.T) {
	for _, c := range []struct{ t, bound float64 }{
		{4, math.NaN()}, {38, math.NaN()}, {21, math.NaN()}, {math.Nextafter(4, 0), 4}, {math.Nextafter(38, 99), 38}, {-40, 4}, {300, 38},
		{-273.15, math.NaN()}, {-300, math.NaN()}, {5000, math.NaN()}, // what cannot be is not judged
	} {
		s, ok := (&Piece{TemperatureC: &c.t}).Measures(steel).TemperatureShortfall()
		if want := !math.IsNaN(c.bound); ok != want || ok && (s.Need != c.bound || s.Have != c.t || s.Kind != TemperatureOutside) {
			t.Errorf("%g degC: %+v (%t), want %g", c.t, s, ok, c.bound)
		}
	}
}

func TestBadQuantities(t *testing.T) {
	shaped := func(s Shape) *Piece { return &Piece{Shape: &s} }
	for _, c := range []struct {
		name  string
		piece *Piece
		want  string // fields
	}{
		{"nothing", nil, ""},
		{"empty", &Piece{}, ""},
		{"sound", &Piece{MassKg: new(1e7), ThicknessMm: new(0.001), TemperatureC: new(-273.1), RaUm: new(0.01)}, ""},
		{"zero mass", &Piece{MassKg: new(0.0)}, "piece.mass_kg"},
		{"negative zero", &Piece{MassKg: new(math.Copysign(0, -1))}, "piece.mass_kg"},
		{"more than anything", &Piece{MassKg: new(1.001e7)}, "piece.mass_kg"},
		{"several", &Piece{ThicknessMm: new(-1.0), RadiusMm: new(0.0), RaUm: new(-1.6), CaseMm: new(math.NaN()), SpacingMm: new(math.Inf(1)), EdgeMm: new(-5.0)},
			"piece.thickness_mm piece.radius_mm piece.ra_um piece.case_mm piece.spacing_mm piece.edge_mm"},
		{"absolute zero", &Piece{TemperatureC: new(-273.15)}, "piece.temperature_c"},
		{"below absolute zero", &Piece{TemperatureC: new(-300.0)}, "piece.temperature_c"},
		{"no temperature", &Piece{TemperatureC: new(math.NaN())}, "piece.temperature_c"},
		{"shape", shaped(Shape{LengthMm: new(0.0), WidthMm: new(-1.0), OuterDiameterMm: new(math.Inf(-1)), WallMm: new(-2.0)}),
			"piece.shape.length_mm piece.shape.width_mm piece.shape.outer_diameter_mm piece.shape.wall_mm"},
		{"wall of the radius", shaped(Shape{Kind: Pipe, OuterDiameterMm: new(60.0), WallMm: new(30.0)}), ""},
		{"wall above the radius", shaped(Shape{Kind: Pipe, OuterDiameterMm: new(60.0), WallMm: new(30.01)}), "piece.shape.wall_mm"},
		{"thickness as wall, above the radius", &Piece{ThicknessMm: new(31.0), Shape: &Shape{Kind: Pipe, OuterDiameterMm: new(60.0)}}, "piece.thickness_mm"},
		{"wall above half a bad diameter", shaped(Shape{Kind: Pipe, OuterDiameterMm: new(-60.0), WallMm: new(30.0)}), "piece.shape.outer_diameter_mm"},
		{"a bar has no wall", shaped(Shape{Kind: Bar, OuterDiameterMm: new(60.0), WallMm: new(40.0)}), ""},
	} {
		var fields []string
		for _, bad := range c.piece.BadQuantities() {
			fields = append(fields, bad.Field)
			if bad.Got > bad.Lo && bad.Got <= bad.Hi {
				t.Errorf("%s: %+v is not bad", c.name, bad)
			}
		}
		if got := strings.Join(fields, " "); got != c.want {
			t.Errorf("%s: bad are %q, want %q", c.name, got, c.want)
		}
		for _, d := range All() {
			if short := d.Shortfalls(c.piece.Measures(steel)); slices.ContainsFunc(short, func(s Shortfall) bool { return slices.Contains(fields, s.Field) }) {
				t.Errorf("%s: %s judges what cannot be: %+v", c.name, d.Key, short)
			}
		}
	}
}

func TestMeasuresLeavesThePieceAlone(t *testing.T) {
	p := &Piece{MassKg: new(-1.0), Shape: &Shape{Kind: Pipe, WallMm: new(-1.0)}}
	p.Measures(steel)
	p.BadQuantities()
	if p.MassKg == nil || p.Shape.WallMm == nil {
		t.Errorf("what cannot be has been taken out of the piece: %+v", p)
	}
}

func TestStated(t *testing.T) {
	for _, c := range []struct {
		piece *Piece
		want  bool
	}{
		{nil, false}, {&Piece{}, false}, {&Piece{Shape: &Shape{}}, false},
		{&Piece{Support: Coupled, Shape: &Shape{Kind: Pipe}}, false}, // nothing is measured
		{&Piece{EdgeMm: new(10.0)}, true}, {&Piece{TemperatureC: new(0.0)}, true},
		{&Piece{MassKg: new(-1.0)}, true}, {&Piece{Shape: &Shape{WallMm: new(5.0)}}, true},
	} {
		if got := c.piece.Stated(); got != c.want {
			t.Errorf("%+v: stated %t, want %t", c.piece, got, c.want)
		}
	}
}

func TestWallOfAHeavyPipe(t *testing.T) {
	p := &Piece{MassKg: new(5000.0), Shape: &Shape{Kind: Pipe, OuterDiameterMm: new(1000.0), WallMm: new(10.0)}}
	m := p.Measures(steel)
	for _, d := range All() {
		if got := kinds(d.Shortfalls(m)); got != "wall-too-thin" {
			t.Errorf("%s falls short in %q, want wall-too-thin", d.Key, got)
		}
	}
	p.Support = Coupled
	if got := keys(WouldDo(p.Measures(steel), WallTooThin)); got != "D DC D+15 S E C G" {
		t.Errorf("coupled, %s would do", got)
	}
}

func TestWouldDo(t *testing.T) {
	for _, c := range []struct {
		name    string
		piece   *Piece
		instead ShortfallKind
		want    string
	}{
		{"3 kg, free", &Piece{MassKg: new(3.0)}, TooLight, "C"},
		{"3 kg, supported", &Piece{MassKg: new(3.0), Support: Supported}, TooLight, "D DC D+15 S E C"},
		{"0.03 kg, coupled", &Piece{MassKg: new(0.03), Support: Coupled}, TooLight, "C"},
		{"0.01 kg, coupled", &Piece{MassKg: new(0.01), Support: Coupled}, TooLight, ""},
		{"too light for G", &Piece{MassKg: new(10.0)}, TooLight, "D DC D+15 S E C"},
		{"20 mm", &Piece{MassKg: new(10.0), ThicknessMm: new(20.0)}, TooThin, "C"},
		{"light and thin", &Piece{MassKg: new(3.0), ThicknessMm: new(10.0)}, TooLight, ""},
		{"light and rough: it can be ground", &Piece{MassKg: new(3.0), RaUm: new(1.6)}, TooLight, "C"},
		// The standards name no case depth for G that is sure: it is not recommended.
		{"case of 0.5 mm", &Piece{CaseMm: new(0.5)}, CaseTooThin, "C"},
		{"rough case", &Piece{CaseMm: new(2.0), RaUm: new(5.0)}, TooRough, ""},
		{"Ra 5", &Piece{RaUm: new(5.0)}, TooRough, "G"},
		{"Ra 5, too light for G", &Piece{RaUm: new(5.0), MassKg: new(10.0)}, TooRough, ""},
		{"radius of 40 mm", &Piece{RadiusMm: new(40.0)}, RadiusTooSmall, "D DC D+15 S E C"},
		{"2.5 mm apart", &Piece{SpacingMm: new(2.5)}, SpacingTooClose, "C"},
	} {
		if got := keys(WouldDo(c.piece.Measures(steel), c.instead)); got != c.want {
			t.Errorf("%s: %q would do, want %q", c.name, got, c.want)
		}
	}
}

// randomPiece makes a piece near to what the devices require.
func randomPiece(rng *rand.Rand) *Piece {
	maybe := func(most float64) *float64 {
		if rng.IntN(4) == 0 {
			return nil
		}
		return new(most * rng.Float64())
	}
	pick := func(n int) int { return rng.IntN(n) }
	p := &Piece{
		MassKg: maybe(20), ThicknessMm: maybe(100), RadiusMm: maybe(80), RaUm: maybe(10), CaseMm: maybe(2),
		SpacingMm: maybe(6), EdgeMm: maybe(12), TemperatureC: maybe(60),
		Support: []Support{"", Free, Supported, Coupled}[pick(4)],
	}
	if pick(2) == 0 {
		p.Shape = &Shape{
			Kind:     []ShapeKind{"", Plate, Pipe, Bar, NoShape}[pick(5)],
			LengthMm: maybe(500), WidthMm: maybe(500), OuterDiameterMm: maybe(300), WallMm: maybe(60),
		}
	}
	return p
}

// Heavier, thicker, smoother, ... never adds a shortfall, nor does a better
// support.
func TestBetterIsNeverWorse(t *testing.T) {
	rng := rand.New(rand.NewPCG(11, 12))
	better := map[Support]Support{Free: Supported, Supported: Coupled, Coupled: Coupled}
	lost := 0
	for range 20000 {
		before := randomPiece(rng).Measures(steel)
		after := before
		grow := 1 + rng.Float64()
		switch rng.IntN(8) {
		case 0:
			after.Mass.Value *= grow
		case 1:
			after.Thickness.Value *= grow
		case 2:
			after.Case.Value *= grow
		case 3:
			after.Ra.Value /= grow
		case 4:
			after.Radius.Value *= grow
		case 5:
			after.Spacing.Value *= grow
		case 6:
			after.Edge.Value *= grow
		case 7:
			after.Support = better[after.Support]
		}
		for _, d := range All() {
			had, has := d.Shortfalls(before), d.Shortfalls(after)
			lost += len(had) - len(has)
			for _, s := range has {
				if !slices.ContainsFunc(had, func(o Shortfall) bool { return o.Kind == s.Kind }) {
					t.Fatalf("%s: %+v falls short in %s, and %+v does not", d.Key, after, s.Kind, before)
				}
			}
		}
	}
	if lost < 1000 {
		t.Errorf("only %d shortfalls were mended: the test has lost its subject", lost)
	}
}

// A heavier or thicker shape does not add one either. (A larger diameter of a
// pipe whose wall stays the same is heavier and less curved.)
func TestLargerShapeIsNeverWorse(t *testing.T) {
	rng := rand.New(rand.NewPCG(13, 14))
	for range 5000 {
		p := randomPiece(rng)
		if p.Shape == nil {
			continue
		}
		larger, s := p.copy(), *p.Shape
		larger.Shape = &s
		grow := 1 + rng.Float64()
		for _, size := range []**float64{&s.LengthMm, &s.WidthMm, &s.OuterDiameterMm} {
			if *size != nil {
				*size = new(**size * grow)
			}
		}
		if len(p.BadQuantities()) > 0 || len(larger.BadQuantities()) > 0 {
			continue // a shape that cannot be, and so counts as none
		}
		before, after := p.Measures(steel), larger.Measures(steel)
		for _, d := range All() {
			if had, has := d.Shortfalls(before), d.Shortfalls(after); len(has) > len(had) {
				t.Fatalf("%s: %+v falls short in %s, the smaller %+v in %s", d.Key, after, kinds(has), before, kinds(had))
			}
		}
	}
}
