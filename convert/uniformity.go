package convert

import (
	"math"
	"strconv"

	"strikebook/convert/scale"
	"strikebook/convert/stats"
	"strikebook/convert/wording"
)

// Uniformity says whether the spots differ by more than the readings at a spot
// scatter: a one-way analysis of variance of the corrected readings.
type Uniformity struct {
	Outcome UniformityOutcome `json:"outcome"`
	F       *float64          `json:"F"`  // null where the spots could not be compared
	DF      []int             `json:"df"` // between the spots, and within them; [] where they could not be compared
	P       *float64          `json:"p"`  // the probability of so great an F if all spots were alike

	Spots   int       `json:"spots"`   // how many were compared: the largest set in one scale and metal
	LeftOut int       `json:"leftOut"` // how many others have readings
	Scale   scale.Key `json:"scale"`   // of the readings compared
	Group   string    `json:"group"`   // their metal; "" where it is not chosen
	Between *float64  `json:"between"` // mean square between the spots, and
	Within  *float64  `json:"within"`  // within them; null where there is none
	Mean    *float64  `json:"mean"`    // of all readings compared
	Min     *float64  `json:"min"`     // the least and
	Max     *float64  `json:"max"`     // the greatest mean of a spot

	ShownF string `json:"shownF"` // "1.18"
	ShownP string `json:"shownP"` // "0.35", "< 0.001"

	Sentence string   `json:"sentence"` // with its meaning for the part, or why the spots cannot be compared
	Note     string   `json:"note"`     // what was left out; "" where nothing was
	Said     []Saying `json:"said"`     // both by their codes; the parts are "sentence" and "note"
}

// UniformityOutcome is what a comparison of spots comes to.
type UniformityOutcome string

// The outcomes.
const (
	Even     UniformityOutcome = "even"      // no difference shows
	Uneven   UniformityOutcome = "uneven"    // the spots differ
	NotKnown UniformityOutcome = "not-known" // there is nothing to compare
)

// uniformityLevel is the significance level at which spots differ.
const uniformityLevel = 0.05

func (u *Uniformity) say(part, code string, params wording.Params) {
	text := wording.Say(code, params).Message
	if part == "note" {
		u.Note = text
	} else {
		u.Sentence = text
	}
	u.Said = append(u.Said, Saying{Part: part, Code: code, Params: params})
}

// compareSpots compares the largest set of spots whose readings are in one scale
// on one metal.
func compareSpots(rows []BookRow) Uniformity {
	type set struct {
		scale scale.Key
		group string
	}
	sets := map[set][]stats.Summary{}
	all := 0
	var largest set
	for i := range rows {
		row := &rows[i]
		if row.Corrected == nil {
			continue
		}
		all++
		of := set{row.Scale, row.Group}
		sets[of] = append(sets[of], row.summary())
		if len(sets[of]) > len(sets[largest]) {
			largest = of
		}
	}
	spots := sets[largest]
	u := Uniformity{
		Outcome: NotKnown, DF: []int{}, Said: []Saying{},
		Spots: len(spots), LeftOut: all - len(spots), Scale: largest.scale, Group: largest.group,
	}
	u.analyze(spots)
	if u.LeftOut > 0 {
		u.say("note", "spots-left-out", wording.Params{"n": float64(u.LeftOut), "all": float64(all)})
	}
	return u
}

func (u *Uniformity) analyze(spots []stats.Summary) {
	a := stats.Analyze(spots)
	u.Between, u.Within, u.Mean = number(a.Between), number(a.Within), number(a.GrandMean)
	for _, spot := range spots {
		if u.Min == nil || spot.Mean < *u.Min {
			u.Min = number(spot.Mean)
		}
		if u.Max == nil || spot.Mean > *u.Max {
			u.Max = number(spot.Mean)
		}
	}
	switch {
	case a.Groups < 2:
		u.say("sentence", "spots-too-few", wording.Params{})
		return
	case math.IsNaN(a.Within):
		u.say("sentence", "spots-single", wording.Params{})
		return
	case math.IsNaN(a.F):
		u.say("sentence", "spots-no-scatter", wording.Params{})
		return
	}
	u.F, u.P, u.DF = &a.F, &a.P, []int{a.BetweenDoF, a.WithinDoF}
	u.ShownF, u.ShownP = strconv.FormatFloat(a.F, 'f', 2, 64), shownP(a.P)
	s, _ := scale.ByKey(u.Scale)
	code := "spots-even"
	u.Outcome = Even
	if a.P < uniformityLevel {
		code = "spots-uneven"
		u.Outcome = Uneven
	}
	p := u.ShownP
	if p[0] != '<' {
		p = "= " + p
	}
	u.say("sentence", code, wording.Params{
		"spots": float64(a.Groups), "lo": s.Quote(*u.Min), "hi": s.Notation(s.Quote(*u.Max), u.Scale), "f": u.ShownF, "p": p})
}

// shownP writes a probability with two digits, and never as 0 or on the wrong
// side of the significance level.
func shownP(p float64) string {
	switch {
	case p < 0.001:
		return "< 0.001"
	case p < 0.1:
		return strconv.FormatFloat(math.Floor(p*1000)/1000, 'f', 3, 64)
	}
	return strconv.FormatFloat(p, 'f', 2, 64)
}
