package convert_test

import (
	"math"
	"math/rand/v2"
	"slices"
	"strings"
	"testing"

	"strikebook/convert"
	"strikebook/convert/device"
	"strikebook/convert/metal"
	"strikebook/convert/record"
	"strikebook/convert/scale"
	"strikebook/convert/stats"
	"strikebook/convert/verdict"
	"strikebook/convert/wording"
)

// between is a limit; a bound of 0 leaves its side open.
func between(key scale.Key, least, greatest float64) *verdict.Limit {
	l := &verdict.Limit{Scale: key}
	if least != 0 {
		l.Min = &least
	}
	if greatest != 0 {
		l.Max = &greatest
	}
	return l
}

// against is a record with a limit, decided by a rule.
func against(r record.Record, l *verdict.Limit, rule verdict.Rule) record.Record {
	if l != nil {
		ruled := *l
		ruled.Rule = rule
		l = &ruled
	}
	r.Limit = l
	return r
}

// said are the codes of a verdict's sentences, in order.
func said(v convert.Verdict) string {
	var all []string
	for _, s := range v.Said {
		all = append(all, s.Code)
	}
	return strings.Join(all, " ")
}

func directed(r record.Record, d device.Direction) record.Record {
	r.Direction = d
	return r
}

// fiveAt610 is 330 HBW ± 33 HBW (TestShown), and 610 HLD ± 12 HLD.
func fiveAt610() record.Record { return steel(610, 612, 611, 609, 608) }

// Where each verdict comes from: the first word of its codes, by rule.
func TestVerdicts(t *testing.T) {
	soft := steel(490, 491, 492)    // 215 HV, below HRC
	hardish := steel(560, 561, 562) // 289 HV, above HRB
	scattered := steel(580, 600, 640, 590)
	for _, c := range []struct {
		name    string
		record  record.Record
		limit   *verdict.Limit
		rule    verdict.Rule
		outcome verdict.Outcome
		scale   scale.Key // in which it was decided
		said    string    // codes without "verdict-"
	}{
		{"no limit", fiveAt610(), nil, "", verdict.NoLimit, "", "no-limit"},
		{"no readings", steel(), between(scale.HBW, 0, 225), "", verdict.CannotSay, "", "no-readings"},

		{"far below a maximum", fiveAt610(), between(scale.HBW, 0, 400), "", verdict.Conforms, scale.HBW, "conforms-max advice-conforms"},
		{"far above a minimum", fiveAt610(), between(scale.HBW, 260, 0), "", verdict.Conforms, scale.HBW, "conforms-min advice-conforms"},
		{"within", fiveAt610(), between(scale.HBW, 290, 370), "", verdict.Conforms, scale.HBW, "conforms-both advice-conforms"},
		{"far above a maximum", fiveAt610(), between(scale.HBW, 0, 225), "", verdict.DoesNotConform, scale.HBW, "does-not-conform-max advice-fails"},
		{"far below a minimum", fiveAt610(), between(scale.HBW, 400, 0), "", verdict.DoesNotConform, scale.HBW, "does-not-conform-min advice-fails"},
		{"above both", fiveAt610(), between(scale.HBW, 190, 250), "", verdict.DoesNotConform, scale.HBW, "does-not-conform-max advice-fails"},
		{"below both", fiveAt610(), between(scale.HBW, 400, 500), "", verdict.DoesNotConform, scale.HBW, "does-not-conform-min advice-fails"},
		{"close below a maximum", fiveAt610(), between(scale.HBW, 0, 350), "", verdict.NotProven, scale.HBW, "not-proven-max advice-not-readings"},
		{"close above a maximum", fiveAt610(), between(scale.HBW, 0, 310), "", verdict.NotProven, scale.HBW, "not-proven-max advice-not-readings"},
		{"close above a minimum", fiveAt610(), between(scale.HBW, 310, 0), "", verdict.NotProven, scale.HBW, "not-proven-min advice-not-readings"},
		{"a narrow band", fiveAt610(), between(scale.HBW, 310, 340), "", verdict.NotProven, scale.HBW, "not-proven-both advice-not-readings"},
		{"close to the upper of two", fiveAt610(), between(scale.HBW, 250, 340), "", verdict.NotProven, scale.HBW, "not-proven-max advice-not-readings"},
		{"close to the lower of two", fiveAt610(), between(scale.HBW, 310, 400), "", verdict.NotProven, scale.HBW, "not-proven-min advice-not-readings"},
		{"scattered, more readings help", scattered, between(scale.HBW, 0, 370), "", verdict.NotProven, scale.HBW, "not-proven-max advice-more-readings"},
		{"at a maximum", fiveAt610(), between("HLD", 0, 610), "", verdict.NotProven, "HLD", "not-proven-max advice-not-readings"},

		{"simple, below a maximum", fiveAt610(), between(scale.HBW, 0, 350), verdict.Simple, verdict.Conforms, scale.HBW, "conforms-max-simple advice-conforms"},
		{"simple, above a maximum", fiveAt610(), between(scale.HBW, 0, 310), verdict.Simple, verdict.DoesNotConform, scale.HBW, "does-not-conform-max-simple advice-fails"},
		{"simple, above a minimum", fiveAt610(), between(scale.HBW, 310, 0), verdict.Simple, verdict.Conforms, scale.HBW, "conforms-min-simple advice-conforms"},
		{"simple, below a minimum", fiveAt610(), between(scale.HBW, 350, 0), verdict.Simple, verdict.DoesNotConform, scale.HBW, "does-not-conform-min-simple advice-fails"},
		{"simple, within", fiveAt610(), between(scale.HBW, 310, 340), verdict.Simple, verdict.Conforms, scale.HBW, "conforms-both-simple advice-conforms"},
		{"simple, at a maximum", fiveAt610(), between("HLD", 0, 610), verdict.Simple, verdict.Conforms, "HLD", "conforms-max-simple advice-conforms"},
		{"simple, at a minimum", fiveAt610(), between("HLD", 610, 0), verdict.Simple, verdict.Conforms, "HLD", "conforms-min-simple advice-conforms"},
		{"one-sided", fiveAt610(), between("HLD", 0, 621), verdict.OneSided95, verdict.Conforms, "HLD", "conforms-max advice-conforms"},
		{"the same, guarded", fiveAt610(), between("HLD", 0, 621), verdict.Guarded, verdict.NotProven, "HLD", "not-proven-max advice-not-readings"},

		{"in HV", fiveAt610(), between(scale.HV, 0, 450), "", verdict.Conforms, scale.HV, "conforms-max advice-conforms"},
		{"in HRC", fiveAt610(), between(scale.HRC, 20, 0), "", verdict.Conforms, scale.HRC, "conforms-min advice-conforms"},
		{"in MPa", fiveAt610(), between(scale.Rm, 900, 1400), "", verdict.Conforms, scale.Rm, "conforms-both advice-conforms"},
		{"direct method, its own scale", direct(scale.HV, 240, 250, 245), between(scale.HV, 0, 280), "", verdict.Conforms, scale.HV, "conforms-max advice-conforms"},
		{"direct method, another scale", direct(scale.HRC, 30.5, 31, 30.8), between(scale.HBW, 0, 240), "", verdict.DoesNotConform, scale.HBW, "does-not-conform-max advice-fails"},

		{"through HV, below the table", soft, between(scale.HRC, 0, 22), "", verdict.Conforms, scale.HV, "conforms-max through-hv advice-conforms"},
		{"through HV, close below the table", steel(510, 511, 512), between(scale.HRC, 0, 22), "", verdict.NotProven, scale.HV, "not-proven-max through-hv advice-not-readings"},
		{"through HV, a minimum", soft, between(scale.HRC, 40, 0), "", verdict.DoesNotConform, scale.HV, "does-not-conform-min through-hv advice-fails"},
		{"through HV, two bounds", soft, between(scale.HRC, 28, 34), "", verdict.DoesNotConform, scale.HV, "does-not-conform-min through-hv advice-fails"},
		{"through HV, simple", soft, between(scale.HRC, 0, 22), verdict.Simple, verdict.Conforms, scale.HV, "conforms-max-simple through-hv advice-conforms"},
		{"through HV, above the table", hardish, between(scale.HRB, 0, 95), "", verdict.DoesNotConform, scale.HV, "does-not-conform-max through-hv advice-fails"},
		{"through HV, above the table, a minimum", hardish, between(scale.HRB, 80, 0), "", verdict.Conforms, scale.HV, "conforms-min through-hv advice-conforms"},
		{"through HV, above Brinell", steel(820, 821, 822), between(scale.HBW, 0, 400), "", verdict.DoesNotConform, scale.HV, "does-not-conform-max through-hv advice-fails"},

		{"limit below its table", soft, between(scale.HRC, 0, 15), "", verdict.CannotSay, "", "limit-outside advice-direct"},
		{"limit above its table", soft, between(scale.HRC, 0, 75), "", verdict.CannotSay, "", "limit-outside advice-direct"},
		{"one of two bounds outside the table", soft, between(scale.HRC, 15, 22), "", verdict.CannotSay, "", "limit-outside advice-direct"},
		{"limit outside a table that holds the spot", fiveAt610(), between(scale.HRC, 15, 0), "", verdict.Conforms, scale.HRC, "conforms-min advice-conforms"},
		{"no table", taken("D", "titanium", 600, 602, 604), between(scale.HRC, 0, 36), "", verdict.CannotSay, "", "no-way advice-direct"},
		{"another device's scale", soft, between("HLG", 0, 600), "", verdict.CannotSay, "", "no-way advice-direct"},
		{"no strength of cast iron", taken("D", "grey-iron", 430, 432, 434), between(scale.Rm, 200, 0), "", verdict.CannotSay, "", "no-way advice-direct"},

		{"stopped by a light piece", on("D", &device.Piece{MassKg: new(1.0)}), between(scale.HBW, 0, 400), "", verdict.CannotSay, "", "stopped advice-stopped"},
		{"stopped, in its own scale, too", on("D", &device.Piece{MassKg: new(1.0)}), between("HLD", 0, 700), "", verdict.CannotSay, "", "stopped advice-stopped"},
		{"stopped by a failed check", checkedSteel(checked(790, 791, 792)), between("HLD", 0, 700), "", verdict.CannotSay, "", "stopped advice-stopped"},
		{"stopped by a bad reading", steel(610, 612, 614, 1001), between("HLD", 0, 700), "", verdict.CannotSay, "", "stopped advice-stopped"},
		{"stopped outside the device's range", steel(290, 291, 292), between("HLD", 0, 400), "", verdict.CannotSay, "", "stopped advice-stopped"},
		{"stopped outside a direction's table", directed(steel(870, 871, 872), device.Level), between("HLD", 0, 880), "", verdict.CannotSay, "", "stopped advice-stopped"},
		{"no metal", taken("D", "", 610, 611, 612), between(scale.HBW, 0, 400), "", verdict.CannotSay, "", "stopped advice-stopped"},
		{"no metal, its own scale", taken("D", "", 610, 611, 612), between("HLD", 0, 700), "", verdict.Conforms, "HLD", "conforms-max advice-conforms"},
		{"no device", taken("", "low-alloy-steel", 610, 611, 612), between(scale.HBW, 0, 400), "", verdict.CannotSay, "", "stopped advice-stopped"},
		{"no curve", taken("DL", "low-alloy-steel", 700, 702, 704), between(scale.HBW, 0, 400), "", verdict.CannotSay, "", "stopped advice-stopped"},
		{"no curve, its own scale", taken("DL", "low-alloy-steel", 700, 702, 704), between("HLDL", 0, 800), "", verdict.Conforms, "HLDL", "conforms-max advice-conforms"},
		{"too hard for the metal", taken("D", "aluminium", 700, 702, 704), between(scale.HV, 0, 400), "", verdict.CannotSay, "", "stopped advice-stopped"},
		{"too hard for the metal, its own scale", taken("D", "aluminium", 700, 702, 704), between("HLD", 0, 650), "", verdict.DoesNotConform, "HLD", "does-not-conform-max advice-fails"},
		{"no table back, its own scale", withGroup(direct(scale.HRC, 30, 31, 30.4), "brass"), between(scale.HRC, 0, 25), "", verdict.DoesNotConform, scale.HRC, "does-not-conform-max advice-fails"},
	} {
		t.Run(c.name, func(t *testing.T) {
			v := mustEvaluate(t, against(c.record, c.limit, c.rule)).Verdict
			got := strings.ReplaceAll(said(v), "verdict-", "")
			if v.Outcome != c.outcome || v.Scale != c.scale || got != c.said {
				t.Fatalf("%s in %q, %q: %s", v.Outcome, v.Scale, got, v.Sentence)
			}
			wanted := c.rule
			if compared := c.scale != ""; !compared {
				wanted = ""
			} else if wanted == "" {
				wanted = verdict.Guarded
			}
			if v.Rule != wanted {
				t.Errorf("rule %q, want %q", v.Rule, wanted)
			}
			checkVerdict(t, v)
		})
	}
}

func withGroup(r record.Record, group string) record.Record {
	r.Group = group
	return r
}

// checkVerdict makes sure that a verdict is whole: its sentences, and its
// numbers where there are any.
func checkVerdict(t testing.TB, v convert.Verdict) {
	t.Helper()
	parts := map[string]string{"sentence": "", "basis": "", "advice": ""}
	for _, s := range v.Said {
		if s.Params == nil || parts[s.Part] != "" {
			t.Errorf("said twice or without parameters: %+v", s)
		}
		parts[s.Part] = wording.Say(s.Code, s.Params).Message
	}
	for part, text := range map[string]string{"sentence": v.Sentence, "basis": v.Basis, "advice": v.Advice} {
		if text != parts[part] {
			t.Errorf("the %s is %q, and by its code %q", part, text, parts[part])
		}
		if strings.ContainsAny(text, "{}<>") || noNumber.MatchString(text) || text != "" && !strings.HasSuffix(text, ".") {
			t.Errorf("the %s %q is not whole", part, text)
		}
	}
	if v.Sentence == "" {
		t.Error("no sentence")
	}
	compared := v.Outcome == verdict.Conforms || v.Outcome == verdict.DoesNotConform || v.Outcome == verdict.NotProven
	for name, number := range map[string]*float64{"value": v.Value, "guard": v.Guard, "expanded": v.Expanded, "probability": v.Probability} {
		if (number != nil) != compared || number != nil && (math.IsNaN(*number) || math.IsInf(*number, 0)) {
			t.Errorf("%s: %s %v", v.Outcome, name, number)
		}
	}
	if (v.Scale != "") != compared || (v.Rule != "") != compared || (v.ShownChance != "") != compared {
		t.Errorf("%s by %q in %q, %q", v.Outcome, v.Rule, v.Scale, v.ShownChance)
	}
	if !compared {
		if v.Min != nil || v.Max != nil {
			t.Errorf("%s has bounds", v.Outcome)
		}
		return
	}
	if v.Min == nil && v.Max == nil || v.Min != nil && v.Max != nil && *v.Min > *v.Max {
		t.Errorf("bounds %v and %v", v.Min, v.Max)
	}
	if !(*v.Probability >= 0 && *v.Probability <= 1) || !(*v.Expanded > 0 && *v.Guard >= 0) || v.ShownChance == "0" || v.ShownChance == "100" {
		t.Errorf("probability %g (%s), expanded %g, guard %g", *v.Probability, v.ShownChance, *v.Expanded, *v.Guard)
	}
	if v.Advice == "" {
		t.Errorf("%s without advice", v.Outcome)
	}
}

// Whatever the record, its verdict is whole, and follows from its numbers.
func TestVerdictOfAnyRecord(t *testing.T) {
	seen := map[verdict.Outcome]int{}
	everySheet(t, func(t *testing.T, r record.Record, sheet convert.Sheet) {
		checkVerdict(t, sheet.Verdict)
		seen[sheet.Verdict.Outcome]++
	})
	rng := rand.New(rand.NewPCG(45, 46))
	for range 1500 {
		r := randomSpot(rng)
		v := mustEvaluate(t, r).Verdict
		checkVerdict(t, v)
		seen[v.Outcome]++
		if v.Value == nil {
			continue
		}
		inside := (v.Min == nil || *v.Value-*v.Guard >= *v.Min) && (v.Max == nil || *v.Value+*v.Guard <= *v.Max)
		outside := v.Min != nil && *v.Value+*v.Guard < *v.Min || v.Max != nil && *v.Value-*v.Guard > *v.Max
		if (v.Outcome == verdict.Conforms) != inside || (v.Outcome == verdict.DoesNotConform) != outside {
			t.Fatalf("%s: %g ± %g against %v, %v", v.Outcome, *v.Value, *v.Guard, v.Min, v.Max)
		}
		// Proven at 95 % on a side, or better. The probability is Student's, where
		// the guard may come from the distributions of the terms.
		if proof := v.Rule != verdict.Simple; proof && (inside && *v.Probability < 0.93 || outside && *v.Probability > 0.07) {
			t.Fatalf("%s by %s with a probability of %g", v.Outcome, v.Rule, *v.Probability)
		}
	}
	for _, outcome := range []verdict.Outcome{verdict.Conforms, verdict.DoesNotConform, verdict.NotProven, verdict.CannotSay, verdict.NoLimit} {
		if seen[outcome] < 50 {
			t.Errorf("%s came out only %d times", outcome, seen[outcome])
		}
	}
}

// randomSpot is a spot as it could be: on any metal, with any device, with a
// limit that is not far off.
func randomSpot(rng *rand.Rand) record.Record {
	d := device.All()[rng.IntN(len(device.All()))]
	g := metal.All()[rng.IntN(len(metal.All()))]
	level := d.Lo + (d.Hi-d.Lo)*rng.Float64()
	r := taken(d.Key, g.Key)
	scatter := 10 * rng.Float64()
	for range 1 + rng.IntN(7) {
		r.Readings = append(r.Readings, record.Reading{Value: record.Num(math.Round(level + scatter*rng.NormFloat64()))})
	}
	if directions := d.Directions(); rng.IntN(2) == 0 {
		r.Direction = directions[rng.IntN(len(directions))]
	}
	limit := between(scale.Key(d.Scale), 0, math.Round(level*(0.9+0.2*rng.Float64())))
	open, err := convert.Evaluate(r)
	if err != nil {
		panic(err)
	}
	if row := open.Scales[rng.IntN(len(open.Scales))]; row.Value != nil {
		limit = between(row.Scale, 0, math.Round(*row.Value*(0.8+0.4*rng.Float64())))
	} else if s, _ := scale.ByKey(row.Scale); rng.IntN(2) == 0 {
		limit = between(row.Scale, 0, math.Round(min(s.Hi, 600)*rng.Float64())+1)
	}
	switch rng.IntN(3) {
	case 0:
		limit.Min, limit.Max = limit.Max, nil
	case 1:
		limit.Min = new(math.Round(*limit.Max * (0.5 + 0.5*rng.Float64())))
	}
	return against(r, limit, verdict.Rules()[rng.IntN(3)])
}

func TestVerdictSentences(t *testing.T) {
	soft := steel(490, 491, 492)
	for _, c := range []struct {
		record                  record.Record
		limit                   *verdict.Limit
		rule                    verdict.Rule
		sentence, basis, advice string
	}{
		{fiveAt610(), between(scale.HBW, 0, 363.5), "",
			"It conforms: 330 HBW (HLD) ± 33 lies wholly at or below 363.5 HBW.", "",
			"File the record with its readings; acceptance belongs to the governing code."},
		{fiveAt610(), between(scale.HBW, 290, 370), "",
			"It conforms: 330 HBW (HLD) ± 33 lies wholly within 290 HBW to 370 HBW.", "",
			"File the record with its readings; acceptance belongs to the governing code."},
		{fiveAt610(), between(scale.HBW, 0, 225), "",
			"It does not conform: even less 33, 330 HBW (HLD) lies above 225 HBW.", "",
			"Confirm it by the direct method the code names before anything is rejected or repaired."},
		{fiveAt610(), between(scale.HBW, 400, 0), "",
			"It does not conform: even with 33 more, 330 HBW (HLD) lies below 400 HBW.", "",
			"Confirm it by the direct method the code names before anything is rejected or repaired."},
		{fiveAt610(), between(scale.HBW, 310, 340), "",
			"Not proven either way: 330 HBW (HLD) ± 33 reaches across both 310 HBW and 340 HBW.", "",
			"More readings would not settle it: 75 % of the doubt is the model. Use the direct method the code names."},
		{steel(580, 600, 640, 590), between(scale.HBW, 0, 370), "",
			"Not proven either way: 321 HBW (HLD) ± 59 reaches across 370 HBW.", "",
			"More readings would settle it if mean and scatter stay: 2 more, 6 in all."},
		{fiveAt610(), between(scale.HBW, 0, 330), verdict.Simple,
			"By its mean alone it conforms: 330 HBW (HLD) is at or below 330 HBW. Its uncertainty is left out of account.", "",
			"File the record with its readings; acceptance belongs to the governing code."},
		{fiveAt610(), between("HLD", 0, 640), "",
			"It conforms: 610 HLD ± 12 lies wholly at or below 640 HLD.", "",
			"File the record with its readings; acceptance belongs to the governing code."},
		{soft, between(scale.HRC, 0, 22), "",
			"It conforms: 215 HV (HLD) ± 24 lies wholly at or below 248 HV.",
			"The spot has no valid value in HRC, so the comparison is made in HV: 22 HRC answers to 248 HV.",
			"File the record with its readings; acceptance belongs to the governing code."},
		{soft, between(scale.HRC, 0, 15), "",
			"No verdict: the spot has no value in HRC, and the limit 15 HRC lies outside 20.0 to 68.0 HRC, where it could be led to HV.", "",
			"Measure in HRC by the direct method the code names."},
		{taken("D", "titanium", 600, 602, 604), between(scale.HRC, 0, 36), "",
			"No verdict: nothing leads from HLD to HRC on this metal.", "",
			"Measure in HRC by the direct method the code names."},
		{steel(290, 291, 292), between("HLD", 0, 400), "",
			"No verdict: a finding stops it.", "", "Clear the finding that stops it; its remedy stands beside it."},
		{steel(), between("HLD", 0, 400), "", "No verdict yet: no reading counts.", "", ""},
		{steel(610, 611, 612), between("HLD", 0, -1), "", "No verdict: the limit is not whole.", "", ""},
		{steel(610, 611, 612), nil, "", "No limit is set.", "", ""},
	} {
		v := mustEvaluate(t, against(c.record, c.limit, c.rule)).Verdict
		if v.Sentence != c.sentence || v.Basis != c.basis || v.Advice != c.advice {
			t.Errorf("says\n%s\n%s\n%s\nwant\n%s\n%s\n%s", v.Sentence, v.Basis, v.Advice, c.sentence, c.basis, c.advice)
		}
	}
}

func TestBadLimits(t *testing.T) {
	for _, c := range []struct {
		name        string
		limit       verdict.Limit
		code, field string
	}{
		{"nothing", verdict.Limit{}, "limit-no-scale", "limit.scale"},
		{"no scale", verdict.Limit{Max: new(225.0)}, "limit-no-scale", "limit.scale"},
		{"no bound", verdict.Limit{Scale: scale.HBW}, "limit-empty", "limit"},
		{"reversed", verdict.Limit{Scale: scale.HBW, Min: new(250.0), Max: new(190.0)}, "limit-reversed", "limit.min"},
		{"maximum zero", verdict.Limit{Scale: scale.HBW, Max: new(0.0)}, "bad-limit", "limit.max"},
		{"maximum below zero", verdict.Limit{Scale: scale.HBW, Max: new(-225.0)}, "bad-limit", "limit.max"},
		{"maximum no number", verdict.Limit{Scale: scale.HBW, Max: new(math.NaN())}, "bad-limit", "limit.max"},
		{"maximum infinite", verdict.Limit{Scale: scale.HBW, Max: new(math.Inf(1))}, "bad-limit", "limit.max"},
		{"maximum beyond all scales", verdict.Limit{Scale: scale.Rm, Max: new(5000.1)}, "bad-limit", "limit.max"},
		{"minimum zero", verdict.Limit{Scale: scale.HBW, Min: new(0.0), Max: new(225.0)}, "bad-limit", "limit.min"},
		{"minimum no number", verdict.Limit{Scale: scale.HBW, Min: new(math.NaN()), Max: new(225.0)}, "bad-limit", "limit.min"},
		{"both bad", verdict.Limit{Scale: scale.HBW, Min: new(-1.0), Max: new(-2.0)}, "bad-limit", "limit.min"},
	} {
		t.Run(c.name, func(t *testing.T) {
			r := fiveAt610()
			r.Limit = &c.limit
			sheet := mustEvaluate(t, r)
			var found []string
			for _, f := range sheet.Findings {
				checkSentences(t, f)
				if strings.HasPrefix(f.Field, "limit") {
					found = append(found, f.Code+" "+f.Field)
				}
			}
			if want := []string{c.code + " " + c.field}; !slices.Equal(found, want) {
				t.Errorf("findings %q, want %q", found, want)
			}
			if v := sheet.Verdict; v.Outcome != verdict.CannotSay || said(v) != "verdict-bad-limit" {
				t.Errorf("%s, %s", v.Outcome, said(v))
			}
			checkVerdict(t, sheet.Verdict)
			if rowOf(t, sheet, scale.HBW).Value == nil {
				t.Error("a bad limit withholds the value")
			}
		})
	}
	for _, good := range []verdict.Limit{
		{Scale: scale.Rm, Max: new(5000.0)}, {Scale: scale.HBW, Min: new(225.0), Max: new(225.0)}, {Scale: "HLD", Min: new(math.SmallestNonzeroFloat64)},
	} {
		r := fiveAt610()
		r.Limit = &good
		if v := mustEvaluate(t, r).Verdict; v.Value == nil {
			t.Errorf("%+v: %s", good, v.Sentence)
		}
	}
}

// A guard is the expanded uncertainty of the row it is compared in.
func TestGuardIsTheRows(t *testing.T) {
	for _, key := range []scale.Key{"HLD", scale.HV, scale.HBW, scale.HRC, scale.Rm} {
		sheet := mustEvaluate(t, against(directed(fiveAt610(), device.Up45), between(key, 1, 0), ""))
		row, v := rowOf(t, sheet, key), sheet.Verdict
		if *v.Value != *row.Value || *v.Guard != *row.Expanded || *v.Expanded != *row.Expanded {
			t.Errorf("%s: %g ± %g in the row, %g ± %g in the verdict", key, *row.Value, *row.Expanded, *v.Value, *v.Guard)
		}
		if simple := mustEvaluate(t, against(directed(fiveAt610(), device.Up45), between(key, 1, 0), verdict.Simple)).Verdict; *simple.Guard != 0 || *simple.Expanded != *row.Expanded {
			t.Errorf("%s: the simple rule has a guard of %g ± %g", key, *simple.Guard, *simple.Expanded)
		}
	}
}

// A limit that is led to HV brings the doubt of that along.
func TestLimitThroughHV(t *testing.T) {
	soft := steel(490, 491, 492)
	sheet := mustEvaluate(t, against(soft, between(scale.HRC, 0, 22), ""))
	hv, v := rowOf(t, sheet, scale.HV), sheet.Verdict
	if *v.Value != *hv.Value || v.Min != nil {
		t.Errorf("%g HV against %v, the row has %g", *v.Value, v.Min, *hv.Value)
	}
	// ASTM E140, Table 1: 22 HRC is 248 HV, 23 HRC 254 HV.
	if math.Abs(*v.Max-248) > 0.01 {
		t.Errorf("22 HRC is led to %g HV", *v.Max)
	}
	if !(*v.Expanded > *hv.Expanded && *v.Expanded < 1.2**hv.Expanded) {
		t.Errorf("± %g HV with the limit's doubt, ± %g without", *v.Expanded, *hv.Expanded)
	}
	// Two bounds have the larger of their doubts, once.
	one, other := *v.Expanded, *mustEvaluate(t, against(soft, between(scale.HRC, 0, 40), "")).Verdict.Expanded
	both := *mustEvaluate(t, against(soft, between(scale.HRC, 22, 40), "")).Verdict.Expanded
	if both != max(one, other) {
		t.Errorf("± %g with both bounds, ± %g and ± %g with one", both, one, other)
	}
}

// What corrects the direction of impact is in the uncertainty: a fifth of the
// correction and half a step of its table, rectangular.
func TestDirectionTerm(t *testing.T) {
	for _, c := range []struct {
		record record.Record
		half   float64
	}{
		{steel(600, 600, 600), 0},
		{directed(steel(600, 600, 600), device.Down45), 0.5 + 0.2*4},
		{directed(steel(600, 600, 600), device.Level), 0.5 + 0.2*8},
		{directed(steel(600, 600, 600), device.Up45), 0.5 + 0.2*14},
		{directed(steel(600, 600, 600), device.Up), 0.5 + 0.2*19},
		{directed(steel(575, 575, 575), device.Up), 0.5 + 0.2*19.5}, // between two levels of the table
		{directed(steel(600, 600, 600), device.Compensated), 2},
		{directed(taken("G", "grey-iron", 410, 410, 410), device.Compensated), 2},
		{directed(direct(scale.HRC, 30.5, 31, 30.8), device.Up), 0},
		{directed(direct(scale.HRC, 30.5, 31, 30.8), device.Compensated), 0},
	} {
		sheet := mustEvaluate(t, c.record)
		term, ok := termOf(sheet, "direction")
		if ok != (c.half > 0) || math.Abs(term.Standard-c.half/math.Sqrt(3)) > 1e-9 || ok && (term.Distribution != stats.Uniform || term.Source == "") {
			t.Errorf("%s: %+v, want half-width %g", c.record.Direction, term, c.half)
		}
	}
	down, up := fiveAt610(), directed(fiveAt610(), device.Up)
	limit := between("HLD", 0, 700)
	if a, b := *mustEvaluate(t, against(down, limit, "")).Verdict.Guard, *mustEvaluate(t, against(up, limit, "")).Verdict.Guard; !(b > a) {
		t.Errorf("the guard is %g down, %g up", a, b)
	}
}

// The advice to take more readings holds: a record with so many, of the same
// mean and scatter, is settled.
func TestAdviceHolds(t *testing.T) {
	rng := rand.New(rand.NewPCG(47, 48))
	followed := 0
	for range 1500 {
		mean, sd := 400+300*rng.Float64(), 2+18*rng.Float64()
		n := 3 + rng.IntN(4)
		r := steel(scattered(mean, sd, n)...)
		row := rowOf(t, mustEvaluate(t, r), scale.HBW)
		if row.Value == nil {
			continue
		}
		limit := between(scale.HBW, 0, *row.Value+*row.Expanded*(2*rng.Float64()-1))
		v := mustEvaluate(t, against(r, limit, "")).Verdict
		i := slices.IndexFunc(v.Said, func(s convert.Saying) bool { return s.Code == "advice-more-readings" })
		if i < 0 {
			continue
		}
		followed++
		in, more := v.Said[i].Params["n"].(float64), v.Said[i].Params["more"].(float64)
		if in-more != float64(n) || more < 1 || in > verdict.MostReadings {
			t.Fatalf("%g more, %g in all, after %d", more, in, n)
		}
		after := mustEvaluate(t, against(steel(scattered(mean, sd, int(in))...), limit, "")).Verdict
		// The slope that carries the uncertainty follows its width, so that the
		// forecast may miss by a little.
		short := *after.Guard - math.Abs(*after.Value-*limit.Max)
		if after.Outcome == verdict.NotProven && short > 0.02**after.Guard {
			t.Errorf("%d readings at %.1f with sd %.1f: %g advised, and then %g ± %g against %g", n, mean, sd, in, *after.Value, *after.Guard, *limit.Max)
		}
	}
	if followed < 50 {
		t.Errorf("advised only %d times", followed)
	}
	t.Logf("advised %d times", followed)
}

// scattered makes n readings of exactly this mean and standard deviation.
func scattered(mean, sd float64, n int) []float64 {
	values := make([]float64, n)
	sum := 0.0
	for i := range values {
		values[i] = float64(i) - float64(n-1)/2
		sum += values[i] * values[i]
	}
	for i := range values {
		if n > 1 {
			values[i] *= sd / math.Sqrt(sum/float64(n-1))
		}
		values[i] += mean
	}
	return values
}

// Every limit of the pick list can be decided on the metal it is for.
func TestPublishedLimitsAreDecided(t *testing.T) {
	for _, l := range convert.NewCatalogue().Limits {
		r := steel(430, 431, 432)
		r.Limit = &verdict.Limit{Scale: l.Scale, Min: l.Min, Max: l.Max}
		if v := mustEvaluate(t, r).Verdict; v.Value == nil {
			t.Errorf("%s: %s", l.Key, v.Sentence)
		}
	}
}
