package convert

import (
	"cmp"
	"errors"
	"math"
	"slices"
	"strconv"
	"strings"

	"strikebook/convert/curve"
	"strikebook/convert/scale"
	"strikebook/convert/stats"
	"strikebook/convert/verdict"
	"strikebook/convert/wording"
)

// Verdict is the spot against its limit.
type Verdict struct {
	Outcome     verdict.Outcome `json:"outcome"`
	Rule        verdict.Rule    `json:"rule"`        // by which it was decided
	Scale       scale.Key       `json:"scale"`       // in which it was decided: the limit's own, or HV; "" where nothing was compared
	Value       *float64        `json:"value"`       // in Scale; null where nothing was compared, and so are the next five
	Min         *float64        `json:"min"`         // of the limit, in Scale; null also where there is none
	Max         *float64        `json:"max"`         // of the limit, in Scale; null also where there is none
	Guard       *float64        `json:"guard"`       // what the rule asks for between value and limit
	Expanded    *float64        `json:"expanded"`    // uncertainty of the comparison
	Probability *float64        `json:"probability"` // of conformity, JCGM 106
	ShownChance string          `json:"shownChance"` // the probability in percent, never 0 and never 100: "97", "> 99"; "" where there is none

	Sentence string   `json:"sentence"` // for a foreman
	Basis    string   `json:"basis"`    // how the comparison was made, where not in the limit's own scale; else ""
	Advice   string   `json:"advice"`   // what to do now; "" where there is nothing to do
	Said     []Saying `json:"said"`     // the three by their codes, those that are not ""
}

// Saying is a sentence by its code.
type Saying struct {
	Part   string         `json:"part"` // "sentence", "basis" or "advice"
	Code   string         `json:"code"`
	Params wording.Params `json:"params"`
}

// say sets one part of the verdict in words.
func (v *Verdict) say(part, code string, params wording.Params) {
	text := wording.Say(code, params).Message
	switch part {
	case "sentence":
		v.Sentence = text
	case "basis":
		v.Basis = text
	case "advice":
		v.Advice = text
	}
	v.Said = append(v.Said, Saying{Part: part, Code: code, Params: params})
}

// conversionOnly are the findings that stop a conversion and leave what was
// measured standing, so that it may still be set against a limit in its own scale.
var conversionOnly = []string{
	"no-curve", "no-metal", "no-table", "outside-metal-range",
	"wrong-curve", "curve-unusable", "curve-altered", "outside-curve-range",
}

// judge sets the spot against its limit.
func (e *evaluation) judge() {
	v := &e.sheet.Verdict
	v.Outcome, v.Said = verdict.CannotSay, []Saying{}
	limit := e.record.Limit
	switch {
	case limit == nil:
		v.Outcome = verdict.NoLimit
		v.say("sentence", "verdict-no-limit", wording.Params{})
		return
	case !e.wholeLimit(*limit):
		v.say("sentence", "verdict-bad-limit", wording.Params{})
		return
	case e.summary.N == 0:
		v.say("sentence", "verdict-no-readings", wording.Params{})
		return
	}
	c, no := e.compare(*limit)
	if no != nil {
		v.say("sentence", no.code, no.params)
		if no.advice != "" {
			v.say("advice", no.advice, wording.Params{"scale": string(limit.Scale)})
		}
		return
	}
	e.tell(v, c)
}

// wholeLimit reports whether a limit can be compared with, and says at its field
// if not.
func (e *evaluation) wholeLimit(l verdict.Limit) bool {
	b := l.Band()
	for _, bound := range []struct {
		path  string
		value *float64
	}{{"limit.min", l.Min}, {"limit.max", l.Max}} {
		if v := bound.value; v != nil && !(*v > 0 && *v <= greatestLimit) {
			e.find("bad-limit", bound.path, wording.Params{"path": bound.path, "got": asTyped(*v), "hi": greatestLimit})
			return false
		}
	}
	switch {
	case l.Scale == "":
		e.find("limit-no-scale", "limit.scale", wording.Params{})
	case l.Min == nil && l.Max == nil:
		e.find("limit-empty", "limit", wording.Params{})
	case b.Min > b.Max:
		e.find("limit-reversed", "limit.min", wording.Params{"min": b.Min, "max": b.Max})
	default:
		return true
	}
	return false
}

// greatestLimit is above every value of every scale served here.
const greatestLimit = 5000.0

// comparison is a comparison and the scale that it is made in.
type comparison struct {
	verdict.Comparison
	scale   scale.Scale
	limit   verdict.Limit // as it was written down
	through bool          // whether the limit was converted to HV
}

// refusal says why nothing can be compared.
type refusal struct {
	code   string
	params wording.Params
	advice string // code; "" for none
}

// compare sets the mean against a limit: in the limit's own scale where the spot
// has a value in it, else in HV.
func (e *evaluation) compare(l verdict.Limit) (comparison, *refusal) {
	s, _ := scale.ByKey(l.Scale)
	c := comparison{scale: s, limit: l, Comparison: verdict.Comparison{
		Band: l.Band(), Rule: l.Rule, Value: e.mean, Terms: e.terms, Confidence: e.record.Confidence}}
	stopped := &refusal{code: "verdict-stopped", advice: "advice-stopped", params: wording.Params{}}
	if s.Key == e.own.Key {
		if e.stoppedBut(conversionOnly) || math.IsNaN(e.mean) {
			return c, stopped
		}
		return c, nil
	}
	if e.stopped() || !e.placed {
		return c, stopped
	}
	leg, ok := e.legTo(s)
	if !ok {
		return c, &refusal{code: "verdict-no-way", advice: "advice-direct", params: wording.Params{"scale": string(s.Key), "own": string(e.own.Key)}}
	}
	value, terms, outside := e.over(leg)
	if outside != nil {
		return e.compareThroughHV(c, leg)
	}
	c.Value, c.Terms = value, terms
	return c, nil
}

// compareThroughHV sets the mean against a limit in a scale that has no value
// for the spot: both are led to HV.
func (e *evaluation) compareThroughHV(c comparison, leg scale.Leg) (comparison, *refusal) {
	hv, _ := scale.ByKey(scale.HV)
	toHV, _ := e.legTo(hv)
	value, terms, outside := e.over(toHV)
	if outside != nil { // an own curve can lead beyond the metal's range
		return c, &refusal{code: "verdict-no-way", advice: "advice-direct", params: wording.Params{"scale": string(c.scale.Key), "own": string(e.own.Key)}}
	}
	c.scale, c.through, c.Value = hv, true, value
	var doubt stats.Term
	for _, bound := range []*float64{&c.Band.Min, &c.Band.Max} {
		if math.IsInf(*bound, 0) {
			continue
		}
		term, no := e.boundInHV(bound, leg)
		if no != nil {
			return c, no
		}
		if term.Standard*term.Sensitivity > doubt.Standard*doubt.Sensitivity {
			doubt = term
		}
	}
	c.Terms = append(terms, doubt)
	return c, nil
}

// boundInHV converts a bound of the limit to HV, and returns the doubt in it.
func (e *evaluation) boundInHV(bound *float64, leg scale.Leg) (stats.Term, *refusal) {
	outside := func() *refusal {
		lo, hi, _ := leg.Span(e.group.Lo, e.group.Hi)
		return &refusal{code: "verdict-limit-outside", advice: "advice-direct", params: wording.Params{
			"limit": asTyped(*bound), "scale": string(leg.Scale.Key), "lo": leg.Scale.QuoteUp(lo), "hi": leg.Scale.QuoteDown(hi)}}
	}
	back, err := leg.Back(e.group.Lo, e.group.Hi)
	if err != nil {
		return stats.Term{}, outside()
	}
	inHV, err := back.At(*bound)
	if err != nil {
		return stats.Term{}, outside()
	}
	v, err1 := leg.At(inHV)
	slope, err2 := curve.MeanSlope(back, *bound, v.Standard)
	if errors.Join(err1, err2) != nil {
		return stats.Term{}, outside()
	}
	*bound = inHV
	return stats.Term{
		Name: "limit", Standard: v.Standard, Scale: string(leg.Scale.Key), DoF: stats.Infinite, Distribution: stats.Normal,
		Sensitivity: slope, Source: scale.LegSource,
	}, nil
}

// tell decides a comparison and puts it in words.
func (e *evaluation) tell(v *Verdict, c comparison) {
	d := e.decide(c)
	v.Outcome, v.Rule, v.Scale = d.Outcome, c.Rule, c.scale.Key
	if v.Rule == "" {
		v.Rule = verdict.Guarded
	}
	v.Value, v.Guard, v.Expanded, v.Probability = &c.Value, &d.Guard, &d.Uncertainty.Expanded, &d.Probability
	v.ShownChance = shownChance(d.Probability)
	v.Min, v.Max = finite(c.Band.Min), finite(c.Band.Max)
	if e.brief {
		return
	}
	ruling := string(d.Outcome) + "-" + c.sideOf(d)
	if v.Rule == verdict.Simple {
		ruling += "-simple"
	}
	value, guard := c.quoteValue(d)
	v.say("sentence", "verdict-"+ruling, wording.Params{
		"shown": c.scale.Notation(value, e.own.Key), "guard": guard, "min": c.quote(c.Band.Min), "max": c.quote(c.Band.Max),
	})
	if c.through {
		v.say("basis", "verdict-through-hv", wording.Params{
			"scale": string(c.limit.Scale), "limit": c.quoteLimit(), "hv": listBounds(c.quote(c.Band.Min), c.quote(c.Band.Max))})
	}
	e.advise(v, c, d)
}

// decide decides a comparison, with the uncertainty that the row of the limit's
// scale has where it is made there.
func (e *evaluation) decide(c comparison) verdict.Decision {
	if e.inLimit != nil && !c.through {
		return c.DecideWith(*e.inLimit)
	}
	return c.Decide()
}

// shownChance writes a probability in percent. Nothing is certain.
func shownChance(p float64) string {
	switch percent := math.Round(p * 100); percent {
	case 0:
		return "< 1"
	case 100:
		return "> 99"
	default:
		return strconv.FormatFloat(percent, 'f', 0, 64)
	}
}

// sideOf names the bounds that an outcome is about: "min", "max" or "both".
func (c comparison) sideOf(d verdict.Decision) string {
	low, high := c.Value-d.Guard < c.Band.Min, c.Value+d.Guard > c.Band.Max
	if d.Outcome == verdict.Conforms {
		low, high = !math.IsInf(c.Band.Min, 0), !math.IsInf(c.Band.Max, 0)
	}
	switch {
	case low && high:
		return "both"
	case low:
		return "min"
	}
	return "max"
}

// quoteValue writes the value and its guard with so many places that a reader
// who adds them up comes to the same outcome.
func (c comparison) quoteValue(d verdict.Decision) (value, guard string) {
	const mostFiner = 3
	s := c.scale
	for range mostFiner {
		value, guard = s.Quote(c.Value), s.QuoteUp(d.Guard)
		v, err1 := strconv.ParseFloat(value, 64)
		g, err2 := strconv.ParseFloat(guard, 64)
		if err := errors.Join(err1, err2); err != nil {
			panic(err) // Quote writes numbers
		}
		if c.Band.Outcome(v, g) == d.Outcome {
			break
		}
		s = s.Finer()
	}
	return value, guard
}

// quote writes a bound of the comparison with its scale; "" for an open side.
func (c comparison) quote(bound float64) string {
	switch {
	case math.IsInf(bound, 0):
		return ""
	case c.through:
		return c.scale.Notation(c.scale.Quote(bound), c.scale.Key)
	}
	return c.scale.Notation(asTyped(bound), c.scale.Key)
}

// quoteLimit writes the bounds of the limit as it was written down.
func (c comparison) quoteLimit() string {
	written := c
	written.through = false
	written.scale, _ = scale.ByKey(c.limit.Scale)
	b := c.limit.Band()
	return listBounds(written.quote(b.Min), written.quote(b.Max))
}

// listBounds joins the bounds that there are.
func listBounds(bounds ...string) string {
	return strings.Join(slices.DeleteFunc(bounds, func(s string) bool { return s == "" }), ", ")
}

// advise says what to do now.
func (e *evaluation) advise(v *Verdict, c comparison, d verdict.Decision) {
	switch d.Outcome {
	case verdict.Conforms:
		v.say("advice", "advice-conforms", wording.Params{})
		return
	case verdict.DoesNotConform:
		v.say("advice", "advice-fails", wording.Params{})
		return
	}
	n := e.summary.N
	wanted := min(math.Abs(c.Value-c.Band.Min), math.Abs(c.Value-c.Band.Max))
	if enough, _, ok := c.ReadingsFor(wanted, e.scatter(), max(n+1, leastReadings)); ok {
		v.say("advice", "advice-more-readings", wording.Params{"n": float64(enough), "more": float64(enough - n)})
		return
	}
	largest, percent := largestTerm(d)
	v.say("advice", "advice-not-readings", wording.Params{"term": largest, "percent": percent})
}

// largestTerm names the term that carries most of the variance, and its share.
func largestTerm(d verdict.Decision) (name string, percent float64) {
	largest := slices.MaxFunc(d.Uncertainty.Terms, func(a, b stats.Term) int { return cmp.Compare(a.Share, b.Share) })
	return largest.Name, largest.Share * 100
}

// scatter is the standard deviation of the readings, or the one assumed where
// they are too few to know it.
func (e *evaluation) scatter() float64 {
	return e.repeatability().Standard * math.Sqrt(float64(e.summary.N))
}

// finite is a bound for JSON, nil where the side is open.
func finite(bound float64) *float64 {
	if math.IsInf(bound, 0) {
		return nil
	}
	return &bound
}
