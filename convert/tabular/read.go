package tabular

import (
	"fmt"
	"slices"
	"strings"

	"strikebook/convert/device"
	"strikebook/convert/record"
	"strikebook/convert/wording"
)

// Request is a table to read, and what is known of it.
type Request struct {
	Text      string        `json:"text"`                // as pasted, or the whole file
	Delimiter string        `json:"delimiter,omitempty"` // between cells: a tab, ";", "|" or ","; found unless told
	Header    Header        `json:"header,omitempty"`    // found unless told
	Layout    Layout        `json:"layout,omitempty"`    // found unless told
	Mapping   []string      `json:"mapping,omitempty"`   // for each column the path of the field that it holds, "limit", "struck", or "" for a column to leave out; guessed unless told
	Known     []ColumnWord  `json:"known,omitempty"`     // what headers mean, before the words that are known anyway
	Defaults  record.Record `json:"defaults"`            // what stands in a record where its row says nothing; id and readings are left out of it
}

// Header says whether the first row names the columns.
type Header string

// The answers.
const (
	WithHeader    Header = "yes"
	WithoutHeader Header = "no"
)

// Layout says what a row is.
type Layout string

// The layouts.
const (
	SpotARow    Layout = "spot"
	ReadingARow Layout = "reading" // readings of a spot have its label in common, or none behind the first
)

// ColumnWord is what a header means.
type ColumnWord struct {
	Name string `json:"name"` // case, spaces and signs do not count
	Role string `json:"role"` // as in a mapping
}

// Table is what was read. Every row that is not blank is either in a record or
// among the bad ones.
type Table struct {
	Delimiter string          `json:"delimiter"` // "" where there is one column
	Header    bool            `json:"header"`
	Layout    Layout          `json:"layout"`
	Columns   []Column        `json:"columns"`
	Mapping   []string        `json:"mapping"` // the roles of the columns: what to hand in again, changed
	Rows      int             `json:"rows"`    // that are not blank, without the header
	Records   []record.Record `json:"records"`
	At        []int           `json:"at"`  // for each record the number of its row, or of its first; counted from 1, with header and blank rows
	Bad       []BadRow        `json:"bad"` // in their order
}

// Column is one column of a table.
type Column struct {
	Name    string   `json:"name"`    // its header; "" without one
	Role    string   `json:"role"`    // "" where it is left out
	Samples []string `json:"samples"` // its first few cells that hold something
}

// BadRow is a row that is in no record.
type BadRow struct {
	Row   int            `json:"row"` // its number
	Cells []string       `json:"cells"`
	Error *wording.Error `json:"error"` // the field is the role of the column, where one is to blame
}

// The roles that are no field of a record.
const (
	limitRole  = "limit"  // one cell for the whole limit: "max 225 HBW"
	struckRole = "struck" // why the reading in this row was struck
)

// The bounds of what is read.
const (
	MaxTableBytes = 10 << 20
	MaxRows       = 100_000
	maxColumns    = 1000
)

// DecodeRequest reads a request from JSON. An error is a *wording.Error.
func DecodeRequest(data []byte) (Request, error) {
	var q Request
	// JSON takes up to six times the bytes of a text.
	if err := record.DecodeRequest(data, 6*MaxTableBytes+record.MaxBytes, &q); err != nil {
		return Request{}, err
	}
	return q, nil
}

// Read reads the records of a table. An error is a *wording.Error and says that
// the request is not one; what is wrong with a row is told of the row.
func Read(q Request) (Table, error) {
	t := &reader{asked: q}
	if err := t.check(); err != nil {
		return Table{}, err
	}
	t.arrange()
	t.readRows()
	return t.Table, t.err
}

// reader is a table in the reading.
type reader struct {
	asked Request
	Table
	err error

	rows       []row
	fields     []field // of the columns, zero where their role is none
	commaLists bool    // whether a comma in a cell parts readings
	spots      []*spot // in the order of their first rows
	last       *spot   // that the row before belongs to
	labelled   map[string]*spot
}

// spot is a record in the making.
type spot struct {
	record record.Record
	rows   []row
}

func (t *reader) check() error {
	if len(t.asked.Text) > MaxTableBytes {
		return wording.NewError("table-too-large", "text", wording.Params{"limit": MaxTableBytes})
	}
	if d := t.asked.Delimiter; d != "" && (len(d) != 1 || !strings.Contains(delimiters, d)) {
		return choiceError("delimiter", d, `tab, ;, |, ","`)
	}
	for _, choice := range []struct{ path, got, a, b string }{
		{"header", string(t.asked.Header), string(WithHeader), string(WithoutHeader)},
		{"layout", string(t.asked.Layout), string(SpotARow), string(ReadingARow)},
	} {
		if choice.got != "" && choice.got != choice.a && choice.got != choice.b {
			return choiceError(choice.path, choice.got, choice.a+", "+choice.b)
		}
	}
	for i, role := range t.asked.Mapping {
		if !isRole(role) {
			return choiceError(fmt.Sprintf("mapping[%d]", i), role, roles())
		}
	}
	for i, known := range t.asked.Known {
		if !isRole(known.Role) {
			return choiceError(fmt.Sprintf("known[%d].role", i), known.Role, roles())
		}
	}
	t.asked.Defaults.V, t.asked.Defaults.ID, t.asked.Defaults.Readings = record.Version, "", nil
	return t.asked.Defaults.Validate()
}

func choiceError(path, got, choices string) error {
	return wording.NewError("unknown-choice", path, wording.Params{"path": path, "got": got, "choices": choices})
}

func isRole(role string) bool {
	_, ok := fieldAt(role)
	return ok || role == "" || role == limitRole || role == struckRole
}

func roles() string { return strings.Join(append(Fields(), limitRole, struckRole), ", ") }

// arrange takes the text apart and finds out what its columns hold.
func (t *reader) arrange() {
	text := strings.TrimPrefix(t.asked.Text, "\ufeff")
	delimiter := detect(text)
	if t.asked.Delimiter != "" {
		delimiter = t.asked.Delimiter[0]
	}
	if delimiter != 0 {
		t.Delimiter = string(delimiter)
	}
	t.commaLists = delimiter == ','
	t.rows = split(text, delimiter, MaxRows+2) // the header, and one too many
	width := 0
	for _, r := range t.rows {
		if len(r.cells) > maxColumns {
			t.err = wording.NewError("table-too-wide", "text", wording.Params{"row": r.number, "n": len(r.cells), "limit": maxColumns})
			t.rows = nil
			break
		}
		width = max(width, len(r.cells))
	}
	t.Columns, t.Mapping, t.Records, t.At, t.Bad = make([]Column, width), make([]string, width), []record.Record{}, []int{}, []BadRow{}
	if t.Header = t.hasHeader(); t.Header {
		for i, name := range t.rows[0].cells {
			t.Columns[i].Name = name
		}
		t.rows = t.rows[1:]
	}
	if len(t.rows) > MaxRows {
		t.err = wording.NewError("table-too-long", "text", wording.Params{"limit": MaxRows})
		t.rows = nil
	}
	t.Rows = len(t.rows)
	t.sample()
	t.guess()
	t.Layout = t.layout()
	if t.Layout == SpotARow {
		t.drop(struckRole)
	}
	t.fields = make([]field, width)
	for i, c := range t.Columns {
		t.Mapping[i] = c.Role
		t.fields[i], _ = fieldAt(c.Role)
	}
}

// sample shows the first cells of each column.
func (t *reader) sample() {
	const samples, looked = 3, 1000
	for i := range t.Columns {
		t.Columns[i].Samples = []string{}
	}
	for _, r := range t.rows[:min(looked, len(t.rows))] {
		for i, cell := range r.cells {
			if c := &t.Columns[i]; cell != "" && len(c.Samples) < samples {
				c.Samples = append(c.Samples, cell)
			}
		}
	}
}

// hasHeader reports whether the first row names the columns: it does if it holds
// a word for one, or no number where the second row holds one.
func (t *reader) hasHeader() bool {
	if t.asked.Header != "" || len(t.rows) == 0 {
		return t.asked.Header == WithHeader && len(t.rows) > 0
	}
	first := t.rows[0].cells
	if slices.ContainsFunc(first, t.isName) {
		return true
	}
	return len(t.rows) > 1 && !slices.ContainsFunc(first, isNumber) && slices.ContainsFunc(t.rows[1].cells, isNumber)
}

// isName reports whether a cell is a word for a column.
func (t *reader) isName(cell string) bool {
	plain := plainWord(cell)
	for _, kind := range []string{"extreme", "spare", "statistics"} {
		if words()[word{kind, plain}] != "" {
			return true
		}
	}
	return t.roleOf(cell) != ""
}

func isNumber(cell string) bool {
	return cell != "" && record.ParseNumber(cell).Text == ""
}

// roleOf is what a column of a name holds, "" if that is not known.
func (t *reader) roleOf(name string) string {
	plain := plainWord(name)
	for _, known := range t.asked.Known {
		if plainWord(known.Name) == plain {
			return known.Role
		}
	}
	if role, ok := words()[word{"column", plain}]; ok && plain != "" {
		return role
	}
	// r1, reading 2, HLD 3
	numberless := strings.TrimRight(plain, "0123456789")
	if words()[word{"column", numberless}] == readingsField {
		return readingsField
	}
	if _, ok := deviceOver(name); ok {
		return readingsField
	}
	return ""
}

// deviceOver is the device whose scale stands over a column of readings, with a
// number behind it or without: "HLD 3".
func deviceOver(name string) (d device.Device, ok bool) {
	name = strings.ToUpper(name)
	for _, one := range device.All() {
		if rest, found := strings.CutPrefix(name, one.Scale); found && len(one.Scale) > len(d.Scale) && strings.Trim(rest, " 0123456789#.()[]") == "" {
			d, ok = one, true
		}
	}
	return d, ok
}

// guess gives each column its role: as told, else by its name, else by what it
// holds.
func (t *reader) guess() {
	if t.asked.Mapping != nil {
		for i := range t.Columns {
			if i < len(t.asked.Mapping) {
				t.Columns[i].Role = t.asked.Mapping[i]
			}
		}
		t.dropTwins()
		return
	}
	statistics := slices.ContainsFunc(t.Columns, func(c Column) bool { return words()[word{"statistics", plainWord(c.Name)}] != "" })
	for i := range t.Columns {
		c := &t.Columns[i]
		c.Role = t.roleOf(c.Name)
		if c.Role == "" && !statistics {
			c.Role = words()[word{"extreme", plainWord(c.Name)}]
		}
	}
	for i := range t.Columns {
		c := &t.Columns[i]
		if counts := c.Name == "" && i == 0 && slices.Equal(c.Samples, []string{"1", "2", "3"}); !t.has("label") && len(t.Columns) > 1 &&
			(counts || words()[word{"spare", plainWord(c.Name)}] == "label") {
			c.Role = "label"
		}
		named := c.Name != "" && strings.Trim(c.Name, "0123456789") != ""
		switch {
		case c.Role != "" || named || len(c.Samples) == 0:
		case !slices.ContainsFunc(c.Samples, func(cell string) bool { return !isNumber(cell) }):
			c.Role = readingsField
		case t.Delimiter == "":
			c.Role = readingsField // a list of them in a line
		case !t.has("label"):
			c.Role = "label"
		}
	}
	t.dropTwins()
}

// dropTwins leaves out the columns whose field another one holds already.
func (t *reader) dropTwins() {
	seen := map[string]bool{}
	for i := range t.Columns {
		role := &t.Columns[i].Role
		if *role != readingsField && seen[*role] {
			*role = ""
		}
		seen[*role] = true
	}
}

func (t *reader) has(role string) bool {
	return slices.ContainsFunc(t.Columns, func(c Column) bool { return c.Role == role })
}

func (t *reader) drop(role string) {
	for i := range t.Columns {
		if t.Columns[i].Role == role {
			t.Columns[i].Role = ""
		}
	}
}

// layout finds what a row is: a reading if there is one column of them and
// labels repeat, or one that says why a reading was struck.
func (t *reader) layout() Layout {
	if t.asked.Layout != "" {
		return t.asked.Layout
	}
	label, readings := -1, 0
	for i, c := range t.Columns {
		switch c.Role {
		case "label":
			label = i
		case readingsField:
			readings++
		}
	}
	if label < 0 || readings != 1 {
		return SpotARow
	}
	if t.has(struckRole) {
		return ReadingARow
	}
	seen := map[string]bool{}
	blank := 0
	for _, r := range t.rows {
		name := cellOf(r, label)
		switch {
		case name == "":
			blank++
		case seen[name]:
			return ReadingARow
		}
		seen[name] = true
	}
	if blank > 0 && blank >= len(t.rows)/3 && cellOf(t.rows[0], label) != "" {
		return ReadingARow // the label stands beside the first reading alone
	}
	return SpotARow
}

func cellOf(r row, i int) string {
	if i >= len(r.cells) {
		return ""
	}
	return r.cells[i]
}

// readRows makes the records.
func (t *reader) readRows() {
	t.labelled = map[string]*spot{}
	refused := map[int]*wording.Error{} // by the number of the row
	for _, r := range t.rows {
		add := t.addSpot
		if t.Layout == ReadingARow {
			add = t.addReading
		}
		if why := add(r); why != nil {
			refused[r.number] = why
		}
	}
	for _, s := range t.spots {
		if err := s.record.Validate(); err != nil {
			why, ok := err.(*wording.Error)
			if !ok {
				panic(err) // Validate refuses in no other way
			}
			for _, r := range s.rows {
				refused[r.number] = why
			}
			continue
		}
		t.Records = append(t.Records, s.record)
		t.At = append(t.At, s.rows[0].number)
	}
	for _, r := range t.rows {
		if why := refused[r.number]; why != nil {
			t.Bad = append(t.Bad, BadRow{Row: r.number, Cells: r.cells, Error: why})
		}
	}
}

// addSpot makes a record of a row.
func (t *reader) addSpot(r row) *wording.Error {
	s, refused := t.newSpot(r)
	if refused == nil && len(s.record.Readings) == 0 && s.record.Label == "" {
		refused = wording.NewError("row-empty", "", nil)
	}
	if refused == nil {
		t.spots = append(t.spots, s)
	}
	return refused
}

// newSpot reads all cells of a row.
func (t *reader) newSpot(r row) (*spot, *wording.Error) {
	s := &spot{record: t.asked.Defaults, rows: []row{r}}
	for i, cell := range r.cells {
		role := t.Columns[i].Role
		if role == "" || role == struckRole || cell == "" {
			continue
		}
		if refused := t.set(&s.record, i, cell); refused != nil {
			return nil, refused
		}
	}
	if s.record.Readings == nil {
		s.record.Readings = []record.Reading{}
	}
	t.reconcile(&s.record, r)
	return s, nil
}
