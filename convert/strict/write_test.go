package strict_test

import (
	"fmt"
	"math"
	"math/rand/v2"
	"strings"
	"testing"
	"unicode"
	"unicode/utf8"

	"strikebook/convert"
	"strikebook/convert/record/recordtest"
	"strikebook/convert/scale"
	"strikebook/convert/strict"
)

// sameWritten holds Marshal against encoding/json. A name is asked for only
// where they differ.
func sameWritten(t *testing.T, v any, name func() string) {
	t.Helper()
	got, err := strict.Marshal(v)
	want, wantErr := standardMarshal(v)
	if (err == nil) != (wantErr == nil) || err == nil && string(got) != want {
		t.Errorf("%s:\ngot  %s (%v)\nwant %s (%v)", name(), got, err, want, wantErr)
	}
}

func TestWritesAsEncodingJSON(t *testing.T) {
	named := map[string]any{}
	for _, key := range []string{"b", "a", "", "é", "\"", "aa", "\xff"} {
		named[key] = key
	}
	for _, c := range []struct {
		name  string
		value any
	}{
		{"nil", nil},
		{"a nil pointer", (*whole)(nil)},
		{"a pointer", &part{Name: "web"}},
		{"a pointer to a pointer", new(new(1.5))},
		{"true", true},
		{"false", false},
		{"an empty struct", struct{}{}},
		{"an empty list", []string{}},
		{"lists of lists", [][]int{{1}, {}, {2, 3}}},
		{"an empty map", map[string]int{}},
		{"a map in the order of its keys", named},
		{"anything", []any{nil, 1, 2.5, "three", true, []any{}, map[string]any{"x": nil}, &part{}}},
		{"what writes itself", number{"7e2"}},
		{"a pointer to what writes itself", &number{`"seven"`}},
		{"no pointer to what writes itself", (*number)(nil)},
		{"what writes itself, deep down", map[string][]number{"n": {{"1"}, {"null"}}}},
		{"what cannot write itself", []number{{}}},
		{"a text of a type of its own", scale.HBW},
		{"least integer", math.MinInt},
		{"all fields", sample()},
		{"a channel", make(chan int)},
		{"a channel in a map", map[string]any{"a": make(chan int)}},
		{"no number in a field", whole{Number: math.NaN(), List: []float64{}, Rows: [][]string{}}},
		{"no number in a list", []float64{1, math.Inf(-1)}},
	} {
		t.Run(c.name, func(t *testing.T) {
			sameWritten(t, c.value, func() string { return "written" })
		})
	}
}

// The differences that the comment of Marshal names.
func TestWritesOtherThanEncodingJSON(t *testing.T) {
	for _, c := range []struct {
		name  string
		value any
		want  string
	}{
		{"a nil list", []float64(nil), "[]"},
		{"a nil list in a list", [][]string{nil, {"a"}}, `[[],["a"]]`},
		{"a nil map", map[string]int(nil), "{}"},
		{"nil lists in fields", whole{}, `{"text":"","count":0,"number":0,"maybe":null,"part":{},"empty":{},"list":[],"rows":[]}`},
		{"HTML stays", "<a href='x'>&</a>", `"<a href='x'>&</a>"`},
	} {
		t.Run(c.name, func(t *testing.T) {
			if got := mustMarshal(t, c.value); got != c.want {
				t.Errorf("got  %s\nwant %s", got, c.want)
			}
		})
	}
}

func TestWritesEveryCharacter(t *testing.T) {
	const block = 0x400 // the whole in one text would make a difference hard to read
	for first := rune(0); first <= unicode.MaxRune; first += block {
		var b strings.Builder
		for r := first; r < first+block; r++ {
			b.WriteRune(r)
		}
		sameWritten(t, b.String(), func() string { return fmt.Sprintf("from %U", first) })
	}
}

// No UTF-8: all pairs of bytes, which hold stray, cut off and overlong ones,
// and what takes three bytes or more.
func TestWritesEveryByte(t *testing.T) {
	for pair := range 1 << 16 {
		text := string([]byte{byte(pair >> 8), byte(pair)})
		sameWritten(t, text, func() string { return fmt.Sprintf("%q", text) })
	}
	for _, text := range []string{"\xed\xa0\x80", "\xf0\x9f\x98", "\xf4\x90\x80\x80", "\xe2\x80\xa8\xe2\x80", "a\xe2\x82z", "\xc0\x80"} {
		sameWritten(t, text, func() string { return fmt.Sprintf("%q", text) })
	}
}

func TestWritesNumbers(t *testing.T) {
	rng := rand.New(rand.NewPCG(9, 10))
	numbers := []float64{
		0, math.Copysign(0, -1), 1, -1, 0.1, 1.0 / 3, 100, 1e6, 123456789.125,
		1e-5, 1e-6, 9.99e-7, 1e-7, 1.5e-9, 1e-10, 1.25e-10, 1e-100, // where the plain form ends
		1e20, 999999999999999868928, 1e21, 1.5e21, 1e100,
		math.MaxFloat64, math.SmallestNonzeroFloat64, 1 << 53, 1<<53 + 2,
		math.NaN(), math.Inf(1), math.Inf(-1),
	}
	for exponent := -330; exponent <= 310; exponent++ {
		numbers = append(numbers, math.Pow10(exponent), -1.7*math.Pow10(exponent))
	}
	for range 20000 {
		numbers = append(numbers, math.Float64frombits(rng.Uint64()), math.Round(rng.Float64()*1e5)/100)
	}
	for _, f := range numbers {
		sameWritten(t, f, func() string { return fmt.Sprint(f) })
		sameWritten(t, whole{Share: f, Maybe: &f, List: []float64{f}, Rows: [][]string{}}, func() string { return fmt.Sprint(f, " in fields") })
	}
}

func TestWritesRecordsAndSheetsAsEncodingJSON(t *testing.T) {
	sameWritten(t, convert.NewCatalogue(), func() string { return "the catalogue" })
	rng := rand.New(rand.NewPCG(11, 12))
	for i := range 500 {
		r := recordtest.Random(rng)
		sameWritten(t, r, func() string { return fmt.Sprintf("record %d", i) })
		sheet, err := convert.Evaluate(r)
		if err != nil {
			t.Fatal(err)
		}
		sameWritten(t, sheet, func() string { return fmt.Sprintf("sheet %d", i) })
	}
}

func TestWrittenComesBack(t *testing.T) {
	randomWholes(t, 500, func(v whole) {
		text := mustMarshal(t, v)
		var got whole
		if err := strict.Unmarshal([]byte(text), &got); err != nil {
			t.Fatalf("%s: %v", text, err)
		}
		if again := mustMarshal(t, got); again != text {
			t.Fatalf("got  %s\nwant %s", again, text)
		}
		if !utf8.ValidString(text) {
			t.Fatalf("%q is no UTF-8", text)
		}
	})
}
