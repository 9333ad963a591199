//go:build js && wasm

package main

import "github.com/hack-pad/safejs"

func main() {
	if err := register(); err != nil {
		panic(err)
	}
	select {} // the doors stay open for as long as the worker lives
}

// register makes the global object strikebook.
func register() error {
	object, err := safejs.ValueOf(map[string]any{})
	if err != nil {
		return err
	}
	for name, d := range doors {
		f, err := safejs.FuncOf(func(_ safejs.Value, args []safejs.Value) any {
			texts := make([]string, len(args))
			for i, arg := range args {
				text, err := arg.String()
				if err != nil || arg.Type() != safejs.TypeString {
					return refusal(badCall(name, d))
				}
				texts[i] = text
			}
			return call(name, d, texts)
		})
		if err != nil {
			return err
		}
		if err := object.Set(name, f); err != nil {
			return err
		}
	}
	return safejs.Global().Set("strikebook", object)
}
