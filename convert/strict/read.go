package strict

import (
	"bytes"
	"fmt"
	"reflect"
	"slices"
	"strconv"
	"strings"
	"unicode/utf16"
	"unicode/utf8"
)

// Unmarshal reads one JSON value into what v points to. An error is an *Error.
// null leaves a value as it is. Bytes take any value as it stands, as a part of
// data, and a map takes an object of numbers and texts.
func Unmarshal(data []byte, v any) error {
	r := reader{data: data}
	if err := r.value(reflect.ValueOf(v).Elem()); err != nil {
		return err
	}
	if r.space(); r.at < len(data) {
		return r.syntax("the end")
	}
	return nil
}

// reader reads JSON from left to right. How deep it goes is bounded by the
// types it reads into, not by the input.
type reader struct {
	data []byte
	at   int
}

func (r *reader) space() {
	for r.at < len(r.data) && strings.IndexByte(" \t\r\n", r.data[r.at]) >= 0 {
		r.at++
	}
}

// next returns the next byte that is no space, 0 at the end.
func (r *reader) next() byte {
	if r.space(); r.at < len(r.data) {
		return r.data[r.at]
	}
	return 0
}

// take steps over a byte if it comes next.
func (r *reader) take(c byte) bool {
	if r.next() != c {
		return false
	}
	r.at++
	return true
}

func (r *reader) syntax(want string) error {
	return &Error{Problem: Syntax, Want: want, Got: r.excerpt(r.at)}
}

// wrong refuses the value that begins at a place.
func (r *reader) wrong(start int, want string) error {
	if start >= len(r.data) || strings.IndexByte(`"{[tfn-0123456789`, r.data[start]) < 0 {
		return &Error{Problem: Syntax, Want: want, Got: r.excerpt(start)} // no value begins there
	}
	return &Error{Problem: WrongType, Want: want, Got: r.excerpt(start)}
}

// excerpt is what stands at a place, as far as it helps to find it.
func (r *reader) excerpt(start int) string {
	const most = 40
	rest := bytes.TrimSpace(r.data[min(start, len(r.data)):])
	switch {
	case len(rest) == 0:
		return "nothing"
	case rest[0] == '"':
		if end := bytes.IndexByte(rest[1:], '"'); end >= 0 {
			rest = rest[:end+2]
		}
	case rest[0] != '{' && rest[0] != '[':
		if end := bytes.IndexAny(rest, ",]}\n"); end > 0 {
			rest = rest[:end]
		}
	}
	if len(rest) > most {
		return strings.ToValidUTF8(string(rest[:most]), "") + "…"
	}
	return strings.ToValidUTF8(string(rest), "\uFFFD")
}

func (r *reader) value(v reflect.Value) error {
	first := r.next()
	start := r.at
	if reflect.PointerTo(v.Type()).Implements(unmarshaler) {
		return r.itself(v.Addr().Interface().(Unmarshaler))
	}
	if first == 'n' {
		return r.word("null")
	}
	switch v.Kind() {
	case reflect.Pointer:
		v.Set(reflect.New(v.Type().Elem()))
		return r.value(v.Elem())
	case reflect.Struct:
		return r.object(v)
	case reflect.Slice:
		if v.Type().Elem().Kind() == reflect.Uint8 {
			return r.asItStands(v)
		}
		return r.list(v)
	case reflect.Map:
		return r.scalars(v)
	case reflect.String:
		if first != '"' {
			return r.wrong(start, "a text")
		}
		text, err := r.text()
		v.SetString(string(text))
		return err
	case reflect.Bool:
		if first != 't' && first != 'f' {
			return r.wrong(start, "true or false")
		}
		v.SetBool(first == 't')
		return r.word(strconv.FormatBool(first == 't'))
	case reflect.Int:
		literal, err := r.number("a whole number")
		if err != nil {
			return err
		}
		n, err := strconv.ParseInt(literal, 10, 0)
		if err != nil {
			return r.wrong(start, "a whole number")
		}
		v.SetInt(n)
		return nil
	case reflect.Float64:
		literal, err := r.number("a number")
		if err != nil {
			return err
		}
		n, err := strconv.ParseFloat(literal, 64)
		if err != nil {
			return r.wrong(start, "a number within bounds")
		}
		v.SetFloat(n)
		return nil
	}
	panic(fmt.Sprintf("strict cannot read into %s", v.Type()))
}

// itself hands a scalar to a type that reads itself.
func (r *reader) itself(u Unmarshaler) error {
	var err error
	start := r.at
	switch c := r.next(); {
	case c == '"':
		_, err = r.text()
	case c == 'n':
		err = r.word("null")
	case c == 't':
		err = r.word("true")
	case c == 'f':
		err = r.word("false")
	case c != '{' && c != '[':
		_, err = r.number("a value")
	}
	if err != nil {
		return err
	}
	if r.at == start {
		return r.wrong(start, "a number or a text")
	}
	if err := u.UnmarshalJSON(r.data[start:r.at]); err != nil {
		return r.wrong(start, err.Error())
	}
	return nil
}

func (r *reader) word(word string) error {
	if !bytes.HasPrefix(r.data[r.at:], []byte(word)) {
		return r.syntax(word)
	}
	r.at += len(word)
	return nil
}

func (r *reader) object(v reflect.Value) error {
	if !r.take('{') {
		return r.wrong(r.at, "an object")
	}
	if r.take('}') {
		return nil
	}
	known := fieldsOf(v.Type())
	seen := make([]bool, len(known))
	for {
		if r.next() != '"' {
			return r.syntax("a name in quotes")
		}
		name, err := r.text()
		if err != nil {
			return err
		}
		i := slices.IndexFunc(known, func(f field) bool { return f.name == string(name) })
		switch {
		case i < 0:
			return &Error{Problem: Unknown, Path: string(name), Want: "a known field", Got: string(name)}
		case seen[i]:
			return &Error{Problem: Duplicate, Path: string(name), Want: "the field once", Got: string(name)}
		case !r.take(':'):
			return r.syntax("a colon")
		}
		seen[i] = true
		if err := r.value(known[i].in(v)); err != nil {
			return within(err, known[i].name)
		}
		if !r.take(',') {
			break
		}
	}
	if !r.take('}') {
		return r.syntax("a comma or }")
	}
	return nil
}

func (r *reader) list(v reflect.Value) error {
	if !r.take('[') {
		return r.wrong(r.at, "a list")
	}
	v.Set(reflect.MakeSlice(v.Type(), 0, 0))
	if r.take(']') {
		return nil
	}
	for n := 0; ; n++ {
		v.Grow(1)
		v.SetLen(n + 1)
		element := v.Index(n)
		element.SetZero()
		if err := r.value(element); err != nil {
			return within(err, "["+strconv.Itoa(n)+"]")
		}
		if !r.take(',') {
			break
		}
	}
	if !r.take(']') {
		return r.syntax("a comma or ]")
	}
	return nil
}

// scalars reads an object into a map, whose values are numbers and texts.
func (r *reader) scalars(v reflect.Value) error {
	if !r.take('{') {
		return r.wrong(r.at, "an object")
	}
	v.Set(reflect.MakeMap(v.Type()))
	if r.take('}') {
		return nil
	}
	for {
		if r.next() != '"' {
			return r.syntax("a name in quotes")
		}
		text, err := r.text()
		if err != nil {
			return err
		}
		name := string(text)
		if !r.take(':') {
			return r.syntax("a colon")
		}
		value, err := r.scalar()
		if err != nil {
			return within(err, name)
		}
		v.SetMapIndex(reflect.ValueOf(name).Convert(v.Type().Key()), reflect.ValueOf(value))
		if !r.take(',') {
			break
		}
	}
	if !r.take('}') {
		return r.syntax("a comma or }")
	}
	return nil
}

// scalar reads a number or a text.
func (r *reader) scalar() (any, error) {
	if r.next() == '"' {
		text, err := r.text()
		return string(text), err
	}
	start := r.at
	literal, err := r.number("a number or a text")
	if err != nil {
		return nil, err
	}
	n, err := strconv.ParseFloat(literal, 64)
	if err != nil {
		return nil, r.wrong(start, "a number within bounds")
	}
	return n, nil
}

// asItStands keeps a value as it stands, to be read later: any object, or else
// any list, text, number, true, false or null. Only its brackets and its texts
// are looked at, to find its end.
func (r *reader) asItStands(v reflect.Value) error {
	r.next()
	start := r.at
	for depth := 0; ; {
		switch r.next() {
		case '"':
			if _, err := r.text(); err != nil {
				return err
			}
		case '{', '[':
			depth++
			r.at++
		case '}', ']':
			depth--
			r.at++
		case 0:
			return r.syntax("the rest of it")
		case ',', ':':
			if depth == 0 {
				return r.wrong(r.at, "a value")
			}
			r.at++
			continue
		default:
			r.at++
			for r.at < len(r.data) && strings.IndexByte(",:{}[]\" \t\r\n", r.data[r.at]) < 0 {
				r.at++
			}
		}
		if depth < 0 {
			r.at = start
			return r.syntax("a value")
		}
		if depth == 0 {
			v.SetBytes(r.data[start:r.at:r.at])
			return nil
		}
	}
}

// number steps over a number and returns it as it stands.
func (r *reader) number(want string) (string, error) {
	start := r.at
	digits := func() bool {
		from := r.at
		for r.at < len(r.data) && r.data[r.at] >= '0' && r.data[r.at] <= '9' {
			r.at++
		}
		return r.at > from
	}
	is := func(set string) bool {
		if r.at < len(r.data) && strings.IndexByte(set, r.data[r.at]) >= 0 {
			r.at++
			return true
		}
		return false
	}
	is("-")
	whole := is("0") || digits()
	if !whole || is(".") && !digits() {
		return "", r.notNumber(start, want)
	}
	if is("eE") {
		is("+-")
		if !digits() {
			return "", r.notNumber(start, want)
		}
	}
	return string(r.data[start:r.at]), nil
}

// notNumber tells a value of another type from a number that is malformed.
func (r *reader) notNumber(start int, want string) error {
	if r.at == start && r.at < len(r.data) && strings.IndexByte(`"{[tf`, r.data[start]) >= 0 {
		return r.wrong(start, want)
	}
	r.at = start
	return r.syntax(want)
}

// text reads a string. What it returns may be a part of the input. Bytes that
// are no UTF-8 become U+FFFD.
func (r *reader) text() ([]byte, error) {
	r.at++
	start := r.at
	for r.at < len(r.data) && r.data[r.at] != '"' && r.data[r.at] != '\\' && r.data[r.at] >= ' ' {
		r.at++
	}
	// Most texts end here, and need no copy.
	b := r.data[start:r.at:r.at]
	for r.at < len(r.data) {
		switch c := r.data[r.at]; {
		case c == '"':
			r.at++
			if !utf8.Valid(b) {
				b = []byte(string([]rune(string(b))))
			}
			return b, nil
		case c < ' ':
			return nil, r.syntax("no control character in a text")
		case c != '\\':
			b = append(b, c)
			r.at++
		default:
			escaped, ok := r.escape()
			if !ok {
				return nil, r.syntax("a valid escape")
			}
			b = utf8.AppendRune(b, escaped)
		}
	}
	return nil, r.syntax("a closing quote")
}

// escape reads what a backslash introduces.
func (r *reader) escape() (rune, bool) {
	if r.at+1 >= len(r.data) {
		return 0, false
	}
	c := r.data[r.at+1]
	if c == 'u' {
		return r.unicode()
	}
	i := strings.IndexByte(`"\/bfnrt`, c)
	if i < 0 {
		return 0, false
	}
	r.at += 2
	return rune("\"\\/\b\f\n\r\t"[i]), true
}

// unicode reads \uXXXX, or two of them that make a surrogate pair.
func (r *reader) unicode() (rune, bool) {
	first, ok := r.hex(r.at)
	if !ok {
		return 0, false
	}
	r.at += 6
	if utf16.IsSurrogate(first) {
		if second, ok := r.hex(r.at); ok {
			if pair := utf16.DecodeRune(first, second); pair != utf8.RuneError {
				r.at += 6
				return pair, true
			}
		}
		return utf8.RuneError, true
	}
	return first, true
}

func (r *reader) hex(at int) (rune, bool) {
	if at+6 > len(r.data) || r.data[at] != '\\' || r.data[at+1] != 'u' {
		return 0, false
	}
	n, err := strconv.ParseUint(string(r.data[at+2:at+6]), 16, 16)
	return rune(n), err == nil
}
