package main

import (
	"encoding/json"
	"fmt"
	"slices"
	"strings"
	"testing"
)

// jobOf is the JSON of a job of n spots as they are in practice.
func jobOf(n int) string {
	var spots []string
	for i := range n {
		level := 600 + i%20
		spots = append(spots, fmt.Sprintf(`{"v":1,"id":"s%05d","label":"Header, weld %d, %d mm","taken":"2026-12-01T09:30:00Z","zone":"haz","position_mm":%d,`+
			`"device":"D","direction":"level","group":"low-alloy-steel","readings":[{"value":%d},{"value":%d},{"value":%d},{"value":%d},{"value":%d}],`+
			`"piece":{"mass_kg":100,"thickness_mm":40},"block":{"certified":775,"expanded_u":6,"readings":[772,776,774],"tolerance":6,"taken":"2026-12-01T08:30:00Z"},`+
			`"limit":{"scale":"HBW","max":350,"rule":"guarded"}}`, i, i/40, i%40, i%40, level, level+3, level-4, level+1, level-2))
	}
	return `{"v":1,"records":[` + strings.Join(spots, ",") + `]}`
}

func TestBookDoors(t *testing.T) {
	book := strings.Replace(jobOf(7), `{"v":1,"id":"s00003"`, `{"v":1,"dye":"red","id":"s00003"`, 1)
	var whole struct {
		Sheets  []json.RawMessage
		Summary json.RawMessage
	}
	mustRead(t, through(t, "evaluateBook", book), &whole)
	if len(whole.Sheets) != 7 {
		t.Fatalf("%d sheets", len(whole.Sheets))
	}
	var given struct{ Records []json.RawMessage }
	mustRead(t, book, &given)
	for i, record := range given.Records {
		if alone := through(t, "evaluate", string(record)); alone != string(whole.Sheets[i]) {
			t.Errorf("record %d:\ngot  %s\nwant %s", i, whole.Sheets[i], alone)
		}
	}
	if e := fault(t, string(whole.Sheets[3])); e == nil || e.Field != "dye" {
		t.Errorf("the sheet of what is no record: %s", whole.Sheets[3])
	}

	// In parts, by rows.
	var rows []string
	for part := range slices.Chunk(given.Records, 3) {
		text, err := json.Marshal(map[string]any{"v": 1, "records": part})
		if err != nil {
			t.Fatal(err)
		}
		var some struct{ Rows []json.RawMessage }
		mustRead(t, through(t, "evaluateRows", string(text)), &some)
		for _, row := range some.Rows {
			rows = append(rows, string(row))
		}
	}
	summary := through(t, "summarizeRows", `{"rows":[`+strings.Join(rows, ",")+`]}`)
	if summary != string(whole.Summary) {
		t.Errorf("summary\ngot  %s\nwant %s", summary, whole.Summary)
	}
	mustHold(t, summary, "counts", "byZone", "uniformity", "worst", "traverse", "scale", "invalid")
}

func TestTableDoors(t *testing.T) {
	csv := through(t, "writeTable", jobOf(5))
	if !strings.HasPrefix(csv, "id,label,") || strings.Count(csv, "\r\n") != 6 {
		t.Fatalf("%.300s", csv)
	}
	if rest := through(t, "writeTable", strings.Replace(jobOf(5), `{`, `{"continued":true,`, 1)); !strings.HasSuffix(csv, "\r\n"+rest) {
		t.Errorf("%.300s", rest)
	}
	request, err := json.Marshal(map[string]any{"text": csv, "defaults": map[string]any{"v": 1, "readings": []int{}}})
	if err != nil {
		t.Fatal(err)
	}
	answer := through(t, "readTable", string(request))
	mustHold(t, answer, "columns", "mapping", "records", "at", "bad", "layout", "header", "delimiter", "rows")
	var read struct {
		Records []json.RawMessage
		Bad     []any
	}
	mustRead(t, answer, &read)
	var given struct{ Records []json.RawMessage }
	mustRead(t, jobOf(5), &given)
	if len(read.Bad) > 0 || len(read.Records) != 5 {
		t.Fatal(answer)
	}
	for i, record := range read.Records {
		if string(record) != string(given.Records[i]) {
			t.Errorf("record %d came back as\n%s, was\n%s", i, record, given.Records[i])
		}
	}
}

func TestBookDoorRefusals(t *testing.T) {
	for _, c := range []struct{ door, text, code, field string }{
		{"evaluateBook", `{"v":1,"records":[{]}`, "record-not-json", "records"},
		{"evaluateBook", pivot, "unknown-field", "id"},
		{"evaluateRows", `{"v":3,"records":[]}`, "record-version", "v"},
		{"summarizeRows", `{"v":1,"rows":[]}`, "unknown-field", "v"},
		{"summarizeRows", `{"rows":[{"n":"x"}]}`, "wrong-type", "rows[0].n"},
		{"readTable", `{"text":"","layout":"x"}`, "unknown-choice", "layout"},
		{"writeTable", `{"records":[]}`, "record-version", "v"},
	} {
		t.Run(c.door+" "+c.code, func(t *testing.T) {
			if e := fault(t, through(t, c.door, c.text)); e == nil || e.Code != c.code || e.Field != c.field {
				t.Errorf("%v, want %s at %q", e, c.code, c.field)
			}
		})
	}
}

func BenchmarkBookDoors(b *testing.B) {
	const spots = 200
	book := jobOf(spots)
	rows := through(b, "evaluateRows", book)
	for _, c := range []struct{ door, text string }{{"evaluateRows", book}, {"summarizeRows", rows}, {"evaluateBook", book}, {"writeTable", book}} {
		b.Run(c.door, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				if answer := through(b, c.door, c.text); strings.HasPrefix(answer, `{"error"`) {
					b.Fatal(answer)
				}
			}
			b.ReportMetric(float64(b.Elapsed().Microseconds())/float64(b.N*spots), "µs/record")
		})
	}
}
