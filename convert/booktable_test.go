package convert_test

import (
	"encoding/csv"
	"slices"
	"strings"
	"testing"

	"strikebook/convert"
	"strikebook/convert/record"
	"strikebook/convert/record/recordtest"
	"strikebook/convert/scale"
	"strikebook/convert/tabular"
)

// cellsOf reads CSV with the standard library's reader, and finds cells by the
// headers.
func cellsOf(t *testing.T, text string) (rows []map[string]string) {
	t.Helper()
	lines, err := csv.NewReader(strings.NewReader(text)).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	for _, line := range lines[1:] {
		row := map[string]string{}
		for i, name := range lines[0] {
			row[name] = line[i]
		}
		if len(row) != len(lines[0]) {
			t.Fatalf("two columns have one name: %q", lines[0])
		}
		rows = append(rows, row)
	}
	return rows
}

func TestWriteTable(t *testing.T) {
	r := limited(steel(612, 608, 615, 655), scale.HBW, 0, 360)
	r.Label, r.Notes = "=cmd|' /C calc'!A0", "first line\nsecond, with \"quotes\""
	r.Readings[3].Struck = "probe tilted"
	b := book(t, r, steel())
	b.Records = append(b.Records, convert.RecordText(`{"v":1,"device":"Q"}`))
	text := convert.WriteTable(convert.TableBook{Book: b})
	rows := cellsOf(t, text)
	if len(rows) != 3 {
		t.Fatalf("%d rows", len(rows))
	}
	sheet := mustEvaluate(t, r)
	hbw := rowOf(t, sheet, scale.HBW)
	for name, want := range map[string]string{
		"label": "'" + r.Label, "notes": r.Notes, "device": "D", "readings": "612 608 615 655[probe tilted]", "limit.max": "360",
		"piece.mass_kg": "100", "result n": "3", "result struck": "1", "result mean": "612 HLD", "result corrected": "612 HLD",
		"result HBW": hbw.ShownValue, "result HBW U": hbw.ShownExpanded, "result HRB": "", "result verdict": string(sheet.Verdict.Outcome),
		"result chance %": sheet.Verdict.ShownChance, "result sentence": sheet.Verdict.Sentence, "result findings": "no-block-check",
		"result edition": convert.Edition, "error": "",
	} {
		if got := rows[0][name]; got != want {
			t.Errorf("%s is %q, want %q", name, got, want)
		}
	}
	if rows[1]["result n"] != "0" || rows[1]["result HV"] != "" || rows[1]["readings"] != "" {
		t.Errorf("without readings: %q", rows[1])
	}
	if !strings.Contains(rows[2]["error"], "device") || rows[2]["result verdict"] != "" {
		t.Errorf("no record: %q", rows[2])
	}
	// No value without its uncertainty.
	for _, row := range rows {
		for _, s := range scale.Converted() {
			if (row["result "+string(s.Key)] == "") != (row["result "+string(s.Key)+" U"] == "") {
				t.Errorf("%s: %q ± %q", s.Key, row["result "+string(s.Key)], row["result "+string(s.Key)+" U"])
			}
		}
	}
	// In parts it is the same text.
	parts := ""
	for i := range b.Records {
		parts += convert.WriteTable(convert.TableBook{Book: convert.Book{V: 1, Records: b.Records[i : i+1]}, Continued: i > 0})
	}
	if parts != text {
		t.Error("written in parts, the table is another")
	}
}

// A table that was written gives its records back, and no result is taken for a
// reading or a limit.
func TestTableComesBack(t *testing.T) {
	var records []record.Record
	b := someBook(t)
	for _, text := range b.Records {
		if r, err := record.Decode(text); err == nil && (r.Label != "" || len(r.Readings) > 0) {
			records = append(records, r)
		}
	}
	read, err := tabular.Read(tabular.Request{Text: convert.WriteTable(convert.TableBook{Book: book(t, records...)}), Layout: tabular.SpotARow})
	if err != nil || len(read.Bad) > 0 || len(read.Records) != len(records) {
		t.Fatalf("%d records of %d, %d bad rows, %v", len(read.Records), len(records), len(read.Bad), err)
	}
	for i, want := range records {
		got := read.Records[i]
		if !slices.Equal(tabular.Cells(got), tabular.Cells(want)) {
			t.Fatalf("record %d came back as %q, was %q", i, tabular.Cells(got), tabular.Cells(want))
		}
		got.Piece, got.Block, got.Limit, want.Piece, want.Block, want.Limit = nil, nil, nil, nil, nil, nil // empty ones do not come back
		if !recordtest.Equal(got, want) {
			t.Fatalf("record %d came back as %+v, was %+v", i, got, want)
		}
	}
}
