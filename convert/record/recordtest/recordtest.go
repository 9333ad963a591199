// Package recordtest makes records for the tests of what takes them, and
// compares them.
package recordtest

import (
	"math"
	"math/rand/v2"
	"reflect"
	"time"

	"strikebook/convert/device"
	"strikebook/convert/metal"
	"strikebook/convert/owncurve"
	"strikebook/convert/record"
	"strikebook/convert/scale"
	"strikebook/convert/verdict"
)

// Random returns a valid record, made so that it comes back from its JSON
// unchanged. Any field may be filled, with the ordinary and with
// what is seldom typed; any that a record may leave open is often left open. It
// need not make sense as a measurement. Equal generators make equal records.
func Random(rng *rand.Rand) record.Record {
	r := record.Record{
		V:                record.Version,
		ID:               maybe(rng, text),
		Label:            maybe(rng, text),
		Job:              maybe(rng, text),
		Taken:            maybe(rng, moment),
		By:               maybe(rng, text),
		Notes:            maybe(rng, text),
		Zone:             pick(rng, "", record.Base, record.HAZ, record.Weld, record.Other),
		PositionMm:       maybe(rng, quantity),
		Serial:           maybe(rng, text),
		Direction:        pick(rng, append(device.Directions(), "")...),
		Group:            maybe(rng, func(rng *rand.Rand) string { return pick(rng, metal.All()...).Key }),
		Readings:         list(rng, reading),
		Piece:            maybe(rng, piece),
		Block:            maybe(rng, block),
		Limit:            maybe(rng, limit),
		Curve:            maybe(rng, Curve),
		PermissibleError: maybe(rng, quantity),
		Confidence:       pick(rng, 0, record.LeastConfidence, 0.68, record.DefaultConfidence, record.GreatestConfidence),
	}
	r.Device, r.Scale = instrument(rng)
	return r
}

// Equal reports whether two records hold the same. reflect.DeepEqual alone will
// not do: what is no number has the value NaN, which equals nothing, and an
// empty list may be nil.
func Equal(a, b record.Record) bool { return reflect.DeepEqual(plain(a), plain(b)) }

// plain returns the record without NaN and without a list that is empty but
// not nil.
func plain(r record.Record) record.Record {
	r.Readings = append([]record.Reading(nil), r.Readings...)
	for i := range r.Readings {
		withoutNaN(&r.Readings[i].Value)
	}
	if r.Block != nil {
		b := *r.Block
		b.Readings = append([]record.Number(nil), b.Readings...)
		for i := range b.Readings {
			withoutNaN(&b.Readings[i])
		}
		r.Block = &b
	}
	return r
}

// withoutNaN puts infinity, which no record holds, in the place of NaN.
func withoutNaN(n *record.Number) {
	if math.IsNaN(n.Value) {
		n.Value = math.Inf(1)
	}
}

func pick[T any](rng *rand.Rand, choices ...T) T { return choices[rng.IntN(len(choices))] }

// maybe makes something, or leaves it open.
func maybe[T any](rng *rand.Rand, create func(*rand.Rand) T) (v T) {
	if rng.IntN(3) > 0 {
		v = create(rng)
	}
	return v
}

// list makes a list of up to seven.
func list[T any](rng *rand.Rand, create func(*rand.Rand) T) []T {
	all := []T{}
	for range rng.IntN(8) {
		all = append(all, create(rng))
	}
	return all
}

// characters are what a text is made of: letters, and all that JSON, HTML and
// URLs treat in their own way.
var characters = []rune("abc XYZ 019 .,;:-+%#?&=/\\\"'`<>{}[]()|~" +
	"\x00\x01\b\t\n\v\f\r\x1f\x7f\u0085\u00a0\u200b\u2028\u2029\ufeff\ufffd" +
	"äßéøłŽ°½µ±≈–…€∅硬度पि😀𝛔")

func text(rng *rand.Rand) string {
	var runes []rune
	for range 1 + rng.IntN(40) {
		runes = append(runes, pick(rng, characters...))
	}
	return string(runes)
}

func moment(rng *rand.Rand) string {
	const year2100 = 4102444800 // seconds since 1970
	var nanoseconds int64
	if rng.IntN(4) == 0 {
		nanoseconds = rng.Int64N(1e9)
	}
	minutes := pick(rng, 0, 60, -300, 345, rng.IntN(2*24*60-1)-(24*60-1))
	return time.Unix(rng.Int64N(year2100), nanoseconds).In(time.FixedZone("", minutes*60)).Format(time.RFC3339Nano)
}

// instrument makes a device and a scale that go together.
func instrument(rng *rand.Rand) (string, scale.Key) {
	d := pick(rng, device.All()...)
	direct := pick(rng, scale.HV, scale.HBW, scale.HRC, scale.HRB)
	switch rng.IntN(6) {
	case 0:
		return d.Key, ""
	case 1:
		return "", scale.Key(d.Scale)
	case 2:
		return d.Key, scale.Key(d.Scale)
	case 3:
		return d.Key, direct
	case 4:
		return "", direct
	}
	return "", ""
}

func reading(rng *rand.Rand) record.Reading {
	r := record.Reading{Value: number(rng)}
	if rng.IntN(4) == 0 {
		r.Struck = text(rng)
	}
	return r
}

// number makes a number as it was typed: mostly a reading, else any number,
// nothing, or text that is no number.
func number(rng *rand.Rand) record.Number {
	switch rng.IntN(8) {
	case 0:
		return record.Num(extreme(rng))
	case 1:
		return record.Number{Value: math.NaN()}
	case 2:
		return record.Number{Value: math.NaN(), Text: pick(rng, " ", "6l2", "61o", "1e400", "0x1p4", "６１０", "6 12", "1,2,3", "-", "NaN", "about "+text(rng))}
	}
	return record.Num(tenths(rng, 1000))
}

// tenths makes a number from 0 to most with one decimal.
func tenths(rng *rand.Rand, most float64) float64 { return math.Round(rng.Float64()*most*10) / 10 }

// extreme makes a finite number of any size.
func extreme(rng *rand.Rand) float64 {
	for {
		if v := math.Float64frombits(rng.Uint64()); !math.IsNaN(v) && !math.IsInf(v, 0) {
			return v
		}
	}
}

// quantity makes the size of something.
func quantity(rng *rand.Rand) *float64 {
	v := tenths(rng, pick(rng, 10.0, 1000))
	if rng.IntN(8) == 0 {
		v = extreme(rng)
	}
	return &v
}

func piece(rng *rand.Rand) *device.Piece {
	return &device.Piece{
		MassKg:       maybe(rng, quantity),
		ThicknessMm:  maybe(rng, quantity),
		RadiusMm:     maybe(rng, quantity),
		RaUm:         maybe(rng, quantity),
		TemperatureC: maybe(rng, quantity),
		Support:      pick(rng, "", device.Free, device.Supported, device.Coupled),
		CaseMm:       maybe(rng, quantity),
		SpacingMm:    maybe(rng, quantity),
		EdgeMm:       maybe(rng, quantity),
		Shape:        maybe(rng, shape),
	}
}

func shape(rng *rand.Rand) *device.Shape {
	return &device.Shape{
		Kind:            pick(rng, "", device.Plate, device.Pipe, device.Bar, device.NoShape),
		LengthMm:        maybe(rng, quantity),
		WidthMm:         maybe(rng, quantity),
		OuterDiameterMm: maybe(rng, quantity),
		WallMm:          maybe(rng, quantity),
	}
}

func block(rng *rand.Rand) *record.Block {
	return &record.Block{
		Certified: maybe(rng, quantity),
		ExpandedU: maybe(rng, quantity),
		Readings:  list(rng, number),
		Tolerance: maybe(rng, quantity),
		Taken:     maybe(rng, moment),
		Use:       pick(rng, "", record.AsUncertainty, record.AsCorrection),
	}
}

func limit(rng *rand.Rand) *verdict.Limit {
	choices := []scale.Key{""}
	for _, d := range device.All() {
		choices = append(choices, scale.Key(d.Scale))
	}
	for _, s := range scale.Converted() {
		choices = append(choices, s.Key)
	}
	return &verdict.Limit{
		Scale: pick(rng, choices...),
		Min:   maybe(rng, quantity),
		Max:   maybe(rng, quantity),
		Rule:  pick(rng, append(verdict.Rules(), "")...),
	}
}

// Curve makes a valid own curve, with or without what came of it. It rises, but
// need not make sense.
func Curve(rng *rand.Rand) *owncurve.Curve {
	for {
		d := Definition(rng)
		if err := d.Check(""); err != nil {
			continue // what was rounded may lie just outside
		}
		if fitted, err := owncurve.Make(d); err == nil && rng.IntN(2) == 0 {
			return fitted.Curve()
		}
		return &owncurve.Curve{Definition: d}
	}
}

// Definition makes what a curve is made of, nearly always valid.
func Definition(rng *rand.Rand) owncurve.Definition {
	body, g := pick(rng, device.All()...), pick(rng, metal.All()...)
	d := owncurve.Definition{
		Name: maybe(rng, text), Device: body.Key, Group: g.Key, Scale: scale.HV, Source: maybe(rng, text), Serial: maybe(rng, text),
		Date: maybe(rng, date), Kind: pick(rng, owncurve.Anchor, owncurve.Own, owncurve.Table, ""),
	}
	lo, hi := g.Lo, g.Hi
	if leg := pick(rng, scale.Legs(g)...); rng.IntN(2) == 0 {
		if least, greatest, ok := leg.Span(g.Lo, g.Hi); ok {
			d.Scale, lo, hi = leg.Scale.Key, least, greatest
		}
	}
	n := 5 + rng.IntN(8)
	switch {
	case d.Kind == owncurve.Anchor, d.Kind == "" && rng.IntN(2) == 0:
		n = 1 + rng.IntN(4)
	case d.Kind == owncurve.Table:
		d.UPercent, d.Source = 0.1+tenths(rng, 5), text(rng)
	}
	noise := pick(rng, 0.0, 0.5, 3)
	for i := range n {
		share := (float64(i) + 0.8*rng.Float64()) / float64(n)
		p := owncurve.Pair{UHL: tenths(rng, 4), UValue: 0.1 + tenths(rng, 4), Label: maybe(rng, text), Date: maybe(rng, date)}
		p.HL = math.Round(10*(body.Lo+share*(body.Hi-body.Lo))) / 10
		p.Value = math.Round(10*(lo+share*(hi-lo))) / 10
		if d.Kind != owncurve.Table {
			p.Value = math.Round(10*min(hi, max(lo, p.Value+noise*p.UValue*rng.NormFloat64()))) / 10
		}
		if rng.IntN(8) == 0 {
			p.Readings = []float64{p.HL, p.HL - 1, p.HL + 1}
		}
		d.Pairs = append(d.Pairs, p)
	}
	rng.Shuffle(n, func(i, j int) { d.Pairs[i], d.Pairs[j] = d.Pairs[j], d.Pairs[i] })
	return d
}

func date(rng *rand.Rand) string { return moment(rng)[:len("2026-12-01")] }
