package tabular

import (
	"strconv"
	"strings"
)

// AppendRow appends a row of CSV after RFC 4180. A spreadsheet takes a cell that
// begins with = + - @, a tab or the end of a line for a formula, which could do
// harm: unless it is a plain number, an apostrophe is put before it, and before
// the apostrophes of a cell that already has some there, so that reading takes
// exactly one away.
func AppendRow(b []byte, cells []string) []byte {
	for i, cell := range cells {
		if i > 0 {
			b = append(b, ',')
		}
		cell = harmless(cell)
		if plain(cell) {
			b = append(b, cell...)
			continue
		}
		b = append(b, '"')
		b = append(b, strings.ReplaceAll(cell, `"`, `""`)...)
		b = append(b, '"')
	}
	return append(b, "\r\n"...)
}

// plain reports whether a cell needs no quotes, to any reader.
func plain(cell string) bool {
	if cell != strings.TrimSpace(cell) || strings.HasPrefix(cell, "{") {
		return false
	}
	for i := range len(cell) {
		if c := cell[i]; c < ' ' || c >= 0x7f || strings.IndexByte("\t;|,\"", c) >= 0 {
			return false
		}
	}
	return true
}

// formula reports whether a cell begins as a formula does, or with apostrophes
// before that.
func formula(cell string) bool {
	rest := strings.TrimLeft(cell, "'")
	return rest != "" && strings.IndexByte("=+-@\t\r\n", rest[0]) >= 0
}

// harmless puts the apostrophe before a cell that needs it.
func harmless(cell string) string {
	if !formula(cell) {
		return cell
	}
	if _, err := strconv.ParseFloat(cell, 64); err == nil && strings.Trim(cell, "+-.0123456789eE") == "" {
		return cell
	}
	return "'" + cell
}

// harmful takes away the apostrophe that harmless put there.
func harmful(cell string) string {
	if strings.HasPrefix(cell, "'") && formula(cell) {
		return cell[1:]
	}
	return cell
}
