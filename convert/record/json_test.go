package record_test

import (
	"bytes"
	"errors"
	"fmt"
	"math"
	"math/rand/v2"
	"regexp"
	"strings"
	"testing"

	"strikebook/convert/device"
	"strikebook/convert/record"
	"strikebook/convert/record/recordtest"
	"strikebook/convert/wording"
)

// asError makes sure that an error is one that names code, field and remedy.
func asError(t testing.TB, err error) *wording.Error {
	t.Helper()
	var e *wording.Error
	if err != nil && !errors.As(err, &e) {
		t.Fatalf("the error is no *wording.Error: %v", err)
	}
	return e
}

// refused makes sure that an error has a code and a field, and says so in a
// sentence with all its place-holders filled.
func refused(t *testing.T, err error, code, field string) {
	t.Helper()
	e := asError(t, err)
	if e == nil || e.Code != code || e.Field != field {
		t.Fatalf("%#v, want %s at %q", e, code, field)
	}
	if unfilled.MatchString(e.Message) || !strings.HasSuffix(e.Message, ".") || len(e.Message) > 400 {
		t.Errorf("no whole sentence: %q", e.Message)
	}
}

var unfilled = regexp.MustCompile(`\{\w*(:\d*)?\}|<nil>|%!|no sentence`)

func mustEncode(t testing.TB, r record.Record) []byte {
	t.Helper()
	text, err := record.Encode(r)
	if err != nil {
		t.Fatal(err)
	}
	return text
}

func TestRoundTrip(t *testing.T) {
	rng := rand.New(rand.NewPCG(19, 20))
	for i := range 2000 {
		want := recordtest.Random(rng)
		text := mustEncode(t, want)
		got, err := record.Decode(text)
		if err != nil || !recordtest.Equal(got, want) {
			t.Fatalf("record %d: %s came back as %s (%v)", i, text, mustEncode(t, got), err)
		}
		if again := mustEncode(t, got); !bytes.Equal(again, text) {
			t.Fatalf("record %d: %s, the second time %s", i, text, again)
		}
	}
}

func TestEncodeWritesTheVersion(t *testing.T) {
	if got := string(mustEncode(t, record.Record{V: 7})); got != `{"v":1,"readings":[]}` {
		t.Error(got)
	}
}

func TestDecodeRefuses(t *testing.T) {
	long := strings.Repeat("é", 2001)
	for _, c := range []struct{ name, data, code, field string }{
		{"a comma missing", `{"v":1 "readings":[]}`, "record-not-json", ""},
		{"a comma too many", `{"v":1,"readings":[],}`, "record-not-json", ""},
		{"cut off", `{"v":1,"readings":[{"value":612}`, "record-not-json", "readings"},
		{"cut off in a text", `{"v":1,"label":"Pivot ri`, "record-not-json", "label"},
		{"quotes missing", `{v:1}`, "record-not-json", ""},
		{"more behind it", `{"v":1,"readings":[]}{"v":1}`, "record-not-json", ""},
		{"no number", `{"v":1,"readings":[{"value":6.}]}`, "record-not-json", "readings[0].value"},
		{"no number of JSON", `{"v":1,"confidence":NaN}`, "record-not-json", "confidence"},
		{"a line end in a text", "{\"v\":1,\"notes\":\"a\nb\"}", "record-not-json", "notes"},
		{"a bad escape", `{"v":1,"notes":"\x41"}`, "record-not-json", "notes"},

		{"nothing", ``, "record-not-json", ""},
		{"a bare word", `hello`, "record-not-json", ""},
		{"a bare word for label", `{"v":1,"label":hello}`, "record-not-json", "label"},
		{"a value missing", `{"v":1,"label":}`, "record-not-json", "label"},
		{"a version inside", `{"v":1,"piece":{"v":3}}`, "unknown-field", "piece.v"},
		{"a version as a value", `{"id":"v","new":1,"v":2}`, "record-version", "v"},
		{"a number with a comma", `{"v":1,"piece":{"mass_kg":"12,5"}}`, "wrong-type", "piece.mass_kg"},

		{"a list", `[{"v":1,"readings":[]}]`, "wrong-type", ""},
		{"a text", `"a text"`, "wrong-type", ""},
		{"a number", `1`, "wrong-type", ""},
		{"number for label", `{"v":1,"label":4}`, "wrong-type", "label"},
		{"list for zone", `{"v":1,"zone":["haz"]}`, "wrong-type", "zone"},
		{"number for time", `{"v":1,"taken":1796117400}`, "wrong-type", "taken"},
		{"text for confidence", `{"v":1,"confidence":"95 %"}`, "wrong-type", "confidence"},
		{"object for readings", `{"v":1,"readings":{"value":612}}`, "wrong-type", "readings"},
		{"number for a reading", `{"v":1,"readings":[{"value":612},608]}`, "wrong-type", "readings[1]"},
		{"word for a value", `{"v":1,"readings":[{"value":true}]}`, "wrong-type", "readings[0].value"},
		{"object for a value", `{"v":1,"readings":[{"value":{"hl":612}}]}`, "wrong-type", "readings[0].value"},
		{"list for a value", `{"v":1,"readings":[{"value":[612]}]}`, "wrong-type", "readings[0].value"},
		{"word for struck", `{"v":1,"readings":[{"value":612,"struck":true}]}`, "wrong-type", "readings[0].struck"},
		{"list for piece", `{"v":1,"piece":[]}`, "wrong-type", "piece"},
		{"text for mass", `{"v":1,"piece":{"mass_kg":"12.5"}}`, "wrong-type", "piece.mass_kg"},
		{"a mass without end", `{"v":1,"piece":{"mass_kg":1e309}}`, "wrong-type", "piece.mass_kg"},
		{"text for shape", `{"v":1,"piece":{"shape":"pipe"}}`, "wrong-type", "piece.shape"},
		{"text for wall", `{"v":1,"piece":{"shape":{"wall_mm":""}}}`, "wrong-type", "piece.shape.wall_mm"},
		{"object in the block's readings", `{"v":1,"block":{"readings":[772,{"value":776}]}}`, "wrong-type", "block.readings[1]"},
		{"text for limit", `{"v":1,"limit":"HBW 350"}`, "wrong-type", "limit"},
		{"text for the limit's max", `{"v":1,"limit":{"scale":"HBW","max":"350"}}`, "wrong-type", "limit.max"},

		{"an unknown field", `{"v":1,"colour":"red"}`, "unknown-field", "colour"},
		{"a field in other case", `{"v":1,"Readings":[]}`, "unknown-field", "Readings"},
		{"an unknown field of a reading", `{"v":1,"readings":[{"value":612},{"hl":608}]}`, "unknown-field", "readings[1].hl"},
		{"an unknown field of the shape", `{"v":1,"piece":{"shape":{"kind":"bar","bore_mm":8}}}`, "unknown-field", "piece.shape.bore_mm"},
		{"an unknown field with a place-holder's name", `{"v":1,"want":"{got}"}`, "unknown-field", "want"},
		{"an unknown field with a long name", `{"v":1,"` + long + `":1}`, "unknown-field", long},
		{"a field twice", `{"v":1,"label":"a","label":"a"}`, "duplicate-field", "label"},
		{"the version twice", `{"v":1,"v":2}`, "duplicate-field", "v"},
		{"a field of the limit twice", `{"v":1,"limit":{"max":1,"min":0,"max":2}}`, "duplicate-field", "limit.max"},

		{"no version", `{"readings":[]}`, "record-version", "v"},
		{"nothing at all", `{}`, "record-version", "v"},
		{"null", ` null `, "record-version", "v"},
		{"version null", `{"v":null,"readings":[]}`, "record-version", "v"},
		{"version 0", `{"v":0,"readings":[]}`, "record-version", "v"},
		{"version -1", `{"v":-1}`, "record-version", "v"},
		{"the next version", `{"v":2,"readings":[]}`, "record-version", "v"},
		{"the next version with fields of its own", `{"v" : 2, "spots":[{"readings":[612]}]}`, "record-version", "v"},
		{"the next version behind fields of its own", `{"spots":[],"v":2}`, "record-version", "v"},
		{"the next version with a curve", `{"v":2,"curve":{"name":"own"}}`, "record-version", "v"},
		{"the next version with another type of value", `{"v":2,"readings":{"values":[612]}}`, "record-version", "v"},
		{"version as text", `{"v":"1","readings":[]}`, "record-version", "v"},
		{"version as text of its own", `{"v":"2026-12"}`, "record-version", "v"},
		{"half a version", `{"v":1.5}`, "record-version", "v"},
		{"a version without end", `{"v":` + strings.Repeat("9", 100) + `}`, "record-version", "v"},

		{"an empty curve", `{"v":1,"curve":{}}`, "unknown-choice", "curve.device"},
		{"a list for a curve", `{"v":1,"curve":[]}`, "wrong-type", "curve"},
		{"a name for a curve", `{"v":1,"curve":"own"}`, "wrong-type", "curve"},
		{"an unknown field of a curve", `{"v":1,"curve":{"colour":"red"}}`, "unknown-field", "curve.colour"},
		{"text for a pair's value", `{"v":1,"curve":{"pairs":[{"hl":512,"value":"241"}]}}`, "wrong-type", "curve.pairs[0].value"},
		{"a list for what came of a curve", `{"v":1,"curve":{"plot":[{"hl":[]}]}}`, "wrong-type", "curve.plot[0].hl"},
		{"a curve without pairs", `{"v":1,"curve":{"device":"D","group":"low-alloy-steel","scale":"HBW","kind":"anchor","pairs":[]}}`, "pairs-none", "curve.pairs"},
		{"a pair without a value", `{"v":1,"curve":{"device":"D","group":"low-alloy-steel","scale":"HBW","pairs":[{"hl":512,"u_hl":2}]}}`, "out-of-bounds", "curve.pairs[0].value"},

		{"an unknown zone", `{"v":1,"zone":"HAZ"}`, "unknown-choice", "zone"},
		{"an unknown device", `{"v":1,"device":"Q"}`, "unknown-choice", "device"},
		{"a device in other case", `{"v":1,"device":"d"}`, "unknown-choice", "device"},
		{"a long device", `{"v":1,"device":"` + long + `"}`, "unknown-choice", "device"},
		{"an unknown direction", `{"v":1,"direction":"sideways"}`, "unknown-choice", "direction"},
		{"an unknown group", `{"v":1,"group":"steel"}`, "unknown-choice", "group"},
		{"an unknown scale", `{"v":1,"scale":"HL"}`, "unknown-choice", "scale"},
		{"a scale that is never read", `{"v":1,"scale":"Rm"}`, "unknown-choice", "scale"},
		{"an unknown support", `{"v":1,"piece":{"support":"hung"}}`, "unknown-choice", "piece.support"},
		{"an unknown kind of shape", `{"v":1,"piece":{"shape":{"kind":"sphere"}}}`, "unknown-choice", "piece.shape.kind"},
		{"an unknown rule", `{"v":1,"limit":{"scale":"HBW","rule":"lenient"}}`, "unknown-choice", "limit.rule"},
		{"an unknown scale of the limit", `{"v":1,"limit":{"scale":"HBS"}}`, "unknown-choice", "limit.scale"},
		{"another device's scale", `{"v":1,"device":"D","scale":"HLG"}`, "scale-mismatch", "scale"},

		{"a day", `{"v":1,"taken":"2026-12-01"}`, "not-a-time", "taken"},
		{"a confidence in percent", `{"v":1,"confidence":95}`, "out-of-bounds", "confidence"},
		{"a long label", `{"v":1,"label":"` + long + `"}`, "text-too-long", "label"},
		{"a long reason", `{"v":1,"readings":[{"value":1},{"value":1,"struck":"` + long + `"}]}`, "text-too-long", "readings[1].struck"},
		{"a long value", `{"v":1,"readings":[{"value":"` + long + `"}]}`, "text-too-long", "readings[0].value"},
	} {
		t.Run(c.name, func(t *testing.T) {
			_, err := record.Decode([]byte(c.data))
			refused(t, err, c.code, c.field)
		})
	}
}

func TestDecodeSaysWhy(t *testing.T) {
	for data, want := range map[string]string{
		`{"v":1,"readings":[{"value":612}`:     "The record is not valid JSON: at readings, a comma or ] is expected, but there is nothing. Open a record that this program wrote.",
		`{"v":1 "readings":[]}`:                `The record is not valid JSON: at record, a comma or } is expected, but there is "readings". Open a record that this program wrote.`,
		`{"v":2,"spots":[]}`:                   "The record is of version 2, and this edition reads version 1. Open it with the edition that wrote it, or a newer one.",
		`{"v":"1"}`:                            `The record is of version "1", and this edition reads version 1. Open it with the edition that wrote it, or a newer one.`,
		`{"v":1,"want":"{got}"}`:               "The field want is unknown in a record of version 1. Remove it, or open the record with a newer edition.",
		`{"v":1,"limit":{"max":1,"max":2}}`:    "The field limit.max stands twice. Keep one of the two.",
		`{"v":1,"readings":[{"value":false}]}`: "The field readings[0].value must be a number, but it holds false. Correct it.",
		`{"v":1,"curve":{"device":"D","group":"titanium","scale":"HRC"}}`: "The field curve.scale holds HRC, which nothing leads on from for Titanium alloy. Give the values in one of: HV, HBW.",
		`{"v":1,"zone":"{choices}"}`:                                      "The field zone holds {choices}, which is none of: base, haz, weld, other. Choose one of these.",
		`{"v":1,"device":"D","scale":"HLG"}`:                              "The field scale holds HLG, but device D reads in HLD. Correct the scale or the device.",
		`{"v":1,"taken":"yesterday"}`:                                     "The field taken must be a time such as 2026-12-01T09:30:00Z, but it holds yesterday. Correct it.",
		`{"v":1,"confidence":0.4}`:                                        "The field confidence must lie between 0.5 and 0.999, but it is 0.4. Correct it.",
		strings.Repeat(" ", record.MaxBytes) + "{}":                       "The record is larger than 262144 bytes. Split it into several.",
	} {
		t.Run(want, func(t *testing.T) {
			if _, err := record.Decode([]byte(data)); err == nil || err.Error() != want {
				t.Errorf("got %v", err)
			}
		})
	}
}

func TestMaxBytes(t *testing.T) {
	filled := func(size int) []byte {
		const plain = `{"v":1,"readings":[]}`
		return []byte(strings.Repeat(" ", size-len(plain)) + plain)
	}
	if _, err := record.Decode(filled(record.MaxBytes)); err != nil {
		t.Error(err)
	}
	_, err := record.Decode(filled(record.MaxBytes + 1))
	refused(t, err, "record-too-large", "")
}

func TestMaxReadings(t *testing.T) {
	holding := func(n int) []byte {
		return []byte(`{"v":1,"readings":[` + strings.TrimSuffix(strings.Repeat(`{"value":612},`, n), ",") + `]}`)
	}
	if r, err := record.Decode(holding(record.MaxReadings)); err != nil || len(r.Readings) != record.MaxReadings {
		t.Errorf("%d readings (%v)", len(r.Readings), err)
	}
	_, err := record.Decode(holding(record.MaxReadings + 1))
	refused(t, err, "too-many-readings", "readings")
}

func TestNumber(t *testing.T) {
	nan := math.NaN()
	for _, c := range []struct {
		name, data string
		value      float64
		text       string // where the value is NaN
		back       string
		quoted     string
		valid      bool
	}{
		{"a number", `612`, 612, "", `612`, "612", true},
		{"decimals", `610.55`, 610.55, "", `610.55`, "610.55", true},
		{"an exponent", `6.1e2`, 610, "", `610`, "610", true},
		{"the least", `1e-9`, 1e-9, "", `1e-9`, "1e-09", true},
		{"zero", `0`, 0, "", `0`, "0", false},
		{"minus", `-610`, -610, "", `-610`, "-610", false},
		{"the greatest reading", `1000`, 1000, "", `1000`, "1000", true},
		{"more than a reading", `1000.1`, 1000.1, "", `1000.1`, "1000.1", false},
		{"more than a number", `1e400`, nan, "1e400", `"1e400"`, "1e400", false},
		{"less than a number", `1e-400`, 0, "", `0`, "0", false},
		{"null", `null`, nan, "", `null`, "empty", false},

		{"text", `"610"`, 610, "", `610`, "610", true},
		{"a decimal point", `"610.5"`, 610.5, "", `610.5`, "610.5", true},
		{"a decimal comma", `"610,5"`, 610.5, "", `610.5`, "610.5", true},
		{"a comma at the end", `"610,"`, 610, "", `610`, "610", true},
		{"blanks around it", `" 610 "`, 610, "", `610`, "610", true},
		{"other blanks around it", `"\t610\u00a0\n"`, 610, "", `610`, "610", true},
		{"a sign", `"+610"`, 610, "", `610`, "610", true},
		{"an exponent in text", `"6,1e2"`, 610, "", `610`, "610", true},

		{"no text", `""`, nan, "", `null`, "empty", false},
		{"blanks", `"  "`, nan, "  ", `"  "`, "  ", false},
		{"a letter for a digit", `"6l0"`, nan, "6l0", `"6l0"`, "6l0", false},
		{"words", `"about 610"`, nan, "about 610", `"about 610"`, "about 610", false},
		{"more than a number in text", `"1e400"`, nan, "1e400", `"1e400"`, "1e400", false},
		{"hexadecimal", `"0x10"`, nan, "0x10", `"0x10"`, "0x10", false},
		{"hexadecimal with exponent", `"0x1p4"`, nan, "0x1p4", `"0x1p4"`, "0x1p4", false},
		{"a low line", `"6_10"`, nan, "6_10", `"6_10"`, "6_10", false},
		{"digits of full width", `"６１０"`, nan, "６１０", `"６１０"`, "６１０", false},
		{"infinity", `"Infinity"`, nan, "Infinity", `"Infinity"`, "Infinity", false},
		{"no number by name", `"NaN"`, nan, "NaN", `"NaN"`, "NaN", false},
		{"a blank inside", `"6 10"`, nan, "6 10", `"6 10"`, "6 10", false},
		{"two commas", `"1,234,5"`, nan, "1,234,5", `"1,234,5"`, "1,234,5", false},
		{"comma and point", `"1,234.5"`, nan, "1,234.5", `"1,234.5"`, "1,234.5", false},
		{"a unit", `"610 HLD"`, nan, "610 HLD", `"610 HLD"`, "610 HLD", false},
		{"signs alone", `"-"`, nan, "-", `"-"`, "-", false},
		{"escapes", `"\"\u00e9\ud83d"`, nan, "\"é\uFFFD", "\"\\\"é\uFFFD\"", "\"é\uFFFD", false},
		{"long", `"` + strings.Repeat("é", 61) + `"`, nan, strings.Repeat("é", 61), `"` + strings.Repeat("é", 61) + `"`, strings.Repeat("é", 60) + "…", false},
	} {
		t.Run(c.name, func(t *testing.T) {
			r, err := record.Decode([]byte(`{"v":1,"readings":[{"value":` + c.data + `}]}`))
			if err != nil {
				t.Fatal(err)
			}
			n := r.Readings[0].Value
			if n.Value != c.value && !(math.IsNaN(n.Value) && math.IsNaN(c.value)) || n.Text != c.text {
				t.Errorf("read as %g %q, want %g %q", n.Value, n.Text, c.value, c.text)
			}
			if back, err := n.MarshalJSON(); err != nil || string(back) != c.back {
				t.Errorf("written as %s (%v), want %s", back, err, c.back)
			}
			if n.String() != c.quoted || n.Valid() != c.valid {
				t.Errorf("quoted as %q, valid %t, want %q, %t", n, n.Valid(), c.quoted, c.valid)
			}
		})
	}
}

func TestNumberThatJSONCannotHold(t *testing.T) {
	for _, c := range []struct {
		n    record.Number
		want string
	}{
		{record.Num(math.NaN()), "null"},
		{record.Num(math.Inf(1)), "null"},
		{record.Number{Value: math.Inf(-1), Text: "-∞"}, `"-∞"`},
	} {
		if got, err := c.n.MarshalJSON(); err != nil || string(got) != c.want {
			t.Errorf("%v: %s (%v), want %s", c.n, got, err, c.want)
		}
	}
	if text, err := record.Encode(record.Record{Piece: &device.Piece{MassKg: new(math.NaN())}}); err == nil {
		t.Errorf("a mass that is no number: %s", text)
	}
}

func FuzzDecode(f *testing.F) {
	rng := rand.New(rand.NewPCG(21, 22))
	for range 5 {
		f.Add(mustEncode(f, recordtest.Random(rng)))
	}
	f.Add([]byte(`{"v":2,"curve":{}}`))
	f.Add([]byte(`{"v":1,"readings":[{"value":" 610,5 "}],"taken":"2026-12-01T09:30:00+01:00"}`))
	f.Fuzz(func(t *testing.T, data []byte) {
		r, err := record.Decode(data)
		if e := asError(t, err); e != nil {
			if e.Message == "" || strings.Contains(fmt.Sprint(e.Params), "<nil>") {
				t.Errorf("%s: %q with %v", e.Code, e.Message, e.Params)
			}
			return
		}
		again, err := record.Decode(mustEncode(t, r))
		if err != nil || !recordtest.Equal(again, r) {
			t.Errorf("%s came back as %s (%v)", mustEncode(t, r), mustEncode(t, again), err)
		}
	})
}
