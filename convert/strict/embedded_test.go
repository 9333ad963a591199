package strict_test

import (
	"encoding/json"
	"testing"

	"strikebook/convert/strict"
)

type Made struct {
	Of   string `json:"of"`
	Note string `json:"note,omitempty"`
}

type Came struct {
	Form string   `json:"form"`
	List []string `json:"list"`
}

// article is made of something, and something may have come of it.
type article struct {
	Made
	*Came
	Price *float64 `json:"price,omitempty"`
}

// An embedded pointer is nil while none of its fields is there.
func TestEmbeddedPointer(t *testing.T) {
	for _, text := range []string{
		`{"of":"oak"}`,
		`{"of":"oak","note":"dry","price":3}`,
		`{"of":"oak","form":"","list":[]}`,
		`{"of":"oak","form":"chair","list":["leg"],"price":3}`,
	} {
		var got, want article
		if err := strict.Unmarshal([]byte(text), &got); err != nil {
			t.Fatalf("%s: %v", text, err)
		}
		if err := json.Unmarshal([]byte(text), &want); err != nil {
			t.Fatal(err)
		}
		if (got.Came == nil) != (want.Came == nil) {
			t.Errorf("%s: read as %v, the library reads %v", text, got.Came, want.Came)
		}
		if back := mustMarshal(t, got); back != text {
			t.Errorf("%s came back as %s", text, back)
		}
	}
	var bad article
	err := strict.Unmarshal([]byte(`{"of":"oak","list":["leg",4]}`), &bad)
	if e, ok := err.(*strict.Error); !ok || e.Path != "list[1]" {
		t.Errorf("a number for a text in the part that came of it: %v", err)
	}
}
