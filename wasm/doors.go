// Command wasm is the bridge between the core and the page: it registers one
// global object, strikebook, whose functions take and give text (JSON, or the
// fragment of a link). It holds no logic of its own.
package main

import (
	"fmt"

	"strikebook/convert"
	"strikebook/convert/link"
	"strikebook/convert/owncurve"
	"strikebook/convert/record"
	"strikebook/convert/strict"
	"strikebook/convert/wording"
)

// door is one function of the global object: text in, text out.
type door struct {
	takes string // what it takes, for the sentence that refuses anything else
	open  func(text string) (string, error)
}

// doors are the functions of the global object. "" stands for no argument.
var doors = map[string]door{
	"evaluate":     {"the JSON of a record, as text", evaluate},
	"goNoGo":       {"the JSON of a record with n and sd, as text", goNoGo},
	"moreReadings": {"the JSON of a record with what is wanted, as text", moreReadings},
	"fitCurve":     {"the JSON of pairs with their device, metal and scale, as text", fitCurve},
	"encodeLink":   {"the JSON of a record, as text", encodeLink},
	"decodeLink":   {"the fragment of a link, as text", decodeLink},
	"catalogue":    {"", catalogue},

	"evaluateBook":  {"the JSON of a book, as text", evaluateBook},
	"evaluateRows":  {"the JSON of a book, as text", evaluateRows},
	"summarizeRows": {"the JSON of a book's rows, as text", summarizeRows},
	"readTable":     {"the JSON of a table with what is known of it, as text", readTable},
	"writeTable":    {"the JSON of a book, as text", writeTable},
}

func evaluate(text string) (string, error) {
	r, err := record.Decode([]byte(text))
	if err != nil {
		return "", err
	}
	sheet, err := convert.Evaluate(r)
	if err != nil {
		return "", err
	}
	return marshal(sheet)
}

func goNoGo(text string) (string, error) {
	var q convert.GoNoGoRequest
	if err := record.DecodeAround([]byte(text), &q, &q.Record); err != nil {
		return "", err
	}
	answer, err := convert.FindGoNoGo(q)
	if err != nil {
		return "", err
	}
	return marshal(answer)
}

func moreReadings(text string) (string, error) {
	var q convert.MoreReadingsRequest
	if err := record.DecodeAround([]byte(text), &q, &q.Record); err != nil {
		return "", err
	}
	answer, err := convert.FindMoreReadings(q)
	if err != nil {
		return "", err
	}
	return marshal(answer)
}

func fitCurve(text string) (string, error) {
	d, err := owncurve.Decode([]byte(text))
	if err != nil {
		return "", err
	}
	fitted, err := owncurve.Make(d)
	if err != nil {
		return "", err
	}
	return marshal(fitted)
}

func encodeLink(text string) (string, error) {
	r, err := record.Decode([]byte(text))
	if err != nil {
		return "", err
	}
	return link.Encode(r)
}

func decodeLink(text string) (string, error) {
	r, err := link.Decode(text)
	if err != nil {
		return "", err
	}
	plain, err := record.Encode(r)
	return string(plain), err
}

func catalogue(string) (string, error) { return marshal(convert.NewCatalogue()) }

// call goes through a door. An error, or a panic inside, comes back as JSON:
// {"error":{"code":...,"message":...,"field":...}}. The next call works.
func call(name string, d door, args []string) (answer string) {
	defer func() {
		if fault := recover(); fault != nil {
			answer = refusal(internal(name, fault))
		}
	}()
	wanted := 1
	if d.takes == "" {
		wanted = 0
	}
	if len(args) != wanted {
		return refusal(badCall(name, d))
	}
	text := ""
	if wanted == 1 {
		text = args[0]
	}
	answer, err := d.open(text)
	if err != nil {
		return refusal(err)
	}
	return answer
}

func badCall(name string, d door) error {
	takes := d.takes
	if takes == "" {
		takes = "nothing"
	}
	return wording.NewError("bad-call", "", wording.Params{"call": name, "want": takes})
}

func internal(name string, fault any) *wording.Error {
	return wording.NewError("internal", "", wording.Params{"call": name, "detail": fmt.Sprint(fault)})
}

// refusal is an error as the page reads it.
func refusal(err error) string {
	e, ok := err.(*wording.Error)
	if !ok {
		e = internal("strikebook", err)
	}
	text, err := marshal(map[string]*wording.Error{"error": e})
	if err != nil {
		return `{"error":{"code":"internal","message":"The core met an internal fault and could not describe it. Reload the page.","field":"","params":{}}}`
	}
	return text
}

func marshal(value any) (string, error) {
	text, err := strict.Marshal(value)
	return string(text), err
}
