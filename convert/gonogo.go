package convert

import (
	"math"
	"slices"

	"strikebook/convert/record"
	"strikebook/convert/scale"
	"strikebook/convert/stats"
	"strikebook/convert/verdict"
	"strikebook/convert/wording"
)

// GoNoGoRequest is a record before its readings are taken, with what is assumed
// of them. Readings it has are left out of account.
type GoNoGoRequest struct {
	record.Record
	N  int     `json:"n"`  // how many readings will be taken, 1 to record.MaxReadings
	SD float64 `json:"sd"` // the standard deviation they are assumed to have, in the record's scale
}

// GoNoGo is what the mean of the readings decides, in the record's scale and as
// the instrument shows it, before any correction.
type GoNoGo struct {
	Scale          scale.Key   `json:"scale"`
	Conforms       []float64   `json:"conforms"`       // the means, least and greatest, that conform; [] where none does
	DoesNotConform [][]float64 `json:"doesNotConform"` // the spans of means that do not
	NotProven      [][]float64 `json:"notProven"`      // the spans of means that prove nothing either way

	ShownConforms       []string   `json:"shownConforms"`       // rounded inwards, to be safe
	ShownDoesNotConform [][]string `json:"shownDoesNotConform"` // rounded inwards

	Reason       string         `json:"reason"` // one sentence where there is no span at all; else ""
	ReasonCode   string         `json:"reasonCode"`
	ReasonParams wording.Params `json:"reasonParams"`
}

// goNoGoStep is how far apart the means are that are tried at first, and
// goNoGoEdge how closely the edge between two outcomes is searched; in the
// reading's scale.
const (
	goNoGoStep = 2.0
	goNoGoEdge = 0.001
	// mostCorrection is more than any correction moves a mean.
	mostCorrection = 60.0
)

// FindGoNoGo finds, for a limit, the means of the readings that conform and
// those that do not. An error says that the request is invalid.
func FindGoNoGo(q GoNoGoRequest) (GoNoGo, error) {
	if err := q.validate(); err != nil {
		return GoNoGo{}, err
	}
	q.Readings = nil
	e := newEvaluation(q.Normalized())
	e.prepare()
	g := GoNoGo{
		Scale: e.own.Key, Conforms: []float64{}, DoesNotConform: [][]float64{}, NotProven: [][]float64{},
		ShownConforms: []string{}, ShownDoesNotConform: [][]string{}, ReasonParams: wording.Params{},
	}
	switch {
	case q.Limit == nil:
		g.refuse("verdict-no-limit", wording.Params{})
	case !e.wholeLimit(*q.Limit):
		g.refuse("verdict-bad-limit", wording.Params{})
	case e.own.Key == "" || e.stoppedBut(conversionOnly):
		g.refuse("verdict-stopped", wording.Params{})
	default:
		g.scan(e, q)
	}
	return g, nil
}

func (q GoNoGoRequest) validate() error {
	if err := q.Validate(); err != nil {
		return err
	}
	if q.N < 1 || q.N > record.MaxReadings {
		return wording.NewError("out-of-bounds", "n", wording.Params{
			"path": "n", "lo": 1.0, "hi": float64(record.MaxReadings), "got": record.Num(float64(q.N)).String()})
	}
	if !(q.SD >= 0 && q.SD <= record.GreatestReading) {
		return wording.NewError("out-of-bounds", "sd", wording.Params{
			"path": "sd", "lo": 0.0, "hi": float64(record.GreatestReading), "got": record.Num(q.SD).String()})
	}
	return nil
}

func (g *GoNoGo) refuse(code string, params wording.Params) {
	g.Reason, g.ReasonCode, g.ReasonParams = wording.Say(code, params).Message, code, params
}

// trial is what a mean of the readings comes to.
type trial struct {
	mean    float64
	outcome verdict.Outcome
	offset  float64 // of the value from the middle of the limit; infinite or NaN where it has none
	no      *refusal
}

// scan goes over the means that readings can have and collects the spans of
// equal outcome.
func (g *GoNoGo) scan(e *evaluation, q GoNoGoRequest) {
	at := func(mean float64) trial { return e.expect(mean, q.N, q.SD) }
	lo, hi := e.ownRange()
	first := at(max(goNoGoStep, lo-mostCorrection))
	end := min(record.GreatestReading, hi+mostCorrection)
	begin, last, why := first.mean, first, first.no
	step := func(next trial) {
		if next.no != nil && (why == nil || next.no.code != "verdict-stopped") {
			why = next.no
		}
		if next.outcome != last.outcome {
			below, above := edge(at, last, next, func(t trial) bool { return t.outcome == last.outcome })
			g.add(e.own, last.outcome, begin, below.mean)
			begin = above.mean
		}
		last = next
	}
	for mean := first.mean + goNoGoStep; mean <= end; mean += goNoGoStep {
		next := at(mean)
		// A narrow limit may be crossed within one step.
		if last.offset < 0 && next.offset > 0 {
			middle, _ := edge(at, last, next, func(t trial) bool { return t.offset < 0 })
			step(middle)
		}
		step(next)
	}
	g.add(e.own, last.outcome, begin, end)
	if len(g.Conforms)+len(g.DoesNotConform)+len(g.NotProven) == 0 && why != nil {
		g.refuse(why.code, why.params)
	}
}

// edge halves the distance between a mean that is still of a kind and one that
// is not, until they are as good as one.
func edge(at func(float64) trial, lo, hi trial, still func(trial) bool) (below, above trial) {
	for hi.mean-lo.mean > goNoGoEdge {
		if middle := at((lo.mean + hi.mean) / 2); still(middle) {
			lo = middle
		} else {
			hi = middle
		}
	}
	return lo, hi
}

// add adds a span. Of two spans that conform, which only the seam between two
// ways of comparing can part, the wider one stands, and the other counts as not
// proven.
func (g *GoNoGo) add(s scale.Scale, outcome verdict.Outcome, lo, hi float64) {
	span := []float64{lo, hi}
	switch outcome {
	case verdict.Conforms:
		if len(g.Conforms) > 0 && hi-lo <= g.Conforms[1]-g.Conforms[0] {
			g.NotProven = append(g.NotProven, span)
			return
		}
		if len(g.Conforms) > 0 {
			g.NotProven = append(g.NotProven, g.Conforms)
		}
		g.Conforms, g.ShownConforms = span, []string{s.QuoteUp(lo), s.QuoteDown(hi)}
	case verdict.DoesNotConform:
		g.DoesNotConform = append(g.DoesNotConform, span)
		g.ShownDoesNotConform = append(g.ShownDoesNotConform, []string{s.QuoteUp(lo), s.QuoteDown(hi)})
	case verdict.NotProven:
		g.NotProven = append(g.NotProven, span)
	}
}

// expect is what n readings of a mean and a standard deviation would come to,
// for an evaluation that has been prepared.
func (e *evaluation) expect(mean float64, n int, sd float64) trial {
	other := *e
	other.terms = slices.Clone(e.terms)
	other.sheet.Findings = slices.Clone(e.sheet.Findings)
	other.summary = stats.Summary{N: n, Mean: mean, SD: sd}
	if n == 1 {
		other.summary.SD = math.NaN() // one reading has no scatter to be known by
	}
	other.locate()
	t := trial{mean: mean, outcome: verdict.CannotSay, offset: math.NaN()}
	c, no := other.compare(*e.record.Limit)
	if t.no = no; no == nil {
		t.outcome = c.Decide().Outcome
		t.offset = c.Value - (c.Band.Min+c.Band.Max)/2
	}
	return t
}
