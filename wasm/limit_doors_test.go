package main

import (
	"fmt"
	"math/rand/v2"
	"strings"
	"testing"

	"strikebook/convert/record/recordtest"
)

// with puts fields into the JSON of a record.
func with(text, fields string) string { return strings.TrimSuffix(text, "}") + "," + fields + "}" }

func TestGoNoGo(t *testing.T) {
	answer := through(t, "goNoGo", with(pivot, `"n":5,"sd":6`))
	mustHold(t, answer, "scale", "conforms", "doesNotConform", "notProven", "shownConforms", "shownDoesNotConform", "reason", "reasonCode", "reasonParams")
	var g struct {
		Scale                     string
		Conforms                  []float64
		DoesNotConform, NotProven [][]float64
		ShownConforms             []string
		ShownDoesNotConform       [][]string
		Reason                    string
	}
	mustRead(t, answer, &g)
	if g.Scale != "HLD" || len(g.Conforms) != 2 || len(g.DoesNotConform) != 1 || len(g.NotProven) != 1 || len(g.ShownConforms) != 2 || len(g.ShownDoesNotConform) != 1 || g.Reason != "" {
		t.Fatal(answer)
	}
	if fails := g.DoesNotConform[0]; !(g.Conforms[0] < g.Conforms[1] && g.Conforms[1] < fails[0] && fails[0] < fails[1]) {
		t.Error(answer)
	}
	// The mean at the edge is what the sheet says it is.
	for mean, want := range map[float64]string{g.Conforms[1] - 0.5: "conforms", g.Conforms[1] + 0.5: "not-proven", g.DoesNotConform[0][0] + 0.5: "does-not-conform"} {
		const step = 3.794733192202055 // five readings so far apart have the standard deviation 6
		var readings []string
		for i := range 5 {
			readings = append(readings, fmt.Sprintf(`{"value":%v}`, mean+float64(i-2)*step))
		}
		at := strings.Index(pivot, `"readings"`)
		end := strings.Index(pivot, `]`)
		text := pivot[:at] + `"readings":[` + strings.Join(readings, ",") + pivot[end:]
		var sheet struct {
			Verdict struct{ Outcome string }
		}
		mustRead(t, through(t, "evaluate", text), &sheet)
		if sheet.Verdict.Outcome != want {
			t.Errorf("%g HLD: %s, want %s", mean, sheet.Verdict.Outcome, want)
		}
	}
}

func TestGoNoGoSaysWhyNot(t *testing.T) {
	answer := through(t, "goNoGo", `{"v":1,"device":"D","group":"titanium","limit":{"scale":"HRC","max":36},"n":5,"sd":6}`)
	for _, part := range []string{`"conforms":[]`, `"doesNotConform":[]`, `"notProven":[]`, `"shownConforms":[]`, `"shownDoesNotConform":[]`, `"reasonCode":"verdict-no-way"`} {
		if !strings.Contains(answer, part) {
			t.Errorf("no %s in %s", part, answer)
		}
	}
}

func TestMoreReadings(t *testing.T) {
	answer := through(t, "moreReadings", with(pivot, `"wanted":{"scale":"HBW","expanded":40}`))
	mustHold(t, answer, "reachable", "n", "more", "expanded", "best", "sentence", "code", "params")
	var m struct {
		Reachable      bool
		N, More        int
		Expanded, Best float64
		Sentence, Code string
	}
	mustRead(t, answer, &m)
	if !m.Reachable || m.N != 5 || m.More != 0 || m.Code != "more-enough" || m.Expanded != m.Best || m.Expanded > 40 || m.Sentence == "" {
		t.Error(answer)
	}
	var sheet struct {
		Scales []struct {
			Scale    string
			Expanded *float64
		}
	}
	mustRead(t, through(t, "evaluate", pivot), &sheet)
	for _, row := range sheet.Scales {
		if row.Scale == "HBW" && *row.Expanded != m.Expanded {
			t.Errorf("± %g now, and ± %g in the sheet", m.Expanded, *row.Expanded)
		}
	}
	never := through(t, "moreReadings", with(pivot, `"wanted":{"scale":"HRA","expanded":1e-3}`))
	if !strings.Contains(never, `"code":"more-never"`) {
		t.Error(never)
	}
	unknown := through(t, "moreReadings", with(`{"v":1}`, `"wanted":{"scale":"HBW","expanded":40}`))
	if !strings.Contains(unknown, `"expanded":null,"best":null`) || !strings.Contains(unknown, `"code":"more-no-value"`) {
		t.Error(unknown)
	}
}

func TestLimitDoorsRefuse(t *testing.T) {
	for _, c := range []struct{ door, text, code, field string }{
		{"goNoGo", pivot, "out-of-bounds", "n"},
		{"goNoGo", with(pivot, `"n":5,"sd":-1`), "out-of-bounds", "sd"},
		{"goNoGo", with(pivot, `"n":1001,"sd":1`), "out-of-bounds", "n"},
		{"goNoGo", with(pivot, `"n":2.5,"sd":1`), "wrong-type", "n"},
		{"goNoGo", with(pivot, `"n":"5","sd":1`), "wrong-type", "n"},
		{"goNoGo", with(pivot, `"n":5,"sd":"wide"`), "wrong-type", "sd"},
		{"goNoGo", with(pivot, `"n":5,"n":6,"sd":1`), "duplicate-field", "n"},
		{"goNoGo", with(pivot, `"n":5,"sd":1,"spread":3`), "unknown-field", "spread"},
		{"goNoGo", with(pivot, `"n":5,"sd":1,"wanted":{"scale":"HBW","expanded":3}`), "unknown-field", "wanted"},
		{"goNoGo", `{"n":5,"sd":1}`, "record-version", "v"},
		{"goNoGo", `{"v":2,"n":5,"sd":1}`, "record-version", "v"},
		{"goNoGo", `{"v":1,"n":5,"sd":1,"device":"Q"}`, "unknown-choice", "device"},
		{"goNoGo", `{"v":1,"n":5,"sd":1,"limit":{"scale":"HBS"}}`, "unknown-choice", "limit.scale"},
		{"goNoGo", `{"v":1,"n":5`, "record-not-json", ""},
		{"goNoGo", "", "record-not-json", ""},

		{"moreReadings", pivot, "unknown-choice", "wanted.scale"},
		{"moreReadings", with(pivot, `"wanted":{"scale":"HBW"}`), "out-of-bounds", "wanted.expanded"},
		{"moreReadings", with(pivot, `"wanted":{"scale":"HBW","expanded":-3}`), "out-of-bounds", "wanted.expanded"},
		{"moreReadings", with(pivot, `"wanted":{"scale":"HBS","expanded":3}`), "unknown-choice", "wanted.scale"},
		{"moreReadings", with(pivot, `"wanted":{"scale":"HBW","expanded":"3"}`), "wrong-type", "wanted.expanded"},
		{"moreReadings", with(pivot, `"wanted":{"scale":"HBW","expanded":3,"k":2}`), "unknown-field", "wanted.k"},
		{"moreReadings", with(pivot, `"wanted":[]`), "wrong-type", "wanted"},
		{"moreReadings", with(pivot, `"n":5`), "unknown-field", "n"},
		{"moreReadings", `{"v":1,"confidence":95}`, "out-of-bounds", "confidence"},

		{"evaluate", with(pivot, `"n":5,"sd":1`), "unknown-field", "n"},
		{"evaluate", with(pivot, `"wanted":{"scale":"HBW","expanded":3}`), "unknown-field", "wanted"},
	} {
		t.Run(c.door+" "+c.code+" "+c.field, func(t *testing.T) {
			answer := through(t, c.door, c.text)
			if e := fault(t, answer); e == nil || e.Code != c.code || e.Field != c.field || e.Message == "" {
				t.Errorf("%s, want %s at %q", answer, c.code, c.field)
			}
			if e := fault(t, through(t, "evaluate", pivot)); e != nil {
				t.Errorf("the next call: %v", e)
			}
		})
	}
}

// Whatever the record, there is an answer, and the same one each time.
func TestLimitDoorsAnswerAnyRecord(t *testing.T) {
	rng := rand.New(rand.NewPCG(55, 56))
	for i := range 100 {
		r := recordtest.Random(rng)
		text := mustEncode(t, r)
		for door, fields := range map[string]string{
			"goNoGo":       fmt.Sprintf(`"n":%d,"sd":%v`, 3+rng.IntN(10), 10*rng.Float64()),
			"moreReadings": fmt.Sprintf(`"wanted":{"scale":"HBW","expanded":%v}`, 1+50*rng.Float64()),
		} {
			asked := with(text, fields)
			answer := through(t, door, asked)
			if e := fault(t, answer); e != nil {
				t.Fatalf("record %d, %s of %s: %v", i, door, asked, e)
			}
			if again := through(t, door, asked); again != answer {
				t.Fatalf("record %d, %s of %s: another answer the second time", i, door, asked)
			}
		}
	}
}
