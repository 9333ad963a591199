package e2e

import (
	"bytes"
	"context"
	"encoding/json"
	"fmt"
	"image/png"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"
	"time"

	"github.com/chromedp/cdproto/browser"
	"github.com/chromedp/cdproto/cdp"
	"github.com/chromedp/cdproto/emulation"
	"github.com/chromedp/cdproto/page"
	"github.com/chromedp/cdproto/storage"
	"github.com/chromedp/chromedp"
	"github.com/chromedp/chromedp/kb"
	"github.com/ledongthuc/pdf"
	"github.com/makiuchi-d/gozxing"
	"github.com/makiuchi-d/gozxing/qrcode"

	"strikebook/build/serve"
)

// Where the parts of the Book stand on the page.
const (
	book      = app + " >>> strike-book"
	rows      = book + " >>> strike-spots >>> #list"
	count     = book + " >>> #count"
	summary   = book + " >>> strike-summary >>> section"
	takePart  = book + " >>> strike-take"
	givePart  = book + " >>> strike-give"
	spotPanel = book + " >>> strike-book-spot"
)

// goTo goes to a place of the page.
func (w *window) goTo(place string) {
	w.t.Helper()
	w.click(app + " >>> #place-" + place)
	w.waitFor(element(app+" >>> #place-"+place) + ".ariaCurrent === 'page'")
}

// addSpot fills in a spot on a new sheet and waits until the Book has it.
func (w *window) addSpot(name, readings string) {
	w.t.Helper()
	if eval[bool](w, element(label)+".value !== ''") {
		w.click(app + " >>> strike-share >>> #new")
		w.waitFor(element(label) + ".value === ''")
	}
	w.focus(label)
	w.keys(name)
	w.focus(entry)
	w.keys(readings)
	w.waitForText(app+" >>> #filed", "Kept in the Book")
	w.kept()
}

// kept waits until nothing is left to be written.
func (w *window) kept() {
	w.t.Helper()
	w.waitFor(element(app) + ".keeper.owed.size === 0")
}

// fillJob fills in a job of three spots with a limit, and goes to the Book.
func (w *window) fillJob() {
	w.t.Helper()
	w.choose(metal, "low-alloy-steel")
	w.choose(limit+" >>> #pick", "pwht-p3-p4")
	w.addSpot("W1 base", "432428435430431")
	w.choose(app+" >>> strike-spot >>> #zone", "base")
	w.addSpot("W1 HAZ", "470468475466472")
	w.choose(app+" >>> strike-spot >>> #zone", "haz")
	w.addSpot("W1 weld", "612608615610611")
	w.choose(app+" >>> strike-spot >>> #zone", "weld")
	w.kept()
	w.goTo("book")
	w.waitForText(count, "of 3")
	w.waitFor("!" + element(book+" >>> #evaluating"))
}

// checkAccessible fails the test where axe finds a fault.
func (w *window) checkAccessible(where string) {
	w.t.Helper()
	if bad := w.accessibility(); len(bad) > 0 {
		w.t.Errorf("accessibility of %s:\n%s", where, strings.Join(bad, "\n"))
	}
}

// Spots are kept as they are typed, listed, judged, and opened again.
func TestBookKeepsSpots(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := visit(t, s, phone)
	w.fillJob()
	for _, want := range []string{"W1 base", "W1 HAZ", "W1 weld", "±", "(HLD)", "Conforms", "Does not conform"} {
		w.waitForText(rows, want)
	}
	w.waitForText(summary, "Worst: W1 weld")
	w.waitForText(summary, "Heat-affected zone")
	w.waitForText(summary, "Uneven")
	w.checkAccessible("the Book")
	w.screenshot("book-phone-light")
	w.reveal(rows)
	w.screenshot("book-phone-light-list")
	if wide := eval[int](w, "document.documentElement.scrollWidth"); wide > 360 {
		t.Errorf("the Book is %d px wide on a phone of 360", wide)
	}
	w.click(rows + " [data-at='0'] .open")
	w.waitFor(element(label) + ".value === 'W1 base'")
	w.waitForText(result, "431 HLD")
	w.reload()
	w.waitFor(element(label) + ".value === 'W1 base'")
	w.goTo("book")
	w.waitForText(count, "of 3")
	w.checkClean(s)
}

func TestBookLooks(t *testing.T) {
	s := startSite(t, serve.Options{})
	for name, d := range map[string]device{"desktop-light": desktop, "desktop-dark": desktop.inDark(), "phone-dark": phone.inDark()} {
		t.Run(name, func(t *testing.T) {
			w := visit(t, s, d)
			w.fillJob()
			w.checkAccessible("the Book")
			w.screenshot("book-" + name)
			w.click(rows + " [data-at='1'] .more")
			w.waitFor(element(spotPanel+" >>> #link") + "?.value.includes('#s1.')")
			w.checkAccessible("the dialog")
			w.screenshot("book-dialog-" + name)
		})
	}
}

const report = book + " >>> strike-report"

// unfoldBook opens the part of the Book that an element belongs to.
func (w *window) unfoldBook(part string) {
	w.t.Helper()
	w.waitFor(element(part))
	eval[bool](w, "("+element(part)+".closest('details').setAttribute('open', ''), true)")
}

// openReport opens the report of the spots shown.
func (w *window) openReport() {
	w.t.Helper()
	w.unfoldBook(givePart)
	w.click(givePart + " >>> #report")
	w.waitFor(element(report+" >>> #print") + "?.disabled === false")
}

// print prints the page on paper of a size in inches, and reads the PDF: the
// text of each of its pages, without any white space.
func (w *window) print(name string, width, height float64) []string {
	w.t.Helper()
	ctx, cancel := context.WithTimeout(w.ctx, actionTimeout)
	defer cancel()
	printed, err := chromedp.Call(ctx, page.PrintToPDF, page.PrintToPDFParams{PaperWidth: width, PaperHeight: height, PrintBackground: new(true)})
	if err != nil {
		w.fail("cannot print: %v", err)
	}
	if err := os.WriteFile(filepath.Join(buildPage(w.t).root, "out", "screenshots", name+".pdf"), printed.Data, 0o644); err != nil {
		w.t.Fatal(err)
	}
	reader, err := pdf.NewReader(bytes.NewReader(printed.Data), int64(len(printed.Data)))
	if err != nil {
		w.t.Fatalf("the PDF cannot be read: %v", err)
	}
	var pages []string
	for i := range reader.NumPage() {
		text, err := reader.Page(i + 1).GetPlainText(nil)
		if err != nil {
			w.t.Fatalf("page %d of the PDF cannot be read: %v", i+1, err)
		}
		pages = append(pages, strings.Join(strings.Fields(text), ""))
	}
	return pages
}

// onPaper keeps a picture of the page as it would be printed.
func (w *window) onPaper(name string) {
	w.t.Helper()
	media := func(kind string) {
		ctx, cancel := context.WithTimeout(w.ctx, actionTimeout)
		defer cancel()
		if _, err := chromedp.Call(ctx, emulation.SetEmulatedMedia, emulation.SetEmulatedMediaParams{Media: kind}); err != nil {
			w.fail("cannot change the medium: %v", err)
		}
	}
	media("print")
	w.screenshot(name)
	media("")
}

// The report holds what a reader of the paper must know, and its pages end where
// a spot ends.
func TestBookReport(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := visit(t, s, desktop.inDark())
	w.fillJob()
	w.openReport()
	w.waitForText(report+" >>> #table", "W1 HAZ")
	w.waitFor(element(report + " >>> strike-summary >>> #counts"))
	w.checkAccessible("the report as a table")
	w.screenshot("report-table")
	for name, paper := range map[string][2]float64{"a4": {8.27, 11.69}, "letter": {8.5, 11}} {
		text := strings.Join(w.print("report-table-"+name, paper[0], paper[1]), "")
		for _, want := range []string{"First job", "W1 base", "159 HBW (HLD) ± 22", "at most 225 HBW", "Does not conform", "Signature", "A converted hardness is an estimate"} {
			if !strings.Contains(text, strings.ReplaceAll(want, " ", "")) {
				t.Errorf("the table on %s does not say %q:\n%s", name, want, text)
			}
		}
		if strings.Contains(text, "BacktotheBook") {
			t.Errorf("the buttons are printed, too:\n%s", text)
		}
	}
	w.choose(report+" >>> #form", "pages")
	w.waitForText(report+" >>> #paper", "Repeatability")
	w.checkAccessible("the report in pages")
	w.screenshot("report-pages")
	pages := w.print("report-pages", 8.27, 11.69)
	w.onPaper("report-page-on-paper")
	for i, want := range [][]string{
		{"W1 base", "1 of 3"}, {"W1 HAZ", "2 of 3"}, {"W1 weld", "3 of 3"},
	} {
		starts := slices.IndexFunc(pages, func(text string) bool {
			return strings.HasPrefix(text, strings.ReplaceAll(strings.Join(want, ""), " ", ""))
		})
		if starts < i {
			t.Errorf("no page begins with %q: %q", want, pages)
		}
	}
	text := strings.Join(pages, "")
	for _, want := range []string{"432, 428, 435, 430, 431", "Repeatability", "Check on a test block: none", "HV (HLD) ±", "Probability that the spot conforms", "Coverage factor", "expanded uncertainty at 95 %", "Signature"} {
		if strings.Count(text, strings.ReplaceAll(want, " ", "")) == 0 {
			t.Errorf("the pages do not say %q:\n%s", want, text)
		}
	}
	w.checkClean(s)
}

// download makes the browser save files in a folder, and returns what a step
// saves there.
func (w *window) download(name string, step func()) string {
	w.t.Helper()
	dir := w.t.TempDir()
	ctx, cancel := context.WithTimeout(w.ctx, actionTimeout)
	defer cancel()
	if _, err := chromedp.Call(ctx, browser.SetDownloadBehavior, browser.SetDownloadBehaviorParams{Behavior: "allow", DownloadPath: dir}); err != nil {
		w.fail("cannot receive downloads: %v", err)
	}
	step()
	for deadline := time.Now().Add(actionTimeout); ; time.Sleep(pollInterval) {
		if text, err := os.ReadFile(filepath.Join(dir, name)); err == nil && len(text) > 0 {
			return string(text)
		}
		if time.Now().After(deadline) {
			entries, _ := os.ReadDir(dir)
			w.fail("no file %s came, but %v", name, entries)
		}
	}
}

// takeText pastes a text into the part that brings spots in, and looks at it.
func (w *window) takeText(text string) {
	w.t.Helper()
	w.unfoldBook(takePart)
	quoted, err := json.Marshal(text)
	if err != nil {
		w.t.Fatal(err)
	}
	eval[bool](w, fmt.Sprintf("(field => { field.value = %s; return true })(%s)", quoted, element(takePart+" >>> #text")))
	w.click(takePart + " >>> #look")
	w.waitFor(element(takePart + " >>> #offer"))
}

// takeFile hands a file to the part that brings spots in.
func (w *window) takeFile(name, text string) {
	w.t.Helper()
	w.unfoldBook(takePart)
	quoted, err := json.Marshal(text)
	if err != nil {
		w.t.Fatal(err)
	}
	eval[bool](w, fmt.Sprintf(`((field) => {
		const files = new DataTransfer(); files.items.add(new File([%s], %q));
		field.files = files.files; field.dispatchEvent(new Event("change")); return true })(%s)`, quoted, name, element(takePart+" >>> #files")))
	w.progress(element(takePart + " >>> #offer"))
}

// progress waits for what may take long, as long as the page says that it goes on.
func (w *window) progress(expression string) {
	w.t.Helper()
	const bar = takePart + " >>> progress"
	for before := -1; !eval[bool](w, "Boolean("+expression+")"); time.Sleep(pollInterval) {
		done := eval[int](w, "("+element(bar)+"?.value ?? 0)")
		if done == before {
			w.waitFor(fmt.Sprintf("(%s) || %s?.value > %d", expression, element(bar), done))
		}
		before = done
	}
}

// A file of the Book restores all of it in another browser, which writes the
// very same file.
func TestBookFileRoundTrip(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := visit(t, s, desktop)
	w.fillJob()
	w.waitForText(book+" >>> #remind", "in this browser only")
	w.unfoldBook(givePart)
	first := w.download("First-job.json", func() { w.click(givePart + " >>> #json") })
	w.waitFor("!" + element(book+" >>> #remind"))

	other := visit(t, s, phone)
	other.goTo("book")
	other.takeFile("book.json", first)
	other.waitForText(takePart+" >>> #offer", "Can be taken: 3 spots")
	other.checkAccessible("the preview")
	other.screenshot("take-preview-phone")
	other.click(takePart + " >>> #take")
	other.waitForText(count, "of 3")
	other.waitForText(rows, "332 HBW (HLD) ± 33")
	other.unfoldBook(givePart)
	second := other.download("First-job.json", func() { other.click(givePart + " >>> #json") })
	if first != second {
		t.Errorf("the file was\n%s\nand is\n%s", first, second)
	}
	// A second time there is nothing to take.
	other.takeFile("book.json", first)
	other.waitForText(takePart+" >>> #offer", "just as they are: 3")
	other.checkClean(s)
}

// Links and records of JSON come in together; what is none of it is named, and
// spoils nothing.
func TestBookTakesLinks(t *testing.T) {
	s := startSite(t, serve.Options{})
	link := example(t, s)
	w := visit(t, s, phone)
	w.goTo("book")
	w.takeText("the first: " + link + "\nthe second: " + link[:len(link)-4] + "\n" + link)
	w.waitForText(takePart+" >>> #offer", "Can be taken: 2 spots")
	w.waitForText(takePart+" >>> #offer", "Cannot be taken: 1")
	w.waitForText(takePart+" >>> #bad-rows", "damaged")
	w.click(takePart + " >>> #take")
	w.waitForText(count, "of 2")
	w.takeText(`[{"v":1,"label":"A","readings":[{"value":500}],"scale":"HLD","device":"D"},{"v":1,"label":"B","readings":[],"zone":"nowhere"}]`)
	w.waitForText(takePart+" >>> #offer", "Can be taken: 1 spots")
	w.waitForText(takePart+" >>> #bad-rows", "nowhere")
	w.click(takePart + " >>> #drop")
	w.waitFor("!" + element(takePart+" >>> #offer"))
	w.takeText(`{"what": 1}`)
	w.waitForText(takePart+" >>> #bad-rows", "no record and no Book")
}

// A spot is deleted, and comes back; and so does a job. Spots are duplicated and
// moved.
func TestBookDeleteMoveUndo(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := visit(t, s, phone)
	w.fillJob()
	more := func(at int, act string) {
		t.Helper()
		w.click(fmt.Sprintf("%s [data-at='%d'] .more", rows, at))
		w.click(spotPanel + " >>> #" + act)
	}
	more(2, "delete") // the one that is on the sheet
	w.waitForText(book+" >>> .undo", "Deleted: W1 weld")
	w.waitForText(count, "of 2")
	if on := eval[string](w, element(label)+".value"); on != "" {
		t.Errorf("the deleted spot %q is still on the sheet", on)
	}
	w.checkAccessible("the Book after a deletion")
	w.click(book + " >>> #undo")
	w.waitForText(count, "of 3")
	w.waitForText(rows, "W1 weld")
	more(0, "duplicate")
	w.waitForText(count, "of 4")

	w.click(book + " >>> #job-new")
	w.waitFor(element(book + " >>> #name"))
	w.keys("Nozzles\r")
	w.waitForText(book+" >>> #job", "Nozzles")
	w.waitForText(book+" >>> #empty", "No spots in this job yet")
	w.choose(book+" >>> #job", eval[string](w, element(book+" >>> #job")+".options[0].value"))
	w.waitForText(count, "of 4")
	more(1, "move")
	w.waitForText(count, "of 3")
	w.choose(book+" >>> #job", eval[string](w, element(book+" >>> #job")+".options[1].value"))
	w.waitForText(count, "of 1")
	w.click(book + " >>> #job-delete")
	w.waitForText(book+" >>> .undo", "the job “Nozzles” with its spots, 1")
	w.click(book + " >>> #undo")
	w.waitForText(count, "of 1")
	w.checkClean(s)
}

// Search, filters and orders.
func TestBookChooses(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := visit(t, s, desktop)
	w.fillJob()
	choose := func(id, value, wantCount, wantFirst string) {
		t.Helper()
		w.choose(book+" >>> #"+id, value)
		w.waitForText(count, wantCount)
		w.waitForText(rows+" [data-at='0']", wantFirst)
	}
	choose("order", "worst", "3 of 3", "W1 weld")
	choose("order", "label", "3 of 3", "W1 base")
	choose("zone", "haz", "1 of 3", "W1 HAZ")
	choose("zone", "", "3 of 3", "W1 base")
	choose("outcome", "does-not-conform", "1 of 3", "W1 weld")
	choose("outcome", "", "3 of 3", "W1 base")
	w.focus(book + " >>> #search")
	w.keys("haz")
	w.waitForText(count, "1 of 3")
	w.waitForText(rows, "W1 HAZ")
	w.keys(kb.Backspace + kb.Backspace + kb.Backspace)
	w.waitForText(count, "3 of 3")

	// From row to row, and to what can be done with one, without a pointer.
	w.focus(rows + " [data-at='0'] .open")
	w.keys(kb.ArrowDown)
	w.keys(kb.End)
	w.keys(kb.ArrowUp)
	w.keys(kb.Tab)
	w.keys(kb.Enter)
	w.waitForText(spotPanel+" >>> dialog", "W1 HAZ")
	w.keys(kb.Escape)
	w.waitFor("!" + element(spotPanel+" >>> dialog") + ".open")
}

// The QR code of a spot, read by a decoder of its own, is its link.
func TestBookQR(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := visit(t, s, phone)
	w.fillJob()
	w.click(rows + " [data-at='1'] .more")
	w.waitFor(element(spotPanel+" >>> #link") + "?.value.includes('#s1.')")
	w.reveal(spotPanel + " >>> .qr")
	ctx, cancel := context.WithTimeout(w.ctx, actionTimeout)
	defer cancel()
	picture, err := chromedp.Run(ctx, chromedp.CaptureScreenshot())
	if err != nil {
		t.Fatal(err)
	}
	screen, err := png.Decode(bytes.NewReader(picture))
	if err != nil {
		t.Fatal(err)
	}
	bitmap, err := gozxing.NewBinaryBitmapFromImage(screen)
	if err != nil {
		t.Fatal(err)
	}
	code, err := qrcode.NewQRCodeReader().Decode(bitmap, nil)
	if err != nil {
		w.fail("the code cannot be read off the screen: %v", err)
	}
	if link := eval[string](w, element(spotPanel+" >>> #link")+".value"); code.GetText() != link {
		t.Errorf("the code says %q, the link is %q", code.GetText(), link)
	}
}

// tab opens another tab of the same browser.
func (w *window) tab(s *site) *window {
	w.t.Helper()
	other := &window{t: w.t}
	other.ctx, _ = chromedp.NewContext(w.ctx, chromedp.WithListener(other.note))
	if err := chromedp.Do(other.ctx); err != nil {
		w.t.Fatalf("cannot open another tab: %v", err)
	}
	other.do(desktop.emulate())
	other.navigate(s.url)
	other.waitFor(element(entry))
	return other
}

// Two tabs on one spot: neither writes over the other unseen.
func TestBookTwoTabs(t *testing.T) {
	s := startSite(t, serve.Options{})
	for _, c := range []struct {
		choice string
		spots  int
		want   string
	}{{"theirs", 1, "theirs"}, {"copy", 2, "mine"}} {
		t.Run(c.choice, func(t *testing.T) {
			w := visit(t, s, desktop)
			w.choose(metal, "low-alloy-steel")
			w.addSpot("N1", "432428435")
			other := w.tab(s)
			other.waitFor(element(label) + ".value === 'N1'")
			w.focus(label)
			w.keys(" theirs")
			w.kept()
			other.focus(label)
			other.keys(" mine")
			other.waitForText(notices, "Another tab has changed the spot")
			other.kept()
			other.checkAccessible("a conflict")
			other.screenshot("book-conflict")
			other.click(app + " >>> #conflict-" + c.choice)
			other.waitFor(element(label) + ".value === 'N1 " + c.want + "'")
			other.goTo("book")
			other.waitForText(count, fmt.Sprintf("of %d", c.spots))
			other.waitForText(rows, "N1 theirs")
			w.goTo("book")
			w.waitForText(count, fmt.Sprintf("of %d", c.spots))
		})
	}
}

// The renderer is killed while something is being typed: all of it is there when
// the page is opened again.
func TestBookKilledRenderer(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := visit(t, s, desktop)
	w.choose(metal, "low-alloy-steel")
	w.addSpot("N1", "432428435")
	w.keys("43")
	// The command that kills it gets no answer.
	ctx, cancel := context.WithTimeout(w.ctx, time.Second)
	chromedp.Call(ctx, page.Crash, cdp.Empty{})
	cancel()
	again := w.tab(s)
	again.waitFor(element(entry) + ".value === '43'")
	again.waitFor(element(label) + ".value === 'N1'")
	if n := again.count(); n != 3 {
		t.Errorf("%d readings are left of 3", n)
	}
	again.keys("")
	again.focus(entry)
	again.keys("0")
	again.kept()
	again.goTo("book")
	again.waitForText(count, "of 1")
}

// A full disk: the page says so and offers a file; nothing typed is lost, and it
// is kept as soon as there is room.
func TestBookQuota(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := open(t, desktop)
	w.quota(s, 300_000)
	w.navigate(s.url)
	w.waitFor(element(entry))
	w.choose(metal, "low-alloy-steel")
	w.addSpot("N1", "432428435")
	// The browser asks for the room that is left only when what it last knew of
	// is used up.
	w.quota(s, 1)
	w.click(app + " >>> strike-share >>> #new")
	w.waitFor(element(label) + ".value === ''")
	w.focus(label)
	w.keys("N2")
	w.focus(entry)
	w.keys("503503503")
	for range 20 {
		w.keys(strings.Repeat("503", 20))
	}
	w.waitForText(notices, "does not keep what you type")
	w.checkAccessible("a full disk")
	w.screenshot("book-full")
	text := w.download("Strikebook.json", func() { w.click(app + " >>> #unkept-export") })
	for _, want := range []string{`"N1"`, `"N2"`, `{"value":503}`} {
		if !strings.Contains(text, want) {
			t.Errorf("the file lacks %s:\n%s", want, text)
		}
	}
	w.quota(s, -1)
	w.focus(entry)
	w.keys("503")
	w.waitFor("!" + element(app+" >>> #unkept"))
	w.goTo("book")
	w.waitForText(count, "of 2")
	w.waitForText(rows, "N2")
}

// quota limits what the page may keep, in bytes; less than nothing lifts it.
func (w *window) quota(s *site, bytes float64) {
	w.t.Helper()
	params := storage.OverrideQuotaForOriginParams{Origin: s.http.URL}
	if bytes >= 0 {
		params.QuotaSize = &bytes
	}
	ctx, cancel := context.WithTimeout(w.ctx, actionTimeout)
	defer cancel()
	if _, err := chromedp.Call(ctx, storage.OverrideQuotaForOrigin, params); err != nil {
		w.fail("cannot limit the quota: %v", err)
	}
}

// A link's sheet is not put into the Book unless the user says so.
func TestBookForeignSheet(t *testing.T) {
	s := startSite(t, serve.Options{})
	link := example(t, s)
	w := open(t, phone)
	w.navigate(link)
	w.waitForText(glance, "HBW")
	w.waitForText(notices, "not in your Book")
	w.goTo("book")
	w.waitForText(book+" >>> section", "No job yet")
	w.checkAccessible("an empty Book")
	w.click(app + " >>> #foreign-keep")
	w.waitForText(count, "of 1")
	w.checkClean(s)
}

// A table with rows that are wrong: each is named with the reason, and the good
// ones can be taken. What the user says of a column is remembered.
func TestBookTakesTable(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := visit(t, s, phone)
	w.choose(metal, "low-alloy-steel")
	w.goTo("book")
	table := "Where;Zone;r1;r2;r3\r\nN1;haz;432;428,5;435\r\nN2;nowhere;500;501;502\r\nN3;weld;610;612;608\r\n"
	w.takeFile("spots.csv", table)
	w.waitForText(takePart+" >>> #offer", "Can be taken: 2 spots")
	w.waitForText(takePart+" >>> #bad-rows", "spots.csv, row 3")
	w.waitForText(takePart+" >>> #bad-rows", "nowhere")
	w.waitForText(takePart+" >>> #defaults", "cast steel")
	w.checkAccessible("the preview of a table")
	w.reveal(takePart + " >>> #good")
	w.screenshot("take-table-phone")
	if wide := eval[int](w, "document.documentElement.scrollWidth"); wide > 360 {
		t.Errorf("the preview is %d px wide on a phone of 360", wide)
	}
	const first = takePart + " >>> #column-0-0"
	w.choose(first, "by")
	w.waitFor(element(first) + ".value === 'by' && !" + element(takePart+" >>> progress"))
	w.choose(first, "label")
	w.waitFor(element(first) + ".value === 'label' && " + element(takePart+" >>> #take"))
	w.click(takePart + " >>> #take")
	w.waitForText(count, "of 2")
	w.waitForText(rows, "N1")
	w.waitForText(rows, "HV (HLD) ±")
	// Nothing but the readings: the user names the columns once.
	odd := "Ort\tWert A\tWert B\nX1\t432\t428\nX2\t433\t431\n"
	w.takeText(odd)
	w.choose(takePart+" >>> #column-0-0", "label")
	w.waitFor(element(takePart+" >>> #column-0-0") + "?.value === 'label'")
	w.choose(takePart+" >>> #column-0-1", "readings")
	w.waitFor(element(takePart+" >>> #column-0-1") + "?.value === 'readings'")
	w.choose(takePart+" >>> #column-0-2", "readings")
	w.waitForText(takePart+" >>> #offer", "Can be taken: 2 spots")
	w.click(takePart + " >>> #take")
	w.waitForText(count, "of 4")
	w.takeText(odd)
	for column, role := range []string{"label", "readings", "readings"} {
		if got := eval[string](w, element(fmt.Sprintf("%s >>> #column-0-%d", takePart, column))+".value"); got != role {
			t.Errorf("column %d is remembered as %q, want %q", column, got, role)
		}
	}
	w.click(takePart + " >>> #drop")
	w.checkClean(s)
}

// What goes out as CSV does no harm in a spreadsheet, and comes in again.
func TestBookCsv(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := visit(t, s, desktop)
	w.choose(metal, "low-alloy-steel")
	w.addSpot("=1+2", "432428435")
	w.goTo("book")
	w.waitForText(count, "of 1")
	w.unfoldBook(givePart)
	csv := w.download("First-job.csv", func() { w.click(givePart + " >>> #csv") })
	if !strings.Contains(csv, "'=1+2") || !strings.Contains(csv, "432") {
		t.Errorf("the CSV is\n%s", csv)
	}
	w.takeFile("again.csv", csv)
	w.waitForText(takePart+" >>> #offer", "Can be taken: 1 spots")
	w.click(takePart + " >>> #take")
	w.waitForText(count, "of 2")
	if both := eval[string](w, "[..."+element(rows)+".querySelectorAll('.name')].map(e => e.innerText).join()"); both != "=1+2,=1+2" {
		t.Errorf("the labels read %s", both)
	}
}

// manySpots is a table of spots that anybody can make up.
func manySpots(n int) string {
	var b strings.Builder
	b.WriteString("label,zone,r1,r2,r3,r4,r5\n")
	for i := range n {
		fmt.Fprintf(&b, "Bolt %05d,%s", i+1, []string{"base", "haz", "weld"}[i%3])
		for j := range 5 {
			fmt.Fprintf(&b, ",%d", 420+(i*7+j*13)%60)
		}
		b.WriteByte('\n')
	}
	return b.String()
}

// takeMany brings spots in and waits until all are evaluated and shown.
func (w *window) takeMany(n int) {
	w.t.Helper()
	w.takeFile("many.csv", manySpots(n))
	w.waitForText(takePart+" >>> #offer", fmt.Sprintf("Can be taken: %d spots", n))
	w.click(takePart + " >>> #take")
	w.waitForText(count, fmt.Sprintf("of %d", n))
	w.waitFor(element(book + " >>> strike-summary >>> #counts"))
}

// Of thousands of spots only those in view are drawn, the page answers while they
// are evaluated, and the evaluation can be stopped.
func TestBookOfThousands(t *testing.T) {
	const n = 3000
	s := startSite(t, serve.Options{})
	w := visit(t, s, phone)
	w.choose(metal, "low-alloy-steel")
	w.choose(limit+" >>> #pick", "pwht-p3-p4")
	w.goTo("book")
	w.takeMany(n)
	if drawn := eval[int](w, element(rows)+".childElementCount"); drawn > 40 {
		t.Errorf("%d rows are drawn", drawn)
	}
	w.focus(rows + " [data-at='0'] .open")
	w.keys(kb.End)
	w.waitForText(rows, fmt.Sprintf("Bolt %05d", n))
	w.checkAccessible("the end of a long list")
	w.screenshot("book-long")

	// Opened again, everything is evaluated anew: meanwhile the page answers.
	w.reload()
	w.goTo("book")
	w.click(book + " >>> #cancel")
	w.waitFor(element(book + " >>> #resume"))
	done := eval[int](w, element(book+" >>> #evaluating progress")+".value")
	if done >= n {
		t.Errorf("%d of %d are evaluated", done, n)
	}
	w.checkAccessible("a stopped evaluation")
	w.click(book + " >>> #resume")
	w.waitFor("!" + element(book+" >>> #evaluating"))
	w.checkClean(s)
}

// BenchmarkBookOfThousands brings in 10,000 spots, evaluates and shows them, and
// says how long the page was deaf at most meanwhile.
func BenchmarkBookOfThousands(b *testing.B) {
	s := startSite(b, serve.Options{})
	var total time.Duration
	deaf, heap := 0.0, 0.0
	for range b.N {
		w := visit(b, s, desktop)
		w.ready()
		w.choose(metal, "low-alloy-steel")
		w.choose(limit+" >>> #pick", "pwht-p3-p4")
		w.goTo("book")
		eval[bool](w, "(window.deaf = 0, window.last = performance.now(), setInterval(() => { const now = performance.now(); deaf = Math.max(deaf, now - last); last = now }, 10), true)")
		start := time.Now()
		w.takeMany(10_000)
		total += time.Since(start)
		deaf = max(deaf, eval[float64](w, "deaf"))
		heap = max(heap, eval[float64](w, "performance.memory.usedJSHeapSize / 1e6"))
	}
	b.ReportMetric(float64(total.Milliseconds())/float64(b.N), "ms/job")
	b.ReportMetric(deaf, "ms-deaf")
	b.ReportMetric(heap, "MB-page")
}

// A traverse across a weld is drawn with its limit, and the peak of the
// heat-affected zone is named.
func TestBookTraverse(t *testing.T) {
	s := startSite(t, serve.Options{})
	w := visit(t, s, phone)
	w.choose(metal, "low-alloy-steel")
	w.choose(limit+" >>> #pick", "pwht-p3-p4")
	w.goTo("book")
	w.takeText("label,zone,position_mm,r1,r2,r3\nT1,base,0,430,432,428\nT2,haz,6,470,474,468\nT3,haz,8.5,505,500,503\nT4,weld,12,480,484,478\nT5,haz,17,478,470,474\nT6,base,24,433,431,435\n")
	w.click(takePart + " >>> #take")
	w.waitForText(book+" >>> strike-summary >>> #peak", "hardest at T3")
	plot := book + " >>> strike-summary >>> .plot"
	w.waitFor(element(plot) + ".querySelectorAll('circle').length === 6")
	w.waitFor(element(plot) + ".textContent.includes('Limit 225 HBW')")
	w.checkAccessible("a traverse")
	w.reveal(plot)
	w.screenshot("book-traverse")
	w.checkClean(s)
}
