package e2e

import (
	"fmt"
	"net/http"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/chromedp/chromedp/kb"

	"strikebook/build/serve"
)

// Where things stand on the page.
const (
	app      = "strike-app"
	label    = app + " >>> strike-spot >>> #label"
	metal    = app + " >>> strike-spot >>> #metal"
	measured = app + " >>> strike-spot >>> #measured"
	readings = app + " >>> strike-readings >>> section"
	entry    = app + " >>> strike-readings >>> #entry"
	result   = app + " >>> strike-result >>> section"
	glance   = app + " >>> strike-foot >>> #glance"
	linkOf   = app + " >>> strike-share >>> #link"
	cautions = app + " >>> strike-cautions >>> section"
	notices  = app + " >>> #notices"
)

// visit opens the page in a fresh profile.
func visit(t testing.TB, s *site, d device) *window {
	t.Helper()
	w := open(t, d)
	w.navigate(s.url)
	w.waitFor(element(entry))
	return w
}

// choose picks an option of a select as a user does.
func (w *window) choose(selector, value string) {
	w.t.Helper()
	w.waitFor(element(selector))
	eval[bool](w, fmt.Sprintf("((s) => { s.value = %q; s.dispatchEvent(new Event('change')); return true })(%s)", value, element(selector)))
}

// fillSpot fills in a spot of low-alloy steel with five readings.
func (w *window) fillSpot() {
	w.t.Helper()
	w.choose(metal, "low-alloy-steel")
	w.tap(label)
	w.keys("Nozzle N4, weld 2")
	w.tap(entry)
	w.keys("612608615610611")
	w.waitForText(glance, "HBW")
}

// count is how many readings the list shows.
func (w *window) count() int {
	w.t.Helper()
	return eval[int](w, "document.querySelector('strike-app').shadowRoot.querySelector('strike-readings').shadowRoot.querySelectorAll('ol li').length")
}

func (w *window) ready() {
	w.t.Helper()
	w.waitFor("!" + element(app+" >>> #loading"))
}

func (w *window) offlineReady() {
	w.t.Helper()
	w.waitForText(app+" >>> #offline", "without a network")
	w.waitFor("navigator.serviceWorker.controller")
}

// shownValues is what the result says, row by row.
func (w *window) shownValues() string {
	w.t.Helper()
	return eval[string](w, "[..."+element(app+" >>> strike-result >>> #scales")+".querySelectorAll('.value')].map(e => e.innerText).join('; ')")
}

func TestReadingsToResult(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := visit(t, s, phone)
	w.fillSpot()
	w.waitForText(result, "611 HLD")
	for _, want := range []string{"HBW (HLD)", "HRC (HLD)", "HV (HLD)", "MPa (HLD)", "±"} {
		w.waitForText(result, want)
	}
	w.waitForText(cautions, "estimate")
	if bad := w.accessibility(); len(bad) > 0 {
		t.Errorf("accessibility:\n%s", strings.Join(bad, "\n"))
	}
	w.screenshot("phone-light")
	eval[bool](w, "(window.scrollTo(0, 700), true)")
	w.screenshot("phone-light-result")
	if wide := eval[int](w, "document.documentElement.scrollWidth"); wide > 360 {
		t.Errorf("the page is %d px wide on a phone of 360", wide)
	}
	w.checkClean(s)
}

func TestDesktopAndDark(t *testing.T) {
	s := startSite(t, serve.Options{})
	for name, d := range map[string]device{"desktop-light": desktop, "desktop-dark": desktop.inDark(), "phone-dark": phone.inDark()} {
		t.Run(name, func(t *testing.T) {
			w := visit(t, s, d)
			w.choose(metal, "low-alloy-steel")
			w.focus(entry)
			w.keys("612608615610611")
			w.waitForText(glance, "HBW")
			if bad := w.accessibility(); len(bad) > 0 {
				t.Errorf("accessibility:\n%s", strings.Join(bad, "\n"))
			}
			w.screenshot(name)
		})
	}
}

// Five readings take fifteen keys and no pointer.
func TestKeyboardAlone(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := visit(t, s, desktop)
	w.choose(metal, "low-alloy-steel")
	w.focus(entry)
	w.keys("612655")
	w.waitFor(fmt.Sprintf("%s.value === ''", element(entry)))
	if n := w.count(); n != 2 {
		t.Fatalf("six digits made %d readings, want 2", n)
	}
	w.keys(kb.Backspace) // takes the last one back, less its last digit
	w.waitFor(fmt.Sprintf("%s.value === '65'", element(entry)))
	w.keys("0")
	w.keys(".5 ")
	w.waitForText(readings, "650.5")
	w.keys("608")
	w.keys(kb.Tab) // to the first reading
	w.keys(kb.Enter)
	w.waitFor(element(app + " >>> strike-readings >>> #reason"))
	w.keys(kb.Enter)
	w.waitForText(readings, "Give the reason")
	w.keys("probe tilted")
	w.keys(kb.Enter)
	w.waitForText(readings, "struck")
	w.waitForText(result, "struck: 1")
}

func TestStrikeAndRestore(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := visit(t, s, phone)
	w.choose(metal, "low-alloy-steel")
	w.tap(entry)
	w.keys("612608615655610611")
	w.waitForText(result, "count: 6")
	first := app + " >>> strike-readings >>> [data-at='3']"
	w.tap(first)
	w.waitFor(element(app + " >>> strike-readings >>> #reason"))
	w.keys("probe tilted")
	w.tap(app + " >>> strike-readings >>> #strike")
	w.waitForText(result, "count: 5, struck: 1")
	w.tap(first)
	w.waitForText(readings, "probe tilted")
	w.tap(app + " >>> strike-readings >>> #restore")
	w.waitForText(result, "count: 6")
	w.checkClean(s)
}

// The ways in which a list can be pasted, and what each comes to.
func TestPaste(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := visit(t, s, desktop)
	for _, c := range []struct{ text, want string }{
		{"612, 655, 640", "612 655 640"},
		{"612,655,640", "612 655 640"},
		{"612;655;640", "612 655 640"},
		{"612\\n655\\r\\n640", "612 655 640"},
		{"612,5 655,1", "612.5 655.1"},
		{"612.5;655.1", "612.5 655.1"},
		{"612655640", "612 655 640"},
		{"abc 612", "abc 612"},
		{"  ", ""},
	} {
		eval[bool](w, fmt.Sprintf(`((field) => {
			const data = new DataTransfer(); data.setData("text", "%s");
			field.dispatchEvent(new ClipboardEvent("paste", { clipboardData: data, cancelable: true })); return true })(%s)`, c.text, element(entry)))
		w.waitFor("document.querySelector('strike-app').updateComplete")
		got := eval[string](w, "[...document.querySelector('strike-app').shadowRoot.querySelector('strike-readings').shadowRoot.querySelectorAll('ol button span')].map(e => e.innerText).join(' ')")
		if got != c.want {
			t.Errorf("%q makes %q, want %q", c.text, got, c.want)
		}
		if c.want != "" {
			w.click(app + " >>> strike-share >>> #new")
			w.waitForText(readings, "No readings yet")
		}
	}
}

// A link opened in a fresh profile, with no network but the first load, shows
// the same numbers.
func TestLinkElsewhere(t *testing.T) {
	s := startSite(t, serve.Options{})
	sender := visit(t, s, phone)
	sender.fillSpot()
	sender.waitFor(element(linkOf) + ".value.includes('#s1.')")
	link := eval[string](sender, element(linkOf)+".value")
	if at := eval[string](sender, "location.href"); at != link {
		t.Errorf("the address is %s, the link %s", at, link)
	}

	receiver := open(t, phone)
	receiver.navigate(link)
	receiver.waitForText(glance, "HBW")
	if got, want := receiver.shownValues(), sender.shownValues(); got != want || want == "" {
		t.Errorf("the receiver sees %q, the sender %q", got, want)
	}
	if got := eval[string](receiver, element(label)+".value"); got != "Nozzle N4, weld 2" {
		t.Errorf("the label reads %q", got)
	}
	receiver.checkClean(s)
}

// A link over a sheet in work lays that sheet aside, and brings it back.
func TestLinkOverOwnSheet(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := visit(t, s, phone)
	w.fillSpot()
	w.waitFor(element(linkOf) + ".value.includes('#s1.')")
	link := eval[string](w, element(linkOf)+".value")
	w.tap(app + " >>> strike-share >>> #new")
	w.waitForText(readings, "No readings yet")
	w.tap(entry)
	w.keys("500502504")
	w.waitForText(result, "502 HLD")
	w.navigate(link)
	w.waitForText(result, "611 HLD")
	w.waitForText(notices, "kept aside")
	w.tap(app + " >>> #aside-back")
	w.waitForText(result, "502 HLD")
}

func TestDamagedLink(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := visit(t, s, phone)
	w.fillSpot()
	before := w.shownValues()
	for fragment, want := range map[string]string{"#s1.AAAAAAA": "damaged", "#elsewhere": "no link to a record", "#s9.AAAA": "version 9"} {
		eval[bool](w, fmt.Sprintf("(location.hash = %q, true)", fragment))
		w.waitForText(notices, want)
		if after := w.shownValues(); after != before {
			t.Errorf("%s: the sheet changed from %q to %q", fragment, before, after)
		}
		w.tap(app + " >>> #refused-dismiss")
		w.waitFor("!" + element(app+" >>> #refused"))
	}
}

// The last sheet survives the page, without a network and without a server.
func TestOfflineAndServerGone(t *testing.T) {
	s := startSite(t, serve.Options{Prefix: "/wiki/tools/strikebook/"})
	w := visit(t, s, phone)
	w.offlineReady()
	w.fillSpot()
	w.tap(entry)
	w.keys("61") // not yet a reading, and kept all the same
	before := w.shownValues()
	w.setOffline(true)
	w.reload()
	w.waitForText(glance, "HBW")
	if after := w.shownValues(); after != before {
		t.Errorf("offline the sheet reads %q, before %q", after, before)
	}
	w.waitFor(fmt.Sprintf("%s.value === '61'", element(entry)))
	w.setOffline(false)
	s.stop()
	w.navigate(s.url)
	w.waitForText(glance, "HBW")
	if after := w.shownValues(); after != before {
		t.Errorf("without a server the sheet reads %q, before %q", after, before)
	}
}

// A host that does not know the type of WebAssembly serves it all the same.
func TestWrongTypeOfWasm(t *testing.T) {
	s := startSite(t, serve.Options{PlainWasm: true})
	w := visit(t, s, phone)
	w.fillSpot()
	w.checkClean(s)
}

// The form takes digits before the core is there; a core that cannot be loaded
// leaves a sentence, what was typed, and a way to retry.
func TestCoreLateAndMissing(t *testing.T) {
	release := make(chan bool)
	missing := true
	s := startSite(t, serve.Options{Before: func(w http.ResponseWriter, r *http.Request, name string) bool {
		if !strings.HasSuffix(name, ".wasm") || !missing {
			return false
		}
		<-release
		http.Error(w, "gone", http.StatusServiceUnavailable)
		return true
	}})
	w := visit(t, s, phone)
	w.waitForText(notices, "Loading the calculation")
	w.choose(metal, "low-alloy-steel")
	w.tap(entry)
	w.keys("612608615")
	w.waitForText(readings, "615")
	close(release)
	w.waitForText(notices, "could not be loaded")
	w.waitForText(readings, "615")
	missing = false
	w.tap(app + " >>> #failed-retry")
	w.waitForText(glance, "HBW")
}

// A worker that dies is started again, and the sheet is there.
func TestWorkerDies(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := visit(t, s, phone)
	w.fillSpot()
	w.ready()
	// The core's program ends: what it is asked next has no answer.
	eval[bool](w, `(document.querySelector("strike-app").core.worker.postMessage({ id: -1, call: "no such call" }), true)`)
	w.tap(entry)
	w.keys("700")
	w.waitForText(result, "count: 6")
}

// A new version waits until the user agrees.
func TestUpdateWaits(t *testing.T) {
	b := buildPage(t)
	dir := filepath.Join(t.TempDir(), "page")
	if err := os.CopyFS(dir, os.DirFS(b.dir)); err != nil {
		t.Fatal(err)
	}
	s := startFolder(t, dir, serve.Options{})
	w := visit(t, s, phone)
	w.offlineReady()
	w.fillSpot()
	worker, err := os.ReadFile(filepath.Join(dir, "sw.js"))
	if err != nil {
		t.Fatal(err)
	}
	if err := os.RemoveAll(filepath.Join(dir, "sw.js.br")); err != nil {
		t.Fatal(err)
	}
	if err := os.RemoveAll(filepath.Join(dir, "sw.js.gz")); err != nil {
		t.Fatal(err)
	}
	if err := os.WriteFile(filepath.Join(dir, "sw.js"), append(worker, "\n// the next version\n"...), 0o644); err != nil {
		t.Fatal(err)
	}
	eval[bool](w, "navigator.serviceWorker.getRegistration().then(r => r.update()).then(() => true)")
	w.waitForText(notices, "new version is ready")
	if waiting := eval[bool](w, "navigator.serviceWorker.getRegistration().then(r => Boolean(r.waiting))"); !waiting {
		t.Error("the new version did not wait")
	}
	w.tap(app + " >>> #update-switch")
	w.waitFor("navigator.serviceWorker.getRegistration().then(r => !r.waiting)")
	w.waitForText(glance, "HBW")
}

// What cannot be converted has no number, and says why.
func TestStops(t *testing.T) {
	s := startSite(t, serve.Options{})
	for _, c := range []struct{ name, scale, group, keys, want string }{
		{"glass on a steel", "HLD", "low-alloy-steel", "910912908", "outside the application range"},
		{"no built-in curve", "HLDL", "low-alloy-steel", "710712708", "no built-in conversion"},
		{"hard aluminium", "HLD", "aluminium", "710712708", "outside 40 to 190 HV"},
		{"metal not chosen", "HLD", "", "610612608", "metal is not chosen"},
		{"text", "HLD", "low-alloy-steel", "610612608abc ", "is no reading"},
	} {
		t.Run(c.name, func(t *testing.T) {
			w := visit(t, s, phone)
			w.choose(measured, c.scale)
			w.choose(metal, c.group)
			w.tap(entry)
			w.keys(c.keys)
			w.waitForText(result, c.want)
			w.waitForText(glance, "No converted value")
			if shown := w.shownValues(); strings.Contains(shown, "(") {
				t.Errorf("a converted value is shown: %q", shown)
			}
		})
	}
}

// Readings of a direct method enter by the second leg, and keep their scale.
func TestDirectMethod(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := visit(t, s, phone)
	w.choose(metal, "low-alloy-steel")
	w.choose(measured, "HRC")
	w.tap(entry)
	w.keys("30,5 31,0 30,8 ")
	w.waitForText(result, "30.8 HRC")
	w.waitForText(result, "HBW (HRC)")
}
