package develop

import (
	"io/fs"
	"path/filepath"
	"slices"
	"time"
)

// watched are the folders whose files make up the page.
var watched = []string{"convert", "wasm", "site"}

// unwatched are the folders in them that the build itself writes.
var unwatched = []string{
	filepath.Join("site", "node_modules"),
	filepath.Join("site", "src", "gen"),
}

// state is what tells one state of a file from another.
type state struct {
	changed time.Time
	size    int64
}

// snapshot notes the state of all watched files, by their path in the module.
// What cannot be read is left out: it will be noticed once it can be.
func snapshot(root string) map[string]state {
	files := map[string]state{}
	for _, folder := range watched {
		filepath.WalkDir(filepath.Join(root, folder), func(path string, d fs.DirEntry, err error) error {
			if err != nil {
				return nil
			}
			name, err := filepath.Rel(root, path)
			if err != nil {
				return err
			}
			if d.IsDir() {
				if slices.Contains(unwatched, name) {
					return fs.SkipDir
				}
				return nil
			}
			if info, err := d.Info(); err == nil {
				files[name] = state{info.ModTime(), info.Size()}
			}
			return nil
		})
	}
	return files
}

// changes names the files that came, went or changed, in order.
func changes(before, after map[string]state) []string {
	var names []string
	for name, s := range after {
		if old, ok := before[name]; !ok || old != s {
			names = append(names, name)
		}
	}
	for name := range before {
		if _, ok := after[name]; !ok {
			names = append(names, name)
		}
	}
	slices.Sort(names)
	return names
}
