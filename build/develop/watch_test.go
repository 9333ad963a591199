package develop

import (
	"os"
	"path/filepath"
	"slices"
	"testing"
)

func write(t *testing.T, root, name, content string) {
	t.Helper()
	path := filepath.Join(root, filepath.FromSlash(name))
	if err := os.MkdirAll(filepath.Dir(path), 0o755); err != nil {
		t.Fatal(err)
	}
	if err := os.WriteFile(path, []byte(content), 0o644); err != nil {
		t.Fatal(err)
	}
}

func TestChanges(t *testing.T) {
	root := t.TempDir()
	for _, name := range []string{"convert/a.go", "convert/b.go", "site/src/main.ts"} {
		write(t, root, name, "1")
	}
	before := snapshot(root)
	if got := changes(before, snapshot(root)); len(got) != 0 {
		t.Errorf("changes without any: %v", got)
	}
	write(t, root, "convert/a.go", "22")
	write(t, root, "wasm/main.go", "new")
	write(t, root, "site/node_modules/lit/index.js", "not watched")
	write(t, root, "site/src/gen/contract.ts", "not watched")
	write(t, root, "README.md", "not watched")
	if err := os.Remove(filepath.Join(root, "convert", "b.go")); err != nil {
		t.Fatal(err)
	}
	want := []string{
		filepath.Join("convert", "a.go"), filepath.Join("convert", "b.go"), filepath.Join("wasm", "main.go"),
	}
	if got := changes(before, snapshot(root)); !slices.Equal(got, want) {
		t.Errorf("changes = %v, want %v", got, want)
	}
}
