package convert_test

import (
	"math"
	"math/rand/v2"
	"slices"
	"strings"
	"testing"

	"strikebook/convert"
	"strikebook/convert/device"
	"strikebook/convert/record"
	"strikebook/convert/scale"
	"strikebook/convert/stats"
	"strikebook/convert/wording"
)

// checked is a check on a block of 775 HLD ± 6 HLD that was made an hour before
// the readings of checkedSteel.
func checked(values ...float64) *record.Block {
	b := &record.Block{Certified: new(775.0), ExpandedU: new(6.0), Taken: "2026-12-01T08:30:00Z"}
	for _, v := range values {
		b.Readings = append(b.Readings, record.Num(v))
	}
	return b
}

func checkedSteel(b *record.Block) record.Record {
	r := steel(612, 608, 615, 610, 611)
	r.Taken, r.Block = "2026-12-01T09:30:00Z", b
	return r
}

// ofBlock are the findings of the block check: codes with their fields, in order.
func ofBlock(sheet convert.Sheet) string {
	var all []string
	for _, f := range sheet.Findings {
		if strings.HasPrefix(f.Field, "block") || f.Field == "permissible_error" {
			all = append(all, f.Code+" "+f.Field)
		}
	}
	return strings.Join(all, ", ")
}

// termOf finds a term of the own scale's budget.
func termOf(sheet convert.Sheet, name string) (stats.Term, bool) {
	terms := sheet.Uncertainty.Terms
	i := slices.IndexFunc(terms, func(term stats.Term) bool { return term.Name == name })
	if i < 0 {
		return stats.Term{}, false
	}
	return terms[i], true
}

func TestBlockStatus(t *testing.T) {
	with := func(change func(*record.Block), values ...float64) *record.Block {
		b := checked(values...)
		change(b)
		return b
	}
	text := record.Number{Value: math.NaN(), Text: "77l"}
	for _, c := range []struct {
		name   string
		block  *record.Block
		status convert.BlockStatus
		want   string // findings of the block
	}{
		{"passed", checked(772, 776, 774), convert.BlockPassed, ""},
		{"at the tolerance, above", checked(780, 781, 782), convert.BlockPassed, ""},
		{"at the tolerance, below", checked(768, 769, 770), convert.BlockPassed, ""},
		{"over the tolerance, above", checked(780, 781, 782.003), convert.BlockFailed, "block-failed block"},
		{"over the tolerance, below", checked(768, 769, 769.997), convert.BlockFailed, "block-failed block"},
		{"its own tolerance, met", with(func(b *record.Block) { b.Tolerance = new(8.0) }, 782, 783, 784), convert.BlockPassed, ""},
		{"its own tolerance, not met", with(func(b *record.Block) { b.Tolerance = new(4.0) }, 779, 780, 781), convert.BlockFailed, "block-failed block"},
		{"a tolerance that is none", with(func(b *record.Block) { b.Tolerance = new(0.0) }, 775, 775, 775), convert.BlockIncomplete, "bad-quantity block.tolerance"},

		{"nothing but a name", &record.Block{}, convert.BlockIncomplete, "block-incomplete block.certified"},
		{"no certified value", with(func(b *record.Block) { b.Certified = nil }, 772, 776, 774), convert.BlockIncomplete, "block-incomplete block.certified"},
		{"no uncertainty", with(func(b *record.Block) { b.ExpandedU = nil }, 772, 776, 774), convert.BlockIncomplete, "block-incomplete block.expanded_u"},
		{"neither", with(func(b *record.Block) { b.Certified, b.ExpandedU = nil, nil }, 772, 776, 774), convert.BlockIncomplete, "block-incomplete block.certified"},
		{"no readings", checked(), convert.BlockIncomplete, "block-incomplete block.readings"},
		{"two readings", checked(774, 776), convert.BlockIncomplete, "block-incomplete block.readings"},
		{"three, one of them text", with(func(b *record.Block) { b.Readings[1] = text }, 772, 776, 774), convert.BlockIncomplete, "block-incomplete block.readings"},
		{"four, one of them text", with(func(b *record.Block) { b.Readings[1] = text }, 772, 776, 774, 775), convert.BlockIncomplete, "block-incomplete block.readings"},
		{"four, one of them above 1000", checked(772, 776, 774, 1000.5), convert.BlockIncomplete, "block-incomplete block.readings"},

		{"certified zero", with(func(b *record.Block) { b.Certified = new(0.0) }, 772, 776, 774), convert.BlockIncomplete, "bad-quantity block.certified"},
		{"certified above 1000", with(func(b *record.Block) { b.Certified = new(7750.0) }, 772, 776, 774), convert.BlockIncomplete, "bad-quantity block.certified"},
		{"certified no number", with(func(b *record.Block) { b.Certified = new(math.NaN()) }, 772, 776, 774), convert.BlockIncomplete, "bad-quantity block.certified"},
		{"uncertainty below zero", with(func(b *record.Block) { b.ExpandedU = new(-6.0) }, 772, 776, 774), convert.BlockIncomplete, "bad-quantity block.expanded_u"},
		{"uncertainty infinite", with(func(b *record.Block) { b.ExpandedU = new(math.Inf(1)) }, 772, 776, 774), convert.BlockIncomplete, "bad-quantity block.expanded_u"},

		{"none", nil, convert.BlockNone, "no-block-check block"},
	} {
		t.Run(c.name, func(t *testing.T) {
			sheet := mustEvaluate(t, checkedSteel(c.block))
			if got := ofBlock(sheet); sheet.Block.Status != c.status || got != c.want {
				t.Fatalf("%s with %q, want %s with %q", sheet.Block.Status, got, c.status, c.want)
			}
			complete := c.status == convert.BlockPassed || c.status == convert.BlockFailed
			if complete != (sheet.Block.Error != nil) || complete != (sheet.Block.Tolerance != nil) {
				t.Errorf("error %v, tolerance %v", sheet.Block.Error, sheet.Block.Tolerance)
			}
			_, certificate := termOf(sheet, "block certificate")
			_, permissible := termOf(sheet, "permissible error")
			if certificate != complete || permissible == complete {
				t.Errorf("terms: certificate %t, permissible error %t", certificate, permissible)
			}
			stopped := c.status == convert.BlockFailed || strings.HasPrefix(c.want, "bad-quantity")
			if got := rowOf(t, sheet, scale.HBW).Value == nil; got != stopped {
				t.Errorf("HBW withheld: %t, want %t", got, stopped)
			}
			for _, f := range sheet.Findings {
				checkSentences(t, f)
			}
		})
	}
}

func TestBlockFigures(t *testing.T) {
	b := mustEvaluate(t, checkedSteel(checked(772, 776, 774))).Block
	if b.N != 3 || *b.Mean != 774 || *b.SD != 2 || *b.Error != -1 || *b.Tolerance != 6 {
		t.Errorf("%+v: mean %g, sd %g, error %g, tolerance %g", b, *b.Mean, *b.SD, *b.Error, *b.Tolerance)
	}
	incomplete := mustEvaluate(t, checkedSteel(checked(774, 776))).Block
	if incomplete.N != 2 || *incomplete.Mean != 775 || incomplete.Error != nil {
		t.Errorf("incomplete: %+v", incomplete)
	}
	if none := mustEvaluate(t, steel(610, 612, 614)).Block; none != (convert.BlockCheck{Status: convert.BlockNone}) {
		t.Errorf("none: %+v", none)
	}
}

// By hand: the certificate is halved; the block's three readings have the
// standard deviation 2; their mean is 1 HLD below the certified value.
func TestBlockTerms(t *testing.T) {
	third := math.Sqrt(3)
	correction := checked(772, 776, 774)
	correction.Use = record.AsCorrection
	uncertainty := checked(772, 776, 774)
	uncertainty.Use = record.AsUncertainty
	stated := checkedSteel(nil)
	stated.PermissibleError = new(5.0)
	ignored := checkedSteel(checked(772, 776, 774))
	ignored.PermissibleError = new(5.0)
	asUncertainty := []stats.Term{
		{Name: "block certificate", Standard: 3, DoF: stats.Infinite, Distribution: stats.Normal},
		{Name: "block readings", Standard: 2 / third, DoF: 2, Distribution: stats.Student},
		{Name: "block offset", Standard: 1, DoF: stats.Infinite, Distribution: stats.Normal},
	}
	for _, c := range []struct {
		name    string
		record  record.Record
		shifted float64
		want    []stats.Term
	}{
		{"left open", checkedSteel(checked(772, 776, 774)), 0, asUncertainty},
		{"as uncertainty", checkedSteel(uncertainty), 0, asUncertainty},
		{"as correction", checkedSteel(correction), 1, asUncertainty[:2]},
		{"none", checkedSteel(nil), 0, []stats.Term{
			{Name: "permissible error", Standard: 12 / third, DoF: stats.Infinite, Distribution: stats.Uniform}}},
		{"permissible error stated", stated, 0, []stats.Term{
			{Name: "permissible error", Standard: 5 / third, DoF: stats.Infinite, Distribution: stats.Uniform}}},
		{"permissible error beside a check", ignored, 0, asUncertainty},
		{"incomplete", checkedSteel(checked(774, 776)), 0, []stats.Term{
			{Name: "permissible error", Standard: 12 / third, DoF: stats.Infinite, Distribution: stats.Uniform}}},
	} {
		t.Run(c.name, func(t *testing.T) {
			sheet := mustEvaluate(t, c.record)
			if sheet.Corrected.Block != c.shifted || math.Abs(*sheet.Corrected.Mean-(611.2+c.shifted)) > 1e-9 {
				t.Errorf("corrected by %g to %g, want %g and %g", sheet.Corrected.Block, *sheet.Corrected.Mean, c.shifted, 611.2+c.shifted)
			}
			var got []stats.Term
			sum := 0.0
			row := rowOf(t, sheet, "HLD")
			for _, term := range row.Terms {
				sum += term.Standard * term.Standard
				if strings.HasPrefix(term.Name, "block") || term.Name == "permissible error" {
					if term.Source == "" || term.Scale != "HLD" || term.Sensitivity != 1 {
						t.Errorf("%+v", term)
					}
					got = append(got, term)
				}
			}
			same := slices.EqualFunc(got, c.want, func(a, b stats.Term) bool {
				return a.Name == b.Name && math.Abs(a.Standard-b.Standard) < 1e-12 && a.DoF == b.DoF && a.Distribution == b.Distribution
			})
			if !same {
				t.Errorf("terms %+v, want %+v", got, c.want)
			}
			if math.Abs(*row.Standard-math.Sqrt(sum)) > 1e-12 {
				t.Errorf("u = %g, the root of the squares is %g", *row.Standard, math.Sqrt(sum))
			}
		})
	}
}

// The offset is a correction or an uncertainty, never both and never neither.
func TestOffsetOnce(t *testing.T) {
	rng := rand.New(rand.NewPCG(41, 42))
	for range 300 {
		offset := math.Round(120*(rng.Float64()-0.5)) / 10 // within the tolerance
		b := checked(775+offset-1, 775+offset, 775+offset+1)
		if rng.IntN(2) == 0 {
			b.Use = record.AsCorrection
		}
		sheet := mustEvaluate(t, checkedSteel(b))
		term, there := termOf(sheet, "block offset")
		switch corrected := sheet.Corrected.Block; {
		case b.Use == record.AsCorrection && (there || math.Abs(corrected+offset) > 1e-9):
			t.Fatalf("offset %g as correction: corrected by %g, term %t", offset, corrected, there)
		case b.Use == "" && (!there || corrected != 0 || math.Abs(term.Standard-math.Abs(offset)) > 1e-9):
			t.Fatalf("offset %g as uncertainty: corrected by %g, term %+v", offset, corrected, term)
		}
	}
}

// A correction moves every value the way it moves the mean.
func TestCorrectionShifts(t *testing.T) {
	b := checked(772, 770, 771) // reads 4 HLD low
	b.Use = record.AsCorrection
	corrected := mustEvaluate(t, checkedSteel(b))
	higher := mustEvaluate(t, steel(616, 612, 619, 614, 615))
	for _, key := range []scale.Key{"HLD", scale.HV, scale.HBW, scale.HRC} {
		if got, want := *rowOf(t, corrected, key).Value, *rowOf(t, higher, key).Value; math.Abs(got-want) > 1e-9 {
			t.Errorf("%s is %g, want %g as of readings 4 HLD higher", key, got, want)
		}
	}
}

func TestPermissibleErrors(t *testing.T) {
	stating := func(r record.Record, half float64) record.Record {
		r.PermissibleError = &half
		return r
	}
	rockwell := direct(scale.HRC, 30.5, 31, 30.8)
	vickers := direct(scale.HV, 240, 250, 245)
	block := direct(scale.HRC, 30.5, 31, 30.8)
	block.Block = &record.Block{Certified: new(30.0), ExpandedU: new(0.4), Readings: []record.Number{record.Num(30.1), record.Num(30.2), record.Num(30.3)}}
	held := direct(scale.HRC, 30.5, 31, 30.8)
	held.Block = &record.Block{Certified: new(30.0), ExpandedU: new(0.4), Readings: block.Block.Readings, Tolerance: new(0.1)}
	for _, c := range []struct {
		name   string
		record record.Record
		status convert.BlockStatus
		want   string
		half   float64 // of the term; 0: none
	}{
		{"device D", steel(610, 612, 614), convert.BlockNone, "no-block-check block", 12},
		{"device G", taken("G", "grey-iron", 410, 412, 414), convert.BlockNone, "no-block-check block", 12},
		{"stated", stating(steel(610, 612, 614), 8), convert.BlockNone, "no-block-check block", 8},
		{"zero", stating(steel(610, 612, 614), 0), convert.BlockNone, "bad-quantity permissible_error, no-block-check block", 12},
		{"below zero", stating(steel(610, 612, 614), -4), convert.BlockNone, "bad-quantity permissible_error, no-block-check block", 12},
		{"above 1000", stating(steel(610, 612, 614), 1001), convert.BlockNone, "bad-quantity permissible_error, no-block-check block", 12},
		{"direct method", rockwell, convert.BlockNone, "no-block-check-direct block", 0},
		{"direct method, stated", stating(rockwell, 1.5), convert.BlockNone, "no-block-check block", 1.5},
		{"direct method, bad", stating(vickers, math.NaN()), convert.BlockNone, "bad-quantity permissible_error, no-block-check-direct block", 0},
		{"direct method, block without tolerance", block, convert.BlockUsed, "block-undated block.taken", 0},
		{"direct method, block fails its tolerance", held, convert.BlockFailed, "block-failed block, block-undated block.taken", 0},
		{"nothing chosen", taken("", "", 610, 612, 614), convert.BlockNone, "", 0},
	} {
		t.Run(c.name, func(t *testing.T) {
			sheet := mustEvaluate(t, c.record)
			if got := ofBlock(sheet); sheet.Block.Status != c.status || got != c.want {
				t.Errorf("%s with %q, want %s with %q", sheet.Block.Status, got, c.status, c.want)
			}
			term, there := termOf(sheet, "permissible error")
			if there != (c.half > 0) || math.Abs(term.Standard-c.half/math.Sqrt(3)) > 1e-12 {
				t.Errorf("term %+v, want half-width %g", term, c.half)
			}
			for _, f := range sheet.Findings {
				checkSentences(t, f)
			}
		})
	}
}

func TestBlockAge(t *testing.T) {
	for _, c := range []struct {
		name, checked, taken, want string
	}{
		{"an hour before", "2026-12-01T08:30:00Z", "2026-12-01T09:30:00Z", ""},
		{"at once", "2026-12-01T09:30:00Z", "2026-12-01T09:30:00Z", ""},
		{"24 hours before", "2026-11-30T09:30:00Z", "2026-12-01T09:30:00Z", ""},
		{"24 hours after", "2026-12-02T09:30:00Z", "2026-12-01T09:30:00Z", ""},
		{"a second more, before", "2026-11-30T09:29:59Z", "2026-12-01T09:30:00Z", "block-old block.taken"},
		{"a second more, after", "2026-12-02T09:30:01Z", "2026-12-01T09:30:00Z", "block-old block.taken"},
		{"24 hours across zones", "2026-11-30T19:30:00+10:00", "2026-12-01T09:30:00Z", ""},
		{"more across zones", "2026-11-30T09:30:00+10:00", "2026-12-01T09:30:00Z", "block-old block.taken"},
		{"a year", "2025-12-01T09:30:00Z", "2026-12-01T09:30:00Z", "block-old block.taken"},
		{"a thousand years", "1026-12-01T09:30:00Z", "2026-12-01T09:30:00Z", "block-old block.taken"},
		{"check undated", "", "2026-12-01T09:30:00Z", "block-undated block.taken"},
		{"readings undated", "2026-12-01T09:30:00Z", "", "block-undated block.taken"},
		{"neither dated", "", "", "block-undated block.taken"},
	} {
		t.Run(c.name, func(t *testing.T) {
			r := checkedSteel(checked(772, 776, 774))
			r.Block.Taken, r.Taken = c.checked, c.taken
			sheet := mustEvaluate(t, r)
			if got := ofBlock(sheet); got != c.want {
				t.Errorf("%q, want %q", got, c.want)
			}
			for _, f := range sheet.Findings {
				checkSentences(t, f)
				if f.Field == "block.taken" && f.Level == wording.Stop {
					t.Errorf("%s stops", f.Code)
				}
			}
			if rowOf(t, sheet, scale.HBW).Value == nil {
				t.Error("the age of a check withholds the value")
			}
		})
	}
}

func TestBlockSentences(t *testing.T) {
	old := checked(772, 776, 774)
	old.Taken = "2026-11-29T21:30:00Z"
	for _, c := range []struct {
		block   *record.Block
		message string
	}{
		{checked(782, 783, 784), "The block check fails: the mean on the block is off by 8.0 HLD, and 6 HLD is allowed."},
		{checked(766, 767, 768), "The block check fails: the mean on the block is off by -8.0 HLD, and 6 HLD is allowed."},
		{checked(774, 776), "The block check is not whole: its field readings is missing. It needs the certified value, its expanded uncertainty and at least 3 readings. Until then the permissible error stands in."},
		{old, "The block check and the readings lie 36 hours apart; at most 24 are usual."},
		{nil, "No check on a test block stands behind these readings, so the instrument may read wrong by 12 HLD either way."},
	} {
		if f := mustEvaluate(t, checkedSteel(c.block)).Findings[0]; f.Message != c.message {
			t.Errorf("%s says\n%s\nwant\n%s", f.Code, f.Message, c.message)
		}
	}
}

// methods is how far two ways to a coverage factor may disagree (stats.Combine
// changes from one to the other where they do by less than that).
const methods = 0.03

// A larger offset or a worse certificate never narrows an uncertainty, and
// neither moves a value.
func TestWorseBlockIsNoBetter(t *testing.T) {
	rng := rand.New(rand.NewPCG(43, 44))
	groups := []string{"low-alloy-steel", "austenitic-stainless", "grey-iron", "aluminium"}
	levels := []float64{610, 420, 430, 430}
	for range 400 {
		i := rng.IntN(len(groups))
		r := taken("D", groups[i])
		sd := 12 * rng.Float64()
		for range 3 + rng.IntN(5) {
			r.Readings = append(r.Readings, record.Reading{Value: record.Num(levels[i] + sd*rng.NormFloat64())})
		}
		if rng.IntN(3) == 0 {
			r.Direction = device.Level
		}
		offset, scatter, expanded := 5*rng.Float64(), 3*rng.Float64(), 1+9*rng.Float64()
		block := func(offset, expanded float64) *record.Block {
			b := checked(775+offset-scatter, 775+offset, 775+offset+scatter)
			b.ExpandedU, b.Tolerance = &expanded, new(100.0)
			return b
		}
		r.Block = block(offset, expanded)
		before := mustEvaluate(t, r)
		r.Block = block(-offset-10*rng.Float64(), expanded)
		moreOff := mustEvaluate(t, r)
		r.Block = block(offset, expanded+10*rng.Float64())
		lessSure := mustEvaluate(t, r)
		for j, row := range before.Scales {
			for what, worse := range map[string]convert.Row{"offset": moreOff.Scales[j], "certificate": lessSure.Scales[j]} {
				if row.Status != convert.OK {
					continue
				}
				if *worse.Value != *row.Value || !(*worse.Standard >= *row.Standard) {
					t.Fatalf("%s, worse %s: %s becomes %g ± %g (standard) from %g ± %g", groups[i], what, row.Scale, *worse.Value, *worse.Standard, *row.Value, *row.Standard)
				}
				least := *row.Expanded * (1 - 1e-9)
				if worse.Coverage != row.Coverage {
					least = *row.Expanded * (1 - methods)
				}
				if !(*worse.Expanded >= least) {
					t.Errorf("%s, worse %s: %s expanded %g (%s) becomes %g (%s)", groups[i], what, row.Scale, *row.Expanded, row.Coverage, *worse.Expanded, worse.Coverage)
				}
			}
		}
	}
}
