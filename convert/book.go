package convert

import (
	"fmt"
	"slices"

	"strikebook/convert/record"
	"strikebook/convert/strict"
	"strikebook/convert/wording"
)

// Book is a job of many spots.
type Book struct {
	V       int          `json:"v"`       // version of this layout, 1
	Records []RecordText `json:"records"` // at most MaxRecords
}

// RecordText is a record as JSON, not read yet: one that cannot be read spoils
// none of the others in its book.
//
//contract:ts Record
type RecordText []byte

const (
	// MaxRecords is how many records a book may hold.
	MaxRecords = 100_000
	// MaxBookBytes is the size of the largest book that is read, in bytes of JSON.
	MaxBookBytes = 256 << 20
)

// DecodeBook reads a book from JSON, but not its records. An error is a
// *wording.Error.
func DecodeBook(data []byte) (Book, error) {
	var b Book
	err := decodeBook(data, &b, &b)
	return b, err
}

// decodeBook reads a request that a book is embedded in.
func decodeBook(data []byte, request any, b *Book) error {
	if err := record.DecodeRequest(data, MaxBookBytes, request); err != nil {
		return err
	}
	if err := record.CheckVersion(b.V); err != nil {
		return err
	}
	return checkLength("records", len(b.Records))
}

func checkLength(path string, n int) error {
	if n > MaxRecords {
		return wording.NewError("too-many-records", path, wording.Params{"n": n, "limit": MaxRecords})
	}
	return nil
}

// BookSheet is a book evaluated.
type BookSheet struct {
	Sheets  []SheetText `json:"sheets"` // one for each record, in their order
	Summary Summary     `json:"summary"`
}

// SheetText is the JSON of a record's sheet: what Evaluate answers, or {"error":
// ...} in the place of a record that could not be evaluated. Ten thousand sheets
// fit into memory as text, but hardly as what they are read into.
//
//contract:ts Sheet | { error: Error }
type SheetText []byte

// EvaluateBook evaluates every record of a book. Of a book of thousands, rows
// tell as much as a list can show, at a twentieth of the cost: EvaluateRows.
func EvaluateBook(b Book) BookSheet {
	s := BookSheet{Sheets: make([]SheetText, len(b.Records))}
	rows := make([]BookRow, len(b.Records))
	var written []byte
	for i, text := range b.Records {
		r, sheet, refused := attempt(text, false)
		rows[i] = newBookRow(r, sheet, refused)
		written = appendSheet(written[:0], sheet, refused)
		s.Sheets[i] = slices.Clone(written)
	}
	s.Summary = SummarizeRows(rows)
	return s
}

// BookRows are rows of a book.
type BookRows struct {
	Rows []BookRow `json:"rows"` // at most MaxRecords
}

// DecodeRows reads rows from JSON, as EvaluateRows gave them. An error is a
// *wording.Error.
func DecodeRows(data []byte) (BookRows, error) {
	var b BookRows
	if err := record.DecodeRequest(data, MaxBookBytes, &b); err != nil {
		return BookRows{}, err
	}
	return b, checkLength("rows", len(b.Rows))
}

// EvaluateRows evaluates every record of a book, as far as its row in a list
// shows it. A book may be handed over in parts: a row depends on no other.
func EvaluateRows(b Book) BookRows {
	rows := make([]BookRow, len(b.Records))
	for i, text := range b.Records {
		rows[i] = newBookRow(attempt(text, true))
	}
	return BookRows{rows}
}

// attempt reads and evaluates one record. Whatever goes wrong is the record's
// own error.
func attempt(text RecordText, brief bool) (r record.Record, s Sheet, refused *wording.Error) {
	defer func() {
		if fault := recover(); fault != nil {
			refused = wording.NewError("internal", "", wording.Params{"call": "evaluate", "detail": fmt.Sprint(fault)})
		}
	}()
	r, err := record.Decode(text)
	if err != nil {
		refused, ok := err.(*wording.Error)
		if !ok {
			panic(err) // Decode refuses in no other way
		}
		return r, s, refused
	}
	e := newEvaluation(r.Normalized())
	e.brief = brief
	return r, e.run(), nil
}

// appendSheet writes a sheet, or the error in its place.
func appendSheet(b []byte, s Sheet, refused *wording.Error) []byte {
	var value any = s
	if refused != nil {
		value = map[string]*wording.Error{"error": refused}
	}
	b, err := strict.Append(b, value)
	if err != nil {
		panic(err) // a test writes every kind of sheet
	}
	return b
}
