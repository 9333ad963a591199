package tabular

import (
	"reflect"
	"strconv"
	"strings"

	"strikebook/convert/record"
	"strikebook/convert/strict"
)

// field is a field of a record that a cell can hold.
type field struct {
	path  string // "piece.shape.wall_mm"
	index []int  // of the fields on the way there; pointers are followed
}

// readingsField is the one field that columns may share.
const readingsField = "readings"

// curveField holds more than a cell can show: it is written as JSON.
const curveField = "curve"

// fields are all that a record has, in its order, but for its version.
var fields = listFields(reflect.TypeFor[record.Record](), "", nil)

func listFields(t reflect.Type, prefix string, index []int) []field {
	var all []field
	for i := range t.NumField() {
		name, _, _ := strings.Cut(t.Field(i).Tag.Get("json"), ",")
		f := field{prefix + name, append(append([]int{}, index...), i)}
		inner := t.Field(i).Type
		if inner.Kind() == reflect.Pointer {
			inner = inner.Elem()
		}
		switch {
		case f.path == "v":
		case inner.Kind() == reflect.Struct && f.path != curveField:
			all = append(all, listFields(inner, f.path+".", f.index)...)
		default:
			all = append(all, f)
		}
	}
	return all
}

func fieldAt(path string) (field, bool) {
	for _, f := range fields {
		if f.path == path {
			return f, true
		}
	}
	return field{}, false
}

// Fields are the paths of the fields that a column can hold, in the order that
// Cells writes them.
func Fields() []string {
	paths := make([]string, len(fields))
	for i, f := range fields {
		paths[i] = f.path
	}
	return paths
}

// Cells writes a record as the cells of a row. Read gives it back, but for
// objects that hold nothing.
func Cells(r record.Record) []string {
	cells := make([]string, len(fields))
	for i, f := range fields {
		cells[i] = f.get(&r)
	}
	return cells
}

// get writes the field of a record, "" where it is left open.
func (f field) get(r *record.Record) string {
	v := reflect.ValueOf(r).Elem()
	for _, i := range f.index {
		if v.Kind() == reflect.Pointer {
			v = v.Elem()
		}
		v = v.Field(i)
		if v.Kind() == reflect.Pointer && v.IsNil() {
			return ""
		}
	}
	if f.path == curveField {
		text, err := strict.Marshal(v.Interface())
		if err != nil {
			return "" // a valid curve can be written
		}
		return string(text)
	}
	if v.Kind() == reflect.Pointer {
		return formatNumber(v.Elem().Float())
	}
	switch v.Kind() {
	case reflect.String:
		return v.String()
	case reflect.Float64:
		if v.IsZero() {
			return ""
		}
		return formatNumber(v.Float())
	}
	switch list := v.Interface().(type) {
	case []record.Reading:
		return formatReadings(list)
	case []record.Number:
		readings := make([]record.Reading, len(list))
		for i, n := range list {
			readings[i].Value = n
		}
		return formatReadings(readings)
	}
	return ""
}

func formatNumber(v float64) string { return strconv.FormatFloat(v, 'g', -1, 64) }

// set reads a cell into the field of a record; what is pointed to on the way is
// copied first, for other records may share it. It answers what the cell should
// have held, or "".
func (f field) set(r *record.Record, cell string, commaLists bool) (want string) {
	v := reflect.ValueOf(r).Elem()
	for _, i := range f.index {
		if v.Kind() == reflect.Pointer {
			own := reflect.New(v.Type().Elem())
			if !v.IsNil() {
				own.Elem().Set(v.Elem())
			}
			v.Set(own)
			v = own.Elem()
		}
		v = v.Field(i)
	}
	if f.path == curveField {
		own := reflect.New(v.Type())
		if err := strict.Unmarshal([]byte(cell), own.Interface()); err != nil {
			return "the JSON of a curve"
		}
		v.Set(own.Elem())
		return ""
	}
	switch v.Kind() {
	case reflect.String:
		v.SetString(translated(f.path, cell))
		return ""
	case reflect.Float64, reflect.Pointer:
		n := record.ParseNumber(cell)
		if n.Text != "" {
			return "a number"
		}
		if v.Kind() == reflect.Pointer {
			v.Set(reflect.ValueOf(&n.Value))
		} else {
			v.SetFloat(n.Value)
		}
		return ""
	}
	readings := parseReadings(cell, commaLists)
	switch list := v.Addr().Interface().(type) {
	case *[]record.Reading:
		*list = append(*list, readings...)
	case *[]record.Number:
		*list = nil
		for _, reading := range readings {
			*list = append(*list, reading.Value)
		}
	}
	return ""
}
