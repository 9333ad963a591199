package convert_test

import (
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"strikebook/convert"
	"strikebook/convert/device"
	"strikebook/convert/record"
	"strikebook/convert/scale"
	"strikebook/convert/verdict"
	"strikebook/convert/wording"
)

func mustFindMore(t testing.TB, r record.Record, key scale.Key, expanded float64) convert.MoreReadings {
	t.Helper()
	m, err := convert.FindMoreReadings(convert.MoreReadingsRequest{Record: r, Wanted: convert.Wanted{Scale: key, Expanded: expanded}})
	if err != nil {
		t.Fatalf("± %g %s of %+v: %v", expanded, key, r, err)
	}
	if said := wording.Say(m.Code, m.Params).Message; m.Sentence != said || strings.ContainsAny(said, "{}<>") || noNumber.MatchString(said) {
		t.Errorf("%q, and by its code %q", m.Sentence, said)
	}
	return m
}

func TestMoreReadings(t *testing.T) {
	wide := steel(580, 600, 640, 590)
	for _, c := range []struct {
		name      string
		record    record.Record
		scale     scale.Key
		wanted    float64
		code      string
		reachable bool
		n, more   int
	}{
		{"enough", fiveAt610(), scale.HBW, 35, "more-enough", true, 5, 0},
		{"needed", wide, scale.HBW, 45, "more-needed", true, 7, 3},
		{"needed, its own scale", wide, "HLD", 30, "more-needed", true, 7, 3},
		{"never", fiveAt610(), scale.HBW, 20, "more-never", false, 0, 0},
		{"never, its own scale", fiveAt610(), "HLD", 5, "more-never", false, 0, 0},
		{"one reading, three do", steel(610), "HLD", 14, "more-needed", true, 9, 8},
		{"two readings, enough", steel(610, 612), "HLD", 20, "more-enough", true, 2, 0},

		{"no readings", steel(), scale.HBW, 20, "more-no-value", false, 0, 0},
		{"no value in the scale", steel(490, 491, 492), scale.HRC, 2, "more-no-value", false, 0, 0},
		{"no table", taken("D", "titanium", 600, 602, 604), scale.HRC, 2, "more-no-value", false, 0, 0},
		{"another device's scale", fiveAt610(), "HLG", 10, "more-no-value", false, 0, 0},
		{"stopped", on("D", &device.Piece{MassKg: new(1.0)}), scale.HBW, 40, "more-no-value", false, 0, 0},
		{"no metal", taken("D", "", 610, 611, 612), scale.HBW, 40, "more-no-value", false, 0, 0},
		{"no metal, its own scale", taken("D", "", 610, 611, 612), "HLD", 14, "more-enough", true, 3, 0},
		{"no device", taken("", "low-alloy-steel", 610, 611, 612), scale.HBW, 40, "more-no-value", false, 0, 0},
	} {
		t.Run(c.name, func(t *testing.T) {
			m := mustFindMore(t, c.record, c.scale, c.wanted)
			if m.Code != c.code || m.Reachable != c.reachable || m.N != c.n || m.More != c.more {
				t.Fatalf("%s (%t): %d readings, %d more: %s", m.Code, m.Reachable, m.N, m.More, m.Sentence)
			}
			known := c.code != "more-no-value"
			if known != (m.Expanded != nil) || known != (m.Best != nil) {
				t.Fatalf("expanded %v, best %v", m.Expanded, m.Best)
			}
			if !known {
				return
			}
			if reached := *m.Best <= c.wanted; reached != c.reachable || *m.Best > *m.Expanded {
				t.Errorf("from ± %g to ± %g, wanted ± %g", *m.Expanded, *m.Best, c.wanted)
			}
			if row := rowOf(t, mustEvaluate(t, c.record), c.scale); *m.Expanded != *row.Expanded {
				t.Errorf("± %g now, and ± %g in the sheet", *m.Expanded, *row.Expanded)
			}
		})
	}
}

func TestMoreReadingsSentences(t *testing.T) {
	for _, c := range []struct {
		record record.Record
		scale  scale.Key
		wanted float64
		want   string
	}{
		{fiveAt610(), scale.HBW, 35, "It is reached: HBW is known within ± 33."},
		{steel(580, 600, 640, 590), scale.HBW, 45, "It takes 3 more readings, 7 in all, if mean and scatter stay: HBW is then known within ± 44."},
		{fiveAt610(), scale.HBW, 20, "No number of readings reaches it: even 30 leave ± 33 HBW, for 75 % of the doubt is the model."},
		{steel(), scale.HBW, 20, "The spot has no value in HBW, so its uncertainty is not known."},
	} {
		if got := mustFindMore(t, c.record, c.scale, c.wanted).Sentence; got != c.want {
			t.Errorf("± %g %s: %q, want %q", c.wanted, c.scale, got, c.want)
		}
	}
}

// A record with so many readings, of the same mean and scatter, has the
// uncertainty that was forecast. The slopes that carry it follow its width, so
// that the forecast is within 1.5 % only, clear of the join of two tables.
func TestMoreReadingsMeetEvaluate(t *testing.T) {
	rng := rand.New(rand.NewPCG(53, 54))
	groups := []string{"low-alloy-steel", "austenitic-stainless", "grey-iron", "aluminium", "tool-steel"}
	levels := []float64{660, 430, 450, 430, 640}
	keys := []scale.Key{"HLD", scale.HV, scale.HBW, scale.HRC, scale.HRB}
	worst, needed := 0.0, 0
	for range 1000 {
		i := rng.IntN(len(groups))
		mean, sd, n := levels[i]+60*(rng.Float64()-0.5), 1+20*rng.Float64(), 3+rng.IntN(5)
		r := taken("D", groups[i], scattered(mean, sd, n)...)
		if rng.IntN(2) == 0 {
			r.Block = checked(773, 775, 776)
		}
		row := rowOf(t, mustEvaluate(t, r), keys[rng.IntN(len(keys))])
		if row.Status != convert.OK {
			continue
		}
		m := mustFindMore(t, r, row.Scale, *row.Expanded*(0.6+0.4*rng.Float64()))
		after := m.N
		switch m.Code {
		case "more-needed":
			needed++
			if m.N != n+m.More || m.More < 1 {
				t.Fatalf("%d readings, %d more after %d", m.N, m.More, n)
			}
		case "more-never":
			after = verdict.MostReadings
		default:
			t.Fatalf("%s: %s", m.Code, m.Sentence)
		}
		more := r
		more.Readings = taken("D", groups[i], scattered(mean, sd, after)...).Readings
		got := *rowOf(t, mustEvaluate(t, more), row.Scale).Expanded
		off := math.Abs(got / *m.Best - 1)
		worst = max(worst, off)
		if off > 0.015 {
			t.Errorf("%s, %s: %d readings at %.1f with sd %.2f: ± %g forecast for %d, ± %g is", groups[i], row.Scale, n, mean, sd, *m.Best, after, got)
		}
	}
	if needed < 100 {
		t.Errorf("needed only %d times", needed)
	}
	t.Logf("largest difference %.2f %%, needed %d times", worst*100, needed)
}

func TestMoreReadingsRefuses(t *testing.T) {
	for _, c := range []struct {
		name        string
		wanted      convert.Wanted
		confidence  float64
		code, field string
	}{
		{"nothing wanted", convert.Wanted{}, 0, "unknown-choice", "wanted.scale"},
		{"unknown scale", convert.Wanted{Scale: "HBS", Expanded: 10}, 0, "unknown-choice", "wanted.scale"},
		{"nothing", convert.Wanted{Scale: scale.HBW}, 0, "out-of-bounds", "wanted.expanded"},
		{"below zero", convert.Wanted{Scale: scale.HBW, Expanded: -10}, 0, "out-of-bounds", "wanted.expanded"},
		{"no number", convert.Wanted{Scale: scale.HBW, Expanded: math.NaN()}, 0, "out-of-bounds", "wanted.expanded"},
		{"infinite", convert.Wanted{Scale: scale.HBW, Expanded: math.Inf(1)}, 0, "out-of-bounds", "wanted.expanded"},
		{"beyond all scales", convert.Wanted{Scale: scale.HBW, Expanded: 5000.1}, 0, "out-of-bounds", "wanted.expanded"},
		{"bad record", convert.Wanted{Scale: scale.HBW, Expanded: 10}, 95, "out-of-bounds", "confidence"},
	} {
		t.Run(c.name, func(t *testing.T) {
			r := fiveAt610()
			r.Confidence = c.confidence
			_, err := convert.FindMoreReadings(convert.MoreReadingsRequest{Record: r, Wanted: c.wanted})
			checkRefused(t, err, c.code, c.field)
		})
	}
	for _, expanded := range []float64{math.SmallestNonzeroFloat64, 5000} {
		mustFindMore(t, fiveAt610(), scale.HBW, expanded)
	}
}
