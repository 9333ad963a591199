// Package device holds the impact devices, the corrections for the direction
// of impact, and what each device requires of the test piece.
package device

import (
	_ "embed"
	"math"

	"gonum.org/v1/gonum/interp"

	"strikebook/convert/table"
)

// Device is one rebound hardness device: the body it throws and the readings
// it may be used for. ISO 16859-1.
type Device struct {
	Key            string  // "D", "DC", "D+15", ...
	Scale          string  // the scale of its readings: "HLD", "HLDC", ...
	BodyMass       float64 // kg
	ImpactVelocity float64 // m/s
	BallRadius     float64 // m
	BallMaterial   string  // a key of the rebound model's ball materials
	Lo, Hi         float64 // application range, in the device's scale
	BuiltInCurve   bool    // whether the rebound model serves it

	Requirements Requirements // of the test piece
}

// Requirements is what a device requires of the test piece. 0 where the
// standards name nothing that is sure: then anything will do.
type Requirements struct {
	MassFreeKg           float64 // least mass of a piece that lies free,
	MassSupportedKg      float64 // on a solid support,
	MassCoupledKg        float64 // coupled to a solid plate
	ThicknessUncoupledMm float64 // least thickness, free or supported,
	ThicknessCoupledMm   float64 // coupled to a solid plate
	CaseMm               float64 // least depth of a hardened case
	RaUm                 float64 // greatest roughness Ra
	RadiusMm             float64 // least radius of a curved surface, without a support ring
	SpacingMm            float64 // least distance from one impression to the next
	EdgeMm               float64 // least distance from an impression to an edge
}

//go:embed devices.csv
var devicesFile []byte

var devicesTable = table.MustRead("devices.csv", devicesFile)

var devices = readDevices(devicesTable)

func readDevices(t table.Table) []Device {
	var all []Device
	for _, row := range t.Rows {
		all = append(all, Device{
			Key:            row.Text("device"),
			Scale:          row.Text("scale"),
			BodyMass:       row.Number("impact_body_mass_g") * 1e-3,
			ImpactVelocity: row.Number("impact_velocity_m_s"),
			BallRadius:     row.Number("ball_radius_mm") * 1e-3,
			BallMaterial:   row.Text("ball_material"),
			Lo:             row.Number("hl_min"),
			Hi:             row.Number("hl_max"),
			BuiltInCurve:   row.Text("curve") == "yes",
			Requirements: Requirements{
				MassFreeKg:           given(row.Number("mass_free_kg")),
				MassSupportedKg:      given(row.Number("mass_supported_kg")),
				MassCoupledKg:        given(row.Number("mass_coupled_kg")),
				ThicknessUncoupledMm: given(row.Number("thickness_uncoupled_mm")),
				ThicknessCoupledMm:   given(row.Number("thickness_coupled_mm")),
				CaseMm:               given(row.Number("case_depth_mm")),
				RaUm:                 given(row.Number("max_ra_um")),
				RadiusMm:             given(row.Number("min_radius_mm")),
				SpacingMm:            given(row.Number("min_spacing_mm")),
				EdgeMm:               given(row.Number("min_edge_mm")),
			},
		})
	}
	return all
}

// given is a requirement as the file gives it, 0 where it gives none.
func given(cell float64) float64 {
	if math.IsNaN(cell) {
		return 0
	}
	return cell
}

// Source names where the devices' data come from.
func Source() string { return devicesTable.Source }

// All returns every device, in the order they are offered.
func All() []Device { return append([]Device(nil), devices...) }

// ByKey finds a device by its key.
func ByKey(key string) (Device, bool) {
	return find(func(d Device) bool { return d.Key == key })
}

// ByScale finds the device whose readings are in a scale.
func ByScale(scale string) (Device, bool) {
	return find(func(d Device) bool { return d.Scale == scale })
}

func find(match func(Device) bool) (Device, bool) {
	for _, d := range devices {
		if match(d) {
			return d, true
		}
	}
	return Device{}, false
}

// Direction is the direction of impact.
type Direction string

// The directions of impact.
const (
	Down        Direction = "down"        // vertically down: the reference
	Down45      Direction = "down45"      // obliquely down
	Level       Direction = "level"       // horizontally
	Up45        Direction = "up45"        // obliquely up
	Up          Direction = "up"          // vertically up, overhead
	Compensated Direction = "compensated" // the instrument has corrected the readings itself
)

// Directions returns every direction, in the order they are offered.
func Directions() []Direction {
	return []Direction{Down, Down45, Level, Up45, Up, Compensated}
}

//go:embed direction_d.csv
var directionFile []byte

var directionTable = table.MustRead("direction_d.csv", directionFile)

// correctionColumns names the column of the correction table for each
// direction that needs a correction.
var correctionColumns = map[Direction]string{
	Down45: "down45", Level: "level_horizontal", Up45: "up45", Up: "up",
}

var corrections = readCorrections(directionTable)

func readCorrections(t table.Table) map[Direction]*interp.PiecewiseLinear {
	all := make(map[Direction]*interp.PiecewiseLinear, len(correctionColumns))
	for direction, column := range correctionColumns {
		levels, values := t.Pairs("level", column)
		var line interp.PiecewiseLinear
		if err := line.Fit(levels, values); err != nil {
			panic(err)
		}
		all[direction] = &line
	}
	return all
}

// CorrectionSource names where the direction corrections come from.
func CorrectionSource() string { return directionTable.Source }

// CorrectionRange returns the least and the greatest mean for which the
// standard tabulates a direction correction.
func CorrectionRange() (lo, hi float64) {
	return correctedLevels[0], correctedLevels[len(correctedLevels)-1]
}

var correctedLevels, _ = directionTable.Pairs("level", correctionColumns[Level])

// NeedsCorrection reports whether readings taken in a direction differ from
// readings taken vertically down.
func (d Direction) NeedsCorrection() bool { return d != Down && d != Compensated }

// Corrects reports whether a direction correction is published for the device.
func (d Device) Corrects() bool { return d.Key == "D" || d.Key == "DC" }

// Directions returns the directions of impact the device can be used in: all
// where a correction is published, else those that need none.
func (d Device) Directions() []Direction {
	var usable []Direction
	for _, direction := range Directions() {
		if d.Corrects() || !direction.NeedsCorrection() {
			usable = append(usable, direction)
		}
	}
	return usable
}

// Correction returns what to add to a mean reading of device D or DC taken in
// a direction, in the device's scale; linear between the tabulated levels. ok
// is false outside them: the table is not extended.
func Correction(direction Direction, mean float64) (add float64, ok bool) {
	if !direction.NeedsCorrection() {
		return 0, true
	}
	lo, hi := CorrectionRange()
	line := corrections[direction]
	if line == nil || !(mean >= lo && mean <= hi) {
		return math.NaN(), false
	}
	return line.Predict(mean), true
}
