package convert

import (
	"strconv"
	"strings"

	"strikebook/convert/scale"
	"strikebook/convert/tabular"
	"strikebook/convert/wording"
)

// TableBook is a book to write as a table.
type TableBook struct {
	Book
	Continued bool `json:"continued,omitempty"` // whether it goes on from a part before, and has no row of headers
}

// DecodeTableBook reads a book to write from JSON, but not its records. An error
// is a *wording.Error.
func DecodeTableBook(data []byte) (TableBook, error) {
	var b TableBook
	err := decodeBook(data, &b, &b.Book)
	return b, err
}

// resultColumns are the columns behind the fields of a record.
func resultColumns() []string {
	columns := []string{"result n", "result struck", "result mean", "result sd", "result corrected", "result corrected U"}
	for _, s := range scale.Converted() {
		columns = append(columns, "result "+string(s.Key), "result "+string(s.Key)+" U")
	}
	return append(columns, "result verdict", "result chance %", "result sentence", "result findings", "result edition", "error")
}

// WriteTable writes a book as CSV, a record a row: every field of it, then what
// it comes to, each value with its expanded uncertainty. A record that cannot be
// evaluated has a row with its error. Of the columns, tabular.Read reads the
// fields back.
func WriteTable(b TableBook) string {
	var csv []byte
	if !b.Continued {
		csv = tabular.AppendRow(csv, append(tabular.Fields(), resultColumns()...))
	}
	for _, text := range b.Records {
		r, s, refused := attempt(text, false)
		csv = tabular.AppendRow(csv, append(tabular.Cells(r), results(s, refused)...))
	}
	return string(csv)
}

// results are the cells of the result columns.
func results(s Sheet, refused *wording.Error) []string {
	if refused != nil {
		cells := make([]string, len(resultColumns()))
		cells[len(cells)-1] = refused.Message
		return cells
	}
	shown := map[scale.Key]Row{}
	for _, r := range s.Scales {
		shown[r.Scale] = r
	}
	corrected := shown[s.Scale]
	cells := []string{
		strconv.Itoa(s.Readings.N), strconv.Itoa(s.Readings.Struck), s.Readings.ShownMean, s.Readings.ShownSD,
		corrected.Shown, corrected.ShownExpanded,
	}
	for _, one := range scale.Converted() {
		cells = append(cells, shown[one.Key].ShownValue, shown[one.Key].ShownExpanded)
	}
	var codes []string
	for _, f := range s.Findings {
		codes = append(codes, f.Code)
	}
	v := s.Verdict
	return append(cells, string(v.Outcome), v.ShownChance, v.Sentence, strings.Join(codes, " "), s.Edition, "")
}
