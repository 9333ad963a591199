//go:build !(js && wasm)

package main

import (
	"fmt"
	"os"
)

func main() {
	fmt.Fprintln(os.Stderr, "This program runs in a browser: build it with GOOS=js GOARCH=wasm, or run go run ./build serve.")
	os.Exit(2)
}
