package owncurve

import (
	"errors"
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"
	"time"
	"unicode/utf8"

	"strikebook/convert/device"
	"strikebook/convert/metal"
	"strikebook/convert/scale"
	"strikebook/convert/strict"
	"strikebook/convert/wording"
)

const (
	mostAnchors  = 4 // more pairs make a curve of their own
	leastOwn     = mostAnchors + 1
	leastTable   = 2
	mostPairs    = 200
	mostText     = 2000   // characters
	mostValue    = 5000.0 // above every value of every scale served here
	mostHL       = 1000.0 // HL = 1000 v_R/v_I, ISO 16859-1
	leastShare   = 1e-6   // an uncertainty below this share of its quantity is none
	mostPercent  = 50.0
	leastPercent = 0.01
	leastTaken   = 3 // readings that a pair's uncertainty can be computed from
	mostTaken    = 100
)

// MaxBytes is the size of the largest curve that is read, in bytes of JSON.
const MaxBytes = 256 << 10

// Decode reads a curve from JSON. What came of it is read and not looked at. An
// error is a *wording.Error that names the field and the remedy.
func Decode(data []byte) (Definition, error) {
	if len(data) > MaxBytes {
		return Definition{}, wording.NewError("curve-too-large", "", wording.Params{"limit": float64(MaxBytes)})
	}
	var c Curve
	if err := strict.Unmarshal(data, &c); err != nil {
		var e *strict.Error
		if !errors.As(err, &e) {
			return Definition{}, err
		}
		shown := wording.Params{"path": shorten(e.Path), "want": e.Want, "got": shorten(e.Got)}
		if e.Path == "" {
			shown["path"] = "curve"
		}
		code := "wrong-type"
		switch e.Problem {
		case strict.Syntax:
			code = "curve-not-json"
		case strict.Duplicate:
			code = "duplicate-field"
		case strict.Unknown:
			code = "curve-unknown-field"
		}
		return Definition{}, wording.NewError(code, e.Path, shown)
	}
	return c.Definition, nil
}

// shorten keeps a sentence readable whatever it has to quote.
func shorten(text string) string {
	const most = 60
	if runes := []rune(text); len(runes) > most {
		return string(runes[:most]) + "…"
	}
	return text
}

// Check says what makes a definition one that nothing can be fitted to. prefix
// stands before each path. An error is a *wording.Error that names the first such
// field.
func (d Definition) Check(prefix string) error {
	c := checker{prefix, d.filled()}
	for _, check := range []func() error{c.choices, c.texts, c.number, c.eachPair, c.kind} {
		if err := check(); err != nil {
			return err
		}
	}
	return nil
}

// checker checks a definition, with what it leaves open filled in, that stands
// behind a prefix.
type checker struct {
	prefix string
	Definition
}

// fault makes an error at a field.
func (c *checker) fault(code, field string, params wording.Params) error {
	if params == nil {
		params = wording.Params{}
	}
	params["path"] = c.prefix + field
	return wording.NewError(code, c.prefix+field, params)
}

// within refuses a number outside bounds, or that is none.
func (c *checker) within(field string, got, lo, hi float64) error {
	if got >= lo && got <= hi {
		return nil
	}
	return c.fault("out-of-bounds", field, wording.Params{"lo": lo, "hi": hi, "got": strconv.FormatFloat(got, 'g', -1, 64)})
}

// oneOf refuses what is none of the choices.
func (c *checker) oneOf(field, got string, choices []string) error {
	if slices.Contains(choices, got) {
		return nil
	}
	return c.fault("unknown-choice", field, wording.Params{"got": shorten(strconv.Quote(got)), "choices": strings.Join(choices, ", ")})
}

func (c *checker) choices() error {
	var devices, groups []string
	for _, d := range device.All() {
		devices = append(devices, d.Key)
	}
	for _, g := range metal.All() {
		groups = append(groups, g.Key)
	}
	if err := c.oneOf("device", c.Device, devices); err != nil {
		return err
	}
	if err := c.oneOf("group", c.Group, groups); err != nil {
		return err
	}
	g, _ := metal.ByKey(c.Group)
	scales := []string{string(scale.HV)}
	for _, leg := range scale.Legs(g) {
		scales = append(scales, string(leg.Scale.Key))
	}
	if _, known := scale.ByKey(c.Scale); known && !slices.Contains(scales, string(c.Scale)) {
		return c.fault("curve-scale", "scale", wording.Params{
			"scale": string(c.Scale), "metal": g.Name, "choices": strings.Join(scales, ", ")})
	}
	if err := c.oneOf("scale", string(c.Scale), scales); err != nil {
		return err
	}
	return c.oneOf("kind", string(c.Kind), []string{string(Anchor), string(Own), string(Table)})
}

func (c *checker) texts() error {
	type text struct{ field, text string }
	texts := []text{{"name", c.Name}, {"source", c.Source}, {"serial", c.Serial}, {"edition", c.Edition}}
	dates := []text{{"date", c.Date}}
	for i := range c.Pairs {
		p := &c.Pairs[i]
		texts = append(texts, text{inPair(i, "label"), p.Label})
		dates = append(dates, text{inPair(i, "date"), p.Date})
	}
	for _, t := range texts {
		if n := utf8.RuneCountInString(t.text); n > mostText {
			return c.fault("text-too-long", t.field, wording.Params{"n": n, "limit": mostText})
		}
	}
	for _, t := range dates {
		if _, ok := parseDate(t.text); !ok && t.text != "" {
			return c.fault("not-a-date", t.field, wording.Params{"got": shorten(t.text)})
		}
	}
	return nil
}

func inPair(i int, field string) string { return fmt.Sprintf("pairs[%d].%s", i, field) }

// number checks that there are as many pairs as the kind takes.
func (c *checker) number() error {
	n := len(c.Pairs)
	params := wording.Params{"n": float64(n), "least": float64(leastOwn), "most": float64(mostAnchors)}
	switch {
	case n == 0:
		return c.fault("pairs-none", "pairs", nil)
	case n > mostPairs:
		return c.fault("pairs-too-many", "pairs", wording.Params{"n": float64(n), "most": float64(mostPairs)})
	case c.Kind == Anchor && n > mostAnchors:
		return c.fault("anchor-many-pairs", "kind", params)
	case c.Kind == Own && n < leastOwn:
		return c.fault("own-few-pairs", "kind", params)
	case c.Kind == Table && n < leastTable:
		return c.fault("table-few-points", "pairs", wording.Params{"n": float64(n), "least": float64(leastTable)})
	}
	return nil
}

// pairs checks each pair by itself.
func (c *checker) eachPair() error {
	body, _ := device.ByKey(c.Device)
	lo, hi := body.Lo, body.Hi
	if c.Kind == Table {
		lo, hi = 1, mostHL // what lies outside the device's range is not used
	}
	s, _ := scale.ByKey(c.Scale)
	for i := range c.Pairs {
		p := &c.Pairs[i]
		for j, r := range p.Readings {
			if err := c.within(fmt.Sprintf("pairs[%d].readings[%d]", i, j), r, 1, mostHL); err != nil {
				return err
			}
		}
		if n := len(p.Readings); n > 0 {
			if err := c.count(inPair(i, "readings"), n); err != nil {
				return err
			}
		}
		if err := c.within(inPair(i, "hl"), p.HL, lo, hi); err != nil {
			return err
		}
		if err := c.within(inPair(i, "value"), p.Value, max(1, s.Lo), min(s.Hi, mostValue)); err != nil {
			return err
		}
		if c.Kind == Table {
			continue
		}
		if err := c.within(inPair(i, "u_hl"), p.UHL, 0, p.HL); err != nil {
			return err
		}
		if err := c.within(inPair(i, "u_value"), p.UValue, 0, p.Value); err != nil {
			return err
		}
		if p.UHL < leastShare*p.HL && p.UValue < leastShare*p.Value {
			return c.fault("pair-certain", inPair(i, "u_value"), wording.Params{"pair": float64(i + 1)})
		}
	}
	return nil
}

func (c *checker) count(field string, n int) error {
	if n < leastTaken || n > mostTaken {
		return c.fault("pair-readings", field, wording.Params{"n": float64(n), "least": float64(leastTaken), "most": float64(mostTaken)})
	}
	return nil
}

// kind checks what only one kind of curve asks of its pairs.
func (c *checker) kind() error {
	switch c.Kind {
	case Anchor:
		if body, _ := device.ByKey(c.Device); !body.BuiltInCurve {
			return c.fault("anchor-no-model", "kind", wording.Params{"device": c.Device, "least": float64(leastOwn)})
		}
		return nil
	case Own:
		return c.spread()
	}
	if err := c.within("u_percent", c.UPercent, leastPercent, mostPercent); err != nil {
		return err
	}
	if strings.TrimSpace(c.Source) == "" {
		return c.fault("table-no-source", "source", nil)
	}
	order := byReading(c.Pairs)
	for n, i := range order[1:] {
		before, p := &c.Pairs[order[n]], &c.Pairs[i]
		if !(p.HL > before.HL && p.Value > before.Value) {
			return c.fault("table-not-rising", inPair(i, "value"), wording.Params{
				"hl": p.HL, "value": p.Value, "beforeHL": before.HL, "before": before.Value, "scale": string(c.Scale)})
		}
	}
	return nil
}

// spread checks that the pairs of an own curve stand at different places.
func (c *checker) spread() error {
	hls, values := map[float64]bool{}, map[float64]bool{}
	for i := range c.Pairs {
		p := &c.Pairs[i]
		hls[p.HL], values[p.Value] = true, true
	}
	const leastPlaces = 3
	switch {
	case len(values) == 1:
		return c.fault("pairs-one-value", "pairs", wording.Params{"value": c.Pairs[0].Value, "scale": string(c.Scale)})
	case len(hls) < leastPlaces:
		return c.fault("pairs-few-places", "pairs", wording.Params{"n": float64(len(hls)), "least": float64(leastPlaces)})
	}
	return nil
}

// byReading returns the positions of the pairs in the order of their readings.
// Equal definitions in another order come to the very same.
func byReading(pairs []Pair) []int {
	order := make([]int, len(pairs))
	for n := range order { // they are few, and a sort of the library's costs 5 kB
		at := n
		for ; at > 0 && pairs[n].before(&pairs[order[at-1]]); at-- {
			order[at] = order[at-1]
		}
		order[at] = n
	}
	return order
}

func (p *Pair) before(q *Pair) bool {
	switch {
	case p.HL != q.HL:
		return p.HL < q.HL
	case p.Value != q.Value:
		return p.Value < q.Value
	case p.UHL != q.UHL:
		return p.UHL < q.UHL
	}
	return p.UValue < q.UValue
}

// parseDate reads a date such as 2026-12-01.
func parseDate(text string) (time.Time, bool) {
	const layout = "0000-00-00"
	if len(text) != len(layout) {
		return time.Time{}, false
	}
	var parts [3]int // year, month, day
	part := 0
	for i := range layout {
		switch c := text[i]; {
		case layout[i] != '0':
			if c != layout[i] {
				return time.Time{}, false
			}
			part++
		case c < '0' || c > '9':
			return time.Time{}, false
		default:
			parts[part] = parts[part]*10 + int(c-'0')
		}
	}
	t := time.Date(parts[0], time.Month(parts[1]), parts[2], 0, 0, 0, 0, time.UTC)
	return t, t.Month() == time.Month(parts[1]) && t.Day() == parts[2] // else such a date does not exist
}

// Oldest returns when the oldest of the pairs was taken. ok is false where none
// has a date.
func (d Definition) Oldest() (oldest time.Time, ok bool) {
	for _, p := range d.Pairs {
		text := p.Date
		if text == "" {
			text = d.Date
		}
		if t, dated := parseDate(text); dated && (!ok || t.Before(oldest)) {
			oldest, ok = t, true
		}
	}
	return oldest, ok
}

// Label is what a sentence calls the curve.
func (d Definition) Label() string {
	for _, text := range []string{d.Name, d.Source} {
		if text != "" {
			return shorten(text)
		}
	}
	return "–" // a dash is nothing in every language
}

// finite reports whether every number is one.
func finite(numbers ...float64) bool {
	return !slices.ContainsFunc(numbers, func(v float64) bool { return math.IsNaN(v) || math.IsInf(v, 0) })
}
