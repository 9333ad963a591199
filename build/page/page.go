// Package page compiles the core, bundles the page and writes both into one
// folder that any static server can serve from any path.
package page

import (
	"context"
	"fmt"
	"path/filepath"
	"time"
)

// Options says what to build and where to.
type Options struct {
	Root string // folder of the module
	Out  string // folder to write; it must be new, empty or hold an earlier build

	// Release asks for the smallest files: best compression and no source maps.
	Release bool

	// Generate rewrites the generated TypeScript in site/src/gen where the Go
	// sources have moved on. Without it such a difference is an error.
	Generate bool

	// Report, when set, hears of each step that is done.
	Report func(step string, took time.Duration)
}

// Result describes a finished build.
type Result struct {
	Build string // short hash of all that the page consists of
	Files []File // sorted by name
}

// File is one file of the output folder with its sizes in bytes. The
// compressed sizes are 0 where no such form lies beside the file.
type File struct {
	Name              string
	Raw, Gzip, Brotli int
}

// Build builds the page. The output folder changes only when every step has
// succeeded, and then holds this build alone.
func Build(ctx context.Context, o Options) (Result, error) {
	b := builder{Options: o}
	steps := []struct {
		name string
		run  func(context.Context) error
	}{
		{"npm packages", b.install},
		{"generated types", b.generate},
		{"type check", b.checkTypes},
		{"core", b.compile},
		{"bundle", b.bundle},
		{"compression", b.compress},
		{"files", b.write},
	}
	for _, step := range steps {
		start := time.Now()
		if err := step.run(ctx); err != nil {
			return Result{}, fmt.Errorf("%s: %w", step.name, err)
		}
		if o.Report != nil {
			o.Report(step.name, time.Since(start))
		}
	}
	return b.result(), nil
}

// builder carries a build from step to step.
type builder struct {
	Options
	glue  string  // path of wasm_exec.js
	core  []byte  // the compiled core
	build string  // see Result
	files []asset // what goes to the output folder, sorted by name
}

// asset is a file of the page before it is written.
type asset struct {
	name    string // slash-separated, relative to the page
	content []byte
	gzip    []byte // nil where it would not be smaller
	brotli  []byte // nil where it would not be smaller
}

// site is a path inside the site folder.
func (b *builder) site(elem ...string) string {
	return filepath.Join(append([]string{b.Root, "site"}, elem...)...)
}

// install brings node_modules in line with package-lock.json.
func (b *builder) install(ctx context.Context) error {
	return Install(ctx, b.Root)
}

// generate brings the generated TypeScript in line with the Go sources.
func (b *builder) generate(ctx context.Context) error {
	return Generated(ctx, b.Root, b.Generate)
}

// checkTypes runs the TypeScript compiler, which the bundler does not do.
func (b *builder) checkTypes(ctx context.Context) error {
	return CheckTypes(ctx, b.Root)
}

func (b *builder) result() Result {
	r := Result{Build: b.build}
	for _, a := range b.files {
		r.Files = append(r.Files, File{a.name, len(a.content), len(a.gzip), len(a.brotli)})
	}
	return r
}
