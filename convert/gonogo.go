package convert

import (
	"math"

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

// scan goes over the means that readings can have and collects the spans of
// equal outcome.
func (g *GoNoGo) scan(e *evaluation, q GoNoGoRequest) {
	at := func(mean float64) (verdict.Outcome, *refusal) { return e.expect(mean, q.N, q.SD) }
	lo, hi := e.ownRange()
	begin := max(goNoGoStep, lo-mostCorrection)
	end := min(record.GreatestReading, hi+mostCorrection)
	from, last := at(begin)
	for mean := begin + goNoGoStep; mean <= end; mean += goNoGoStep {
		outcome, no := at(mean)
		if no != nil && (last == nil || no.code != "verdict-stopped") {
			last = no
		}
		if outcome != from {
			below, above := edge(at, from, mean-goNoGoStep, mean)
			g.add(e.own, from, begin, below)
			from, begin = outcome, above
		}
	}
	g.add(e.own, from, begin, end)
	if len(g.Conforms)+len(g.DoesNotConform)+len(g.NotProven) == 0 && last != nil {
		g.refuse(last.code, last.params)
	}
}

// edge halves the distance between a mean of the outcome from and one of
// another, until they are as good as one.
func edge(at func(float64) (verdict.Outcome, *refusal), from verdict.Outcome, lo, hi float64) (below, above float64) {
	for hi-lo > goNoGoEdge {
		middle := (lo + hi) / 2
		if outcome, _ := at(middle); outcome == from {
			lo = middle
		} else {
			hi = middle
		}
	}
	return lo, hi
}

// add adds a span. Of two spans that conform, which only the seam between two
// ways of comparing can part, the wider one stands.
func (g *GoNoGo) add(s scale.Scale, outcome verdict.Outcome, lo, hi float64) {
	span := []float64{lo, hi}
	shown := []string{s.QuoteUp(lo), s.QuoteDown(hi)}
	switch outcome {
	case verdict.Conforms:
		if len(g.Conforms) == 0 || hi-lo > g.Conforms[1]-g.Conforms[0] {
			g.Conforms, g.ShownConforms = span, shown
		}
	case verdict.DoesNotConform:
		g.DoesNotConform = append(g.DoesNotConform, span)
		g.ShownDoesNotConform = append(g.ShownDoesNotConform, shown)
	case verdict.NotProven:
		g.NotProven = append(g.NotProven, span)
	}
}

// expect is the outcome that n readings of a mean and a standard deviation
// would have, for an evaluation that has been prepared.
func (e *evaluation) expect(mean float64, n int, sd float64) (verdict.Outcome, *refusal) {
	trial := *e
	trial.terms = append([]stats.Term(nil), e.terms...)
	trial.sheet.Findings = append([]Finding(nil), e.sheet.Findings...)
	trial.summary = stats.Summary{N: n, Mean: mean, SD: sd, StandardError: sd / math.Sqrt(float64(n))}
	trial.locate()
	c, no := trial.compare(*e.record.Limit)
	if no != nil {
		return verdict.CannotSay, no
	}
	return c.Decide().Outcome, nil
}
