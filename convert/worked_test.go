package convert_test

import (
	"flag"
	"fmt"
	"os"
	"strings"
	"testing"
	"text/tabwriter"

	"strikebook/convert"
	"strikebook/convert/device"
	"strikebook/convert/record"
	"strikebook/convert/scale"
	"strikebook/convert/verdict"
)

// update writes what the tests would compare with. Read the difference before
// you commit it: each line that changes is a verdict that changes.
var update = flag.Bool("update", false, "write testdata/worked_spots.golden")

const workedFile = "../testdata/worked_spots.golden"

// workedHead is the head of the file of worked spots.
const workedHead = `# Spots of an invented place, the Tarn Ridge pumping station, each against its limit under the three rules.
# Written by this program: go test ./convert -run TestWorkedSpots -update. Block: certified value ± U, readings on it, and what their offset is used for.
# The value is in the scale of the comparison; the chance is the probability of conformity, JCGM 106.
`

// workedSpots are the spots of the Tarn Ridge pumping station. Place, parts and
// readings are invented.
func workedSpots() []record.Record {
	spot := func(label string, r record.Record, l *verdict.Limit) record.Record {
		r.Label, r.Limit = label, l
		r.Taken = "2026-12-01T09:30:00Z"
		return r
	}
	block := func(r record.Record, certified, u float64, use record.BlockUse, values ...float64) record.Record {
		r.Block = &record.Block{Certified: &certified, ExpandedU: &u, Use: use, Taken: "2026-12-01T07:00:00Z"}
		for _, v := range values {
			r.Block.Readings = append(r.Block.Readings, record.Num(v))
		}
		return r
	}
	permissible := func(r record.Record, half float64) record.Record {
		r.PermissibleError = &half
		return r
	}
	light := taken("D", "low-alloy-steel", 508, 512, 505)
	light.Piece = &device.Piece{MassKg: new(1.2), Support: device.Free}
	struck := taken("D", "low-alloy-steel", 452, 449, 521, 455, 450)
	struck.Readings[2].Struck = "on a spatter"
	const steel, cast = "low-alloy-steel", "grey-iron"

	return []record.Record{
		spot("Rising main, weld R3, base", taken("D", steel, 421, 418, 425, 420, 423), between(scale.HBW, 0, 225)),
		spot("Rising main, weld R3, HAZ", directed(taken("D", steel, 486, 492, 481, 488, 490), device.Level), between(scale.HBW, 0, 225)),
		spot("Rising main, weld R3, cap", taken("D", steel, 571, 566, 575, 569, 572), between(scale.HBW, 0, 225)),
		spot("Rising main, weld R4, overhead", directed(taken("DC", steel, 512, 505, 508, 514, 509), device.Up), between(scale.HV, 0, 250)),
		spot("Header, check stands in the mean", block(taken("D", steel, 505, 502, 507, 503, 506), 776, 6, record.AsCorrection, 781, 780, 782), between(scale.HV, 0, 248)),
		spot("Header, check stands in the doubt", block(taken("D", steel, 505, 502, 507, 503, 506), 776, 6, record.AsUncertainty, 781, 780, 782), between(scale.HV, 0, 248)),
		spot("Header, check failed", block(taken("D", steel, 505, 502, 507, 503, 506), 776, 6, record.AsCorrection, 788, 790, 789), between(scale.HV, 0, 248)),
		spot("Drain spool S7, pipe", taken("D", steel, 462, 459, 465, 460, 463), between(scale.HRC, 0, 22)),
		spot("Drain spool S7, weld", taken("D", steel, 507, 511, 504, 509, 508), between(scale.HRC, 0, 22)),
		spot("Drain spool S7, below the table", taken("D", steel, 462, 459, 465, 460, 463), between(scale.HRC, 0, 18)),
		spot("Drain spool S7, tee", taken("D", steel, 566, 571, 562, 568, 569), between(scale.HRB, 0, 95)),
		spot("Drain spool S8, one struck", struck, between(scale.HBW, 0, 225)),
		spot("Anchor bolts, row 6", directed(taken("D", steel, 586, 590, 583, 588), device.Level), between(scale.HBW, 0, 321)),
		spot("Anchor bolts, row 7, two readings", taken("D", steel, 552, 548), between(scale.HBW, 0, 321)),
		spot("Ladder bracket, lying free", light, between(scale.HBW, 0, 300)),
		spot("Shaft P2, coupling seat", taken("D", steel, 655, 651, 658, 653, 656), between(scale.HRC, 34, 46)),
		spot("Shaft P2, tensile strength", taken("D", steel, 655, 651, 658, 653, 656), between(scale.Rm, 1190, 0)),
		spot("Shaft P2, keyway", taken("D+15", steel, 668, 671, 664, 670, 667), between(scale.HRC, 36, 0)),
		spot("Shaft P3, as read", block(taken("D", steel, 612, 609, 611, 613, 610), 776, 6, record.AsCorrection, 775, 777, 774), between("HLD", 590, 630)),
		spot("Cam of the sluice drive", taken("E", "tool-steel", 741, 738, 744, 740, 742), between(scale.HRC, 56, 0)),
		spot("Wear ring P1", taken("D", "martensitic-stainless", 560, 553, 566, 558, 561), between(scale.HBW, 240, 0)),
		spot("Strainer flange", taken("D", "austenitic-stainless", 401, 409, 395, 404, 406), between(scale.HRB, 0, 90)),
		spot("Duplex stub, nozzle N2", taken("D", "duplex-stainless", 668, 675, 661, 672, 666), between(scale.HV, 0, 350)),
		spot("Pump casing P1, foot", directed(taken("G", cast, 452, 461, 439, 455, 448, 466, 443, 458, 450, 447), device.Compensated), between(scale.HBW, 150, 300)),
		spot("Pump casing P1, as read", directed(taken("G", cast, 452, 461, 439, 455, 448, 466, 443, 458, 450, 447), device.Compensated), between("HLG", 440, 0)),
		spot("Gate body, bay 4", taken("D", "ductile-iron", 470, 478, 465, 472, 469), between(scale.HBW, 0, 225)),
		spot("Impeller P2, hub", taken("D", "bronze", 470, 466, 474, 468, 471), between(scale.HBW, 100, 0)),
		spot("Valve seat, brass", taken("C", "brass", 502, 508, 498, 505, 503), between(scale.HRB, 40, 0)),
		spot("Walkway profile", taken("D", "aluminium", 458, 452, 463, 455, 460), between(scale.HBW, 60, 0)),
		spot("Busbar, switch room", taken("D", "copper", 436, 431, 440, 434, 437), between(scale.HV, 0, 80)),
		spot("Spindle of the check valve", taken("D", "nickel-alloy", 566, 572, 561, 569, 564), between(scale.HRC, 0, 35)),
		spot("Cooler plate", taken("D", "titanium", 600, 606, 594, 602, 598), between(scale.HRC, 0, 36)),
		spot("Sleeve P2, Rockwell on site", permissible(direct(scale.HRC, 52.4, 52.9, 52.1), 1.5), between(scale.HRC, 50, 0)),
		spot("Sleeve P3, Rockwell against Vickers", permissible(direct(scale.HRC, 46.8, 47.3, 47.0), 1), between(scale.HV, 490, 0)),
		spot("Header, Vickers on site", permissible(direct(scale.HV, 236, 243, 239), 9), between(scale.HV, 0, 250)),
		spot("Front of the seal housing", taken("DL", steel, 742, 745, 739), between("HLDL", 700, 0)),
		spot("Front of the seal housing, in Brinell", taken("DL", steel, 742, 745, 739), between(scale.HBW, 200, 0)),
		spot("Spare shaft, no limit", taken("D", steel, 640, 643, 638), nil),
	}
}

// workedLine is a spot in a line, tab between its cells.
func workedLine(t testing.TB, r record.Record) string {
	t.Helper()
	var outcomes []string
	var sheet convert.Sheet
	for _, rule := range []verdict.Rule{verdict.Guarded, verdict.OneSided95, verdict.Simple} {
		sheet = mustEvaluate(t, against(r, r.Limit, rule))
		outcomes = append(outcomes, string(sheet.Verdict.Outcome))
	}
	v := sheet.Verdict
	value, chance := "-", "-"
	if v.Value != nil {
		s, _ := scale.ByKey(v.Scale)
		value = s.Notation(s.Quote(*v.Value), sheet.Scale) + " ± " + s.QuoteUp(*v.Expanded)
		chance = fmt.Sprintf("%.4f", *v.Probability)
	}
	cells := append([]string{r.Label, r.Group, workedDevice(r), workedReadings(r), workedBlock(r.Block), workedLimit(r.Limit), value}, outcomes...)
	return strings.Join(append(cells, chance), "\t")
}

func workedDevice(r record.Record) string {
	name := r.Device
	if name == "" {
		name = string(r.Scale) + " direct"
	}
	if r.Direction != "" {
		name += ", " + string(r.Direction)
	}
	return name
}

func workedReadings(r record.Record) string {
	var all []string
	for _, reading := range r.Readings {
		text := reading.Value.String()
		if reading.Struck != "" {
			text = "(" + text + ")"
		}
		all = append(all, text)
	}
	return strings.Join(all, " ")
}

func workedBlock(b *record.Block) string {
	if b == nil {
		return "-"
	}
	text := fmt.Sprintf("%g ± %g:", *b.Certified, *b.ExpandedU)
	for _, n := range b.Readings {
		text += " " + n.String()
	}
	return text + ", " + string(b.Use)
}

func workedLimit(l *verdict.Limit) string {
	switch {
	case l == nil:
		return "-"
	case l.Min == nil:
		return fmt.Sprintf("max %g %s", *l.Max, l.Scale)
	case l.Max == nil:
		return fmt.Sprintf("min %g %s", *l.Min, l.Scale)
	}
	return fmt.Sprintf("%g to %g %s", *l.Min, *l.Max, l.Scale)
}

// The verdicts of whole spots, so that no change of a method or of the data
// passes unseen.
func TestWorkedSpots(t *testing.T) {
	var text strings.Builder
	text.WriteString(workedHead)
	w := tabwriter.NewWriter(&text, 0, 0, 2, ' ', 0)
	fmt.Fprintln(w, "spot\tmetal\tdevice\treadings\tblock\tlimit\tvalue ± U\tguarded\tone-sided-95\tsimple\tchance")
	seen := map[string]bool{}
	for _, r := range workedSpots() {
		if seen[r.Label] {
			t.Errorf("two spots are called %q", r.Label)
		}
		seen[r.Label] = true
		fmt.Fprintln(w, workedLine(t, r))
	}
	if err := w.Flush(); err != nil {
		t.Fatal(err)
	}
	got := text.String()
	if *update {
		if err := os.WriteFile(workedFile, []byte(got), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	content, err := os.ReadFile(workedFile)
	if err != nil {
		t.Fatalf("%v; write it with -update", err)
	}
	compareLines(t, got, string(content))
}

// compareLines names the lines in which two texts differ.
func compareLines(t *testing.T, got, want string) {
	t.Helper()
	if got == want {
		return
	}
	gotLines, wantLines := strings.Split(got, "\n"), strings.Split(want, "\n")
	for i := range max(len(gotLines), len(wantLines)) {
		var g, w string
		if i < len(gotLines) {
			g = gotLines[i]
		}
		if i < len(wantLines) {
			w = wantLines[i]
		}
		if g != w {
			t.Errorf("line %d\ngot  %s\nwant %s", i+1, g, w)
		}
	}
	t.Log("if the change is meant, write the file anew with -update, and read the difference")
}
