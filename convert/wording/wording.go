// Package wording holds every English sentence the core says, each once, looked
// up by its code. The code and the parameters travel with the sentence, so that
// the page can say the same in another language.
package wording

import (
	_ "embed"
	"fmt"
	"strconv"
	"strings"

	"strikebook/convert/table"
)

// Kind says what a sentence is for.
type Kind string

// The kinds of sentences.
const (
	Stop   Kind = "stop"   // a finding: no converted value is given
	Warn   Kind = "warn"   // a finding: the result stands, but marked
	Note   Kind = "note"   // a finding: good to know
	Reason Kind = "reason" // why a scale has no value
	Ruling Kind = "ruling" // a verdict, or what it rests on
	Advice Kind = "advice" // what to do after a verdict
	Fault  Kind = "error"  // what was handed in is refused
)

// Sentence is one sentence with its place-holders: {name} stands for a
// parameter, {name:1} for a number with that many decimals.
type Sentence struct {
	Code    string `json:"code"`
	Kind    Kind   `json:"kind"`
	Message string `json:"message"`
	Remedy  string `json:"remedy"` // "" but for a finding: an error's message holds the remedy
	Source  string `json:"source"` // "" where nothing is cited
}

// Params are the values of a sentence's place-holders: numbers and strings.
//
//contract:ts { [name: string]: number | string }
type Params map[string]any

//go:embed sentences.csv
var sentencesFile []byte

var sentences, byCode = readSentences(table.MustRead("sentences.csv", sentencesFile))

func readSentences(t table.Table) ([]Sentence, map[string]Sentence) {
	all := make([]Sentence, 0, len(t.Rows))
	index := make(map[string]Sentence, len(t.Rows))
	for _, row := range t.Rows {
		s := Sentence{
			Code:    row.Text("code"),
			Kind:    Kind(row.Text("kind")),
			Message: row.Text("message"),
			Remedy:  row.Text("remedy"),
			Source:  row.Text("source"),
		}
		all = append(all, s)
		index[s.Code] = s
	}
	return all, index
}

// All returns every sentence.
func All() []Sentence { return append([]Sentence(nil), sentences...) }

// Say returns the sentence of a code with its place-holders filled. A code or
// a parameter that is missing is a mistake of ours and shows as such.
func Say(code string, params Params) Sentence {
	s, ok := byCode[code]
	if !ok {
		return Sentence{Code: code, Kind: Stop, Message: "There is no sentence for the code " + code + "."}
	}
	s.Message = fill(s.Message, params)
	s.Remedy = fill(s.Remedy, params)
	return s
}

// KindOf returns what the sentence of a code is for.
func KindOf(code string) Kind { return byCode[code].Kind }

// fill puts the parameters into a sentence.
func fill(text string, params Params) string {
	var b strings.Builder
	for {
		before, rest, open := strings.Cut(text, "{")
		b.WriteString(before)
		if !open {
			return b.String()
		}
		holder, after, closed := strings.Cut(rest, "}")
		if !closed {
			b.WriteString("{" + rest)
			return b.String()
		}
		name, places, _ := strings.Cut(holder, ":")
		b.WriteString(write(params[name], places))
		text = after
	}
}

func write(value any, places string) string {
	number, ok := value.(float64)
	if !ok {
		return fmt.Sprint(value)
	}
	decimals, err := strconv.Atoi(places)
	if err != nil {
		decimals = -1 // as many as the number needs
	}
	return strconv.FormatFloat(number, 'f', decimals, 64)
}

// Error refuses what was handed in, in one plain sentence that names the field
// and the remedy.
type Error struct {
	Code    string `json:"code"`
	Message string `json:"message"`
	Field   string `json:"field"` // path in the record, "readings[2].value"; "" where no field is to blame
	Params  Params `json:"params"`
}

func (e *Error) Error() string { return e.Message }

// NewError makes an error from the sentence of a code.
func NewError(code, field string, params Params) *Error {
	if params == nil {
		params = Params{}
	}
	return &Error{Code: code, Message: Say(code, params).Message, Field: field, Params: params}
}
