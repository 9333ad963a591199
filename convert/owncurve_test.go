package convert_test

import (
	"fmt"
	"math"
	"math/rand/v2"
	"slices"
	"strings"
	"testing"

	"strikebook/convert"
	"strikebook/convert/curve"
	"strikebook/convert/device"
	"strikebook/convert/link"
	"strikebook/convert/metal"
	"strikebook/convert/owncurve"
	"strikebook/convert/rebound"
	"strikebook/convert/record"
	"strikebook/convert/record/recordtest"
	"strikebook/convert/scale"
	"strikebook/convert/stats"
	"strikebook/convert/strict"
	"strikebook/convert/verdict"
)

// offcuts are pieces of turbine bolts, measured in a laboratory in Brinell:
// invented.
func offcuts() owncurve.Definition {
	d := owncurve.Definition{
		Name: "Turbine bolts", Device: "D", Group: "low-alloy-steel", Scale: scale.HBW, Kind: owncurve.Own,
		Source: "report 1187", Serial: "A-1", Date: "2026-03-01",
	}
	for _, p := range [][4]float64{
		{452.1, 1.6, 163, 2.5}, {478.4, 1.8, 185, 2.5}, {505.9, 1.5, 209, 3}, {531.2, 1.9, 233, 3},
		{559.6, 1.4, 262, 3}, {583, 1.7, 289, 3.5}, {611.5, 1.6, 322, 4}, {640.2, 1.8, 361, 4},
	} {
		d.Pairs = append(d.Pairs, owncurve.Pair{HL: p[0], UHL: p[1], Value: p[2], UValue: p[3]})
	}
	return d
}

func withCurve(t testing.TB, r record.Record, d owncurve.Definition) record.Record {
	t.Helper()
	f, err := owncurve.Make(d)
	if err != nil {
		t.Fatal(err)
	}
	r.Curve = f.Curve()
	return r
}

func termsOf(row convert.Row) string {
	var names []string
	for _, term := range row.Terms {
		names = append(names, strings.TrimSpace(term.Name+" "+strings.TrimPrefix(term.Scale, "HLD")))
	}
	return strings.Join(names, ", ")
}

func pathOf(row convert.Row) string {
	var steps []string
	for _, s := range row.Path {
		steps = append(steps, s.Step+" "+string(s.Basis))
	}
	return strings.Join(steps, ", ")
}

// A curve in Brinell gives Brinell without the doubt of the table, and the other
// scales over the table of its metal.
func TestOwnCurve(t *testing.T) {
	sheet := mustEvaluate(t, withCurve(t, steel(560, 562, 565, 561, 563), offcuts()))
	for _, c := range []struct{ scale, path, terms string }{
		{"HLD", "HLD measured", "repeatability, resolution, permissible error"},
		{"HBW", "HLD to HBW own", "repeatability, resolution, permissible error, own curve HBW"},
		{"HV", "HLD to HBW own, HBW to HV standard", "repeatability, resolution, permissible error, own curve HBW, second leg HBW"},
		{"HRC", "HLD to HBW own, HBW to HV standard, HV to HRC standard", "repeatability, resolution, permissible error, own curve HBW, second leg HBW, second leg HRC"},
	} {
		row := rowOf(t, sheet, scale.Key(c.scale))
		if row.Status != convert.OK || pathOf(row) != c.path || termsOf(row) != c.terms {
			t.Errorf("%s (%s): path %s, terms %s", c.scale, row.Status, pathOf(row), termsOf(row))
		}
		if row.Path[0].Source == "" {
			t.Errorf("%s: no source", c.scale)
		}
	}
	if got := codes(sheet); len(got) > 0 {
		t.Errorf("findings %v", got)
	}
	s, err := offcuts().Solve()
	if err != nil {
		t.Fatal(err)
	}
	row := rowOf(t, sheet, scale.HBW)
	want, err := s.At(562.2)
	if err != nil || math.Abs(*row.Value-want) > 1e-9 || row.Method != "HBW" {
		t.Errorf("%g %s, want %g HBW (%v)", *row.Value, row.Method, want, err)
	}
	if i := slices.IndexFunc(row.Terms, func(t stats.Term) bool { return t.Name == "own curve" }); row.Terms[i].Contribution != s.Term(562.2, want).Standard {
		t.Errorf("%+v", row.Terms[i])
	}
	// What the readings and the curve leave in doubt, as readings and as Brinell.
	slope, err := curve.MeanSlope(s, 562.2, 7)
	if u := sheet.Uncertainty.Standard * slope; err != nil || math.Abs(u-*row.Standard) > 0.01*u {
		t.Errorf("%g HLD times %g is not %g HBW", sheet.Uncertainty.Standard, slope, *row.Standard)
	}
	for _, key := range []scale.Key{scale.HV, scale.HRC} {
		plain := rowOf(t, mustEvaluate(t, steel(560, 562, 565, 561, 563)), key)
		if own := rowOf(t, sheet, key); *own.Expanded > 0.75**plain.Expanded {
			t.Errorf("%s: ± %g with the curve, ± %g without", key, *own.Expanded, *plain.Expanded)
		}
	}
}

func TestOwnCurveRanges(t *testing.T) {
	sheet := mustEvaluate(t, withCurve(t, steel(560, 562, 565), offcuts()))
	for key, want := range map[scale.Key]string{"HLD": "453 640", "HBW": "162 358", "HV": "162 377", "HRC": "20.0 38.5", "HRB": "84.0 100.0"} {
		if got := strings.Join(rowOf(t, sheet, key).ShownRange, " "); got != want {
			t.Errorf("%s: range %s, want %s", key, got, want)
		}
	}
	for mean, want := range map[float64]convert.Status{452: convert.Below, 452.2: convert.OK, 640.2: convert.OK, 640.3: convert.Above} {
		sheet := mustEvaluate(t, withCurve(t, steel(mean, mean, mean), offcuts()))
		outside := want != convert.OK
		if slices.Contains(codes(sheet), "outside-curve-range") != outside {
			t.Errorf("%g HLD: findings %v", mean, codes(sheet))
		}
		for _, key := range []scale.Key{"HLD", scale.HBW, scale.HV} {
			if row := rowOf(t, sheet, key); row.Status != want {
				t.Errorf("%g HLD: %s is %s, want %s", mean, key, row.Status, want)
			}
		}
	}
}

// An anchor in Brinell gives Brinell without the doubt of the table that its
// pairs went through, in the range of the model.
func TestAnchor(t *testing.T) {
	d := offcuts()
	d.Kind, d.Pairs = owncurve.Anchor, d.Pairs[5:7]
	sheet := mustEvaluate(t, withCurve(t, steel(590, 592, 594), d))
	for _, c := range []struct{ scale, path, terms string }{
		{"HV", "HLD to HV anchored", "repeatability, resolution, permissible error, anchor HV, second leg HBW"},
		{"HBW", "HLD to HV anchored, HV to HBW standard", "repeatability, resolution, permissible error, anchor HV"},
		{"HRC", "HLD to HV anchored, HV to HRC standard", "repeatability, resolution, permissible error, anchor HV, second leg HBW, second leg HRC"},
	} {
		if row := rowOf(t, sheet, scale.Key(c.scale)); row.Status != convert.OK || pathOf(row) != c.path || termsOf(row) != c.terms {
			t.Errorf("%s: path %s, terms %s", c.scale, pathOf(row), termsOf(row))
		}
	}
	steels, _ := metal.ByKey("low-alloy-steel")
	body, _ := device.ByKey("D")
	leg, err := rebound.For(body, steels)
	if err != nil {
		t.Fatal(err)
	}
	hv, err := leg.At(592)
	k := mustParameter(t, d)
	if row := rowOf(t, sheet, scale.HV); err != nil || math.Abs(*row.Value-k*hv) > 1e-9 {
		t.Errorf("%g HV, want %g times %g", *row.Value, k, hv)
	}
	// Far below the pairs there is still a value, with a wider uncertainty.
	far := mustEvaluate(t, withCurve(t, steel(400, 402, 404), d))
	if got := codes(far); !slices.Equal(got, []string{"outside-pairs"}) {
		t.Errorf("findings %v", got)
	}
	share := func(s convert.Sheet) float64 { return *rowOf(t, s, scale.HV).Standard / *rowOf(t, s, scale.HV).Value }
	if share(far) < 0.05 || share(sheet) > 0.05 {
		t.Errorf("relative standard uncertainty %g far from the pairs, %g between them", share(far), share(sheet))
	}
}

func mustParameter(t testing.TB, d owncurve.Definition) float64 {
	t.Helper()
	f, err := owncurve.Make(d)
	if err != nil {
		t.Fatal(err)
	}
	return f.Parameters[0]
}

// A device without a built-in conversion works with a curve or a table of the
// user's own.
func TestDeviceWithoutModel(t *testing.T) {
	through := owncurve.Definition{Name: "gear teeth", Device: "DL", Group: "low-alloy-steel", Scale: scale.HRC, Kind: owncurve.Own}
	table := through
	table.Kind, table.Source, table.UPercent = owncurve.Table, "standard of the works", 3
	for hl := 700.0; hl <= 900; hl += 40 {
		p := owncurve.Pair{HL: hl, UHL: 2, Value: 20 + (hl-700)/5, UValue: 0.5}
		through.Pairs, table.Pairs = append(through.Pairs, p), append(table.Pairs, p)
	}
	spot := taken("DL", "low-alloy-steel", 798, 800, 802)
	if got := codes(mustEvaluate(t, spot)); !slices.Contains(got, "no-curve") {
		t.Fatalf("findings %v without a curve", got)
	}
	for name, d := range map[string]owncurve.Definition{"own curve": through, "own table": table} {
		sheet := mustEvaluate(t, withCurve(t, spot, d))
		row := rowOf(t, sheet, scale.HRC)
		if row.Shown != "40.0 HRC (HLDL)" || !strings.Contains(termsOf(row), name+" HRC") || slices.Contains(codes(sheet), "no-curve") {
			t.Errorf("%s: %s with %s, findings %v", name, row.Shown, termsOf(row), codes(sheet))
		}
		if hv := rowOf(t, sheet, scale.HV); hv.Status != convert.OK {
			t.Errorf("%s: HV %s", name, hv.Status)
		}
	}
	path := pathOf(rowOf(t, mustEvaluate(t, withCurve(t, spot, table)), scale.HRC))
	if path != "HLDL to HRC table" {
		t.Error(path)
	}
}

// What a curve gives beyond the tables of its metal is given in its own scale
// alone.
func TestCurveBeyondTheTables(t *testing.T) {
	d := owncurve.Definition{Name: "cladding", Device: "D", Group: "austenitic-stainless", Scale: scale.HBW, Kind: owncurve.Own}
	for hl := 300.0; hl <= 700; hl += 50 {
		d.Pairs = append(d.Pairs, owncurve.Pair{HL: hl, UHL: 2, Value: 60 + (hl-300)*1.3, UValue: 4})
	}
	soft := taken("D", "austenitic-stainless", 308, 310, 312)
	soft.Limit = &verdict.Limit{Scale: scale.HRB, Max: new(80.0)}
	sheet := mustEvaluate(t, withCurve(t, soft, d))
	for key, want := range map[scale.Key]convert.Status{scale.HBW: convert.OK, scale.HV: convert.Below, scale.HRB: convert.Below} {
		if row := rowOf(t, sheet, key); row.Status != want {
			t.Errorf("%s is %s, want %s", key, row.Status, want)
		}
	}
	if v := sheet.Verdict; v.Outcome != verdict.CannotSay || v.Sentence == "" {
		t.Errorf("%+v", v)
	}
	soft.Limit = &verdict.Limit{Scale: scale.HBW, Max: new(150.0)}
	if v := mustEvaluate(t, withCurve(t, soft, d)).Verdict; v.Outcome != verdict.Conforms {
		t.Errorf("%+v", v)
	}
}

func TestWrongCurve(t *testing.T) {
	onDirect := direct(scale.HV, 240, 250, 245)
	for name, r := range map[string]record.Record{
		"another device":  taken("DC", "low-alloy-steel", 560, 562, 564),
		"another metal":   taken("D", "tool-steel", 560, 562, 564),
		"both":            taken("E", "titanium", 560, 562, 564),
		"a direct method": onDirect,
	} {
		t.Run(name, func(t *testing.T) {
			r := withCurve(t, r, offcuts())
			r.Limit = &verdict.Limit{Scale: scale.HBW, Max: new(300.0)}
			sheet := mustEvaluate(t, r)
			if got := codes(sheet); !slices.Contains(got, "wrong-curve") {
				t.Errorf("findings %v", got)
			}
			for _, row := range sheet.Scales[1:] {
				if row.Value != nil {
					t.Errorf("%s %s", row.Scale, row.Shown)
				}
			}
			if own := sheet.Scales[0]; own.Value == nil {
				t.Errorf("what was measured is %s", own.Status)
			}
			if sheet.Verdict.Outcome != verdict.CannotSay {
				t.Errorf("%+v", sheet.Verdict)
			}
		})
	}
	undecided := withCurve(t, record.Record{V: 1, Readings: steel(560, 562, 564).Readings}, offcuts())
	if got := codes(mustEvaluate(t, undecided)); slices.Contains(got, "wrong-curve") {
		t.Errorf("nothing is chosen yet: findings %v", got)
	}
	undecided.Device = "D"
	if got := codes(mustEvaluate(t, undecided)); slices.Contains(got, "wrong-curve") || !slices.Contains(got, "no-metal") {
		t.Errorf("no metal is chosen yet: findings %v", got)
	}
}

// Pairs taken with the very instrument carry its offset: neither the permissible
// error nor the block check counts again, and a correction by the block is not
// made twice. The reading itself keeps them.
func TestOffsetInCurve(t *testing.T) {
	block := func(use record.BlockUse) *record.Block {
		return &record.Block{Certified: new(775.0), ExpandedU: new(6.0), Tolerance: new(10.0),
			Readings: []record.Number{record.Num(780), record.Num(781), record.Num(779)}, Use: use}
	}
	const instrument = "permissible error block certificate block readings block offset"
	for _, c := range []struct {
		name, serial string
		block        *record.Block
		left         bool // whether the instrument's terms are left out
		mean         float64
	}{
		{"no block check", "A-1", nil, true, 562},
		{"written otherwise", " a-1 ", nil, true, 562},
		{"a block check", "A-1", block(record.AsUncertainty), true, 562},
		{"corrected by it", "A-1", block(record.AsCorrection), true, 557},
		{"another instrument", "B-2", nil, false, 562},
		{"another instrument, corrected", "B-2", block(record.AsCorrection), false, 557},
		{"no serial", "", nil, false, 562},
	} {
		t.Run(c.name, func(t *testing.T) {
			r := withCurve(t, steel(560, 562, 564), offcuts())
			r.Serial, r.Block = c.serial, c.block
			sheet := mustEvaluate(t, r)
			if slices.Contains(codes(sheet), "offset-in-curve") != c.left {
				t.Errorf("findings %v", codes(sheet))
			}
			for _, row := range sheet.Scales {
				for _, term := range row.Terms {
					if ofInstrument := strings.Contains(instrument, term.Name); ofInstrument && c.left && row.Scale != "HLD" {
						t.Errorf("%s has the term %s", row.Scale, term.Name)
					}
				}
			}
			own := rowOf(t, sheet, "HLD")
			if *own.Value != c.mean || !slices.ContainsFunc(own.Terms, func(term stats.Term) bool { return strings.Contains(instrument, term.Name) }) {
				t.Errorf("HLD %g with %s", *own.Value, termsOf(own))
			}
			s, err := offcuts().Solve()
			if err != nil {
				t.Fatal(err)
			}
			at := c.mean
			if c.left {
				at = 562
			}
			if want, err := s.At(at); err != nil || math.Abs(*rowOf(t, sheet, scale.HBW).Value-want) > 1e-9 {
				t.Errorf("%g HBW, want %g", *rowOf(t, sheet, scale.HBW).Value, want)
			}
		})
	}
	table := offcuts()
	table.Kind, table.UPercent = owncurve.Table, 3
	r := withCurve(t, steel(560, 562, 564), table)
	r.Serial = "A-1"
	if got := codes(mustEvaluate(t, r)); slices.Contains(got, "offset-in-curve") {
		t.Errorf("a table carries no instrument's offset: %v", got)
	}
}

func TestCurveFindings(t *testing.T) {
	dated := func(taken string, change func(d *owncurve.Definition)) record.Record {
		d := offcuts()
		change(&d)
		r := withCurve(t, steel(560, 562, 564), d)
		r.Taken = taken
		return r
	}
	altered := withCurve(t, steel(560, 562, 564), offcuts())
	fit := *altered.Curve.Fit
	fit.Parameters = []float64{fit.Parameters[0], fit.Parameters[1] * 1.01}
	altered.Curve.Fit = &fit
	older := withCurve(t, steel(560, 562, 564), offcuts())
	olderFit := fit
	older.Curve.Edition, older.Curve.Fit = "2025.3", &olderFit
	unusable := offcuts()
	for i := range unusable.Pairs {
		unusable.Pairs[i].Value = 500 - unusable.Pairs[i].Value
	}
	for _, c := range []struct {
		name   string
		record record.Record
		want   string
	}{
		{"nine months old", dated("2026-12-01T09:30:00Z", func(*owncurve.Definition) {}), ""},
		{"a year and a day old", dated("2027-03-02T09:30:00Z", func(*owncurve.Definition) {}), "curve-old"},
		{"one pair old", dated("2026-12-01T09:30:00Z", func(d *owncurve.Definition) { d.Pairs[2].Date = "2024-05-05" }), "curve-old"},
		{"every pair younger than the curve", dated("2026-12-01T09:30:00Z", func(d *owncurve.Definition) {
			d.Date = "2019-01-01"
			for i := range d.Pairs {
				d.Pairs[i].Date = "2026-11-30"
			}
		}), ""},
		{"no date", dated("2026-12-01T09:30:00Z", func(d *owncurve.Definition) { d.Date = "" }), ""},
		{"one pair far off", dated("", func(d *owncurve.Definition) { d.Pairs[3].Value += 25 }), "pairs-disagree pair-far-off"},
		{"altered", altered, "curve-altered"},
		{"of an older edition", older, ""},
		{"unusable", record.Record{V: 1, Device: "D", Group: "low-alloy-steel", Piece: massive(), Readings: steel(560, 562, 564).Readings,
			Curve: &owncurve.Curve{Definition: unusable}}, "curve-unusable"},
	} {
		t.Run(c.name, func(t *testing.T) {
			sheet := mustEvaluate(t, c.record)
			if got := strings.Join(codes(sheet), " "); got != c.want {
				t.Errorf("findings %s, want %s", got, c.want)
			}
			stopped := slices.ContainsFunc(sheet.Findings, func(f convert.Finding) bool { return f.Level == "stop" })
			if row := rowOf(t, sheet, scale.HBW); (row.Value == nil) != stopped {
				t.Errorf("HBW %q with the findings %v", row.Shown, codes(sheet))
			}
			for _, f := range sheet.Findings {
				if f.Field == "" || f.Message == "" || f.Remedy == "" || f.Source == "" || strings.Contains(f.Message+f.Remedy, "{") {
					t.Errorf("%+v", f)
				}
			}
		})
	}
	if older, now := mustEvaluate(t, older), mustEvaluate(t, withCurve(t, steel(560, 562, 564), offcuts())); *rowOf(t, older, scale.HBW).Value != *rowOf(t, now, scale.HBW).Value {
		t.Error("the curve of an older edition is not computed anew")
	}
}

// Whether a curve comes whole or only as what it is made of, the sheet is the
// same.
func TestBareCurve(t *testing.T) {
	whole := withCurve(t, steel(560, 562, 564), offcuts())
	bare := whole
	bare.Curve = &owncurve.Curve{Definition: offcuts()}
	if a, b := sheetJSON(t, whole), sheetJSON(t, bare); a != b {
		t.Errorf("whole\n%s\nbare\n%s", a, b)
	}
}

// A limit in the curve's own scale, or in another, is decided with the curve.
func TestVerdictByOwnCurve(t *testing.T) {
	const max = 285 // HBW; 562 HLD is 266 by the curve
	r := steel(560, 562, 564, 561, 563)
	r.Limit = &verdict.Limit{Scale: scale.HBW, Max: new(float64(max))}
	if v := mustEvaluate(t, r).Verdict; v.Outcome != verdict.NotProven {
		t.Errorf("by the model: %s", v.Sentence)
	}
	r = withCurve(t, r, offcuts())
	r.Serial = "A-1"
	if v := mustEvaluate(t, r).Verdict; v.Outcome != verdict.Conforms || v.Scale != scale.HBW {
		t.Errorf("by the own curve: %s", v.Sentence)
	}
	// The means at the edges are what the sheet says they are.
	answer, err := convert.FindGoNoGo(convert.GoNoGoRequest{Record: r, N: 5, SD: 2})
	if err != nil || len(answer.Conforms) != 2 {
		t.Fatalf("%+v (%v)", answer, err)
	}
	for mean, want := range map[float64]verdict.Outcome{answer.Conforms[0] + 0.01: verdict.Conforms, answer.Conforms[1] - 0.01: verdict.Conforms, answer.Conforms[1] + 0.1: verdict.NotProven} {
		s := 2 / math.Sqrt(2.5) // two apart from five readings: a standard deviation of 2
		spot := withCurve(t, steel(mean-2*s, mean-s, mean, mean+s, mean+2*s), offcuts())
		spot.Serial, spot.Limit = r.Serial, r.Limit
		if v := mustEvaluate(t, spot).Verdict; v.Outcome != want {
			t.Errorf("%.2f HLD: %s, want %s", mean, v.Sentence, want)
		}
	}
	if answer.Conforms[0] < 452 {
		t.Errorf("means conform from %g HLD, but the curve begins at 452.1", answer.Conforms[0])
	}
}

// twelve is a curve of twelve pairs, as a laboratory hands it over.
func twelve(name string) owncurve.Definition {
	d := offcuts()
	d.Name, d.Pairs = name, nil
	random := rand.New(rand.NewPCG(1, 2))
	for i := range 12 {
		hl := 440 + 19.3*float64(i)
		d.Pairs = append(d.Pairs, owncurve.Pair{
			HL: math.Round(10*hl) / 10, UHL: 1.2 + math.Round(10*random.Float64())/10,
			Value: math.Round(10*(160+1.05*(hl-440)+3*random.NormFloat64())) / 10, UValue: 2 + math.Round(10*random.Float64())/10})
	}
	return d
}

// A link with a curve of twelve pairs is short, and whoever opens it computes the
// same.
func TestLinkWithCurve(t *testing.T) {
	const most = 1500 // characters
	r := withCurve(t, steel(560, 562, 565, 561, 563), twelve("P22 header, lab HBW"))
	r.Label, r.Taken, r.Serial, r.Limit = "Shell course 2, 3 o'clock", "2026-12-01T09:30:00Z", "A-1", &verdict.Limit{Scale: scale.HBW, Max: new(300.0), Rule: verdict.Guarded}
	fragment, err := link.Encode(r)
	if err != nil {
		t.Fatal(err)
	}
	whole, err := record.Encode(r)
	if err != nil {
		t.Fatal(err)
	}
	t.Logf("twelve pairs: %d characters, from %d bytes of JSON", len(fragment), len(whole))
	if len(fragment) > most {
		t.Errorf("%d characters, at most %d are allowed", len(fragment), most)
	}
	got, err := link.Decode(fragment)
	if err != nil {
		t.Fatal(err)
	}
	if !recordtest.Equal(got, r) {
		t.Errorf("the record comes back as %+v", got.Curve)
	}
	if sheetJSON(t, got) != sheetJSON(t, r) {
		t.Error("the receiver's sheet is another")
	}
	// With labels, dates and half digits more it is still short.
	for i := range r.Curve.Pairs {
		r.Curve.Pairs[i].Label, r.Curve.Pairs[i].Date = fmt.Sprintf("offcut %d", i+1), fmt.Sprintf("2026-03-%02d", i+1)
		r.Curve.Pairs[i].Value += 0.04
	}
	r = withCurve(t, r, r.Curve.Definition)
	if fragment, err = link.Encode(r); err != nil || len(fragment) > most {
		t.Errorf("with labels and dates: %d characters (%v)", len(fragment), err)
	}
	t.Logf("with labels and dates: %d characters", len(fragment))
}

// Figures that were changed on the way are found out by whoever opens the link.
func TestLinkWithAlteredCurve(t *testing.T) {
	r := withCurve(t, steel(560, 562, 564), offcuts())
	fit := *r.Curve.Fit
	fit.Parameters = []float64{fit.Parameters[0] * 1.02, fit.Parameters[1]}
	r.Curve.Fit = &fit
	fragment, err := link.Encode(r)
	if err != nil {
		t.Fatal(err)
	}
	got, err := link.Decode(fragment)
	if err != nil {
		t.Fatal(err)
	}
	if !slices.Contains(codes(mustEvaluate(t, got)), "curve-altered") {
		t.Errorf("findings %v", codes(mustEvaluate(t, got)))
	}
}

// A row of a book says what the sheet says.
func TestBookRowsWithCurve(t *testing.T) {
	var texts []convert.RecordText
	var sheets []convert.Sheet
	for mean := 440.0; mean <= 660; mean += 10 {
		r := withCurve(t, steel(mean-2, mean, mean+2), offcuts())
		r.Limit = &verdict.Limit{Scale: scale.HBW, Max: new(285.0)}
		text, err := record.Encode(r)
		if err != nil {
			t.Fatal(err)
		}
		texts, sheets = append(texts, text), append(sheets, mustEvaluate(t, r))
	}
	for i, row := range convert.EvaluateRows(convert.Book{V: 1, Records: texts}).Rows {
		if row.Outcome != sheets[i].Verdict.Outcome {
			t.Errorf("row %d: %s, sheet %s", i, row.Outcome, sheets[i].Verdict.Outcome)
		}
	}
}

// Drawn at random as the budget says the readings, the curve and the tables are,
// the hardness lies inside the interval as often as it should.
func TestOwnCurveIsCovered(t *testing.T) {
	const trials = 3000
	d := offcuts()
	truth, err := d.Solve()
	if err != nil {
		t.Fatal(err)
	}
	random := rand.New(rand.NewPCG(21, 22))
	want, err := truth.At(575)
	if err != nil {
		t.Fatal(err)
	}
	inside := 0
	for range trials {
		lab := d
		lab.Pairs = slices.Clone(d.Pairs)
		for i, p := range d.Pairs {
			hbw, err := truth.At(p.HL)
			if err != nil {
				t.Fatal(err)
			}
			lab.Pairs[i].HL += p.UHL * random.NormFloat64()
			lab.Pairs[i].Value = hbw + p.UValue*random.NormFloat64()
		}
		spot := record.Record{V: 1, Device: "D", Group: d.Group, Serial: d.Serial, Piece: massive(), Curve: &owncurve.Curve{Definition: lab}}
		for range 5 {
			spot.Readings = append(spot.Readings, record.Reading{Value: record.Num(math.Round(575 + 4*random.NormFloat64()))})
		}
		if row := rowOf(t, mustEvaluate(t, spot), scale.HBW); row.Value != nil && math.Abs(*row.Value-want) < *row.Expanded {
			inside++
		}
	}
	share := float64(inside) / trials
	t.Logf("%.1f %% of the intervals of 95 %% hold the hardness", 100*share)
	if share < 0.94 || share > 0.975 {
		t.Errorf("%.1f %% of the intervals hold the hardness", 100*share)
	}
}

// Whatever the curve, there is a sheet, whose JSON holds numbers only.
func TestAnyCurveAnswers(t *testing.T) {
	random := rand.New(rand.NewPCG(23, 24))
	valued := 0
	for range 1000 {
		c := recordtest.Curve(random)
		body, _ := device.ByKey(c.Device)
		hl := body.Lo + (body.Hi-body.Lo)*random.Float64()
		r := taken(c.Device, c.Group, hl, hl+1, hl-1)
		r.Curve, r.Serial = c, c.Serial
		r.Limit = &verdict.Limit{Scale: c.Scale, Max: new(1.01 * c.Pairs[0].Value)}
		if random.IntN(2) == 0 {
			r.Limit.Scale = scale.HBW
		}
		sheet := mustEvaluate(t, r)
		if _, err := strict.Marshal(sheet); err != nil {
			t.Fatal(err)
		}
		if row := rowOf(t, sheet, c.Scale); row.Value != nil {
			valued++
			if !(*row.Low <= *row.Value && *row.Value <= *row.High && *row.Expanded > 0) {
				t.Fatalf("%+v", row)
			}
		}
		if _, err := convert.FindGoNoGo(convert.GoNoGoRequest{Record: r, N: 5, SD: 3}); err != nil {
			t.Fatal(err)
		}
	}
	t.Logf("%d of 1000 with a value", valued)
	if valued < 300 {
		t.Error("the test has lost its subject")
	}
}

func BenchmarkEvaluateWithCurve(b *testing.B) {
	r := withCurve(b, steel(560, 562, 565, 561, 563), twelve("P22 header"))
	b.ReportAllocs()
	for b.Loop() {
		if _, err := convert.Evaluate(r); err != nil {
			b.Fatal(err)
		}
	}
}
