// Package e2e tests the built page in a real browser: what a user sees, with
// and without a network.
//
// Selectors name elements inside nested shadow roots, from the outermost
// custom element inwards, with ">>>" between the levels:
//
//	strike-app >>> strike-sheet >>> #readings
package e2e

import (
	"context"
	"encoding/json"
	"errors"
	"fmt"
	"io/fs"
	"net/http/httptest"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"sync"
	"testing"
	"time"

	"github.com/chromedp/cdproto/cdp"
	"github.com/chromedp/cdproto/emulation"
	"github.com/chromedp/cdproto/log"
	"github.com/chromedp/cdproto/network"
	"github.com/chromedp/cdproto/runtime"
	"github.com/chromedp/cdproto/target"
	"github.com/chromedp/chromedp"

	"strikebook/build/browser"
	"strikebook/build/command"
	"strikebook/build/page"
	"strikebook/build/serve"
)

const (
	// actionTimeout ends what a browser does not finish. It is far beyond what
	// any step takes, so that a slow machine fails no test.
	actionTimeout = 30 * time.Second

	// pollInterval is how often a condition is looked at.
	pollInterval = 20 * time.Millisecond
)

// build builds the page once for all tests.
var build = sync.OnceValues(func() (built, error) {
	ctx := context.Background()
	root, err := command.ModuleRoot(ctx)
	if err != nil {
		return built{}, err
	}
	if err := noteSources(root); err != nil {
		return built{}, err
	}
	b := built{root: root, dir: filepath.Join(root, "out", "e2e")}
	b.Result, err = page.Build(ctx, page.Options{Root: root, Out: b.dir})
	return b, err
})

// built is the page as built for the tests.
type built struct {
	page.Result
	root, dir string
}

// noteSources lists the folders of the core and the bridge. They are compiled
// by another process, and without this Go's test cache would not know that the
// outcome depends on them.
func noteSources(root string) error {
	for _, folder := range []string{"convert", "wasm"} {
		err := filepath.WalkDir(filepath.Join(root, folder), func(_ string, _ fs.DirEntry, err error) error { return err })
		if err != nil {
			return err
		}
	}
	return nil
}

// buildPage returns the built page.
func buildPage(t testing.TB) built {
	t.Helper()
	b, err := build()
	if err != nil {
		t.Fatalf("cannot build the page: %v", err)
	}
	return b
}

// site is the built page on a server of its own.
type site struct {
	*serve.Server
	http *httptest.Server
	url  string // of the page, with a slash at its end
}

// startSite serves the built page until the test ends.
func startSite(t testing.TB, o serve.Options) *site {
	t.Helper()
	return startFolder(t, buildPage(t).dir, o)
}

// startFolder serves a folder until the test ends.
func startFolder(t testing.TB, dir string, o serve.Options) *site {
	t.Helper()
	handler := serve.New(dir, o)
	server := httptest.NewServer(handler)
	s := &site{Server: handler, http: server, url: server.URL + handler.Prefix}
	t.Cleanup(s.stop)
	return s
}

// stop takes the server off the network, as when the signal is lost for good.
func (s *site) stop() {
	s.http.CloseClientConnections()
	s.http.Close()
}

// device is what a page is looked at with.
type device struct {
	width, height int64
	scale         float64
	touch         bool
	dark          bool
}

var (
	phone   = device{width: 360, height: 800, scale: 3, touch: true}
	desktop = device{width: 1280, height: 800, scale: 1}
)

// inDark is the same device set to dark colours.
func (d device) inDark() device {
	d.dark = true
	return d
}

// window is a browser with a fresh profile, and its one page.
type window struct {
	t   testing.TB
	ctx context.Context

	mu       sync.Mutex
	requests []string
	problems []string
}

// open starts a browser that has never been anywhere. It ends with the test.
func open(t testing.TB, d device) *window {
	t.Helper()
	path, err := browser.Find()
	if err != nil {
		t.Fatal(err)
	}
	profile, err := os.MkdirTemp("", "strikebook-browser-")
	if err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() { os.RemoveAll(profile) })
	allocator, stop := chromedp.NewExecAllocator(context.Background(), slices.Concat(chromedp.DefaultExecAllocatorOptions[:], []chromedp.ExecAllocatorOption{
		chromedp.ExecPath(path),
		chromedp.UserDataDir(profile),
		chromedp.NoSandbox, // the tests may run as root, which Chromium's sandbox refuses
		chromedp.DisableGPU,
		chromedp.Flag("disable-quic", true),
		chromedp.Flag("disable-component-update", true),
		chromedp.Flag("disable-features", "Translate,BlinkGenPropertyTrees,AutofillServerCommunication,NetworkTimeServiceQuerying,OptimizationHints,MediaRouter"),
		chromedp.Flag("host-resolver-rules", "MAP * ~NOTFOUND , EXCLUDE 127.0.0.1"),
	})...)
	t.Cleanup(stop)
	w := &window{t: t}
	w.ctx, _ = chromedp.NewContext(allocator, chromedp.WithListener(w.note))
	if err := chromedp.Do(w.ctx); err != nil { // starts it; a time limit here would end it
		t.Fatalf("cannot start %s: %v", path, err)
	}
	t.Cleanup(func() { chromedp.Cancel(w.ctx) })
	if err := chromedp.ListenBrowser(w.ctx, w.followWorkers); err != nil {
		t.Fatalf("cannot listen to the browser: %v", err)
	}
	w.do(holdWorkers, d.emulate())
	return w
}

// emulate makes the page believe that it runs on the device.
func (d device) emulate() chromedp.Action[chromedp.Void] {
	options := []chromedp.EmulateViewportOption{chromedp.EmulateScale(d.scale)}
	if d.touch {
		options = append(options, chromedp.EmulateMobile, chromedp.EmulateTouch, chromedp.EmulatePortrait)
	}
	scheme := "light"
	if d.dark {
		scheme = "dark"
	}
	return chromedp.Steps(
		chromedp.EmulateViewport(d.width, d.height, options...),
		chromedp.Func(func(ctx context.Context, _ *chromedp.Target) error {
			_, err := chromedp.Call(ctx, emulation.SetEmulatedMedia, emulation.SetEmulatedMediaParams{
				Features: []*emulation.MediaFeature{{Name: "prefers-color-scheme", Value: scheme}},
			})
			return err
		}),
	)
}

// unusedPreload is what the browser remarks where the service worker hands the
// core to the worker, so that the preload of a first visit is not needed.
const unusedPreload = "was preloaded using link preload but not used"

// note keeps what the page or a worker asks for and complains of.
func (w *window) note(event any) {
	w.mu.Lock()
	defer w.mu.Unlock()
	switch e := event.(type) {
	case *network.EventRequestWillBeSent:
		w.requests = append(w.requests, e.Request.URL)
	case *runtime.EventConsoleAPICalled:
		if e.Type == "error" || e.Type == "warning" || e.Type == "assert" {
			w.problems = append(w.problems, "console: "+consoleText(e.Args))
		}
	case *runtime.EventExceptionThrown:
		w.problems = append(w.problems, "exception: "+exceptionText(e.ExceptionDetails))
	case *log.EventEntryAdded: // breaches of the content security policy among them
		if (e.Entry.Level == "error" || e.Entry.Level == "warning") && !strings.Contains(e.Entry.Text, unusedPreload) {
			w.problems = append(w.problems, fmt.Sprintf("%s: %s %s", e.Entry.Source, e.Entry.Text, e.Entry.URL))
		}
	}
}

func consoleText(args []*runtime.RemoteObject) string {
	var words []string
	for _, a := range args {
		if a.Description != "" {
			words = append(words, a.Description)
		} else {
			words = append(words, string(a.Value))
		}
	}
	return strings.Join(words, " ")
}

func exceptionText(d *runtime.ExceptionDetails) string {
	if d.Exception != nil {
		return d.Exception.Description
	}
	return d.Text
}

// holdWorkers makes each worker of the page wait until followWorkers listens to
// it, so that its first requests are seen. A service worker cannot be held: it
// would answer nothing while it waits.
var holdWorkers = chromedp.Func(func(ctx context.Context, _ *chromedp.Target) error {
	_, err := chromedp.Call(ctx, target.SetAutoAttach, target.SetAutoAttachParams{
		AutoAttach: true, WaitForDebuggerOnStart: true, Flatten: new(true),
		Filter: target.Filter{{Type: "worker"}},
	})
	return err
})

// followWorkers listens to each worker and service worker as it starts, since
// the page's own events say nothing of them, and lets go of those held.
func (w *window) followWorkers(event any) {
	created, ok := event.(*target.EventTargetCreated)
	if !ok || !strings.HasSuffix(created.TargetInfo.Type, "worker") {
		return
	}
	ctx, _ := chromedp.NewContext(w.ctx,
		chromedp.WithTargetID(created.TargetInfo.TargetID), chromedp.WithListener(w.note))
	go func() {
		// Neither error is a fault: a worker may be gone again by now.
		chromedp.Do(ctx)
		chromedp.Call(ctx, runtime.RunIfWaitingForDebugger, cdp.Empty{})
	}()
}

// do runs steps in the browser and fails the test when they fail.
func (w *window) do(steps ...chromedp.Action[chromedp.Void]) {
	w.t.Helper()
	ctx, cancel := context.WithTimeout(w.ctx, actionTimeout)
	defer cancel()
	if err := chromedp.Do(ctx, steps...); err != nil {
		w.fail("%v", err)
	}
}

// fail ends the test, with a picture and all that went wrong in the page.
func (w *window) fail(format string, args ...any) {
	w.t.Helper()
	ctx, cancel := context.WithTimeout(w.ctx, actionTimeout)
	defer cancel()
	picture := "no picture"
	if png, err := chromedp.Run(ctx, chromedp.CaptureScreenshot()); err == nil {
		if path, err := saveScreenshot("failed-"+w.t.Name(), png); err == nil {
			picture = path
		}
	}
	w.t.Fatalf("%s\nproblems in the page: %q\n%s", fmt.Sprintf(format, args...), w.seenProblems(), picture)
}

// navigate opens an address and waits until it has loaded.
func (w *window) navigate(url string) {
	w.t.Helper()
	w.do(chromedp.Navigate(url))
}

// reload loads the page again.
func (w *window) reload() {
	w.t.Helper()
	w.do(chromedp.Reload())
}

// setOffline cuts the page and its service worker off the network, or joins
// them to it again.
func (w *window) setOffline(offline bool) {
	w.t.Helper()
	w.do(chromedp.Func(func(ctx context.Context, _ *chromedp.Target) error {
		_, err := chromedp.Call(ctx, network.EmulateNetworkConditionsByRule, network.EmulateNetworkConditionsByRuleParams{
			EmulateOfflineServiceWorker: &offline,
			MatchedNetworkConditions: []*network.Conditions{
				{Offline: offline, DownloadThroughput: -1, UploadThroughput: -1},
			},
		})
		if err != nil {
			return err
		}
		_, err = chromedp.Call(ctx, network.OverrideNetworkState, network.OverrideNetworkStateParams{
			Offline: offline, DownloadThroughput: -1, UploadThroughput: -1,
		})
		return err
	}))
}

// eval evaluates a JavaScript expression, and waits for it if it is a promise.
func eval[T any](w *window, expression string) T {
	w.t.Helper()
	value, err := tryEval[T](w, expression)
	if err != nil {
		w.fail("cannot evaluate %s: %v", expression, err)
	}
	return value
}

func tryEval[T any](w *window, expression string) (T, error) {
	ctx, cancel := context.WithTimeout(w.ctx, actionTimeout)
	defer cancel()
	return chromedp.Run(ctx, chromedp.Evaluate[T](expression, chromedp.EvalAwaitPromise))
}

// waitFor waits until a JavaScript expression is true. While it throws, it
// counts as false: the elements it names may still be on their way.
func (w *window) waitFor(expression string) {
	w.t.Helper()
	deadline := time.Now().Add(actionTimeout)
	for {
		ok, err := tryEval[bool](w, fmt.Sprintf("(async () => Boolean(await (%s)))()", expression))
		if ok {
			return
		}
		if time.Now().After(deadline) {
			w.fail("%s did not become true in %s (last error: %v)", expression, actionTimeout, err)
		}
		time.Sleep(pollInterval)
	}
}

// element is the JavaScript expression for the element of a selector, or
// undefined or null while there is none.
func element(selector string) string {
	expression := "document"
	for i, part := range strings.Split(selector, ">>>") {
		if i > 0 {
			expression += "?.shadowRoot"
		}
		quoted, err := json.Marshal(strings.TrimSpace(part))
		if err != nil {
			panic(err) // no string fails to be quoted
		}
		expression += "?.querySelector(" + string(quoted) + ")"
	}
	return expression
}

// waitForText waits until the visible text of an element contains some words.
func (w *window) waitForText(selector, words string) {
	w.t.Helper()
	quoted, err := json.Marshal(words)
	if err != nil {
		w.t.Fatal(err)
	}
	w.waitFor(fmt.Sprintf("%s.innerText.includes(%s)", element(selector), quoted))
}

// tap touches an element. It needs a device with touch.
func (w *window) tap(selector string) {
	w.t.Helper()
	w.reveal(selector)
	w.do(chromedp.Tap(chromedp.JSPath(element(selector)), chromedp.NodeVisible))
}

// click clicks on an element with the mouse.
func (w *window) click(selector string) {
	w.t.Helper()
	w.reveal(selector)
	w.do(chromedp.Click(chromedp.JSPath(element(selector)), chromedp.NodeVisible))
}

// reveal scrolls an element to where nothing lies over it.
func (w *window) reveal(selector string) {
	w.t.Helper()
	w.waitFor(element(selector))
	eval[bool](w, "("+element(selector)+".scrollIntoView({ block: 'center', behavior: 'instant' }), true)")
}

// focus puts the cursor into an element.
func (w *window) focus(selector string) {
	w.t.Helper()
	w.waitFor(element(selector))
	eval[chromedp.Void](w, element(selector)+".focus()")
}

// keys types text, or presses a key of package kb, wherever the cursor is.
func (w *window) keys(text string, modifiers ...chromedp.Modifier) {
	w.t.Helper()
	w.do(chromedp.KeyEvent(text, chromedp.KeyModifiers(modifiers...)))
}

// screenshot keeps a picture of what is in view in out/screenshots.
func (w *window) screenshot(name string) {
	w.t.Helper()
	ctx, cancel := context.WithTimeout(w.ctx, actionTimeout)
	defer cancel()
	png, err := chromedp.Run(ctx, chromedp.CaptureScreenshot())
	if err == nil {
		_, err = saveScreenshot(name, png)
	}
	if err != nil {
		w.t.Fatalf("cannot take the screenshot %s: %v", name, err)
	}
}

func saveScreenshot(name string, png []byte) (path string, err error) {
	b, err := build()
	if err != nil {
		return "", err
	}
	dir := filepath.Join(b.root, "out", "screenshots")
	path = filepath.Join(dir, strings.ReplaceAll(name, "/", "-")+".png")
	return path, errors.Join(os.MkdirAll(dir, 0o755), os.WriteFile(path, png, 0o644))
}

// seenRequests lists the address of each request of the page and its workers.
func (w *window) seenRequests() []string {
	w.mu.Lock()
	defer w.mu.Unlock()
	return slices.Clone(w.requests)
}

// strangers lists the requests that left the site.
func (w *window) strangers(s *site) []string {
	return slices.DeleteFunc(w.seenRequests(), func(url string) bool {
		return strings.HasPrefix(url, s.http.URL+"/") || strings.HasPrefix(url, "blob:"+s.http.URL) || strings.HasPrefix(url, "data:")
	})
}

// seenProblems lists the errors, exceptions and breaches of the content
// security policy so far.
func (w *window) seenProblems() []string {
	w.mu.Lock()
	defer w.mu.Unlock()
	return slices.Clone(w.problems)
}

// checkClean fails the test if anything went wrong in the page so far or any
// request left the site.
func (w *window) checkClean(s *site) {
	w.t.Helper()
	if problems := w.seenProblems(); len(problems) > 0 {
		w.t.Errorf("problems in the page:\n%s", strings.Join(problems, "\n"))
	}
	if strangers := w.strangers(s); len(strangers) > 0 {
		w.t.Errorf("requests to elsewhere:\n%s", strings.Join(strangers, "\n"))
	}
}

// accessibility lists what axe-core finds wrong with the page as it is now.
func (w *window) accessibility() []string {
	w.t.Helper()
	script, err := os.ReadFile(filepath.Join(buildPage(w.t).root, "site", "node_modules", "axe-core", "axe.min.js"))
	if err != nil {
		w.t.Fatalf("cannot read axe-core: %v", err)
	}
	eval[chromedp.Void](w, string(script)+"\n;null")
	return eval[[]string](w, `axe.run().then(result => result.violations.flatMap(rule =>
		rule.nodes.map(node => rule.id + ": " + rule.help + ": " + node.target.flat().join(" >>> ") + ": " + node.failureSummary)))`)
}
