package record

import (
	"bytes"
	"errors"
	"math"
	"strconv"
	"strings"

	"strikebook/convert/strict"
	"strikebook/convert/wording"
)

// MaxBytes is the size of the largest record that is read, in bytes of JSON.
const MaxBytes = 256 << 10

// MarshalJSON writes the number, the text that was typed instead, or null.
func (n Number) MarshalJSON() ([]byte, error) {
	switch {
	case !n.isText():
		return strict.Marshal(n.Value)
	case n.Text != "":
		return strict.Marshal(n.Text)
	}
	return []byte("null"), nil
}

// UnmarshalJSON reads a number, text or null. Text may hold a decimal point or
// comma; text that is no finite number is kept as it is.
func (n *Number) UnmarshalJSON(data []byte) error {
	text := string(data)
	switch data[0] {
	case 't', 'f':
		return errors.New("a number")
	case '"':
		if err := strict.Unmarshal(data, &text); err != nil {
			return err
		}
	case 'n':
		text = ""
	}
	*n = ParseNumber(text)
	return nil
}

// ParseNumber reads a number as a person types it, with a decimal point or comma.
// Text that is no finite number is kept as it is.
func ParseNumber(text string) Number {
	plain := strings.TrimSpace(text)
	// Only what a person types is a number: not "0x1p4", "1_000" or "infinity".
	if !strings.ContainsFunc(plain, func(r rune) bool { return !strings.ContainsRune("0123456789+-.,eE", r) }) {
		value, err := strconv.ParseFloat(strings.Replace(plain, ",", ".", 1), 64)
		if err == nil && !math.IsInf(value, 0) {
			return Num(value)
		}
	}
	return Number{Value: math.NaN(), Text: text}
}

// Encode writes a record as JSON, its version first. A record that would be
// too large to be read again is refused.
func Encode(r Record) ([]byte, error) {
	r.V = Version
	text, err := strict.Marshal(r)
	if err == nil && len(text) > MaxBytes {
		err = tooLarge
	}
	return text, err
}

var tooLarge = wording.NewError("record-too-large", "", wording.Params{"limit": float64(MaxBytes)})

// Decode reads a record from JSON and validates it. An error is a
// *wording.Error that names the field and the remedy.
func Decode(data []byte) (Record, error) {
	var r Record
	if err := DecodeAround(data, &r, &r); err != nil {
		return Record{}, err
	}
	return r, nil
}

// DecodeAround reads from JSON a request, a struct that a record is embedded
// in, and validates that record. The errors are those of Decode.
func DecodeAround(data []byte, request any, r *Record) error {
	if err := DecodeRequest(data, MaxBytes, request); err != nil {
		return err
	}
	if err := CheckVersion(r.V); err != nil {
		return err
	}
	return r.Validate()
}

// DecodeRequest reads a request of at most so many bytes of JSON. The errors are
// those of Decode, but nothing is validated.
func DecodeRequest(data []byte, most int, request any) error {
	if len(data) > most {
		return wording.NewError("record-too-large", "", wording.Params{"limit": float64(most)})
	}
	if err := strict.Unmarshal(data, request); err != nil {
		return refusal(data, err)
	}
	return nil
}

// CheckVersion refuses what is of another version than this edition reads.
func CheckVersion(v int) error {
	switch v {
	case Version:
		return nil
	case 0:
		return versionError("0 (none is stated)")
	}
	return versionError(strconv.Itoa(v))
}

func versionError(version string) error {
	return wording.NewError("record-version", "v", wording.Params{"version": version, "known": float64(Version)})
}

// refusal says in the user's terms why JSON is no record.
func refusal(data []byte, err error) error {
	var e *strict.Error
	if !errors.As(err, &e) {
		return err
	}
	shown := wording.Params{"path": shorten(e.Path), "want": e.Want, "got": shorten(e.Got), "version": float64(Version)}
	if e.Path == "" {
		shown["path"] = "record"
	}
	switch e.Problem {
	case strict.Syntax:
		return wording.NewError("record-not-json", e.Path, shown)
	case strict.Duplicate:
		return wording.NewError("duplicate-field", e.Path, shown)
	}
	// A record of another version has other fields: that is what to say then.
	if version, ok := statedVersion(data); ok && version != strconv.Itoa(Version) {
		return versionError(version)
	}
	if e.Problem == strict.Unknown {
		return wording.NewError("unknown-field", e.Path, shown)
	}
	return wording.NewError("wrong-type", e.Path, shown)
}

// statedVersion looks for the version of a record that cannot be read: the
// value of "v" in the outermost object, if that is no object or list.
func statedVersion(data []byte) (version string, ok bool) {
	depth := 0
	name := false // whether a text would be a field's name
	for i := 0; i < len(data); i++ {
		switch c := data[i]; c {
		case '{', '[':
			depth++
			name = c == '{'
		case '}', ']':
			depth--
		case ',':
			name = true
		case '"':
			text := data[i : i+textLength(data[i:])]
			rest := bytes.TrimSpace(data[i+len(text):])
			if name && depth == 1 && string(text) == `"v"` && bytes.HasPrefix(rest, []byte(":")) {
				return scalar(bytes.TrimSpace(rest[1:]))
			}
			i += len(text) - 1
			name = false
		}
	}
	return "", false
}

// textLength is the length of the JSON text that data begins with.
func textLength(data []byte) int {
	for i := 1; i < len(data); i++ {
		switch data[i] {
		case '\\':
			i++
		case '"':
			return i + 1
		}
	}
	return len(data)
}

// scalar returns the number, text or word that data begins with, as it stands.
func scalar(data []byte) (string, bool) {
	end := bytes.IndexAny(data, ",} \t\r\n")
	if end <= 0 || data[0] == '{' || data[0] == '[' {
		return "", false
	}
	return shorten(string(data[:end])), true
}

// shorten keeps a sentence readable whatever it has to quote.
func shorten(text string) string {
	const most = 60
	if runes := []rune(text); len(runes) > most {
		return string(runes[:most]) + "…"
	}
	return text
}
