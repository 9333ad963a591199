package strict

import (
	"fmt"
	"math"
	"reflect"
	"slices"
	"strconv"
	"unicode/utf8"
)

// Marshal writes a value as JSON, as encoding/json does without escaping HTML,
// but for a nil slice or map, which is [] or {}: lists are never null. A number
// that JSON cannot hold (NaN, infinite) is an error.
func Marshal(v any) ([]byte, error) { return Append(nil, v) }

// Append appends a value to b, written as Marshal writes it.
func Append(b []byte, v any) ([]byte, error) { return appendValue(b, reflect.ValueOf(v)) }

func appendValue(b []byte, v reflect.Value) ([]byte, error) {
	if !v.IsValid() {
		return append(b, "null"...), nil
	}
	if v.NumMethod() > 0 && v.Type().Implements(marshaler) && (v.Kind() != reflect.Pointer || !v.IsNil()) {
		own, err := v.Interface().(Marshaler).MarshalJSON()
		return append(b, own...), err
	}
	switch v.Kind() {
	case reflect.Pointer, reflect.Interface:
		return appendValue(b, v.Elem())
	case reflect.Struct:
		return appendObject(b, v)
	case reflect.Slice:
		if v.Type().Elem().Kind() == reflect.Uint8 {
			return append(b, v.Bytes()...), nil
		}
		return appendList(b, v)
	case reflect.Map:
		return appendMap(b, v)
	case reflect.String:
		return appendText(b, v.String()), nil
	case reflect.Bool:
		return strconv.AppendBool(b, v.Bool()), nil
	case reflect.Int:
		return strconv.AppendInt(b, v.Int(), 10), nil
	case reflect.Float64:
		return appendNumber(b, v.Float())
	}
	return b, fmt.Errorf("strict cannot write a %s", v.Type())
}

func appendObject(b []byte, v reflect.Value) ([]byte, error) {
	b = append(b, '{')
	first := true
	for _, f := range fieldsOf(v.Type()) {
		value, err := v.FieldByIndexErr(f.index)
		if err != nil || f.omitEmpty && empty(value) { // err: an embedded pointer is nil
			continue
		}
		if !first {
			b = append(b, ',')
		}
		first = false
		b = append(b, f.key...)
		if b, err = appendValue(b, value); err != nil {
			return b, within(err, f.name)
		}
	}
	return append(b, '}'), nil
}

// empty is what encoding/json leaves out of the fields marked omitempty.
func empty(v reflect.Value) bool {
	switch v.Kind() {
	case reflect.Slice, reflect.Map, reflect.String:
		return v.Len() == 0
	case reflect.Struct:
		return false
	}
	return v.IsZero()
}

func appendList(b []byte, v reflect.Value) ([]byte, error) {
	b = append(b, '[')
	for i := range v.Len() {
		if i > 0 {
			b = append(b, ',')
		}
		var err error
		if b, err = appendValue(b, v.Index(i)); err != nil {
			return b, err
		}
	}
	return append(b, ']'), nil
}

// appendMap writes a map whose keys are texts, in their order.
func appendMap(b []byte, v reflect.Value) ([]byte, error) {
	keys := make([]string, 0, v.Len())
	for _, key := range v.MapKeys() {
		keys = append(keys, key.String())
	}
	slices.Sort(keys)
	b = append(b, '{')
	for i, key := range keys {
		if i > 0 {
			b = append(b, ',')
		}
		b = append(appendText(b, key), ':')
		var err error
		if b, err = appendValue(b, v.MapIndex(reflect.ValueOf(key))); err != nil {
			return b, err
		}
	}
	return append(b, '}'), nil
}

// appendNumber writes a number as JavaScript does: plain, but for the very
// small and the very large.
func appendNumber(b []byte, f float64) ([]byte, error) {
	if math.IsNaN(f) || math.IsInf(f, 0) {
		return b, fmt.Errorf("JSON has no number %g", f)
	}
	format := byte('f')
	if abs := math.Abs(f); abs != 0 && (abs < 1e-6 || abs >= 1e21) {
		format = 'e'
	}
	b = strconv.AppendFloat(b, f, format, -1, 64)
	// e-09 is written e-9.
	if n := len(b); format == 'e' && n >= 4 && b[n-4] == 'e' && b[n-3] == '-' && b[n-2] == '0' {
		b[n-2] = b[n-1]
		b = b[:n-1]
	}
	return b, nil
}

func appendText(b []byte, text string) []byte {
	const digits = "0123456789abcdef"
	b = append(b, '"')
	for i := 0; i < len(text); {
		plain := i
		for i < len(text) && text[i] >= ' ' && text[i] < utf8.RuneSelf && text[i] != '"' && text[i] != '\\' {
			i++
		}
		b = append(b, text[plain:i]...)
		if i == len(text) {
			break
		}
		c := text[i]
		if c < utf8.RuneSelf {
			switch {
			case c == '"' || c == '\\':
				b = append(b, '\\', c)
			case c == '\b':
				b = append(b, `\b`...)
			case c == '\f':
				b = append(b, `\f`...)
			case c == '\n':
				b = append(b, `\n`...)
			case c == '\r':
				b = append(b, `\r`...)
			case c == '\t':
				b = append(b, `\t`...)
			default:
				b = append(b, `\u00`...)
				b = append(b, digits[c>>4], digits[c&15])
			}
			i++
			continue
		}
		r, size := utf8.DecodeRuneInString(text[i:])
		switch {
		case r == utf8.RuneError && size == 1:
			b = append(b, `\ufffd`...)
		case r == '\u2028' || r == '\u2029': // line ends in old JavaScript
			b = append(b, `\u202`...)
			b = append(b, digits[r&15])
		default:
			b = append(b, text[i:i+size]...)
		}
		i += size
	}
	return append(b, '"')
}
