// Package strict reads JSON into Go types and writes it back. It takes nothing
// that the types do not describe: an unknown name, a name that stands twice or
// in other case, a value of another type is refused, with its path.
//
// encoding/json cannot say where it refused, takes names in any case and twice,
// and with what it needs makes up a tenth of what a phone has to load before the
// first result. The types keep its struct tags and method names, and the tests
// hold this package against it.
package strict

import (
	"fmt"
	"reflect"
	"strings"
	"sync"
)

// Problem says why JSON was refused.
type Problem int

// The problems.
const (
	Syntax    Problem = iota // it is no JSON
	Unknown                  // the types have no such field
	Duplicate                // the field stands twice
	WrongType                // the field takes another type of value
)

// Error says what was refused, and where.
type Error struct {
	Problem Problem
	Path    string // "readings[2].value"; "" for the whole
	Want    string // what should be there: "a number"
	Got     string // what is there
}

func (e *Error) Error() string {
	return fmt.Sprintf("%s: want %s, got %s", e.Path, e.Want, e.Got)
}

// within puts the error's path behind the field or element it came from.
func within(err error, outer string) error {
	e, ok := err.(*Error)
	if !ok {
		return err
	}
	switch {
	case e.Path == "" || e.Path[0] == '[':
		e.Path = outer + e.Path
	default:
		e.Path = outer + "." + e.Path
	}
	return e
}

// Marshaler writes itself as JSON. It is what encoding/json calls so.
type Marshaler interface{ MarshalJSON() ([]byte, error) }

// Unmarshaler reads itself from JSON. It is what encoding/json calls so, but it
// is only ever handed a text, a number, true, false or null, and its error
// completes the sentence "the field must be ...".
type Unmarshaler interface{ UnmarshalJSON([]byte) error }

var (
	marshaler   = reflect.TypeFor[Marshaler]()
	unmarshaler = reflect.TypeFor[Unmarshaler]()
)

// field is a struct field as JSON sees it.
type field struct {
	name      string
	key       []byte // the name as it is written, with quotes and colon
	index     []int  // where it stands, as reflect.Value.FieldByIndex takes it
	omitEmpty bool   // whether it is left out when empty
}

// fields remembers what the tags of each struct type say: reflect.Type to []field.
var fields sync.Map

// fieldsOf lists the fields of a struct, those of embedded structs among them. An
// embedded pointer to a struct is nil while none of its fields is there.
func fieldsOf(t reflect.Type) []field {
	if known, ok := fields.Load(t); ok {
		return known.([]field)
	}
	var all []field
	for i := range t.NumField() {
		f := t.Field(i)
		if !f.IsExported() {
			continue
		}
		if f.Anonymous {
			embedded := f.Type
			if embedded.Kind() == reflect.Pointer {
				embedded = embedded.Elem()
			}
			for _, inner := range fieldsOf(embedded) {
				inner.index = append([]int{i}, inner.index...)
				all = append(all, inner)
			}
			continue
		}
		name, options, _ := strings.Cut(f.Tag.Get("json"), ",")
		all = append(all, field{name: name, key: append(appendText(nil, name), ':'), index: []int{i}, omitEmpty: options == "omitempty"})
	}
	fields.Store(t, all)
	return all
}

// in returns the field of a struct, and makes what it is embedded in.
func (f field) in(v reflect.Value) reflect.Value {
	last := len(f.index) - 1
	for _, i := range f.index[:last] {
		if v = v.Field(i); v.Kind() == reflect.Pointer {
			if v.IsNil() {
				v.Set(reflect.New(v.Type().Elem()))
			}
			v = v.Elem()
		}
	}
	return v.Field(f.index[last])
}
