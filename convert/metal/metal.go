// Package metal holds the material groups that readings can be converted for.
package metal

import (
	_ "embed"
	"strings"

	"strikebook/convert/table"
)

// Group is a family of metals that share one conversion.
type Group struct {
	Key  string // "low-alloy-steel", ...
	Name string // English

	Density float64 // kg/m3

	E           float64 // Young's modulus, Pa
	Nu          float64 // Poisson's ratio
	RateFactor  float64 // how many times the static strength the impact meets
	OverstressH float64 // strength the impact meets on top of that, HV
	ReturnShare float64 // share of the elastic energy returned, relative to steel

	Lo, Hi       float64  // the hardness the rebound model is given for, HV
	ModelPercent float64  // standard uncertainty of the rebound model, percent of the reading
	Tables       []string // the published tables for its second leg, keys of package scale; empty if none
}

//go:embed groups.csv
var groupsFile []byte

var groupsTable = table.MustRead("groups.csv", groupsFile)

var groups = readGroups(groupsTable)

func readGroups(t table.Table) []Group {
	var all []Group
	for _, row := range t.Rows {
		g := Group{
			Key:          row.Text("key"),
			Name:         row.Text("name"),
			Density:      row.Number("density_kg_m3"),
			E:            row.Number("E_GPa") * 1e9,
			Nu:           row.Number("nu"),
			RateFactor:   row.Number("rate_factor"),
			OverstressH:  row.Number("overstress_hv"),
			ReturnShare:  row.Number("return_rel"),
			Lo:           row.Number("hv_min"),
			Hi:           row.Number("hv_max"),
			ModelPercent: row.Number("u_hl_percent"),
		}
		if static := row.Text("static"); static != "none" {
			g.Tables = strings.Fields(static)
		}
		all = append(all, g)
	}
	return all
}

// Source names where the groups' data come from.
func Source() string { return groupsTable.Source }

// All returns every group, in the order they are offered.
func All() []Group { return append([]Group(nil), groups...) }

// ByKey finds a group by its key.
func ByKey(key string) (Group, bool) {
	for _, g := range groups {
		if g.Key == key {
			return g, true
		}
	}
	return Group{}, false
}
