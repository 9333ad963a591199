// Package hashed names files by their content, so that a browser may keep such
// a file for ever: another content has another name.
package hashed

import (
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"path"
	"regexp"
	"strings"
)

// digits is how much of the SHA-256 goes into a name: 40 bits, ample to tell
// the versions of one file apart.
const digits = 10

var pattern = regexp.MustCompile(fmt.Sprintf(`\.[0-9a-f]{%d}\.[a-z]+$`, digits))

// Sum is the short hash of some content.
func Sum(content []byte) string {
	sum := sha256.Sum256(content)
	return hex.EncodeToString(sum[:])[:digits]
}

// Name puts the hash of the content before the extension of a name:
// main.js becomes main.0123456789.js.
func Name(name string, content []byte) string {
	ext := path.Ext(name)
	return strings.TrimSuffix(name, ext) + "." + Sum(content) + ext
}

// Is tells whether a name carries a hash.
func Is(name string) bool {
	return pattern.MatchString(name)
}
