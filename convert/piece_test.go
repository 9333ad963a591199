package convert_test

import (
	"math"
	"regexp"
	"slices"
	"strings"
	"testing"

	"strikebook/convert"
	"strikebook/convert/device"
	"strikebook/convert/record"
	"strikebook/convert/scale"
	"strikebook/convert/strict"
	"strikebook/convert/wording"
)

// on is three good readings on a test piece.
func on(deviceKey string, p *device.Piece) record.Record {
	r := taken(deviceKey, "low-alloy-steel", 610, 612, 614)
	r.Piece = p
	return r
}

func pipe(diameter, wall, length float64) *device.Shape {
	return &device.Shape{Kind: device.Pipe, OuterDiameterMm: &diameter, WallMm: &wall, LengthMm: &length}
}

func TestPieceFindings(t *testing.T) {
	directed := direct(scale.HRC, 30.5, 31, 30.8)
	directed.Piece = &device.Piece{MassKg: new(0.1), ThicknessMm: new(-1.0), TemperatureC: new(60.0)}
	noDevice := on("", &device.Piece{MassKg: new(0.1)})
	noReadings := on("D", nil)
	noReadings.Readings = nil
	light := on("D", &device.Piece{MassKg: new(0.1)})
	light.Readings = light.Readings[:1]
	noMetal := on("D", &device.Piece{Shape: pipe(20, 2, 100)})
	noMetal.Group = ""
	for _, c := range []struct {
		name   string
		record record.Record
		want   string // codes of the piece with their fields, in order
	}{
		{"massive", on("D", massive()), ""},
		{"light", on("D", &device.Piece{MassKg: new(4.9)}), "piece-too-light piece.mass_kg"},
		{"light, supported", on("D", &device.Piece{MassKg: new(4.9), Support: device.Supported}), ""},
		{"light by its shape", on("D", &device.Piece{Support: device.Coupled, Shape: &device.Shape{Kind: device.Bar, OuterDiameterMm: new(10.0), LengthMm: new(50.0)}}),
			"piece-too-light piece.shape, radius-too-small piece.shape.outer_diameter_mm"},
		{"no density without a metal", noMetal, "wall-too-thin piece.shape.wall_mm, radius-too-small piece.shape.outer_diameter_mm"},
		{"thin", on("C", &device.Piece{ThicknessMm: new(14.0)}), "piece-too-thin piece.thickness_mm"},
		{"thin wall of a heavy pipe", on("D", &device.Piece{Shape: pipe(1000, 12, 6000)}), "wall-too-thin piece.shape.wall_mm"},
		{"thin case", on("D", &device.Piece{CaseMm: new(0.5)}), "case-too-thin piece.case_mm"},
		{"surface", on("D", &device.Piece{RaUm: new(3.2), RadiusMm: new(20.0), SpacingMm: new(2.0), EdgeMm: new(4.0)}),
			"surface-too-rough piece.ra_um, radius-too-small piece.radius_mm, spacing-too-close piece.spacing_mm, edge-too-near piece.edge_mm"},
		{"hot", on("D", &device.Piece{TemperatureC: new(45.0)}), "temperature-outside piece.temperature_c"},
		{"cold", on("D", &device.Piece{TemperatureC: new(-5.0)}), "temperature-outside piece.temperature_c"},
		{"bad mass", on("D", &device.Piece{MassKg: new(0.0)}), "bad-quantity piece.mass_kg"},
		{"bad wall", on("D", &device.Piece{Shape: pipe(60, 31, 1000)}), "bad-quantity piece.shape.wall_mm"},
		{"below absolute zero", on("D", &device.Piece{TemperatureC: new(-300.0)}), "bad-quantity piece.temperature_c"},
		{"not stated", on("D", nil), "piece-not-stated piece"},
		{"only the support", on("D", &device.Piece{Support: device.Free}), "piece-not-stated piece"},
		{"not stated, no readings", noReadings, ""},
		{"the piece comes first", light, "piece-too-light piece.mass_kg"},
		{"direct method", directed, "bad-quantity piece.thickness_mm"},
		{"no device", noDevice, ""},
	} {
		t.Run(c.name, func(t *testing.T) {
			sheet := mustEvaluate(t, c.record)
			var got []string
			for i, f := range sheet.Findings {
				checkSentences(t, f)
				if !strings.HasPrefix(f.Field, "piece") {
					continue
				}
				if got = append(got, f.Code+" "+f.Field); len(got) != i+1 {
					t.Errorf("%s comes after findings that are not of the piece: %v", f.Code, codes(sheet))
				}
			}
			if got := strings.Join(got, ", "); got != c.want {
				t.Errorf("findings %q, want %q", got, c.want)
			}
			if noMass := sheet.Piece.MassKg == nil; noMass && sheet.Piece.MassComputed {
				t.Error("a mass is computed and not there")
			}
		})
	}
}

// checkSentences makes sure that a finding says whole sentences.
func checkSentences(t testing.TB, f convert.Finding) {
	t.Helper()
	for what, sentence := range map[string]string{"message": f.Message, "remedy": f.Remedy, "source": f.Source} {
		if sentence == "" || strings.ContainsAny(sentence, "{}<>") || noNumber.MatchString(sentence) {
			t.Errorf("%s: %s %q", f.Code, what, sentence)
		}
	}
	if _, err := strict.Marshal(f); err != nil {
		t.Errorf("%s: %v", f.Code, err)
	}
}

var noNumber = regexp.MustCompile(`NaN|Inf|nil|%!`)

func TestPieceSentences(t *testing.T) {
	for _, c := range []struct {
		record          record.Record
		message, remedy string
	}{
		{on("D", &device.Piece{MassKg: new(3.2)}),
			"The test piece weighs 3.2 kg, 1.8 kg less than the 5 kg that device D needs of a piece that lies as this one does.",
			"Support it better if that is enough: device D needs 5 kg of a free piece, 2 kg on a solid support, 0.05 kg coupled to a solid plate. Devices for such a piece as it lies: C; if none is named, use a direct portable method."},
		{on("C", &device.Piece{ThicknessMm: new(14.99999)}), // never said to be as thick as it has to be
			"The test piece is 14.999 mm thick, 0.001 mm less than the 15 mm that device C needs of a piece that lies as this one does.",
			"Couple it to a backing plate if that is enough: device C needs 15 mm uncoupled, 1 mm coupled. Devices for such a piece as it lies: –; if none is named, use a direct portable method."},
		{on("D", &device.Piece{RaUm: new(2.0000001)}),
			"The surface has a roughness Ra of 2.001 µm, 0.001 µm more than the 2 µm that device D allows.",
			"Grind the spot to Ra 2 µm or finer, without heating it. Devices that allow it as it is: G."},
		{on("D", &device.Piece{TemperatureC: new(-0.0004)}),
			"The test piece is at 0 °C, 4 °C outside 4 to 38 °C, for which readings are good.",
			"Let the piece reach 4 to 38 °C before testing. The ambient temperature ought to be 10 to 35 °C as well."},
		{on("D", &device.Piece{Shape: pipe(60, 31, 1000)}),
			"The field piece.shape.wall_mm must lie above 0 and not above 30, but it is 31.",
			"Correct it, or leave it empty where it is not known."},
		{on("G", nil),
			"The test piece is not stated, so that its requirements are not checked: device G needs 15 kg (5 kg on a solid support, 0.5 kg coupled to a solid plate), 70 mm of thickness (10 mm coupled), Ra 7 µm or finer, a radius of 50 mm, 4 mm between impressions and 8 mm to an edge.",
			"State what is known of the piece, at least its mass and thickness."},
	} {
		f := mustEvaluate(t, c.record).Findings[0]
		if f.Message != c.message || f.Remedy != c.remedy {
			t.Errorf("%s says\n%s\n%s\nwant\n%s\n%s", f.Code, f.Message, f.Remedy, c.message, c.remedy)
		}
	}
}

// What the spot cannot be prepared for is wrong by an unknown amount, and
// stops; what it can be prepared for is marked.
func TestLevelsOfShortfalls(t *testing.T) {
	for _, kind := range []device.ShortfallKind{device.TooLight, device.TooThin, device.WallTooThin, device.CaseTooThin,
		device.TooRough, device.RadiusTooSmall, device.SpacingTooClose, device.EdgeTooNear, device.TemperatureOutside} {
		want := wording.Stop
		if kind.Mendable() {
			want = wording.Warn
		}
		if got := wording.Say(string(kind), nil).Kind; got != want {
			t.Errorf("%s is a %s, want a %s", kind, got, want)
		}
	}
}

func TestNoConvertedValueUnderAStop(t *testing.T) {
	for _, p := range []*device.Piece{
		{MassKg: new(1.0)}, {ThicknessMm: new(10.0)}, {Shape: pipe(500, 5, 6000)}, {CaseMm: new(0.3)}, {EdgeMm: new(-1.0)},
	} {
		sheet := mustEvaluate(t, on("D", p))
		for _, row := range sheet.Scales {
			if own := row.Scale == "HLD"; own != (row.Value != nil) {
				t.Errorf("%s: %s has the value %v", codes(sheet), row.Scale, row.Value)
			}
		}
	}
	warned := mustEvaluate(t, on("D", &device.Piece{RaUm: new(3.2), TemperatureC: new(50.0)}))
	if rowOf(t, warned, scale.HBW).Value == nil || warned.Findings[0].Level != wording.Warn {
		t.Errorf("a warning withholds the value: %v", codes(warned))
	}
}

func TestSheetPiece(t *testing.T) {
	sheet := mustEvaluate(t, on("D", &device.Piece{Shape: pipe(168.3, 7.11, 1000)}))
	p := sheet.Piece
	if !p.MassComputed || math.Abs(*p.MassKg-28.26) > 0.01 || *p.ThicknessMm != 7.11 || *p.RadiusMm != 84.15 {
		t.Errorf("%g kg (computed: %t), %g mm thick, radius %g mm", *p.MassKg, p.MassComputed, *p.ThicknessMm, *p.RadiusMm)
	}
	if p := mustEvaluate(t, on("D", nil)).Piece; p != (convert.TestPiece{}) {
		t.Errorf("of nothing: %+v", p)
	}
}

// The devices are listed before there is a device, a metal or a reading.
func TestSheetDevices(t *testing.T) {
	sheet := mustEvaluate(t, record.Record{V: record.Version, Piece: &device.Piece{
		MassKg: new(3.0), RaUm: new(1.6), TemperatureC: new(60.0)}})
	want := map[string]string{"C": "surface-too-rough"} // temperature is the same for all
	if len(sheet.Devices) != len(device.All()) {
		t.Fatalf("%d devices", len(sheet.Devices))
	}
	for i, d := range device.All() {
		fit := sheet.Devices[i]
		short, ok := want[d.Key]
		if !ok {
			short = "piece-too-light"
		}
		if fit.Device != d.Key || fit.Suits || fit.Curve != (d.Key != "DL") || len(fit.Shortfalls) != 1 || string(fit.Shortfalls[0]) != short {
			t.Errorf("%s: %+v, want %s", d.Key, fit, short)
		}
	}
	for _, fit := range mustEvaluate(t, on("D", massive())).Devices {
		if !fit.Suits || fit.Shortfalls == nil || len(fit.Shortfalls) > 0 {
			t.Errorf("a massive piece: %+v", fit)
		}
	}
}

// The findings of a device are the shortfalls that are listed for it.
func TestFindingsMeetTheList(t *testing.T) {
	everySheet(t, func(t *testing.T, r record.Record, sheet convert.Sheet) {
		for _, fit := range sheet.Devices {
			d, _ := device.ByKey(fit.Device)
			if d.Scale != string(sheet.Scale) {
				continue
			}
			for _, kind := range fit.Shortfalls {
				if !slices.Contains(codes(sheet), string(kind)) {
					t.Fatalf("%s is listed and not found: %v", kind, codes(sheet))
				}
			}
		}
	})
}

// FuzzPiece: whatever the piece, there is a sheet, its sentences are whole, and
// a stop withholds.
func FuzzPiece(f *testing.F) {
	nan, inf := math.NaN(), math.Inf(1)
	f.Add(uint8(0), uint8(0), uint8(0), uint16(0), 3.0, 20.0, 25.0, 1.6, 21.0, 0.5, 3.0, 5.0, 100.0, 50.0, 60.0, 5.0)
	f.Add(uint8(7), uint8(3), uint8(2), uint16(0xffff), nan, inf, -inf, 0.0, -300.0, math.Copysign(0, -1), 1e308, 5e-324, 1e308, 1e308, 1e308, 1e308)
	f.Add(uint8(1), uint8(2), uint8(2), uint16(0xfff0), 4.9999999, 24.9999999, 29.9999999, 2.0000001, 38.0000001, 0.79999999, 2.99999999, 4.99999999, 1e7, 1e7, 1e7, 5e6)
	f.Fuzz(func(t *testing.T, deviceIndex, support, kind uint8, stated uint16,
		mass, thickness, radius, ra, temperature, depth, spacing, edge, length, width, diameter, wall float64) {
		bit := 0
		given := func(v float64) *float64 {
			bit++
			if stated>>(bit-1)&1 == 0 {
				return &v
			}
			return nil
		}
		supports := []device.Support{"", device.Free, device.Supported, device.Coupled}
		shapes := []device.ShapeKind{"", device.Plate, device.Pipe, device.Bar, device.NoShape}
		p := &device.Piece{
			MassKg: given(mass), ThicknessMm: given(thickness), RadiusMm: given(radius), RaUm: given(ra),
			TemperatureC: given(temperature), CaseMm: given(depth), SpacingMm: given(spacing), EdgeMm: given(edge),
			Support: supports[int(support)%len(supports)],
			Shape: &device.Shape{
				Kind:     shapes[int(kind)%len(shapes)],
				LengthMm: given(length), WidthMm: given(width), OuterDiameterMm: given(diameter), WallMm: given(wall),
			},
		}
		sheet := mustEvaluate(t, on(device.All()[int(deviceIndex)%len(device.All())].Key, p))
		if _, err := strict.Marshal(sheet); err != nil {
			t.Fatal(err)
		}
		stopped := false
		for _, found := range sheet.Findings {
			checkSentences(t, found)
			stopped = stopped || found.Level == wording.Stop
			if have, ok := found.Params["have"].(float64); ok && found.Params["by"].(float64) <= 0 {
				t.Errorf("%s: %g falls short by %g", found.Code, have, found.Params["by"])
			}
		}
		for _, row := range sheet.Scales {
			if stopped && row.Value != nil && row.Scale != sheet.Scale {
				t.Errorf("%s has a value under a stop", row.Scale)
			}
		}
	})
}
