package convert

import (
	"math"

	"strikebook/convert/device"
	"strikebook/convert/scale"
	"strikebook/convert/stats"
	"strikebook/convert/wording"
)

// Sheet is everything there is to say about one record. Numbers are unrounded;
// the fields whose names begin with "shown" hold the quotable forms. A number
// that does not exist is null, a list is never null.
type Sheet struct {
	Edition     string             `json:"edition"`     // of the data: the same record and edition give the same sheet
	Scale       scale.Key          `json:"scale"`       // what the readings are in; "" while it is not chosen
	Piece       TestPiece          `json:"piece"`       // the test piece
	Devices     []DeviceFit        `json:"devices"`     // every device there is against the test piece
	Block       BlockCheck         `json:"block"`       // the check on a test block
	Readings    Readings           `json:"readings"`    // the readings that count, as they were taken
	Corrected   Corrected          `json:"corrected"`   // their mean, corrected
	Uncertainty *stats.Uncertainty `json:"uncertainty"` // of the mean as a measure of the metal's hardness, in Scale: the readings and the first leg; null without readings
	Scales      []Row              `json:"scales"`      // the reading's own scale first, then every other
	Verdict     Verdict            `json:"verdict"`     // against the limit
	Findings    []Finding          `json:"findings"`    // in the order of the job
}

// BlockCheck is what a check on a test block says of the instrument.
type BlockCheck struct {
	Status    BlockStatus `json:"status"`
	N         int         `json:"n"`         // readings on the block
	Mean      *float64    `json:"mean"`      // in the sheet's scale
	SD        *float64    `json:"sd"`        // their sample standard deviation
	Error     *float64    `json:"error"`     // mean less certified value; null unless the check is complete
	Tolerance *float64    `json:"tolerance"` // what it may be; null where nothing says
}

// BlockStatus is what a check on a block comes to.
type BlockStatus string

// The statuses of a block check.
const (
	BlockPassed     BlockStatus = "passed"
	BlockFailed     BlockStatus = "failed"
	BlockUsed       BlockStatus = "used"       // complete, but there is no tolerance to hold it against
	BlockIncomplete BlockStatus = "incomplete" // something is missing, and the permissible error stands in
	BlockNone       BlockStatus = "none"       // there was none, and the permissible error stands in
)

// TestPiece is what is known of the test piece's size, null where it is not.
type TestPiece struct {
	MassKg       *float64 `json:"massKg"`       // as stated, else computed from shape and density
	MassComputed bool     `json:"massComputed"` // whether it was computed
	ThicknessMm  *float64 `json:"thicknessMm"`  // under the spot: as stated, a pipe's wall if that is less, a bar's diameter if nothing is stated
	RadiusMm     *float64 `json:"radiusMm"`     // of a curved surface: as stated, else half the outer diameter of a pipe or bar
}

// DeviceFit says how an impact device and the test piece go together. What is
// not known of the piece does not count against the device.
type DeviceFit struct {
	Device     string                 `json:"device"`     // its key
	Suits      bool                   `json:"suits"`      // whether the piece falls short in nothing
	Shortfalls []device.ShortfallKind `json:"shortfalls"` // what it falls short in, if the device is used; the codes of the findings there would be
	Curve      bool                   `json:"curve"`      // whether the device has a built-in conversion, which is then for every metal
}

// Readings describes the readings that count.
type Readings struct {
	N            int      `json:"n"`            // how many count
	Struck       int      `json:"struck"`       // how many were struck
	Mean         *float64 `json:"mean"`         // in the sheet's scale
	SD           *float64 `json:"sd"`           // sample standard deviation
	Min          *float64 `json:"min"`          // least
	Max          *float64 `json:"max"`          // greatest
	Range        *float64 `json:"range"`        // max - min
	RangePercent *float64 `json:"rangePercent"` // of the mean
	Suspect      []int    `json:"suspect"`      // positions in the record's readings, from 0
	ShownMean    string   `json:"shownMean"`    // "611 HLD"; "" without readings
	ShownSD      string   `json:"shownSD"`      // "4.1"; "" for fewer than two readings
}

// Corrected is the mean after the corrections.
type Corrected struct {
	Mean      *float64 `json:"mean"`      // in the sheet's scale; null where it could not be corrected
	Direction float64  `json:"direction"` // what the direction of impact added
	Block     float64  `json:"block"`     // what the block check added
}

// Status says whether a scale has a value.
type Status string

// The statuses.
const (
	OK    Status = "ok"
	Below Status = "below" // the spot is softer than the scale serves
	Above Status = "above" // the spot is harder than the scale serves
	None  Status = "none"  // the scale has no value for another reason
)

// Row is one scale of a sheet.
type Row struct {
	Scale  scale.Key `json:"scale"`
	Name   string    `json:"name"`   // English
	Device string    `json:"device"` // whose rebound scale it is; "" for any other scale
	Method string    `json:"method"` // the scale with its test force, where one is known: "HBW 10/3000"
	Status Status    `json:"status"`

	Value    *float64       `json:"value"`    // null unless ok, and so are the next five
	Standard *float64       `json:"standard"` // standard uncertainty
	Expanded *float64       `json:"expanded"` // expanded uncertainty
	K        *float64       `json:"k"`        // coverage factor
	Low      *float64       `json:"low"`      // value - expanded, but never outside the range
	High     *float64       `json:"high"`     // value + expanded, but never outside the range
	DoF      stats.DoF      `json:"dof"`      // effective degrees of freedom; null: infinite
	Coverage stats.Coverage `json:"coverage"` // where k comes from; "" unless ok
	Terms    []stats.Term   `json:"terms"`    // the budget
	LowCut   bool           `json:"lowCut"`   // whether low was cut off at the range
	HighCut  bool           `json:"highCut"`  // whether high was cut off at the range

	Range    []float64 `json:"range"`    // least and greatest value this device gives on this metal; [] where none
	Decimals int       `json:"decimals"` // places of a quoted value

	Shown         string   `json:"shown"`         // "326 HBW (HLD)"; "" unless ok, and so are the next four
	ShownValue    string   `json:"shownValue"`    // "326"
	ShownExpanded string   `json:"shownExpanded"` // "24", rounded up
	ShownLow      string   `json:"shownLow"`      // rounded down
	ShownHigh     string   `json:"shownHigh"`     // rounded up
	ShownRange    []string `json:"shownRange"`    // the range, rounded inwards; [] where none

	Reason       string         `json:"reason"`       // one sentence, only where status is not ok
	ReasonCode   string         `json:"reasonCode"`   // its code
	ReasonParams wording.Params `json:"reasonParams"` // and its parameters

	Path []scale.Step `json:"path"` // how the value came about
}

// Finding is something the inspector has to know about the record.
type Finding struct {
	Code    string         `json:"code"`
	Level   wording.Kind   `json:"level"` // stop: no converted value is given
	Field   string         `json:"field"` // path in the record
	Message string         `json:"message"`
	Remedy  string         `json:"remedy"`
	Params  wording.Params `json:"params"`
	Source  string         `json:"source"`
}

// number is a number for JSON, nil where there is none.
func number(v float64) *float64 {
	if math.IsNaN(v) {
		return nil
	}
	return &v
}
