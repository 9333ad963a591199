package link

import (
	"bytes"
	"compress/flate"
	"encoding/base64"
	"encoding/binary"
	"errors"
	"flag"
	"hash/crc32"
	"math/rand/v2"
	"os"
	"path/filepath"
	"runtime"
	"slices"
	"strings"
	"testing"

	"strikebook/convert/record"
	"strikebook/convert/record/recordtest"
	"strikebook/convert/scale"
	"strikebook/convert/verdict"
	"strikebook/convert/wording"
)

// linksDir holds links as they were handed out, each beside the JSON of its
// record. A link once handed out must open for ever, so that neither file is
// ever changed.
const linksDir = "../../testdata/links"

var write = flag.Bool("write", false, "write the link of each record in testdata/links that has none yet")

// pivot is a record as an inspector hands it on.
func pivot() record.Record {
	r := record.Record{
		V: record.Version, ID: "q7-0412", Label: "Pivot ring, bolt row 4, 90°", Taken: "2026-12-01T09:30:00Z",
		Device: "D", Direction: "level", Group: "low-alloy-steel",
		Limit: &verdict.Limit{Scale: scale.HBW, Max: new(350.0), Rule: verdict.Guarded},
	}
	for _, value := range []float64{612, 608, 615, 611, 609} {
		r.Readings = append(r.Readings, record.Reading{Value: record.Num(value)})
	}
	return r
}

func mustEncode(t testing.TB, r record.Record) string {
	t.Helper()
	fragment, err := Encode(r)
	if err != nil {
		t.Fatal(err)
	}
	return fragment
}

func mustJSON(t testing.TB, r record.Record) []byte {
	t.Helper()
	text, err := record.Encode(r)
	if err != nil {
		t.Fatal(err)
	}
	return text
}

// pack makes a fragment of any text, with the checksum of another if need be.
func pack(t testing.TB, text, summed []byte) string {
	t.Helper()
	b := bytes.NewBuffer(binary.BigEndian.AppendUint32(nil, crc32.ChecksumIEEE(summed)))
	w, err := flate.NewWriterDict(b, flate.BestSpeed, []byte(dictionary))
	if err != nil {
		t.Fatal(err)
	}
	if _, err := w.Write(text); err != nil {
		t.Fatal(err)
	}
	if err := w.Close(); err != nil {
		t.Fatal(err)
	}
	return "s1." + base64.RawURLEncoding.EncodeToString(b.Bytes())
}

// code is the code of a refusal, "" for nil.
func code(t testing.TB, err error) string {
	t.Helper()
	if err == nil {
		return ""
	}
	var e *wording.Error
	if !errors.As(err, &e) {
		t.Fatalf("the error is no *wording.Error: %v", err)
	}
	return e.Code
}

func TestRoundTrip(t *testing.T) {
	rng := rand.New(rand.NewPCG(5, 6))
	for i := range 1000 {
		want := recordtest.Random(rng)
		fragment := mustEncode(t, want)
		got, err := Decode(fragment)
		if err != nil || !recordtest.Equal(got, want) {
			t.Fatalf("record %d: %s came back as %s (%v)", i, mustJSON(t, want), mustJSON(t, got), err)
		}
		if strings.ContainsFunc(fragment, func(r rune) bool { return !strings.ContainsRune(unreserved, r) }) {
			t.Fatalf("record %d: %q holds characters that a URL may not carry as they are", i, fragment)
		}
	}
}

// unreserved are the characters that no program has a reason to escape in a
// URL, RFC 3986, 2.3; "~" is left out, because some do.
const unreserved = "abcdefghijklmnopqrstuvwxyzABCDEFGHIJKLMNOPQRSTUVWXYZ0123456789-._"

// What compression cannot shorten must come back as well.
func TestRoundTripOfALargeRecord(t *testing.T) {
	rng := rand.New(rand.NewPCG(7, 8))
	want := pivot()
	for len(mustJSON(t, want)) < record.MaxBytes-3000 {
		noise := make([]byte, 2000)
		for i := range noise {
			noise[i] = unreserved[rng.IntN(len(unreserved))]
		}
		want.Readings = append(want.Readings, record.Reading{Value: record.Num(rng.Float64()), Struck: string(noise)})
	}
	got, err := Decode(mustEncode(t, want))
	if err != nil || !recordtest.Equal(got, want) {
		t.Errorf("a record of %d bytes does not come back (%v)", len(mustJSON(t, want)), err)
	}
}

func TestOldLinksOpen(t *testing.T) {
	records := mustGlob(t, "*.json")
	for _, name := range records {
		t.Run(name, func(t *testing.T) {
			plain := bytes.TrimSpace(mustRead(t, name+".json"))
			if *write {
				writeLink(t, name, plain)
			}
			got, err := Decode(string(mustRead(t, name+".link")))
			if err != nil {
				t.Fatal(err)
			}
			if text := mustJSON(t, got); !bytes.Equal(text, plain) {
				t.Errorf("got  %s\nwant %s", text, plain)
			}
		})
	}
	for _, name := range mustGlob(t, "*.link") {
		if !slices.Contains(records, name) {
			t.Errorf("%s.link has no record", name)
		}
	}
}

// The links in testdata use only parts of the dictionary; a change anywhere
// else in it would be noticed by whoever opens an old link.
func TestDictionaryStays(t *testing.T) {
	if sum := crc32.ChecksumIEEE([]byte(dictionary)); sum != 0x561331e8 {
		t.Errorf("the dictionary of version 1 has changed (checksum %#x): another one needs another version", sum)
	}
}

// mustGlob returns the names of the files in linksDir, without extension.
func mustGlob(t testing.TB, pattern string) []string {
	t.Helper()
	paths, err := filepath.Glob(filepath.Join(linksDir, pattern))
	if err != nil || len(paths) == 0 {
		t.Fatalf("no %s in %s (%v)", pattern, linksDir, err)
	}
	names := make([]string, len(paths))
	for i, path := range paths {
		names[i] = strings.TrimSuffix(filepath.Base(path), filepath.Ext(path))
	}
	return names
}

func mustRead(t testing.TB, name string) []byte {
	t.Helper()
	content, err := os.ReadFile(filepath.Join(linksDir, name))
	if err != nil {
		t.Fatalf("%v (for a new record: go test ./convert/link -write)", err)
	}
	return content
}

// writeLink writes the link of a record that has none yet.
func writeLink(t *testing.T, name string, plain []byte) {
	t.Helper()
	path := filepath.Join(linksDir, name+".link")
	if _, err := os.Stat(path); err == nil {
		return
	}
	r, err := record.Decode(plain)
	if err != nil {
		t.Fatal(err)
	}
	if err := os.WriteFile(path, []byte(mustEncode(t, r)+"\n"), 0o644); err != nil {
		t.Fatal(err)
	}
}

// Some programs cut a link that is longer than one line of mail or a message.
func TestShort(t *testing.T) {
	const most = 400 // characters
	r := pivot()
	fragment := mustEncode(t, r)
	t.Logf("five readings, label and limit: %d characters, from %d bytes of JSON", len(fragment), len(mustJSON(t, r)))
	if len(fragment) > most {
		t.Errorf("%d characters, at most %d are allowed", len(fragment), most)
	}
}

func TestSurroundings(t *testing.T) {
	want := pivot()
	fragment := mustEncode(t, want)
	for _, around := range []string{fragment, "#" + fragment, " " + fragment, "\t#" + fragment + " \r\n"} {
		got, err := Decode(around)
		if err != nil || !recordtest.Equal(got, want) {
			t.Errorf("%q: %v", around, err)
		}
	}
}

// A link that lost, gained or changed a character is refused. What decodes in
// spite of it (the version written as 01) is the very same record.
func TestDamaged(t *testing.T) {
	want := pivot()
	whole := mustEncode(t, want)
	check := func(damaged string) {
		got, err := Decode(damaged)
		switch c := code(t, err); {
		case err == nil && !recordtest.Equal(got, want):
			t.Errorf("%q decodes to another record: %s", damaged, mustJSON(t, got))
		case err != nil && !strings.HasPrefix(c, "link-"):
			t.Errorf("%q: %s, though the link is to blame", damaged, c)
		}
	}
	signs := strings.Split(unreserved+" #~%=+/\n\x00", "")
	signs = append(signs, "é", "\xff")
	for i := range whole {
		before, at, after := whole[:i], whole[i:i+1], whole[i+1:]
		check(before)
		check(at + after)
		check(before + after)
		for _, sign := range signs {
			check(before + sign + after)
			check(before + sign + at + after)
		}
		for j := i + 1; j < len(whole); j++ {
			check(before + whole[j:j+1] + whole[i+1:j] + at + whole[j+1:])
		}
	}
	for _, sign := range signs {
		check(whole + sign)
	}
}

func TestRefused(t *testing.T) {
	plain := mustJSON(t, pivot())
	whole := mustEncode(t, pivot())
	payload := strings.TrimPrefix(whole, "s1.")
	packed, err := base64.RawURLEncoding.DecodeString(payload)
	if err != nil {
		t.Fatal(err)
	}
	rebuilt := func(packed []byte) string { return "s1." + base64.RawURLEncoding.EncodeToString(packed) }
	packedText := func(text string) string { return pack(t, []byte(text), []byte(text)) }
	for _, c := range []struct{ name, fragment, want string }{
		{"nothing", "", "link-foreign"},
		{"a hash", "#", "link-foreign"},
		{"blanks", " \t\n", "link-foreign"},
		{"a heading", "#results", "link-foreign"},
		{"prose", "see the sheet of 3.5. by N. Osterly", "link-foreign"},
		{"a text fragment", "#:~:text=hardness", "link-foreign"},
		{"another program's base64", "eyJ2IjoxLCJyZWFkaW5ncyI6W119", "link-foreign"},
		{"a whole address", "https://example.org/#" + whole, "link-foreign"},
		{"two hashes", "##" + whole, "link-foreign"},
		{"a blank after the hash", "# " + whole, "link-foreign"},
		{"another mark", "t1." + payload, "link-foreign"},
		{"a capital mark", "S1." + payload, "link-foreign"},
		{"no mark", "1." + payload, "link-foreign"},
		{"no version", "s." + payload, "link-foreign"},
		{"no point", "s1" + payload, "link-foreign"},
		{"a signed version", "s+1." + payload, "link-foreign"},
		{"a negative version", "s-1." + payload, "link-foreign"},
		{"a version out of all proportion", "s65536." + payload, "link-foreign"},
		{"no utf-8", "s\xff." + payload, "link-foreign"},

		{"the version before the first", "s0." + payload, "link-version"},
		{"the next version", "s2.xxxx", "link-version"},
		{"the last version", "s65535.", "link-version"},

		{"no payload", "s1.", "link-damaged"},
		{"less than a checksum", "s1.AAAA", "link-damaged"},
		{"a checksum alone", "s1.AAAAAA", "link-damaged"},
		{"another base64", "s1." + base64.RawURLEncoding.EncodeToString(plain), "link-damaged"},
		{"the alphabet of files", "s1.++//" + payload, "link-damaged"},
		{"padding", whole + "=", "link-damaged"},
		{"twice", whole + whole, "link-damaged"},
		{"a byte too many", rebuilt(append(slices.Clone(packed), 0)), "link-damaged"},
		{"a second stream", rebuilt(append(slices.Clone(packed), packed[crc32.Size:]...)), "link-damaged"},
		{"a byte too few", rebuilt(packed[:len(packed)-1]), "link-damaged"},
		{"no checksum", rebuilt(packed[crc32.Size:]), "link-damaged"},
		{"another checksum", pack(t, plain, append(plain, ' ')), "link-damaged"},
		{"bits that belong to no byte", "s1." + payload[:len(payload)-1] + "_", "link-damaged"},

		{"no JSON", packedText("{"), "record-not-json"},
		{"JSON and more", packedText(string(plain) + "{}"), "record-not-json"},
		{"a record of another version", packedText(`{"v":2,"pieces":[]}`), "record-version"},
		{"half a curve", packedText(`{"v":1,"readings":[],"curve":{"device":"D","group":"brass","scale":"HBW","pairs":[]}}`), "pairs-none"},
		{"an unknown field", packedText(`{"v":1,"readings":[],"colour":"red"}`), "unknown-field"},
		{"an unknown device", packedText(`{"v":1,"device":"Q","readings":[]}`), "unknown-choice"},
	} {
		t.Run(c.name, func(t *testing.T) {
			if _, err := Decode(c.fragment); code(t, err) != c.want {
				t.Errorf("%.80q: %v, want %s", c.fragment, err, c.want)
			}
		})
	}
}

func TestVersionIsNamed(t *testing.T) {
	_, err := Decode("s7.xxxx")
	want := "The link is of version 7, and this edition reads version 1. Open it with a newer edition."
	if err == nil || err.Error() != want {
		t.Errorf("%v, want %s", err, want)
	}
}

// The largest record that is read comes out of a link, and not one byte more.
func TestSizeOfTheRecord(t *testing.T) {
	plain := mustJSON(t, pivot())
	filled := func(size int) []byte { return append(bytes.Repeat([]byte(" "), size-len(plain)), plain...) }

	largest := filled(record.MaxBytes)
	if got, err := Decode(pack(t, largest, largest)); err != nil || !recordtest.Equal(got, pivot()) {
		t.Errorf("%d bytes: %v", record.MaxBytes, err)
	}
	larger := filled(record.MaxBytes + 1)
	if _, err := Decode(pack(t, larger, larger)); err == nil {
		t.Errorf("%d bytes are not refused", len(larger))
	}
}

// A short fragment that inflates to a great deal takes little memory.
func TestBombs(t *testing.T) {
	const most = 4 << 20 // bytes that decoding may take
	bomb := bytes.Repeat([]byte(" "), 64<<20)
	for _, c := range []struct {
		name, fragment string
	}{
		{"sum of the whole", pack(t, bomb, bomb)},
		{"sum of what is read", pack(t, bomb, bomb[:record.MaxBytes+1])},
		{"sum of the largest record", pack(t, bomb, bomb[:record.MaxBytes])},
		{"a long fragment", "s1." + strings.Repeat("A", 64<<20)},
	} {
		t.Run(c.name, func(t *testing.T) {
			var before, after runtime.MemStats
			runtime.ReadMemStats(&before)
			_, err := Decode(c.fragment)
			runtime.ReadMemStats(&after)
			taken := after.TotalAlloc - before.TotalAlloc
			t.Logf("%d characters: %v, %d kB taken", len(c.fragment), code(t, err), taken>>10)
			if err == nil || taken > most {
				t.Errorf("error %v with %d bytes taken, at most %d are allowed", err, taken, most)
			}
		})
	}
}

func FuzzDecode(f *testing.F) {
	for _, name := range mustGlob(f, "*.json") {
		f.Add(string(mustRead(f, name+".link")))
		f.Add(string(mustRead(f, name+".json")))
	}
	f.Add("s2.xxxx")
	f.Fuzz(func(t *testing.T, text string) {
		// As it stands the checksum stops nearly all; what it would let through
		// is tried as well.
		for _, fragment := range []string{text, pack(t, []byte(text), []byte(text))} {
			r, err := Decode(fragment)
			if code(t, err) != "" {
				continue
			}
			again, err := Decode(mustEncode(t, r))
			if err != nil || !recordtest.Equal(again, r) {
				t.Errorf("%s came back as %s (%v)", mustJSON(t, r), mustJSON(t, again), err)
			}
		}
	})
}
