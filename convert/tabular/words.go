package tabular

import (
	_ "embed"
	"strings"
	"sync"

	"strikebook/convert/device"
	"strikebook/convert/metal"
	"strikebook/convert/record"
	"strikebook/convert/scale"
	"strikebook/convert/table"
)

//go:embed words.csv
var wordsFile []byte

type word struct{ kind, plain string }

// words leads from a kind of word and the word, plain, to what it stands for.
// The keys of a record's fields are words for themselves.
var words = sync.OnceValue(func() map[word]string {
	all := map[word]string{}
	add := func(kind, one, key string) { all[word{kind, plainWord(one)}] = key }
	for _, row := range table.MustRead("words.csv", wordsFile).Rows {
		for one := range strings.SplitSeq(row.Text("words"), "|") {
			add(row.Text("kind"), one, row.Text("key"))
		}
	}
	for _, zone := range []record.Zone{record.Base, record.HAZ, record.Weld, record.Other} {
		add("zone", string(zone), string(zone))
	}
	for _, direction := range device.Directions() {
		add("direction", string(direction), string(direction))
	}
	for _, g := range metal.All() {
		add("group", g.Key, g.Key)
		add("group", g.Name, g.Key)
	}
	for _, s := range scale.Converted() {
		add("scale", string(s.Key), string(s.Key))
	}
	for _, d := range device.All() {
		add("device", d.Key, d.Key)
		add("device", d.Scale, d.Key)
		add("scale", d.Scale, d.Scale)
	}
	for _, f := range fields {
		add("column", f.path, f.path)
	}
	return all
})

// plainWord is a word without what people write in different ways: case, spaces,
// signs.
func plainWord(text string) string {
	return strings.Map(func(r rune) rune {
		if r < 0x80 && !(r >= 'a' && r <= 'z' || r >= '0' && r <= '9') {
			return -1
		}
		return r
	}, strings.ToLower(text))
}

// translated is the key that a cell means in a field, or the cell as it stands.
func translated(path, cell string) string {
	if path == "taken" {
		return timeOf(cell)
	}
	kind := path
	if path == "limit.scale" {
		kind = "scale"
	}
	if key, ok := words()[word{kind, plainWord(cell)}]; ok {
		return key
	}
	return cell
}

// timeOf completes a date as people write it to a time of RFC 3339: 2026-12-01,
// 2026-12-01 09:30 or 1.12.2026 09:30:00. Where no zone is written, the time
// stands as it was written, as if it were universal time. Anything else it
// leaves as it is: 1/12/2026 means one day here and another there.
func timeOf(cell string) string {
	date, clock, _ := strings.Cut(strings.Replace(strings.TrimSpace(cell), "T", " ", 1), " ")
	if day, rest, ok := strings.Cut(date, "."); ok {
		month, year, _ := strings.Cut(rest, ".")
		date = year + "-" + twoDigits(month) + "-" + twoDigits(day)
	}
	clock = strings.TrimSpace(clock)
	switch strings.Count(clock, ":") {
	case 0:
		if clock != "" {
			return cell
		}
		clock = "00:00:00"
	case 1:
		clock += ":00"
	}
	if hour, _, _ := strings.Cut(clock, ":"); len(hour) == 1 {
		clock = "0" + clock
	}
	if len(date) != len("2026-12-01") || len(clock) != len("09:30:00") {
		return cell // of RFC 3339 already, or for the record's own check to refuse
	}
	return date + "T" + clock + "Z"
}

func twoDigits(number string) string {
	if len(number) == 1 {
		return "0" + number
	}
	return number
}
