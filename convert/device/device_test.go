package device

import (
	"math"
	"os"
	"slices"
	"testing"

	"strikebook/convert/table"
)

func mustDevice(t testing.TB, key string) Device {
	t.Helper()
	d, ok := ByKey(key)
	if !ok {
		t.Fatalf("no device %q", key)
	}
	return d
}

func TestDevicesAreSane(t *testing.T) {
	if Source() == "" {
		t.Error("the devices name no source")
	}
	balls := []string{"WC-Co", "Si3N4", "PCD"}
	seen := make(map[string]bool)
	for _, d := range All() {
		t.Run(d.Key, func(t *testing.T) {
			if d.Scale != "HL"+d.Key {
				t.Errorf("scale %q, want HL and the device", d.Scale)
			}
			if seen[d.Key] {
				t.Error("it is there twice")
			}
			seen[d.Key] = true
			for _, c := range []struct {
				name          string
				got           float64
				least, utmost float64
			}{
				{"mass in kg", d.BodyMass, 3e-3, 20e-3},
				{"velocity in m/s", d.ImpactVelocity, 1, 3},
				{"radius in m", d.BallRadius, 1e-3, 3e-3},
				{"lower end", d.Lo, 200, d.Hi},
				{"upper end", d.Hi, d.Lo, 1000}, // the ball comes back no faster than it came
			} {
				if !(c.got >= c.least && c.got <= c.utmost) {
					t.Errorf("%s: %g, want %g to %g", c.name, c.got, c.least, c.utmost)
				}
			}
			if !slices.Contains(balls, d.BallMaterial) {
				t.Errorf("ball of %q", d.BallMaterial)
			}
			if byKey, ok := ByKey(d.Key); !ok || byKey != d {
				t.Errorf("by its key %+v (%t)", byKey, ok)
			}
			if byScale, ok := ByScale(d.Scale); !ok || byScale != d {
				t.Errorf("by its scale %+v (%t)", byScale, ok)
			}
		})
	}
}

// Mass and velocity come to the energy that the standard names beside them.
func TestImpactEnergy(t *testing.T) {
	const file = "../../testdata/impact_energy.csv"
	content, err := os.ReadFile(file)
	if err != nil {
		t.Fatal(err)
	}
	rows := table.MustRead(file, content).Rows
	if len(rows) != len(All()) {
		t.Errorf("%d energies for %d devices", len(rows), len(All()))
	}
	for _, row := range rows {
		d, want := mustDevice(t, row.Text("device")), row.Number("energy_mJ")
		if got := 1e3 * d.BodyMass * d.ImpactVelocity * d.ImpactVelocity / 2; math.Abs(got/want-1) > 0.015 {
			t.Errorf("%s: %.2f mJ, nominally %g", d.Key, got, want)
		}
	}
}

func TestUnknownDevices(t *testing.T) {
	for _, text := range []string{"", "d", "HL", "HLd", "LD", "D "} {
		if d, ok := ByKey(text); ok || d != (Device{}) {
			t.Errorf("key %q: %+v", text, d)
		}
		if d, ok := ByScale(text); ok || d != (Device{}) {
			t.Errorf("scale %q: %+v", text, d)
		}
	}
}

func TestCallersKeepTheirHandsOff(t *testing.T) {
	All()[0].Key, Directions()[0] = "changed", Up
	if All()[0].Key == "changed" || Directions()[0] == Up {
		t.Error("the caller can change the devices or the directions")
	}
}

func TestDirectionsOfEachDevice(t *testing.T) {
	for _, d := range All() {
		want := []Direction{Down, Compensated}
		if d.Key == "D" || d.Key == "DC" { // the only ones with a published correction
			want = []Direction{Down, Down45, Level, Up45, Up, Compensated}
		}
		if got := d.Directions(); !slices.Equal(got, want) || d.Corrects() != (len(want) > 2) {
			t.Errorf("%s: %v, corrects %t, want %v", d.Key, got, d.Corrects(), want)
		}
	}
}

// columns are the directions that need a correction, from the least to the
// greatest, with their columns in the table.
var columns = []struct {
	direction Direction
	name      string
}{{Down45, "down45"}, {Level, "level_horizontal"}, {Up45, "up45"}, {Up, "up"}}

// correct is the correction where there must be one.
func correct(t *testing.T, direction Direction, mean float64) float64 {
	t.Helper()
	add, ok := Correction(direction, mean)
	if !ok {
		t.Fatalf("no correction for %s at %g", direction, mean)
	}
	return add
}

func TestCorrectionMeetsItsTable(t *testing.T) {
	if CorrectionSource() == "" {
		t.Error("the corrections name no source")
	}
	rows := directionTable.Rows
	for i, row := range rows {
		for _, c := range columns {
			level, want := row.Number("level"), row.Number(c.name)
			if got := correct(t, c.direction, level); got != want {
				t.Errorf("%s at %g: %g, want %g", c.direction, level, got, want)
			}
			if i == 0 {
				continue
			}
			from, before := rows[i-1].Number("level"), rows[i-1].Number(c.name)
			for _, share := range []float64{0.1, 0.5, 0.75} {
				mean, line := from+share*(level-from), before+share*(want-before)
				if got := correct(t, c.direction, mean); math.Abs(got-line) > 1e-12 {
					t.Errorf("%s at %g: %g, on the line %g", c.direction, mean, got, line)
				}
			}
		}
	}
	if lo, hi := CorrectionRange(); lo != rows[0].Number("level") || hi != rows[len(rows)-1].Number("level") {
		t.Errorf("from %g to %g, which are not the table's ends", lo, hi)
	}
}

func TestNoCorrectionOutsideTheTable(t *testing.T) {
	lo, hi := CorrectionRange()
	for _, mean := range []float64{math.Nextafter(lo, 0), math.Nextafter(hi, 2*hi), 0, -500, 1e9, math.Inf(1), math.NaN()} {
		for _, c := range columns {
			if add, ok := Correction(c.direction, mean); ok || !math.IsNaN(add) {
				t.Errorf("%s at %g: %g, want none", c.direction, mean, add)
			}
		}
		for _, direction := range []Direction{Down, Compensated} {
			if add := correct(t, direction, mean); add != 0 || direction.NeedsCorrection() {
				t.Errorf("%s at %g: %g, want 0", direction, mean, add)
			}
		}
	}
	for _, direction := range []Direction{"", "sideways"} {
		if add, ok := Correction(direction, 600); ok {
			t.Errorf("%q: %g, want none", direction, add)
		}
	}
}

// The farther from vertically down a body strikes, the more gravity brakes it on
// its way in and speeds it on its way back: readings come out too high, the more
// so the slower it comes back. Striking 45 degrees down and up, its pull along
// the path differs from that of a level strike by as much either way.
func TestCorrectionFollowsGravity(t *testing.T) {
	const rounding = 1 + 1e-9 // HL: half a unit in the level value and in the mean of the two others
	lo, hi := CorrectionRange()
	for mean := lo; mean <= hi; mean += 10 {
		before := 0.0
		for _, c := range columns {
			add := correct(t, c.direction, mean)
			if !(add < before) {
				t.Errorf("%s at %g: %g, want below the %g of a steeper direction", c.direction, mean, add, before)
			}
			if softer := correct(t, c.direction, max(lo, mean-10)); !(add >= softer) {
				t.Errorf("%s at %g: %g, more than the %g of a softer metal", c.direction, mean, add, softer)
			}
			before = add
		}
		level, oblique := correct(t, Level, mean), (correct(t, Down45, mean)+correct(t, Up45, mean))/2
		if math.Abs(level-oblique) > rounding {
			t.Errorf("at %g: level %g, but %g halfway between 45 degrees down and up", mean, level, oblique)
		}
	}
}

func BenchmarkCorrection(b *testing.B) {
	for b.Loop() {
		Correction(Level, 610)
	}
}
