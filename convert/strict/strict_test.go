package strict_test

import (
	"bytes"
	"encoding/json"
	"errors"
	"math"
	"math/rand"
	"reflect"
	"strings"
	"testing"
	"testing/quick"

	"strikebook/convert/strict"
)

// part and whole have every kind of field that this package reads.
type part struct {
	Name string   `json:"name,omitempty"`
	Size *float64 `json:"size,omitempty"`
	Tags []string `json:"tags,omitempty"`
}

type whole struct {
	Text   string     `json:"text"`
	Spare  string     `json:"spare,omitempty"`
	Count  int        `json:"count"`
	Rest   int        `json:"rest,omitempty"`
	Number float64    `json:"number"`
	Share  float64    `json:"share,omitempty"`
	Maybe  *float64   `json:"maybe"`
	Part   part       `json:"part"`
	Empty  part       `json:"empty,omitempty"` // omitempty leaves no struct out
	Option *part      `json:"option,omitempty"`
	List   []float64  `json:"list"`
	Parts  []part     `json:"parts,omitempty"`
	Rows   [][]string `json:"rows"`
}

// randomWholes calls do with the same n random values each time.
func randomWholes(t *testing.T, n int, do func(whole)) {
	t.Helper()
	rng := rand.New(rand.NewSource(1))
	for range n {
		v, ok := quick.Value(reflect.TypeFor[whole](), rng)
		if !ok {
			t.Fatal("testing/quick makes no value")
		}
		do(v.Interface().(whole))
	}
}

// standardMarshal is what Marshal is held against.
func standardMarshal(v any) (string, error) {
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	err := e.Encode(v)
	return strings.TrimSuffix(b.String(), "\n"), err
}

// standardUnmarshal is what Unmarshal is held against. It takes names in any
// case and twice, which Unmarshal does not.
func standardUnmarshal(data []byte, v any) error {
	if !json.Valid(data) { // a decoder alone stops behind the first value
		return errors.New("no JSON")
	}
	d := json.NewDecoder(bytes.NewReader(data))
	d.DisallowUnknownFields()
	return d.Decode(v)
}

func mustMarshal(t testing.TB, v any) string {
	t.Helper()
	text, err := strict.Marshal(v)
	if err != nil {
		t.Fatal(err)
	}
	return string(text)
}

// number writes and reads itself, as a number or as a text.
type number struct{ value string }

func (n number) MarshalJSON() ([]byte, error) {
	if n.value == "" {
		return nil, errors.New("no value")
	}
	return []byte(n.value), nil
}

func (n *number) UnmarshalJSON(data []byte) error {
	if n.value = string(data); n.value == "false" {
		return errors.New("anything but false")
	}
	return nil
}

func sample() whole {
	return whole{
		Text: "Tail girder, field weld 2", Count: 5, Number: 611.2, Maybe: new(0.25),
		Part:   part{Name: "web", Size: new(18.0)},
		Option: &part{Tags: []string{"ground", "dry"}},
		List:   []float64{612, 608, 615, 611, math.Pi},
		Parts:  []part{{}, {Name: "flange"}},
		Rows:   [][]string{{"HV", "330"}, {}, {"HBW"}},
	}
}

func BenchmarkMarshal(b *testing.B) {
	v := sample()
	for _, c := range []struct {
		name    string
		marshal func(any) ([]byte, error)
	}{{"strict", strict.Marshal}, {"encoding_json", json.Marshal}} {
		b.Run(c.name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				if _, err := c.marshal(v); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

func BenchmarkUnmarshal(b *testing.B) {
	data := []byte(mustMarshal(b, sample()))
	for _, c := range []struct {
		name      string
		unmarshal func([]byte, any) error
	}{{"strict", strict.Unmarshal}, {"encoding_json", json.Unmarshal}} {
		b.Run(c.name, func(b *testing.B) {
			b.ReportAllocs()
			b.SetBytes(int64(len(data)))
			for b.Loop() {
				var v whole
				if err := c.unmarshal(data, &v); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
