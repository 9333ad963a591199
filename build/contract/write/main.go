// Command write brings the generated TypeScript in site/src/gen in line with
// the Go sources. With -check it only tells whether that is needed.
package main

import (
	"bytes"
	"context"
	"flag"
	"fmt"
	"os"
	"path/filepath"
	"slices"
	"strings"

	"strikebook/build/command"
	"strikebook/build/contract"
	"strikebook/convert"
	"strikebook/convert/wording"
)

// roots are the types that cross the border between the core and the page;
// those that they are made of follow by themselves.
var roots = []string{
	"convert.Sheet",
	"convert.Catalogue",
	"convert.GoNoGoRequest",
	"convert.GoNoGo",
	"convert.MoreReadingsRequest",
	"convert.MoreReadings",
	"convert.Book",
	"convert.BookSheet",
	"convert.BookRows",
	"convert.TableBook",
	"tabular.Request",
	"tabular.Table",
	"owncurve.Definition",
	"owncurve.Fitted",
	"record.Record",
	"wording.Error",
	"wording.Sentence",
}

func main() {
	check := flag.Bool("check", false, "write nothing, and fail when something would be written")
	flag.Parse()
	if err := run(context.Background(), *check); err != nil {
		fmt.Fprintln(os.Stderr, err)
		os.Exit(1)
	}
}

func run(ctx context.Context, check bool) error {
	root, err := command.ModuleRoot(ctx)
	if err != nil {
		return err
	}
	files, err := generate(root)
	if err != nil {
		return err
	}
	dir := filepath.Join(root, "site", "src", "gen")
	stale := staleFiles(dir, files)
	if check && len(stale) > 0 {
		return fmt.Errorf("site/src/gen is not in line with the Go sources (%s); run go generate ./build/contract", strings.Join(stale, ", "))
	}
	if err := os.MkdirAll(dir, 0o755); err != nil {
		return err
	}
	for _, name := range stale {
		if err := os.WriteFile(filepath.Join(dir, name), files[name], 0o644); err != nil {
			return err
		}
	}
	return nil
}

// generate makes the content of all generated files.
func generate(root string) (map[string][]byte, error) {
	packages, err := contract.Packages("strikebook", root, "convert")
	if err != nil {
		return nil, err
	}
	types, err := contract.TypeScript(packages, roots)
	if err != nil {
		return nil, err
	}
	catalogue, err := contract.Constant("catalogue", "Catalogue", convert.NewCatalogue())
	if err != nil {
		return nil, err
	}
	sentences, err := contract.Constant("sentences", "Sentence[]", wording.All())
	if err != nil {
		return nil, err
	}
	return map[string][]byte{"contract.ts": types, "catalogue.ts": catalogue, "sentences.ts": sentences}, nil
}

// staleFiles names the files that are missing or differ, in order.
func staleFiles(dir string, files map[string][]byte) []string {
	var stale []string
	for name, content := range files {
		if old, err := os.ReadFile(filepath.Join(dir, name)); err != nil || !bytes.Equal(old, content) {
			stale = append(stale, name)
		}
	}
	slices.Sort(stale)
	return stale
}
