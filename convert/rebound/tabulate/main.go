// Command tabulate writes the file tables.csv of package rebound. Run it by
// go generate ./convert/rebound after a change to the model, a device or a metal.
package main

import (
	"log"
	"os"

	"strikebook/convert/rebound/mechanics"
)

func main() {
	content, err := mechanics.Tables()
	if err != nil {
		log.Fatal(err)
	}
	if err := os.WriteFile("tables.csv", content, 0o644); err != nil {
		log.Fatal(err)
	}
}
