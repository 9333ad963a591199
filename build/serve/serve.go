// Package serve serves a built page the way a good static server does, and
// where a test asks for it the way a bad one does.
package serve

import (
	"fmt"
	"maps"
	"mime"
	"net/http"
	"os"
	"path"
	"path/filepath"
	"strings"
	"sync"

	"strikebook/build/hashed"
)

// Options bends the server for tests. The zero value serves from "/" properly.
type Options struct {
	// Prefix is the path the page lives under, such as "/tools/strikebook/".
	Prefix string

	// PlainWasm sends compiled code as application/octet-stream, as servers do
	// that have never heard of it.
	PlainWasm bool

	// Before, when set, sees each request first, with the name of the file that
	// it asks for. It may wait; when it returns true it has answered.
	Before func(w http.ResponseWriter, r *http.Request, name string) bool
}

// Server is an http.Handler over the output folder of a build.
type Server struct {
	dir string
	Options

	mu     sync.Mutex
	counts map[string]int
}

// types are the content types of the files that a page is made of, so that the
// answer does not depend on the machine's own list.
var types = map[string]string{
	".css":         "text/css; charset=utf-8",
	".html":        "text/html; charset=utf-8",
	".ico":         "image/x-icon",
	".js":          "text/javascript; charset=utf-8",
	".json":        "application/json",
	".map":         "application/json",
	".png":         "image/png",
	".svg":         "image/svg+xml",
	".txt":         "text/plain; charset=utf-8",
	".wasm":        "application/wasm",
	".webmanifest": "application/manifest+json",
	".woff2":       "font/woff2",
}

// encodings are the compressed forms that may lie beside a file, best first.
var encodings = []struct{ name, ext string }{{"br", ".br"}, {"gzip", ".gz"}}

// New serves a folder.
func New(dir string, o Options) *Server {
	o.Prefix = "/" + strings.Trim(o.Prefix, "/") + "/"
	if o.Prefix == "//" {
		o.Prefix = "/"
	}
	return &Server{dir: dir, Options: o, counts: map[string]int{}}
}

// Counts tells how often each file was asked for, by its name.
func (s *Server) Counts() map[string]int {
	s.mu.Lock()
	defer s.mu.Unlock()
	return maps.Clone(s.counts)
}

// ResetCounts forgets all requests so far.
func (s *Server) ResetCounts() {
	s.mu.Lock()
	defer s.mu.Unlock()
	clear(s.counts)
}

// ServeHTTP answers with a file of the folder, or 404.
func (s *Server) ServeHTTP(w http.ResponseWriter, r *http.Request) {
	inside, ok := strings.CutPrefix(path.Clean("/"+r.URL.Path), strings.TrimSuffix(s.Prefix, "/"))
	if !ok || inside != "" && inside[0] != '/' {
		http.NotFound(w, r)
		return
	}
	if inside == "" && !strings.HasSuffix(r.URL.Path, "/") {
		// Without the slash the page's relative names would miss the folder.
		http.Redirect(w, r, s.Prefix, http.StatusMovedPermanently)
		return
	}
	name := strings.TrimPrefix(inside, "/")
	if name == "" {
		name = "index.html"
	}
	s.mu.Lock()
	s.counts[name]++
	s.mu.Unlock()
	if s.Before != nil && s.Before(w, r, name) {
		return
	}
	s.serveFile(w, r, name)
}

func (s *Server) serveFile(w http.ResponseWriter, r *http.Request, name string) {
	file := filepath.Join(s.dir, filepath.FromSlash(name))
	if info, err := os.Stat(file); err != nil || info.IsDir() {
		http.NotFound(w, r)
		return
	}
	h := w.Header()
	h.Set("Content-Type", s.contentType(name))
	h.Set("Cache-Control", cacheControl(name))
	h.Set("X-Content-Type-Options", "nosniff")
	h.Add("Vary", "Accept-Encoding")
	for _, e := range encodings {
		if !accepts(r, e.name) {
			continue
		}
		if _, err := os.Stat(file + e.ext); err == nil {
			h.Set("Content-Encoding", e.name)
			file += e.ext
			break
		}
	}
	content, err := os.Open(file)
	if err != nil {
		http.NotFound(w, r)
		return
	}
	defer content.Close()
	info, err := content.Stat()
	if err != nil {
		http.Error(w, fmt.Sprintf("cannot read %s", name), http.StatusInternalServerError)
		return
	}
	http.ServeContent(w, r, name, info.ModTime(), content)
}

func (s *Server) contentType(name string) string {
	ext := path.Ext(name)
	if s.PlainWasm && ext == ".wasm" {
		return "application/octet-stream"
	}
	if t, ok := types[ext]; ok {
		return t
	}
	if t := mime.TypeByExtension(ext); t != "" {
		return t
	}
	return "application/octet-stream"
}

// cacheControl lets a browser keep for ever what is named by its content, and
// makes it ask again for the rest.
func cacheControl(name string) string {
	if hashed.Is(name) {
		return "public, max-age=31536000, immutable"
	}
	return "no-cache"
}

// accepts tells whether the client takes an encoding. Browsers send no weights,
// so only an outright refusal is looked for.
func accepts(r *http.Request, encoding string) bool {
	for part := range strings.SplitSeq(r.Header.Get("Accept-Encoding"), ",") {
		name, weight, _ := strings.Cut(strings.TrimSpace(part), ";")
		if name == encoding {
			return strings.TrimSpace(weight) != "q=0"
		}
	}
	return false
}
