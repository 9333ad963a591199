// Package command runs the programs that the build relies on: go, npm, tsc.
package command

import (
	"bytes"
	"context"
	"errors"
	"fmt"
	"io"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
)

// Command is one program call.
type Command struct {
	Dir  string    // working folder
	Env  []string  // "NAME=value", on top of the environment
	Out  io.Writer // where its lines go as they come; nil keeps them for Run's result
	Args []string  // the program and its arguments
}

// Run runs the command and returns what it wrote. Its error names the command
// and repeats what it wrote, unless that was shown already.
func (c Command) Run(ctx context.Context) (string, error) {
	cmd := exec.CommandContext(ctx, c.Args[0], c.Args[1:]...)
	cmd.Dir = c.Dir
	cmd.Env = append(os.Environ(), c.Env...)
	var out, errOut bytes.Buffer
	cmd.Stdout, cmd.Stderr = &out, &errOut
	if c.Out != nil {
		cmd.Stdout, cmd.Stderr = c.Out, c.Out
	}
	if err := cmd.Run(); err != nil {
		said := strings.TrimSpace(out.String() + errOut.String())
		if said != "" {
			said = "\n" + said
		}
		return "", fmt.Errorf("%s failed (%w)%s", strings.Join(c.Args, " "), err, said)
	}
	return strings.TrimSpace(out.String()), nil
}

// Output runs a program in a folder and returns what it wrote to its standard
// output.
func Output(ctx context.Context, dir string, args ...string) (string, error) {
	return Command{Dir: dir, Args: args}.Run(ctx)
}

// ModuleRoot is the folder of the module that the working folder belongs to.
func ModuleRoot(ctx context.Context) (string, error) {
	file, err := Output(ctx, "", "go", "env", "GOMOD")
	if err != nil {
		return "", err
	}
	if filepath.Base(file) != "go.mod" {
		return "", errors.New("this is not inside the Strikebook module; change to its folder first")
	}
	return filepath.Dir(file), nil
}
