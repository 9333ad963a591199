package convert

import (
	"math/rand/v2"
	"reflect"
	"testing"

	"strikebook/convert/device"
	"strikebook/convert/record"
	"strikebook/convert/record/recordtest"
	"strikebook/convert/verdict"
)

// A row is the same whether it was made from the whole sheet or in the short way.
func TestShortWayToRow(t *testing.T) {
	rng := rand.New(rand.NewPCG(45, 46))
	compared := 0
	for i := range 3000 {
		r := recordtest.Random(rng)
		if i%2 == 0 { // one that has values more often
			r.Device, r.Scale, r.Direction, r.Group = "D", "", device.Down, "low-alloy-steel"
			r.Piece, r.Block = nil, nil
			r.Readings = nil
			for range rng.IntN(6) {
				r.Readings = append(r.Readings, record.Reading{Value: record.Num(float64(400 + rng.IntN(350)))})
			}
			if l := r.Limit; l != nil && l.Max != nil {
				*l = verdict.Limit{Scale: l.Scale, Max: new(100 + 300*rng.Float64()), Rule: l.Rule}
			}
		}
		text, err := record.Encode(r)
		if err != nil {
			t.Fatal(err)
		}
		long, short := newBookRow(attempt(text, false)), newBookRow(attempt(text, true))
		if !reflect.DeepEqual(long, short) {
			t.Fatalf("%s:\nlong  %+v\nshort %+v", text, long, short)
		}
		compared += len(long.Values)
	}
	if compared < 1000 {
		t.Errorf("only %d values compared", compared)
	}
}

// Whatever happens in one record, the others have their rows.
func TestFaultInOneRecord(t *testing.T) {
	row := newBookRow(attempt(nil, true)) // no JSON at all
	if row.Error == nil || row.Error.Code != "record-not-json" || row.Outcome != verdict.CannotSay {
		t.Errorf("%+v", row)
	}
}

func TestShownP(t *testing.T) {
	for p, want := range map[float64]string{
		0: "< 0.001", 0.00099: "< 0.001", 0.001: "0.001", 0.0499999: "0.049", 0.05: "0.050", 0.0999: "0.099", 0.1: "0.10", 0.349: "0.35", 1: "1.00",
	} {
		if got := shownP(p); got != want {
			t.Errorf("%g is shown as %s, want %s", p, got, want)
		}
	}
}
