package main

import (
	"strikebook/convert"
	"strikebook/convert/tabular"
)

func evaluateBook(text string) (string, error) {
	b, err := convert.DecodeBook([]byte(text))
	if err != nil {
		return "", err
	}
	return marshal(convert.EvaluateBook(b))
}

func evaluateRows(text string) (string, error) {
	b, err := convert.DecodeBook([]byte(text))
	if err != nil {
		return "", err
	}
	return marshal(convert.EvaluateRows(b))
}

func summarizeRows(text string) (string, error) {
	b, err := convert.DecodeRows([]byte(text))
	if err != nil {
		return "", err
	}
	return marshal(convert.SummarizeRows(b.Rows))
}

func readTable(text string) (string, error) {
	q, err := tabular.DecodeRequest([]byte(text))
	if err != nil {
		return "", err
	}
	read, err := tabular.Read(q)
	if err != nil {
		return "", err
	}
	return marshal(read)
}

// writeTable answers CSV, which never begins as an error does: its first cell is
// a header, or the id of a record, in quotes if it begins with a brace.
func writeTable(text string) (string, error) {
	b, err := convert.DecodeTableBook([]byte(text))
	if err != nil {
		return "", err
	}
	return convert.WriteTable(b), nil
}
