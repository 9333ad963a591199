package tabular

import (
	"errors"
	"fmt"
	"math/rand/v2"
	"reflect"
	"slices"
	"strings"
	"testing"

	"strikebook/convert/record"
	"strikebook/convert/record/recordtest"
	"strikebook/convert/scale"
	"strikebook/convert/verdict"
	"strikebook/convert/wording"
)

func mustRead(t testing.TB, q Request) Table {
	t.Helper()
	read, err := Read(q)
	if err != nil {
		t.Fatal(err)
	}
	return read
}

// short writes records so that a test can show them: label, readings, and what
// else is asked for by its path.
func short(records []record.Record, paths ...string) []string {
	var all []string
	for _, r := range records {
		line := r.Label + ": " + formatReadings(r.Readings)
		for _, path := range paths {
			f, _ := fieldAt(path)
			line += "; " + f.get(&r)
		}
		all = append(all, line)
	}
	return all
}

func badCodes(bad []BadRow) []string {
	var all []string
	for _, b := range bad {
		all = append(all, fmt.Sprintf("%d %s %s", b.Row, b.Error.Code, b.Error.Field))
	}
	return all
}

func TestSplit(t *testing.T) {
	for _, c := range []struct {
		name, text string
		delimiter  byte
		want       [][]string
		numbers    []int
	}{
		{"lines", "a,b\nc,d", ',', [][]string{{"a", "b"}, {"c", "d"}}, []int{1, 2}},
		{"all line ends", "a\r\nb\rc\nd\n", ',', [][]string{{"a"}, {"b"}, {"c"}, {"d"}}, []int{1, 2, 3, 4}},
		{"blank rows count", "\n a \n , \n\nb", ',', [][]string{{"a"}, {"b"}}, []int{2, 5}},
		{"empty cells", ",a,,\n", ',', [][]string{{"", "a", "", ""}}, []int{1}},
		{"space around", " a ,\tb\u00a0,c d", ',', [][]string{{"a", "b", "c d"}}, []int{1}},
		{"quotes", `"a,b","c ""d""",""` + "\n" + `"e` + "\n" + `f", "g" ,h`, ',', [][]string{{"a,b", `c "d"`, ""}, {"e\nf", "g", "h"}}, []int{1, 2}},
		{"quotes keep space", `" a ","` + "\t" + `b"`, ',', [][]string{{" a ", "\tb"}}, []int{1}},
		{"a stray quote", `5" pipe,"6" pipe,"open` + "\nnext,row", ',', [][]string{{`5" pipe`, `"6" pipe`, `"open`}, {"next", "row"}}, []int{1, 2}},
		{"an unclosed quote", "\"a,b\nc,d", ',', [][]string{{`"a`, "b"}, {"c", "d"}}, []int{1, 2}},
		{"no delimiter", "a,b;c\nd", 0, [][]string{{"a,b;c"}, {"d"}}, []int{1, 2}},
		{"tabs", "a\tb\n\tc", '\t', [][]string{{"a", "b"}, {"", "c"}}, []int{1, 2}},
		{"made harmless", "'=1+2,'-x,''+y,'tis", ',', [][]string{{"=1+2", "-x", "'+y", "'tis"}}, []int{1}},
		{"nothing", " \n,,\n", ',', nil, nil},
	} {
		t.Run(c.name, func(t *testing.T) {
			var cells [][]string
			var numbers []int
			for _, r := range split(c.text, c.delimiter, MaxRows) {
				cells, numbers = append(cells, r.cells), append(numbers, r.number)
			}
			if !reflect.DeepEqual(cells, c.want) || !slices.Equal(numbers, c.numbers) {
				t.Errorf("%q %v, want %q %v", cells, numbers, c.want, c.numbers)
			}
		})
	}
}

func TestDetect(t *testing.T) {
	for text, want := range map[string]byte{
		"label,readings\nA,612\nB,608":                         ',',
		"label;readings\nA;612,5\nB;608,0":                     ';',
		"label\treadings\nA, left\t612\nB\t608":                '\t',
		"a|b\nc|d":                                             '|',
		"612\n608\n615":                                        0,
		"612,5\n608,0\n615,3":                                  0,   // decimals
		"612,5;608,0\n615,3;611,9":                             ';', // decimals
		"612,608\n615,611":                                     ',',
		"612 608 615\n611 609 610":                             0,
		`"a;b","c;d"` + "\n" + `"e;f","g;h"`:                   ',',
		"Report 12; hall 3\nlabel,r1,r2\nA,612,608\nB,615,611": ',',
		"": 0,
	} {
		if got := detect(text); got != want {
			t.Errorf("%q: %q, want %q", text, got, want)
		}
	}
}

// A plain number stays one, whatever else a spreadsheet would compute is made
// harmless, and reading gives every cell back.
func TestHarmless(t *testing.T) {
	for cell, want := range map[string]string{
		"=1+2": "'=1+2", "+1": "+1", "-5.25": "-5.25", "-1e-3": "-1e-3", "+x": "'+x", "-": "'-", "-1-1": "'-1-1", "@sum": "'@sum",
		"\tx": "'\tx", "\r": "'\r", "\n=1": "'\n=1", "'=1": "''=1", "'x": "'x", "x=1": "x=1", "": "", "-0x1p4": "'-0x1p4", "-Inf": "'-Inf", "+1_0": "'+1_0",
	} {
		if got := harmless(cell); got != want {
			t.Errorf("%q is written as %q, want %q", cell, got, want)
		}
		if got := harmful(harmless(cell)); got != cell {
			t.Errorf("%q came back as %q", cell, got)
		}
	}
}

func TestAppendRow(t *testing.T) {
	got := string(AppendRow(nil, []string{"a", "b c", "d,e", `f"g`, "h\ni", " j", "=k", "é", "", "{", "x'"}))
	const want = "a,b c,\"d,e\",\"f\"\"g\",\"h\ni\",\" j\",'=k,\"é\",,\"{\",x'\r\n"
	if got != want {
		t.Errorf("%q, want %q", got, want)
	}
}

func TestReadings(t *testing.T) {
	for _, c := range []struct {
		cell  string
		lists bool
		want  string
	}{
		{"612", false, "612"},
		{"612 608  615", false, "612 608 615"},
		{"612; 608;615", false, "612 608 615"},
		{"612/608|615\n611", false, "612 608 615 611"},
		{"612,5", false, "612.5"},
		{"612,5 608,25", false, "612.5 608.25"},
		{"612,608,615", false, "612 608 615"},
		{"612, 608, 615", false, "612 608 615"},
		{"612,608", true, "612 608"},
		{"612.5,608", true, "612.5 608"},
		{"612,5", true, "612 5"},
		{"612,5,608", false, `"612,5,608"`}, // cannot be told
		{"612 6l5", false, `612 "6l5"`},
		{"612 655[probe tilted] 608", false, "612 655[probe tilted] 608"},
		{`612 655 [tilted ]]x] "6 l ""2"[why]`, false, `612 655[tilted ]]x] "6 l ""2"[why]`},
		{"[nothing] 612", false, `"[nothing]" 612`},
		{`""`, false, `""`},
		{"612 [open", false, `612 "[open"`},
		{", ;", false, ""},
	} {
		if got := formatReadings(parseReadings(c.cell, c.lists)); got != c.want {
			t.Errorf("%q: %s, want %s", c.cell, got, c.want)
		}
	}
}

func TestTimeOf(t *testing.T) {
	for cell, want := range map[string]string{
		"2026-12-01":                "2026-12-01T00:00:00Z",
		"2026-12-01 09:30":          "2026-12-01T09:30:00Z",
		" 2026-12-01T9:30 ":         "2026-12-01T09:30:00Z",
		"1.12.2026":                 "2026-12-01T00:00:00Z",
		"01.12.2026 09:30:15":       "2026-12-01T09:30:15Z",
		"2026-12-01T09:30:00Z":      "2026-12-01T09:30:00Z",
		"2026-12-01T09:30:00+01:00": "2026-12-01T09:30:00+01:00",
		"1/12/2026":                 "1/12/2026",
		"1.12.26":                   "1.12.26",
		"Tuesday":                   "Tuesday",
		"2026-12-01 noon":           "2026-12-01 noon",
	} {
		if got := timeOf(cell); got != want {
			t.Errorf("%q: %q, want %q", cell, got, want)
		}
	}
}

func TestParseLimit(t *testing.T) {
	for cell, want := range map[string]string{
		"max 225 HBW": "<225 HBW", "≤225 HB": "<225 HBW", "<= 22 HRC": "<22 HRC", "not more than 22,5 HRC": "<22.5 HRC", "at most 350 HV": "<350 HV",
		"min. 180": "180<", "≥ 180 HV": "180< HV", "180 to 225 HBW": "180<225 HBW", "180-225": "180<225", "180 – 225 HV": "180<225 HV", "180..225": "180<225",
		"225": "", "225 HBW": "", "max": "", "": "", "max 225 cows": "", "max 2 2": "", "about 225": "", "x 180 to 225": "", "> 1 to 2": "",
	} {
		l, ok := parseLimit(cell)
		got := ""
		if ok {
			if l.Min != nil {
				got += formatNumber(*l.Min)
			}
			got += "<"
			if l.Max != nil {
				got += formatNumber(*l.Max)
			}
			got = strings.TrimSpace(got + " " + string(l.Scale))
		}
		if got != want {
			t.Errorf("%q: %q, want %q", cell, got, want)
		}
	}
}

func TestRead(t *testing.T) {
	defaults := record.Record{
		ID: "not this", Job: "Bridge", Device: "D", Group: "low-alloy-steel",
		Readings: []record.Reading{{Value: record.Num(1)}},
		Limit:    &verdict.Limit{Scale: scale.HBW, Max: new(225.0), Rule: verdict.Simple},
	}
	for _, c := range []struct {
		name    string
		request Request
		columns string // roles
		layout  Layout
		want    []string
		paths   []string
		bad     []string
	}{
		{name: "a spot a row", layout: SpotARow,
			request: Request{Text: "Location,Zone,R1,R2,R3\nCap,Weld metal,612,608,615\nToe,HAZ,640,,645\n"},
			columns: "label zone readings readings readings", paths: []string{"zone", "job", "device"},
			want: []string{"Cap: 612 608 615; weld; Bridge; D", "Toe: 640 645; haz; Bridge; D"}},
		{name: "a list in a cell", layout: SpotARow,
			request: Request{Text: "\ufeffspot;readings;date;inspector\r\nA;612 608,5 615;1.12.2026;J. Doe\r\n\r\nB;\"700;701\";2026-12-02 08:15;\r\n"},
			columns: "label readings taken by", paths: []string{"taken", "by"},
			want: []string{"A: 612 608.5 615; 2026-12-01T00:00:00Z; J. Doe", "B: 700 701; 2026-12-02T08:15:00Z; "}},
		{name: "a reading a row", layout: ReadingARow,
			request: Request{Text: "Point\tHLD\tRejected\tTime\nA\t612\t\t2026-12-01 09:30\nA\t655\ttilted\t2026-12-01 09:31\nB\t700\t\t\nA\t608\t\t\n"},
			columns: "label readings struck taken", paths: []string{"taken", "scale"},
			want: []string{"A: 612 655[tilted] 608; 2026-12-01T09:30:00Z; HLD", "B: 700; ; HLD"}},
		{name: "a reading a row, label once", layout: ReadingARow,
			request: Request{Text: "spot,hardness,notes\nA,612,dry\n,608,ground\n,615,ground\nB,700,\n,702,\n"},
			columns: "label readings notes", paths: []string{"notes"},
			want: []string{"A: 612 608 615; dry; ground", "B: 700 702; "}},
		{name: "only readings", layout: SpotARow,
			request: Request{Text: "612\t608\t615\n700\t701\t702\n"}, columns: "readings readings readings",
			want: []string{": 612 608 615", ": 700 701 702"}},
		{name: "lists without anything else", layout: SpotARow,
			request: Request{Text: "612 608 615\n700 701 702\n"}, columns: "readings",
			want: []string{": 612 608 615", ": 700 701 702"}},
		{name: "decimal commas", layout: SpotARow,
			request: Request{Text: "612,5\n608,0\n"}, columns: "readings", want: []string{": 612.5", ": 608"}},
		{name: "numbered rows", layout: SpotARow,
			request: Request{Text: "1;612;608\n2;700;701\n3;702;703\n"}, columns: "label readings readings",
			want: []string{"1: 612 608", "2: 700 701", "3: 702 703"}},
		{name: "numbered columns", layout: SpotARow,
			request: Request{Text: "No;1;2;Mean\n1;612;608;610\n2;700;701;700\n"}, columns: "label readings readings ",
			want: []string{"1: 612 608", "2: 700 701"}},
		{name: "readings beyond the header", layout: SpotARow,
			request: Request{Text: "label,readings\nA,612,608\nB,700,701,702\n"}, columns: "label readings readings readings",
			want: []string{"A: 612 608", "B: 700 701 702"}},
		{name: "limits", layout: SpotARow,
			request: Request{Text: "label;readings;min;max;limit scale\nA;612;180;240;HB\nB;612;;250;\nC;612;;;HV\n"},
			columns: "label readings limit.min limit.max limit.scale", paths: []string{"limit.min", "limit.max", "limit.scale", "limit.rule"},
			want: []string{"A: 612; 180; 240; HBW; simple", "B: 612; ; 250; HBW; simple", "C: 612; ; 225; HV; simple"}},
		{name: "a limit in a cell", layout: SpotARow,
			request: Request{Text: "label;readings;required\nA;612;≤ 22 HRC\nB;612;180 to 240\nC;612;soft\nD;612;\n"},
			columns: "label readings limit", paths: []string{"limit.min", "limit.max", "limit.scale", "limit.rule"},
			want: []string{"A: 612; ; 22; HRC; simple", "B: 612; 180; 240; HBW; simple", "D: 612; ; 225; HBW; simple"},
			bad:  []string{"4 row-limit limit"}},
		{name: "statistics are no limits", layout: SpotARow,
			request: Request{Text: "label,r1,r2,min,max,mean,upper limit\nA,612,608,608,612,610,240\n"},
			columns: "label readings readings    limit.max", paths: []string{"limit.min", "limit.max"}, want: []string{"A: 612 608; ; 240"}},
		{name: "another device over the readings", layout: SpotARow,
			request: Request{Text: "label,HLG 1,HLG 2\nA,512,508\n"}, columns: "label readings readings",
			paths: []string{"device", "scale"}, want: []string{"A: 512 508; G; HLG"}},
		{name: "another device in the row", layout: SpotARow,
			request: Request{Text: "label,device,metal,r1\nA,hlg,Cast steel,512\nB,D+15,copper,400\nC,Q,brass,400\nD,D,soap,400\n"},
			columns: "label device group readings", paths: []string{"device", "scale", "group"},
			want: []string{"A: 512; G; ; low-alloy-steel", "B: 400; D+15; ; copper"}, bad: []string{"4 unknown-choice device", "5 unknown-choice group"}},
		{name: "a direct scale in the row", layout: SpotARow,
			request: Request{Text: "label,scale,r1\nA,HRC,32.5\n"}, columns: "label scale readings",
			paths: []string{"device", "scale"}, want: []string{"A: 32.5; ; HRC"}},
		{name: "bad rows", layout: SpotARow,
			request: Request{Text: "label;readings;position mm;date;zone\nA;612;1,5;;\nB;612;far;;\nC;612;2;1/12/2026;\n;;3;;\nD;6l2;4;;\nE;612;5;;sky\nF;;6;;\n"},
			columns: "label readings position_mm taken zone", paths: []string{"position_mm"},
			want: []string{"A: 612; 1.5", `D: "6l2"; 4`, "F: ; 6"},
			bad:  []string{"3 row-cell position_mm", "4 not-a-time taken", "5 row-empty ", "7 unknown-choice zone"}},
		{name: "bad readings", layout: ReadingARow,
			request: Request{Text: "label,zone,reading\n,haz,600\nA,haz,612\nA,weld,608\nA,,\nB,sky,700\nB,sky,701\nA,haz,615\n"},
			columns: "label zone readings", paths: []string{"zone"}, want: []string{"A: 612 615; haz"},
			bad: []string{"2 row-no-label label", "4 row-differs zone", "5 row-no-reading readings", "6 unknown-choice zone", "7 unknown-choice zone"}},
		{name: "unknown headers", layout: SpotARow,
			request: Request{Text: "Ort;Messwert\nA;612\nB;608\n"}, columns: " ", bad: []string{"2 row-empty ", "3 row-empty "}},
		{name: "headers matched by hand", layout: SpotARow,
			request: Request{Text: "Ort;Messwert\nA;612\nB;608\n", Mapping: []string{"label", "readings"}}, columns: "label readings",
			want: []string{"A: 612", "B: 608"}},
		{name: "headers remembered", layout: SpotARow,
			request: Request{Text: "ORT ;Mess-Wert;label\nA;612;x\nB;608;y\n", Known: []ColumnWord{{"Ort", "label"}, {"Messwert", "readings"}, {"label", "notes"}}},
			columns: "label readings notes", paths: []string{"notes"}, want: []string{"A: 612; x", "B: 608; y"}},
		{name: "told otherwise", layout: SpotARow,
			request: Request{Text: "A,612;5\nA,608;7\n", Delimiter: ";", Header: WithoutHeader, Layout: SpotARow, Mapping: []string{"notes", "readings", "label"}},
			columns: "notes readings", paths: []string{"notes"}, want: []string{": 5; A,612", ": 7; A,608"}},
		{name: "told that there is a header", layout: SpotARow,
			request: Request{Text: "600,601\n612,608\n", Header: WithHeader}, columns: "readings readings", want: []string{": 612 608"}},
		{name: "twins", layout: SpotARow,
			request: Request{Text: "label,spot,r1\nA,B,612\n"}, columns: "label  readings", want: []string{"A: 612"}},
		{name: "harmless cells", layout: SpotARow,
			request: Request{Text: "label,r1\n'=A1,612\n"}, columns: "label readings", want: []string{"=A1: 612"}},
		{name: "nothing", layout: SpotARow, request: Request{Text: " \n\n"}, columns: ""},
		{name: "a header alone", layout: SpotARow, request: Request{Text: "label,readings\n"}, columns: "label readings"},
	} {
		t.Run(c.name, func(t *testing.T) {
			c.request.Defaults = defaults
			read := mustRead(t, c.request)
			if got := strings.Join(read.Mapping, " "); got != c.columns {
				t.Errorf("roles %q, want %q", got, c.columns)
			}
			if read.Layout != c.layout {
				t.Errorf("layout %s, want %s", read.Layout, c.layout)
			}
			if got := short(read.Records, c.paths...); !slices.Equal(got, c.want) {
				t.Errorf("records\n%s\nwant\n%s", strings.Join(got, "\n"), strings.Join(c.want, "\n"))
			}
			if got := badCodes(read.Bad); !slices.Equal(got, c.bad) {
				t.Errorf("bad rows %q, want %q", got, c.bad)
			}
			mustAccount(t, read)
		})
	}
	if defaults.Limit.Min != nil || *defaults.Limit.Max != 225 || defaults.Limit.Scale != scale.HBW {
		t.Errorf("the defaults have changed: %+v", defaults.Limit)
	}
}

// mustAccount makes sure that a table says where everything went, in sentences.
func mustAccount(t testing.TB, read Table) {
	t.Helper()
	if len(read.At) != len(read.Records) || len(read.Mapping) != len(read.Columns) {
		t.Errorf("%d records at %d rows, %d columns with %d roles", len(read.Records), len(read.At), len(read.Columns), len(read.Mapping))
	}
	if read.Layout == SpotARow && len(read.Records)+len(read.Bad) != read.Rows {
		t.Errorf("%d rows gave %d records and %d bad rows", read.Rows, len(read.Records), len(read.Bad))
	}
	for _, b := range read.Bad {
		if b.Error == nil || b.Error.Message == "" || strings.ContainsAny(b.Error.Message, "{}") && !strings.ContainsAny(strings.Join(b.Cells, ""), "{}") || b.Row < 1 || len(b.Cells) == 0 {
			t.Errorf("bad row %+v: %v", b, b.Error)
		}
	}
	if !slices.IsSortedFunc(read.Bad, func(a, b BadRow) int { return a.Row - b.Row }) {
		t.Error("bad rows are not in their order")
	}
	for _, r := range read.Records {
		if err := r.Validate(); err != nil {
			t.Errorf("record %+v: %v", r, err)
		}
	}
}

func TestRefusals(t *testing.T) {
	wide := strings.Repeat("612;", maxColumns+1)
	for _, c := range []struct {
		name    string
		request Request
		code    string
		field   string
	}{
		{"delimiter", Request{Delimiter: "x"}, "unknown-choice", "delimiter"},
		{"two delimiters", Request{Delimiter: ";,"}, "unknown-choice", "delimiter"},
		{"header", Request{Header: "maybe"}, "unknown-choice", "header"},
		{"layout", Request{Layout: "column"}, "unknown-choice", "layout"},
		{"mapping", Request{Mapping: []string{"label", "spots"}}, "unknown-choice", "mapping[1]"},
		{"version", Request{Mapping: []string{"v"}}, "unknown-choice", "mapping[0]"},
		{"known", Request{Known: []ColumnWord{{"Ort", "place"}}}, "unknown-choice", "known[0].role"},
		{"defaults", Request{Defaults: record.Record{Device: "Q"}}, "unknown-choice", "device"},
		{"wide", Request{Text: wide}, "table-too-wide", "text"},
		{"long", Request{Text: strings.Repeat("612\n", MaxRows+1)}, "table-too-long", "text"},
		{"long, with a header", Request{Text: "r1\n" + strings.Repeat("612\n", MaxRows+1)}, "table-too-long", "text"},
		{"large", Request{Text: strings.Repeat(" ", MaxTableBytes+1)}, "table-too-large", "text"},
	} {
		t.Run(c.name, func(t *testing.T) {
			_, err := Read(c.request)
			var e *wording.Error
			if !errors.As(err, &e) || e.Code != c.code || e.Field != c.field {
				t.Errorf("%v, want %s at %q", err, c.code, c.field)
			}
		})
	}
	if read := mustRead(t, Request{Text: "r1\n" + strings.Repeat("612\n", MaxRows)}); len(read.Records) != MaxRows {
		t.Errorf("of %d rows %d are read", MaxRows, len(read.Records))
	}
	for text, code := range map[string]string{
		`{"text":"612","colour":1}`: "unknown-field", `{"text":612}`: "wrong-type", `{"text":"`: "record-not-json",
		`{"text":"","defaults":{"v":1,"readings":[{"hl":1}]}}`: "unknown-field",
	} {
		var e *wording.Error
		if _, err := DecodeRequest([]byte(text)); !errors.As(err, &e) || e.Code != code {
			t.Errorf("%s: %v, want %s", text, err, code)
		}
	}
}

// A spot of more readings than a record takes is refused whole, row by row.
func TestTooManyReadings(t *testing.T) {
	text := "label,reading\n" + strings.Repeat("A,612\n", record.MaxReadings+1) + "B,608\nB,609\n"
	read := mustRead(t, Request{Text: text})
	if len(read.Records) != 1 || len(read.Bad) != record.MaxReadings+1 || read.Bad[0].Error.Code != "too-many-readings" {
		t.Errorf("%d records, %d bad rows", len(read.Records), len(read.Bad))
	}
}

// What is written comes back: every field, every reading, whatever it holds.
func TestRoundTrip(t *testing.T) {
	rng := rand.New(rand.NewPCG(47, 48))
	var records []record.Record
	text := AppendRow(nil, Fields())
	for i := range 500 {
		r := recordtest.Random(rng)
		r.Label += fmt.Sprint("#", i)
		records = append(records, r)
		text = AppendRow(text, Cells(r))
	}
	read := mustRead(t, Request{Text: string(text)})
	if len(read.Bad) > 0 || len(read.Records) != len(records) || read.Layout != SpotARow || !read.Header {
		t.Fatalf("%d records, bad rows %v", len(read.Records), badCodes(read.Bad))
	}
	for i, want := range records {
		got := read.Records[i]
		if !slices.Equal(Cells(got), Cells(want)) {
			t.Fatalf("record %d:\ngot  %q\nwant %q", i, Cells(got), Cells(want))
		}
		if !recordtest.Equal(record.Record{Label: got.Label, Readings: got.Readings, Taken: got.Taken}, record.Record{Label: want.Label, Readings: want.Readings, Taken: want.Taken}) {
			t.Fatalf("record %d: %+v, want %+v", i, got, want)
		}
	}
}

// Every field of a record has a column, and one that can be read.
func TestEveryFieldHasAColumn(t *testing.T) {
	for _, path := range []string{"id", "label", "position_mm", "readings", "piece.shape.wall_mm", "block.readings", "limit.max", "confidence"} {
		if !slices.Contains(Fields(), path) {
			t.Errorf("there is no column %s in %v", path, Fields())
		}
	}
	for w, key := range words() {
		if w.kind != "column" && w.kind != "extreme" && w.kind != "spare" {
			continue
		}
		if !isRole(key) {
			t.Errorf("the word %q stands for %q, which is no role", w.plain, key)
		}
		if w.plain == "" {
			t.Errorf("a word for %s has no letter", key)
		}
	}
	// The words of cells stand for keys that a record takes.
	for w, key := range words() {
		r := record.Record{V: record.Version}
		switch w.kind {
		case "zone":
			r.Zone = record.Zone(key)
		case "group":
			r.Group = key
		case "device":
			r.Device = key
		case "direction":
			f, _ := fieldAt("direction")
			f.set(&r, key, false)
		case "scale":
			r.Limit = &verdict.Limit{Scale: scale.Key(key)}
		}
		if err := r.Validate(); err != nil {
			t.Errorf("%v: %v", w, err)
		}
	}
}

func FuzzRead(f *testing.F) {
	for _, text := range []string{
		"Location,Zone,R1,R2,R3\nCap,Weld metal,612,608,615\n", "spot;readings;date\nA;612 608,5 615;1.12.2026\n", "Point\tHLD\tRejected\nA\t612\t\nA\t655\ttilted\n",
		"612,5\n608,0\n", "\"a\"\"b\",\"c\nd\"\r\n'=1,-2\n", "label;required\nA;≤ 22 HRC\n", "label,readings\nA,\"612 655[tilted] \"\"6l2\"\"\"\n", "id,curve,piece.mass_kg\n,{},1e309\n",
	} {
		f.Add(text, "", "", byte(0))
		f.Add(text, "label", "readings", byte(3))
	}
	f.Fuzz(func(t *testing.T, text, first, second string, choice byte) {
		text = strings.ToValidUTF8(text, "\ufffd") // as JSON hands it over
		q := Request{Text: text, Layout: []Layout{"", SpotARow, ReadingARow}[choice%3], Header: []Header{"", WithHeader, WithoutHeader}[choice/3%3]}
		if first != "" {
			q.Mapping = []string{first, second}
		}
		read, err := Read(q)
		if err != nil {
			var e *wording.Error
			if !errors.As(err, &e) || e.Message == "" {
				t.Fatalf("%v", err)
			}
			return
		}
		mustAccount(t, read)
		// Each character that is more than punctuation or space is still there.
		var all strings.Builder
		for _, r := range split(strings.TrimPrefix(text, "\ufeff"), []byte(read.Delimiter + "\x00")[0], MaxRows) {
			all.WriteString(strings.Join(r.cells, ""))
		}
		letters := func(s string) string {
			return strings.Map(func(r rune) rune {
				if r < 0x80 && plainWord(string(r)) == "" || r == '\u0085' || r == '\u00a0' || strings.TrimSpace(string(r)) == "" {
					return -1
				}
				return r
			}, s)
		}
		if got, want := letters(all.String()), letters(strings.TrimPrefix(text, "\ufeff")); got != want {
			t.Fatalf("cells hold %q of %q", got, want)
		}
		// What was read is written and read again without a change.
		written := AppendRow(nil, Fields())
		for _, r := range read.Records {
			written = AppendRow(written, Cells(r))
		}
		again := mustRead(t, Request{Text: string(written), Layout: SpotARow})
		kept := slices.DeleteFunc(slices.Clone(read.Records), func(r record.Record) bool { return r.Label == "" && len(r.Readings) == 0 })
		if len(again.Bad) > 0 || len(again.Records) != len(kept) {
			t.Fatalf("written as %q, %d records came back as %d, bad %v", written, len(kept), len(again.Records), badCodes(again.Bad))
		}
		for i, r := range kept {
			if !slices.Equal(Cells(r), Cells(again.Records[i])) {
				t.Fatalf("%q came back as %q", Cells(r), Cells(again.Records[i]))
			}
		}
	})
}

func BenchmarkRead(b *testing.B) {
	for _, n := range []int{1000, 10_000, 100_000} {
		text := "spot;zone;position mm;r1;r2;r3;r4;r5;max\n"
		var all strings.Builder
		all.WriteString(text)
		for i := range n {
			fmt.Fprintf(&all, "Weld %d, %d mm;HAZ;%d,5;612;608;615;611,5;609;350\n", i/40, i%40, i%40)
		}
		b.Run(fmt.Sprint(n), func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				if read := mustRead(b, Request{Text: all.String()}); len(read.Records) != n {
					b.Fatal(len(read.Records))
				}
			}
			b.ReportMetric(float64(b.Elapsed().Microseconds())/float64(b.N*n), "µs/row")
		})
	}
}
