package mechanics

import (
	"math"
	"os"
	"testing"

	"strikebook/convert/curve"
	"strikebook/convert/device"
	"strikebook/convert/metal"
	"strikebook/convert/table"
)

func mustDevice(t testing.TB, key string) device.Device {
	t.Helper()
	d, ok := device.ByKey(key)
	if !ok {
		t.Fatalf("no device %q", key)
	}
	return d
}

func mustGroup(t testing.TB, key string) metal.Group {
	t.Helper()
	g, ok := metal.ByKey(key)
	if !ok {
		t.Fatalf("no metal group %q", key)
	}
	return g
}

// The independent implementation names its own tolerances: 0.05 HL, 0.0005 mm.
func TestIndependentImplementation(t *testing.T) {
	content, err := os.ReadFile("../../../testdata/rebound_checks.csv")
	if err != nil {
		t.Fatal(err)
	}
	for _, row := range table.MustRead("rebound_checks.csv", content).Rows {
		d, g, hv := row.Text("device"), row.Text("group"), row.Number("hv")
		impact, err := Strike(BodyOf(mustDevice(t, d)), mustGroup(t, g), hv)
		if err != nil {
			t.Errorf("%s %s %g HV: %v", d, g, hv, err)
			continue
		}
		if want := row.Number("hl"); math.Abs(impact.HL-want) > 0.05 {
			t.Errorf("%s %s %g HV: %.4f HL, want %.3f", d, g, hv, impact.HL, want)
		}
		if want := row.Number("impression_diameter_mm"); math.Abs(impact.Diameter*1e3-want) > 0.0005 {
			t.Errorf("%s %s %g HV: impression %.6f mm, want %.5f", d, g, hv, impact.Diameter*1e3, want)
		}
	}
}

// Facts the model was not fitted to, with one exception that is named.
func TestFacts(t *testing.T) {
	steel := mustGroup(t, "low-alloy-steel")
	strike := func(b Body, hv float64) Impact {
		t.Helper()
		impact, err := Strike(b, steel, hv)
		if err != nil {
			t.Fatal(err)
		}
		return impact
	}
	d := BodyOf(mustDevice(t, "D"))

	t.Run("calibration: 348 HV (330 HBW) reads 610 HLD", func(t *testing.T) {
		if hl := strike(d, 348).HL; math.Abs(hl-610) > 1 {
			t.Errorf("%.2f HLD", hl)
		}
	})
	t.Run("impression near 0.53 mm at 600 HLD", func(t *testing.T) {
		if mm := strike(d, solveHV(t, d, steel, 600)).Diameter * 1e3; math.Abs(mm-0.53) > 0.01 {
			t.Errorf("%.3f mm", mm)
		}
	})
	t.Run("E reads lower than D, C and S higher", func(t *testing.T) {
		for _, hv := range []float64{100, 200, 348, 600, 900} {
			ref := strike(d, hv).HL
			if e := strike(BodyOf(mustDevice(t, "E")), hv).HL; e >= ref {
				t.Errorf("%g HV: E %.1f, D %.1f", hv, e, ref)
			}
			for _, key := range []string{"C", "S"} {
				if hl := strike(BodyOf(mustDevice(t, key)), hv).HL; hl <= ref {
					t.Errorf("%g HV: %s %.1f, D %.1f", hv, key, hl, ref)
				}
			}
		}
	})
	t.Run("hardest martensite reads within 1 % of the top of D's range", func(t *testing.T) {
		if hl := strike(d, 940).HL; math.Abs(hl/890-1) > 0.01 {
			t.Errorf("%.1f HLD", hl)
		}
	})
	t.Run("free alumina ball on 300 and 700 HV blocks", func(t *testing.T) {
		// Abstract, Journal of the Material Testing Research Association of
		// Japan 69(1): e = 0.63 and 0.86. The level is known to be 10 % high,
		// the ratio is met within 4 %.
		const radius, density = 1.5e-3, 3900
		ball := Body{
			Mass:     4.0 / 3 * math.Pi * radius * radius * radius * density,
			Velocity: 10, Radius: radius, E: 380e9, Nu: 0.22,
		}
		soft, hard := strike(ball, 300).HL, strike(ball, 700).HL
		if ratio := hard / soft; math.Abs(ratio/(0.86/0.63)-1) > 0.04 {
			t.Errorf("ratio %.4f, measured %.4f", ratio, 0.86/0.63)
		}
		for _, c := range []struct{ got, want float64 }{{soft, 703}, {hard, 937}} {
			if math.Abs(c.got-c.want) > 1 { // the independent implementation's figures
				t.Errorf("%.1f HL, want %.0f", c.got, c.want)
			}
		}
	})
	t.Run("aluminium read on the steel group shows about twice its hardness", func(t *testing.T) {
		asSteel := solveHV(t, d, steel, 610)
		hv := solveHV(t, d, mustGroup(t, "aluminium"), 610)
		if hv >= 200 || math.Abs(asSteel-348) > 1.5 {
			t.Errorf("as steel %.1f HV, as aluminium %.1f HV", asSteel, hv)
		}
	})
}

// solveHV inverts the model itself, beyond any group's range.
func solveHV(t *testing.T, b Body, g metal.Group, hl float64) float64 {
	t.Helper()
	hv, err := curve.Root(func(hv float64) float64 {
		impact, err := Strike(b, g, hv)
		if err != nil {
			return math.NaN()
		}
		return impact.HL - hl
	}, 20, 1500)
	if err != nil {
		t.Fatal(err)
	}
	return hv
}

func TestReadingRisesWithHardness(t *testing.T) {
	for _, d := range device.All() {
		if !d.BuiltInCurve {
			continue
		}
		for _, g := range metal.All() {
			t.Run(d.Key+" "+g.Key, func(t *testing.T) { rises(t, BodyOf(d), g) })
		}
	}
}

func rises(t *testing.T, body Body, g metal.Group) {
	before := 0.0
	for i := 0; i <= 100; i++ {
		hv := g.Lo + (g.Hi-g.Lo)*float64(i)/100
		impact, err := Strike(body, g, hv)
		if err != nil {
			t.Fatal(err)
		}
		if impact.HL <= before {
			t.Fatalf("%g HV reads %.4f HL, the softer step before it %.4f", hv, impact.HL, before)
		}
		before = impact.HL
	}
}

func BenchmarkStrike(b *testing.B) {
	body, steel := BodyOf(mustDevice(b, "D")), mustGroup(b, "low-alloy-steel")
	for b.Loop() {
		if _, err := Strike(body, steel, 348); err != nil {
			b.Fatal(err)
		}
	}
}
