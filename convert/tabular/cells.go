package tabular

import (
	"strconv"
	"strings"

	"strikebook/convert/record"
	"strikebook/convert/scale"
	"strikebook/convert/verdict"
	"strikebook/convert/wording"
)

// set reads a cell of a column into a record.
func (t *reader) set(r *record.Record, column int, cell string) *wording.Error {
	role := t.Columns[column].Role
	if role == limitRole {
		limit, ok := parseLimit(cell)
		if !ok {
			return wording.NewError("row-limit", role, wording.Params{"got": shorten(cell)})
		}
		if r.Limit != nil {
			limit.Rule = r.Limit.Rule
			if limit.Scale == "" {
				limit.Scale = r.Limit.Scale
			}
		}
		r.Limit = &limit
		return nil
	}
	if want := t.fields[column].set(r, cell, t.commaLists); want != "" {
		return wording.NewError("row-cell", role, wording.Params{"column": t.nameOf(column), "want": want, "got": shorten(cell)})
	}
	return nil
}

// nameOf names a column in a sentence.
func (t *reader) nameOf(column int) string {
	if name := t.Columns[column].Name; name != "" {
		return shorten(name)
	}
	return "#" + strconv.Itoa(column+1)
}

// reconcile makes device and scale of a record go together, where its row tells
// one of them and the other stands in the defaults: as told, or by the header
// over the readings.
func (t *reader) reconcile(r *record.Record, from row) {
	var device, scaled bool // whether the row tells them
	for i, c := range t.Columns {
		device = device || c.Role == "device" && cellOf(from, i) != ""
		scaled = scaled || c.Role == "scale" && cellOf(from, i) != ""
	}
	if !device && !scaled {
		for _, c := range t.Columns {
			if d, ok := deviceOver(c.Name); ok && c.Role == readingsField {
				r.Device, r.Scale = d.Key, scale.Key(d.Scale)
				return
			}
		}
	}
	switch {
	case device && !scaled:
		r.Scale = ""
	case scaled && !device:
		r.Device = ""
	}
}

// addReading adds a row that is one reading to its spot.
func (t *reader) addReading(r row) *wording.Error {
	s, refused := t.newSpot(r)
	if refused != nil {
		return refused
	}
	if len(s.record.Readings) == 0 {
		return wording.NewError("row-no-reading", readingsField, nil)
	}
	for i, c := range t.Columns {
		if why := cellOf(r, i); c.Role == struckRole && why != "" {
			for j := range s.record.Readings {
				s.record.Readings[j].Struck = why
			}
		}
	}
	first := t.last
	if label := t.labelOf(r); label != "" {
		first = t.labelled[label]
		if first == nil {
			t.labelled[label] = s
		}
	} else if first == nil {
		return wording.NewError("row-no-label", "label", nil)
	}
	if first == nil {
		t.spots = append(t.spots, s)
		t.last = s
		return nil
	}
	if refused := t.agree(first.rows[0], r); refused != nil {
		return refused
	}
	t.last = first
	first.rows = append(first.rows, r)
	first.record.Readings = append(first.record.Readings, s.record.Readings...)
	first.record.Notes = joinNotes(first.record.Notes, s.record.Notes)
	return nil
}

// labelOf is what tells the spot of a row from others: label and job.
func (t *reader) labelOf(r row) string {
	label, job := "", ""
	for i, c := range t.Columns {
		switch c.Role {
		case "label":
			label = cellOf(r, i)
		case "job":
			job = cellOf(r, i)
		}
	}
	if label == "" {
		return ""
	}
	return label + "\x00" + job
}

// agree refuses a row that says something else of its spot than the first one
// did. Each reading may have a time and notes of its own: the time of the first
// stands, and the notes are joined.
func (t *reader) agree(first, r row) *wording.Error {
	for i, c := range t.Columns {
		switch c.Role {
		case "", readingsField, struckRole, "taken", "notes", "id":
			continue
		}
		if got, want := cellOf(r, i), cellOf(first, i); got != "" && got != want {
			return wording.NewError("row-differs", c.Role, wording.Params{
				"column": t.nameOf(i), "got": shorten(got), "want": shorten(want), "first": first.number})
		}
	}
	return nil
}

func joinNotes(a, b string) string {
	switch {
	case b == "" || b == a || strings.HasSuffix(a, "; "+b):
		return a
	case a == "":
		return b
	}
	return a + "; " + b
}

// parseLimit reads a limit in one cell: "max 225 HBW", "≥ 180", "180 to 225 HBW".
func parseLimit(cell string) (l verdict.Limit, ok bool) {
	rest := strings.TrimSpace(cell)
	// The scale, behind the numbers.
	if end := strings.LastIndexAny(rest, "0123456789") + 1; end < len(rest) {
		key, known := words()[word{"scale", plainWord(rest[end:])}]
		if !known {
			return l, false
		}
		l.Scale = scale.Key(key)
		rest = rest[:end]
	}
	// What stands before the first number, and between two.
	begin := strings.IndexAny(rest, "0123456789")
	if begin < 0 {
		return l, false
	}
	before, numbers := strings.TrimSpace(rest[:begin]), rest[begin:]
	for _, between := range []string{" to ", "...", "..", "–", "-"} {
		if least, greatest, two := strings.Cut(numbers, between); two {
			a, b := record.ParseNumber(least), record.ParseNumber(greatest)
			l.Min, l.Max = &a.Value, &b.Value
			return l, before == "" && a.Text == "" && b.Text == ""
		}
	}
	n := record.ParseNumber(numbers)
	if n.Text != "" {
		return l, false
	}
	switch bound := words()[word{"bound", plainWord(before)}]; {
	case bound == "min" || before == "≥" || before == ">=" || before == ">":
		l.Min = &n.Value
	case bound == "max" || before == "≤" || before == "<=" || before == "<":
		l.Max = &n.Value
	default:
		return l, false
	}
	return l, true
}

// shorten keeps a sentence readable whatever it has to quote.
func shorten(text string) string {
	const most = 60
	if runes := []rune(text); len(runes) > most {
		return string(runes[:most]) + "…"
	}
	return text
}
