package table

import (
	"math"
	"slices"
	"strings"
	"testing"
)

func TestReadSourceCaveatAndRows(t *testing.T) {
	got := MustRead("demo.csv", []byte("# A handbook.\n# From memory.\nkey,a,b\nsteel,1.5,\n\"one, two\",2,-3\n"))
	if got.Source != "A handbook." || got.Caveat != "From memory." {
		t.Errorf("source %q, caveat %q", got.Source, got.Caveat)
	}
	if len(got.Rows) != 2 || got.Rows[1].Text("key") != "one, two" {
		t.Fatalf("rows %v", got.Rows)
	}
	if a := got.Rows[0].Number("a"); a != 1.5 {
		t.Errorf("a = %v, want 1.5", a)
	}
	if b := got.Rows[0].Number("b"); !math.IsNaN(b) {
		t.Errorf("a blank cell = %v, want NaN", b)
	}
	if list := MustRead("f", []byte("# s\na\n1 2.5 -3\n")).Rows[0].Numbers("a"); !slices.Equal(list, []float64{1, 2.5, -3}) {
		t.Errorf("a list of numbers reads %v", list)
	}
	if xs, ys := got.Pairs("a", "b"); !slices.Equal(xs, []float64{2}) || !slices.Equal(ys, []float64{-3}) {
		t.Errorf("pairs %v %v: the row with a blank must be left out", xs, ys)
	}
}

func TestMalformedFilesPanic(t *testing.T) {
	good := "# s\na\n1\n"
	for name, do := range map[string]func(){
		"no source":      func() { MustRead("f", []byte("a\n1\n")) },
		"no rows":        func() { MustRead("f", []byte("# s\na\n")) },
		"ragged":         func() { MustRead("f", []byte("# s\na,b\n1\n")) },
		"missing column": func() { MustRead("f", []byte(good)).Rows[0].Text("b") },
		"no numbers":     func() { MustRead("f", []byte("# s\na\n1 x\n")).Rows[0].Numbers("a") },
		"no number":      func() { MustRead("f", []byte(strings.Replace(good, "1", "x", 1))).Rows[0].Number("a") },
	} {
		t.Run(name, func(t *testing.T) {
			defer func() {
				if recover() == nil {
					t.Error("no panic")
				}
			}()
			do()
		})
	}
}
