package rebound

import (
	"bytes"
	"errors"
	"math"
	"math/rand/v2"
	"testing"

	"strikebook/convert/curve"
	"strikebook/convert/device"
	"strikebook/convert/metal"
	"strikebook/convert/rebound/mechanics"
)

func mustLeg(t testing.TB, deviceKey, groupKey string) Leg {
	t.Helper()
	d, ok := device.ByKey(deviceKey)
	if !ok {
		t.Fatalf("no device %q", deviceKey)
	}
	g, ok := metal.ByKey(groupKey)
	if !ok {
		t.Fatalf("no metal group %q", groupKey)
	}
	leg, err := For(d, g)
	if err != nil {
		t.Fatal(err)
	}
	return leg
}

func TestTablesAreFresh(t *testing.T) {
	fresh, err := mechanics.Tables()
	if err != nil {
		t.Fatal(err)
	}
	if !bytes.Equal(fresh, tablesFile) {
		t.Error("tables.csv differs from the model: run go generate ./convert/rebound")
	}
}

// everyLeg calls do for each device and group the model serves.
func everyLeg(t *testing.T, do func(t *testing.T, d device.Device, g metal.Group, leg Leg)) {
	t.Helper()
	for _, d := range device.All() {
		for _, g := range metal.All() {
			if d.BuiltInCurve {
				t.Run(d.Key+" "+g.Key, func(t *testing.T) { do(t, d, g, mustLeg(t, d.Key, g.Key)) })
			}
		}
	}
}

func TestTableErrorAndRoundTrip(t *testing.T) {
	const most = 0.02 // HL
	worst := 0.0
	everyLeg(t, func(t *testing.T, d device.Device, g metal.Group, leg Leg) {
		random := rand.New(rand.NewPCG(1, 2))
		for range 200 {
			hv := g.Lo + (g.Hi-g.Lo)*random.Float64()
			impact, err := mechanics.Strike(mechanics.BodyOf(d), g, hv)
			if err != nil {
				t.Fatal(err)
			}
			hl, err := leg.Inverse(hv)
			if err != nil {
				t.Fatal(err)
			}
			worst = max(worst, math.Abs(hl-impact.HL))
			if math.Abs(hl-impact.HL) > most {
				t.Fatalf("%g HV: table %.4f HL, model %.4f HL", hv, hl, impact.HL)
			}
			back, err := leg.At(hl)
			if err != nil || math.Abs(back-hv) > 1e-9*hv {
				t.Fatalf("%g HV -> %.4f HL -> %g HV (%v)", hv, hl, back, err)
			}
		}
	})
	t.Logf("largest error of a table: %.5f HL", worst)
}

// The slope of the logarithms is 2.2 to 3.1 on steel.
func TestSlopeOnSteel(t *testing.T) {
	leg := mustLeg(t, "D", "low-alloy-steel")
	for hl := 360.0; hl <= 880; hl += 10 {
		hv, err := leg.At(hl)
		if err != nil {
			t.Fatal(err)
		}
		slope, err := leg.Slope(hl)
		if err != nil {
			t.Fatal(err)
		}
		if s := slope * hl / hv; s < 2.15 || s > 3.15 {
			t.Errorf("%g HLD: dlnHV/dlnHL = %.3f", hl, s)
		}
	}
}

func TestStandardUncertainty(t *testing.T) {
	for _, c := range []struct {
		device, group string
		hl, hv        float64
		want          float64 // HL, from the percentages of the model's description
	}{
		{"D", "low-alloy-steel", 600, 330, 12},
		{"DC", "low-alloy-steel", 600, 330, 12},
		{"D", "low-alloy-steel", 400, 130, 16},
		{"C", "low-alloy-steel", 600, 250, 600 * math.Hypot(0.02, 0.04)},
		{"G", "aluminium", 500, 140, 500 * math.Hypot(0.12, 0.04)},
	} {
		leg := mustLeg(t, c.device, c.group)
		if got := leg.StandardUncertainty(c.hl, c.hv); math.Abs(got-c.want) > 1e-9 {
			t.Errorf("%s %s %g HL: %g, want %g", c.device, c.group, c.hl, got, c.want)
		}
	}
}

func TestNoCurveForDL(t *testing.T) {
	dl, _ := device.ByKey("DL")
	if _, err := For(dl, metal.All()[0]); !errors.Is(err, ErrNoCurve) {
		t.Errorf("error %v, want ErrNoCurve", err)
	}
}

func TestNothingOutsideTheGroup(t *testing.T) {
	leg := mustLeg(t, "D", "aluminium")
	var outside *curve.OutsideError
	if _, err := leg.At(610); !errors.As(err, &outside) || !outside.Above() {
		t.Errorf("610 HLD on aluminium: error %v, want above the group's 190 HV", err)
	}
	lo, hi := leg.Domain()
	for _, hl := range []float64{lo - 1e-6, hi + 1e-6, 0, -5, math.NaN(), math.Inf(1)} {
		if hv, err := leg.At(hl); err == nil {
			t.Errorf("%g HLD gave %g HV", hl, hv)
		}
	}
	for _, hv := range []float64{39.9, 190.1, math.NaN()} {
		if hl, err := leg.Inverse(hv); err == nil {
			t.Errorf("%g HV gave %g HLD", hv, hl)
		}
	}
}

func BenchmarkLeebFromVickers(b *testing.B) {
	leg := mustLeg(b, "D", "low-alloy-steel")
	for b.Loop() {
		if _, err := leg.Inverse(348); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkVickersFromLeeb(b *testing.B) {
	leg := mustLeg(b, "D", "low-alloy-steel")
	for b.Loop() {
		if _, err := leg.At(610); err != nil {
			b.Fatal(err)
		}
	}
}
