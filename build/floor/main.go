//go:build js && wasm

// Command floor calls the libraries that the core relies on, and does nothing
// else. Its compiled size is what the core would take if its own code were
// free; the release table compares the core with it.
package main

import (
	"bytes"
	"compress/flate"
	"encoding/base64"
	"encoding/csv"
	"fmt"
	"hash/crc32"
	"io"
	"reflect"
	"strconv"
	"strings"
	"time"

	"github.com/hack-pad/safejs"
	"gonum.org/v1/gonum/interp"
	"gonum.org/v1/gonum/stat"
	"gonum.org/v1/gonum/stat/distuv"
)

// sheet stands for whatever the core reads and writes by reflection.
type sheet struct {
	Name   string             `key:"name"`
	Values []float64          `key:"values"`
	Limit  *float64           `key:"limit"`
	Parts  map[string]float64 `key:"parts"`
}

// answer goes through every library once, so that the linker keeps them all.
func answer(request string) (string, error) {
	s := sheet{Name: request, Values: []float64{1, 2, 4}}
	rows, err := csv.NewReader(bytes.NewReader([]byte(s.Name))).ReadAll()
	if err != nil {
		return "", err
	}
	if s.Name, err = pack([]byte(fmt.Sprint(rows))); err != nil {
		return "", err
	}
	if s.Parts, err = numbers(s.Values); err != nil {
		return "", err
	}
	taken := time.Date(len(rows), time.January, 1, 0, 0, 0, 0, time.UTC).Add(time.Hour)
	return strconv.Itoa(taken.Day()) + reflected(reflect.ValueOf(&s).Elem()), nil
}

// reflected reads and sets the fields of a struct by reflection.
func reflected(v reflect.Value) string {
	var b strings.Builder
	for i := range v.NumField() {
		field := v.Field(i)
		b.WriteString(v.Type().Field(i).Tag.Get("key"))
		switch field.Kind() {
		case reflect.Pointer:
			field.Set(reflect.New(field.Type().Elem()))
		case reflect.Slice:
			field.Set(reflect.Append(field, reflect.New(field.Type().Elem()).Elem()))
		case reflect.Map:
			for _, key := range field.MapKeys() {
				b.WriteString(key.String() + strconv.FormatFloat(field.MapIndex(key).Float(), 'g', -1, 64))
			}
		case reflect.String:
			field.SetString(field.String() + "!")
		}
	}
	return b.String()
}

// pack compresses with a dictionary, and unpacks again.
func pack(content []byte) (string, error) {
	dictionary := []byte("dictionary")
	var packed bytes.Buffer
	w, err := flate.NewWriterDict(&packed, flate.BestCompression, dictionary)
	if err != nil {
		return "", err
	}
	if _, err := w.Write(content); err != nil {
		return "", err
	}
	if err := w.Close(); err != nil {
		return "", err
	}
	text := base64.RawURLEncoding.EncodeToString(packed.Bytes())
	back, err := base64.RawURLEncoding.DecodeString(text)
	if err != nil {
		return "", err
	}
	plain, err := io.ReadAll(flate.NewReaderDict(bytes.NewReader(back), dictionary))
	return fmt.Sprintf("%08x%s", crc32.ChecksumIEEE(plain), text), err
}

// numbers calls the statistics and the curves.
func numbers(values []float64) (map[string]float64, error) {
	mean, sd := stat.MeanStdDev(values, nil)
	var curve interp.FritschButland
	if err := curve.Fit(values, values); err != nil {
		return nil, err
	}
	var line interp.PiecewiseLinear
	if err := line.Fit(values, values); err != nil {
		return nil, err
	}
	student := distuv.StudentsT{Sigma: 1, Nu: float64(len(values))}
	return map[string]float64{
		"mean":    mean,
		"sd":      sd,
		"student": student.Quantile(0.975) + student.CDF(mean) + student.Prob(mean),
		"normal":  distuv.UnitNormal.Quantile(0.975),
		"line":    line.Predict(mean),
		"curve":   curve.Predict(mean),
		"slope":   curve.PredictDerivative(mean),
	}, nil
}

func main() {
	function, err := safejs.FuncOf(func(_ safejs.Value, args []safejs.Value) any {
		request, err := args[0].String()
		if err != nil {
			return err.Error()
		}
		out, err := answer(request)
		if err != nil {
			return err.Error()
		}
		return out
	})
	if err != nil {
		panic(err)
	}
	if err := safejs.Global().Set("answer", function); err != nil {
		panic(err)
	}
	select {}
}
