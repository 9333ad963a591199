package tabular

import (
	"slices"
	"strings"
)

// delimiters are what may stand between two cells, the surest sign first: a
// comma may also be a decimal one.
const delimiters = "\t;|,"

// row is a row of a table that is not blank.
type row struct {
	number int // counted from 1, with blank rows and the header
	cells  []string
}

// split takes a text apart into its rows that are not blank, most at most.
// Whatever the text holds, every character of it but delimiters, line ends and
// the space around a cell comes out in a cell. A delimiter of 0 stands for none.
func split(text string, delimiter byte, most int) []row {
	var rows []row
	var cells []string
	number := 1
	endRow := func() {
		if slices.ContainsFunc(cells, func(c string) bool { return strings.TrimSpace(c) != "" }) {
			rows = append(rows, row{number, cells})
		}
		cells = nil
		number++
	}
	for text != "" && len(rows) < most {
		cell, rest := cutCell(text, delimiter)
		cells = append(cells, harmful(cell))
		switch {
		case rest == "":
			text = rest
		case rest[0] == delimiter:
			text = rest[1:]
			if text == "" {
				cells = append(cells, "")
			}
			continue
		case strings.HasPrefix(rest, "\r\n"):
			text = rest[2:]
		default:
			text = rest[1:]
		}
		endRow()
	}
	if len(cells) > 0 && len(rows) < most {
		endRow()
	}
	return rows
}

// cutCell cuts off the first cell of a text. The rest begins with the delimiter
// or the end of the line, or is empty.
func cutCell(text string, delimiter byte) (cell, rest string) {
	if start := strings.TrimLeft(text, " "); strings.HasPrefix(start, `"`) {
		if cell, rest, ok := cutQuoted(start[1:], delimiter); ok {
			return cell, rest
		}
	}
	end := strings.IndexFunc(text, func(r rune) bool { return r == '\n' || r == '\r' || delimiter != 0 && r == rune(delimiter) })
	if end < 0 {
		end = len(text)
	}
	return strings.TrimSpace(text[:end]), text[end:]
}

// cutQuoted cuts off the rest of a cell in quotes. ok is false where what seems
// its end is followed by more of the cell, or where there is none: then the
// quote is a character as any other, as in 5" pipe.
func cutQuoted(text string, delimiter byte) (cell, rest string, ok bool) {
	for from := 0; ; {
		end := strings.IndexByte(text[from:], '"')
		if end < 0 {
			return "", "", false
		}
		end += from
		if strings.HasPrefix(text[end+1:], `"`) {
			from = end + 2
			continue
		}
		rest = strings.TrimLeft(text[end+1:], " ")
		if rest != "" && rest[0] != '\n' && rest[0] != '\r' && (delimiter == 0 || rest[0] != delimiter) {
			return "", "", false
		}
		return strings.ReplaceAll(text[:end], `""`, `"`), rest, true
	}
}

// detect finds the delimiter of a text by its first rows: the one that gives
// most of them the same number of cells, more than one. 0 stands for none.
func detect(text string) byte {
	const sample, few = 64 << 10, 50 // bytes and rows
	if len(text) > sample {
		text = text[:sample]
	}
	best, most := byte(0), 0
	for i := range len(delimiters) {
		rows := split(text, delimiters[i], few)
		widths := map[int]int{}
		for _, r := range rows {
			// A cell that begins with a quote was cut in the middle.
			if !slices.ContainsFunc(r.cells, func(cell string) bool { return strings.HasPrefix(cell, `"`) }) {
				widths[len(r.cells)]++
			}
		}
		for width, n := range widths {
			if width > 1 && n > most && !(delimiters[i] == ',' && width == 2 && decimals(rows)) {
				best, most = delimiters[i], n
			}
		}
	}
	return best
}

// decimals reports whether what a comma parts are readings with a decimal.
func decimals(rows []row) bool {
	digits := func(cell string, least, most int) bool {
		return len(cell) >= least && len(cell) <= most && strings.Trim(cell, "0123456789") == ""
	}
	for _, r := range rows {
		if len(r.cells) == 2 && !(digits(r.cells[0], 2, 3) && digits(r.cells[1], 1, 1)) {
			return false
		}
	}
	return true
}
