package page

import (
	"bytes"
	"compress/gzip"
	"encoding/json"
	"io"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"github.com/andybalholm/brotli"
)

func TestFill(t *testing.T) {
	values := map[string]string{"main": "main.1.js", "style": "style.2.css"}
	for _, test := range []struct{ name, template, want, wantErr string }{
		{"all", `<{{style}}><{{ main }}>`, `<style.2.css><main.1.js>`, ""},
		{"unknown", `{{main}}{{style}}{{other}}`, "", "unknown placeholder {{other}}"},
		{"missing", `{{main}}`, "", "{{style}} is missing"},
	} {
		got, err := fill(test.template, values)
		if got != test.want {
			t.Errorf("%s: got %q, want %q", test.name, got, test.want)
		}
		if (err == nil) != (test.wantErr == "") || err != nil && !strings.Contains(err.Error(), test.wantErr) {
			t.Errorf("%s: error %v, want %q", test.name, err, test.wantErr)
		}
	}
}

func TestPrecache(t *testing.T) {
	list := precache([]asset{
		{name: "main.0123456789.js"},
		{name: "main.0123456789.js.map"},
		{name: "index.html", content: []byte("hello")},
	})
	got, err := json.Marshal(list)
	if err != nil {
		t.Fatal(err)
	}
	want := `[{"url":"index.html","revision":"2cf24dba5f"},{"url":"main.0123456789.js","revision":null}]`
	if string(got) != want {
		t.Errorf("got  %s\nwant %s", got, want)
	}
}

func TestCompressedFormsUnpack(t *testing.T) {
	content := bytes.Repeat([]byte("strikebook "), 100)
	packed := toGzip(content)
	r, err := gzip.NewReader(bytes.NewReader(packed))
	if err != nil {
		t.Fatal(err)
	}
	if plain, err := io.ReadAll(r); err != nil || !bytes.Equal(plain, content) {
		t.Errorf("gzip does not unpack: %v", err)
	}
	if !r.ModTime.IsZero() {
		t.Errorf("gzip holds the time %v", r.ModTime)
	}
	if !bytes.Equal(packed, toGzip(content)) {
		t.Error("gzip gives two forms of one content")
	}
	plain, err := io.ReadAll(brotli.NewReader(bytes.NewReader(toBrotli(content, brotliDevelopment))))
	if err != nil || !bytes.Equal(plain, content) {
		t.Errorf("brotli does not unpack: %v", err)
	}
}

func TestCompressLeavesOutWhatIsNotSmaller(t *testing.T) {
	b := builder{files: []asset{
		{name: "tiny.js", content: []byte("1")},
		{name: "large.js", content: bytes.Repeat([]byte("1"), 1000)},
		{name: "large.png", content: bytes.Repeat([]byte("1"), 1000)},
	}}
	if err := b.compress(t.Context()); err != nil {
		t.Fatal(err)
	}
	for i, want := range []bool{false, true, false} {
		if got := b.files[i].brotli != nil; got != want {
			t.Errorf("%s: brotli %v, want %v", b.files[i].name, got, want)
		}
	}
}

func TestWriteHoldsOnlyTheNewBuild(t *testing.T) {
	out := filepath.Join(t.TempDir(), "dist")
	first := builder{Options: Options{Out: out}, files: []asset{
		{name: "icons/old.png", content: []byte("old")},
		{name: "main.0123456789.js", content: []byte("old"), gzip: []byte("g"), brotli: []byte("b")},
		{name: "sw.js", content: []byte("old")},
	}}
	second := builder{Options: Options{Out: out}, files: []asset{
		{name: "main.9876543210.js", content: []byte("new"), brotli: []byte("b")},
		{name: "sw.js", content: []byte("new")},
	}}
	for _, b := range []builder{first, second} {
		if err := b.write(t.Context()); err != nil {
			t.Fatal(err)
		}
	}
	entries, err := os.ReadDir(out)
	if err != nil {
		t.Fatal(err)
	}
	var names []string
	for _, e := range entries {
		names = append(names, e.Name())
	}
	want := []string{"main.9876543210.js", "main.9876543210.js.br", "sw.js"}
	if !slices.Equal(names, want) {
		t.Errorf("the folder holds %v, want %v", names, want)
	}
	if content, err := os.ReadFile(filepath.Join(out, "sw.js")); err != nil || string(content) != "new" {
		t.Errorf("sw.js holds %q (%v), want new", content, err)
	}
}

func TestWriteRefusesOtherFolders(t *testing.T) {
	out := t.TempDir()
	precious := filepath.Join(out, "precious.txt")
	if err := os.WriteFile(precious, []byte("mine"), 0o644); err != nil {
		t.Fatal(err)
	}
	b := builder{Options: Options{Out: out}, files: []asset{{name: "sw.js"}}}
	if err := b.write(t.Context()); err == nil || !strings.Contains(err.Error(), "holds other files") {
		t.Errorf("error %v", err)
	}
	if _, err := os.Stat(precious); err != nil {
		t.Error("a file that is not ours is gone")
	}
}

func TestPrint(t *testing.T) {
	r := Result{Files: []File{
		{"core.0123456789.wasm", 1234567, 400000, 300000},
		{"favicon.ico", 42, 0, 0},
		{"main.0123456789.js.map", 99999, 0, 0},
	}}
	if got := r.FirstVisit(); got != 300042 {
		t.Errorf("FirstVisit = %d, want 300042", got)
	}
	var out strings.Builder
	if err := r.Print(&out, 1000000); err != nil {
		t.Fatal(err)
	}
	for _, want := range []string{"1,234,567", "300,042  first visit", "123 %", "1,000,000"} {
		if !strings.Contains(out.String(), want) {
			t.Errorf("the table lacks %q:\n%s", want, out.String())
		}
	}
}
