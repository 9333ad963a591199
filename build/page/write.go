package page

import (
	"bytes"
	"context"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"

	"strikebook/build/hashed"
)

// write brings the output folder in line with the build: first what is named by
// its content, then what refers to it, and last away with everything older.
func (b *builder) write(context.Context) error {
	if err := b.checkOut(); err != nil {
		return err
	}
	keep := map[string]bool{}
	for _, first := range []bool{true, false} {
		for _, a := range b.files {
			if hashed.Is(a.name) != first {
				continue
			}
			if err := b.writeAsset(a, keep); err != nil {
				return err
			}
		}
	}
	return removeOthers(b.Out, keep)
}

// checkOut refuses a folder that holds something else than an earlier build,
// because whatever is not of this build is removed.
func (b *builder) checkOut() error {
	entries, err := os.ReadDir(b.Out)
	if err != nil && !errors.Is(err, fs.ErrNotExist) {
		return err
	}
	if len(entries) == 0 {
		return nil
	}
	if _, err := os.Stat(filepath.Join(b.Out, serviceWorkerName)); err != nil {
		return fmt.Errorf("%s holds other files than a page; empty it or name another folder", b.Out)
	}
	return nil
}

// writeAsset writes a file with its compressed forms and notes their paths.
func (b *builder) writeAsset(a asset, keep map[string]bool) error {
	path := filepath.Join(b.Out, filepath.FromSlash(a.name))
	if err := os.MkdirAll(filepath.Dir(path), 0o755); err != nil {
		return err
	}
	forms := map[string][]byte{path: a.content}
	if a.gzip != nil {
		forms[path+".gz"] = a.gzip
	}
	if a.brotli != nil {
		forms[path+".br"] = a.brotli
	}
	for path, content := range forms {
		keep[path] = true
		if err := writeFile(path, content); err != nil {
			return err
		}
	}
	return nil
}

// writeFile replaces a file in one move, so that nobody ever reads half of it.
// A file that is right already is left alone.
func writeFile(path string, content []byte) error {
	if old, err := os.ReadFile(path); err == nil && bytes.Equal(old, content) {
		return nil
	}
	tmp, err := os.CreateTemp(filepath.Dir(path), ".new-*")
	if err != nil {
		return err
	}
	defer os.Remove(tmp.Name())
	_, err = tmp.Write(content)
	if err := errors.Join(err, tmp.Chmod(0o644), tmp.Close()); err != nil {
		return err
	}
	return os.Rename(tmp.Name(), path)
}

// removeOthers removes every file below dir that is not to be kept, and the
// folders that this leaves empty.
func removeOthers(dir string, keep map[string]bool) error {
	entries, err := os.ReadDir(dir)
	if err != nil {
		return err
	}
	for _, e := range entries {
		path := filepath.Join(dir, e.Name())
		switch {
		case e.IsDir():
			if err := removeOthers(path, keep); err != nil {
				return err
			}
			os.Remove(path) // refused unless empty, which is what is wanted
		case !keep[path]:
			if err := os.Remove(path); err != nil {
				return err
			}
		}
	}
	return nil
}
