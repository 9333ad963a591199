package page

import (
	"context"
	"fmt"
	"os"
	"path/filepath"
	"slices"

	"strikebook/build/command"
)

// WasmEnv is the environment that makes Go compile for the browser.
var WasmEnv = []string{"GOOS=js", "GOARCH=wasm"}

// compile compiles the core and finds the JavaScript glue that belongs to the
// Go that compiled it.
func (b *builder) compile(ctx context.Context) error {
	goroot, err := command.Output(ctx, b.Root, "go", "env", "GOROOT")
	if err != nil {
		return err
	}
	b.glue = filepath.Join(goroot, "lib", "wasm", "wasm_exec.js")
	if _, err := os.Stat(b.glue); err != nil {
		return fmt.Errorf("this Go has no lib/wasm/wasm_exec.js; install the full distribution of Go: %w", err)
	}
	b.core, err = compileWasm(ctx, b.Root, "./wasm")
	return err
}

// compileWasm compiles a main package. The flags leave out what would make two
// builds of the same source differ: paths, build ids and the state of git.
// Nothing is inlined: a call into the core takes a good half longer, which at
// under a millisecond nobody feels, and the compressed core is a fifteenth
// smaller, which everybody feels who loads it over a weak network.
func compileWasm(ctx context.Context, root, pkg string) ([]byte, error) {
	dir, err := os.MkdirTemp("", "strikebook-wasm-")
	if err != nil {
		return nil, err
	}
	defer os.RemoveAll(dir)
	out := filepath.Join(dir, "main.wasm")
	_, err = command.Command{
		Dir:  root,
		Env:  append(slices.Clone(WasmEnv), "GOEXPERIMENT="+smallerRuntime(ctx, root)),
		Args: []string{"go", "build", "-trimpath", "-buildvcs=false", "-gcflags=all=-l", "-ldflags=-s -w -buildid=", "-o", out, pkg},
	}.Run(ctx)
	if err != nil {
		return nil, err
	}
	return os.ReadFile(out)
}

// smallerRuntime names the experiment of Go that leaves out its newer garbage
// collector, which is made for many processors and large heaps: a hundredth of
// what has to be loaded. It is "" with a Go that does not know it.
func smallerRuntime(ctx context.Context, root string) string {
	const older = "nogreenteagc"
	known := command.Command{Dir: root, Env: []string{"GOEXPERIMENT=" + older}, Args: []string{"go", "env", "GOEXPERIMENT"}}
	if _, err := known.Run(ctx); err != nil {
		return ""
	}
	return older
}
