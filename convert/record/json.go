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
	*n = parseNumber(text)
	return nil
}

func parseNumber(text string) Number {
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

// Encode writes a record as JSON.
func Encode(r Record) ([]byte, error) {
	r.V = Version
	return strict.Marshal(r)
}

// Decode reads a record from JSON and validates it. An error is a
// *wording.Error that names the field and the remedy.
func Decode(data []byte) (Record, error) {
	if len(data) > MaxBytes {
		return Record{}, wording.NewError("record-too-large", "", wording.Params{"limit": float64(MaxBytes)})
	}
	var r Record
	if err := strict.Unmarshal(data, &r); err != nil {
		return Record{}, refusal(data, err)
	}
	if r.V != Version {
		return Record{}, versionError(strconv.Itoa(r.V))
	}
	return r, r.Validate()
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
	if e.Path == "curve" || strings.HasPrefix(e.Path, "curve.") {
		return curveNotServed
	}
	if e.Problem == strict.Unknown {
		return wording.NewError("unknown-field", e.Path, shown)
	}
	return wording.NewError("wrong-type", e.Path, shown)
}

// statedVersion looks for the version of a record that cannot be read.
func statedVersion(data []byte) (version string, ok bool) {
	_, rest, ok := bytes.Cut(data, []byte(`"v"`))
	if !ok {
		return "", false
	}
	rest, ok = bytes.CutPrefix(bytes.TrimSpace(rest), []byte(":"))
	if !ok {
		return "", false
	}
	rest = bytes.TrimSpace(rest)
	if end := bytes.IndexAny(rest, ",} \t\r\n"); end > 0 {
		return shorten(string(rest[:end])), true
	}
	return "", false
}

// shorten keeps a sentence readable whatever it has to quote.
func shorten(text string) string {
	const most = 60
	if runes := []rune(text); len(runes) > most {
		return string(runes[:most]) + "…"
	}
	return text
}
