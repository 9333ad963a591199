package tabular

import (
	"math"
	"strings"

	"strikebook/convert/record"
)

// A list of readings in a cell is their numbers with spaces between them. What
// is no number stands in quotes, and the reason why a reading was struck in
// brackets behind it; a quote in quotes and a closing bracket in brackets stand
// twice:
//
//	612 608 655[probe tilted] "6l2" 611

func formatReadings(readings []record.Reading) string {
	var b strings.Builder
	for i, r := range readings {
		if i > 0 {
			b.WriteByte(' ')
		}
		if n := r.Value; math.IsNaN(n.Value) || math.IsInf(n.Value, 0) {
			b.WriteString(`"` + strings.ReplaceAll(n.Text, `"`, `""`) + `"`)
		} else {
			b.WriteString(formatNumber(n.Value))
		}
		if r.Struck != "" {
			b.WriteString("[" + strings.ReplaceAll(r.Struck, "]", "]]") + "]")
		}
	}
	return b.String()
}

// betweenReadings is what may stand between two readings, and a comma where
// commaLists says so or where it cannot be a decimal one.
const betweenReadings = " \t\r\n;|/"

// parseReadings reads such a list, or one as people write it. What cannot be
// told comes out as the text of a reading, so that nothing is lost.
func parseReadings(cell string, commaLists bool) []record.Reading {
	between := betweenReadings
	if commaLists {
		between += ","
	}
	var readings []record.Reading
	for {
		cell = strings.TrimLeft(cell, between)
		if cell == "" {
			return readings
		}
		if text, rest, ok := cutEnclosed(cell, '"', '"'); ok {
			readings = append(readings, record.Reading{Value: record.Number{Value: math.NaN(), Text: text}})
			cell = rest
			continue
		}
		if why, rest, ok := cutEnclosed(cell, '[', ']'); ok && len(readings) > 0 {
			readings[len(readings)-1].Struck = why
			cell = rest
			continue
		}
		end := strings.IndexAny(cell[1:], between+"[")
		if end < 0 {
			end = len(cell) - 1
		}
		for _, one := range partAtCommas(cell[:end+1]) {
			readings = append(readings, record.Reading{Value: record.ParseNumber(one)})
		}
		cell = cell[end+1:]
	}
}

// cutEnclosed cuts off a text between two marks, in which the second stands
// twice.
func cutEnclosed(text string, opening, closing byte) (inner, rest string, ok bool) {
	if text[0] != opening {
		return "", "", false
	}
	for i := 1; i < len(text); i++ {
		if text[i] != closing {
			continue
		}
		if i+1 < len(text) && text[i+1] == closing {
			i++
			continue
		}
		mark := string(closing)
		return strings.ReplaceAll(text[1:i], mark+mark, mark), text[i+1:], true
	}
	return "", "", false
}

// partAtCommas parts readings that only commas stand between, as in 612,608,615
// or 612, 608. A comma with one or two digits behind it is a decimal one.
func partAtCommas(text string) []string {
	text = strings.Trim(text, ",")
	if text == "" {
		return nil
	}
	parts := strings.Split(text, ",")
	for _, part := range parts[1:] {
		if len(part) < 3 {
			return []string{text}
		}
	}
	return parts
}
