package page

import (
	"bytes"
	"compress/gzip"
	"context"
	"crypto/sha256"
	"fmt"
	"os"
	"path"
	"path/filepath"
	"slices"
	"sync"

	"github.com/andybalholm/brotli"
)

// How hard brotli tries. The best quality takes about ten seconds for the core,
// so development and tests use one that takes a third of a second and gives
// files about a sixth larger.
const (
	brotliRelease     = brotli.BestCompression
	brotliDevelopment = 5
)

// compressible are the kinds of file worth compressing; pictures and fonts are
// compressed already.
var compressible = []string{".css", ".html", ".js", ".json", ".svg", ".txt", ".wasm", ".webmanifest"}

// compress makes the compressed forms of all files, in parallel.
func (b *builder) compress(context.Context) error {
	errs := make([]error, len(b.files))
	var wait sync.WaitGroup
	for i := range b.files {
		a := &b.files[i]
		if !slices.Contains(compressible, path.Ext(a.name)) {
			continue
		}
		wait.Go(func() { errs[i] = b.compressOne(a) })
	}
	wait.Wait()
	for _, err := range errs {
		if err != nil {
			return err
		}
	}
	return nil
}

// compressOne makes brotli and, for the servers that know no better, gzip. The
// server of development and tests needs no gzip.
func (b *builder) compressOne(a *asset) error {
	if !b.Release {
		a.brotli = smaller(toBrotli(a.content, brotliDevelopment), a.content)
		return nil
	}
	packed, err := b.cachedBrotli(a.content)
	if err != nil {
		return err
	}
	a.brotli = smaller(packed, a.content)
	a.gzip = smaller(toGzip(a.content), a.content)
	return nil
}

// smaller is the packed form if it is worth having.
func smaller(packed, plain []byte) []byte {
	if len(packed) < len(plain) {
		return packed
	}
	return nil
}

// cachedBrotli keeps what it made by the hash of the content, so that a second
// release compresses only what has changed.
func (b *builder) cachedBrotli(content []byte) ([]byte, error) {
	dir := filepath.Join(b.Root, "out", "cache")
	kept := filepath.Join(dir, fmt.Sprintf("%x.q%d.br", sha256.Sum256(content), brotliRelease))
	if packed, err := os.ReadFile(kept); err == nil {
		return packed, nil
	}
	packed := toBrotli(content, brotliRelease)
	if err := os.MkdirAll(dir, 0o755); err != nil {
		return nil, err
	}
	return packed, writeFile(kept, packed)
}

func toBrotli(content []byte, quality int) []byte {
	var out bytes.Buffer
	w := brotli.NewWriterLevel(&out, quality)
	w.Write(content) // neither can fail on a buffer
	w.Close()
	return out.Bytes()
}

// toGzip writes no time stamp, so that equal content gives equal files.
func toGzip(content []byte) []byte {
	var out bytes.Buffer
	w, _ := gzip.NewWriterLevel(&out, gzip.BestCompression) // a valid level
	w.Write(content)                                        // neither can fail on a buffer
	w.Close()
	return out.Bytes()
}
