package convert

import (
	"math"
	"strconv"
	"strings"

	"strikebook/convert/device"
	"strikebook/convert/wording"
)

// checkPiece says whether the spot may be tested with the device at all.
func (e *evaluation) checkPiece() {
	p := e.record.Piece
	m := p.Measures(e.group.Density)
	e.sheet.Piece = TestPiece{
		MassKg: number(m.Mass.Value), MassComputed: m.MassComputed,
		ThicknessMm: number(m.Thickness.Value), RadiusMm: number(m.Radius.Value),
	}
	if !e.brief {
		for _, d := range device.All() {
			e.sheet.Devices = append(e.sheet.Devices, fitOf(d, m))
		}
	}
	for _, bad := range p.BadQuantities() {
		e.find("bad-quantity", bad.Field, wording.Params{
			"path": bad.Field, "got": asTyped(bad.Got), "lo": bad.Lo, "hi": bad.Hi})
	}
	if e.device.Key == "" {
		return // a direct method, which asks for other things
	}
	for _, s := range e.device.Shortfalls(m) {
		e.findShortfall(s, m)
	}
	if s, ok := m.TemperatureShortfall(); ok {
		e.findShortfall(s, m)
	}
	if values, _ := e.record.Counting(); len(values) > 0 && !p.Stated() {
		e.find("piece-not-stated", "piece", e.needs())
	}
}

// fitOf says how a device and a test piece go together.
func fitOf(d device.Device, m device.Measures) DeviceFit {
	shortfalls := []device.ShortfallKind{}
	for _, s := range d.Shortfalls(m) {
		shortfalls = append(shortfalls, s.Kind)
	}
	return DeviceFit{Device: d.Key, Suits: len(shortfalls) == 0, Shortfalls: shortfalls, Curve: d.BuiltInCurve}
}

// findShortfall adds the finding of a requirement that is not met.
func (e *evaluation) findShortfall(s device.Shortfall, m device.Measures) {
	have := shortOf(s.Have, s.Need)
	params := e.needs()
	params["have"], params["need"], params["by"] = have, s.Need, thousandths(math.Abs(s.Need-have))
	if s.Kind == device.TemperatureOutside {
		params["lo"], params["hi"] = device.LeastTemperature, device.GreatestTemperature
	} else {
		params["support"], params["devices"] = string(m.Support), listed(device.WouldDo(m, s.Kind))
	}
	e.find(string(s.Kind), s.Field, params)
}

// needs are the device and what it requires of the test piece, as parameters.
func (e *evaluation) needs() wording.Params {
	r := e.device.Requirements
	return wording.Params{
		"device": e.device.Key,
		"free":   r.MassFreeKg, "supported": r.MassSupportedKg, "coupled": r.MassCoupledKg, // kg
		"uncoupledThickness": r.ThicknessUncoupledMm, "coupledThickness": r.ThicknessCoupledMm, // mm
		"ra": r.RaUm, "radius": r.RadiusMm, "spacing": r.SpacingMm, "edge": r.EdgeMm, // µm, mm
	}
}

// listed joins the keys of devices: "D, DC". A dash stands for none, in every
// language.
func listed(devices []device.Device) string {
	if len(devices) == 0 {
		return "–"
	}
	keys := make([]string, len(devices))
	for i, d := range devices {
		keys[i] = d.Key
	}
	return strings.Join(keys, ", ")
}

// shortOf rounds what there is to thousandths, but never so that it seems to
// meet the need: 4.9999 kg is short of 5 kg.
func shortOf(have, need float64) float64 {
	shown := thousandths(have)
	switch {
	case have < need && shown >= need:
		return thousandths(need - 0.001)
	case have > need && shown <= need:
		return thousandths(need + 0.001)
	}
	return shown
}

func thousandths(v float64) float64 { return math.Round(v*1000)/1000 + 0 } // + 0: never -0

// asTyped is a quantity as it is quoted in a sentence.
func asTyped(v float64) string {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return "no number"
	}
	return strconv.FormatFloat(v, 'g', -1, 64)
}
