package scale

import (
	_ "embed"
	"fmt"
	"strings"

	"strikebook/convert/curve"
	"strikebook/convert/table"
)

var (
	//go:embed astm_e140_table1_steel_hrc.csv
	e140Table1 []byte
	//go:embed astm_e140_table2_steel_hrb.csv
	e140Table2 []byte
	//go:embed astm_e140_table3_nickel.csv
	e140Table3 []byte
	//go:embed astm_e140_table4_cartridge_brass.csv
	e140Table4 []byte
	//go:embed astm_e140_table9_wrought_aluminium.csv
	e140Table9 []byte
	//go:embed iso18265_tableA1_steel.csv
	iso18265TableA1 []byte
)

// fromMemory goes behind every published source that was not read off a copy.
const fromMemory = " From memory: check your own copy."

// publication is one published table of equivalent hardness.
type publication struct {
	key     string // as the metal groups name it
	file    []byte
	hv      string // name of the HV column in the file
	columns []column
}

// column is one scale of a published table.
type column struct {
	scale  Key
	name   string // in the file
	method string // the scale with its test force, where the table names one
	// step is what the printed values are rounded to. 0 for the scale that the
	// table is arranged by, whose values are exact.
	step float64
}

const (
	brinell3000 = "HBW 10/3000" // 10 mm ball, 3000 kgf
	brinell500  = "HBW 10/500"  // 10 mm ball, 500 kgf
)

// publications holds the tables. For steel the ASTM tables carry the values and
// ISO 18265 only what they lack (Rm); where both speak, their difference is a
// measure of what such a table is worth.
var publications = []publication{
	{"e140-1", e140Table1, "hv", []column{
		{HBW, "hbw3000", brinell3000, 1}, {HRC, "hrc", "", 0}, {HRA, "hra", "", 0.1}, {HS, "hs", "", 0.1}}},
	{"e140-2", e140Table2, "hv", []column{
		{HBW, "hbw3000", brinell3000, 1}, {HRB, "hrb", "", 0}, {HRA, "hra", "", 0.1}}},
	{"iso18265-A1", iso18265TableA1, "hv10", []column{
		{HBW, "hbw", "", 1}, {HRC, "hrc", "", 0.1}, {HRB, "hrb", "", 0.1}, {Rm, "rm_mpa", "", 5}}},
	{"e140-3", e140Table3, "hv", []column{
		{HBW, "hbw", brinell3000, 1}, {HRB, "hrb", "", 0}, {HRC, "hrc", "", 0}, {HRA, "hra", "", 0.5}}},
	{"e140-4", e140Table4, "hv", []column{
		{HBW, "hbw", brinell500, 1}, {HRB, "hrb", "", 0.5}, {HRF, "hrf", "", 0.5}}},
	{"e140-9", e140Table9, "hv", []column{
		{HBW, "hbw", brinell500, 0}, {HRB, "hrb", "", 1}}},
}

// steelTables are the tables that carry the same metals, so that they can be
// held against each other.
var steelTables = []string{"e140-1", "e140-2", "iso18265-A1"}

// published is one column of a publication, as a curve from HV.
type published struct {
	column
	table  string // key of the publication
	source string
	hvs    []float64
	values []float64
	curve  *curve.Table
}

// library holds every column of every publication.
var library = readLibrary()

func readLibrary() []published {
	var all []published
	for _, p := range publications {
		t := table.MustRead(p.key, p.file)
		for _, c := range p.columns {
			hvs, values := t.Pairs(p.hv, c.name)
			through, err := curve.NewTable(hvs, values)
			if err != nil {
				panic(fmt.Errorf("%s, column %s: %w", p.key, c.name, err))
			}
			all = append(all, published{
				column: c, table: p.key, source: t.Source + fromMemory,
				hvs: hvs, values: values, curve: through,
			})
		}
	}
	return all
}

// find returns the columns of one scale in some tables, in the library's order.
func find(scale Key, tables []string) []published {
	var found []published
	for _, p := range library {
		for _, key := range tables {
			if p.table == key && p.scale == scale {
				found = append(found, p)
			}
		}
	}
	return found
}

// title is a source without its subject: "ASTM E140, Table 1".
func (p published) title() string {
	title, _, _ := strings.Cut(p.source, ":")
	return title
}
