package convert

import (
	"math"

	"strikebook/convert/record"
	"strikebook/convert/scale"
	"strikebook/convert/verdict"
	"strikebook/convert/wording"
)

// MoreReadingsRequest is a record with the expanded uncertainty that is wanted
// of one of its scales.
type MoreReadingsRequest struct {
	record.Record
	Wanted Wanted `json:"wanted"`
}

// Wanted is the expanded uncertainty that is wanted in a scale.
type Wanted struct {
	Scale    scale.Key `json:"scale"`
	Expanded float64   `json:"expanded"` // in the scale
}

// MoreReadings says how many readings a wanted uncertainty takes, if their mean
// and scatter stay.
type MoreReadings struct {
	Reachable bool           `json:"reachable"` // whether any number of readings would do
	N         int            `json:"n"`         // how many in all; 0 unless reachable
	More      int            `json:"more"`      // how many of them are still to be taken
	Expanded  *float64       `json:"expanded"`  // what it is now; null where the scale has no value
	Best      *float64       `json:"best"`      // what N readings reach, or verdict.MostReadings if that is not enough
	Sentence  string         `json:"sentence"`
	Code      string         `json:"code"`
	Params    wording.Params `json:"params"`
}

func (m *MoreReadings) say(code string, params wording.Params) {
	m.Sentence, m.Code, m.Params = wording.Say(code, params).Message, code, params
}

// FindMoreReadings finds how many readings a wanted uncertainty takes. An error
// says that the request is invalid.
func FindMoreReadings(q MoreReadingsRequest) (MoreReadings, error) {
	if err := q.Validate(); err != nil {
		return MoreReadings{}, err
	}
	s, ok := scale.ByKey(q.Wanted.Scale)
	if !ok {
		return MoreReadings{}, wording.NewError("unknown-choice", "wanted.scale", wording.Params{
			"path": "wanted.scale", "got": string(q.Wanted.Scale), "choices": "the scales of the sheet"})
	}
	if !(q.Wanted.Expanded > 0 && q.Wanted.Expanded <= greatestLimit) {
		return MoreReadings{}, wording.NewError("out-of-bounds", "wanted.expanded", wording.Params{
			"path": "wanted.expanded", "lo": 0.0, "hi": greatestLimit, "got": record.Num(q.Wanted.Expanded).String()})
	}
	e := newEvaluation(q.Normalized())
	e.prepare()
	e.summarize()
	e.locate()
	return e.moreReadings(s, q.Wanted.Expanded), nil
}

func (e *evaluation) moreReadings(s scale.Scale, wanted float64) MoreReadings {
	var m MoreReadings
	open := verdict.Limit{Scale: s.Key} // nothing to compare with: only the uncertainty counts
	c, no := e.compare(open)
	if e.summary.N == 0 || no != nil || c.through {
		m.say("more-no-value", wording.Params{"scale": string(s.Key)})
		return m
	}
	n := e.summary.N
	m.Expanded = number(c.Decide().Guard)
	if *m.Expanded <= wanted {
		m.Reachable, m.N, m.Best = true, n, m.Expanded
		m.say("more-enough", wording.Params{"scale": string(s.Key), "expanded": s.QuoteUp(*m.Expanded)})
		return m
	}
	enough, best, ok := c.ReadingsFor(wanted, e.scatter(), max(n+1, leastReadings))
	m.Best = &best
	if !ok {
		largest, percent := largestTerm(c.Decide())
		m.say("more-never", wording.Params{
			"scale": string(s.Key), "most": float64(max(n, verdict.MostReadings)), "best": s.QuoteUp(best),
			"term": largest, "percent": math.Round(percent)})
		return m
	}
	m.Reachable, m.N, m.More = true, enough, enough-n
	m.say("more-needed", wording.Params{"n": float64(enough), "more": float64(enough - n), "scale": string(s.Key), "best": s.QuoteUp(best)})
	return m
}
