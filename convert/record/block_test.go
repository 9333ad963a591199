package record_test

import (
	"encoding/json"
	"strings"
	"testing"
	"time"

	"strikebook/convert/record"
	"strikebook/convert/record/recordtest"
	"strikebook/convert/scale"
	"strikebook/convert/verdict"
)

func TestInvalidBlocks(t *testing.T) {
	long := strings.Repeat("9", 2001)
	for _, c := range []struct{ name, data, code, field string }{
		{"an unknown use", `{"use":"both"}`, "unknown-choice", "block.use"},
		{"a day", `{"taken":"2026-12-01"}`, "not-a-time", "block.taken"},
		{"a long reading", `{"readings":[772,"` + long + `"]}`, "text-too-long", "block.readings[1]"},
		{"too many readings", `{"readings":[` + strings.TrimSuffix(strings.Repeat("772,", record.MaxReadings+1), ",") + `]}`, "too-many-readings", "block.readings"},
		{"text for the certified value", `{"certified":"775"}`, "wrong-type", "block.certified"},
		{"text for its uncertainty", `{"expanded_u":"6"}`, "wrong-type", "block.expanded_u"},
		{"an unknown field", `{"expandedU":6}`, "unknown-field", "block.expandedU"},
	} {
		t.Run(c.name, func(t *testing.T) {
			_, err := record.Decode([]byte(`{"v":1,"block":` + c.data + `}`))
			refused(t, err, c.code, c.field)
		})
	}
	for _, data := range []string{`{}`, `{"use":""}`, `{"readings":[772,"77l",null,0,-1,2000]}`, `{"certified":0,"expanded_u":-6,"tolerance":1e9}`, `null`} {
		if _, err := record.Decode([]byte(`{"v":1,"block":` + data + `}`)); err != nil {
			t.Errorf("%s: %v", data, err) // what is wrong with it is for a finding
		}
	}
}

func TestSinceBlock(t *testing.T) {
	for _, c := range []struct {
		checked, taken string
		want           time.Duration
		ok             bool
	}{
		{"2026-12-01T08:00:00Z", "2026-12-01T09:30:00Z", 90 * time.Minute, true},
		{"2026-12-01T09:30:00Z", "2026-12-01T08:00:00Z", -90 * time.Minute, true},
		{"2026-12-01T09:00:00+01:00", "2026-12-01T08:00:00Z", 0, true},
		{"2026-12-01T23:30:00-05:00", "2026-12-02T04:00:00Z", -30 * time.Minute, true},
		{"", "2026-12-01T09:30:00Z", 0, false},
		{"2026-12-01T08:00:00Z", "", 0, false},
		{"", "", 0, false},
		{"today", "2026-12-01T09:30:00Z", 0, false},
	} {
		r := record.Record{Taken: c.taken, Block: &record.Block{Taken: c.checked}}
		if got, ok := r.SinceBlock(); ok != c.ok || ok && got != c.want {
			t.Errorf("%q to %q: %v (%t), want %v (%t)", c.checked, c.taken, got, ok, c.want, c.ok)
		}
	}
	if _, ok := (record.Record{Taken: "2026-12-01T09:30:00Z"}).SinceBlock(); ok {
		t.Error("there is an age of no check")
	}
}

// A request is a record with fields of its own beside the record's.
func TestDecodeAround(t *testing.T) {
	type request struct {
		record.Record
		N int `json:"n"`
	}
	decode := func(data string) (request, error) {
		var q request
		err := record.DecodeAround([]byte(data), &q, &q.Record)
		return q, err
	}
	want := record.Record{V: record.Version, Device: "D", Readings: []record.Reading{{Value: record.Num(612)}},
		Limit: &verdict.Limit{Scale: scale.HBW, Max: new(225.0)}}
	text, err := json.Marshal(want)
	if err != nil {
		t.Fatal(err)
	}
	q, err := decode(strings.TrimSuffix(string(text), "}") + `,"n":5}`)
	if err != nil || q.N != 5 || !recordtest.Equal(q.Record, want) {
		t.Errorf("%+v (%v)", q, err)
	}
	if q, err := decode(string(text)); err != nil || q.N != 0 {
		t.Errorf("without its own field: %+v (%v)", q, err)
	}
	for _, c := range []struct{ name, data, code, field string }{
		{"a field of neither", `{"v":1,"sd":3}`, "unknown-field", "sd"},
		{"its field twice", `{"v":1,"n":3,"n":3}`, "duplicate-field", "n"},
		{"its field of another type", `{"v":1,"n":"3"}`, "wrong-type", "n"},
		{"an invalid record", `{"v":1,"n":3,"device":"Q"}`, "unknown-choice", "device"},
		{"a record of another version", `{"v":2,"n":3}`, "record-version", "v"},
		{"another version, another layout", `{"v":2,"spots":[],"n":3}`, "record-version", "v"},
		{"no version", `{"n":3}`, "record-version", "v"},
		{"no JSON", `{"n":3`, "record-not-json", ""},
		{"too large", strings.Repeat(" ", record.MaxBytes) + `{"v":1}`, "record-too-large", ""},
	} {
		t.Run(c.name, func(t *testing.T) {
			_, err := decode(c.data)
			refused(t, err, c.code, c.field)
		})
	}
}
