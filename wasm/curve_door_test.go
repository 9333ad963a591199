package main

import (
	"fmt"
	"math/rand/v2"
	"strings"
	"testing"

	"strikebook/convert/record/recordtest"
	"strikebook/convert/strict"
)

// pairs are a curve as the page hands it in: twelve offcuts, invented.
func pairs() string {
	var list []string
	for i := range 12 {
		hl := 452.1 + 17.3*float64(i)
		list = append(list, fmt.Sprintf(`{"hl":%.1f,"u_hl":1.6,"value":%.0f,"u_value":3}`, hl, 163+1.06*(hl-452.1)))
	}
	return `{"name":"P22 header, lab HBW","device":"D","group":"low-alloy-steel","scale":"HBW","kind":"own","pairs":[` +
		strings.Join(list, ",") + `],"source":"report 1187","serial":"A-1","date":"2026-09-01"}`
}

// Pairs become a curve, the curve a sheet, the record a link, and the sheet of
// whoever opens the link is the same.
func TestFitCurveToLink(t *testing.T) {
	fitted := through(t, "fitCurve", pairs())
	mustHold(t, fitted, "name", "device", "group", "scale", "kind", "pairs", "source", "serial", "date", "edition",
		"form", "equation", "range", "shownRange", "parameters", "covariance", "dof", "residual", "chiSquare", "birge", "scatter",
		"leaveOneOut", "aicc", "candidates", "residuals", "warnings", "plot")
	var curve struct {
		Form       string
		Range      []float64
		Parameters []float64
		Covariance [][]float64
		Candidates []struct{ Form, Refused string }
		Residuals  []struct{ HLBar, ValueBar []float64 }
		Plot       []struct{ HL, Value, Low, High, Model float64 }
	}
	mustRead(t, fitted, &curve)
	if curve.Form != "straight" || len(curve.Parameters) != 2 || len(curve.Covariance) != 2 || len(curve.Candidates) != 3 ||
		len(curve.Residuals) != 12 || len(curve.Plot) != 60 || curve.Range[0] != 452.1 || curve.Plot[59].HL != curve.Range[1] {
		t.Fatalf("%.2000s", fitted)
	}
	record := strings.TrimSuffix(pivot, "}") + `,"serial":"A-1","curve":` + fitted + `}`
	sheet := through(t, "evaluate", record)
	if !strings.Contains(sheet, `"basis":"own"`) || !strings.Contains(sheet, `"own curve"`) || !strings.Contains(sheet, `"offset-in-curve"`) {
		t.Errorf("%.2000s", sheet)
	}
	link := through(t, "encodeLink", record)
	if t.Logf("%d characters", len(link)); len(link) > 1500 || !strings.HasPrefix(link, "s1.") {
		t.Errorf("%d characters: %.200s", len(link), link)
	}
	arrived := through(t, "decodeLink", link)
	if !strings.Contains(arrived, `"curve":`+fitted) {
		t.Errorf("the curve comes back as %.2000s", arrived)
	}
	if through(t, "evaluate", arrived) != sheet {
		t.Error("the receiver's sheet is another")
	}
	// The answer is a request again: a curve is edited by changing its pairs.
	if again := through(t, "fitCurve", fitted); again != fitted {
		t.Errorf("fitted again\n%s\nbecame\n%s", fitted, again)
	}
}

func TestFitCurveRefuses(t *testing.T) {
	for _, c := range []struct{ old, new, code, field string }{
		{`"device":"D"`, `"device":"Q"`, "unknown-choice", "device"},
		{`"group":"low-alloy-steel"`, `"group":"brass","scale":"HRC"`, "duplicate-field", "scale"},
		{`"scale":"HBW"`, `"scale":"HRF"`, "curve-scale", "scale"},
		{`"kind":"own"`, `"kind":"anchor"`, "anchor-many-pairs", "kind"},
		{`{"hl":452.1,"u_hl":1.6,"value":163,"u_value":3},`, `{"hl":452.1,"u_hl":1.6,"value":163,"u_value":-1},`, "out-of-bounds", "pairs[0].u_value"},
		{`{"hl":452.1,"u_hl":1.6,"value":163,"u_value":3},`, `{"hl":452.1,"u_hl":1.6,"value":"163"},`, "wrong-type", "pairs[0].value"},
		{`"pairs":[`, `"pairs":[`, "", ""},
		{`"pairs"`, `"points"`, "curve-unknown-field", "points"},
		{`}`, ``, "curve-not-json", "pairs[0]"},
	} {
		answer := through(t, "fitCurve", strings.Replace(pairs(), c.old, c.new, 1))
		e := fault(t, answer)
		switch {
		case c.code == "" && e != nil, c.code != "" && (e == nil || e.Code != c.code || e.Field != c.field || e.Message == ""):
			t.Errorf("%s for %s: %.300s, want %s at %q", c.new, c.old, answer, c.code, c.field)
		}
	}
}

// Whatever the curve, there is an answer or a sentence, the same each time.
func TestFitCurveAnswers(t *testing.T) {
	rng := rand.New(rand.NewPCG(57, 58))
	for i := range 200 {
		text, err := strict.Marshal(recordtest.Definition(rng))
		if err != nil {
			t.Fatal(err)
		}
		answer := through(t, "fitCurve", string(text))
		if e := fault(t, answer); e != nil && (e.Code == "internal" || e.Message == "") {
			t.Fatalf("curve %d, %s: %s", i, text, answer)
		}
		if again := through(t, "fitCurve", string(text)); again != answer {
			t.Fatalf("curve %d, %s: another answer the second time", i, text)
		}
	}
}

func BenchmarkFitCurve(b *testing.B) {
	for i := 0; b.Loop(); i++ {
		// A curve that is not the last one is fitted anew.
		through(b, "fitCurve", strings.Replace(pairs(), "1187", fmt.Sprint(i), 1))
	}
}
