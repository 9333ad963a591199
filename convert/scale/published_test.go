package scale

import (
	"math"
	"slices"
	"strings"
	"testing"

	"strikebook/convert/curve"
	"strikebook/convert/metal"
)

// near reports whether got is want up to a share of it. NaN is not.
func near(share, got, want float64) bool {
	return math.Abs(got-want) <= share*math.Abs(want)
}

// at is the value of a curve where it must have one.
func at(t testing.TB, c curve.Curve, x float64) float64 {
	t.Helper()
	y, err := c.At(x)
	if err != nil {
		t.Fatal(err)
	}
	return y
}

// printed is the one column of a scale in a table.
func printed(t *testing.T, key Key, tableKey string) published {
	t.Helper()
	found := find(key, []string{tableKey})
	if len(found) != 1 {
		t.Fatalf("%d columns of %s in %s", len(found), key, tableKey)
	}
	return found[0]
}

func TestPublishedTables(t *testing.T) {
	for _, p := range library {
		t.Run(p.table+" "+string(p.scale), func(t *testing.T) {
			if !strings.HasPrefix(p.source, "ASTM E140, Table ") && !strings.HasPrefix(p.source, "ISO 18265, Table ") {
				t.Errorf("source %q names no published table", p.source)
			}
			for i, hv := range p.hvs {
				if got := at(t, p.curve, hv); !near(1e-14, got, p.values[i]) {
					t.Errorf("%g HV: %.15g, printed %g", hv, got, p.values[i])
				}
				if i > 0 {
					rises(t, p.curve, p.hvs[i-1], hv)
				}
			}
		})
	}
}

// rises checks that a curve rises all the way between two arguments.
func rises(t *testing.T, c curve.Curve, from, to float64) {
	t.Helper()
	const parts = 16
	before := at(t, c, from)
	for i := 1; i <= parts; i++ {
		x := from + (to-from)*float64(i)/parts
		value := at(t, c, x)
		if !(value > before) {
			t.Fatalf("falls to %g at %g", value, x)
		}
		before = value
	}
}

// Every table serves a metal, and every metal's tables are there.
func TestTablesAndMetalsMeet(t *testing.T) {
	served := []string{austenitic} // by formula, not by a table
	for _, p := range publications {
		served = append(served, p.key)
	}
	var asked []string
	for _, g := range metal.All() {
		asked = append(asked, g.Tables...)
	}
	for _, key := range asked {
		if !slices.Contains(served, key) {
			t.Errorf("no table %q, which a metal asks for", key)
		}
	}
	for _, key := range served {
		if !slices.Contains(asked, key) {
			t.Errorf("table %q serves no metal", key)
		}
	}
}

// Petrenko (National Bureau of Standards, 1930), from memory:
// HB = 7300/(130 - HRB) for HRB 55 to 100, within 4 % of ASTM E140, Table 2.
func TestPetrenko(t *testing.T) {
	hrb, hbw := printed(t, HRB, "e140-2"), printed(t, HBW, "e140-2")
	worst := 0.0
	for i, b := range hrb.values {
		want := 7300 / (130 - b)
		got := at(t, hbw.curve, hrb.hvs[i])
		if !near(0.04, got, want) {
			t.Errorf("%g HRB: %.1f HBW, Petrenko %.1f", b, got, want)
		}
		worst = max(worst, math.Abs(got/want-1))
	}
	t.Logf("largest difference: %.1f %%", 100*worst)
}
