package record

import (
	"fmt"
	"strconv"
	"strings"
	"time"
	"unicode/utf8"

	"strikebook/convert/device"
	"strikebook/convert/metal"
	"strikebook/convert/scale"
	"strikebook/convert/wording"
)

const (
	// MaxReadings is how many readings a record may hold.
	MaxReadings = 1000
	// maxText is how many characters a text may hold.
	maxText = 2000
)

var curveNotServed = wording.NewError("curve-not-served", "curve", nil)

// Validate says what makes the record unreadable: an unknown key, a time that
// is none, a text without end. It answers a *wording.Error that names the first
// such field, or nil. What is merely wrong with the measurement is for the
// findings of the evaluation, not for here.
func (r Record) Validate() error {
	for _, check := range []func() error{r.checkChoices, r.checkScale, r.checkTexts, r.checkReadings, r.checkTime, r.checkConfidence} {
		if err := check(); err != nil {
			return err
		}
	}
	if r.Curve != nil {
		return curveNotServed
	}
	return nil
}

func (r Record) checkChoices() error {
	if err := oneOf("zone", r.Zone, Base, HAZ, Weld, Other); err != nil {
		return err
	}
	if err := oneOf("device", r.Device, keys(device.All(), func(d device.Device) string { return d.Key })...); err != nil {
		return err
	}
	if err := oneOf("direction", r.Direction, device.Directions()...); err != nil {
		return err
	}
	if err := oneOf("group", r.Group, keys(metal.All(), func(g metal.Group) string { return g.Key })...); err != nil {
		return err
	}
	if err := oneOf("scale", r.Scale, readable()...); err != nil {
		return err
	}
	if p := r.Piece; p != nil {
		if err := oneOf("piece.support", p.Support, Free, Supported, Coupled); err != nil {
			return err
		}
		if p.Shape != nil {
			if err := oneOf("piece.shape.kind", p.Shape.Kind, Plate, Pipe, Bar, NoShape); err != nil {
				return err
			}
		}
	}
	if l := r.Limit; l != nil {
		if err := oneOf("limit.rule", l.Rule, Guarded, Simple, OneSided95); err != nil {
			return err
		}
		return oneOf("limit.scale", l.Scale, limitable()...)
	}
	return nil
}

// readable returns the scales that readings can be in.
func readable() []scale.Key {
	all := keys(device.All(), func(d device.Device) scale.Key { return scale.Key(d.Scale) })
	for _, s := range scale.Converted() {
		if s.Direct() {
			all = append(all, s.Key)
		}
	}
	return all
}

// limitable returns the scales that a limit can be in.
func limitable() []scale.Key {
	all := keys(device.All(), func(d device.Device) scale.Key { return scale.Key(d.Scale) })
	return append(all, keys(scale.Converted(), func(s scale.Scale) scale.Key { return s.Key })...)
}

func keys[T any, K ~string](all []T, key func(T) K) []K {
	list := make([]K, len(all))
	for i, one := range all {
		list[i] = key(one)
	}
	return list
}

// oneOf accepts a field that is left open or holds one of the choices.
func oneOf[K ~string](path string, got K, choices ...K) error {
	if got == "" {
		return nil
	}
	names := make([]string, len(choices))
	for i, choice := range choices {
		if got == choice {
			return nil
		}
		names[i] = string(choice)
	}
	return wording.NewError("unknown-choice", path, wording.Params{
		"path": path, "got": shorten(string(got)), "choices": strings.Join(names, ", ")})
}

func (r Record) checkScale() error {
	d, ok := device.ByKey(r.Device)
	if !ok || r.Scale == "" || string(r.Scale) == d.Scale {
		return nil
	}
	if s, _ := scale.ByKey(r.Scale); !s.Leeb {
		return nil // a direct method: the device took no part
	}
	return wording.NewError("scale-mismatch", "scale", wording.Params{
		"scale": string(r.Scale), "device": d.Key, "want": d.Scale})
}

func (r Record) checkTexts() error {
	texts := []struct{ path, text string }{
		{"id", r.ID}, {"label", r.Label}, {"job", r.Job}, {"by", r.By}, {"notes", r.Notes}, {"serial", r.Serial},
	}
	for i, reading := range r.Readings {
		texts = append(texts,
			struct{ path, text string }{fmt.Sprintf("readings[%d].struck", i), reading.Struck},
			struct{ path, text string }{fmt.Sprintf("readings[%d].value", i), reading.Value.Text})
	}
	for _, t := range texts {
		if n := utf8.RuneCountInString(t.text); n > maxText {
			return wording.NewError("text-too-long", t.path, wording.Params{"path": t.path, "n": n, "limit": maxText})
		}
	}
	return nil
}

func (r Record) checkReadings() error {
	if n := len(r.Readings); n > MaxReadings {
		return wording.NewError("too-many-readings", "readings", wording.Params{"n": n, "limit": MaxReadings})
	}
	return nil
}

func (r Record) checkTime() error {
	if r.Taken == "" {
		return nil
	}
	if _, ok := parseTime(r.Taken); !ok {
		return wording.NewError("not-a-time", "taken", wording.Params{"path": "taken", "got": shorten(r.Taken)})
	}
	return nil
}

func (r Record) checkConfidence() error {
	c := r.Confidence
	if c == 0 || c >= LeastConfidence && c <= GreatestConfidence {
		return nil
	}
	return wording.NewError("out-of-bounds", "confidence", wording.Params{
		"path": "confidence", "lo": LeastConfidence, "hi": GreatestConfidence, "got": c})
}

// parseTime reads a time of RFC 3339, such as 2026-12-01T09:30:00Z or
// 2026-12-01T10:30:00+01:00. The library's own parser brings the time zones of
// the whole world along, a fortieth of what a phone has to load.
func parseTime(text string) (time.Time, bool) {
	const layout = "0000-00-00T00:00:00"
	if len(text) <= len(layout) {
		return time.Time{}, false
	}
	var parts [6]int // year, month, day, hour, minute, second
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
	zone, ok := parseZone(strings.TrimLeft(text[len(layout):], ".0123456789"))
	t := time.Date(parts[0], time.Month(parts[1]), parts[2], parts[3], parts[4], parts[5], 0, time.UTC)
	// A date that does not exist, such as 31 February, comes back as another.
	exists := t.Month() == time.Month(parts[1]) && t.Day() == parts[2] && t.Hour() == parts[3] && t.Minute() == parts[4]
	return t.Add(-zone), ok && exists
}

// parseZone reads "Z", or the offset from it: "+01:00".
func parseZone(text string) (time.Duration, bool) {
	if text == "Z" {
		return 0, true
	}
	if len(text) != len("+00:00") || text[0] != '+' && text[0] != '-' || text[3] != ':' {
		return 0, false
	}
	hours, err1 := strconv.ParseUint(text[1:3], 10, 8)
	minutes, err2 := strconv.ParseUint(text[4:], 10, 8)
	offset := time.Duration(hours)*time.Hour + time.Duration(minutes)*time.Minute
	if text[0] == '-' {
		offset = -offset
	}
	return offset, err1 == nil && err2 == nil && hours < 24 && minutes < 60
}
