// Package rebound is the first leg of every built-in conversion: it leads from
// a rebound (Leeb) reading to Vickers hardness, by curves through the solutions
// of the rebound model that package mechanics describes.
package rebound

import (
	_ "embed"
	"errors"
	"fmt"
	"math"
	"sync"

	"strikebook/convert/curve"
	"strikebook/convert/device"
	"strikebook/convert/metal"
	"strikebook/convert/table"
)

// Source names the model in every result that it carries.
const Source = "Rebound model after Tabor (1948) and Johnson (1985), impact bodies of ISO 16859-1; its constants are from memory and estimates"

// ErrNoCurve says that the model does not serve a device.
var ErrNoCurve = errors.New("the rebound model does not serve this device")

// Leg leads from the readings of one device on one group of metals to HV. It
// covers the group's range of hardness; the device's own range of readings is
// for the caller to hold against it.
type Leg struct {
	curve.Curve // HL to HV
	device      device.Device
	group       metal.Group
}

// For returns the leg of a device on a group, or ErrNoCurve.
func For(d device.Device, g metal.Group) (Leg, error) {
	if !d.BuiltInCurve {
		return Leg{}, ErrNoCurve
	}
	read, ok := tables[legKey{d.Key, g.Key}]
	if !ok {
		return Leg{}, fmt.Errorf("tables.csv holds no device %s on %s: run go generate ./convert/rebound", d.Key, g.Key)
	}
	c, err := read()
	return Leg{Curve: c, device: d, group: g}, err
}

type legKey struct{ device, group string }

// tables holds, for each device and group, the curve from HL to HV.
var tables = readTables(table.MustRead("tables.csv", tablesFile))

//go:generate go run ./tabulate

// tablesFile is the rebound model, solved for every device and group by the
// program in folder tabulate.
//
//go:embed tables.csv
var tablesFile []byte

func readTables(t table.Table) map[legKey]func() (*curve.Table, error) {
	all := make(map[legKey]func() (*curve.Table, error), len(t.Rows))
	for _, row := range t.Rows {
		// Most pages use one row: the others stay text.
		all[legKey{row.Text("device"), row.Text("group")}] = sync.OnceValues(func() (*curve.Table, error) {
			return curve.NewTable(row.Numbers("hl"), row.Numbers("hv"))
		})
	}
	return all
}

const (
	softBelow = 150.0 // HV: below, the model is weakest
	softTimes = 2.0   // and its uncertainty this many times as large
	// otherBodyPercent is added in quadrature for every body but that of D and
	// DC, on which the return share was calibrated: a free ball loses about 10
	// percent more speed than the share says.
	otherBodyPercent = 4.0
)

// StandardUncertainty returns the model's standard uncertainty at a reading hl
// that stands for a hardness hv, in HL.
func (l Leg) StandardUncertainty(hl, hv float64) float64 {
	percent := l.group.ModelPercent
	if hv < softBelow {
		percent *= softTimes
	}
	if d := l.device.Key; d != "D" && d != "DC" {
		percent = math.Hypot(percent, otherBodyPercent)
	}
	return percent / 100 * hl
}
