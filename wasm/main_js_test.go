//go:build js && wasm

package main

import (
	"testing"

	"github.com/hack-pad/safejs"
)

// The page finds each door in the global object, and reaches the same through
// it as the tests do without.
func TestRegister(t *testing.T) {
	if err := register(); err != nil {
		t.Fatal(err)
	}
	object, err := safejs.Global().Get("strikebook")
	if err != nil {
		t.Fatal(err)
	}
	ask := func(name string, args ...any) string {
		t.Helper()
		value, err := object.Call(name, args...)
		if err != nil {
			t.Fatalf("%s: %v", name, err)
		}
		answer, err := value.String()
		if err != nil {
			t.Fatalf("%s: %v", name, err)
		}
		return answer
	}
	for name, d := range doors {
		args, texts := []any{pivot}, []string{pivot}
		if d.takes == "" {
			args, texts = nil, nil
		}
		if got, want := ask(name, args...), call(name, d, texts); got != want {
			t.Errorf("%s:\ngot  %.200s\nwant %.200s", name, got, want)
		}
		for _, other := range []any{1, true, nil, map[string]any{"v": 1}} {
			if e := fault(t, ask(name, other)); e == nil || e.Code != "bad-call" {
				t.Errorf("%s with %v: %v, want bad-call", name, other, e)
			}
		}
	}
}
