// Package verdict compares a value and its uncertainty with a limit, by a
// decision rule: JCGM 106 and ISO 14253-1.
package verdict

import (
	"math"
	"slices"

	"strikebook/convert/scale"
	"strikebook/convert/stats"
)

// Limit is what a spot has to meet, as it was written down.
type Limit struct {
	Scale scale.Key `json:"scale"`
	Min   *float64  `json:"min,omitempty"` // null: none
	Max   *float64  `json:"max,omitempty"` // null: none
	Rule  Rule      `json:"rule,omitempty"`
}

// Rule is a decision rule.
type Rule string

// The decision rules.
const (
	Guarded    Rule = "guarded"      // proven only outside the expanded uncertainty, ISO 14253-1; the default
	Simple     Rule = "simple"       // the value alone decides
	OneSided95 Rule = "one-sided-95" // proven at 95 % on the side of the limit
)

// Rules returns the decision rules, the default first.
func Rules() []Rule { return []Rule{Guarded, OneSided95, Simple} }

// Outcome is what a comparison comes to.
type Outcome string

// The outcomes.
const (
	Conforms       Outcome = "conforms"
	DoesNotConform Outcome = "does-not-conform"
	NotProven      Outcome = "not-proven"
	CannotSay      Outcome = "cannot-say" // there is nothing that could be compared
	NoLimit        Outcome = "no-limit"
)

// Band is what conforms: from Min to Max, both included; an open side is infinite.
type Band struct{ Min, Max float64 }

// Band is the band of a limit, in its scale.
func (l Limit) Band() Band {
	b := Band{math.Inf(-1), math.Inf(1)}
	if l.Min != nil {
		b.Min = *l.Min
	}
	if l.Max != nil {
		b.Max = *l.Max
	}
	return b
}

// Comparison is a value set against a band, in the same scale.
type Comparison struct {
	Band       Band
	Rule       Rule // "" means Guarded
	Value      float64
	Terms      []stats.Term // the uncertainty of Value, and of Band
	Confidence float64      // of the expanded uncertainty
}

// Decision is a comparison decided.
type Decision struct {
	Outcome     Outcome
	Probability float64 // of conformity, JCGM 106
	Guard       float64 // what has to lie between the value and a limit for a proof
	Uncertainty stats.Uncertainty
}

// Decide decides a comparison.
func (c Comparison) Decide() Decision { return c.DecideWith(stats.Combine(c.Terms, c.Confidence)) }

// DecideWith decides a comparison whose terms have been combined.
func (c Comparison) DecideWith(u stats.Uncertainty) Decision {
	d := Decision{Guard: c.guard(u), Uncertainty: u}
	d.Outcome = c.Band.Outcome(c.Value, d.Guard)
	d.Probability = min(1, max(0, u.CDF(c.Band.Max-c.Value)-u.CDF(c.Band.Min-c.Value)))
	return d
}

// guard is the width of the guard band that the rule asks for.
func (c Comparison) guard(u stats.Uncertainty) float64 {
	switch c.Rule {
	case Simple:
		return 0
	case OneSided95:
		const twoSided = 0.90 // leaves 5 % on either side
		return stats.Combine(c.Terms, twoSided).Expanded
	}
	return u.Expanded
}

// Outcome sets a value with a guard on either side against the band.
func (b Band) Outcome(value, guard float64) Outcome {
	switch {
	case value-guard >= b.Min && value+guard <= b.Max:
		return Conforms
	case value+guard < b.Min || value-guard > b.Max:
		return DoesNotConform
	}
	return NotProven
}

// MostReadings is the greatest number of readings that is ever advised: more
// impressions than that have no room at a spot (common practice, no source).
const MostReadings = 30

// ReadingsFor returns with how many readings of the same mean and scatter (sd,
// in the reading's scale) the guard would be at most wanted: the least number
// that is at least from. ok is false where no number up to MostReadings would
// do; best is then the guard that so many would reach.
func (c Comparison) ReadingsFor(wanted, sd float64, from int) (n int, best float64, ok bool) {
	if from > MostReadings {
		return 0, c.Decide().Guard, false
	}
	// The guard shrinks as the readings grow more, so that the most come first.
	if best = c.withReadings(MostReadings, sd).Decide().Guard; best > wanted {
		return 0, best, false
	}
	for n = from; n <= MostReadings; n++ {
		best = c.withReadings(n, sd).Decide().Guard
		if best <= wanted {
			return n, best, true
		}
	}
	return 0, best, false
}

// withReadings is the comparison as n readings of the same mean would make it.
func (c Comparison) withReadings(n int, sd float64) Comparison {
	c.Terms = slices.Clone(c.Terms)
	for i, t := range c.Terms {
		if t.Name == stats.Repeatability {
			measured := stats.RepeatabilityTerm(n, sd)
			measured.Scale, measured.Sensitivity = t.Scale, t.Sensitivity
			c.Terms[i] = measured
		}
	}
	return c
}
