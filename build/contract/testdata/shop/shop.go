// Package shop is what the generator's test reads.
package shop

import (
	"encoding/json"
	"time"

	"example/shop/unit"
)

// Order is what a customer asked for.
//
// It has a comment of more than one line.
type Order struct {
	Header
	ID       string              `json:"id"` // never empty
	State    State               `json:"state"`
	Lines    []Line              `json:"lines"`
	Notes    map[string][]string `json:"notes,omitempty"`
	Gift     *Line               `json:"gift"`
	Rebate   *float64            `json:"rebate,omitempty"`
	Checks   []*bool             `json:"checks"`
	Total    unit.Money          `json:"total"`
	Extra    any                 `json:"extra"`
	Raw      json.RawMessage     `json:"raw"`
	Sum      []byte              `json:"sum"`
	Range    [2]float64          `json:"range"`
	Place    struct{ X, Y int }  `json:"place"`
	Odd      int                 `json:"odd-name"`
	Parent   *Order              `json:"parent,omitempty"`
	Skipped  string              `json:"-"`
	internal string
}

// Header comes first in each paper.
type Header struct {
	// When it was written.
	Date time.Time `json:"date"`
}

// Line is a line of an order.
type Line struct {
	*Discount
	Weight  unit.Weight
	Reading Reading `json:"reading"`
}

// Discount is only there where one is given.
type Discount struct {
	Percent float64 `json:"percent"`
}

// State says how far an order has come.
type State string

const (
	Open   State = "open"
	Closed State = "closed"
	Lost         = State("lost")
)

// Reading is a number or a gap.
//
//contract:ts number | null
type Reading float64

// MarshalJSON writes a gap as null.
func (r Reading) MarshalJSON() ([]byte, error) { return nil, nil }

// Unused is not reachable from Order.
type Unused chan int
