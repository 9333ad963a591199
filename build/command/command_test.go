package command

import (
	"bytes"
	"strings"
	"testing"
)

func TestRun(t *testing.T) {
	c := Command{Dir: t.TempDir(), Env: []string{"WORD=strike"}, Args: []string{"sh", "-c", "echo $WORD; echo aside >&2"}}
	if got, err := c.Run(t.Context()); err != nil || got != "strike" {
		t.Errorf("got %q, %v", got, err)
	}
	var shown bytes.Buffer
	c.Out = &shown
	if _, err := c.Run(t.Context()); err != nil || shown.String() != "strike\naside\n" {
		t.Errorf("shown %q, %v", &shown, err)
	}
}

func TestRunTellsWhatFailed(t *testing.T) {
	_, err := Output(t.Context(), "", "sh", "-c", "echo reason >&2; exit 3")
	for _, want := range []string{"sh -c", "exit status 3", "\nreason"} {
		if err == nil || !strings.Contains(err.Error(), want) {
			t.Errorf("error %v lacks %q", err, want)
		}
	}
	if _, err := Output(t.Context(), "", "no-such-program"); err == nil {
		t.Error("a missing program ran")
	}
}
