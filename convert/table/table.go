// Package table reads the data files of the core: small CSV files, embedded
// beside the package that uses them, whose first line is their source.
package table

import (
	"bytes"
	"encoding/csv"
	"fmt"
	"math"
	"strconv"
	"strings"
)

// Table is one data file: its source, and its rows by column name.
type Table struct {
	Source string // the first comment line
	Caveat string // the comment lines after it, joined; "" if there is none
	Rows   []Row
}

// Row is one line of a data file.
type Row struct {
	file    string
	columns map[string]int
	cells   []string
}

// MustRead reads an embedded data file: comment lines that begin with "#" (the
// first names the source), a header line, then the rows. The file is part of
// the program, so a malformed one is a mistake of ours and panics.
func MustRead(name string, content []byte) Table {
	t, err := read(name, content)
	if err != nil {
		panic(err)
	}
	return t
}

func read(name string, content []byte) (Table, error) {
	var t Table
	var caveats []string
	body := content
	for bytes.HasPrefix(body, []byte("#")) {
		line, rest, _ := bytes.Cut(body, []byte("\n"))
		text := strings.TrimSpace(strings.TrimPrefix(string(line), "#"))
		if t.Source == "" {
			t.Source = text
		} else {
			caveats = append(caveats, text)
		}
		body = rest
	}
	if t.Source == "" {
		return t, fmt.Errorf("%s: the first line must be a comment that names the source", name)
	}
	t.Caveat = strings.Join(caveats, " ")
	lines, err := csv.NewReader(bytes.NewReader(body)).ReadAll()
	if err != nil {
		return t, fmt.Errorf("%s: %w", name, err)
	}
	if len(lines) < 2 {
		return t, fmt.Errorf("%s: a header line and at least one row are needed", name)
	}
	columns := make(map[string]int, len(lines[0]))
	for i, column := range lines[0] {
		columns[column] = i
	}
	for _, cells := range lines[1:] {
		t.Rows = append(t.Rows, Row{file: name, columns: columns, cells: cells})
	}
	return t, nil
}

// Text returns the cell of a column. A column the file lacks panics.
func (r Row) Text(column string) string {
	i, ok := r.columns[column]
	if !ok {
		panic(fmt.Sprintf("%s: there is no column %q", r.file, column))
	}
	return r.cells[i]
}

// Number returns the cell of a column as a number, NaN where it is blank. A
// cell that is neither panics.
func (r Row) Number(column string) float64 {
	text := r.Text(column)
	if text == "" {
		return math.NaN()
	}
	return r.parse(column, text)
}

// Numbers returns a cell that holds numbers separated by spaces. A cell that
// holds anything else panics.
func (r Row) Numbers(column string) []float64 {
	var values []float64
	for text := range strings.FieldsSeq(r.Text(column)) {
		values = append(values, r.parse(column, text))
	}
	return values
}

func (r Row) parse(column, text string) float64 {
	value, err := strconv.ParseFloat(text, 64)
	if err != nil {
		panic(fmt.Sprintf("%s: %q in column %q is no number", r.file, text, column))
	}
	return value
}

// Pairs returns the rows that carry both columns, as two slices of equal length.
func (t Table) Pairs(x, y string) (xs, ys []float64) {
	for _, row := range t.Rows {
		a, b := row.Number(x), row.Number(y)
		if math.IsNaN(a) || math.IsNaN(b) {
			continue
		}
		xs, ys = append(xs, a), append(ys, b)
	}
	return xs, ys
}
