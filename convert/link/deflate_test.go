package link

import (
	"bytes"
	"compress/flate"
	"io"
	"math/rand/v2"
	"strings"
	"testing"
)

// readsBack holds deflate against the library's reader.
func readsBack(t *testing.T, text, dictionary []byte) {
	t.Helper()
	packed := deflate(text, dictionary)
	got, err := io.ReadAll(flate.NewReaderDict(bytes.NewReader(packed), dictionary))
	if err != nil || !bytes.Equal(got, text) {
		t.Fatalf("%d bytes with a dictionary of %d come back as %d (%v)", len(text), len(dictionary), len(got), err)
	}
}

func TestDeflateReadsBack(t *testing.T) {
	rng := rand.New(rand.NewPCG(1, 2))
	random := func(length, letters int) string {
		b := make([]byte, length)
		for i := range b {
			b[i] = byte(rng.IntN(letters))
		}
		return string(b)
	}
	texts := []string{
		"", "a", "ab", "abc", "abcabc", strings.Repeat("a", 257), strings.Repeat("a", 258), strings.Repeat("a", 259),
		strings.Repeat("abc", 100_000), dictionary, dictionary + dictionary,
		random(farthestMatch, 256) + strings.Repeat("z", 10), // matches from the farthest place
	}
	for range 300 {
		texts = append(texts, random(rng.IntN(3000), 1+rng.IntN(256)))
	}
	for range 20 {
		texts = append(texts, random(100_000, 2+rng.IntN(6)))
	}
	for _, text := range texts {
		readsBack(t, []byte(text), nil)
		readsBack(t, []byte(text), []byte(dictionary))
	}
}

// What is packed is at most a little larger than what the library makes of it.
func TestDeflateIsShort(t *testing.T) {
	text := []byte(`{"v":1,"label":"Nozzle N4, weld 2","device":"D","scale":"HLD","group":"low-alloy-steel",` +
		`"readings":[{"value":612},{"value":608},{"value":615},{"value":610},{"value":611}],"limit":{"scale":"HBW","max":225}}`)
	var best bytes.Buffer
	w, err := flate.NewWriterDict(&best, flate.BestCompression, []byte(dictionary))
	if err != nil {
		t.Fatal(err)
	}
	w.Write(text)
	w.Close()
	got := len(deflate(text, []byte(dictionary)))
	t.Logf("%d bytes become %d, by the library %d", len(text), got, best.Len())
	if got > best.Len()+4 {
		t.Errorf("%d bytes, the library makes %d", got, best.Len())
	}
}

func FuzzDeflate(f *testing.F) {
	f.Add([]byte(dictionary))
	f.Add([]byte("aaaaaaaaaaaaaaaaaaaaaaaa"))
	f.Fuzz(func(t *testing.T, text []byte) { readsBack(t, text, []byte(dictionary)) })
}

func BenchmarkDeflate(b *testing.B) {
	text := []byte(dictionary[100:900])
	for b.Loop() {
		deflate(text, []byte(dictionary))
	}
}
