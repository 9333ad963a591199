// Package check runs every check that the project has, one after the other.
package check

import (
	"context"
	"errors"
	"fmt"
	"io"
	"path/filepath"
	"slices"
	"strings"
	"time"

	"strikebook/build/browser"
	"strikebook/build/command"
	"strikebook/build/page"
)

// staticcheck is pinned, so that a newer one cannot fail what passed before.
const staticcheck = "honnef.co/go/tools/cmd/staticcheck@v0.8.2"

// testLimit is how long the tests of one package may take: those in the browser
// are many, and a machine may be slow.
const testLimit = "25m"

var (
	// goFolders are the folders with Go sources.
	goFolders = []string{"build", "convert", "wasm", filepath.Join("site", "e2e")}

	// wasmOnly are the packages that compile for the browser alone.
	wasmOnly = []string{"./wasm", "./build/floor"}
)

// checker knows where the sources are and where to write.
type checker struct {
	root string
	out  io.Writer
}

// step is one check. A required step is one without which the rest cannot run.
type step struct {
	name     string
	required bool
	run      func(context.Context) error
}

// Run runs all checks, each even when one before it failed, and fails when any
// did. Go's own tests come last, so that the output ends with their lines.
func Run(ctx context.Context, root string, out io.Writer) error {
	c := checker{root, out}
	steps := []step{
		{"install npm packages", true, func(ctx context.Context) error { return page.Install(ctx, root) }},
		{"install Chromium", false, func(ctx context.Context) error { return browser.Install(ctx, out) }},
		{"gofmt", false, c.gofmt},
		{"go vet", false, c.vet},
		{"staticcheck", false, c.staticcheck},
		{"generated TypeScript", false, func(ctx context.Context) error { return page.Generated(ctx, root, false) }},
		{"tsc", false, func(ctx context.Context) error { return page.CheckTypes(ctx, root) }},
		{"core tests as WebAssembly", false, c.wasmTests},
	}
	var failed []string
	for _, s := range steps {
		start := time.Now()
		err := s.run(ctx)
		took := time.Since(start).Seconds()
		if err == nil {
			fmt.Fprintf(out, "%s: ok (%.1f s)\n", s.name, took)
			continue
		}
		fmt.Fprintf(out, "%s: FAILED (%.1f s)\n%v\n", s.name, took, err)
		failed = append(failed, s.name)
		if s.required || ctx.Err() != nil {
			return fmt.Errorf("%s failed", s.name)
		}
	}
	if len(failed) > 0 {
		fmt.Fprintf(out, "failed so far: %s\n", strings.Join(failed, ", "))
	}
	if err := c.tests(ctx); err != nil {
		failed = append(failed, "go test")
	}
	if len(failed) > 0 {
		return fmt.Errorf("failed: %s", strings.Join(failed, ", "))
	}
	return nil
}

// gofmt names the sources that are not formatted.
func (c checker) gofmt(ctx context.Context) error {
	unformatted, err := command.Output(ctx, c.root, append([]string{"gofmt", "-l"}, goFolders...)...)
	if err == nil && unformatted != "" {
		err = fmt.Errorf("not formatted; run gofmt -w on:\n%s", unformatted)
	}
	return err
}

// vet checks the sources as they are compiled here, and those for the browser.
func (c checker) vet(ctx context.Context) error {
	return c.bothWays(ctx, "go", "vet")
}

// staticcheck is passed over, with a word, where it cannot be downloaded. It is
// installed apart, because "go run" would compile it for the browser as well.
func (c checker) staticcheck(ctx context.Context) error {
	tools := filepath.Join(c.root, "out", "tools")
	install := command.Command{
		Dir: c.root, Env: []string{"GOBIN=" + tools},
		Args: []string{"go", "install", staticcheck},
	}
	if _, err := install.Run(ctx); err != nil {
		fmt.Fprintf(c.out, "staticcheck: not run, because it cannot be downloaded: %v\n", err)
		return nil
	}
	return c.bothWays(ctx, filepath.Join(tools, "staticcheck"))
}

// bothWays runs a checking program over all sources as they are compiled here,
// and over those that are compiled for the browser.
func (c checker) bothWays(ctx context.Context, args ...string) error {
	here := command.Command{Dir: c.root, Args: append(slices.Clone(args), "./...")}
	wasm := command.Command{Dir: c.root, Env: page.WasmEnv, Args: append(slices.Clone(args), wasmOnly...)}
	_, err := here.Run(ctx)
	_, wasmErr := wasm.Run(ctx)
	return errors.Join(err, wasmErr)
}

// wasmTests runs the core's tests compiled as for the browser, in Node.
func (c checker) wasmTests(ctx context.Context) error {
	goroot, err := command.Output(ctx, c.root, "go", "env", "GOROOT")
	if err != nil {
		return err
	}
	runner := filepath.Join(goroot, "lib", "wasm", "go_js_wasm_exec")
	_, err = command.Command{
		Dir: c.root, Env: page.WasmEnv,
		Args: []string{"go", "test", "-exec", runner, "./convert/...", "./wasm"},
	}.Run(ctx)
	return err
}

// tests runs all tests, those in the browser among them, and shows their lines
// as they come.
func (c checker) tests(ctx context.Context) error {
	_, err := command.Command{Dir: c.root, Out: c.out, Args: []string{"go", "test", "-timeout", testLimit, "./..."}}.Run(ctx)
	return err
}
