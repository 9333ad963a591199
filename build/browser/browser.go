// Package browser finds the Chromium that the browser tests drive.
package browser

import (
	"context"
	"errors"
	"fmt"
	"io"
	"os/exec"

	"strikebook/build/command"
)

// names are what the browser is called on the systems it comes with.
var names = []string{"chromium", "chromium-browser", "google-chrome", "google-chrome-stable"}

// Find returns the path of the browser.
func Find() (string, error) {
	for _, name := range names {
		if path, err := exec.LookPath(name); err == nil {
			return path, nil
		}
	}
	return "", errors.New("the browser tests need Chromium, and none is on the PATH; install the package chromium, or run \"go run ./build test\" as root on Debian to have it installed")
}

// Install installs Chromium by Debian's packages unless a browser is there.
func Install(ctx context.Context, out io.Writer) error {
	if _, err := Find(); err == nil {
		return nil
	}
	if _, err := exec.LookPath("apt-get"); err != nil {
		return errors.New("no Chromium is on the PATH, and without apt-get it cannot be installed from here; install Chromium or Chrome by hand")
	}
	for _, args := range [][]string{
		{"apt-get", "update"},
		{"apt-get", "install", "-y", "chromium"},
	} {
		c := command.Command{Env: []string{"DEBIAN_FRONTEND=noninteractive"}, Out: out, Args: args}
		if _, err := c.Run(ctx); err != nil {
			return fmt.Errorf("cannot install Chromium (are you root, and is there a network?): %w", err)
		}
	}
	_, err := Find()
	return err
}
