// Package scale holds the hardness scales, how a value is rounded and written
// in each, and the second leg of every conversion: from Vickers hardness to
// the other scales of the same metal, by published tables.
package scale

import (
	_ "embed"
	"math"
	"strconv"
	"strings"

	"strikebook/convert/device"
	"strikebook/convert/table"
)

// Key names a scale as it is written behind a value: "HLD", "HV", "HBW", ...
//
//contract:ts string
type Key string

// The scales that readings can be converted to.
const (
	HV  Key = "HV"
	HBW Key = "HBW"
	HRC Key = "HRC"
	HRB Key = "HRB"
	HRA Key = "HRA"
	HRF Key = "HRF"
	HS  Key = "HS"
	Rm  Key = "Rm" // tensile strength, MPa
)

// Scale is how values of one scale are bounded and written.
type Scale struct {
	Key         Key
	Name        string  // English
	Decimals    int     // places of a quoted value
	Step        float64 // a quoted value is a multiple of it
	Lo, Hi      float64 // the scale's own range; infinite where the conversion sets it
	DisplayStep float64 // step of the display that a reading is taken from
	Leeb        bool    // whether it is a rebound scale
}

//go:embed scales.csv
var scalesFile []byte

var scalesTable = table.MustRead("scales.csv", scalesFile)

var converted = readScales(scalesTable)

func readScales(t table.Table) []Scale {
	var all []Scale
	for _, row := range t.Rows {
		s := Scale{
			Key:         Key(row.Text("key")),
			Name:        row.Text("name"),
			Decimals:    int(row.Number("decimals")),
			Step:        row.Number("step"),
			Lo:          row.Number("min"),
			Hi:          row.Number("max"),
			DisplayStep: row.Number("display_step"),
		}
		if math.IsNaN(s.Lo) {
			s.Lo = 0
		}
		if math.IsNaN(s.Hi) {
			s.Hi = math.Inf(1)
		}
		all = append(all, s)
	}
	return all
}

// Source names where the scales' ranges come from.
func Source() string { return scalesTable.Source }

// Converted returns the scales that readings can be converted to, in the order
// they are shown.
func Converted() []Scale { return append([]Scale(nil), converted...) }

// ByKey finds a scale: one of the converted ones or the scale of a device,
// whose range is the device's.
func ByKey(key Key) (Scale, bool) {
	for _, s := range converted {
		if s.Key == key {
			return s, true
		}
	}
	if d, ok := device.ByScale(string(key)); ok {
		return Scale{
			Key: key, Name: "Leeb hardness, device " + d.Key, Step: 1,
			Lo: d.Lo, Hi: d.Hi, DisplayStep: 1, Leeb: true,
		}, true
	}
	return Scale{}, false
}

// Direct reports whether readings can be taken in the scale by a direct
// portable method, and entered without a first leg.
func (s Scale) Direct() bool {
	switch s.Key {
	case HV, HBW, HRC, HRB:
		return true
	}
	return false
}

// Quote writes a value as it may be quoted, rounded to the scale's step and
// without its unit. Halfway values go away from zero.
func (s Scale) Quote(value float64) string {
	n := s.steps(value)
	return s.format(math.Round(n + math.Copysign(noise(n), n))) // 20.15 is a little less in binary
}

// QuoteUp is Quote rounded up, for uncertainties and upper bounds.
func (s Scale) QuoteUp(value float64) string { return s.format(math.Ceil(s.steps(value))) }

// QuoteDown is Quote rounded down, for lower bounds.
func (s Scale) QuoteDown(value float64) string { return s.format(math.Floor(s.steps(value))) }

// Finer is the scale with one more place, for where the usual ones would hide
// what a sentence is about.
func (s Scale) Finer() Scale {
	s.Decimals++
	s.Step /= 10
	return s
}

// steps is a value in steps of the scale, free of the last bits' noise, which
// must not push a value that stands on a step to the next one.
func (s Scale) steps(value float64) float64 {
	n := value / s.Step
	if near := math.Round(n); math.Abs(n-near) < noise(n) {
		return near
	}
	return n
}

// noise is more than arithmetic adds to a number of steps, and less than
// anyone could read off.
func noise(steps float64) float64 { return 1e-11 * max(1, math.Abs(steps)) }

func (s Scale) format(steps float64) string {
	return strconv.FormatFloat(steps*s.Step+0, 'f', s.Decimals, 64) // + 0: no -0
}

// Notation writes a quoted number with its scale, and in brackets the scale it
// was measured in when that is another: "330 HBW (HLD)", as ASTM practice
// writes a converted value; "570 HLD" as ISO 16859-1 writes a measured one.
func (s Scale) Notation(number string, measured Key) string {
	var b strings.Builder
	if s.Key == Rm {
		b.WriteString("Rm " + number + " MPa")
	} else {
		b.WriteString(number + " " + string(s.Key))
	}
	if s.Key != measured {
		b.WriteString(" (" + string(measured) + ")")
	}
	return b.String()
}
