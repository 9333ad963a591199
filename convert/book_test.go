package convert_test

import (
	"encoding/json"
	"errors"
	"fmt"
	"math"
	"math/rand/v2"
	"os"
	"slices"
	"strings"
	"testing"

	"strikebook/convert"
	"strikebook/convert/device"
	"strikebook/convert/record"
	"strikebook/convert/record/recordtest"
	"strikebook/convert/scale"
	"strikebook/convert/strict"
	"strikebook/convert/table"
	"strikebook/convert/verdict"
	"strikebook/convert/wording"
)

// book is a book of records.
func book(t testing.TB, records ...record.Record) convert.Book {
	t.Helper()
	b := convert.Book{V: record.Version}
	for _, r := range records {
		text, err := record.Encode(r)
		if err != nil {
			t.Fatal(err)
		}
		b.Records = append(b.Records, text)
	}
	return b
}

func summarize(t testing.TB, records ...record.Record) convert.Summary {
	t.Helper()
	return convert.SummarizeRows(convert.EvaluateRows(book(t, records...)).Rows)
}

func asJSON(t testing.TB, v any) string {
	t.Helper()
	text, err := strict.Marshal(v)
	if err != nil {
		t.Fatal(err)
	}
	return string(text)
}

// someBook has all kinds of records, and in between some that are none.
func someBook(t testing.TB) convert.Book {
	rng := rand.New(rand.NewPCG(41, 42))
	var records []record.Record
	for range 300 {
		records = append(records, recordtest.Random(rng))
	}
	for i := range 100 {
		records = append(records, weldSpot(float64(i), 590+10*rng.NormFloat64()))
	}
	b := book(t, records...)
	for _, none := range []string{`{"v":1,"device":"Q"}`, `null`, `[]`, `{"v":2}`, `{"v":1,"readings":[{"value":612},{"hl":1}]}`, `{"v":1,"taken":"today"}`} {
		b.Records = slices.Insert(b.Records, rng.IntN(len(b.Records)), convert.RecordText(none))
	}
	return b
}

// weldSpot is a spot at a position along a weld, with a limit as for a pipeline.
func weldSpot(position, level float64) record.Record {
	r := steel(level-3, level, level+2, level+1)
	r.PositionMm = &position
	switch {
	case position < 8 || position > 30:
		r.Zone = record.Base
	case position < 12 || position > 26:
		r.Zone = record.HAZ
	default:
		r.Zone = record.Weld
	}
	r.Limit = &verdict.Limit{Scale: scale.HV, Max: new(350.0)}
	return r
}

// The sheets of a book are those of its records, in their order; what is none
// has its error in its place, as it would have alone.
func TestBookSheetsAreThoseOfTheRecords(t *testing.T) {
	b := someBook(t)
	sheet := convert.EvaluateBook(b)
	if len(sheet.Sheets) != len(b.Records) || sheet.Summary.N != len(b.Records) {
		t.Fatalf("%d sheets of %d records", len(sheet.Sheets), len(b.Records))
	}
	refused := 0
	for i, text := range b.Records {
		r, err := record.Decode(text)
		var fault *wording.Error
		want := ""
		if errors.As(err, &fault) {
			refused++
			want = asJSON(t, map[string]*wording.Error{"error": fault})
			if !slices.Contains(sheet.Summary.Invalid, i) {
				t.Errorf("record %d is not counted as invalid", i)
			}
		} else {
			want = sheetJSON(t, r)
		}
		if got := string(sheet.Sheets[i]); got != want {
			t.Fatalf("record %d, %s:\ngot  %s\nwant %s", i, text, got, want)
		}
	}
	if refused != 6 || len(sheet.Summary.Invalid) != refused {
		t.Errorf("%d records refused, %d invalid", refused, len(sheet.Summary.Invalid))
	}
	if text := asJSON(t, sheet); !json.Valid([]byte(text)) {
		t.Error("a book's sheet is no JSON")
	}
}

// However a book is handed over, in one or in parts, its summary is the same.
func TestSummaryOfParts(t *testing.T) {
	b := someBook(t)
	want := asJSON(t, convert.EvaluateBook(b).Summary)
	for _, size := range []int{1, 7, 100, len(b.Records)} {
		var rows convert.BookRows
		for part := range slices.Chunk(b.Records, size) {
			text := asJSON(t, convert.EvaluateRows(convert.Book{V: 1, Records: part}))
			some, err := convert.DecodeRows([]byte(text))
			if err != nil {
				t.Fatal(err)
			}
			if again := asJSON(t, some); again != text {
				t.Fatalf("rows came back as another\ngot  %s\nwant %s", again, text)
			}
			rows.Rows = append(rows.Rows, some.Rows...)
		}
		if got := asJSON(t, convert.SummarizeRows(rows.Rows)); got != want {
			t.Fatalf("in parts of %d:\ngot  %s\nwant %s", size, got, want)
		}
	}
}

// The numbers of a row are those of its sheet.
func TestRowsShowTheirSheets(t *testing.T) {
	b := someBook(t)
	rows := convert.EvaluateRows(b).Rows
	valued := 0
	for i, row := range rows {
		r, err := record.Decode(b.Records[i])
		if err != nil {
			if row.Error == nil || row.Outcome != verdict.CannotSay || len(row.Values) > 0 {
				t.Errorf("%s: %+v", b.Records[i], row)
			}
			continue
		}
		sheet := mustEvaluate(t, r)
		if row.Label != r.Label || row.Zone != r.Zone || row.Outcome != sheet.Verdict.Outcome || row.ShownChance != sheet.Verdict.ShownChance ||
			row.N != sheet.Readings.N || row.ShownMean != sheet.Readings.ShownMean || len(row.Findings) != len(sheet.Findings) {
			t.Fatalf("record %d: row %+v", i, row)
		}
		for j, f := range sheet.Findings {
			if row.Findings[j] != f.Code {
				t.Errorf("record %d: finding %s, in the row %s", i, f.Code, row.Findings[j])
			}
		}
		for _, v := range row.Values {
			valued++
			if own := rowOf(t, sheet, v.Scale); own.Shown != v.Shown || *own.Value != v.Value || *own.Expanded != v.Expanded || own.ShownLow != v.ShownLow || *own.High != v.High {
				t.Errorf("record %d: %+v, in the sheet %+v", i, v, own)
			}
		}
	}
	if valued < 100 {
		t.Errorf("only %d values: the test has lost its subject", valued)
	}
}

func TestBookRefusals(t *testing.T) {
	many := `{"v":1,"records":[` + strings.TrimSuffix(strings.Repeat("0,", convert.MaxRecords+1), ",") + "]}"
	for _, c := range []struct{ name, text, code, field string }{
		{"no JSON", `{"v":1,"records":[{}`, "record-not-json", "records"},
		{"a record alone", `{"v":1,"readings":[]}`, "unknown-field", "readings"},
		{"another version", `{"v":2,"records":[]}`, "record-version", "v"},
		{"no version", `{"records":[]}`, "record-version", "v"},
		{"no list", `{"v":1,"records":{}}`, "wrong-type", "records"},
		{"too many", many, "too-many-records", "records"},
	} {
		t.Run(c.name, func(t *testing.T) {
			_, err := convert.DecodeBook([]byte(c.text))
			var e *wording.Error
			if !errors.As(err, &e) || e.Code != c.code || e.Field != c.field {
				t.Errorf("%v, want %s at %q", err, c.code, c.field)
			}
		})
	}
	for _, c := range []struct{ name, text, code string }{
		{"rows that are none", `{"rows":[1]}`, "wrong-type"},
		{"too many rows", `{"rows":[` + strings.TrimSuffix(strings.Repeat("{},", convert.MaxRecords+1), ",") + "]}", "too-many-records"},
	} {
		t.Run(c.name, func(t *testing.T) {
			_, err := convert.DecodeRows([]byte(c.text))
			var e *wording.Error
			if !errors.As(err, &e) || e.Code != c.code {
				t.Errorf("%v, want %s", err, c.code)
			}
		})
	}
	// Rows that were tampered with give a senseless summary at worst.
	if rows, err := convert.DecodeRows([]byte(`{"rows":[{"n":3,"corrected":611},{"corrected":600,"n":-2,"scale":"no"},{"probability":0.5},{"probability":0.5,"margin":1}]}`)); err != nil {
		t.Error(err)
	} else {
		asJSON(t, convert.SummarizeRows(rows.Rows))
	}
}

func TestEmptyBook(t *testing.T) {
	s := convert.EvaluateBook(convert.Book{V: 1})
	text := asJSON(t, s)
	for _, list := range []string{`"sheets":[]`, `"invalid":[]`, `"byZone":[]`, `"df":[]`, `"points":[]`, `"worst":null`, `"peak":null`} {
		if !strings.Contains(text, list) {
			t.Errorf("no %s in %s", list, text)
		}
	}
}

func limited(r record.Record, key scale.Key, least, greatest float64) record.Record {
	l := &verdict.Limit{Scale: key}
	if least > 0 {
		l.Min = &least
	}
	if greatest > 0 {
		l.Max = &greatest
	}
	r.Limit = l
	return r
}

func TestCountsAndWorst(t *testing.T) {
	soft, middle, hard := steel(450, 451, 452), steel(600, 601, 602), steel(700, 701, 702)
	none := record.Record{V: record.Version}
	for _, c := range []struct {
		name    string
		records []record.Record
		counts  convert.Counts
		worst   int // -1 for none
	}{
		{"no limits", []record.Record{soft, middle}, convert.Counts{NoLimit: 2}, -1},
		{"one fails", []record.Record{limited(soft, scale.HBW, 0, 320), limited(hard, scale.HBW, 0, 320), limited(middle, scale.HBW, 0, 320)},
			convert.Counts{Conforms: 1, DoesNotConform: 1, NotProven: 1}, 1},
		{"nearest to failing", []record.Record{limited(soft, scale.HBW, 0, 320), limited(middle, scale.HBW, 0, 350), limited(soft, scale.HBW, 0, 250)},
			convert.Counts{Conforms: 2, NotProven: 1}, 1},
		{"worst of those that fail for certain", []record.Record{limited(middle, scale.HBW, 500, 0), limited(soft, scale.HBW, 500, 0)},
			convert.Counts{DoesNotConform: 2}, 1},
		{"least certain of those that pass for certain", []record.Record{limited(hard, scale.HBW, 100, 0), limited(middle, scale.HBW, 100, 0)},
			convert.Counts{Conforms: 2}, 1},
		{"nothing to compare", []record.Record{limited(none, scale.HBW, 0, 250), none, limited(middle, scale.HBW, 0, 330)},
			convert.Counts{CannotSay: 1, NoLimit: 1, NotProven: 1}, 2},
		{"first of equals", []record.Record{none, limited(middle, scale.HBW, 0, 320), limited(middle, scale.HBW, 0, 320)},
			convert.Counts{NoLimit: 1, NotProven: 2}, 1},
	} {
		t.Run(c.name, func(t *testing.T) {
			s := summarize(t, c.records...)
			if s.Counts != c.counts {
				t.Errorf("%+v, want %+v", s.Counts, c.counts)
			}
			if got := s.Worst; (got == nil) != (c.worst < 0) || got != nil && *got != c.worst {
				t.Errorf("worst %v, want %d", asJSON(t, got), c.worst)
			}
		})
	}
}

// The spots are compared in the limit's scale if all have a value in it.
func TestCommonScale(t *testing.T) {
	soft, hard := steel(420, 421, 422), steel(700, 701, 702)
	noCurve := taken("DL", "low-alloy-steel", 700, 702, 704)
	for _, c := range []struct {
		name    string
		records []record.Record
		want    scale.Key
		without int
	}{
		{"nothing", nil, "", 0},
		{"no readings", []record.Record{steel()}, "", 1},
		{"no limits", []record.Record{soft, hard}, scale.HV, 0},
		{"one limit", []record.Record{limited(soft, scale.HBW, 0, 250), limited(hard, scale.HBW, 0, 300)}, scale.HBW, 0},
		{"two limits", []record.Record{limited(soft, scale.HBW, 0, 250), limited(hard, scale.HRC, 0, 60)}, scale.HV, 0},
		{"a spot below the limit's scale", []record.Record{limited(soft, scale.HRC, 0, 22), limited(hard, scale.HRC, 0, 22)}, scale.HV, 0},
		{"a spot without a limit", []record.Record{limited(soft, scale.HBW, 0, 250), hard}, scale.HV, 0},
		{"a spot without a value", []record.Record{steel(), limited(soft, scale.HBW, 0, 250)}, scale.HBW, 1},
		{"as read", []record.Record{limited(noCurve, "HLDL", 0, 800), limited(noCurve, "HLDL", 0, 700)}, "HLDL", 0},
		{"as read, without limits", []record.Record{noCurve, noCurve}, "HLDL", 0},
		{"some without conversion", []record.Record{noCurve, noCurve, soft}, scale.HV, 2},
		{"direct", []record.Record{direct(scale.HRC, 40, 41, 40.5), direct(scale.HRC, 42, 41, 40.5)}, scale.HV, 0},
		{"direct, limited", []record.Record{limited(direct(scale.HRC, 40, 41, 40.5), scale.HRC, 30, 50)}, scale.HRC, 0},
	} {
		t.Run(c.name, func(t *testing.T) {
			if s := summarize(t, c.records...); s.Scale != c.want || s.Without != c.without {
				t.Errorf("%q and %d without, want %q and %d", s.Scale, s.Without, c.want, c.without)
			}
		})
	}
}

func inZone(r record.Record, z record.Zone) record.Record { r.Zone = z; return r }

// What a zone shows, against the sheets of its spots.
func TestZones(t *testing.T) {
	records := []record.Record{
		inZone(steel(500, 502, 504), record.Base), inZone(steel(640, 642, 644), record.HAZ), inZone(steel(520, 521, 522), record.Base),
		inZone(steel(510, 511, 515), record.Base), steel(600, 602, 604), inZone(steel(), record.Weld), inZone(direct(scale.HRC, 40, 41, 42), record.HAZ),
	}
	s := summarize(t, records...)
	var shown []string
	for _, z := range s.ByZone {
		shown = append(shown, fmt.Sprintf("%s %d: %s ± %s, %s to %s", z.Zone, z.N, z.Shown, z.ShownExpanded, z.ShownLow, z.ShownHigh))
		var values, expanded []float64
		for i, r := range records {
			if row := rowOf(t, mustEvaluate(t, r), scale.HV); r.Zone == z.Zone && row.Status == convert.OK {
				values, expanded = append(values, *row.Value), append(expanded, *row.Expanded)
				if *row.Value < z.Min || *row.Value > z.Max || z.MinRow == i && (*row.Low != z.Low || row.ShownLow != z.ShownLow) || z.MaxRow == i && *row.High != z.High {
					t.Errorf("%s: %+v against %+v", z.Zone, z, row)
				}
			}
		}
		mean, u := 0.0, 0.0
		for i := range values {
			mean += values[i] / float64(len(values))
			u += expanded[i] / float64(len(values))
		}
		if len(values) != z.N || math.Abs(mean-z.Mean) > 1e-9 || math.Abs(u-z.Expanded) > 1e-9 {
			t.Errorf("%s: %+v, want mean %g ± %g of %d", z.Zone, z, mean, u, len(values))
		}
	}
	// This program's own values, so that a change cannot pass unseen.
	want := []string{
		"base 3: 236 HV (HLD) ± 26, 201 to 271",
		"haz 2: 396 HV (HLD, HRC) ± 33, 350 to 427",
		" 1: 338 HV (HLD) ± 35, 302 to 373",
	}
	if !slices.Equal(shown, want) {
		t.Errorf("shown\n%s\nwant\n%s", strings.Join(shown, "\n"), strings.Join(want, "\n"))
	}
}

// NIST's SiRstv once more, as readings in HV that go the whole way.
func TestUniformityAgainstNIST(t *testing.T) {
	content, err := os.ReadFile("../testdata/nist_sirstv.csv")
	if err != nil {
		t.Fatal(err)
	}
	readings := make([][]float64, 5)
	for _, row := range table.MustRead("nist_sirstv.csv", content).Rows {
		i := int(row.Number("instrument")) - 1
		readings[i] = append(readings[i], row.Number("value"))
	}
	var records []record.Record
	for _, values := range readings {
		records = append(records, direct(scale.HV, values...))
	}
	rows, err := convert.DecodeRows([]byte(asJSON(t, convert.EvaluateRows(book(t, records...)))))
	if err != nil {
		t.Fatal(err)
	}
	u := convert.SummarizeRows(rows.Rows).Uniformity
	if u.F == nil || math.Abs(*u.F/1.18046237440255-1) > 1e-10 || !slices.Equal(u.DF, []int{4, 20}) || math.Abs(*u.P-0.34944749340219272) > 1e-10 {
		t.Fatalf("%s", asJSON(t, u))
	}
	const want = "Even: the 5 spots, with means from 196 to 196 HV, differ by no more than the readings at each of them scatter (F = 1.18, p = 0.35), so nothing here speaks against one hardness for the whole part."
	if u.Outcome != convert.Even || u.Sentence != want || u.ShownF != "1.18" || u.ShownP != "0.35" || u.Note != "" {
		t.Errorf("%s", asJSON(t, u))
	}
}

func TestUniformity(t *testing.T) {
	a, b := steel(600, 602, 604), steel(640, 642, 645)
	level := a
	level.Direction = device.Level
	thin := steel(700, 702, 704)
	thin.Piece = &device.Piece{ThicknessMm: new(0.5)}
	for _, c := range []struct {
		name     string
		records  []record.Record
		outcome  convert.UniformityOutcome
		sentence string // code
		spots    int
		leftOut  int
	}{
		{"nothing", nil, convert.NotKnown, "spots-too-few", 0, 0},
		{"one spot", []record.Record{a}, convert.NotKnown, "spots-too-few", 1, 0},
		{"one spot, and others without readings", []record.Record{a, steel(), steel()}, convert.NotKnown, "spots-too-few", 1, 0},
		{"single readings", []record.Record{steel(600), steel(610)}, convert.NotKnown, "spots-single", 2, 0},
		{"all alike", []record.Record{steel(600, 600, 600), steel(610, 610)}, convert.NotKnown, "spots-no-scatter", 2, 0},
		{"uneven", []record.Record{a, b}, convert.Uneven, "spots-uneven", 2, 0},
		{"even", []record.Record{a, a, a}, convert.Even, "spots-even", 3, 0},
		{"one reading among them", []record.Record{a, steel(603), a}, convert.Even, "spots-even", 3, 0},
		{"corrected for the direction", []record.Record{a, level}, convert.Uneven, "spots-uneven", 2, 0},
		{"another metal", []record.Record{a, taken("D", "tool-steel", 640, 642, 645), a}, convert.Even, "spots-even", 2, 1},
		{"another device", []record.Record{taken("G", "low-alloy-steel", 500, 502, 504), a, a}, convert.Even, "spots-even", 2, 1},
		{"no metal", []record.Record{taken("D", "", 600, 602, 604), taken("D", "", 600, 603, 604)}, convert.Even, "spots-even", 2, 0},
		{"a spot that is stopped", []record.Record{a, thin, a}, convert.Even, "spots-even", 2, 0},
	} {
		t.Run(c.name, func(t *testing.T) {
			u := summarize(t, c.records...).Uniformity
			if u.Outcome != c.outcome || len(u.Said) == 0 || u.Said[0].Code != c.sentence || u.Spots != c.spots || u.LeftOut != c.leftOut {
				t.Fatalf("%s", asJSON(t, u))
			}
			if u.Sentence == "" || strings.ContainsAny(u.Sentence+u.Note, "{}") || strings.Contains(u.Sentence, "<nil>") || (u.Note != "") != (c.leftOut > 0) {
				t.Errorf("%q, %q", u.Sentence, u.Note)
			}
			if known := u.Outcome != convert.NotKnown; (u.F != nil) != known || (u.P != nil) != known || (len(u.DF) == 2) != known || (u.ShownP != "") != known {
				t.Errorf("%s", asJSON(t, u))
			}
		})
	}
}

func TestTraverse(t *testing.T) {
	far := weldSpot(28, 655) // in the heat-affected zone, hardest
	far.Label = "HAZ, fill side"
	missing := weldSpot(10, 600)
	missing.Readings = nil
	records := []record.Record{weldSpot(20, 600), weldSpot(9, 630), far, weldSpot(-2.5, 480), missing, weldSpot(9, 620), steel(800, 801, 802)}
	s := summarize(t, records...)
	tr := s.Traverse
	var order []int
	for _, p := range tr.Points {
		order = append(order, p.Index)
		if (p.Value == nil) != (p.Index == 4) || (p.Shown == "") != (p.Index == 4) {
			t.Errorf("%s", asJSON(t, p))
		}
		if p.Value != nil && !(*p.Low < *p.Value && *p.Value < *p.High) {
			t.Errorf("%s", asJSON(t, p))
		}
	}
	if !slices.Equal(order, []int{3, 1, 5, 4, 0, 2}) || tr.Points[0].ShownPosition != "-2.5" || tr.Points[0].Position != -2.5 {
		t.Errorf("points %s", asJSON(t, tr.Points))
	}
	if tr.Min != nil || tr.Max == nil || *tr.Max != 350 || s.Scale != scale.HV {
		t.Errorf("limit %s in %s", asJSON(t, tr.Max), s.Scale)
	}
	if tr.Peak == nil || *tr.Peak != 2 || tr.Sentence != "The heat-affected zone is hardest at HAZ, fill side: 409 HV (HLD) ± 43." {
		t.Errorf("%s", asJSON(t, tr))
	}
	other := limited(weldSpot(15, 600), scale.HV, 0, 380)
	if tr := summarize(t, append(records, other)...).Traverse; tr.Max != nil {
		t.Error("two limits are given as one")
	}
	if tr := summarize(t, inZone(steel(600, 602, 604), record.HAZ)).Traverse; len(tr.Points) != 0 || tr.Peak == nil || !strings.Contains(tr.Sentence, " at #1: ") {
		t.Errorf("%s", asJSON(t, tr))
	}
}

// job is the JSON of a job of n spots as they are in practice.
func job(t testing.TB, n int) []byte {
	rng := rand.New(rand.NewPCG(43, 44))
	b := convert.Book{V: record.Version}
	for i := range n {
		r := weldSpot(float64(i%40), 590+10*rng.NormFloat64())
		r.ID, r.Label, r.Job = fmt.Sprintf("w%05d", i), fmt.Sprintf("Weld %d, %d mm", i/40, i%40), "Header, lower drum"
		r.Taken, r.Block = "2026-12-01T09:30:00Z", &record.Block{
			Certified: new(775.0), ExpandedU: new(6.0), Tolerance: new(6.0), Taken: "2026-12-01T08:00:00Z",
			Readings: []record.Number{record.Num(772), record.Num(776), record.Num(774)}}
		b.Records = append(b.Records, book(t, r).Records...)
	}
	return []byte(asJSON(t, b))
}

// BenchmarkEvaluateBook goes from the JSON of a book to that of its rows, and
// from there to that of its summary.
func BenchmarkEvaluateBook(b *testing.B) {
	for _, n := range []int{1000, 10_000, 100_000} {
		b.Run(fmt.Sprint(n), func(b *testing.B) {
			text := job(b, n)
			b.ReportAllocs()
			for b.Loop() {
				read, err := convert.DecodeBook(text)
				if err != nil {
					b.Fatal(err)
				}
				rows, err := convert.DecodeRows([]byte(asJSON(b, convert.EvaluateRows(read))))
				if err != nil {
					b.Fatal(err)
				}
				asJSON(b, convert.SummarizeRows(rows.Rows))
			}
			b.ReportMetric(float64(b.Elapsed().Microseconds())/float64(b.N*n), "µs/record")
		})
	}
}

// BenchmarkBookSheets goes from the JSON of a book to that of all its sheets.
func BenchmarkBookSheets(b *testing.B) {
	for _, n := range []int{1000, 10_000} {
		b.Run(fmt.Sprint(n), func(b *testing.B) {
			text := job(b, n)
			b.ReportAllocs()
			for b.Loop() {
				read, err := convert.DecodeBook(text)
				if err != nil {
					b.Fatal(err)
				}
				b.SetBytes(int64(len(asJSON(b, convert.EvaluateBook(read)))))
			}
			b.ReportMetric(float64(b.Elapsed().Microseconds())/float64(b.N*n), "µs/record")
		})
	}
}
