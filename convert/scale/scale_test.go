package scale

import (
	"math"
	"math/rand/v2"
	"strconv"
	"testing"

	"strikebook/convert/device"
)

func TestByKey(t *testing.T) {
	for _, s := range Converted() {
		if got, ok := ByKey(s.Key); !ok || got != s || s.Leeb {
			t.Errorf("%s: %+v (%t), want the converted scale %+v", s.Key, got, ok, s)
		}
	}
	for _, d := range device.All() {
		s, ok := ByKey(Key(d.Scale))
		if !ok || !s.Leeb || s.Direct() || s.Lo != d.Lo || s.Hi != d.Hi {
			t.Errorf("%s: %+v (%t), want a rebound scale from %g to %g", d.Scale, s, ok, d.Lo, d.Hi)
		}
	}
	for _, key := range []Key{"", "hbw", "HL", "D"} {
		if s, ok := ByKey(key); ok {
			t.Errorf("%q: %+v, want none", key, s)
		}
	}
}

func TestScalesAreSane(t *testing.T) {
	if Source() == "" {
		t.Error("the scales name no source")
	}
	direct := map[Key]bool{HV: true, HBW: true, HRC: true, HRB: true}
	seen := make(map[Key]bool)
	for _, s := range Converted() {
		if seen[s.Key] {
			t.Errorf("%s is there twice", s.Key)
		}
		seen[s.Key] = true
		if s.Name == "" || !(s.Lo >= 0 && s.Lo < s.Hi) || !(s.DisplayStep > 0) {
			t.Errorf("%+v", s)
		}
		// A quoted value has the places that its step needs, and no more.
		if places := strconv.FormatFloat(s.Step, 'f', s.Decimals, 64); places != strconv.FormatFloat(s.Step, 'f', -1, 64) {
			t.Errorf("%s: step %g in %d places", s.Key, s.Step, s.Decimals)
		}
		if s.Direct() != direct[s.Key] {
			t.Errorf("%s: direct %t", s.Key, s.Direct())
		}
	}
	Converted()[0].Key = "changed"
	if Converted()[0].Key == "changed" {
		t.Error("the caller can change the scales")
	}
}

func TestQuote(t *testing.T) {
	for _, c := range []struct {
		scale           Key
		value           float64
		quote, up, down string
	}{
		{HBW, 330, "330", "330", "330"},
		{HBW, 329.6, "330", "330", "329"},
		{HBW, 330.4, "330", "331", "330"},
		{HBW, 330.5, "331", "331", "330"}, // halfway: away from zero
		{HBW, math.Nextafter(330, 331), "330", "330", "330"},
		{HBW, math.Nextafter(330, 329), "330", "330", "330"},
		{HBW, 0, "0", "0", "0"},
		{HRC, 22, "22.0", "22.0", "22.0"},
		{HRC, 22.04, "22.0", "22.1", "22.0"},
		{HRC, 22.25, "22.3", "22.3", "22.2"},
		{HRC, 20.15, "20.2", "20.2", "20.1"}, // a little less in binary
		{HRC, -0.01, "0.0", "0.0", "-0.1"},
		{HRC, 0.1 + 0.2, "0.3", "0.3", "0.3"}, // 0.30000000000000004
		{HRC, 0.001, "0.0", "0.1", "0.0"},
		{HS, 42.26, "42.3", "42.3", "42.2"},
		{Rm, 1095, "1095", "1095", "1095"},
		{Rm, 1092.4, "1090", "1095", "1090"},
		{Rm, 1092.5, "1095", "1095", "1090"},
		{Rm, 1097.5 - 1e-6, "1095", "1100", "1095"},
		{"HLD", 609.5, "610", "610", "609"},
	} {
		s := mustScale(t, c.scale)
		if quote, up, down := s.Quote(c.value), s.QuoteUp(c.value), s.QuoteDown(c.value); quote != c.quote || up != c.up || down != c.down {
			t.Errorf("%.17g %s: %s, up %s, down %s, want %s, %s, %s", c.value, c.scale, quote, up, down, c.quote, c.up, c.down)
		}
	}
}

// Whatever is quoted reads back as a number beside the value.
func TestQuotesEncloseTheValue(t *testing.T) {
	random := rand.New(rand.NewPCG(1, 2))
	for _, s := range Converted() {
		for range 2000 {
			value := 2200 * random.Float64()
			down, quote, up := parse(t, s.QuoteDown(value)), parse(t, s.Quote(value)), parse(t, s.QuoteUp(value))
			noise := 1e-8 * s.Step * max(1, value/s.Step)
			if down > value+noise || up < value-noise || up-down > s.Step+noise {
				t.Fatalf("%.17g %s: from %g to %g", value, s.Key, down, up)
			}
			if quote != down && quote != up || math.Abs(quote-value) > s.Step/2+noise {
				t.Fatalf("%.17g %s: quoted %g, from %g to %g", value, s.Key, quote, down, up)
			}
		}
	}
}

// A quoted value stands on a step, and must stay what it is when it is quoted
// again: the last bits of a sum do not push it to the next one.
func TestQuotedValuesStay(t *testing.T) {
	for _, s := range Converted() {
		for n := 1.0; n < 2000; n++ {
			step := n * s.Step
			text := s.Quote(step)
			for _, v := range []float64{step, parse(t, text), math.Nextafter(step, 0), math.Nextafter(step, 2*step)} {
				if quote, up, down := s.Quote(v), s.QuoteUp(v), s.QuoteDown(v); quote != text || up != text || down != text {
					t.Fatalf("%.17g %s: %s, up %s, down %s, want %s", v, s.Key, quote, up, down, text)
				}
			}
		}
	}
}

func parse(t *testing.T, text string) float64 {
	t.Helper()
	value, err := strconv.ParseFloat(text, 64)
	if err != nil {
		t.Fatal(err)
	}
	return value
}

func TestNotation(t *testing.T) {
	for _, c := range []struct {
		scale    Key
		value    float64
		measured Key
		want     string
	}{
		{HBW, 330, "HLD", "330 HBW (HLD)"},
		{"HLD", 610, "HLD", "610 HLD"},
		{"HLD+15", 570.2, "HLD+15", "570 HLD+15"},
		{HRC, 35, "HLDC", "35.0 HRC (HLDC)"},
		{HRC, 22, HRC, "22.0 HRC"},
		{HV, 348.4, HBW, "348 HV (HBW)"},
		{Rm, 1093, "HLD", "Rm 1095 MPa (HLD)"},
	} {
		s := mustScale(t, c.scale)
		if got := s.Notation(s.Quote(c.value), c.measured); got != c.want {
			t.Errorf("%q, want %q", got, c.want)
		}
	}
}
