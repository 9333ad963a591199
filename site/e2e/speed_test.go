package e2e

import (
	"testing"
	"time"

	"strikebook/build/serve"
)

// example is the fragment of a record of five readings on low-alloy steel.
func example(t testing.TB, s *site) string {
	t.Helper()
	w := visit(t, s, phone)
	w.fillSpot()
	w.waitFor(element(linkOf) + ".value.includes('#s1.')")
	return eval[string](w, element(linkOf)+".value")
}

// From navigation to the first result, in a browser that has never been there
// and in one that keeps the page, without a network.
func BenchmarkFirstResult(b *testing.B) {
	s := startSite(b, serve.Options{})
	link := example(b, s)
	result := func(w *window) time.Duration {
		start := time.Now()
		w.navigate(link)
		w.waitForText(glance, "HBW")
		return time.Since(start)
	}
	b.Run("cold", func(b *testing.B) {
		var total time.Duration
		for range b.N {
			total += result(open(b, phone))
		}
		b.ReportMetric(float64(total.Milliseconds())/float64(b.N), "ms/visit")
	})
	b.Run("warm", func(b *testing.B) {
		w := visit(b, s, phone)
		w.offlineReady()
		w.setOffline(true)
		var total time.Duration
		for range b.N {
			w.navigate("about:blank")
			total += result(w)
		}
		b.ReportMetric(float64(total.Milliseconds())/float64(b.N), "ms/visit")
	})
}

// BenchmarkEvaluate is the core's work for one sheet in the browser's worker,
// JSON in and JSON out: compare it with the benchmark of the same name in wasm.
func BenchmarkEvaluate(b *testing.B) {
	s := startSite(b, serve.Options{})
	w := visit(b, s, phone)
	w.fillSpot()
	script := `(async () => {
		const app = document.querySelector("strike-app");
		for (let i = 0; i < 200; i++) await app.core.evaluate(app.record);
		const start = performance.now();
		for (let i = 0; i < 500; i++) await app.core.evaluate(app.record);
		return (performance.now() - start) / 500 * 1000 })()`
	var total float64
	for range b.N {
		total += eval[float64](w, script)
	}
	b.ReportMetric(total/float64(b.N), "µs/call")
}
