package verdict

import (
	_ "embed"

	"strikebook/convert/scale"
	"strikebook/convert/table"
)

// Published is a limit that a published code names.
type Published struct {
	Key      string
	Text     string // English
	Scale    scale.Key
	Min, Max float64 // NaN: none
	Source   string
}

//go:embed limits.csv
var limitsFile []byte

var published = readPublished(table.MustRead("limits.csv", limitsFile))

func readPublished(t table.Table) []Published {
	var all []Published
	for _, row := range t.Rows {
		all = append(all, Published{
			Key:    row.Text("key"),
			Text:   row.Text("text"),
			Scale:  scale.Key(row.Text("scale")),
			Min:    row.Number("min"),
			Max:    row.Number("max"),
			Source: row.Text("source") + ", from memory: check the edition your contract names",
		})
	}
	return all
}

// All returns every published limit, in the order they are offered.
func All() []Published { return append([]Published(nil), published...) }
