// Package contract writes the TypeScript form of the Go types that cross the
// border between the core and the page as JSON, so that the page's compiler
// notices when the two sides part.
//
// It reads the sources and needs no compiled code. What encoding/json does with
// a type is followed closely; where a type encodes itself (MarshalJSON or
// MarshalText), a line in its comment says what comes out:
//
//	//contract:ts number | null
package contract

//go:generate go run ./write

import (
	"bytes"
	"fmt"
	"strings"
)

// Package is a Go package to read types from.
type Package struct {
	Path string // import path
	Dir  string // folder of its sources
}

// TypeScript returns the declarations of the named types, each given as
// package.Type, and of all types that these are made of.
func TypeScript(packages []Package, roots []string) ([]byte, error) {
	w := writer{byPath: map[string]*pkg{}, text: map[*typeDecl]string{}}
	for _, p := range packages {
		read, err := readPackage(p)
		if err != nil {
			return nil, err
		}
		w.packages = append(w.packages, read)
		w.byPath[p.Path] = read
	}
	for _, root := range roots {
		t, err := w.find(root)
		if err != nil {
			return nil, err
		}
		if _, err := w.use(t); err != nil {
			return nil, err
		}
	}
	return w.all()
}

// writer gathers the declarations that are needed.
type writer struct {
	packages []*pkg
	byPath   map[string]*pkg
	text     map[*typeDecl]string // what is declared so far
}

// find looks up a root.
func (w *writer) find(root string) (*typeDecl, error) {
	pkgName, typeName, _ := strings.Cut(root, ".")
	for _, p := range w.packages {
		if t := p.types[typeName]; t != nil && p.name == pkgName {
			return t, nil
		}
	}
	return nil, fmt.Errorf("there is no type %s in the packages that the contract reads; correct the list of roots", root)
}

// use makes sure that a type is declared and returns its TypeScript name.
func (w *writer) use(t *typeDecl) (string, error) {
	if _, done := w.text[t]; done {
		return t.name, nil
	}
	w.text[t] = "" // declared from here on, for types that refer to themselves
	body, err := w.declare(t)
	if err != nil {
		return "", err
	}
	w.text[t] = docComment(t.doc, "") + body
	return t.name, nil
}

// all joins the declarations in the order of the packages and their sources.
func (w *writer) all() ([]byte, error) {
	var out bytes.Buffer
	out.WriteString("// Generated from the Go types by build/contract. Do not edit.\n")
	taken := map[string]*typeDecl{}
	for _, p := range w.packages {
		for _, t := range p.order {
			text, needed := w.text[t]
			if !needed {
				continue
			}
			if other := taken[t.name]; other != nil {
				return nil, fmt.Errorf("%s and %s would have the same name in TypeScript; rename one of them", other, t)
			}
			taken[t.name] = t
			out.WriteString("\n" + text)
		}
	}
	return out.Bytes(), nil
}

// docComment turns a Go comment into a TypeScript one.
func docComment(text, indent string) string {
	text = strings.ReplaceAll(strings.TrimSpace(text), "*/", "* /")
	if text == "" {
		return ""
	}
	lines := strings.Split(text, "\n")
	if len(lines) == 1 {
		return indent + "/** " + text + " */\n"
	}
	var out strings.Builder
	out.WriteString(indent + "/**\n")
	for _, line := range lines {
		out.WriteString(strings.TrimRight(indent+" * "+line, " ") + "\n")
	}
	out.WriteString(indent + " */\n")
	return out.String()
}
