package main

import "strikebook/convert"

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
