package record_test

import (
	"fmt"
	"math"
	"math/rand/v2"
	"regexp"
	"slices"
	"strings"
	"testing"
	"time"

	"strikebook/convert/device"
	"strikebook/convert/metal"
	"strikebook/convert/record"
	"strikebook/convert/record/recordtest"
	"strikebook/convert/scale"
	"strikebook/convert/verdict"
)

func TestConfidence(t *testing.T) {
	below, above := math.Nextafter(record.LeastConfidence, 0), math.Nextafter(record.GreatestConfidence, 1)
	for _, ok := range []float64{0, math.Copysign(0, -1), record.LeastConfidence, 0.6827, 0.95, record.GreatestConfidence} {
		if err := (record.Record{Confidence: ok}).Validate(); err != nil {
			t.Errorf("%g: %v", ok, err)
		}
	}
	for _, bad := range []float64{below, above, -0.95, 1, 95, math.NaN(), math.Inf(1), math.Inf(-1)} {
		t.Run(fmt.Sprint(bad), func(t *testing.T) {
			refused(t, record.Record{Confidence: bad}.Validate(), "out-of-bounds", "confidence")
		})
	}
}

// Every choice of the catalogue is taken.
func TestChoices(t *testing.T) {
	taken := func(t *testing.T, r record.Record) {
		t.Helper()
		if err := r.Validate(); err != nil {
			t.Error(err)
		}
	}
	for _, g := range metal.All() {
		taken(t, record.Record{Group: g.Key})
	}
	for _, d := range device.Directions() {
		taken(t, record.Record{Direction: d})
	}
	for _, zone := range []record.Zone{record.Base, record.HAZ, record.Weld, record.Other} {
		taken(t, record.Record{Zone: zone})
	}
	for _, support := range []device.Support{device.Free, device.Supported, device.Coupled} {
		taken(t, record.Record{Piece: &device.Piece{Support: support}})
	}
	for _, kind := range []device.ShapeKind{device.Plate, device.Pipe, device.Bar, device.NoShape} {
		taken(t, record.Record{Piece: &device.Piece{Shape: &device.Shape{Kind: kind}}})
	}
	for _, rule := range []verdict.Rule{verdict.Guarded, verdict.Simple, verdict.OneSided95} {
		taken(t, record.Record{Limit: &verdict.Limit{Rule: rule}})
	}
	for _, key := range everyScale() {
		taken(t, record.Record{Limit: &verdict.Limit{Scale: key}})
	}
}

// everyScale returns the scales of the devices and those converted to.
func everyScale() []scale.Key {
	var all []scale.Key
	for _, d := range device.All() {
		all = append(all, scale.Key(d.Scale))
	}
	for _, s := range scale.Converted() {
		all = append(all, s.Key)
	}
	return all
}

// Readings are in the device's scale, or in that of a direct method.
func TestScaleOfADevice(t *testing.T) {
	direct := []scale.Key{scale.HV, scale.HBW, scale.HRC, scale.HRB}
	for _, d := range append(device.All(), device.Device{}) {
		for _, key := range append(everyScale(), "") {
			t.Run(fmt.Sprintf("%s in %s", d.Key, key), func(t *testing.T) {
				err := record.Record{Device: d.Key, Scale: key}.Validate()
				_, ofADevice := device.ByScale(string(key))
				switch {
				case key == "", slices.Contains(direct, key), string(key) == d.Scale, ofADevice && d.Key == "":
					if err != nil {
						t.Error(err)
					}
				case ofADevice:
					refused(t, err, "scale-mismatch", "scale")
				default:
					refused(t, err, "unknown-choice", "scale")
				}
			})
		}
	}
}

// Texts are counted in characters.
func TestLongestText(t *testing.T) {
	const most = 2000
	for _, c := range []struct {
		field string
		with  func(text string) record.Record
	}{
		{"id", func(text string) record.Record { return record.Record{ID: text} }},
		{"label", func(text string) record.Record { return record.Record{Label: text} }},
		{"job", func(text string) record.Record { return record.Record{Job: text} }},
		{"by", func(text string) record.Record { return record.Record{By: text} }},
		{"notes", func(text string) record.Record { return record.Record{Notes: text} }},
		{"serial", func(text string) record.Record { return record.Record{Serial: text} }},
		{"readings[1].struck", func(text string) record.Record {
			return record.Record{Readings: []record.Reading{{}, {Struck: text}}}
		}},
		{"readings[0].value", func(text string) record.Record {
			return record.Record{Readings: []record.Reading{{Value: record.Number{Value: math.NaN(), Text: text}}}}
		}},
	} {
		t.Run(c.field, func(t *testing.T) {
			if err := c.with(strings.Repeat("😀", most)).Validate(); err != nil {
				t.Error(err)
			}
			refused(t, c.with(strings.Repeat("a", most+1)).Validate(), "text-too-long", c.field)
		})
	}
}

// times calls do with times of RFC 3339, and with what nearly is one.
func times(do func(text string)) {
	rng := rand.New(rand.NewPCG(23, 24))
	pick := func(choices ...string) string { return choices[rng.IntN(len(choices))] }
	upTo := func(most int) string { return fmt.Sprintf("%02d", rng.IntN(most+1)) }
	zones := []string{"Z", "+00:00", "-00:00", "+01:00", "-05:30", "+05:45", "+23:59", "-23:59"}
	noZones := []string{"", "z", "ZZ", " Z", "UTC", "+", "+1:00", "+01", "+0100", "+01:0", "+01:000", "+01:00:00", "+24:00", "+23:60", "-99:99", "+-1:00", "+01:-1", "+0a:00", "−01:00", "*01:00", "+01.00"}
	for range 20000 {
		year := pick("0000", "0001", "1900", "1970", "2000", "2023", "2024", "2100", "9999", fmt.Sprintf("%04d", rng.IntN(10000)))
		text := year + "-" + upTo(13) + "-" + upTo(32) + "T" + upTo(25) + ":" + upTo(61) + ":" + upTo(61)
		rest := pick("", ".0", ".25", ".123456789", ".1234567890123") + pick(zones...)
		switch rng.IntN(8) {
		case 0:
			rest = pick(noZones...)
		case 1: // another character, one too few or one too many
			at := rng.IntN(len(text))
			text = text[:at] + pick("", "a", "T", "t", " ", "-", "+", "/", "٣", text[:at]) + text[at+rng.IntN(2):]
		}
		do(text + rest)
	}
}

// form is the form of RFC 3339, of which time.Parse lets pass one digit for the
// hour, a comma for the point, and offsets of 24 hours or 60 minutes.
var form = regexp.MustCompile(`^\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d(\.\d+)?(Z|[+-]([01]\d|2[0-3]):[0-5]\d)$`)

func TestTimesAsInTheLibrary(t *testing.T) {
	valid := 0
	times(func(text string) {
		err := record.Record{Taken: text}.Validate()
		_, wantErr := time.Parse(time.RFC3339, text)
		if (err == nil) != (wantErr == nil && form.MatchString(text)) {
			t.Errorf("%q: %v, the library: %v", text, err, wantErr)
		}
		if err == nil {
			valid++
		}
	})
	if valid < 4000 {
		t.Errorf("only %d times are valid", valid)
	}
}

func TestTimes(t *testing.T) {
	for _, ok := range []string{
		"", "2026-12-01T09:30:00Z", "2026-12-01T09:30:00.5Z", "2026-12-01T10:30:00+01:00", "2024-02-29T00:00:00Z", "2000-02-29T23:59:59-12:00", "0000-01-01T00:00:00Z",
	} {
		if err := (record.Record{Taken: ok}).Validate(); err != nil {
			t.Errorf("%q: %v", ok, err)
		}
	}
	for _, bad := range []string{
		" ", "now", "2026", "2026-12-01", "2026-12-01T09:30Z", "2026-12-01T09:30:00", "2026-12-01 09:30:00Z", "2026-12-01t09:30:00Z", "2026-12-01T09:30:00z",
		" 2026-12-01T09:30:00Z", "2026-12-01T09:30:00Z ", "2026-12-01T09:30:00,5Z", "2026-12-01T9:30:00Z", "26-12-01T09:30:00Z", "+2026-12-01T09:30:00Z", "12026-12-01T09:30:00Z",
		"2026-00-01T09:30:00Z", "2026-13-01T09:30:00Z", "2026-12-00T09:30:00Z", "2026-12-32T09:30:00Z", "2026-02-29T09:30:00Z", "1900-02-29T09:30:00Z", "2026-06-31T09:30:00Z",
		"2026-12-01T24:00:00Z", "2026-12-01T09:60:00Z", "2016-12-31T23:59:60Z", "2026-12-01T09:30:00+24:00", "2026-12-01T09:30:00+01:60", "2026-12-01T09:30:00+0100", "2026-W49-2T09:30:00Z",
	} {
		t.Run(bad, func(t *testing.T) {
			refused(t, record.Record{Taken: bad}.Validate(), "not-a-time", "taken")
		})
	}
}

func TestNormalized(t *testing.T) {
	filled := record.Record{Device: "G", Scale: "HLG", Direction: device.Up, Readings: []record.Reading{}, Confidence: 0.99}
	with := func(change func(*record.Record)) record.Record {
		r := record.Record{Direction: device.Down, Readings: []record.Reading{}, Confidence: record.DefaultConfidence}
		change(&r)
		return r
	}
	for _, c := range []struct {
		name     string
		in, want record.Record
	}{
		{"nothing", record.Record{}, with(func(*record.Record) {})},
		{"a device", record.Record{Device: "DC"}, with(func(r *record.Record) { r.Device, r.Scale = "DC", "HLDC" })},
		{"a scale", record.Record{Scale: "HLD+15"}, with(func(r *record.Record) { r.Device, r.Scale = "D+15", "HLD+15" })},
		{"a direct method", record.Record{Scale: scale.HRC}, with(func(r *record.Record) { r.Scale = scale.HRC })},
		{"a direct method beside a device", record.Record{Device: "D", Scale: scale.HV}, with(func(r *record.Record) { r.Device, r.Scale = "D", scale.HV })},
		{"what is filled", filled, filled},
	} {
		t.Run(c.name, func(t *testing.T) {
			if got := c.in.Normalized(); !recordtest.Equal(got, c.want) || got.Readings == nil {
				t.Errorf("got  %+v\nwant %+v", got, c.want)
			}
		})
	}
}

func TestNormalizedKeepsARecordValid(t *testing.T) {
	rng := rand.New(rand.NewPCG(25, 26))
	for i := range 1000 {
		once := recordtest.Random(rng).Normalized()
		if err := once.Validate(); err != nil {
			t.Fatalf("record %d: %v", i, err)
		}
		if !recordtest.Equal(once.Normalized(), once) {
			t.Fatalf("record %d changes when normalized twice", i)
		}
	}
}

func TestCounting(t *testing.T) {
	nan := math.NaN()
	r := record.Record{Readings: []record.Reading{
		{Value: record.Num(612)},
		{Value: record.Num(655), Struck: "probe tilted"},
		{Value: record.Number{Value: nan, Text: "6l2"}},
		{Value: record.Number{Value: nan}},
		{Value: record.Num(608.5)},
		{Value: record.Num(0)},
		{Value: record.Num(-1)},
		{Value: record.Num(record.GreatestReading)},
		{Value: record.Num(math.Nextafter(record.GreatestReading, math.Inf(1)))},
		{Value: record.Num(math.Inf(1))},
		{Value: record.Num(math.SmallestNonzeroFloat64)},
	}}
	values, positions := r.Counting()
	if want := []float64{612, 608.5, record.GreatestReading, math.SmallestNonzeroFloat64}; !slices.Equal(values, want) {
		t.Errorf("values %g, want %g", values, want)
	}
	if want := []int{0, 4, 7, 10}; !slices.Equal(positions, want) {
		t.Errorf("positions %d, want %d", positions, want)
	}
	if values, positions := (record.Record{}).Counting(); len(values)+len(positions) > 0 {
		t.Errorf("of nothing, %g at %d count", values, positions)
	}
}
