package convert_test

import (
	"errors"
	"fmt"
	"math"
	"math/rand/v2"
	"slices"
	"strconv"
	"strings"
	"testing"

	"strikebook/convert"
	"strikebook/convert/device"
	"strikebook/convert/record"
	"strikebook/convert/scale"
	"strikebook/convert/verdict"
	"strikebook/convert/wording"
)

func goNoGo(r record.Record, n int, sd float64) convert.GoNoGoRequest {
	return convert.GoNoGoRequest{Record: r, N: n, SD: sd}
}

func mustFind(t testing.TB, q convert.GoNoGoRequest) convert.GoNoGo {
	t.Helper()
	g, err := convert.FindGoNoGo(q)
	if err != nil {
		t.Fatalf("%+v: %v", q, err)
	}
	return g
}

// span is a span of means with the outcome it is said to have.
type span struct {
	lo, hi  float64
	outcome verdict.Outcome
}

// spansOf are the spans of an answer, in order.
func spansOf(g convert.GoNoGo) []span {
	var all []span
	if len(g.Conforms) > 0 {
		all = append(all, span{g.Conforms[0], g.Conforms[1], verdict.Conforms})
	}
	for _, s := range g.DoesNotConform {
		all = append(all, span{s[0], s[1], verdict.DoesNotConform})
	}
	for _, s := range g.NotProven {
		all = append(all, span{s[0], s[1], verdict.NotProven})
	}
	slices.SortFunc(all, func(a, b span) int {
		if a.lo < b.lo {
			return -1
		}
		return 1
	})
	return all
}

// request is a request with a name for the tests that go through many.
type request struct {
	name string
	convert.GoNoGoRequest
}

// requests go over scales, metals, devices, directions and numbers of readings.
func requests() []request {
	var all []request
	add := func(r record.Record, l *verdict.Limit, n int, sd float64) {
		rule := verdict.Rules()[len(all)%3]
		name := fmt.Sprintf("%d %s%s on %s %s, %s %s, n %d, sd %g", len(all), r.Device, r.Scale, r.Group, r.Direction, workedLimit(l), rule, n, sd)
		all = append(all, request{name, goNoGo(against(r, l, rule), n, sd)})
	}
	scatters := []struct {
		n  int
		sd float64
	}{{1, 0}, {3, 4}, {5, 6}, {10, 9}, {3, 0}, {5, 1.5}, {10, 15}}
	for i, c := range []struct {
		device, group string
		direction     device.Direction
		limit         *verdict.Limit
	}{
		{"D", "low-alloy-steel", "", between(scale.HBW, 0, 225)},
		{"D", "low-alloy-steel", device.Up, between(scale.HBW, 0, 241)},
		{"D", "low-alloy-steel", device.Level, between(scale.HV, 0, 250)},
		{"D", "low-alloy-steel", "", between(scale.HRC, 0, 22)},
		{"D", "low-alloy-steel", "", between(scale.HRC, 34, 0)},
		{"D", "low-alloy-steel", device.Down45, between(scale.HRC, 28, 40)},
		{"D", "low-alloy-steel", "", between(scale.HRB, 0, 95)},
		{"D", "low-alloy-steel", "", between(scale.HRB, 70, 98)},
		{"D", "low-alloy-steel", "", between(scale.Rm, 700, 1100)},
		{"D", "low-alloy-steel", device.Up45, between("HLD", 450, 560)},
		{"D", "low-alloy-steel", "", between("HLD", 0, 500)},
		{"DC", "low-alloy-steel", device.Level, between(scale.HBW, 190, 250)},
		{"DL", "low-alloy-steel", "", between("HLDL", 650, 850)},
		{"D+15", "low-alloy-steel", "", between(scale.HBW, 250, 0)},
		{"E", "tool-steel", device.Compensated, between(scale.HRC, 50, 0)},
		{"S", "martensitic-stainless", "", between(scale.HBW, 0, 300)},
		{"C", "low-alloy-steel", "", between(scale.HRC, 40, 60)},
		{"G", "grey-iron", device.Compensated, between(scale.HBW, 130, 0)},
		{"D", "grey-iron", "", between(scale.HBW, 0, 260)},
		{"D", "austenitic-stainless", "", between(scale.HRB, 0, 95)},
		{"D", "austenitic-stainless", device.Up, between(scale.HBW, 0, 240)},
		{"D", "duplex-stainless", "", between(scale.HV, 0, 350)},
		{"D", "aluminium", "", between(scale.HBW, 60, 0)},
		{"D", "aluminium", device.Level, between(scale.HRB, 20, 80)},
		{"D", "brass", "", between(scale.HRB, 0, 80)},
		{"D", "nickel-alloy", "", between(scale.HRC, 0, 35)},
		{"D", "titanium", "", between(scale.HV, 0, 380)},
		{"D", "copper", "", between(scale.HV, 60, 0)},
	} {
		r := taken(c.device, c.group)
		r.Direction = c.direction
		for j := range 2 {
			s := scatters[(2*i+3*j)%len(scatters)]
			add(r, c.limit, s.n, s.sd)
		}
		if i%4 == 0 {
			r.Block = checked(771, 773, 772)
			r.Block.Use = record.AsCorrection
			s := scatters[(i+1)%len(scatters)]
			add(r, c.limit, s.n, s.sd)
		}
	}
	for i, c := range []struct {
		own   scale.Key
		limit *verdict.Limit
		half  float64
	}{
		{scale.HRC, between(scale.HRC, 0, 40), 1.5},
		{scale.HRC, between(scale.HBW, 280, 0), 1.5},
		{scale.HV, between(scale.HV, 200, 250), 8},
		{scale.HV, between(scale.HRC, 0, 22), 8},
		{scale.HBW, between(scale.HV, 0, 300), 7},
		{scale.HRB, between(scale.HRB, 70, 0), 2},
	} {
		r := direct(c.own)
		r.PermissibleError = &c.half
		add(r, c.limit, 3+2*(i%2), c.half/3)
	}
	return all
}

// outcomeOf is what Evaluate says of readings of exactly this mean and scatter;
// ok is false where one of them could not be read.
func outcomeOf(t testing.TB, q convert.GoNoGoRequest, mean float64) (outcome verdict.Outcome, ok bool) {
	t.Helper()
	r := q.Record
	r.Readings = nil
	for _, v := range scattered(mean, q.SD, q.N) {
		if !record.Num(v).Valid() {
			return "", false
		}
		r.Readings = append(r.Readings, record.Reading{Value: record.Num(v)})
	}
	return mustEvaluate(t, r).Verdict.Outcome, true
}

// Half a display step inside each span Evaluate gives its outcome, half a step
// outside it does not.
func TestGoNoGoMeetsEvaluate(t *testing.T) {
	rng := rand.New(rand.NewPCG(51, 52))
	edges := 0
	for _, q := range requests() {
		g := mustFind(t, q.GoNoGoRequest)
		own, _ := scale.ByKey(g.Scale)
		half := own.DisplayStep / 2
		spans := spansOf(g)
		if len(spans) == 0 {
			t.Errorf("%s: no span: %s", q.name, g.Reason)
		}
		at := func(mean float64) string {
			outcome, ok := outcomeOf(t, q.GoNoGoRequest, mean)
			if !ok {
				return "unreadable"
			}
			return string(outcome)
		}
		for _, s := range spans {
			for _, edge := range []struct{ at, inwards float64 }{{s.lo, half}, {s.hi, -half}} {
				edges++
				if s.hi-s.lo > 2*half {
					if got := at(edge.at + edge.inwards); got != string(s.outcome) && got != "unreadable" {
						t.Errorf("%s: %s from %g to %g, and %g is %s", q.name, s.outcome, s.lo, s.hi, edge.at+edge.inwards, got)
					}
				}
				if got := at(edge.at - edge.inwards); got == string(s.outcome) {
					t.Errorf("%s: %s from %g to %g, and so is %g", q.name, s.outcome, s.lo, s.hi, edge.at-edge.inwards)
				}
			}
		}
		for range 60 { // anywhere
			mean := own.Lo + (min(own.Hi, 1000)-own.Lo)*rng.Float64()
			want := string(verdict.CannotSay)
			beside := false
			for _, s := range spans {
				if mean >= s.lo && mean <= s.hi {
					want = string(s.outcome)
				}
				beside = beside || math.Abs(mean-s.lo) < 0.002 || math.Abs(mean-s.hi) < 0.002
			}
			if got := at(mean); got != want && got != "unreadable" && !beside {
				t.Errorf("%s: %g is %s, and not %s as in %+v", q.name, mean, got, want, spans)
			}
		}
	}
	t.Logf("%d requests, %d edges", len(requests()), edges)
}

// The spans follow one another, and what is shown of them lies inside.
func TestGoNoGoSpans(t *testing.T) {
	for _, q := range requests() {
		g := mustFind(t, q.GoNoGoRequest)
		if g.Reason != "" || g.ReasonCode != "" {
			t.Errorf("%s: spans and a reason, %q", q.name, g.Reason)
		}
		if g.Conforms == nil || g.DoesNotConform == nil || g.NotProven == nil || g.ShownConforms == nil || g.ShownDoesNotConform == nil || g.ReasonParams == nil {
			t.Errorf("%s: a list is null: %+v", q.name, g)
		}
		spans := spansOf(g)
		for i, s := range spans {
			if !(s.lo <= s.hi) || !(s.lo > 0 && s.hi <= record.GreatestReading) {
				t.Errorf("%s: from %g to %g", q.name, s.lo, s.hi)
			}
			if i == 0 {
				continue
			}
			before := spans[i-1]
			if gap := s.lo - before.hi; gap <= 0 || gap > 0.002 && before.outcome == s.outcome {
				t.Errorf("%s: %+v follows %+v", q.name, s, before)
			}
			if before.outcome == s.outcome {
				t.Errorf("%s: one outcome twice, %+v and %+v", q.name, before, s)
			}
			if q.Limit.Rule != verdict.Simple && before.outcome != verdict.NotProven && s.outcome != verdict.NotProven {
				t.Errorf("%s: %s and %s meet with no doubt between", q.name, before.outcome, s.outcome)
			}
		}
		if q.Limit.Rule == verdict.Simple && len(g.NotProven) > 0 {
			t.Errorf("%s: the simple rule proves nothing from %v", q.name, g.NotProven)
		}
		own, _ := scale.ByKey(g.Scale)
		inside := func(shown []string, exact []float64) {
			if lo, hi := parse(t, shown[0]), parse(t, shown[1]); lo < exact[0] || hi > exact[1] || lo > hi || lo-exact[0] >= own.Step || exact[1]-hi >= own.Step {
				t.Errorf("%s: %v is shown as %v", q.name, exact, shown)
			}
		}
		if len(g.Conforms) > 0 {
			inside(g.ShownConforms, g.Conforms)
		} else if len(g.ShownConforms) > 0 {
			t.Errorf("%s: nothing conforms, and %v is shown", q.name, g.ShownConforms)
		}
		if len(g.ShownDoesNotConform) != len(g.DoesNotConform) {
			t.Fatalf("%s: %d spans, %d shown", q.name, len(g.DoesNotConform), len(g.ShownDoesNotConform))
		}
		for i, s := range g.DoesNotConform {
			inside(g.ShownDoesNotConform[i], s)
		}
	}
}

func parse(t testing.TB, text string) float64 {
	t.Helper()
	value, err := strconv.ParseFloat(text, 64)
	if err != nil {
		t.Fatal(err)
	}
	return value
}

// In the reading's own scale the edges follow by hand. A block check of 6 HLD
// with equal readings that meet its value, and equal readings at the spot,
// leave u = sqrt(3^2 + 0.5^2/3) HLD = 3.0139 HLD, normal.
func TestGoNoGoByHand(t *testing.T) {
	const u = 3.013857
	for _, c := range []struct {
		name  string
		limit *verdict.Limit
		rule  verdict.Rule
		want  []span
	}{
		{"maximum, guarded", between("HLD", 0, 500), "", []span{
			{300, 500 - 1.959964*u, verdict.Conforms}, {500 - 1.959964*u, 500 + 1.959964*u, verdict.NotProven}, {500 + 1.959964*u, 890, verdict.DoesNotConform}}},
		{"minimum, one-sided", between("HLD", 500, 0), verdict.OneSided95, []span{
			{300, 500 - 1.644854*u, verdict.DoesNotConform}, {500 - 1.644854*u, 500 + 1.644854*u, verdict.NotProven}, {500 + 1.644854*u, 890, verdict.Conforms}}},
		{"both, simple", between("HLD", 450, 550), verdict.Simple, []span{
			{300, 450, verdict.DoesNotConform}, {450, 550, verdict.Conforms}, {550, 890, verdict.DoesNotConform}}},
		{"both, guarded, too close", between("HLD", 500, 510), "", []span{
			{300, 500 - 1.959964*u, verdict.DoesNotConform}, {500 - 1.959964*u, 510 + 1.959964*u, verdict.NotProven}, {510 + 1.959964*u, 890, verdict.DoesNotConform}}},
		{"beyond the device", between("HLD", 0, 950), "", []span{{300, 890, verdict.Conforms}}},
	} {
		t.Run(c.name, func(t *testing.T) {
			r := steel()
			r.Block = checked(775, 775, 775)
			got := spansOf(mustFind(t, goNoGo(against(r, c.limit, c.rule), 5, 0)))
			same := slices.EqualFunc(got, c.want, func(a, b span) bool {
				return a.outcome == b.outcome && math.Abs(a.lo-b.lo) < 0.002 && math.Abs(a.hi-b.hi) < 0.002
			})
			if !same {
				t.Errorf("%+v\nwant %+v", got, c.want)
			}
		})
	}
}

// The means are as the instrument shows them: a correction moves the edges the
// other way.
func TestGoNoGoBeforeCorrections(t *testing.T) {
	edge := func(r record.Record) float64 {
		return mustFind(t, goNoGo(against(r, between("HLD", 0, 650), verdict.Simple), 5, 0)).Conforms[1]
	}
	r := steel()
	r.Block = checked(771, 771, 771) // reads 4 HLD low
	r.Block.Use = record.AsCorrection
	if got := edge(r); math.Abs(got-646) > 0.002 {
		t.Errorf("with a block: %g, want 646", got)
	}
	// The standard's table corrects 650 HLD overhead by -18 and 700 by -17: the
	// mean that is 650 when corrected is 668 less 0.02 times what it lies above 650.
	if got, want := edge(directed(steel(), device.Up)), (650+18+13)/1.02; math.Abs(got-want) > 0.002 {
		t.Errorf("overhead: %g, want %g", got, want)
	}
}

// Readings that a request brings along are left out of account.
func TestGoNoGoWithoutReadings(t *testing.T) {
	limit := between(scale.HBW, 0, 225)
	without := mustFind(t, goNoGo(against(steel(), limit, ""), 5, 6))
	with := mustFind(t, goNoGo(against(steel(880, 881, 2), limit, ""), 5, 6))
	if fmt.Sprint(without) != fmt.Sprint(with) {
		t.Errorf("%+v\nwith readings %+v", without, with)
	}
}

func TestGoNoGoReasons(t *testing.T) {
	limit := between(scale.HBW, 0, 225)
	failed := steel()
	failed.Block = checked(790, 791, 792)
	for _, c := range []struct {
		name   string
		record record.Record
		limit  *verdict.Limit
		code   string
	}{
		{"no limit", steel(), nil, "verdict-no-limit"},
		{"bad limit", steel(), between(scale.HBW, 0, -1), "verdict-bad-limit"},
		{"empty limit", steel(), between(scale.HBW, 0, 0), "verdict-bad-limit"},
		{"no device", taken("", "low-alloy-steel"), limit, "verdict-stopped"},
		{"no metal", taken("D", ""), limit, "verdict-stopped"},
		{"no curve", taken("DL", "low-alloy-steel"), limit, "verdict-stopped"},
		{"light piece", on("D", &device.Piece{MassKg: new(1.0)}), limit, "verdict-stopped"},
		{"light piece, own scale", on("D", &device.Piece{MassKg: new(1.0)}), between("HLD", 0, 500), "verdict-stopped"},
		{"failed check", failed, limit, "verdict-stopped"},
		{"no direction correction", directed(taken("G", "grey-iron"), device.Up), limit, "verdict-stopped"},
		{"no table", taken("D", "titanium"), between(scale.HRC, 0, 36), "verdict-no-way"},
		{"another device's scale", steel(), between("HLG", 0, 500), "verdict-no-way"},
	} {
		t.Run(c.name, func(t *testing.T) {
			g := mustFind(t, goNoGo(against(c.record, c.limit, ""), 5, 6))
			if g.ReasonCode != c.code || len(spansOf(g)) > 0 {
				t.Errorf("%q with %+v, want %q", g.ReasonCode, spansOf(g), c.code)
			}
			if said := wording.Say(g.ReasonCode, g.ReasonParams).Message; g.Reason != said || strings.ContainsAny(said, "{}<>") {
				t.Errorf("%q, and by its code %q", g.Reason, said)
			}
			if g.Conforms == nil || g.DoesNotConform == nil || g.NotProven == nil || g.ShownConforms == nil || g.ShownDoesNotConform == nil || g.ReasonParams == nil {
				t.Errorf("a list is null: %+v", g)
			}
		})
	}
	// What stops a conversion leaves the own scale.
	for _, r := range []record.Record{taken("D", ""), taken("DL", "low-alloy-steel")} {
		own := scale.Key("HLD")
		if r.Device == "DL" {
			own = "HLDL"
		}
		if g := mustFind(t, goNoGo(against(r, between(own, 0, 700), ""), 5, 6)); len(g.Conforms) == 0 {
			t.Errorf("%s: %s", own, g.Reason)
		}
	}
}

func TestGoNoGoRefuses(t *testing.T) {
	limited := against(steel(), between(scale.HBW, 0, 225), "")
	with := func(change func(*record.Record)) record.Record {
		r := limited
		change(&r)
		return r
	}
	nan := math.NaN()
	for _, c := range []struct {
		name        string
		request     convert.GoNoGoRequest
		code, field string
	}{
		{"no readings", goNoGo(limited, 0, 6), "out-of-bounds", "n"},
		{"less than none", goNoGo(limited, -1, 6), "out-of-bounds", "n"},
		{"more than a record holds", goNoGo(limited, record.MaxReadings+1, 6), "out-of-bounds", "n"},
		{"scatter below zero", goNoGo(limited, 5, -0.1), "out-of-bounds", "sd"},
		{"scatter that is no number", goNoGo(limited, 5, nan), "out-of-bounds", "sd"},
		{"infinite scatter", goNoGo(limited, 5, math.Inf(1)), "out-of-bounds", "sd"},
		{"scatter beyond all readings", goNoGo(limited, 5, 1000.1), "out-of-bounds", "sd"},
		{"both, n is named first", goNoGo(limited, 0, -1), "out-of-bounds", "n"},
		{"bad record", goNoGo(with(func(r *record.Record) { r.Confidence = 95 }), 0, -1), "out-of-bounds", "confidence"},
		{"unknown device", goNoGo(with(func(r *record.Record) { r.Device = "Q" }), 5, 6), "unknown-choice", "device"},
	} {
		t.Run(c.name, func(t *testing.T) {
			g, err := convert.FindGoNoGo(c.request)
			checkRefused(t, err, c.code, c.field)
			if g.Conforms != nil || g.Reason != "" {
				t.Errorf("and an answer: %+v", g)
			}
		})
	}
	for _, q := range []convert.GoNoGoRequest{goNoGo(limited, record.MaxReadings, 6), goNoGo(limited, 3, 1000), goNoGo(limited, 1, 0), goNoGo(limited, 2, 1000)} {
		if _, err := convert.FindGoNoGo(q); err != nil {
			t.Errorf("n %d, sd %g: %v", q.N, q.SD, err)
		}
	}
}

// checkRefused makes sure that an error is the one with a code, at a field.
func checkRefused(t testing.TB, err error, code, field string) {
	t.Helper()
	var e *wording.Error
	if !errors.As(err, &e) {
		t.Fatalf("%v, want %s at %q", err, code, field)
	}
	if e.Code != code || e.Field != field || strings.ContainsAny(e.Message, "{}<>") || noNumber.MatchString(e.Message) {
		t.Errorf("%s at %q: %s; want %s at %q", e.Code, e.Field, e.Message, code, field)
	}
}

// More readings or less scatter never narrow what conforms, nor what does not.
func TestGoNoGoMonotone(t *testing.T) {
	width := func(g convert.GoNoGo) (conforms, fails float64) {
		if len(g.Conforms) > 0 {
			conforms = g.Conforms[1] - g.Conforms[0]
		}
		for _, s := range g.DoesNotConform {
			fails += s[1] - s[0]
		}
		return conforms, fails
	}
	for _, c := range []struct {
		name   string
		record record.Record
		limit  *verdict.Limit
	}{
		{"maximum", steel(), between(scale.HBW, 0, 225)},
		{"minimum", steel(), between(scale.HRC, 34, 0)},
		{"both", steel(), between("HLD", 450, 560)},
		{"through HV", steel(), between(scale.HRC, 0, 22)},
		{"aluminium", taken("D", "aluminium"), between(scale.HBW, 60, 0)},
		{"grey iron", directed(taken("G", "grey-iron"), device.Compensated), between(scale.HBW, 0, 260)},
		{"austenitic", taken("D", "austenitic-stainless"), between(scale.HRB, 0, 95)},
	} {
		t.Run(c.name, func(t *testing.T) {
			for _, sd := range []float64{0, 3, 10, 25} {
				var last [2]float64
				for _, n := range []int{3, 4, 6, 10, 30} {
					conforms, fails := width(mustFind(t, goNoGo(against(c.record, c.limit, ""), n, sd)))
					if conforms < last[0]-0.01 || fails < last[1]-0.01 {
						t.Errorf("sd %g, n %d: %g conform and %g do not, with fewer readings %v", sd, n, conforms, fails, last)
					}
					last = [2]float64{conforms, fails}
				}
			}
			for _, n := range []int{3, 5} {
				last := [2]float64{math.Inf(1), math.Inf(1)}
				for _, sd := range []float64{0, 1, 3, 6, 10, 25} {
					conforms, fails := width(mustFind(t, goNoGo(against(c.record, c.limit, ""), n, sd)))
					if conforms > last[0]+0.01 || fails > last[1]+0.01 {
						t.Errorf("n %d, sd %g: %g conform and %g do not, with less scatter %v", n, sd, conforms, fails, last)
					}
					last = [2]float64{conforms, fails}
				}
			}
		})
	}
}

func BenchmarkGoNoGo(b *testing.B) {
	q := goNoGo(against(steel(), between(scale.HBW, 190, 250), ""), 5, 6)
	for b.Loop() {
		mustFind(b, q)
	}
}
