package wording

import (
	"slices"
	"strings"
	"testing"
)

func TestFill(t *testing.T) {
	for _, c := range []struct {
		text   string
		params Params
		want   string
	}{
		{"plain", nil, "plain"},
		{"{a} of {b}", Params{"a": 3, "b": "four"}, "3 of four"},
		{"{x:1} % and {x:0}", Params{"x": 5.26}, "5.3 % and 5"},
		{"{x}", Params{"x": 61.25}, "61.25"},
		{"{x}", Params{"x": 5.0}, "5"},
		{"an open { brace", Params{}, "an open { brace"},
		{"{text}", Params{"text": "{x} stays"}, "{x} stays"},
	} {
		if got := fill(c.text, c.params); got != c.want {
			t.Errorf("%q with %v: %q, want %q", c.text, c.params, got, c.want)
		}
	}
}

func TestEverySentenceIsWhole(t *testing.T) {
	seen := map[string]bool{}
	for _, s := range All() {
		if seen[s.Code] {
			t.Errorf("%s stands twice", s.Code)
		}
		seen[s.Code] = true
		if !slices.Contains([]Kind{Stop, Warn, Note, Reason, Ruling, Advice, Fault}, s.Kind) {
			t.Errorf("%s: unknown kind %q", s.Code, s.Kind)
		}
		finding := s.Kind == Stop || s.Kind == Warn || s.Kind == Note
		if finding && (s.Remedy == "" || s.Source == "") {
			t.Errorf("%s: a finding needs a remedy and a source", s.Code)
		}
		for _, text := range []string{s.Message, s.Remedy} {
			if text != "" && !strings.HasSuffix(text, ".") {
				t.Errorf("%s: %q does not end as a sentence does", s.Code, text)
			}
			if strings.Count(text, "{") != strings.Count(text, "}") {
				t.Errorf("%s: %q has an open place-holder", s.Code, text)
			}
		}
	}
}

func TestUnknownCodeSaysSo(t *testing.T) {
	if got := Say("no-such-code", nil).Message; !strings.Contains(got, "no-such-code") {
		t.Errorf("%q", got)
	}
}
