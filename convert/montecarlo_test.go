package convert_test

import (
	"fmt"
	"math"
	"math/rand/v2"
	"runtime"
	"slices"
	"strings"
	"testing"
	"text/tabwriter"

	"gonum.org/v1/gonum/stat/distuv"

	"strikebook/convert"
	"strikebook/convert/curve"
	"strikebook/convert/device"
	"strikebook/convert/metal"
	"strikebook/convert/rebound"
	"strikebook/convert/record"
	"strikebook/convert/scale"
	"strikebook/convert/stats"
)

// trials is how often each sheet is drawn (JCGM 101): the half-width of an
// interval is then known within about a quarter of a percent.
const trials = 200_000

// simulation is a sheet to be drawn.
type simulation struct {
	group metal.Group
	share float64 // where the mean lies in the readings that the metal can give
	n     int
	sd    float64
	block bool
}

// simulations are the sheets: metals, hardness levels, readings and scatters,
// with and without a block check.
func simulations() []simulation {
	kinds := []simulation{{n: 3, sd: 8}, {n: 5, sd: 5, block: true}, {n: 5, sd: 5}, {n: 10, sd: 14, block: true}}
	fewer := testing.Short() || runtime.GOOS == "js"
	var all []simulation
	for i, g := range metal.All() {
		for j, share := range []float64{0.1, 0.3, 0.45, 0.6, 0.75, 0.9} {
			for k, s := range kinds {
				if (j+k)%2 == 0 || fewer && (i+2*j+k)%9 != 0 {
					continue // two kinds are enough for one level
				}
				s.group, s.share = g, share
				all = append(all, s)
			}
		}
	}
	return all
}

// line continues a curve beyond its ends, so that a draw beyond them is not
// lost: along the mean slope of its last part, because the slope at the end of a
// table alone says more of its rounding than of the metal.
type line struct {
	curve.Curve
	lo, hi, atLo, atHi, slopeLo, slopeHi float64
}

func continued(t testing.TB, c curve.Curve) line {
	t.Helper()
	const part = 0.15
	lo, hi := c.Domain()
	at := func(x float64) float64 {
		value, err := c.At(x)
		if err != nil {
			t.Fatal(err)
		}
		return value
	}
	step := part * (hi - lo)
	return line{Curve: c, lo: lo, hi: hi, atLo: at(lo), atHi: at(hi),
		slopeLo: (at(lo+step) - at(lo)) / step, slopeHi: (at(hi) - at(hi-step)) / step}
}

// at is the curve's value; outside says that the curve does not reach there.
func (l line) at(x float64) (value float64, outside bool) {
	switch {
	case x < l.lo:
		return l.atLo + (x-l.lo)*l.slopeLo, true
	case x > l.hi:
		return l.atHi + (x-l.hi)*l.slopeHi, true
	}
	value, err := l.Curve.At(x)
	if err != nil {
		panic(err)
	}
	return value, false
}

// fromLeg is a second leg as a curve.
type fromLeg struct{ scale.Leg }

func (l fromLeg) At(hv float64) (float64, error) {
	v, err := l.Leg.At(hv)
	return v.Value, err
}

func (l fromLeg) Slope(hv float64) (float64, error) {
	v, err := l.Leg.At(hv)
	return v.Slope, err
}

func (l fromLeg) Inverse(float64) (float64, error) { panic("not asked") }

// drawn draws from a term's distribution.
func drawn(term stats.Term, rng *rand.Rand) float64 {
	switch term.Distribution {
	case stats.Student:
		return term.Standard * distuv.StudentsT{Sigma: 1, Nu: float64(term.DoF), Src: rng}.Rand()
	case stats.Uniform:
		return term.Standard * math.Sqrt(3) * (2*rng.Float64() - 1)
	}
	return term.Standard * rng.NormFloat64()
}

// halfWidth is that of the probabilistically symmetric 95 % interval, and skew
// how far its middle lies above the value, in half-widths.
func halfWidth(draws []float64, value float64) (half, skew float64) {
	slices.Sort(draws)
	lo, hi := draws[len(draws)*25/1000], draws[len(draws)*975/1000]
	half = (hi - lo) / 2
	return half, ((hi+lo)/2 - value) / half
}

// place is where on its curves a sheet lies, which says why the sheet and the
// draws may differ.
type place string

const (
	inside place = "inside"      // the interval lies on the curves: their bend, and what the coverage factor leaves out
	atEnd  place = "at an end"   // a part of the draws lies beyond the end of a curve, where the sheet's slope ends
	atJoin place = "at the join" // the interval meets the join of two tables, which the sheet crosses steeper on purpose
)

// simulated is what the draws of a sheet come to in a scale.
type simulated struct {
	simulation
	scale      scale.Key
	hl, hv     float64
	difference float64 // of the sheet's expanded uncertainty from the drawn one, as a share of it
	skew       float64
	outside    float64 // share of the draws beyond the end of a curve
	place      place
}

// record is the record of a simulation: readings of exactly the mean and scatter.
func (s simulation) record(t testing.TB) record.Record {
	t.Helper()
	d, _ := device.ByKey("D")
	leg, err := rebound.For(d, s.group)
	if err != nil {
		t.Fatal(err)
	}
	lo, hi := leg.Domain()
	lo, hi = max(lo, d.Lo), min(hi, d.Hi)
	r := taken("D", s.group.Key, scattered(math.Round(lo+s.share*(hi-lo)), s.sd, s.n)...)
	if s.block {
		r.Block = checked(772, 776, 774)
	}
	return r
}

// draw draws the sheet of a simulation: each term from its distribution in the
// reading's scale, the drawn reading over the first leg to HV, and on over the
// second with its own doubt.
func (s simulation) draw(t testing.TB, seed uint64) []simulated {
	t.Helper()
	rng := rand.New(rand.NewPCG(61, seed))
	sheet := mustEvaluate(t, s.record(t))
	hv, hbw := rowOf(t, sheet, scale.HV), rowOf(t, sheet, scale.HBW)
	if hv.Value == nil {
		t.Fatalf("%s at %g: %v", s.group.Key, s.share, codes(sheet))
	}
	d, _ := device.ByKey("D")
	model, err := rebound.For(d, s.group)
	if err != nil {
		t.Fatal(err)
	}
	legs := scale.Legs(s.group)
	leg := legs[slices.IndexFunc(legs, func(l scale.Leg) bool { return l.Scale.Key == scale.HBW })]
	first, second := continued(t, model), continued(t, fromLeg{leg})
	var doubt stats.Term // of the second leg
	for _, term := range hbw.Terms {
		if term.Scale == string(scale.HBW) {
			doubt = term
		}
	}
	mean := *sheet.Corrected.Mean
	inHV, inHBW := make([]float64, trials), make([]float64, trials)
	beyond := map[scale.Key]int{}
	for i := range trials {
		reading := mean
		for _, term := range hv.Terms {
			reading += drawn(term, rng)
		}
		hardness, outside1 := first.at(reading)
		value, outside2 := second.at(hardness)
		inHV[i], inHBW[i] = hardness, value+drawn(doubt, rng)
		if outside1 {
			beyond[scale.HV]++
		}
		if outside1 || outside2 {
			beyond[scale.HBW]++
		}
	}
	var all []simulated
	for _, of := range []struct {
		row   convert.Row
		draws []float64
	}{{hv, inHV}, {hbw, inHBW}} {
		if of.row.Value == nil {
			continue
		}
		half, skew := halfWidth(of.draws, *of.row.Value)
		out := simulated{
			simulation: s, scale: of.row.Scale, hl: mean, hv: *hv.Value, difference: *of.row.Expanded/half - 1, skew: skew,
			outside: float64(beyond[of.row.Scale]) / trials, place: inside,
		}
		switch {
		case of.row.Scale == scale.HBW && joined(leg, *hv.Value-*hv.Expanded, *hv.Value+*hv.Expanded):
			out.place = atJoin
		case out.outside > 0.005 || mean-sheet.Uncertainty.Standard < d.Lo:
			out.place = atEnd
		}
		all = append(all, out)
	}
	return all
}

// joined reports whether two tables meet between two hardnesses in HV.
func joined(leg scale.Leg, from, to float64) bool {
	lo, hi := leg.Domain()
	source := func(hv float64) string { return leg.Steps(min(hi, max(lo, hv)))[0].Source }
	return source(from) != source(to) || strings.Contains(source((from+to)/2), "join")
}

// within is what the expanded uncertainty may be off by, down and up. At the end
// of a curve the sheet's slope and the draws that leave the curve are both
// guesses; across the join of two tables the sheet keeps the steeper slope on
// purpose, so that it is the wider one.
var within = map[place]struct{ down, up float64 }{
	inside: {0.03, 0.03},
	atEnd:  {0.08, 0.08},
	atJoin: {0.03, 0.30},
}

// The expanded uncertainty of whole sheets against draws, JCGM 101.
func TestSheetsAgainstDraws(t *testing.T) {
	type key struct {
		group string
		scale scale.Key
		place place
	}
	worst, counts := map[key]simulated{}, map[key]int{}
	all := simulations()
	for i, s := range all {
		for _, out := range s.draw(t, uint64(i)) {
			k := key{s.group.Key, out.scale, out.place}
			counts[k]++
			if math.Abs(out.difference) >= math.Abs(worst[k].difference) {
				worst[k] = out
			}
			if bound := within[out.place]; out.difference < -bound.down || out.difference > bound.up {
				t.Errorf("%+v", out)
			}
		}
	}
	var table strings.Builder
	w := tabwriter.NewWriter(&table, 0, 0, 2, ' ', 0)
	fmt.Fprintln(w, "metal\tscale\twhere\tcases\tlargest\tat HLD\tHV\tn\tsd\tblock\tskew\tdraws beyond")
	for _, g := range metal.All() {
		for _, s := range []scale.Key{scale.HV, scale.HBW} {
			for _, p := range []place{inside, atEnd, atJoin} {
				k := key{g.Key, s, p}
				if counts[k] == 0 {
					continue
				}
				o := worst[k]
				mark := ""
				if math.Abs(o.difference) > 0.03 {
					mark = " *"
				}
				fmt.Fprintf(w, "%s\t%s\t%s\t%d\t%+.1f %%%s\t%.0f\t%.0f\t%d\t%g\t%t\t%+.2f\t%.1f %%\n",
					g.Key, s, p, counts[k], o.difference*100, mark, o.hl, o.hv, o.n, o.sd, o.block, o.skew, o.outside*100)
			}
		}
	}
	if err := w.Flush(); err != nil {
		t.Fatal(err)
	}
	t.Logf("%d sheets; the sheet's expanded uncertainty less the drawn one, the largest difference (* above 3 %%)\n%s", len(all), table.String())
}
