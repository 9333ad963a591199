package device

import "math"

// Piece is what was written down about the test piece. Nothing of it must be there.
type Piece struct {
	MassKg       *float64 `json:"mass_kg,omitempty"` // computed from the shape unless told
	ThicknessMm  *float64 `json:"thickness_mm,omitempty"`
	RadiusMm     *float64 `json:"radius_mm,omitempty"`     // of a curved surface, at the spot
	RaUm         *float64 `json:"ra_um,omitempty"`         // roughness Ra
	TemperatureC *float64 `json:"temperature_c,omitempty"` // of the piece
	Support      Support  `json:"support,omitempty"`       // free unless told
	CaseMm       *float64 `json:"case_mm,omitempty"`       // depth of a hardened case
	SpacingMm    *float64 `json:"spacing_mm,omitempty"`    // least distance from one impression to the next
	EdgeMm       *float64 `json:"edge_mm,omitempty"`       // least distance from an impression to an edge
	Shape        *Shape   `json:"shape,omitempty"`
}

// Support is how the test piece lies.
type Support string

// The supports.
const (
	Free      Support = "free"
	Supported Support = "supported" // on a solid support
	Coupled   Support = "coupled"   // coupled to a solid plate
)

// Shape is the test piece's shape and size.
type Shape struct {
	Kind            ShapeKind `json:"kind"`
	LengthMm        *float64  `json:"length_mm,omitempty"`
	WidthMm         *float64  `json:"width_mm,omitempty"`
	OuterDiameterMm *float64  `json:"outer_diameter_mm,omitempty"`
	WallMm          *float64  `json:"wall_mm,omitempty"`
}

// ShapeKind is the kind of a shape.
type ShapeKind string

// The kinds of shapes.
const (
	Plate   ShapeKind = "plate" // length x width x the piece's thickness
	Pipe    ShapeKind = "pipe"
	Bar     ShapeKind = "bar" // solid and round
	NoShape ShapeKind = "none"
)

// Measures are the measures of a test piece that something is required of.
type Measures struct {
	Support      Support // never ""
	Mass         Measure // kg
	MassComputed bool    // from shape and density
	Thickness    Measure // mm, under the spot
	Wall         bool    // whether the thickness is that of a pipe's wall
	Case         Measure // mm
	Ra           Measure // µm
	Radius       Measure // mm
	Spacing      Measure // mm
	Edge         Measure // mm
	Temperature  Measure // degC
}

// Measure is one measure of a test piece.
type Measure struct {
	Value float64 // NaN where it is not known
	Field string  // path in the record of what it was taken from
}

// The paths in the record of what a test piece is described by.
const (
	massField      = "piece.mass_kg"
	thicknessField = "piece.thickness_mm"
	radiusField    = "piece.radius_mm"
	shapeField     = "piece.shape"
	diameterField  = "piece.shape.outer_diameter_mm"
	wallField      = "piece.shape.wall_mm"
)

// Measures takes the measures of a piece; nil is a piece of which nothing is
// stated. The mass comes from shape and density (kg/m3, NaN or 0 where unknown)
// where it is not stated. The thickness of a pipe is that of its wall, that of a
// bar its diameter unless told; the radius of both is half the outer diameter
// unless told. What cannot be (see BadQuantities) counts as not stated.
func (p *Piece) Measures(density float64) Measures {
	s := p.sound()
	m := Measures{
		Support:     s.Support,
		Mass:        Measure{value(s.MassKg), massField},
		Thickness:   Measure{value(s.ThicknessMm), thicknessField},
		Case:        Measure{value(s.CaseMm), "piece.case_mm"},
		Ra:          Measure{value(s.RaUm), "piece.ra_um"},
		Radius:      Measure{value(s.RadiusMm), radiusField},
		Spacing:     Measure{value(s.SpacingMm), "piece.spacing_mm"},
		Edge:        Measure{value(s.EdgeMm), "piece.edge_mm"},
		Temperature: Measure{value(s.TemperatureC), "piece.temperature_c"},
	}
	if m.Support == "" {
		m.Support = Free // the strictest
	}
	if s.MassKg == nil {
		if mass := s.volume() * density; mass > 0 {
			m.Mass, m.MassComputed = Measure{mass, shapeField}, true
		}
	}
	diameter := value(s.Shape.OuterDiameterMm)
	switch s.Shape.Kind {
	case Pipe:
		m.Wall = true
		if wall := value(s.Shape.WallMm); s.ThicknessMm == nil || wall < m.Thickness.Value {
			m.Thickness = Measure{wall, wallField}
		}
	case Bar:
		if s.ThicknessMm == nil {
			m.Thickness = Measure{diameter, diameterField}
		}
	default:
		return m
	}
	if s.RadiusMm == nil {
		m.Radius = Measure{diameter / 2, diameterField}
	}
	return m
}

// volume is the volume of the piece's shape in m3, NaN where it is not known.
func (p *Piece) volume() float64 {
	const cubicMm = 1e-9 // m3
	length, diameter := value(p.Shape.LengthMm), value(p.Shape.OuterDiameterMm)
	switch p.Shape.Kind {
	case Plate:
		return length * value(p.Shape.WidthMm) * value(p.ThicknessMm) * cubicMm
	case Bar:
		return math.Pi / 4 * diameter * diameter * length * cubicMm
	case Pipe:
		wall := value(p.Shape.WallMm)
		if p.Shape.WallMm == nil {
			wall = value(p.ThicknessMm)
		}
		return math.Pi * wall * (diameter - wall) * length * cubicMm
	}
	return math.NaN()
}

// value is a quantity that may be left open, NaN where it is.
func value(stated *float64) float64 {
	if stated == nil {
		return math.NaN()
	}
	return *stated
}

// Stated reports whether any quantity of the piece is stated, be it one that
// cannot be.
func (p *Piece) Stated() bool {
	for _, q := range p.copy().quantities() {
		if *q.value != nil {
			return true
		}
	}
	return false
}

// BadQuantity is a stated quantity that cannot be.
type BadQuantity struct {
	Field string // path in the record
	Got   float64
	Lo    float64 // it must lie above Lo,
	Hi    float64 // and not above Hi
}

// BadQuantities returns the quantities of the piece that cannot be: what is not
// above zero, a temperature not above absolute zero, a wall thicker than the
// outer radius, and what no piece of metal could have.
func (p *Piece) BadQuantities() []BadQuantity {
	var bad []BadQuantity
	for _, q := range p.copy().quantities() {
		if q.bad() {
			bad = append(bad, BadQuantity{q.field, **q.value, q.lo, q.hi})
		}
	}
	return bad
}

// quantity is a field of a piece with the bounds of what can be.
type quantity struct {
	field  string
	value  **float64
	lo, hi float64 // it must lie above lo, and not above hi
}

func (q quantity) bad() bool {
	v := *q.value
	return v != nil && !(*v > q.lo && *v <= q.hi) // true for NaN
}

// Bounds of what can be. Those with no source are so far out that only a slip
// of the finger exceeds them.
const (
	absoluteZero = -273.15 // degC
	hottest      = 2000    // degC: no metal here is solid (common practice, no source)
	greatest     = 1e7     // kg, mm or µm: 10 000 t, 10 km, 10 m (common practice, no source)
)

// quantities lists the quantities of a piece that has a shape.
func (p *Piece) quantities() []quantity {
	s := p.Shape
	all := []quantity{
		{massField, &p.MassKg, 0, greatest},
		{thicknessField, &p.ThicknessMm, 0, greatest},
		{radiusField, &p.RadiusMm, 0, greatest},
		{"piece.ra_um", &p.RaUm, 0, greatest},
		{"piece.temperature_c", &p.TemperatureC, absoluteZero, hottest},
		{"piece.case_mm", &p.CaseMm, 0, greatest},
		{"piece.spacing_mm", &p.SpacingMm, 0, greatest},
		{"piece.edge_mm", &p.EdgeMm, 0, greatest},
		{"piece.shape.length_mm", &s.LengthMm, 0, greatest},
		{"piece.shape.width_mm", &s.WidthMm, 0, greatest},
		{diameterField, &s.OuterDiameterMm, 0, greatest},
		{wallField, &s.WallMm, 0, greatest},
	}
	if s.Kind != Pipe {
		return all
	}
	diameter := quantity{diameterField, &s.OuterDiameterMm, 0, greatest}
	if s.OuterDiameterMm == nil || diameter.bad() {
		return all
	}
	wall := wallField
	if s.WallMm == nil {
		wall = thicknessField // of a pipe, that of its wall
	}
	for i := range all {
		if all[i].field == wall {
			all[i].hi = *s.OuterDiameterMm / 2
		}
	}
	return all
}

// copy returns the piece with a shape of its own; its fields can be set without
// a change to p.
func (p *Piece) copy() *Piece {
	var c Piece
	if p != nil {
		c = *p
	}
	var s Shape
	if c.Shape != nil {
		s = *c.Shape
	}
	c.Shape = &s
	return &c
}

// sound returns the piece without the quantities that cannot be.
func (p *Piece) sound() *Piece {
	c := p.copy()
	for _, q := range c.quantities() {
		if q.bad() {
			*q.value = nil
		}
	}
	return c
}

// ShortfallKind is what a test piece falls short in, the code of its finding.
type ShortfallKind string

// The kinds of shortfalls.
const (
	TooLight           ShortfallKind = "piece-too-light"
	TooThin            ShortfallKind = "piece-too-thin"
	WallTooThin        ShortfallKind = "wall-too-thin"
	CaseTooThin        ShortfallKind = "case-too-thin"
	TooRough           ShortfallKind = "surface-too-rough"
	RadiusTooSmall     ShortfallKind = "radius-too-small"
	SpacingTooClose    ShortfallKind = "spacing-too-close"
	EdgeTooNear        ShortfallKind = "edge-too-near"
	TemperatureOutside ShortfallKind = "temperature-outside"
)

// Mendable reports whether the spot can be prepared or moved to make up for the
// shortfall. The mass, the thickness and the case are what they are.
func (k ShortfallKind) Mendable() bool {
	switch k {
	case TooLight, TooThin, WallTooThin, CaseTooThin:
		return false
	}
	return true
}

// Shortfall is one requirement that a test piece does not meet.
type Shortfall struct {
	Kind  ShortfallKind
	Field string  // path in the record of what falls short
	Have  float64 // what the piece has,
	Need  float64 // and the bound it does not keep, in the same unit
}

// For returns the least mass (kg) and thickness (mm) required of a piece on a
// support.
func (r Requirements) For(s Support) (mass, thickness float64) {
	switch s {
	case Coupled:
		return r.MassCoupledKg, r.ThicknessCoupledMm
	case Supported:
		return r.MassSupportedKg, r.ThicknessUncoupledMm
	}
	return r.MassFreeKg, r.ThicknessUncoupledMm
}

// requirement is one requirement against one measure of a piece.
type requirement struct {
	kind ShortfallKind // of the shortfall if it is not met
	have Measure
	need float64 // 0: the standards name nothing that is sure
}

func (r requirement) met() bool {
	switch {
	case r.need == 0 || math.IsNaN(r.have.Value):
		return true
	case r.kind == TooRough:
		return r.have.Value <= r.need
	}
	return r.have.Value >= r.need
}

// unsure reports whether the piece has a measure that the device ought to
// require something of, but nobody here knows what.
func (r requirement) unsure() bool { return r.need == 0 && !math.IsNaN(r.have.Value) }

// requirements lists what the device requires of a piece.
func (d Device) requirements(m Measures) []requirement {
	r := d.Requirements
	mass, thickness := r.For(m.Support)
	tooThin := TooThin
	if m.Wall {
		// A thin wall springs under the impact, however heavy the pipe.
		tooThin = WallTooThin
	}
	return []requirement{
		{TooLight, m.Mass, mass},
		{tooThin, m.Thickness, thickness},
		{CaseTooThin, m.Case, r.CaseMm},
		{TooRough, m.Ra, r.RaUm},
		{RadiusTooSmall, m.Radius, r.RadiusMm},
		{SpacingTooClose, m.Spacing, r.SpacingMm},
		{EdgeTooNear, m.Edge, r.EdgeMm},
	}
}

// Shortfalls returns what the device requires and a piece does not have. What
// is not known of the piece or the device is left out.
func (d Device) Shortfalls(m Measures) []Shortfall {
	var all []Shortfall
	for _, r := range d.requirements(m) {
		if !r.met() {
			all = append(all, Shortfall{r.kind, r.have.Field, r.have.Value, r.need})
		}
	}
	return all
}

// The temperatures of a test piece that readings are good for, whatever the
// device, degC. ASTM A956, from memory: check your edition. (ISO 16859-1 names
// the ambient temperature instead: 10 to 35 degC.)
const (
	LeastTemperature    = 4.0
	GreatestTemperature = 38.0
)

// TemperatureShortfall returns by what the piece's temperature lies outside. ok
// is false where it does not, or is not known.
func (m Measures) TemperatureShortfall() (s Shortfall, ok bool) {
	t := m.Temperature
	switch {
	case t.Value < LeastTemperature:
		return Shortfall{TemperatureOutside, t.Field, t.Value, LeastTemperature}, true
	case t.Value > GreatestTemperature:
		return Shortfall{TemperatureOutside, t.Field, t.Value, GreatestTemperature}, true
	}
	return Shortfall{}, false
}

// WouldDo returns the devices with a built-in curve that may be recommended for
// a piece where another one finds a shortfall: without that shortfall, without
// any that cannot be mended, and without a requirement that nobody here knows.
func WouldDo(m Measures, instead ShortfallKind) []Device {
	var all []Device
	for _, d := range devices {
		if d.BuiltInCurve && d.wouldDo(m, instead) {
			all = append(all, d)
		}
	}
	return all
}

func (d Device) wouldDo(m Measures, instead ShortfallKind) bool {
	for _, r := range d.requirements(m) {
		if r.unsure() || !r.met() && (r.kind == instead || !r.kind.Mendable()) {
			return false
		}
	}
	return true
}
