package strict_test

import (
	"encoding/json"
	"errors"
	"reflect"
	"strings"
	"testing"

	"strikebook/convert/strict"
)

// A value that is kept as it stands can be read later, whatever it holds.
func TestAsItStands(t *testing.T) {
	type book struct {
		V    int      `json:"v"`
		All  [][]byte `json:"all"`
		Last string   `json:"last"`
	}
	values := []string{
		`{}`, `[]`, `{"a":[1,{"b":"}]\"{["}],"c":null}`, `"text"`, `"\\"`, `-1.5e3`, `true`, `false`, ` {"a" : 1}`, "[\n1\t]",
		`{"unknown":"field"}`, `{"a":1 "b":2}`, `{"a" 1}`, `[1,,2]`, `0x10`, `{"漢":"😀"}`, // some no JSON, but of a plain end
	}
	text := `{"v":1,"all":[` + strings.Join(values, ",") + `],"last":"here"}`
	var got book
	if err := strict.Unmarshal([]byte(text), &got); err != nil {
		t.Fatal(err)
	}
	if len(got.All) != len(values) || got.V != 1 || got.Last != "here" {
		t.Fatalf("%+v", got)
	}
	for i, value := range got.All {
		if string(value) != strings.TrimSpace(values[i]) {
			t.Errorf("%q came back as %q", values[i], value)
		}
	}
	if again := mustMarshal(t, got); again != strings.ReplaceAll(strings.ReplaceAll(text, ", ", ","), ",\n", ",") {
		t.Errorf("written as %s", again)
	}
	for _, damaged := range []string{
		`{"all":[{]}`, `{"all":[{"a":1]}`, `{"all":[`, `{"all":[{"a`, `{"all":["a]}`, `{"all":[,]}`, `{"all":[:]}`, `{"all":[}`, `{"all":[{}{}]}`, `{"all":[1 2]}`, "{\"all\":[\"\n\"]}",
	} {
		var none book
		var e *strict.Error
		if err := strict.Unmarshal([]byte(damaged), &none); !errors.As(err, &e) || e.Problem != strict.Syntax {
			t.Errorf("%s: %v, want a problem of syntax", damaged, err)
		}
	}
	// What is kept must not grow into what follows it.
	_ = append(got.All[0], "overwritten"...)
	if string(got.All[1]) != "[]" {
		t.Errorf("the second value became %q", got.All[1])
	}
}

func TestMapOfScalars(t *testing.T) {
	type params map[string]any
	for _, text := range []string{`{}`, `{"a":1,"b":"two","c":-0.5e-3,"":"é"}`, ` { "a" : 1 } `} {
		var got params
		var want map[string]any
		if err := strict.Unmarshal([]byte(text), &got); err != nil {
			t.Fatalf("%s: %v", text, err)
		}
		if err := json.Unmarshal([]byte(text), &want); err != nil {
			t.Fatal(err)
		}
		if !reflect.DeepEqual(map[string]any(got), want) {
			t.Errorf("%s: %v", text, got)
		}
	}
	for text, problem := range map[string]strict.Problem{
		`{"a":true}`: strict.WrongType, `{"a":{}}`: strict.WrongType, `[]`: strict.WrongType, `{"a":1e999}`: strict.WrongType,
		`{"a":1`: strict.Syntax, `{a:1}`: strict.Syntax, `{"a" 1}`: strict.Syntax, `{"a":1,}`: strict.Syntax, `{"a":null}`: strict.Syntax,
	} {
		var got params
		var e *strict.Error
		if err := strict.Unmarshal([]byte(text), &got); !errors.As(err, &e) || e.Problem != problem {
			t.Errorf("%s: %v, want problem %d", text, err, problem)
		}
	}
}
