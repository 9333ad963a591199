package convert

import (
	"math"
	"slices"
	"sort"
	"strconv"
	"strings"

	"strikebook/convert/record"
	"strikebook/convert/scale"
	"strikebook/convert/verdict"
	"strikebook/convert/wording"
)

// Summary is what the rows of a book come to. Rows are named by their position,
// from 0.
type Summary struct {
	N          int           `json:"n"`       // records
	Counts     Counts        `json:"counts"`  // by outcome
	Invalid    []int         `json:"invalid"` // the rows that could not be evaluated, which count as cannot-say
	Scale      scale.Key     `json:"scale"`   // in which the spots are compared: the limit's where every spot with a value has one in it, else HV, else the one of most readings; "" where there is no value at all
	Without    int           `json:"without"` // how many rows have no value in it
	Worst      *int          `json:"worst"`   // the row least likely to conform; null where no row was set against a limit
	ByZone     []ZoneSummary `json:"byZone"`  // in the order base, haz, weld, other, not stated; those with a value
	Uniformity Uniformity    `json:"uniformity"`
	Traverse   Traverse      `json:"traverse"`
}

// Counts says how many rows have an outcome.
type Counts struct {
	Conforms       int `json:"conforms"`
	DoesNotConform int `json:"does-not-conform"`
	NotProven      int `json:"not-proven"`
	CannotSay      int `json:"cannot-say"`
	NoLimit        int `json:"no-limit"`
}

func (c *Counts) add(o verdict.Outcome) {
	switch o {
	case verdict.Conforms:
		c.Conforms++
	case verdict.DoesNotConform:
		c.DoesNotConform++
	case verdict.NotProven:
		c.NotProven++
	case verdict.NoLimit:
		c.NoLimit++
	default:
		c.CannotSay++
	}
}

// ZoneSummary describes the spots of one zone that have a value in Scale.
type ZoneSummary struct {
	Zone  record.Zone `json:"zone,omitempty"` // left out where it is not stated
	Scale scale.Key   `json:"scale"`
	N     int         `json:"n"` // spots
	Mean  float64     `json:"mean"`
	// Expanded is the expanded uncertainty of the mean, as if every spot were wrong
	// to the same side: they share the instrument and the conversion, so that it is
	// the mean of theirs.
	Expanded float64 `json:"expanded"`
	Min      float64 `json:"min"` // the least value,
	MinRow   int     `json:"minRow"`
	Low      float64 `json:"low"` // and what it may be as low as
	Max      float64 `json:"max"` // the greatest value,
	MaxRow   int     `json:"maxRow"`
	High     float64 `json:"high"` // and what it may be as high as

	Shown         string `json:"shown"`         // the mean, "231 HBW (HLD)"
	ShownExpanded string `json:"shownExpanded"` // "14"
	ShownMin      string `json:"shownMin"`      // "218"
	ShownLow      string `json:"shownLow"`
	ShownMax      string `json:"shownMax"`
	ShownHigh     string `json:"shownHigh"`
}

// Traverse is the hardness along a weld. Of a book with several welds, summarize
// the rows of each by themselves.
type Traverse struct {
	Points []TraversePoint `json:"points"` // the rows that state a position, in its order
	Min    *float64        `json:"min"`    // the limit in the summary's scale, where all points have the same; null: none
	Max    *float64        `json:"max"`
	Peak   *int            `json:"peak"` // the row of the hardest spot in the heat-affected zone, with or without a position; null without one

	Sentence string         `json:"sentence"` // names the peak; "" without one
	Code     string         `json:"code"`
	Params   wording.Params `json:"params"`
}

// TraversePoint is a spot on a traverse.
type TraversePoint struct {
	Index    int             `json:"index"`          // of its row
	Position float64         `json:"position"`       // mm
	Zone     record.Zone     `json:"zone,omitempty"` // left out where it is not stated
	Outcome  verdict.Outcome `json:"outcome"`
	Value    *float64        `json:"value"` // in the summary's scale; null where the spot has none, and so are the next two
	Low      *float64        `json:"low"`
	High     *float64        `json:"high"`

	ShownPosition string `json:"shownPosition"` // "12.5"
	Shown         string `json:"shown"`         // "" where there is no value
	ShownExpanded string `json:"shownExpanded"`
}

// SummarizeRows summarizes the rows of a book, or any choice of them.
func SummarizeRows(rows []BookRow) Summary {
	s := Summary{N: len(rows), Invalid: []int{}, Scale: commonScale(rows)}
	for i := range rows {
		row := &rows[i]
		s.Counts.add(row.Outcome)
		if row.Error != nil {
			s.Invalid = append(s.Invalid, i)
		}
		if _, ok := row.in(s.Scale); !ok {
			s.Without++
		}
		if row.Probability != nil && (s.Worst == nil || worse(row, &rows[*s.Worst])) {
			s.Worst = &i
		}
	}
	s.ByZone = summarizeZones(rows, s.Scale)
	s.Uniformity = compareSpots(rows)
	s.Traverse = newTraverse(rows, s.Scale)
	return s
}

// commonScale finds the scale that the spots are compared in.
func commonScale(rows []BookRow) scale.Key {
	var limit scale.Key // of all rows with a value so far; "" where they have none in common
	valued, inLimit := 0, 0
	read := map[scale.Key]int{} // rows with a value, by the scale of their readings
	hv := false
	var most scale.Key
	for i := range rows {
		row := &rows[i]
		if len(row.Values) == 0 {
			continue
		}
		valued++
		if valued == 1 {
			limit = row.LimitScale
		}
		if _, ok := row.in(limit); ok && row.LimitScale == limit {
			inLimit++
		}
		if _, ok := row.in(scale.HV); ok {
			hv = true
		}
		if read[row.Scale]++; most == "" || read[row.Scale] > read[most] {
			most = row.Scale
		}
	}
	switch {
	case valued > 0 && inLimit == valued:
		return limit
	case hv:
		return scale.HV
	}
	return most
}

// worse reports whether a row is less likely to conform than another. Where both
// are as good as certain, the one that is farther out, or not so far in, is worse.
func worse(a, b *BookRow) bool {
	if *a.Probability != *b.Probability {
		return *a.Probability < *b.Probability
	}
	return a.Margin != nil && b.Margin != nil && *a.Margin < *b.Margin
}

// summarizeZones describes each zone that has a value.
func summarizeZones(rows []BookRow, key scale.Key) []ZoneSummary {
	all := []ZoneSummary{}
	s, _ := scale.ByKey(key)
	for _, zone := range []record.Zone{record.Base, record.HAZ, record.Weld, record.Other, ""} {
		z := ZoneSummary{Zone: zone, Scale: key, Min: math.Inf(1), Max: math.Inf(-1)}
		var sum, expanded float64
		var measured []string
		var min, max BookValue
		for i := range rows {
			v, ok := rows[i].in(key)
			if !ok || rows[i].Zone != zone {
				continue
			}
			z.N++
			sum += v.Value
			expanded += v.Expanded
			if own := string(rows[i].Scale); !slices.Contains(measured, own) {
				measured = append(measured, own)
			}
			if v.Value < z.Min {
				z.Min, z.Low, z.MinRow, min = v.Value, v.Low, i, v
			}
			if v.Value > z.Max {
				z.Max, z.High, z.MaxRow, max = v.Value, v.High, i, v
			}
		}
		if z.N == 0 {
			continue
		}
		z.Mean, z.Expanded = sum/float64(z.N), expanded/float64(z.N)
		z.Shown = s.Notation(s.Quote(z.Mean), scale.Key(strings.Join(measured, ", ")))
		z.ShownExpanded = s.QuoteUp(z.Expanded)
		z.ShownMin, z.ShownLow = s.Quote(z.Min), min.ShownLow
		z.ShownMax, z.ShownHigh = s.Quote(z.Max), max.ShownHigh
		all = append(all, z)
	}
	return all
}

// newTraverse lines up the spots that state a position, and finds the hardest
// spot of the heat-affected zone.
func newTraverse(rows []BookRow, key scale.Key) Traverse {
	t := Traverse{Points: []TraversePoint{}, Params: wording.Params{}}
	var peak BookValue
	for i := range rows {
		row := &rows[i]
		v, ok := row.in(key)
		if ok && row.Zone == record.HAZ && (t.Peak == nil || v.Value > peak.Value) {
			t.Peak, peak = &i, v
		}
		if row.Position == nil {
			continue
		}
		p := TraversePoint{
			Index: i, Position: *row.Position, Zone: row.Zone, Outcome: row.Outcome,
			ShownPosition: asTyped(*row.Position),
		}
		if ok {
			p.Value, p.Low, p.High, p.Shown, p.ShownExpanded = &v.Value, &v.Low, &v.High, v.Shown, v.ShownExpanded
		}
		t.Points = append(t.Points, p)
	}
	sort.Stable(byPosition(t.Points))
	t.Min, t.Max = sharedLimit(rows, t.Points, key)
	if t.Peak != nil {
		t.Code = "traverse-peak"
		t.Params = wording.Params{"spot": nameOf(rows, *t.Peak), "shown": peak.Shown, "expanded": peak.ShownExpanded}
		t.Sentence = wording.Say(t.Code, t.Params).Message
	}
	return t
}

// byPosition is sorted by package sort: package slices would compile its own
// sorting for these points alone.
type byPosition []TraversePoint

func (p byPosition) Len() int           { return len(p) }
func (p byPosition) Less(i, j int) bool { return p[i].Position < p[j].Position }
func (p byPosition) Swap(i, j int)      { p[i], p[j] = p[j], p[i] }

// sharedLimit is the limit that all points have, if it stands in a scale.
func sharedLimit(rows []BookRow, points []TraversePoint, key scale.Key) (least, greatest *float64) {
	for i, p := range points {
		row := &rows[p.Index]
		if i == 0 {
			least, greatest = row.LimitMin, row.LimitMax
		}
		if row.LimitScale != key || !alike(row.LimitMin, least) || !alike(row.LimitMax, greatest) {
			return nil, nil
		}
	}
	return least, greatest
}

func alike(a, b *float64) bool { return a == nil && b == nil || a != nil && b != nil && *a == *b }

// nameOf names a spot in a sentence: by its label, else by its number.
func nameOf(rows []BookRow, i int) string {
	if label := strings.TrimSpace(rows[i].Label); label != "" {
		return label
	}
	return "#" + strconv.Itoa(i+1)
}
