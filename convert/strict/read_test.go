package strict_test

import (
	"encoding/json"
	"errors"
	"fmt"
	"math/rand/v2"
	"reflect"
	"slices"
	"strconv"
	"strings"
	"testing"

	"strikebook/convert/record"
	"strikebook/convert/record/recordtest"
	"strikebook/convert/strict"
)

// sameRead holds Unmarshal against encoding/json: both refuse, or both read the
// same.
func sameRead[T any](t *testing.T, data string) {
	t.Helper()
	var got, want T
	err := strict.Unmarshal([]byte(data), &got)
	wantErr := standardUnmarshal([]byte(data), &want)
	switch {
	case (err == nil) != (wantErr == nil):
		t.Errorf("%T from %.200q: %v, encoding/json: %v", got, data, err, wantErr)
	case err == nil && !reflect.DeepEqual(got, want):
		t.Errorf("%T from %.200q: %#v, encoding/json: %#v", got, data, got, want)
	}
}

// sameReadEverywhere reads a value into every kind of type, alone and deeper
// down.
func sameReadEverywhere(t *testing.T, value string) {
	t.Helper()
	sameRead[string](t, value)
	sameRead[int](t, value)
	sameRead[bool](t, value)
	sameRead[[]bool](t, "["+value+"]")
	sameRead[float64](t, value)
	sameRead[*float64](t, value)
	sameRead[[]float64](t, value)
	sameRead[[][]string](t, value)
	sameRead[part](t, value)
	sameRead[**part](t, value)
	sameRead[[]part](t, "["+value+"]")
	sameRead[[]*part](t, "[{} , "+value+"\n]")
	for _, field := range []string{"text", "count", "number", "maybe", "part", "option", "list", "parts", "rows"} {
		sameRead[whole](t, `{"`+field+`":`+value+`}`)
	}
}

func TestReadsAsEncodingJSON(t *testing.T) {
	for _, values := range []struct {
		name string
		all  []string
	}{
		{"words", []string{
			"null", "true", "false", "nul", "nulll", "Null", "tru", "truefalse", "undefined", "NaN", "Infinity", "-Infinity", "n", "t",
		}},
		{"numbers", []string{
			"0", "-0", "1", "-1", "10", "1.0", "1.5", "1e2", "1E+2", "1e-2", "0e0", "0.0e-0", "1e308", "1e309", "-1e400", "1e-400", "5e-324",
			"9223372036854775807", "-9223372036854775808", "9223372036854775808", "-9223372036854775809",
			"123456789012345678901234567890", "0." + strings.Repeat("3", 400), strings.Repeat("9", 400),
			"01", "00", "-01", "+1", ".5", "-.5", "5.", "1.e2", "1e", "1e+", "1e+-1", "-", "--1", "1-", "0x10", "1_000", "1,5", "１", "1 2", "1f",
		}},
		{"texts", []string{
			`""`, `"text"`, `"a,b]}"`, `"\"\\\/\b\f\n\r\t"`, `"\u0041\u00e9\u6f22"`, `"\uABCD\uabcd"`, `"\u0000"`,
			`"\ud83d\ude00"`, `"\ud83d"`, `"\ude00"`, `"\ude00\ud83d"`, `"\ud83d\ud83d\ude00"`, `"\ud83dx"`, `"\ud83d\n"`, `"\ud83d\u0041"`,
			`"\ufffd\ufeff\u2028"`, "\"\u2028\u007f\ufeff\"", `"é漢😀"`,
			`"`, `"\"`, `"\`, `"\q"`, `"\'"`, `"\U0041"`, `"\u"`, `"\u12"`, `"\u12g4"`, `"\u+123"`, `"\u 123"`, `"\ud83d\u12"`, `"\ud83d\u12g4"`, `"\x41"`, `"\0"`,
			"\"\n\"", "\"\t\"", "\"\x00\"", "\"\x1f\"", `'text'`, "`text`", `"a""b"`, `"a" "b"`, `text`,
		}},
		{"lists", []string{
			`[]`, `[ ]`, `[1]`, `[1,2]`, " [ 1 ,\t2\r\n] ", `[null]`, `[1,null,3]`, `[[]]`, `[["a"],[],null,["b","c"]]`, `["a"]`, `[{}]`,
			`[`, `]`, `[1`, `[1,`, `[1,]`, `[,1]`, `[,]`, `[1 2]`, `[1:2]`, `[1}`, `[1]]`, `[[]`, `(1)`,
		}},
		{"objects", []string{
			`{}`, `{ }`, `{"name":"a"}`, ` { "name" : "a" , "size" : 1 } `, `{"size":null}`, `{"name":null,"tags":null}`, `{"tags":[]}`,
			`{"n\u0061me":"a"}`, `{"part":{"size":1}}`, `{"":1}`, `{"colour":1}`, `{"name ":1}`,
			`{`, `}`, `{"name"`, `{"name":`, `{"name":}`, `{"name":"a"`, `{"name":"a",`, `{"name":"a",}`, `{,}`, `{:}`, `{"name""a"}`, `{"name":"a""size":1}`,
			`{"name":"a";"size":1}`, `{name:"a"}`, `{'name':"a"}`, `{1:"a"}`, `{null:"a"}`, `{"name":"a"]`, `{"name":"a"}}`, `{"name":"a"`, `{"na` + "\n" + `me":"a"}`,
		}},
		{"around a value", []string{
			"", " ", "\t\r\n", " 1 ", "\v1", "\f1", "\u00a01", "\u20281", "\ufeff1", "\x001", "1\x00", "/**/1", "1//", "1;", "1,", "{},", `""//`, "{}null",
		}},
	} {
		t.Run(values.name, func(t *testing.T) {
			for _, value := range values.all {
				sameReadEverywhere(t, value)
			}
		})
	}
}

func TestReadsEveryEscape(t *testing.T) {
	for unit := range 1 << 16 {
		sameRead[string](t, fmt.Sprintf(`"\u%04x"`, unit))
		sameRead[string](t, fmt.Sprintf(`"\uD83D\u%04Xx"`, unit))
		sameRead[string](t, fmt.Sprintf(`"\u%04x\udc00"`, unit))
	}
	for c := range 1 << 8 {
		sameRead[string](t, `"\`+string([]byte{byte(c)})+`"`)
		sameRead[string](t, `"a`+string([]byte{byte(c)})+`b"`)
	}
}

func TestReadsNumbers(t *testing.T) {
	rng := rand.New(rand.NewPCG(13, 14))
	digits := func() string { return strconv.FormatUint(rng.Uint64()>>rng.IntN(65), 10) }
	for range 20000 {
		literal := digits()
		if rng.IntN(2) == 0 {
			literal += "." + digits() + digits()
		}
		if rng.IntN(2) == 0 {
			literal += fmt.Sprintf("e%+d", rng.IntN(700)-350)
		}
		sameRead[float64](t, literal)
		sameRead[int](t, "-"+literal)
	}
}

// Damage of a character or two: whatever encoding/json then says, so does
// Unmarshal, but for names in another case or twice.
func TestReadsDamagedAsEncodingJSON(t *testing.T) {
	rng := rand.New(rand.NewPCG(15, 16))
	tokens := strings.Split(`{ } [ ] , : " \ 0 1 - . e null true "text" "name" 1.5 [] {}`, " ")
	var texts []string
	randomWholes(t, 20, func(v whole) {
		v.Text, v.Spare = "", "" // hundreds of characters would take all of the damage
		texts = append(texts, mustMarshal(t, v), mustMarshal(t, sample()))
	})
	for range 20000 {
		text := []rune(texts[rng.IntN(len(texts))])
		for range 1 + rng.IntN(2) {
			at := rng.IntN(len(text))
			token := []rune(tokens[rng.IntN(len(tokens))])
			text = slices.Replace(text, at, at+rng.IntN(2), token[:rng.IntN(len(token)+1)]...)
		}
		sameUnlessStricter(t, []byte(string(text)))
	}
}

// sameUnlessStricter is sameRead for what may hold names in another case or
// twice, which Unmarshal alone refuses.
func sameUnlessStricter(t *testing.T, data []byte) {
	t.Helper()
	var v whole
	if e := asError(t, strict.Unmarshal(data, &v)); e != nil && json.Valid(data) && (e.Problem == strict.Unknown || e.Problem == strict.Duplicate) {
		return
	}
	sameRead[whole](t, string(data))
}

// asError makes sure that an error is one of this package.
func asError(t *testing.T, err error) *strict.Error {
	t.Helper()
	var e *strict.Error
	if err != nil && !errors.As(err, &e) {
		t.Errorf("the error is no *strict.Error: %v", err)
	}
	return e
}

func TestReadsRecordsAsEncodingJSON(t *testing.T) {
	rng := rand.New(rand.NewPCG(17, 18))
	for i := range 500 {
		data := mustMarshal(t, recordtest.Random(rng))
		var got, want record.Record
		if err := strict.Unmarshal([]byte(data), &got); err != nil {
			t.Fatalf("record %d: %v", i, err)
		}
		if err := standardUnmarshal([]byte(data), &want); err != nil {
			t.Fatalf("record %d: %v", i, err)
		}
		if !recordtest.Equal(got, want) {
			t.Errorf("record %d from %s:\ngot  %#v\nwant %#v", i, data, got, want)
		}
	}
}

// The differences that the comments of the package and of Unmarshaler name.
func TestRefusesWhatEncodingJSONTakes(t *testing.T) {
	type reads struct {
		N number `json:"n"`
	}
	for _, c := range []struct {
		name, data string
		into       func() any
		want       strict.Problem
		path       string
	}{
		{"a name in other case", `{"Text":"a"}`, func() any { return new(whole) }, strict.Unknown, "Text"},
		{"a name in other case, deep down", `{"parts":[{"NAME":"a"}]}`, func() any { return new(whole) }, strict.Unknown, "parts[0].NAME"},
		{"a long s for an s", `{"ſpare":"a"}`, func() any { return new(whole) }, strict.Unknown, "ſpare"},
		{"a name twice", `{"text":"a","text":"a"}`, func() any { return new(whole) }, strict.Duplicate, "text"},
		{"a name twice, once null", `{"maybe":null,"maybe":1}`, func() any { return new(whole) }, strict.Duplicate, "maybe"},
		{"an unknown name", `{"text":"a","colour":null}`, func() any { return new(whole) }, strict.Unknown, "colour"},
		{"an object for what reads itself", `{"n":{"a":1}}`, func() any { return new(reads) }, strict.WrongType, "n"},
		{"a list for what reads itself", `{"n":[1]}`, func() any { return new(reads) }, strict.WrongType, "n"},
	} {
		t.Run(c.name, func(t *testing.T) {
			if err := json.Unmarshal([]byte(c.data), c.into()); err != nil {
				t.Fatalf("encoding/json: %v", err)
			}
			e := asError(t, strict.Unmarshal([]byte(c.data), c.into()))
			if e == nil || e.Problem != c.want || e.Path != c.path {
				t.Errorf("%#v, want problem %d at %q", e, c.want, c.path)
			}
		})
	}
}

func TestReadsItself(t *testing.T) {
	for _, value := range []string{"1", "-0.5e3", `"a\"b"`, "null", "true"} {
		var got []number
		if err := strict.Unmarshal([]byte("[ "+value+" ]"), &got); err != nil || len(got) != 1 || got[0].value != value {
			t.Errorf("%s: %v (%v)", value, got, err)
		}
	}
	var got *number
	if err := strict.Unmarshal([]byte("null"), &got); err != nil || got != nil {
		t.Errorf("null: %v (%v), want a nil pointer", got, err)
	}
}

func TestErrors(t *testing.T) {
	for _, c := range []struct {
		name, data string
		want       strict.Error
	}{
		{"unknown", `{"colour":"red"}`, strict.Error{Problem: strict.Unknown, Path: "colour", Want: "a known field", Got: "colour"}},
		{"unknown in a field", `{"part":{"colour":1}}`, strict.Error{Problem: strict.Unknown, Path: "part.colour", Want: "a known field", Got: "colour"}},
		{"unknown in a list", `{"parts":[{},{"x\ty":1}]}`, strict.Error{Problem: strict.Unknown, Path: "parts[1].x\ty", Want: "a known field", Got: "x\ty"}},
		{"unknown name of nothing", `{"":1}`, strict.Error{Problem: strict.Unknown, Want: "a known field"}},

		{"twice", `{"text":"a","count":1,"text":"b"}`, strict.Error{Problem: strict.Duplicate, Path: "text", Want: "the field once", Got: "text"}},
		{"twice, once escaped", `{"text":"a","t\u0065xt":"b"}`, strict.Error{Problem: strict.Duplicate, Path: "text", Want: "the field once", Got: "text"}},
		{"twice in a field", `{"option":{"size":1,"size":1}}`, strict.Error{Problem: strict.Duplicate, Path: "option.size", Want: "the field once", Got: "size"}},

		{"number for text", `{"text":12.5}`, strict.Error{Problem: strict.WrongType, Path: "text", Want: "a text", Got: "12.5"}},
		{"text for number", `{"number":"12"}`, strict.Error{Problem: strict.WrongType, Path: "number", Want: "a number", Got: `"12"`}},
		{"text for whole number", `{"count":"1"}`, strict.Error{Problem: strict.WrongType, Path: "count", Want: "a whole number", Got: `"1"`}},
		{"fraction for whole number", `{"count":1.5}`, strict.Error{Problem: strict.WrongType, Path: "count", Want: "a whole number", Got: "1.5"}},
		{"whole number without end", `{"count":9223372036854775808}`, strict.Error{Problem: strict.WrongType, Path: "count", Want: "a whole number", Got: "9223372036854775808"}},
		{"number without end", `{"maybe":1e309}`, strict.Error{Problem: strict.WrongType, Path: "maybe", Want: "a number within bounds", Got: "1e309"}},
		{"word for number", `{"list":[1,true]}`, strict.Error{Problem: strict.WrongType, Path: "list[1]", Want: "a number", Got: "true"}},
		{"list for object", `{"part":[]}`, strict.Error{Problem: strict.WrongType, Path: "part", Want: "an object", Got: "[]}"}},
		{"object for list", `{"list":{}}`, strict.Error{Problem: strict.WrongType, Path: "list", Want: "a list", Got: "{}}"}},
		{"number for list in a list", `{"rows":[[],3]}`, strict.Error{Problem: strict.WrongType, Path: "rows[1]", Want: "a list", Got: "3"}},
		{"number in a list in a list", `{"rows":[[],["a",3]]}`, strict.Error{Problem: strict.WrongType, Path: "rows[1][1]", Want: "a text", Got: "3"}},
		{"text in a list in a field in a list", `{"parts":[{"tags":["a",{}]}]}`, strict.Error{Problem: strict.WrongType, Path: "parts[0].tags[1]", Want: "a text", Got: "{}]}]}"}},
		{"a long one", `{"number":"` + strings.Repeat("é", 40) + `"}`, strict.Error{Problem: strict.WrongType, Path: "number", Want: "a number", Got: `"` + strings.Repeat("é", 19) + "…"}},

		{"a comma missing", `{"text":"a" "count":1}`, strict.Error{Want: "a comma or }", Got: `"count"`}},
		{"a comma missing in a list", `{"list":[1 2]}`, strict.Error{Path: "list", Want: "a comma or ]", Got: "2"}},
		{"a comma too many", `{"part":{"name":"a",}}`, strict.Error{Path: "part", Want: "a name in quotes", Got: "}}"}},
		{"a comma too many in a list", `{"list":[1,]}`, strict.Error{Path: "list[1]", Want: "a number", Got: "]}"}},
		{"a colon missing", `{"text" "a"}`, strict.Error{Want: "a colon", Got: `"a"`}},
		{"quotes missing", `{text:"a"}`, strict.Error{Want: "a name in quotes", Got: `text:"a"`}},
		{"cut off", `{"text":"a`, strict.Error{Path: "text", Want: "a closing quote", Got: "nothing"}},
		{"cut off after a value", `{"text":"a"`, strict.Error{Want: "a comma or }", Got: "nothing"}},
		{"a bad escape", `{"text":"a\qb"}`, strict.Error{Path: "text", Want: "a valid escape", Got: `\qb"`}},
		{"a bad escape in a name", `{"\u12":1}`, strict.Error{Want: "a valid escape", Got: `\u12":1`}},
		{"a line end in a text", "{\"text\":\"a\nb\"}", strict.Error{Path: "text", Want: "no control character in a text", Got: `b"`}},
		{"a point without digits", `{"number":5.}`, strict.Error{Path: "number", Want: "a number", Got: "5."}},
		{"a leading zero", `{"number":05}`, strict.Error{Want: "a comma or }", Got: "5"}},
		{"half a word", `{"maybe":nul}`, strict.Error{Path: "maybe", Want: "null", Got: "nul"}},
		{"more behind it", `{} {"text":"a"}`, strict.Error{Want: "the end", Got: `{"text":"a"}`}},
		{"a bracket too many", "{}}", strict.Error{Want: "the end", Got: "}"}},
	} {
		t.Run(c.name, func(t *testing.T) {
			var v whole
			if e := asError(t, strict.Unmarshal([]byte(c.data), &v)); e == nil || *e != c.want {
				t.Errorf("%s:\ngot  %#v\nwant %#v", c.data, e, c.want)
			}
		})
	}
}

func TestErrorOfATypeThatReadsItself(t *testing.T) {
	var v struct {
		N []number `json:"n"`
	}
	e := asError(t, strict.Unmarshal([]byte(`{"n":[1,false]}`), &v))
	want := strict.Error{Problem: strict.WrongType, Path: "n[1]", Want: "anything but false", Got: "false"}
	if e == nil || *e != want {
		t.Errorf("got  %#v\nwant %#v", e, want)
	}
	if got := want.Error(); got != "n[1]: want anything but false, got false" {
		t.Errorf("as a sentence: %s", got)
	}
}

// The types bound how deep the reader goes, however deep the input is.
func TestDepth(t *testing.T) {
	const deep = 1 << 20
	for _, c := range []struct{ name, before, opening, path string }{
		{"lists", `{"rows":`, "[", "rows[0][0]"},
		{"objects", `{"part":`, `{"part":`, "part.part"},
		{"lists in what reads itself", `{"n":[`, "[", "n[0]"},
	} {
		t.Run(c.name, func(t *testing.T) {
			var v struct {
				Rows [][]string `json:"rows"`
				Part part       `json:"part"`
				N    []number   `json:"n"`
			}
			e := asError(t, strict.Unmarshal([]byte(c.before+strings.Repeat(c.opening, deep)), &v))
			if e == nil || e.Path != c.path || len(e.Got) > 100 {
				t.Errorf("%#v, want an error at %s", e, c.path)
			}
		})
	}
}

func FuzzUnmarshal(f *testing.F) {
	f.Add([]byte(mustMarshal(f, sample())))
	f.Add([]byte(` { "te\u0078t" : "\ud83d\ude00é" , "rows" : [ [ ] , null ] , "count" : -0 } `))
	f.Add([]byte(`{"Text":1}`))
	f.Fuzz(func(t *testing.T, data []byte) {
		sameUnlessStricter(t, data)
		var v, again whole
		if err := strict.Unmarshal(data, &v); err != nil {
			return
		}
		text := mustMarshal(t, v)
		if err := strict.Unmarshal([]byte(text), &again); err != nil || mustMarshal(t, again) != text {
			t.Errorf("%s came back as %s (%v)", text, mustMarshal(t, again), err)
		}
	})
}
