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
	"strikebook/convert/verdict"
	"strikebook/convert/wording"
)

const (
	// MaxReadings is how many readings a record may hold.
	MaxReadings = 1000
	// maxText is how many characters a text may hold.
	maxText = 2000
)

// Validate says what makes the record unreadable: an unknown key, a time that
// is none, a text without end. It answers a *wording.Error that names the first
// such field, or nil. What is merely wrong with the measurement is for the
// findings of the evaluation, not for here.
func (r Record) Validate() error {
	for _, check := range []func() error{r.checkChoices, r.checkScale, r.checkTexts, r.checkReadings, r.checkTimes, r.checkConfidence} {
		if err := check(); err != nil {
			return err
		}
	}
	if r.Curve != nil {
		return r.Curve.Check("curve.")
	}
	return nil
}

func (r Record) checkChoices() error {
	if err := oneOf("zone", r.Zone, Base, HAZ, Weld, Other); err != nil {
		return err
	}
	// The lists are only made for the sentence that shows them.
	if _, ok := device.ByKey(r.Device); !ok && r.Device != "" {
		if err := oneOf("device", r.Device, keys(device.All(), func(d device.Device) string { return d.Key })...); err != nil {
			return err
		}
	}
	if err := oneOf("direction", r.Direction, device.Directions()...); err != nil {
		return err
	}
	if _, ok := metal.ByKey(r.Group); !ok && r.Group != "" {
		if err := oneOf("group", r.Group, keys(metal.All(), func(g metal.Group) string { return g.Key })...); err != nil {
			return err
		}
	}
	if s, _ := scale.ByKey(r.Scale); r.Scale != "" && !s.Leeb && !s.Direct() {
		if err := oneOf("scale", r.Scale, readable()...); err != nil {
			return err
		}
	}
	if p := r.Piece; p != nil {
		if err := oneOf("piece.support", p.Support, device.Free, device.Supported, device.Coupled); err != nil {
			return err
		}
		if p.Shape != nil {
			if err := oneOf("piece.shape.kind", p.Shape.Kind, device.Plate, device.Pipe, device.Bar, device.NoShape); err != nil {
				return err
			}
		}
	}
	if b := r.Block; b != nil {
		if err := oneOf("block.use", b.Use, AsUncertainty, AsCorrection); err != nil {
			return err
		}
	}
	if l := r.Limit; l != nil {
		if err := oneOf("limit.rule", l.Rule, verdict.Rules()...); err != nil {
			return err
		}
		if _, ok := scale.ByKey(l.Scale); !ok && l.Scale != "" {
			return oneOf("limit.scale", l.Scale, limitable()...)
		}
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
	for _, t := range [...]struct{ path, text string }{
		{"id", r.ID}, {"label", r.Label}, {"job", r.Job}, {"by", r.By}, {"notes", r.Notes}, {"serial", r.Serial}, {"taken", r.Taken},
	} {
		if tooLong(t.text) {
			return textError(t.path, t.text)
		}
	}
	for i, reading := range r.Readings {
		if tooLong(reading.Struck) {
			return textError(fmt.Sprintf("readings[%d].struck", i), reading.Struck)
		}
		if tooLong(reading.Value.Text) {
			return textError(fmt.Sprintf("readings[%d].value", i), reading.Value.Text)
		}
	}
	for i, n := range r.blockReadings() {
		if tooLong(n.Text) {
			return textError(fmt.Sprintf("block.readings[%d]", i), n.Text)
		}
	}
	return nil
}

func tooLong(text string) bool { return len(text) > maxText && utf8.RuneCountInString(text) > maxText }

func textError(path, text string) error {
	return wording.NewError("text-too-long", path, wording.Params{"path": path, "n": utf8.RuneCountInString(text), "limit": maxText})
}

func (r Record) checkReadings() error {
	for _, list := range []struct {
		path string
		n    int
	}{{"readings", len(r.Readings)}, {"block.readings", len(r.blockReadings())}} {
		if list.n > MaxReadings {
			return wording.NewError("too-many-readings", list.path, wording.Params{"path": list.path, "n": list.n, "limit": MaxReadings})
		}
	}
	return nil
}

func (r Record) blockReadings() []Number {
	if r.Block == nil {
		return nil
	}
	return r.Block.Readings
}

func (r Record) checkTimes() error {
	times := []struct{ path, text string }{{"taken", r.Taken}}
	if r.Block != nil {
		times = append(times, struct{ path, text string }{"block.taken", r.Block.Taken})
	}
	for _, t := range times {
		if _, ok := parseTime(t.text); !ok && t.text != "" {
			return wording.NewError("not-a-time", t.path, wording.Params{"path": t.path, "got": shorten(t.text)})
		}
	}
	return nil
}

// TakenAt returns when the readings were taken; ok is false where that is not
// written down.
func (r Record) TakenAt() (at time.Time, ok bool) { return parseTime(r.Taken) }

// SinceBlock returns how long after the check on the block the readings were
// taken; less than nothing if before. ok is false where either time is not
// written down.
func (r Record) SinceBlock() (d time.Duration, ok bool) {
	if r.Block == nil {
		return 0, false
	}
	checked, ok1 := parseTime(r.Block.Taken)
	taken, ok2 := parseTime(r.Taken)
	return taken.Sub(checked), ok1 && ok2
}

func (r Record) checkConfidence() error {
	c := r.Confidence
	if c == 0 || c >= LeastConfidence && c <= GreatestConfidence {
		return nil
	}
	return wording.NewError("out-of-bounds", "confidence", wording.Params{
		"path": "confidence", "lo": LeastConfidence, "hi": GreatestConfidence, "got": Num(c).String()})
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
	rest := text[len(layout):]
	if fraction, ok := strings.CutPrefix(rest, "."); ok {
		rest = strings.TrimLeft(fraction, "0123456789")
		if rest == fraction {
			return time.Time{}, false
		}
	}
	zone, ok := parseZone(rest)
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
