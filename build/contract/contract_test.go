package contract

import (
	"os"
	"path/filepath"
	"strings"
	"testing"
)

var testPackages = []Package{
	{"example/shop", "testdata/shop"},
	{"example/shop/unit", "testdata/shop/unit"},
	{"example/bad", "testdata/bad"},
}

func TestTypeScript(t *testing.T) {
	got, err := TypeScript(testPackages, []string{"shop.Order"})
	if err != nil {
		t.Fatal(err)
	}
	want, err := os.ReadFile(filepath.Join("testdata", "shop", "shop.ts"))
	if err != nil {
		t.Fatal(err)
	}
	if string(got) != string(want) {
		t.Errorf("the generated text differs from testdata/shop/shop.ts:\n%s", got)
	}
}

func TestTypeScriptRefuses(t *testing.T) {
	for root, want := range map[string]string{
		"bad.Channel": "cannot express",
		"bad.Complex": "cannot express the type complex128",
		"bad.Far":     "elsewhere.Thing is not in the packages",
		"bad.Twice":   `two fields that are called "x"`,
		"bad.Quoted":  "use a string field",
		"bad.Generic": "type parameters",
		"bad.Coded":   "encodes itself by MarshalText",
		"bad.Pointer": "only a plain struct may be embedded",
		"bad.Missing": "no type bad.Missing",
	} {
		_, err := TypeScript(testPackages, []string{root})
		if err == nil || !strings.Contains(err.Error(), want) {
			t.Errorf("%s: error %v, want one with %q", root, err, want)
		}
	}
}

func TestTypeScriptRefusesClash(t *testing.T) {
	_, err := TypeScript(testPackages, []string{"shop.Order", "bad.Money"})
	if err == nil || !strings.Contains(err.Error(), "same name in TypeScript") {
		t.Errorf("two types called Money: error %v", err)
	}
}

func TestConstant(t *testing.T) {
	got, err := Constant("lines", "Line[]", []string{"a < b"})
	if err != nil {
		t.Fatal(err)
	}
	want := `// Generated from the Go sources by build/contract. Do not edit.

import type { Line } from "./contract";

export const lines: Line[] = [
  "a < b"
];
`
	if string(got) != want {
		t.Errorf("got:\n%s", got)
	}
	if _, err := Constant("bad", "Bad", func() {}); err == nil {
		t.Error("a function was written as JSON")
	}
}
