package e2e

import (
	"strings"
	"testing"

	"strikebook/build/serve"
)

const curves = app + " >>> strike-curves"

// The whole path of an own curve: pairs pasted, the curve seen and kept, taken
// to the sheet, evaluated, and the same in another profile.
func TestOwnCurve(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := visit(t, s, phone)
	w.fillSpot()
	before := w.shownValues()
	w.tap(app + " >>> #place-curves")
	w.tap(curves + " >>> #add")
	w.enter(curves+" >>> #name", " offcuts")
	w.tap(curves + " >>> #pairs")
	w.keys("510/513/514 241 3\n")
	w.waitForText(curves+" >>> #form", "model")
	w.screenshot("phone-anchor")
	w.tap(curves + " >>> #pairs")
	w.keys("540 2 268 3\n570 2 297 3\n600 2 329 3\n630 2 366 4\n660 2 404 4\n")
	w.waitForText(curves+" >>> #form", "HBW =")
	w.reveal(curves + " >>> strike-plot")
	w.screenshot("phone-curve")
	if bad := w.accessibility(); len(bad) > 0 {
		t.Errorf("accessibility:\n%s", strings.Join(bad, "\n"))
	}
	if wide := eval[int](w, "document.documentElement.scrollWidth"); wide > 360 {
		t.Errorf("the page is %d px wide on a phone of 360", wide)
	}
	w.tap(curves + " >>> #keep")
	w.waitForText(curves+" >>> #list", "offcuts")
	w.tap(curves + " >>> .use")
	w.waitForText(curves+" >>> #in-use", "offcuts")
	w.tap(app + " >>> #place-sheet")
	w.waitFor(element(app+" >>> strike-share >>> #link") + ".value.includes('#s1.')")
	w.waitForText(result, "HBW (HLD)")
	after := w.shownValues()
	if after == before {
		t.Errorf("with the own curve the sheet still reads %q", after)
	}
	link := eval[string](w, element(linkOf)+".value")
	t.Logf("the link has %d characters", len(link)-len(s.url))
	receiver := open(t, desktop)
	receiver.navigate(link)
	receiver.waitForText(glance, "HBW")
	if got := receiver.shownValues(); got != after {
		t.Errorf("the receiver sees %q, the sender %q", got, after)
	}
	w.checkClean(s)
	receiver.checkClean(s)
}

// Curves are edited, copied, deleted and brought back; bad lines are named.
func TestCurvesKept(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := visit(t, s, desktop)
	w.click(app + " >>> #place-curves")
	w.click(curves + " >>> #demo")
	w.waitForText(curves+" >>> #form", "HBW =")
	w.screenshot("desktop-curve")
	w.click(curves + " >>> #keep")
	w.waitForText(curves+" >>> #list", "Demo")
	w.click(curves + " >>> .delete")
	w.waitForText(curves+" >>> section", "is deleted")
	w.click(curves + " >>> #undo")
	w.waitForText(curves+" >>> #list", "Demo")
	w.reload()
	w.click(app + " >>> #place-curves")
	w.waitForText(curves+" >>> #list", "Demo")
	w.click(curves + " >>> .edit")
	w.click(curves + " >>> #pairs")
	w.keys("\n12 twelve\n")
	w.checkClean(s)
}
