// Package record is what the inspector wrote down about one spot: its types,
// its JSON, and what makes it valid.
package record

import (
	"math"
	"strconv"

	"strikebook/convert/device"
	"strikebook/convert/owncurve"
	"strikebook/convert/scale"
	"strikebook/convert/verdict"
)

// Version is the version of records that this edition reads and writes.
const Version = 1

// Record is what was written down about one spot. Only V and Readings must be
// there; a record may be evaluated while it is still being filled in.
type Record struct {
	V     int    `json:"v"`               // version of this layout, 1
	ID    string `json:"id,omitempty"`    // told apart from other records by it; the core does not read it
	Label string `json:"label,omitempty"` // the spot: "Shell course 2, 3 o'clock"
	Job   string `json:"job,omitempty"`   // the job it belongs to
	Taken string `json:"taken,omitempty"` // when, RFC 3339
	By    string `json:"by,omitempty"`    // who
	Notes string `json:"notes,omitempty"` // anything else
	Zone  Zone   `json:"zone,omitempty"`  // the part of a weld

	PositionMm *float64 `json:"position_mm,omitempty"` // along a traverse, from any point that the whole traverse is measured from

	Device    string           `json:"device,omitempty"`    // key of the impact device; "" for a direct method
	Serial    string           `json:"serial,omitempty"`    // of the instrument
	Direction device.Direction `json:"direction,omitempty"` // of impact; down unless told
	Scale     scale.Key        `json:"scale,omitempty"`     // what the readings are in; the device's unless told
	Group     string           `json:"group,omitempty"`     // key of the metal group; "" while it is not chosen

	Readings []Reading       `json:"readings"`        // in the order they were taken, struck ones too
	Piece    *device.Piece   `json:"piece,omitempty"` // the test piece
	Block    *Block          `json:"block,omitempty"` // the check on a test block
	Limit    *verdict.Limit  `json:"limit,omitempty"` // what the spot has to meet
	Curve    *owncurve.Curve `json:"curve,omitempty"` // own curve or anchor as fitCurve gave it, or only what it is made of

	// PermissibleError is how far the instrument may read wrong to either side, in
	// the record's scale, where no block check says how far it does; 12 HL unless told.
	PermissibleError *float64 `json:"permissible_error,omitempty"`

	Confidence float64 `json:"confidence,omitempty"` // of the expanded uncertainty, 0.5 to 0.999; 0.95 unless told
}

// DefaultConfidence is the confidence of a record that names none.
const DefaultConfidence = 0.95

// The confidences a record may ask for.
const (
	LeastConfidence    = 0.5
	GreatestConfidence = 0.999
)

// Zone is the part of a weld a spot lies in.
type Zone string

// The zones.
const (
	Base  Zone = "base"
	HAZ   Zone = "haz"
	Weld  Zone = "weld"
	Other Zone = "other"
)

// Reading is one reading. A struck one stays in the record and out of the mean.
type Reading struct {
	Value  Number `json:"value"`            // in the record's scale
	Struck string `json:"struck,omitempty"` // why it was struck; "" if it counts
}

// Counts reports whether the reading is a number that enters the mean.
func (r Reading) Counts() bool { return r.Struck == "" && r.Value.Valid() }

// GreatestReading is the greatest number that is taken for a reading. ISO
// 16859-1 defines HL = 1000 v_R/v_I, so that a Leeb reading cannot exceed it,
// and no metal that is served here exceeds it in another scale.
const GreatestReading = 1000

// Valid reports whether the number can be a reading at all.
func (n Number) Valid() bool {
	return n.Value > 0 && n.Value <= GreatestReading // false for NaN
}

// Block is a check on a hardness test block.
type Block struct {
	Certified *float64 `json:"certified,omitempty"`  // in the record's scale
	ExpandedU *float64 `json:"expanded_u,omitempty"` // of the certified value, with a coverage factor of 2
	Readings  []Number `json:"readings,omitempty"`   // on the block, in the record's scale
	Tolerance *float64 `json:"tolerance,omitempty"`  // of their mean, to either side of the certified value; 6 HL unless told
	Taken     string   `json:"taken,omitempty"`      // when, RFC 3339
	Use       BlockUse `json:"use,omitempty"`        // what the offset is used for; uncertainty unless told
}

// BlockUse says what the offset that a block check finds is used for. It is
// never both.
type BlockUse string

// The uses of an offset.
const (
	AsUncertainty BlockUse = "uncertainty" // it widens the uncertainty
	AsCorrection  BlockUse = "correction"  // the mean is corrected for it
)

// Normalized returns the record with what it leaves open filled in: the scale
// of its device or the device of its scale, the direction, the confidence.
func (r Record) Normalized() Record {
	if r.Scale == "" {
		if d, ok := device.ByKey(r.Device); ok {
			r.Scale = scale.Key(d.Scale)
		}
	}
	if r.Device == "" {
		if d, ok := device.ByScale(string(r.Scale)); ok {
			r.Device = d.Key
		}
	}
	if r.Direction == "" {
		r.Direction = device.Down
	}
	if r.Confidence == 0 {
		r.Confidence = DefaultConfidence
	}
	if r.Readings == nil {
		r.Readings = []Reading{}
	}
	return r
}

// Counting returns the values that enter the mean, and the position of each in
// the record's readings.
func (r Record) Counting() (values []float64, positions []int) {
	for i, reading := range r.Readings {
		if reading.Counts() {
			values = append(values, reading.Value.Value)
			positions = append(positions, i)
		}
	}
	return values, positions
}

// Number is a number as it was typed. Text that is no number is kept, so that
// nothing typed is lost; Value is NaN then.
//
//contract:ts number | string | null
type Number struct {
	Value float64
	Text  string // only where Value is NaN
}

// Num makes a Number of a float.
func Num(v float64) Number { return Number{Value: v} }

// String is the number as it is quoted in a sentence.
func (n Number) String() string {
	switch {
	case !n.isText():
		return strconv.FormatFloat(n.Value, 'g', -1, 64)
	case n.Text != "":
		return shorten(n.Text)
	}
	return "empty"
}

func (n Number) isText() bool { return math.IsNaN(n.Value) || math.IsInf(n.Value, 0) }
