package convert_test

import (
	"math"
	"math/rand/v2"
	"slices"
	"strings"
	"testing"

	"strikebook/convert"
	"strikebook/convert/device"
	"strikebook/convert/link"
	"strikebook/convert/metal"
	"strikebook/convert/record"
	"strikebook/convert/record/recordtest"
	"strikebook/convert/scale"
	"strikebook/convert/strict"
	"strikebook/convert/wording"
)

// steel is a record of readings taken on low-alloy steel with device D.
func steel(values ...float64) record.Record { return taken("D", "low-alloy-steel", values...) }

func taken(deviceKey, group string, values ...float64) record.Record {
	r := record.Record{V: record.Version, Device: deviceKey, Group: group, Piece: massive()}
	for _, v := range values {
		r.Readings = append(r.Readings, record.Reading{Value: record.Num(v)})
	}
	return r
}

// massive is a test piece that every device may be used on.
func massive() *device.Piece { return &device.Piece{MassKg: new(100.0), ThicknessMm: new(100.0)} }

// direct is a record of readings of a direct method on low-alloy steel.
func direct(key scale.Key, values ...float64) record.Record {
	r := taken("", "low-alloy-steel", values...)
	r.Scale = key
	return r
}

func mustEvaluate(t testing.TB, r record.Record) convert.Sheet {
	t.Helper()
	sheet, err := convert.Evaluate(r)
	if err != nil {
		t.Fatalf("%+v: %v", r, err)
	}
	return sheet
}

func rowOf(t testing.TB, sheet convert.Sheet, key scale.Key) convert.Row {
	t.Helper()
	i := slices.IndexFunc(sheet.Scales, func(r convert.Row) bool { return r.Scale == key })
	if i < 0 {
		t.Fatalf("the sheet has no row %s", key)
	}
	return sheet.Scales[i]
}

// codes are the codes of the findings, but for the one that every record
// without a block check has.
func codes(sheet convert.Sheet) []string {
	var all []string
	for _, f := range sheet.Findings {
		if !strings.HasPrefix(f.Code, "no-block-check") {
			all = append(all, f.Code)
		}
	}
	return all
}

func sheetJSON(t testing.TB, r record.Record) string {
	t.Helper()
	text, err := strict.Marshal(mustEvaluate(t, r))
	if err != nil {
		t.Fatal(err)
	}
	return string(text)
}

// The fact that the model is calibrated to (common practice, no source).
func TestSteelAt610HLD(t *testing.T) {
	sheet := mustEvaluate(t, steel(610, 610, 610))
	if got := rowOf(t, sheet, scale.HBW).Shown; got != "330 HBW (HLD)" {
		t.Errorf("610 HLD on steel is shown as %q, want 330 HBW (HLD)", got)
	}
}

// What a sheet shows of one set of readings. The values are this program's own,
// so that a change of the method or the data cannot pass unseen; the facts they
// rest on are tested where they stand.
func TestShown(t *testing.T) {
	overhead := steel(600, 604, 602)
	overhead.Direction = device.Up
	for _, c := range []struct {
		name   string
		record record.Record
		want   map[scale.Key]string // shown, or the status where there is no value
	}{
		{"steel", steel(612, 608, 615, 610, 611), map[scale.Key]string{
			"HLD": "611 HLD", "HV": "350 HV (HLD)", "HBW": "332 HBW (HLD)", "HRC": "35.5 HRC (HLD)", "HRB": "above", "Rm": "Rm 1125 MPa (HLD)"}},
		{"soft steel", steel(380, 382, 384), map[scale.Key]string{"HRC": "below", "HBW": "119 HBW (HLD)"}},
		{"overhead", overhead, map[scale.Key]string{"HLD": "583 HLD"}},
		{"aluminium", taken("D", "aluminium", 420, 422, 424), map[scale.Key]string{"HRC": "none", "HS": "none", "Rm": "none"}},
		{"no table", taken("D", "titanium", 600, 602, 604), map[scale.Key]string{"HBW": "223 HBW (HLD)", "HRC": "none"}},
		{"direct", direct(scale.HRC, 30.5, 31, 30.8), map[scale.Key]string{"HRC": "30.8 HRC", "HBW": "292 HBW (HRC)"}},
		{"vickers", direct(scale.HV, 240, 250, 245), map[scale.Key]string{"HV": "245 HV"}},
	} {
		t.Run(c.name, func(t *testing.T) {
			sheet := mustEvaluate(t, c.record)
			for key, want := range c.want {
				row := rowOf(t, sheet, key)
				got := row.Shown
				if row.Status != convert.OK {
					got = string(row.Status)
				}
				if got != want {
					t.Errorf("%s is %q, want %q", key, got, want)
				}
			}
		})
	}
}

func TestFindings(t *testing.T) {
	directed := func(r record.Record, d device.Direction) record.Record { r.Direction = d; return r }
	text := steel(610, 612, 614)
	text.Readings[1].Value = record.Number{Value: math.NaN(), Text: "6l2"}
	struckText := steel(610, 612, 614, 611)
	struckText.Readings[1] = record.Reading{Value: record.Number{Value: math.NaN(), Text: "6l2"}, Struck: "typing error"}
	for _, c := range []struct {
		name   string
		record record.Record
		want   string // codes, in order
		field  string // of the first
	}{
		{"clean", steel(610, 612, 614), "", ""},
		{"one reading", steel(610), "too-few-readings", "readings"},
		{"two readings", steel(610, 612), "too-few-readings", "readings"},
		{"no readings", steel(), "too-few-readings", "readings"},
		{"spread at the limit", steel(585.001, 600, 614.999), "", ""},
		{"spread over the limit", steel(584.9, 600, 615.1), "spread-too-wide", "readings"},
		{"wide spread of nine", steel(580, 600, 620, 590, 610, 600, 605, 595, 600), "spread-too-wide", "readings"},
		{"wide spread of ten", steel(580, 600, 620, 590, 610, 600, 605, 595, 600, 602), "", ""},
		{"two alike of three", steel(610, 612, 612), "", ""},
		{"two alike of three, one far off", steel(612, 612, 572), "spread-too-wide suspect-reading", "readings"},
		{"suspect", steel(610, 611, 612, 613, 611, 635), "suspect-reading", "readings[5]"},
		{"text", text, "not-a-reading too-few-readings", "readings[1]"},
		{"struck text", struckText, "", ""},
		{"zero", steel(610, 612, 0), "not-a-reading too-few-readings", "readings[2]"},
		{"negative", steel(610, 612, -3, 611), "not-a-reading", "readings[2]"},
		{"at 1000", steel(1000, 1000, 1000), "outside-device-range", "readings"},
		{"above 1000", steel(610, 612, 614, 1000.1), "not-a-reading", "readings[3]"},
		{"glass", steel(910, 912, 908), "outside-device-range", "readings"},
		{"below the device", steel(290, 291, 292), "outside-device-range", "readings"},
		{"too hard for the metal", taken("D", "aluminium", 700, 702, 704), "outside-metal-range", "readings"},
		{"too soft for the metal", taken("D", "tool-steel", 400, 402, 404), "outside-metal-range", "readings"},
		{"no curve", taken("DL", "low-alloy-steel", 700, 702, 704), "no-curve", "device"},
		{"no metal", taken("D", "", 610, 612, 614), "no-metal", "group"},
		{"no device", taken("", "low-alloy-steel", 610, 612, 614), "no-device", "device"},
		{"neither", taken("", "", 610, 612, 614), "no-device no-metal", "device"},
		{"direction of another device", directed(taken("G", "low-alloy-steel", 510, 512, 514), device.Up), "no-direction-correction", "direction"},
		{"compensated", directed(taken("G", "low-alloy-steel", 510, 512, 514), device.Compensated), "", ""},
		{"direction outside its table", directed(steel(870, 871, 872), device.Level), "direction-outside-table", "direction"},
		{"direct, outside the scale", direct(scale.HRC, 15, 15.2, 15.4), "outside-scale-range", "readings"},
		{"direct, outside the metal", direct(scale.HV, 980, 985, 990), "outside-metal-range", "readings"},
		{"direct, no table", func() record.Record { r := direct(scale.HRC, 30, 31, 30.4); r.Group = "brass"; return r }(), "no-table", "scale"},
	} {
		t.Run(c.name, func(t *testing.T) {
			sheet := mustEvaluate(t, c.record)
			if got := strings.Join(codes(sheet), " "); got != c.want {
				t.Fatalf("findings %q, want %q", got, c.want)
			}
			first, _, _ := strings.Cut(c.want, " ")
			for _, f := range sheet.Findings {
				if f.Code == first && f.Field != c.field {
					t.Errorf("%s names %q, want %q", f.Code, f.Field, c.field)
				}
			}
			for _, f := range sheet.Findings {
				for what, sentence := range map[string]string{"message": f.Message, "remedy": f.Remedy, "source": f.Source} {
					if sentence == "" || strings.ContainsAny(sentence, "{}<>") || strings.Contains(sentence, "NaN") {
						t.Errorf("%s: %s %q", f.Code, what, sentence)
					}
				}
			}
		})
	}
}

// everySheet evaluates many records, most of which make sense.
func everySheet(t *testing.T, check func(t *testing.T, r record.Record, sheet convert.Sheet)) {
	t.Helper()
	rng := rand.New(rand.NewPCG(5, 6))
	for range 400 {
		r := recordtest.Random(rng)
		check(t, r, mustEvaluate(t, r))
	}
	for _, d := range device.All() {
		for _, g := range metal.All() {
			for level := 150.0; level <= 950; level += 12.5 {
				r := taken(d.Key, g.Key, level-3, level, level+3)
				check(t, r, mustEvaluate(t, r))
			}
		}
	}
}

// No number outside the range of its device, metal or scale, none under a stop,
// and a reason for each one missing.
func TestNoNumberOutsideItsRange(t *testing.T) {
	given := 0
	everySheet(t, func(t *testing.T, r record.Record, sheet convert.Sheet) {
		stopped := slices.ContainsFunc(sheet.Findings, func(f convert.Finding) bool { return f.Level == wording.Stop })
		for i, row := range sheet.Scales {
			own := i == 0 && row.Scale == sheet.Scale
			if row.Status != convert.OK {
				if row.Value != nil || row.Standard != nil || row.Expanded != nil || row.Low != nil || row.Shown != "" || row.Reason == "" {
					t.Fatalf("%s is %s, with a number or without a reason: %+v", row.Scale, row.Status, row)
				}
				continue
			}
			given++
			if stopped && !own {
				t.Fatalf("%s has a value under a stop: %+v %v", row.Scale, row, codes(sheet))
			}
			if len(row.Range) != 2 || !(*row.Value >= row.Range[0] && *row.Value <= row.Range[1]) || !(*row.Low >= row.Range[0] && *row.High <= row.Range[1]) {
				t.Fatalf("%s: %g (%g to %g) leaves its range %v", row.Scale, *row.Value, *row.Low, *row.High, row.Range)
			}
			if !(*row.Standard > 0) || !(*row.Expanded > *row.Standard*0.6) || math.IsInf(*row.Expanded, 0) {
				t.Fatalf("%s: uncertainty %g, expanded %g", row.Scale, *row.Standard, *row.Expanded)
			}
			if len(row.Path) == 0 || slices.ContainsFunc(row.Path, func(s scale.Step) bool { return s.Source == "" }) {
				t.Fatalf("%s names no source: %+v", row.Scale, row.Path)
			}
		}
	})
	if given < 5000 {
		t.Errorf("only %d values were given in all: the test has lost its subject", given)
	}
}

// Lists are [], never null, and every sheet is JSON that reads back.
func TestSheetJSON(t *testing.T) {
	everySheet(t, func(t *testing.T, r record.Record, sheet convert.Sheet) {
		text, err := strict.Marshal(sheet)
		if err != nil {
			t.Fatal(err)
		}
		for _, list := range []string{"devices", "shortfalls", "suspect", "scales", "findings", "terms", "shownRange", "path"} {
			if strings.Contains(string(text), `"`+list+`":null`) {
				t.Fatalf("the list %s is null in %s", list, text)
			}
		}
	})
}

// The link carries all that the sheet depends on.
func TestSheetThroughLink(t *testing.T) {
	rng := rand.New(rand.NewPCG(7, 8))
	for range 200 {
		r := recordtest.Random(rng)
		fragment, err := link.Encode(r)
		if err != nil {
			t.Fatal(err)
		}
		back, err := link.Decode(fragment)
		if err != nil {
			t.Fatal(err)
		}
		if here, there := sheetJSON(t, r), sheetJSON(t, back); here != there {
			t.Fatalf("the sheet changes through the link\nfrom %s\n  to %s", here, there)
		}
	}
}

// The order of readings does not matter but for their positions, and a struck
// reading counts as if it had not been taken.
func TestOrderAndStruck(t *testing.T) {
	want := mustEvaluate(t, steel(612, 608, 615, 610, 611))
	shuffled := mustEvaluate(t, steel(611, 610, 608, 612, 615))
	r := steel(612, 608, 700, 615, 610, 611)
	r.Readings[2].Struck = "probe tilted"
	struck := mustEvaluate(t, r)
	if struck.Readings.Struck != 1 {
		t.Errorf("%d readings are struck, want 1", struck.Readings.Struck)
	}
	for i, row := range want.Scales {
		for name, other := range map[string]convert.Row{"shuffled": shuffled.Scales[i], "struck": struck.Scales[i]} {
			if row.Shown != other.Shown || row.ShownExpanded != other.ShownExpanded {
				t.Errorf("%s, %s: %s ± %s, want %s ± %s", row.Scale, name, other.Shown, other.ShownExpanded, row.Shown, row.ShownExpanded)
			}
		}
	}
}

// A higher mean means a harder metal in every scale, and never a wider
// uncertainty for the same scatter and more readings.
func TestMonotone(t *testing.T) {
	for _, g := range metal.All() {
		last := map[scale.Key]float64{}
		for level := 300.0; level <= 890; level += 2.5 {
			for _, row := range mustEvaluate(t, taken("D", g.Key, level-1, level, level+1)).Scales {
				if row.Status != convert.OK {
					continue
				}
				if before, ok := last[row.Scale]; ok && *row.Value <= before {
					t.Fatalf("%s, %s at %g HLD: %g after %g", g.Key, row.Scale, level, *row.Value, before)
				}
				last[row.Scale] = *row.Value
			}
		}
	}
}

func TestUncertaintyFollowsItsCauses(t *testing.T) {
	expanded := func(r record.Record) float64 { return *rowOf(t, mustEvaluate(t, r), scale.HBW).Expanded }
	asked := func(confidence float64) record.Record {
		r := steel(600, 610, 620)
		r.Confidence = confidence
		return r
	}
	for _, c := range []struct {
		name        string
		less, wider record.Record
	}{
		{"scatter", steel(609, 610, 611), steel(600, 610, 620)},
		{"fewer readings", steel(600, 610, 620, 600, 610, 620), steel(600, 610, 620)},
		{"too few to know the scatter", steel(609, 610, 611), steel(610, 610)},
		{"one reading", steel(610, 610), steel(610)},
		{"a broader group", taken("D", "low-alloy-steel", 609, 610, 611), taken("D", "tool-steel", 609, 610, 611)},
		{"confidence", asked(0.9), asked(0.99)},
	} {
		if less, wider := expanded(c.less), expanded(c.wider); !(wider > less) {
			t.Errorf("%s: ±%g becomes ±%g", c.name, less, wider)
		}
	}
}

// The sheet's own uncertainty is its row's terms and the first leg; what a
// converted row adds is its second leg, over the slope.
func TestBudgetsAgree(t *testing.T) {
	sheet := mustEvaluate(t, steel(612, 608, 615, 610, 611))
	hv := rowOf(t, sheet, scale.HV)
	if len(hv.Terms) != len(sheet.Uncertainty.Terms) {
		t.Fatalf("HV has %d terms, the sheet %d", len(hv.Terms), len(sheet.Uncertainty.Terms))
	}
	slope := hv.Terms[0].Sensitivity
	if got, want := *hv.Standard, sheet.Uncertainty.Standard*slope; math.Abs(got-want) > 1e-9*want {
		t.Errorf("u(HV) = %g, want the sheet's over the slope, %g", got, want)
	}
	hbw := rowOf(t, sheet, scale.HBW)
	sum := 0.0
	for _, term := range hbw.Terms {
		sum += term.Contribution * term.Contribution
	}
	if got, want := *hbw.Standard, math.Sqrt(sum); math.Abs(got-want) > 1e-12*want {
		t.Errorf("u(HBW) = %g, want the root of its contributions' squares, %g", got, want)
	}
	if *hbw.Expanded != *hbw.K**hbw.Standard {
		t.Errorf("U = %g, want k u = %g", *hbw.Expanded, *hbw.K**hbw.Standard)
	}
}

// A record that is read on one device and evaluated again gives the same sheet
// to the last bit.
func TestSameRecordSameSheet(t *testing.T) {
	r := steel(612, 608, 615, 610, 611)
	if a, b := sheetJSON(t, r), sheetJSON(t, r); a != b {
		t.Errorf("two evaluations differ:\n%s\n%s", a, b)
	}
}

func TestInvalidRecord(t *testing.T) {
	r := steel(610)
	r.Confidence = 2
	if _, err := convert.Evaluate(r); err == nil {
		t.Error("a confidence of 2 is evaluated")
	}
}

func TestCatalogue(t *testing.T) {
	c := convert.NewCatalogue()
	if c.Edition != convert.Edition || len(c.Devices) != 8 || len(c.Groups) != len(metal.All()) {
		t.Errorf("edition %s, %d devices, %d groups", c.Edition, len(c.Devices), len(c.Groups))
	}
	for _, d := range c.Devices {
		if d.Source == "" || len(d.Directions) < 2 {
			t.Errorf("device %s: source %q, directions %v", d.Key, d.Source, d.Directions)
		}
	}
	for _, g := range c.Groups {
		if g.Source == "" || !slices.Contains(g.Scales, scale.HV) {
			t.Errorf("group %s: source %q, scales %v", g.Key, g.Source, g.Scales)
		}
	}
}

func BenchmarkEvaluate(b *testing.B) {
	r := steel(612, 608, 615, 610, 611)
	for b.Loop() {
		mustEvaluate(b, r)
	}
}
