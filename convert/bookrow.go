package convert

import (
	"slices"

	"strikebook/convert/record"
	"strikebook/convert/scale"
	"strikebook/convert/stats"
	"strikebook/convert/verdict"
	"strikebook/convert/wording"
)

// BookRow is a record and its sheet as far as a list of spots shows them, and as
// a summary needs them. A number that does not exist is null.
type BookRow struct {
	ID       string      `json:"id"`
	Label    string      `json:"label"`
	Job      string      `json:"job"`
	Zone     record.Zone `json:"zone,omitempty"` // left out where it is not stated
	Position *float64    `json:"position"`       // along a traverse, mm
	Device   string      `json:"device"`
	Scale    scale.Key   `json:"scale"` // what the readings are in
	Group    string      `json:"group"`

	N         int      `json:"n"`      // readings that count
	Struck    int      `json:"struck"` // readings that were struck
	Mean      *float64 `json:"mean"`   // of the readings, in Scale
	SD        *float64 `json:"sd"`
	Corrected *float64 `json:"corrected"` // the mean corrected; null also where a finding says that nothing was measured
	ShownMean string   `json:"shownMean"`

	Values []BookValue `json:"values"` // in the limit's scale, then in HV, as far as the sheet has them; in Scale where it has neither; the first is the one to show

	Outcome     verdict.Outcome `json:"outcome"`     // "cannot-say" where Error stands
	Probability *float64        `json:"probability"` // of conformity
	ShownChance string          `json:"shownChance"` // in percent
	Margin      *float64        `json:"margin"`      // from the nearer bound of the limit to the value, in expanded uncertainties; less than nothing outside
	LimitScale  scale.Key       `json:"limitScale"`  // of the limit as it was written down, "" without one, and so are the next two
	LimitMin    *float64        `json:"limitMin"`
	LimitMax    *float64        `json:"limitMax"`

	Findings []string       `json:"findings"`        // their codes, in the order of the job
	Level    wording.Kind   `json:"level,omitempty"` // the gravest of them: stop, warn or note; left out without findings
	Error    *wording.Error `json:"error"`           // why the record could not be evaluated; null if it could
}

// BookValue is a value of a spot in one scale.
type BookValue struct {
	Scale    scale.Key `json:"scale"`
	Value    float64   `json:"value"`
	Expanded float64   `json:"expanded"` // expanded uncertainty
	Low      float64   `json:"low"`
	High     float64   `json:"high"`

	Shown         string `json:"shown"`         // "326 HBW (HLD)"
	ShownExpanded string `json:"shownExpanded"` // "24"
	ShownLow      string `json:"shownLow"`
	ShownHigh     string `json:"shownHigh"`
}

// bookScales are the scales that the row of a record has its values in: the
// limit's and HV, and where the spot has no value in either, that of the
// readings; "" where that is one of them.
func bookScales(r record.Record) (wanted []scale.Key, otherwise scale.Key) {
	wanted = []scale.Key{scale.HV}
	if l := r.Limit; l != nil && l.Scale != scale.HV && l.Scale != "" {
		wanted = []scale.Key{l.Scale, scale.HV}
	}
	if !slices.Contains(wanted, r.Scale) {
		otherwise = r.Scale
	}
	return wanted, otherwise
}

// newBookRow makes the row of a record and its sheet, or of what could not be
// evaluated.
func newBookRow(r record.Record, s Sheet, refused *wording.Error) BookRow {
	r = r.Normalized()
	row := BookRow{
		ID: r.ID, Label: r.Label, Job: r.Job, Zone: r.Zone, Position: r.PositionMm,
		Device: r.Device, Scale: s.Scale, Group: r.Group,
		N: s.Readings.N, Struck: s.Readings.Struck, Mean: s.Readings.Mean, SD: s.Readings.SD, ShownMean: s.Readings.ShownMean,
		Values: []BookValue{}, Findings: []string{},
	}
	if refused != nil {
		row.Outcome, row.Error = verdict.CannotSay, refused
		return row
	}
	for _, f := range s.Findings {
		row.Findings = append(row.Findings, f.Code)
		if graver(f.Level, row.Level) {
			row.Level = f.Level
		}
	}
	if l := r.Limit; l != nil {
		row.LimitScale, row.LimitMin, row.LimitMax = l.Scale, l.Min, l.Max
	}
	if !stoppedIn(s.Findings, conversionOnly) {
		row.Corrected = s.Corrected.Mean
		wanted, otherwise := bookScales(r)
		for _, key := range wanted {
			row.addValue(s, key)
		}
		if len(row.Values) == 0 {
			row.addValue(s, otherwise)
		}
	}
	v := s.Verdict
	row.Outcome, row.Probability, row.ShownChance, row.Margin = v.Outcome, v.Probability, v.ShownChance, margin(v)
	return row
}

// addValue adds the value in a scale, if the sheet has one.
func (row *BookRow) addValue(s Sheet, key scale.Key) {
	for _, r := range s.Scales {
		if r.Scale == key && r.Status == OK {
			row.Values = append(row.Values, BookValue{
				Scale: key, Value: *r.Value, Expanded: *r.Expanded, Low: *r.Low, High: *r.High,
				Shown: r.Shown, ShownExpanded: r.ShownExpanded, ShownLow: r.ShownLow, ShownHigh: r.ShownHigh,
			})
		}
	}
}

// in is the row's value in a scale, if it has one.
func (row *BookRow) in(key scale.Key) (v BookValue, ok bool) {
	i := slices.IndexFunc(row.Values, func(v BookValue) bool { return v.Scale == key })
	if i < 0 {
		return v, false
	}
	return row.Values[i], true
}

// summary is what an analysis of variance needs of the readings.
func (row *BookRow) summary() stats.Summary {
	s := stats.Summary{N: row.N, Mean: *row.Corrected}
	if row.SD != nil {
		s.SD = *row.SD
	}
	return s
}

// graver reports whether a finding of one level is graver than one of another.
func graver(a, b wording.Kind) bool {
	order := []wording.Kind{wording.Note, wording.Warn, wording.Stop}
	return slices.Index(order, a) > slices.Index(order, b)
}

// margin is how far the value lies inside the limit, in expanded uncertainties.
func margin(v Verdict) *float64 {
	if v.Value == nil || v.Min == nil && v.Max == nil {
		return nil
	}
	var least *float64
	for _, inside := range []*float64{less(v.Value, v.Min), less(v.Max, v.Value)} {
		if inside != nil && (least == nil || *inside < *least) {
			least = inside
		}
	}
	if *v.Expanded > 0 {
		*least /= *v.Expanded
	}
	return least
}

// less is a-b; nil where either is.
func less(a, b *float64) *float64 {
	if a == nil || b == nil {
		return nil
	}
	d := *a - *b
	return &d
}
