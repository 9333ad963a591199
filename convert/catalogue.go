package convert

import (
	"math"

	"strikebook/convert/device"
	"strikebook/convert/metal"
	"strikebook/convert/record"
	"strikebook/convert/scale"
	"strikebook/convert/verdict"
)

// Catalogue is what a record can choose from, each with its source.
type Catalogue struct {
	Edition       string            `json:"edition"`
	RecordVersion int               `json:"recordVersion"`
	Devices       []DeviceChoice    `json:"devices"`
	Directions    []DirectionChoice `json:"directions"`
	Groups        []GroupChoice     `json:"groups"`
	Scales        []ScaleChoice     `json:"scales"`
	Rules         []verdict.Rule    `json:"rules"`  // of decision, the default first
	Limits        []LimitChoice     `json:"limits"` // that published codes name
}

// DeviceChoice is an impact device.
type DeviceChoice struct {
	Key        string             `json:"key"`
	Scale      scale.Key          `json:"scale"`
	Range      []float64          `json:"range"`      // application range, in its scale
	Directions []device.Direction `json:"directions"` // in which it can be used here
	Curve      bool               `json:"curve"`      // whether it has a built-in conversion
	Source     string             `json:"source"`
}

// DirectionChoice is a direction of impact.
type DirectionChoice struct {
	Key    device.Direction `json:"key"`
	Source string           `json:"source"` // of its correction; "" where none is needed
}

// GroupChoice is a metal group.
type GroupChoice struct {
	Key    string      `json:"key"`
	Name   string      `json:"name"`  // English
	Range  []float64   `json:"range"` // of the rebound model, HV
	Scales []scale.Key `json:"scales"`
	Source string      `json:"source"`
}

// ScaleChoice is a scale, of a device or converted to.
type ScaleChoice struct {
	Key      scale.Key `json:"key"`
	Name     string    `json:"name"`     // English
	Min      *float64  `json:"min"`      // null where the conversion sets it
	Max      *float64  `json:"max"`      // null where the conversion sets it
	Decimals int       `json:"decimals"` // places of a quoted value
	Step     float64   `json:"step"`     // a quoted value is a multiple of it
	Leeb     bool      `json:"leeb"`     // whether it is a rebound scale
	Direct   bool      `json:"direct"`   // whether readings of a direct method can be entered in it
	Source   string    `json:"source"`
}

// LimitChoice is a limit that a published code names.
type LimitChoice struct {
	Key    string    `json:"key"`
	Text   string    `json:"text"` // English
	Scale  scale.Key `json:"scale"`
	Min    *float64  `json:"min"` // null: none
	Max    *float64  `json:"max"` // null: none
	Source string    `json:"source"`
}

// NewCatalogue lists what a record can choose from.
func NewCatalogue() Catalogue {
	c := Catalogue{Edition: Edition, RecordVersion: record.Version, Rules: verdict.Rules()}
	for _, d := range device.All() {
		c.Devices = append(c.Devices, DeviceChoice{
			Key: d.Key, Scale: scale.Key(d.Scale), Range: []float64{d.Lo, d.Hi},
			Directions: d.Directions(), Curve: d.BuiltInCurve, Source: device.Source(),
		})
		s, _ := scale.ByKey(scale.Key(d.Scale))
		c.Scales = append(c.Scales, scaleChoice(s, device.Source()))
	}
	for _, d := range device.Directions() {
		choice := DirectionChoice{Key: d}
		if d.NeedsCorrection() {
			choice.Source = device.CorrectionSource()
		}
		c.Directions = append(c.Directions, choice)
	}
	for _, g := range metal.All() {
		choice := GroupChoice{Key: g.Key, Name: g.Name, Range: []float64{g.Lo, g.Hi}, Scales: []scale.Key{scale.HV}, Source: metal.Source()}
		for _, leg := range scale.Legs(g) {
			choice.Scales = append(choice.Scales, leg.Scale.Key)
		}
		c.Groups = append(c.Groups, choice)
	}
	for _, s := range scale.Converted() {
		c.Scales = append(c.Scales, scaleChoice(s, scale.Source()))
	}
	for _, l := range verdict.All() {
		c.Limits = append(c.Limits, LimitChoice{
			Key: l.Key, Text: l.Text, Scale: l.Scale, Min: number(l.Min), Max: number(l.Max), Source: l.Source,
		})
	}
	return c
}

func scaleChoice(s scale.Scale, source string) ScaleChoice {
	choice := ScaleChoice{
		Key: s.Key, Name: s.Name, Decimals: s.Decimals, Step: s.Step, Leeb: s.Leeb, Direct: s.Direct(), Source: source,
	}
	if s.Lo > 0 {
		choice.Min = number(s.Lo)
	}
	if !math.IsInf(s.Hi, 1) {
		choice.Max = number(s.Hi)
	}
	return choice
}
