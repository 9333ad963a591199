package serve

import (
	"net/http"
	"net/http/httptest"
	"os"
	"path/filepath"
	"testing"
)

const core = "core.0123456789.wasm"

func testDir(t *testing.T) string {
	t.Helper()
	dir := t.TempDir()
	for name, content := range map[string]string{
		"index.html":         "page",
		core:                 "plain",
		core + ".br":         "brotli",
		core + ".gz":         "gzip",
		"icons/icon-192.png": "icon",
	} {
		path := filepath.Join(dir, name)
		if err := os.MkdirAll(filepath.Dir(path), 0o755); err != nil {
			t.Fatal(err)
		}
		if err := os.WriteFile(path, []byte(content), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	return dir
}

func TestServe(t *testing.T) {
	const immutable = "public, max-age=31536000, immutable"
	for _, test := range []struct {
		name    string
		options Options
		path    string
		accept  string
		status  int
		body    string
		headers map[string]string
	}{
		{"index", Options{}, "/", "", 200, "page",
			map[string]string{"Content-Type": "text/html; charset=utf-8", "Cache-Control": "no-cache"}},
		{"plain", Options{}, "/" + core, "", 200, "plain",
			map[string]string{"Content-Type": "application/wasm", "Cache-Control": immutable, "Content-Encoding": ""}},
		{"brotli", Options{}, "/" + core, "gzip, deflate, br", 200, "brotli",
			map[string]string{"Content-Type": "application/wasm", "Content-Encoding": "br"}},
		{"gzip", Options{}, "/" + core, "gzip, br;q=0", 200, "gzip",
			map[string]string{"Content-Encoding": "gzip"}},
		{"wrong type", Options{PlainWasm: true}, "/" + core, "", 200, "plain",
			map[string]string{"Content-Type": "application/octet-stream"}},
		{"folder", Options{}, "/icons/icon-192.png", "", 200, "icon",
			map[string]string{"Content-Type": "image/png", "Cache-Control": "no-cache"}},
		{"folder itself", Options{}, "/icons", "", 404, "", nil},
		{"missing", Options{}, "/nothing.js", "", 404, "", nil},
		{"way out", Options{}, "/../serve.go", "", 404, "", nil},
		{"prefix", Options{Prefix: "/a/b/"}, "/a/b/", "", 200, "page", nil},
		{"prefix without slash", Options{Prefix: "a/b"}, "/a/b", "", 301, "",
			map[string]string{"Location": "/a/b/"}},
		{"beside the prefix", Options{Prefix: "/a/b/"}, "/index.html", "", 404, "", nil},
		{"longer than the prefix", Options{Prefix: "/a/b/"}, "/a/bindex.html", "", 404, "", nil},
		{"before", Options{Before: func(w http.ResponseWriter, _ *http.Request, name string) bool {
			http.Error(w, name, http.StatusTeapot)
			return true
		}}, "/", "", 418, "index.html\n", nil},
	} {
		t.Run(test.name, func(t *testing.T) {
			r := httptest.NewRequest("GET", test.path, nil)
			r.Header.Set("Accept-Encoding", test.accept)
			w := httptest.NewRecorder()
			New(testDir(t), test.options).ServeHTTP(w, r)
			if w.Code != test.status {
				t.Errorf("status %d, want %d", w.Code, test.status)
			}
			if test.body != "" && w.Body.String() != test.body {
				t.Errorf("body %q, want %q", w.Body, test.body)
			}
			for name, want := range test.headers {
				if got := w.Header().Get(name); got != want {
					t.Errorf("%s: %q, want %q", name, got, want)
				}
			}
		})
	}
}

func TestCounts(t *testing.T) {
	s := New(testDir(t), Options{})
	for _, path := range []string{"/", "/index.html", "/" + core} {
		s.ServeHTTP(httptest.NewRecorder(), httptest.NewRequest("GET", path, nil))
	}
	counts := s.Counts()
	if counts["index.html"] != 2 || counts[core] != 1 {
		t.Errorf("counts %v", counts)
	}
	s.ResetCounts()
	if len(s.Counts()) != 0 {
		t.Error("ResetCounts keeps some")
	}
}
