package contract

import (
	"bytes"
	"encoding/json"
	"fmt"
	"io/fs"
	"path"
	"path/filepath"
	"strings"
)

// Packages lists the packages in a folder of a module and below it.
func Packages(module, root, folder string) ([]Package, error) {
	var list []Package
	err := filepath.WalkDir(filepath.Join(root, folder), func(dir string, d fs.DirEntry, err error) error {
		if err != nil || !d.IsDir() {
			return err
		}
		if d.Name() == "testdata" {
			return fs.SkipDir
		}
		sources, err := filepath.Glob(filepath.Join(dir, "*.go"))
		if err != nil || len(sources) == 0 {
			return err
		}
		rel, err := filepath.Rel(root, dir)
		list = append(list, Package{Path: path.Join(module, filepath.ToSlash(rel)), Dir: dir})
		return err
	})
	return list, err
}

// Constant writes a value as a TypeScript constant of a declared type. JSON is
// TypeScript as it stands.
func Constant(name, typ string, value any) ([]byte, error) {
	var out bytes.Buffer
	needed := strings.TrimSuffix(typ, "[]")
	fmt.Fprintf(&out, "// Generated from the Go sources by build/contract. Do not edit.\n\n"+
		"import type { %s } from \"./contract\";\n\nexport const %s: %s = ", needed, name, typ)
	e := json.NewEncoder(&out)
	e.SetEscapeHTML(false)
	e.SetIndent("", "  ")
	if err := e.Encode(value); err != nil {
		return nil, fmt.Errorf("the constant %s cannot be written as JSON: %w", name, err)
	}
	out.Truncate(out.Len() - 1) // the encoder's line end
	out.WriteString(";\n")
	return out.Bytes(), nil
}
