package hashed

import "testing"

func TestName(t *testing.T) {
	got := Name("main.js", []byte("hello"))
	if want := "main.2cf24dba5f.js"; got != want {
		t.Errorf("Name = %q, want %q", got, want)
	}
	if !Is(got) {
		t.Errorf("Is(%q) = false", got)
	}
}

func TestIs(t *testing.T) {
	for name, want := range map[string]bool{
		"core.0123456789.wasm":     true,
		"dir/core.0123456789.wasm": true,
		"index.html":               false,
		"sw.js":                    false,
		"icon.192.png":             false,
		"main.0123456789.js.br":    false,
	} {
		if Is(name) != want {
			t.Errorf("Is(%q) = %v, want %v", name, !want, want)
		}
	}
}
