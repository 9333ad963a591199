// Package convert evaluates what was written down about a spot: from the
// readings to their mean, from the mean to every scale that is valid for the
// metal, each with its uncertainty and its sources. It is pure: no files, no
// clock, no screen; the same record and edition give the same sheet.
package convert

import (
	"errors"
	"math"
	"slices"
	"strconv"

	"strikebook/convert/curve"
	"strikebook/convert/device"
	"strikebook/convert/edition"
	"strikebook/convert/metal"
	"strikebook/convert/record"
	"strikebook/convert/scale"
	"strikebook/convert/stats"
	"strikebook/convert/wording"
)

// Edition names the data and methods. It changes whenever a sheet could.
const Edition = edition.Current

// ISO 16859-1, from memory: check your edition.
const (
	leastReadings    = 3   // readings to a mean
	allowedSpread    = 5.0 // percent of the mean that the readings may spread over,
	readingsIfSpread = 10  // unless there are this many
)

// Evaluate evaluates a record. An error says that the record is invalid (see
// record.Validate); whatever is wrong with the measurement is a finding.
func Evaluate(r record.Record) (Sheet, error) {
	if err := r.Validate(); err != nil {
		return Sheet{}, err
	}
	return newEvaluation(r.Normalized()).run(), nil
}

// evaluation is a sheet in the making.
type evaluation struct {
	record  record.Record
	device  device.Device // zero where none is chosen, or none took part
	group   metal.Group   // zero where none is chosen
	own     scale.Scale   // what the readings are in; zero where unknown
	summary stats.Summary
	mean    float64      // corrected; NaN where there is none
	terms   []stats.Term // uncertainty of the mean as a reading

	legs  []scale.Leg // from HV to the other scales of the metal
	first *firstLeg   // from the readings to HV; nil where there is none
	side  Status      // where the mean lies: OK inside the ranges of device and metal
	hv    float64     // what the mean stands for; NaN where there is none

	curve  *ownLeg // of the user's own; nil where there is none that may be used
	value  float64 // what the mean stands for by it, in the scale that it leads to
	placed bool    // whether the mean lies inside the first leg

	inLimit *stats.Uncertainty // of the value in the limit's scale, once the rows are written

	brief bool // only what a row of a book shows: no sentences, and no more scales than it has
	sheet Sheet
}

func newEvaluation(r record.Record) *evaluation {
	e := &evaluation{record: r, mean: math.NaN(), hv: math.NaN(), side: OK}
	e.own, _ = scale.ByKey(r.Scale)
	e.group, _ = metal.ByKey(r.Group)
	if e.own.Leeb {
		e.device, _ = device.ByScale(string(e.own.Key))
	}
	e.sheet = Sheet{
		Edition:  Edition,
		Scale:    r.Scale,
		Devices:  []DeviceFit{},
		Readings: Readings{Suspect: []int{}},
		Scales:   []Row{},
		Findings: []Finding{},
	}
	return e
}

// run evaluates a record from beginning to end.
func (e *evaluation) run() Sheet {
	e.prepare()
	e.summarize()
	e.locate()
	e.convert()
	e.judge()
	return e.sheet
}

// find adds a finding.
func (e *evaluation) find(code, field string, params wording.Params) {
	if e.brief {
		e.sheet.Findings = append(e.sheet.Findings, Finding{Code: code, Level: wording.KindOf(code)})
		return
	}
	s := wording.Say(code, params)
	e.sheet.Findings = append(e.sheet.Findings, Finding{
		Code: code, Level: s.Kind, Field: field, Message: s.Message, Remedy: s.Remedy, Params: params, Source: s.Source,
	})
}

// stopped reports whether a finding forbids converted values.
func (e *evaluation) stopped() bool { return e.stoppedBut(nil) }

// stoppedBut is stopped for other findings than these.
func (e *evaluation) stoppedBut(codes []string) bool { return stoppedIn(e.sheet.Findings, codes) }

func stoppedIn(findings []Finding, but []string) bool {
	return slices.ContainsFunc(findings, func(f Finding) bool {
		return f.Level == wording.Stop && !slices.Contains(but, f.Code)
	})
}

// prepare does what can be done before the first reading: whether the spot may
// be tested, what the instrument is worth, and what leads from reading to HV.
func (e *evaluation) prepare() {
	e.checkPiece()
	e.findOwnCurve()
	e.checkBlock()
	if e.own.Key == "" {
		e.find("no-device", "device", wording.Params{})
	}
	e.findLegs()
}

// locate leads from the readings' mean to the hardness it stands for.
func (e *evaluation) locate() {
	e.budgetReadings()
	e.correct()
	e.place()
}

// summarize describes the readings, and judges them as a set.
func (e *evaluation) summarize() {
	for i, reading := range e.record.Readings {
		if reading.Struck != "" {
			e.sheet.Readings.Struck++
			continue
		}
		if !reading.Value.Valid() {
			e.find("not-a-reading", field("readings", i), wording.Params{
				"number": float64(i + 1), "text": reading.Value.String(), "highest": float64(record.GreatestReading)})
		}
	}
	values, positions := e.record.Counting()
	e.summary = stats.Summarize(values)
	s := &e.sheet.Readings
	s.N = e.summary.N
	s.Mean, s.SD = number(e.summary.Mean), number(e.summary.SD)
	s.Min, s.Max = number(e.summary.Min), number(e.summary.Max)
	percent := e.summary.Range / e.summary.Mean * 100
	s.Range, s.RangePercent = number(e.summary.Range), number(percent)
	if s.N > 0 && e.own.Key != "" {
		s.ShownMean = e.own.Notation(e.own.Quote(e.summary.Mean), e.own.Key)
	}
	if s.SD != nil {
		s.ShownSD = strconv.FormatFloat(*s.SD, 'f', e.own.Decimals+1, 64)
	}
	e.judgeReadings(values, positions, percent)
}

func (e *evaluation) judgeReadings(values []float64, positions []int, percent float64) {
	n := e.summary.N
	if n < leastReadings {
		e.find("too-few-readings", "readings", wording.Params{
			"n": float64(n), "least": float64(leastReadings), "more": float64(leastReadings - n)})
	}
	if percent > allowedSpread && n < readingsIfSpread {
		e.find("spread-too-wide", "readings", wording.Params{
			"percent": percent, "limit": allowedSpread, "n": float64(n),
			"least": float64(readingsIfSpread), "more": float64(readingsIfSpread - n)})
	}
	if outlier := stats.Grubbs(values, e.own.DisplayStep); outlier.Suspect {
		at := positions[outlier.Index]
		e.sheet.Readings.Suspect = []int{at}
		e.find("suspect-reading", field("readings", at), wording.Params{
			"number": float64(at + 1), "value": values[outlier.Index], "g": outlier.G, "critical": outlier.Critical})
	}
}

// addTerms adds terms to the uncertainty of the mean as a reading, in its scale.
func (e *evaluation) addTerms(terms ...stats.Term) {
	for _, t := range terms {
		t.Scale, t.Sensitivity = string(e.own.Key), 1
		e.terms = append(e.terms, t)
	}
}

// budgetReadings sets up what the readings leave in doubt about their mean.
func (e *evaluation) budgetReadings() {
	if e.summary.N == 0 {
		return
	}
	instrument := e.terms
	e.terms = nil
	e.addTerms(e.repeatability(), stats.Term{
		Name: "resolution", Standard: stats.Rectangular(e.own.DisplayStep / 2), DoF: stats.Infinite, Distribution: stats.Uniform,
		Source: "Half the step of a usual display, rectangular (common practice, no source)",
	})
	e.terms = append(e.terms, instrument...)
}

// repeatability is the uncertainty of the mean from the scatter of the
// readings. Fewer than three say too little about their scatter (two equal ones
// would seem certain), so that the spread ISO 16859-1 allows is assumed, unless
// theirs is larger.
func (e *evaluation) repeatability() stats.Term {
	n := e.summary.N
	measured := stats.RepeatabilityTerm(n, e.summary.SD)
	if n >= leastReadings {
		return measured
	}
	assumed := stats.Rectangular(allowedSpread/100*e.summary.Mean/2) / math.Sqrt(float64(n))
	if measured.Standard > assumed { // false for NaN
		return measured
	}
	return stats.Term{
		Name: stats.Repeatability, Standard: assumed, DoF: stats.Infinite, Distribution: stats.Uniform,
		Source: "Assumed: readings anywhere within the spread of 5 % that ISO 16859-1 allows, from memory",
	}
}

// correct brings the mean to what it would be vertically down.
func (e *evaluation) correct() {
	if e.summary.N == 0 {
		return
	}
	mean := e.summary.Mean
	if direction := e.record.Direction; e.own.Leeb && direction.NeedsCorrection() {
		if !e.device.Corrects() {
			e.find("no-direction-correction", "direction", wording.Params{"device": e.device.Key})
			return
		}
		add, ok := device.Correction(direction, mean)
		if !ok {
			lo, hi := device.CorrectionRange()
			e.find("direction-outside-table", "direction", wording.Params{
				"lo": lo, "hi": hi, "scale": e.device.Scale, "mean": mean})
			return
		}
		e.sheet.Corrected.Direction = add
		mean += add
	}
	e.budgetDirection()
	mean += e.sheet.Corrected.Block
	e.mean = mean
	e.sheet.Corrected.Mean = number(mean)
}

const (
	// What a tabulated direction correction may be wrong by, to either side: half
	// its rounding step, and a share for a probe held some degrees off (estimate).
	correctionStep  = 1.0
	correctionShare = 0.2
	// What an instrument that compensates the direction itself may be wrong by, to
	// either side, HL (estimate).
	compensationError = 2.0
)

// budgetDirection sets up what the correction for the direction leaves in doubt.
func (e *evaluation) budgetDirection() {
	half, source := 0.0, ""
	switch {
	case !e.own.Leeb:
	case e.record.Direction == device.Compensated:
		half, source = compensationError, "Compensation by the instrument, rectangular: engineering estimate"
	case e.sheet.Corrected.Direction != 0:
		half = correctionStep/2 + correctionShare*math.Abs(e.sheet.Corrected.Direction)
		source = "Half a step and a fifth of the tabulated correction, rectangular: engineering estimate"
	}
	if half > 0 {
		e.addTerms(stats.Term{
			Name: "direction", Standard: stats.Rectangular(half), DoF: stats.Infinite, Distribution: stats.Uniform, Source: source,
		})
	}
}

// findLegs finds what leads from the readings to HV on the metal, and from HV
// to its other scales.
func (e *evaluation) findLegs() {
	if e.group.Key == "" {
		e.find("no-metal", "group", wording.Params{})
		return
	}
	e.legs = scale.Legs(e.group)
	if e.own.Key != "" {
		e.first = e.findFirstLeg()
	}
}

// place finds the hardness that the mean stands for.
func (e *evaluation) place() {
	if math.IsNaN(e.mean) {
		return
	}
	if d := e.device; d.Key != "" && (e.mean < d.Lo || e.mean > d.Hi) {
		e.side = sideOf(e.mean > d.Hi)
		e.find("outside-device-range", "readings", wording.Params{
			"mean": e.mean, "scale": d.Scale, "device": d.Key, "lo": d.Lo, "hi": d.Hi})
		return
	}
	if lo, hi := e.ownRange(); e.own.Key != "" && (e.mean < lo || e.mean > hi) {
		e.side = sideOf(e.mean > hi)
		e.findOutside(&curve.OutsideError{Value: e.mean, Lo: lo, Hi: hi})
		return
	}
	switch {
	case e.first == nil:
		return
	case e.curve != nil:
		e.placeByOwnCurve()
		return
	}
	hv, err := e.first.At(e.mean)
	if outside := (*curve.OutsideError)(nil); errors.As(err, &outside) {
		e.side = sideOf(outside.Above())
		e.findOutside(outside)
		return
	}
	e.hv, e.placed = hv, true
}

// ownRange is the range of the scale the readings are in. Where the scale has
// no end of its own, that of any reading is its end.
func (e *evaluation) ownRange() (lo, hi float64) {
	return e.own.Lo, min(e.own.Hi, record.GreatestReading)
}

func sideOf(above bool) Status {
	if above {
		return Above
	}
	return Below
}

func (e *evaluation) findOutside(outside *curve.OutsideError) {
	params := wording.Params{"mean": e.mean, "scale": string(e.own.Key), "lo": outside.Lo, "hi": outside.Hi}
	code := "outside-scale-range"
	if e.first != nil && (e.own.Leeb || e.own.Key == scale.HV) {
		code = "outside-metal-range"
		params["lo"], params["hi"], params["metal"] = e.group.Lo, e.group.Hi, e.group.Name
	}
	e.find(code, "readings", params)
}

func field(list string, i int) string { return list + "[" + strconv.Itoa(i) + "]" }
