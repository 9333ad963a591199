// Command build compiles, bundles, serves and tests the page.
package main

import (
	"context"
	"flag"
	"fmt"
	"os"
	"os/signal"
	"path/filepath"
	"syscall"

	"strikebook/build/check"
	"strikebook/build/command"
	"strikebook/build/develop"
	"strikebook/build/page"
)

const usage = `usage: go run ./build COMMAND

  serve    build the page, serve it and build it anew on each change
           -addr HOST:PORT   where to serve (default 127.0.0.1:8080, or the
                             next free port)
  test     run every check and every test; installs what they need
  release  build the page for publication into dist/, and show the sizes
  help     show this text
`

func main() {
	ctx, stop := signal.NotifyContext(context.Background(), os.Interrupt, syscall.SIGTERM)
	defer stop()
	if err := run(ctx, os.Args[1:]); err != nil {
		fmt.Fprintln(os.Stderr, err)
		stop()
		os.Exit(1)
	}
}

func run(ctx context.Context, args []string) error {
	if len(args) == 0 || args[0] == "help" {
		fmt.Print(usage)
		return nil
	}
	root, err := command.ModuleRoot(ctx)
	if err != nil {
		return err
	}
	switch args[0] {
	case "serve":
		return serve(ctx, root, args[1:])
	case "test":
		return check.Run(ctx, root, os.Stdout)
	case "release":
		return release(ctx, root)
	}
	return fmt.Errorf("there is no command %q\n\n%s", args[0], usage)
}

func serve(ctx context.Context, root string, args []string) error {
	flags := flag.NewFlagSet("serve", flag.ExitOnError)
	addr := flags.String("addr", "127.0.0.1:8080", "where to serve, as host:port")
	flags.Parse(args) // ends the program on an error
	return develop.Run(ctx, root, *addr, os.Stdout)
}

func release(ctx context.Context, root string) error {
	result, err := page.Build(ctx, page.Options{Root: root, Out: filepath.Join(root, "dist"), Release: true})
	if err != nil {
		return err
	}
	floor, err := page.Floor(ctx, root)
	if err != nil {
		return err
	}
	return result.Print(os.Stdout, floor)
}
