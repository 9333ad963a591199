// Package bad holds what the generator must refuse.
package bad

import "example/elsewhere"

type (
	Channel struct{ C chan int }
	Complex struct{ C complex128 }
	Far     struct{ T elsewhere.Thing }
	Twice   struct {
		A int `json:"x"`
		B int `json:"x"`
	}
	Quoted struct {
		A int `json:"a,string"`
	}
	Generic[T any] struct{ V T }
	Coded          struct{}
	Pointer        struct{ *Coded }
	Money          string // there is a unit.Money as well
)

func (*Coded) MarshalText() ([]byte, error) { return nil, nil }
