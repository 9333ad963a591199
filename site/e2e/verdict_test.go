package e2e

import (
	"fmt"
	"strings"
	"testing"

	"strikebook/build/serve"
)

// Where the parts of the decision stand on the page.
const (
	piece   = app + " >>> strike-piece"
	block   = app + " >>> strike-block"
	limit   = app + " >>> strike-limit"
	goNoGo  = app + " >>> strike-gonogo >>> section"
	verdict = app + " >>> strike-verdict >>> section"
)

// unfold opens a part of the sheet.
func (w *window) unfold(part string) {
	w.t.Helper()
	w.tap(part + " >>> summary")
	w.waitFor(element(part+" >>> details") + ".open")
}

// enter types into a field of a part.
func (w *window) enter(field, text string) {
	w.t.Helper()
	w.tap(field)
	w.keys(text)
}

// The whole path of a decision: limit, go/no-go readings, block check, test
// piece, readings, verdict; and the link shows the same elsewhere.
func TestDecision(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := visit(t, s, phone)
	w.choose(metal, "low-alloy-steel")

	w.unfold(limit)
	w.choose(limit+" >>> #pick", "pwht-p3-p4")
	w.waitForText(limit+" >>> details", "ASME B31.3")
	w.waitForText(goNoGo, "Conforms")
	w.waitForText(goNoGo, "Does not conform")
	w.screenshot("phone-gonogo")

	w.unfold(block)
	w.enter(block+" >>> #certified", "775")
	w.enter(block+" >>> #expanded_u", "6")
	w.enter(block+" >>> #readings", "776 774 777")
	w.keys("\t")
	w.waitForText(block+" >>> details", "passed")
	w.waitForText(block+" >>> details", "Mean error 0.7 HLD")

	w.unfold(piece)
	w.choose(piece+" >>> #shape", "plate")
	for _, field := range []struct{ id, text string }{
		{"length_mm", "600"}, {"width_mm", "400"}, {"thickness_mm", "30"}, {"ra_um", "1,6"},
	} {
		w.enter(piece+" >>> #"+field.id, field.text)
	}
	w.waitForText(piece+" >>> details", "56.5 kg")
	w.waitForText(piece+" >>> details", "suits")

	w.tap(entry)
	w.keys("432428435430431")
	w.waitForText(verdict, "Conforms")
	w.waitForText(verdict, "wholly at or below 225 HBW")
	w.waitForText(glance, "Conforms")
	if bad := w.accessibility(); len(bad) > 0 {
		t.Errorf("accessibility:\n%s", strings.Join(bad, "\n"))
	}
	w.reveal(verdict)
	w.screenshot("phone-verdict")
	if wide := eval[int](w, "document.documentElement.scrollWidth"); wide > 360 {
		t.Errorf("the page is %d px wide on a phone of 360", wide)
	}

	w.waitFor(element(linkOf) + ".value.includes('#s1.')")
	link := eval[string](w, element(linkOf)+".value")
	t.Logf("the link has %d characters", len(link)-len(s.url))
	receiver := open(t, desktop)
	receiver.navigate(link)
	receiver.waitForText(verdict, "Conforms")
	if got, want := receiver.shownValues(), w.shownValues(); got != want {
		t.Errorf("the receiver sees %q, the sender %q", got, want)
	}
	receiver.screenshot("desktop-verdict")
	w.checkClean(s)
	receiver.checkClean(s)
}

// The outcomes, each with its mark in words.
func TestOutcomes(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := visit(t, s, desktop)
	w.choose(metal, "low-alloy-steel")
	w.click(limit + " >>> summary")
	w.choose(limit+" >>> #pick", "sour-base")
	for _, c := range []struct{ name, readings, rule, want, say string }{
		{"far below", "400402404", "guarded", "Conforms", "answers to"},
		{"near", "518520522", "guarded", "Not proven", "reaches across"},
		{"near, by the mean alone", "518520522", "simple", "Conforms", "By its mean alone"},
		{"far above", "650652654", "guarded", "Does not conform", "direct method"},
		{"glass", "910912914", "guarded", "No verdict", "a finding stops it"},
	} {
		w.choose(limit+" >>> #rule", c.rule)
		w.focus(entry)
		w.keys(c.readings)
		w.waitForText(verdict, c.want)
		w.waitForText(verdict, c.say)
		w.waitForText(glance, c.want)
		if bad := w.accessibility(); len(bad) > 0 {
			t.Errorf("%s: accessibility:\n%s", c.name, strings.Join(bad, "\n"))
		}
		w.screenshot("desktop-outcome-" + strings.ReplaceAll(c.name, " ", "-"))
		w.click(app + " >>> strike-share >>> #new")
		w.waitForText(readings, "No readings yet")
	}
	w.checkClean(s)
}

// What is wrong is said at its field, what was typed stays, and no value is given.
func TestBadFields(t *testing.T) {
	s := startSite(t, serve.Options{})
	for _, c := range []struct{ name, part, shape, field, text, want string }{
		{"negative mass", piece, "", "mass_kg", "-3", "must lie above 0"},
		{"light piece", piece, "", "mass_kg", "0,5", "piece weighs 0.5 kg"},
		{"no number", piece, "", "mass_kg", "heavy", "heavy is no number"},
		{"wall", piece, "pipe", "wall_mm", "8", "8 mm"},
		{"reversed limit", limit, "", "min", "-5", "must be a number above 0"},
		{"tolerance", block, "", "tolerance", "0", "must lie above 0"},
	} {
		t.Run(c.name, func(t *testing.T) {
			w := visit(t, s, phone)
			w.choose(metal, "low-alloy-steel")
			w.tap(entry)
			w.keys("612608615")
			w.waitForText(glance, "HBW")
			w.unfold(c.part)
			if c.shape != "" {
				w.choose(c.part+" >>> #shape", c.shape)
			}
			if c.part == limit {
				w.choose(limit+" >>> #scale", "HBW")
			}
			w.enter(c.part+" >>> #"+c.field, c.text)
			w.waitForText(c.part+" >>> #"+c.field+" >>> #problem", c.want)
			if got := eval[string](w, element(c.part+" >>> #"+c.field+" >>> input")+".value"); got != c.text {
				t.Errorf("%q became %q", c.text, got)
			}
			w.waitForText(readings, "615")
			w.checkClean(s)
		})
	}
}

// How many readings a wanted uncertainty takes, or that none would do.
func TestMoreReadings(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := visit(t, s, phone)
	w.choose(metal, "low-alloy-steel")
	w.tap(entry)
	w.keys("612580630")
	w.waitForText(glance, "HBW")
	more := app + " >>> strike-result >>> strike-more"
	w.unfold(more)
	for _, c := range []struct{ wanted, want string }{{"5", "No number of readings"}, {"60", "more readings"}, {"300", "It is reached"}} {
		field := more + " >>> #expanded"
		w.focus(field)
		eval[bool](w, fmt.Sprintf("(%s.select(), true)", element(field+" >>> input")))
		w.keys(c.wanted)
		w.waitForText(more+" >>> #answer", c.want)
	}
}
