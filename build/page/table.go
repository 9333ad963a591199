package page

import (
	"context"
	"fmt"
	"io"
	"strings"
	"text/tabwriter"
)

// floorPackage is a program that only calls the libraries the core relies on.
const floorPackage = "./build/floor"

// Floor is the size in bytes of a program that does nothing but call the
// libraries of the core: what no work on the core itself could save.
func Floor(ctx context.Context, root string) (int, error) {
	program, err := compileWasm(ctx, root, floorPackage)
	return len(program), err
}

// FirstVisit is what a browser fetches on a first visit, in bytes: the page and
// all that its service worker keeps, in brotli where there is one.
func (r Result) FirstVisit() int {
	total := 0
	for _, f := range r.Files {
		if !strings.HasSuffix(f.Name, ".map") {
			total += f.transfer()
		}
	}
	return total
}

// Core is the compiled core among the files.
func (r Result) Core() File {
	for _, f := range r.Files {
		if strings.HasSuffix(f.Name, ".wasm") {
			return f
		}
	}
	return File{}
}

func (f File) transfer() int {
	if f.Brotli > 0 {
		return f.Brotli
	}
	return f.Raw
}

// Print writes the sizes of a build as a table.
func (r Result) Print(w io.Writer, floor int) error {
	t := tabwriter.NewWriter(w, 0, 0, 2, ' ', tabwriter.AlignRight)
	fmt.Fprintln(t, "raw\tgzip\tbrotli\t\tfile")
	for _, f := range r.Files {
		fmt.Fprintf(t, "%s\t%s\t%s\t\t%s\n", size(f.Raw), size(f.Gzip), size(f.Brotli), f.Name)
	}
	fmt.Fprintf(t, "\t\t%s\t\t%s\n", size(r.FirstVisit()), "first visit")
	if err := t.Flush(); err != nil {
		return err
	}
	core := r.Core().Raw
	_, err := fmt.Fprintf(w, "The core is %s bytes, %.0f %% of the %s bytes that its libraries alone take.\n",
		size(core), 100*float64(core)/float64(floor), size(floor))
	return err
}

// size writes a number of bytes with a comma after each three digits.
func size(n int) string {
	if n == 0 {
		return "-"
	}
	s := fmt.Sprint(n)
	for i := len(s) - 3; i > 0; i -= 3 {
		s = s[:i] + "," + s[i:]
	}
	return s
}
