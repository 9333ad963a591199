package recordtest

import (
	"math"
	"math/rand/v2"
	"reflect"
	"testing"

	"strikebook/convert/record"
)

func TestRandomIsValidAndRepeats(t *testing.T) {
	a, b := rand.New(rand.NewPCG(1, 2)), rand.New(rand.NewPCG(1, 2))
	for i := range 2000 {
		r := Random(a)
		if err := r.Validate(); err != nil {
			t.Fatalf("record %d: %v", i, err)
		}
		if !Equal(r, Random(b)) {
			t.Fatalf("record %d differs with the same seed", i)
		}
	}
}

// A field that is added to the record must be added to Random as well.
func TestRandomFillsEveryField(t *testing.T) {
	filled := map[string]bool{}
	rng := rand.New(rand.NewPCG(3, 4))
	for range 1000 {
		note(reflect.ValueOf(Random(rng)), "record", filled)
	}
	for path, ok := range filled {
		if !ok {
			t.Errorf("%s is never filled", path)
		}
	}
}

// note notes the fields of a value, and whether they hold something.
func note(v reflect.Value, path string, filled map[string]bool) {
	filled[path] = filled[path] || !v.IsZero()
	switch v.Kind() {
	case reflect.Pointer:
		if v.IsNil() {
			v = reflect.New(v.Type().Elem())
		}
		note(v.Elem(), path, filled)
	case reflect.Slice:
		note(reflect.Zero(v.Type().Elem()), path+"[]", filled)
		for i := range v.Len() {
			note(v.Index(i), path+"[]", filled)
		}
	case reflect.Struct:
		for i := range v.NumField() {
			note(v.Field(i), path+"."+v.Type().Field(i).Name, filled)
		}
	}
}

func TestEqual(t *testing.T) {
	nothing := record.Number{Value: math.NaN()}
	typed := record.Number{Value: math.NaN(), Text: "6l2"}
	reads := func(n ...record.Number) record.Record {
		r := record.Record{V: 1, Block: &record.Block{Readings: n}}
		for _, value := range n {
			r.Readings = append(r.Readings, record.Reading{Value: value})
		}
		return r
	}
	empty := record.Record{V: 1, Readings: []record.Reading{}, Block: &record.Block{Readings: []record.Number{}}}
	for _, c := range []struct {
		name string
		a, b record.Record
		want bool
	}{
		{"what is no number", reads(nothing, typed), reads(nothing, typed), true},
		{"nothing and a text", reads(nothing), reads(typed), false},
		{"nothing and zero", reads(nothing), reads(record.Num(0)), false},
		{"empty lists and none", empty, reads(), true},
		{"one number and two", reads(record.Num(1)), reads(record.Num(1), record.Num(1)), false},
		{"another label", record.Record{Label: "a"}, record.Record{Label: "b"}, false},
	} {
		if got := Equal(c.a, c.b); got != c.want {
			t.Errorf("%s: %t, want %t", c.name, got, c.want)
		}
	}
}
