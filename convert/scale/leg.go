package scale

import (
	"fmt"
	"math"
	"slices"
	"strings"
	"sync"

	"strikebook/convert/curve"
	"strikebook/convert/metal"
)

// Basis says what a step of a conversion rests on.
type Basis string

// What a step can rest on.
const (
	Measured Basis = "measured" // read in this very scale, nothing converted
	Model    Basis = "model"    // the built-in rebound model
	Standard Basis = "standard" // a published conversion
	Similar  Basis = "similar"  // the likeness of Vickers and Brinell, no table
	Anchored Basis = "anchored" // the built-in rebound model, scaled to pairs of the user's own
	Own      Basis = "own"      // a curve through pairs of the user's own
	OwnTable Basis = "table"    // a published table the user owns
)

// Step is one step of a conversion.
type Step struct {
	Step   string `json:"step"`   // what leads to what: "HLD to HV"
	Basis  Basis  `json:"basis"`  // what it rests on
	Source string `json:"source"` // where that comes from
}

// Leg leads from HV to one other scale on the metals of some tables.
type Leg struct {
	Scale    Scale
	Method   string                  // the scale with its test force, where one is known: "HBW 10/3000"
	curve    curve.Curve             // from HV
	steps    func(hv float64) []Step // how a value comes about
	standard func(hv, value, slope float64) float64
	gap      bridge // where two tables were joined; zero if none were
}

// Value is a converted value.
type Value struct {
	Value    float64 // in the leg's scale
	Slope    float64 // its change per HV, there
	Standard float64 // standard uncertainty of the leg alone, in the leg's scale
}

// Domain returns the least and the greatest HV that the leg serves.
func (l Leg) Domain() (lo, hi float64) { return l.curve.Domain() }

// At converts hv, or answers a *curve.OutsideError in HV.
func (l Leg) At(hv float64) (Value, error) {
	value, err := l.curve.At(hv)
	if err != nil {
		return Value{}, err
	}
	slope, err := l.curve.Slope(hv)
	if err != nil {
		return Value{}, err
	}
	slope = l.gap.steepen(hv, hv, slope)
	return Value{Value: value, Slope: slope, Standard: l.standard(hv, value, slope)}, nil
}

// Carry returns the change of the value per HV that carries a standard
// uncertainty u of hv, in HV, over the leg.
func (l Leg) Carry(hv, u float64) (float64, error) {
	slope, err := curve.MeanSlope(l.curve, hv, u)
	return l.gap.steepen(hv-u, hv+u, slope), err
}

// Steps says how a value comes about at hv.
func (l Leg) Steps(hv float64) []Step { return l.steps(hv) }

// LegSource names where the uncertainty of a second leg comes from.
const LegSource = "Rounding and disagreement of the published tables, or an estimate where one table stands alone"

// Span returns the least and the greatest value of the leg between two
// hardnesses in HV. ok is false where the leg serves nothing between them.
func (l Leg) Span(from, to float64) (lo, hi float64, ok bool) {
	part, err := curve.Narrow(l.curve, from, to)
	if err != nil {
		return math.NaN(), math.NaN(), false
	}
	lo, hi = curve.Values(part)
	return lo, hi, true
}

// ToItself is the leg from HV to HV between two hardnesses: it changes nothing
// and adds no uncertainty.
func ToItself(hv Scale, lo, hi float64) Leg {
	return Leg{
		Scale: hv, Method: string(hv.Key),
		curve: curve.Law{
			Lo: lo, Hi: hi,
			Value:      func(hv float64) float64 { return hv },
			Derivative: func(float64) float64 { return 1 },
		},
		steps:    func(float64) []Step { return nil },
		standard: func(_, _, _ float64) float64 { return 0 },
	}
}

// Back is a leg taken the other way, from its scale to HV. It is a
// curve.Curve.
type Back struct {
	leg  Leg
	part curve.Narrowed
}

// Back turns the leg round, between two hardnesses in HV. It answers a
// *curve.OutsideError where the leg serves nothing between them.
func (l Leg) Back(from, to float64) (Back, error) {
	part, err := curve.Narrow(l.curve, from, to)
	return Back{leg: l, part: part}, err
}

// Domain implements curve.Curve, in the leg's scale.
func (b Back) Domain() (lo, hi float64) { return curve.Values(b.part) }

// At implements curve.Curve: the hardness in HV of a value.
func (b Back) At(value float64) (float64, error) { return b.part.Inverse(value) }

// Slope implements curve.Curve: the change in HV per unit of the scale.
func (b Back) Slope(value float64) (float64, error) {
	hv, err := b.At(value)
	if err != nil {
		return math.NaN(), err
	}
	v, err := b.leg.At(hv)
	return 1 / v.Slope, err
}

// Inverse implements curve.Curve: the value of a hardness in HV.
func (b Back) Inverse(hv float64) (float64, error) { return b.part.At(hv) }

// Steps says how hv comes about from a value.
func (b Back) Steps(hv float64) []Step {
	steps := slices.Clone(b.leg.Steps(hv))
	slices.Reverse(steps)
	for i, s := range steps {
		from, to, _ := strings.Cut(s.Step, " to ")
		steps[i].Step = to + " to " + from
	}
	return steps
}

// austenitic is the key by which a metal group asks for the conversion that
// ASTM E140 gives austenitic steel as a formula, not as a table.
const austenitic = "e140-austenitic"

// Legs returns the legs of a metal group, in the order the scales are shown. A
// group without published tables has Brinell by similarity.
func Legs(g metal.Group) []Leg {
	legs, ok := legsOf[g.Key]
	if !ok {
		return nil
	}
	return legs()
}

// legsOf makes, at their first use, the legs of each group.
var legsOf = func() map[string]func() []Leg {
	all := make(map[string]func() []Leg)
	for _, g := range metal.All() {
		all[g.Key] = sync.OnceValue(func() []Leg { return makeLegs(g.Tables) })
	}
	return all
}()

// makeLegs panics on tables that make no curve: they are part of the program.
func makeLegs(tables []string) []Leg {
	var legs []Leg
	for _, s := range Converted() {
		var leg Leg
		var err error
		switch columns := find(s.Key, tables); {
		case len(columns) > 0:
			leg, err = tableLeg(s, columns)
		case s.Key == HBW:
			leg = similarityLeg(s)
		case s.Key == HRB && slices.Contains(tables, austenitic):
			leg, err = austeniticLeg(s)
		default:
			continue
		}
		if err != nil {
			panic(fmt.Errorf("the leg from HV to %s by %v: %w", s.Key, tables, err))
		}
		legs = append(legs, leg)
	}
	return legs
}

// tableLeg makes a leg from the columns of one scale.
func tableLeg(s Scale, columns []published) (Leg, error) {
	leg := Leg{Scale: s, Method: columns[0].method, steps: only(columns[0])}
	if leg.Method == "" {
		leg.Method = string(s.Key)
	}
	through := columns[0].curve
	if len(columns) > 1 && columns[1].table == "e140-2" {
		var err error
		if through, leg.gap, err = join(columns[1], columns[0]); err != nil {
			return Leg{}, err
		}
		leg.steps = acrossJoin(columns[1], columns[0], leg.gap)
	}
	narrowed, err := within(through, s)
	if err != nil {
		return Leg{}, err
	}
	leg.curve = narrowed
	if slices.Contains(steelTables, columns[0].table) {
		rivals := find(s.Key, steelTables)
		leg.standard = func(hv, value, slope float64) float64 {
			return rivalry(rivals, hv, value, slope)
		}
	} else {
		leg.standard = func(_, value, _ float64) float64 { return aloneShare * value }
	}
	return leg, nil
}

// within narrows a rising curve from HV to the range of its scale.
func within(c curve.Curve, s Scale) (curve.Narrowed, error) {
	lo, hi := c.Domain()
	least, greatest := curve.Values(c)
	var err error
	if s.Lo > least {
		if lo, err = c.Inverse(s.Lo); err != nil {
			return curve.Narrowed{}, err
		}
	}
	if s.Hi < greatest {
		if hi, err = c.Inverse(s.Hi); err != nil {
			return curve.Narrowed{}, err
		}
	}
	return curve.Narrow(c, lo, hi)
}

// bridge is where a joined curve follows neither of its two tables alone.
type bridge struct {
	lo, hi float64 // HV: up to lo the lower table stands, from hi on the upper one
	slope  float64 // the steeper of the two tables' slopes beside the gap
}

// steepen returns the slope that carries an uncertainty between two hardnesses.
// The tables disagree about the level, so the curve runs flat across the gap to
// meet both; either table alone says that the metal does not, and a flat slope
// would make the uncertainty of HV vanish there.
func (b bridge) steepen(from, to, slope float64) float64 {
	if to >= b.lo && from <= b.hi {
		return max(slope, b.slope)
	}
	return slope
}

// join makes one rising curve of two tables that meet. Where they overlap they
// disagree (Table 2 of ASTM E140 puts HBW equal to HV, so that it ends at 240
// HBW, where Table 1 has 228), and a curve that jumped back would give two
// hardnesses to one value. The upper table stands; the points of the lower one
// that reach beyond its beginning are left out.
func join(lower, upper published) (*curve.Table, bridge, error) {
	n := 0
	for n < len(lower.hvs) && lower.hvs[n] < upper.hvs[0] && lower.values[n] < upper.values[0] {
		n++
	}
	if n < 2 {
		return nil, bridge{}, fmt.Errorf("%s has no two points below %s", lower.title(), upper.title())
	}
	joined, err := curve.NewTable(
		append(slices.Clone(lower.hvs[:n]), upper.hvs...),
		append(slices.Clone(lower.values[:n]), upper.values...))
	between := func(p published, i int) float64 {
		return (p.values[i+1] - p.values[i]) / (p.hvs[i+1] - p.hvs[i])
	}
	// The cubic feels the gap one point further on either side.
	return joined, bridge{
		lo:    lower.hvs[n-2],
		hi:    upper.hvs[1],
		slope: max(between(lower, n-2), between(upper, 0)),
	}, err
}

func fromHV(to Key) string { return "HV to " + string(to) }

func only(p published) func(float64) []Step {
	return func(float64) []Step { return []Step{{fromHV(p.scale), Standard, p.source}} }
}

func acrossJoin(lower, upper published, gap bridge) func(float64) []Step {
	return func(hv float64) []Step {
		switch {
		case hv <= gap.lo:
			return only(lower)(hv)
		case hv >= gap.hi:
			return only(upper)(hv)
		}
		return []Step{{fromHV(upper.scale), Standard,
			"Across the join of " + lower.title() + " and " + upper.title() + ", which disagree there." + fromMemory}}
	}
}

// rivalry is the standard uncertainty of a leg that several standards speak
// of: the larger of half the rounding step and the distance between the
// standards, each a half-width or a range taken as rectangular.
func rivalry(rivals []published, hv, value, slope float64) float64 {
	const hvStep = 1 // the tables' HV is rounded to it
	step := hvStep * math.Abs(slope)
	least, greatest := value, value
	for _, r := range rivals {
		other, err := r.curve.At(hv)
		if err != nil {
			continue // the rival does not reach here
		}
		step = max(step, r.step)
		least, greatest = min(least, other), max(greatest, other)
	}
	return max(step/2, greatest-least) / math.Sqrt(3)
}

const (
	// aloneShare is the relative standard uncertainty of a table that no other
	// standard can be held against (estimate).
	aloneShare = 0.015

	// Vickers and Brinell are both mean pressures under a well-developed
	// impression: HBW = 0.97 HV, with a standard uncertainty of 3 % (common
	// practice, no source; ISO 18265 puts the ratio at 0.95, ASTM E140 at 1.00).
	similarRatio       = 0.97
	similarUncertainty = 0.03
	similarLo          = 40.0 // HBW
	similarHi          = 450.0

	// ASTM E140 for austenitic steel: 1/HBW = perHBW (pivot - HRB), HRB 60..100.
	austeniticPerHBW = 0.0001304
	austeniticPivot  = 130.0
	austeniticLo     = 60.0 // HRB
	austeniticHi     = 100.0
)

var similarStep = Step{fromHV(HBW), Similar,
	"Likeness of Vickers and Brinell, HBW = 0.97 HV within 3 % (common practice, no source): no published table carries this metal"}

func similarityLeg(s Scale) Leg {
	return Leg{
		Scale:  s,
		Method: string(s.Key),
		curve: curve.Law{
			Lo: similarLo / similarRatio, Hi: similarHi / similarRatio,
			Value:      func(hv float64) float64 { return similarRatio * hv },
			Derivative: func(float64) float64 { return similarRatio },
		},
		steps:    func(float64) []Step { return []Step{similarStep} },
		standard: func(_, value, _ float64) float64 { return similarUncertainty * value },
	}
}

// austeniticLeg leads to HRB over the Brinell hardness that similarity gives.
func austeniticLeg(s Scale) (Leg, error) {
	hvAt := func(hrb float64) float64 {
		return 1 / (austeniticPerHBW * (austeniticPivot - hrb)) / similarRatio
	}
	law := curve.Law{
		Lo: hvAt(austeniticLo), Hi: hvAt(austeniticHi),
		Value:      func(hv float64) float64 { return austeniticPivot - 1/(austeniticPerHBW*similarRatio*hv) },
		Derivative: func(hv float64) float64 { return 1 / (austeniticPerHBW * similarRatio * hv * hv) },
	}
	narrowed, err := within(law, s)
	return Leg{
		Scale:  s,
		Method: string(s.Key),
		curve:  narrowed,
		steps: func(float64) []Step {
			return []Step{similarStep, {"HBW to HRB", Standard,
				"ASTM E140, austenitic stainless steel, by formula." + fromMemory}}
		},
		standard: func(hv, value, slope float64) float64 {
			return math.Hypot(aloneShare*value, slope*similarUncertainty*hv)
		},
	}, err
}
