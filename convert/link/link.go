// Package link turns a record into a URL fragment and back. The fragment holds
// the whole record, so that whoever opens it can recompute the same sheet.
package link

import (
	"bytes"
	"compress/flate"
	"encoding/base64"
	"encoding/binary"
	"hash/crc32"
	"io"
	"strconv"
	"strings"

	"strikebook/convert/record"
	"strikebook/convert/wording"
)

// A fragment is the mark, the version, a point, then in base64 for URLs the
// checksum of the record's JSON (CRC-32, IEEE, big endian) and that JSON,
// deflated with the dictionary of its version: "s1.wR3e...".
const (
	mark    = "s"
	version = 1
)

// dictionary makes short records short: what follows is what a record looks
// like, the commonest last. It belongs to version 1 for ever; another one needs
// another version.
const dictionary = `"limit":{"scale":"HRB","min":,"rule":"one-sided-95","rule":"simple","scale":"HRC","max":22,"scale":"HV","max":250,"scale":"HBW","max":225,"rule":"guarded"}` +
	`"block":{"certified":775,"expanded_u":6,"readings":[,"tolerance":6}` +
	`"curve":{"name":"","kind":"anchor","own","table","pairs":[{"hl":,"u_hl":,"value":,"u_value":}],"source":"","form":"","range":[,"parameters":[,"covariance":[[,"residual":,"edition":""` +
	`"piece":{"mass_kg":,"thickness_mm":,"radius_mm":,"ra_um":1.6,"temperature_c":21,"support":"free","support":"supported","support":"coupled","case_mm":,` +
	`"shape":{"kind":"plate","kind":"pipe","kind":"bar","kind":"none","length_mm":,"width_mm":,"outer_diameter_mm":,"wall_mm":}}` +
	`"group":"tool-steel","group":"martensitic-stainless","group":"austenitic-stainless","group":"duplex-stainless","group":"grey-iron","group":"ductile-iron","group":"aluminium","group":"brass","group":"bronze","group":"copper","group":"nickel-alloy","group":"titanium",` +
	`"device":"DC","device":"DL","device":"D+15","device":"S","device":"E","device":"C","device":"G","scale":"HLDC","scale":"HLDL","scale":"HLD+15","scale":"HLS","scale":"HLE","scale":"HLC","scale":"HLG",` +
	`"direction":"down45","direction":"level","direction":"up45","direction":"up","direction":"compensated","struck":"probe tilted"},` +
	`"confidence":0.95}"notes":"","zone":"base","zone":"haz","zone":"weld","zone":"other","serial":"","by":"","job":"",` +
	`{"v":1,"id":"","label":"","taken":"2026-12-01T09:30:00Z","device":"D","direction":"down","scale":"HLD","group":"low-alloy-steel","readings":[{"value":612},{"value":655},{"value":6`

// Encode returns the fragment of a record, without "#". What came of an own curve
// is left out: whoever opens the link computes it again.
func Encode(r record.Record) (string, error) {
	r.Curve = r.Curve.Packed()
	text, err := record.Encode(r)
	if err != nil {
		return "", err
	}
	packed := binary.BigEndian.AppendUint32(nil, crc32.ChecksumIEEE(text))
	packed = append(packed, deflate(text, []byte(dictionary))...)
	return mark + strconv.Itoa(version) + "." + base64.RawURLEncoding.EncodeToString(packed), nil
}

// Decode reads the record out of a fragment, with or without its "#". An error
// is a *wording.Error: the link is foreign, of another version or damaged, or
// what it carries is no valid record.
func Decode(fragment string) (record.Record, error) {
	body, ours := strings.CutPrefix(strings.TrimPrefix(strings.TrimSpace(fragment), "#"), mark)
	number, payload, point := strings.Cut(body, ".")
	v, err := strconv.ParseUint(number, 10, 16)
	if !ours || !point || err != nil {
		return record.Record{}, wording.NewError("link-foreign", "", nil)
	}
	if v != version {
		return record.Record{}, wording.NewError("link-version", "", wording.Params{"version": int(v), "known": version})
	}
	text, ok := unpack(payload)
	if !ok {
		return record.Record{}, wording.NewError("link-damaged", "", nil)
	}
	r, err := record.Decode(text)
	r.Curve = r.Curve.Unpacked()
	return r, err
}

// unpack returns the JSON of a fragment's payload, and whether it is whole.
func unpack(payload string) (text []byte, ok bool) {
	// A packed record is never larger than a plain one, but for a few bytes.
	const mostPacked = record.MaxBytes + 1024
	if len(payload) > base64.RawURLEncoding.EncodedLen(mostPacked) {
		return nil, false
	}
	packed, err := base64.RawURLEncoding.Strict().DecodeString(payload)
	if err != nil || len(packed) < crc32.Size {
		return nil, false
	}
	rest := bytes.NewReader(packed[crc32.Size:])
	inflate := flate.NewReaderDict(rest, []byte(dictionary))
	// A fragment of some bytes can inflate to thousands of times as many: stop
	// one byte past the largest record.
	text, err = io.ReadAll(io.LimitReader(inflate, record.MaxBytes+1))
	if err != nil || rest.Len() > 0 || crc32.ChecksumIEEE(text) != binary.BigEndian.Uint32(packed) {
		return nil, false
	}
	return text, true
}
