package main

import (
	"encoding/json"
	"errors"
	"fmt"
	"maps"
	"math"
	"math/rand/v2"
	"slices"
	"strings"
	"testing"

	"strikebook/convert"
	"strikebook/convert/record"
	"strikebook/convert/record/recordtest"
	"strikebook/convert/wording"
)

// pivot is a record as the page hands it in.
const pivot = `{"v":1,"id":"q7-0412","label":"Pivot ring, bolt row 4, 90°","taken":"2026-12-01T09:30:00Z","device":"D","direction":"level","group":"low-alloy-steel",` +
	`"readings":[{"value":612},{"value":608},{"value":615},{"value":611},{"value":609}],"limit":{"scale":"HBW","max":350,"rule":"guarded"}}`

// through goes through a door as the page does.
func through(t testing.TB, name string, args ...string) string {
	t.Helper()
	d, ok := doors[name]
	if !ok {
		t.Fatalf("no door %q", name)
	}
	return call(name, d, args)
}

// fault is the error in an answer, nil if there is none.
func fault(t testing.TB, answer string) *wording.Error {
	t.Helper()
	var refused struct {
		Error *wording.Error `json:"error"`
	}
	if strings.HasPrefix(answer, "{") {
		mustRead(t, answer, &refused)
	}
	return refused.Error
}

func mustRead(t testing.TB, answer string, v any) {
	t.Helper()
	if err := json.Unmarshal([]byte(answer), v); err != nil {
		t.Fatalf("%v in %.200s", err, answer)
	}
}

func mustEncode(t testing.TB, r record.Record) string {
	t.Helper()
	text, err := record.Encode(r)
	if err != nil {
		t.Fatal(err)
	}
	return string(text)
}

// mustHold makes sure that an answer is an object with the keys.
func mustHold(t *testing.T, answer string, keys ...string) {
	t.Helper()
	var object map[string]json.RawMessage
	mustRead(t, answer, &object)
	for _, key := range keys {
		if value, ok := object[key]; !ok || string(value) == "null" {
			t.Errorf("no %s in %.200s", key, answer)
		}
	}
}

func TestEvaluate(t *testing.T) {
	answer := through(t, "evaluate", pivot)
	mustHold(t, answer, "edition", "scale", "readings", "corrected", "uncertainty", "scales", "findings")
	var sheet struct {
		Edition  string
		Scale    string
		Readings struct {
			N    int
			Mean float64
		}
		Corrected struct{ Direction float64 }
		Scales    []struct{ Scale, Status, Shown string }
	}
	mustRead(t, answer, &sheet)
	if sheet.Edition != convert.Edition || sheet.Scale != "HLD" || sheet.Readings.N != 5 || sheet.Readings.Mean != 611 || sheet.Corrected.Direction >= 0 {
		t.Errorf("%+v", sheet)
	}
	if len(sheet.Scales) < 2 || sheet.Scales[0].Scale != "HLD" {
		t.Fatalf("scales %+v", sheet.Scales)
	}
	for _, row := range sheet.Scales {
		if (row.Status == "ok") != (row.Shown != "") {
			t.Errorf("%+v", row)
		}
	}
}

func TestEvaluateAnswersAnyRecord(t *testing.T) {
	rng := rand.New(rand.NewPCG(27, 28))
	for i := range 500 {
		r := recordtest.Random(rng)
		text := mustEncode(t, r)
		answer := through(t, "evaluate", text)
		if e := fault(t, answer); e != nil {
			t.Fatalf("record %d, %s: %v", i, text, e)
		}
		if again := through(t, "evaluate", text); again != answer {
			t.Fatalf("record %d, %s: another sheet the second time", i, text)
		}
	}
}

// What the catalogue offers, a record may hold.
func TestCatalogue(t *testing.T) {
	answer := through(t, "catalogue")
	mustHold(t, answer, "edition", "recordVersion", "devices", "directions", "groups", "scales")
	var choices struct {
		RecordVersion int
		Devices       []struct {
			Key        string
			Scale      string
			Range      []float64
			Directions []string
			Source     string
		}
		Groups []struct{ Key, Name, Source string }
		Scales []struct {
			Key    string
			Direct bool
			Source string
		}
	}
	mustRead(t, answer, &choices)
	evaluated := func(device, direction, group, scale string, reading float64) {
		t.Helper()
		text := fmt.Sprintf(`{"v":%d,"device":%q,"direction":%q,"group":%q,"scale":%q,"readings":[{"value":%g}]}`,
			choices.RecordVersion, device, direction, group, scale, reading)
		if e := fault(t, through(t, "evaluate", text)); e != nil {
			t.Errorf("%s: %v", text, e)
		}
	}
	for _, g := range choices.Groups {
		if g.Name == "" || g.Source == "" {
			t.Errorf("group %q lacks name or source", g.Key)
		}
		for _, d := range choices.Devices {
			if d.Source == "" || len(d.Range) != 2 {
				t.Fatalf("device %q lacks range or source", d.Key)
			}
			for _, direction := range d.Directions {
				evaluated(d.Key, direction, g.Key, d.Scale, (d.Range[0]+d.Range[1])/2)
			}
		}
		for _, s := range choices.Scales {
			if s.Source == "" {
				t.Errorf("scale %q lacks a source", s.Key)
			}
			if s.Direct {
				evaluated("", "", g.Key, s.Key, 60)
			}
		}
	}
}

func TestLink(t *testing.T) {
	fragment := through(t, "encodeLink", pivot)
	if !strings.HasPrefix(fragment, "s1.") {
		t.Fatalf("fragment %q", fragment)
	}
	for _, given := range []string{fragment, "#" + fragment} {
		if got := through(t, "decodeLink", given); got != pivot {
			t.Errorf("got  %s\nwant %s", got, pivot)
		}
	}
	rng := rand.New(rand.NewPCG(29, 30))
	for i := range 100 {
		want := mustEncode(t, recordtest.Random(rng))
		if got := through(t, "decodeLink", through(t, "encodeLink", want)); got != want {
			t.Fatalf("record %d:\ngot  %s\nwant %s", i, got, want)
		}
	}
}

func TestRefusals(t *testing.T) {
	for _, c := range []struct{ door, text, code, field string }{
		{"evaluate", `{"v":1,"readings":[]`, "record-not-json", ""},
		{"evaluate", `{"v":2,"spots":[]}`, "record-version", "v"},
		{"evaluate", `{"v":1,"readings":[{"value":612},{"hl":608}]}`, "unknown-field", "readings[1].hl"},
		{"evaluate", `{"v":1,"device":"Q","readings":[]}`, "unknown-choice", "device"},
		{"evaluate", `{"v":1,"curve":{"device":"D","group":"titanium","scale":"HRC","kind":"own"}}`, "curve-scale", "curve.scale"},
		{"evaluate", strings.Repeat(" ", record.MaxBytes) + pivot, "record-too-large", ""},
		{"encodeLink", `{"v":1 "label":""}`, "record-not-json", ""},
		{"encodeLink", `{"v":1,"taken":"today"}`, "not-a-time", "taken"},
		{"encodeLink", `{"v":1,"confidence":95}`, "out-of-bounds", "confidence"},
		{"decodeLink", "", "link-foreign", ""},
		{"decodeLink", pivot, "link-foreign", ""},
		{"decodeLink", "s2.xxxx", "link-version", ""},
		{"decodeLink", "s1.xxxx", "link-damaged", ""},
	} {
		t.Run(c.door+" "+c.code, func(t *testing.T) {
			answer := through(t, c.door, c.text)
			e := fault(t, answer)
			if e == nil || e.Code != c.code || e.Field != c.field {
				t.Fatalf("%s, want %s at %q", answer, c.code, c.field)
			}
			var object struct{ Error map[string]any }
			mustRead(t, answer, &object)
			if keys := slices.Sorted(maps.Keys(object.Error)); !slices.Equal(keys, []string{"code", "field", "message", "params"}) {
				t.Errorf("an error with the keys %v", keys)
			}
		})
	}
}

func TestNumberOfArguments(t *testing.T) {
	for name, d := range doors {
		for n := range 4 {
			right := n == 1
			if d.takes == "" {
				right = n == 0
			}
			e := fault(t, through(t, name, slices.Repeat([]string{pivot}, n)...))
			switch refused := e != nil && e.Code == "bad-call"; {
			case refused == right:
				t.Errorf("%s with %d arguments: %v", name, n, e)
			case refused && (!strings.Contains(e.Message, name) || !strings.Contains(e.Message, d.takes)):
				t.Errorf("%s: %q", name, e.Message)
			}
		}
	}
}

// Whatever happens behind a door, the answer is an error and the next call works.
func TestFaults(t *testing.T) {
	var none map[string]int
	for _, c := range []struct {
		name   string
		open   func(string) (string, error)
		detail string
	}{
		{"a panic with text", func(string) (string, error) { panic(`no "leg"`) }, `no "leg"`},
		{"a panic with an error", func(string) (string, error) { panic(errors.New("no leg")) }, "no leg"},
		{"a panic with nothing", func(string) (string, error) { panic(nil) }, "nil"},
		{"a panic with a number", func(string) (string, error) { panic(math.NaN()) }, "NaN"},
		{"a panic with no UTF-8", func(string) (string, error) { panic("no \xff leg") }, "no \uFFFD leg"},
		{"an index out of range", func(text string) (string, error) { return text[len(text):][:1], nil }, "out of range"},
		{"a nil map", func(string) (string, error) { none["a"] = 1; return "", nil }, "nil map"},
		{"an error of no sentence", func(string) (string, error) { return "half", errors.New("no leg") }, "no leg"},
	} {
		t.Run(c.name, func(t *testing.T) {
			answer := call("test", door{"a text", c.open}, []string{pivot})
			e := fault(t, answer)
			if e == nil || e.Code != "internal" || !strings.Contains(e.Message, c.detail) {
				t.Errorf("%s, want an internal error with %q", answer, c.detail)
			}
			if e := fault(t, through(t, "evaluate", pivot)); e != nil {
				t.Errorf("the next call: %v", e)
			}
		})
	}
}

func TestErrorThatCannotBeWritten(t *testing.T) {
	unwritable := func(string) (string, error) {
		return "", wording.NewError("internal", "", wording.Params{"call": "test", "detail": math.NaN()})
	}
	answer := call("test", door{"a text", unwritable}, []string{""})
	if e := fault(t, answer); e == nil || e.Code != "internal" {
		t.Error(answer)
	}
}

func BenchmarkDoors(b *testing.B) {
	for _, c := range []struct{ door, text string }{
		{"evaluate", pivot},
		{"encodeLink", pivot},
		{"decodeLink", through(b, "encodeLink", pivot)},
	} {
		b.Run(c.door, func(b *testing.B) {
			b.ReportAllocs()
			var answer string
			for b.Loop() {
				answer = through(b, c.door, c.text)
			}
			if e := fault(b, answer); e != nil {
				b.Error(e)
			}
		})
	}
}
