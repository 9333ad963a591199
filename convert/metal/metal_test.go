package metal

import (
	"reflect"
	"slices"
	"testing"
)

func TestGroupsAreSane(t *testing.T) {
	if Source() == "" {
		t.Error("the groups name no source")
	}
	seen := make(map[string]bool)
	for _, g := range All() {
		t.Run(g.Key, func(t *testing.T) {
			if seen[g.Key] || seen[g.Name] || g.Key == "" || g.Name == "" {
				t.Errorf("key %q and name %q must be there once", g.Key, g.Name)
			}
			seen[g.Key], seen[g.Name] = true, true
			for _, c := range []struct {
				name          string
				got           float64
				least, utmost float64
			}{
				{"density in kg/m3", g.Density, 2500, 9000},
				{"E in Pa", g.E, 60e9, 220e9},
				{"Poisson's ratio", g.Nu, 0.25, 0.35},
				{"rate factor", g.RateFactor, 1, 1.5},
				{"overstress in HV", g.OverstressH, 0, 100},
				{"share returned", g.ReturnShare, 0.8, 1},
				{"lower end in HV", g.Lo, 30, g.Hi / 2},
				{"upper end in HV", g.Hi, 2 * g.Lo, 1000},
				{"model's uncertainty in percent", g.ModelPercent, 2, 10},
			} {
				if !(c.got >= c.least && c.got <= c.utmost) {
					t.Errorf("%s: %g, want %g to %g", c.name, c.got, c.least, c.utmost)
				}
			}
			if byKey, ok := ByKey(g.Key); !ok || !reflect.DeepEqual(byKey, g) {
				t.Errorf("by its key %+v (%t)", byKey, ok)
			}
		})
	}
}

// Zerilli and Armstrong (1987): the rate adds to the strength of bcc metals,
// and multiplies that of fcc ones. Duplex steel is half of each.
func TestRateEffectFollowsTheLattice(t *testing.T) {
	for lattice, c := range map[string]struct {
		groups           []string
		adds, multiplies bool
	}{
		"bcc":  {[]string{"low-alloy-steel", "tool-steel", "martensitic-stainless", "grey-iron", "ductile-iron"}, true, false},
		"fcc":  {[]string{"austenitic-stainless", "aluminium", "brass", "bronze", "copper", "nickel-alloy"}, false, true},
		"both": {[]string{"duplex-stainless"}, true, true},
	} {
		t.Run(lattice, func(t *testing.T) {
			for _, key := range c.groups {
				g, ok := ByKey(key)
				if !ok || g.OverstressH > 0 != c.adds || g.RateFactor > 1 != c.multiplies {
					t.Errorf("%s: overstress %g HV, rate factor %g (%t)", key, g.OverstressH, g.RateFactor, ok)
				}
			}
		})
	}
}

// Rm is in ISO 18265 for unalloyed and low-alloy steel alone.
func TestTables(t *testing.T) {
	for _, g := range All() {
		if slices.Contains(g.Tables, "none") {
			t.Errorf("%s: \"none\" is no table", g.Key)
		}
		if rm := slices.Contains(g.Tables, "iso18265-A1"); rm != (g.Key == "low-alloy-steel") {
			t.Errorf("%s: tables %v", g.Key, g.Tables)
		}
	}
}

func TestUnknownGroups(t *testing.T) {
	for _, key := range []string{"", "glass", "Aluminium", "aluminium "} {
		if g, ok := ByKey(key); ok {
			t.Errorf("%q: %+v, want none", key, g)
		}
	}
}

func TestCallersKeepTheirHandsOff(t *testing.T) {
	All()[0].Key = "changed"
	if All()[0].Key == "changed" {
		t.Error("the caller can change the groups")
	}
}
