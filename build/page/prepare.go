package page

import (
	"bytes"
	"context"
	"fmt"
	"os"
	"path/filepath"

	"strikebook/build/command"
)

// Install installs the npm packages when they are missing or package-lock.json
// has changed since. No script of a package is run.
func Install(ctx context.Context, root string) error {
	site := filepath.Join(root, "site")
	lock, err := os.ReadFile(filepath.Join(site, "package-lock.json"))
	if err != nil {
		return fmt.Errorf("cannot read the list of npm packages: %w", err)
	}
	// A copy of the lock file inside node_modules tells what is installed; npm
	// deletes it with the folder.
	stamp := filepath.Join(site, "node_modules", ".installed-lock.json")
	if installed, err := os.ReadFile(stamp); err == nil && bytes.Equal(installed, lock) {
		return nil
	}
	if _, err := command.Output(ctx, site, "npm", "ci", "--ignore-scripts", "--no-audit", "--no-fund"); err != nil {
		return fmt.Errorf("cannot install the npm packages (is Node 20 or later with npm installed, and is there a network?): %w", err)
	}
	return os.WriteFile(stamp, lock, 0o644)
}

// Generated compares the generated TypeScript with the Go sources it comes
// from, in a program of its own because it must be compiled with the sources
// as they are now. A difference is an error, or is rewritten.
func Generated(ctx context.Context, root string, rewrite bool) error {
	args := []string{"go", "run", "./build/contract/write"}
	if !rewrite {
		args = append(args, "-check")
	}
	_, err := command.Output(ctx, root, args...)
	return err
}

// CheckTypes runs the TypeScript compiler over the page and over what runs in
// workers.
func CheckTypes(ctx context.Context, root string) error {
	site := filepath.Join(root, "site")
	compiler := filepath.Join(site, "node_modules", ".bin", "tsc")
	for _, project := range []string{"tsconfig.json", "tsconfig.worker.json"} {
		if _, err := command.Output(ctx, site, compiler, "--noEmit", "--project", project); err != nil {
			return err
		}
	}
	return nil
}
