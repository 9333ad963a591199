package page

import (
	"context"
	"encoding/json"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"slices"
	"strconv"
	"strings"

	"github.com/evanw/esbuild/pkg/api"

	"strikebook/build/hashed"
)

// The names that mean something outside this package: the server and the
// browser ask for them.
const (
	indexName         = "index.html"
	serviceWorkerName = "sw.js"
)

// bundle puts the whole page together in memory. It does so twice: the build
// hash is taken from a first draft that does not know it yet.
func (b *builder) bundle(context.Context) error {
	draft, err := b.assemble("")
	if err != nil {
		return err
	}
	var all []byte
	for _, a := range draft {
		all = append(all, a.name...)
		all = append(all, a.content...)
	}
	b.build = hashed.Sum(all)
	b.files, err = b.assemble(b.build)
	return err
}

// assemble makes all files of the page, each after those whose names it holds.
func (b *builder) assemble(build string) ([]asset, error) {
	p := assembly{builder: b}
	core := p.addHashed("core.wasm", b.core)
	define := map[string]string{
		"__BUILD__":            strconv.Quote(build),
		"__WASM_URL__":         strconv.Quote(core),
		"__WASM_BYTES__":       strconv.Itoa(len(b.core)),
		"process.env.NODE_ENV": `"production"`,
	}
	worker := p.addBundle(source{
		entry: "src/core/worker.ts", tsconfig: "tsconfig.worker.json",
		name: "worker.js", format: api.FormatIIFE, define: define,
	})
	define["__WORKER_URL__"] = strconv.Quote(worker)
	main := p.addBundle(source{
		entry: "src/main.ts", tsconfig: "tsconfig.json",
		name: "main.js", format: api.FormatESModule, define: define,
	})
	style := p.addBundle(source{entry: "style/main.css", name: "style.css"})
	p.addStatic()
	p.addIndex(map[string]string{
		"main": main, "style": style, "worker": worker, "wasm": core, "build": build,
	})
	p.addServiceWorker(define)
	slices.SortFunc(p.files, func(x, y asset) int { return strings.Compare(x.name, y.name) })
	return p.files, p.err
}

// assembly collects the files of the page. After a first error it does nothing
// more, so that its steps read as a list.
type assembly struct {
	*builder
	files []asset
	err   error
}

// source is one file that the bundler starts from.
type source struct {
	entry    string // inside site/
	tsconfig string // inside site/; none for a style sheet
	name     string // of the output, before hashing
	format   api.Format
	define   map[string]string
}

func (p *assembly) add(name string, content []byte) {
	p.files = append(p.files, asset{name: name, content: content})
}

func (p *assembly) addHashed(name string, content []byte) string {
	name = hashed.Name(name, content)
	p.add(name, content)
	return name
}

// addBundle bundles a source under a hashed name and returns that name.
func (p *assembly) addBundle(s source) string {
	code, sourceMap := p.run(s)
	if p.err != nil {
		return ""
	}
	name := hashed.Name(s.name, code)
	if sourceMap != nil {
		code = append(code, mapComment(name)...)
		p.add(name+".map", sourceMap)
	}
	p.add(name, code)
	return name
}

// mapComment tells a browser's tools where the source map of a file is.
func mapComment(name string) string {
	if strings.HasSuffix(name, ".css") {
		return fmt.Sprintf("/*# sourceMappingURL=%s.map */\n", name)
	}
	return fmt.Sprintf("//# sourceMappingURL=%s.map\n", name)
}

// run runs the bundler. A release has no source map.
func (p *assembly) run(s source) (code, sourceMap []byte) {
	if p.err != nil {
		return nil, nil
	}
	options := api.BuildOptions{
		AbsWorkingDir:     p.site(),
		EntryPoints:       []string{s.entry},
		Outfile:           filepath.Join(p.Out, s.name),
		Bundle:            true,
		Format:            s.format,
		Target:            api.ES2022,
		Charset:           api.CharsetUTF8,
		MinifyWhitespace:  true,
		MinifyIdentifiers: true,
		MinifySyntax:      true,
		Define:            s.define,
		Alias:             map[string]string{"wasm_exec": p.glue},
	}
	if s.tsconfig != "" {
		options.Tsconfig = p.site(s.tsconfig)
	}
	if !p.Release {
		options.Sourcemap = api.SourceMapExternal
	}
	result := api.Build(options)
	if p.err = messages(result); p.err != nil {
		return nil, nil
	}
	for _, f := range result.OutputFiles {
		if strings.HasSuffix(f.Path, ".map") {
			sourceMap = f.Contents
		} else {
			code = f.Contents
		}
	}
	return code, sourceMap
}

// messages makes one error of all that the bundler found fault with. A warning
// counts as well: what the bundler warns of is nearly always a slip.
func messages(r api.BuildResult) error {
	found := append(r.Errors, r.Warnings...)
	if len(found) == 0 {
		return nil
	}
	text := api.FormatMessages(found, api.FormatMessagesOptions{Kind: api.ErrorMessage})
	return errors.New(strings.TrimSpace(strings.Join(text, "")))
}

// addStatic takes over site/static as it is, but for hidden files.
func (p *assembly) addStatic() {
	if p.err != nil {
		return
	}
	dir := p.site("static")
	p.err = filepath.WalkDir(dir, func(path string, d fs.DirEntry, err error) error {
		if err != nil || d.IsDir() || strings.HasPrefix(d.Name(), ".") {
			return err
		}
		content, err := os.ReadFile(path)
		if err != nil {
			return err
		}
		name, err := filepath.Rel(dir, path)
		p.add(filepath.ToSlash(name), content)
		return err
	})
}

// addIndex fills the page's HTML.
func (p *assembly) addIndex(values map[string]string) {
	if p.err != nil {
		return
	}
	template, err := os.ReadFile(p.site(indexName))
	if err != nil {
		p.err = err
		return
	}
	html, err := fill(string(template), values)
	if err != nil {
		p.err = fmt.Errorf("site/%s: %w", indexName, err)
		return
	}
	p.add(indexName, []byte(html))
}

// addServiceWorker bundles the service worker last, because it holds the list
// of all other files. Its own name must not change: browsers look for a newer
// one under the name that they know.
func (p *assembly) addServiceWorker(define map[string]string) {
	if p.err != nil {
		return
	}
	list, err := json.Marshal(precache(p.files))
	if err != nil {
		p.err = err
		return
	}
	define["self.__WB_MANIFEST"] = string(list)
	code, sourceMap := p.run(source{
		entry: "src/sw.ts", tsconfig: "tsconfig.worker.json",
		name: serviceWorkerName, format: api.FormatIIFE, define: define,
	})
	if sourceMap != nil {
		code = append(code, mapComment(serviceWorkerName)...)
		p.add(serviceWorkerName+".map", sourceMap)
	}
	p.add(serviceWorkerName, code)
}

// precacheEntry is one file in the form the service worker's library reads.
type precacheEntry struct {
	URL      string  `json:"url"`
	Revision *string `json:"revision"` // null where the name itself is the revision
}

// precache lists what the service worker keeps for use without a network:
// every file but the source maps.
func precache(files []asset) []precacheEntry {
	list := []precacheEntry{}
	for _, f := range files {
		if strings.HasSuffix(f.name, ".map") {
			continue
		}
		entry := precacheEntry{URL: f.name}
		if !hashed.Is(f.name) {
			entry.Revision = new(hashed.Sum(f.content))
		}
		list = append(list, entry)
	}
	slices.SortFunc(list, func(x, y precacheEntry) int { return strings.Compare(x.URL, y.URL) })
	return list
}
