// Package develop serves the page while it is being worked on, and builds it
// anew whenever a source changes.
package develop

import (
	"context"
	"errors"
	"fmt"
	"io"
	"net"
	"net/http"
	"path/filepath"
	"strconv"
	"strings"
	"syscall"
	"time"

	"strikebook/build/page"
	"strikebook/build/serve"
)

const (
	// pollInterval is how often the sources are looked at. Polling needs no
	// library, and a few hundred files take a few milliseconds.
	pollInterval = 500 * time.Millisecond

	// portTries is how many ports are tried upwards from one that is taken.
	portTries = 20
)

// Run builds, serves and watches until the context ends. A build that fails
// leaves the last good page in place.
func Run(ctx context.Context, root, addr string, out io.Writer) error {
	listener, err := listen(addr)
	if err != nil {
		return err
	}
	dir := filepath.Join(root, "out", "dev")
	server := &http.Server{Handler: serve.New(dir, serve.Options{})}
	context.AfterFunc(ctx, func() { server.Close() })
	served := make(chan error, 1)
	go func() { served <- server.Serve(listener) }()

	files := snapshot(root)
	build(ctx, root, dir, out)
	fmt.Fprintf(out, "Serving on http://%s/ and watching %s. End with Ctrl+C.\n", listener.Addr(), strings.Join(watched, ", "))
	tick := time.NewTicker(pollInterval)
	defer tick.Stop()
	for {
		select {
		case err := <-served:
			if errors.Is(err, http.ErrServerClosed) {
				return nil
			}
			return err
		case <-tick.C:
		}
		now := snapshot(root)
		if changed := changes(files, now); len(changed) > 0 {
			files = now
			fmt.Fprintf(out, "\n%s changed\n", summary(changed))
			build(ctx, root, dir, out)
		}
	}
}

// build builds once and says how long what took, or what went wrong.
func build(ctx context.Context, root, dir string, out io.Writer) {
	start := time.Now()
	var steps []string
	result, err := page.Build(ctx, page.Options{
		Root: root, Out: dir, Generate: true,
		Report: func(step string, took time.Duration) {
			steps = append(steps, fmt.Sprintf("%s %.1f s", step, took.Seconds()))
		},
	})
	if err != nil {
		if ctx.Err() == nil {
			fmt.Fprintf(out, "%v\nNot built; the last good page stays.\n", err)
		}
		return
	}
	fmt.Fprintf(out, "built %s in %.1f s (%s)\n", result.Build, time.Since(start).Seconds(), strings.Join(steps, ", "))
}

// listen takes the address, or the next free port after it.
func listen(addr string) (net.Listener, error) {
	host, portText, err := net.SplitHostPort(addr)
	if err != nil {
		return nil, fmt.Errorf("the address %q is not of the form host:port: %w", addr, err)
	}
	port, err := strconv.Atoi(portText)
	if err != nil {
		return nil, fmt.Errorf("the port in the address %q is not a number", addr)
	}
	for next := port; ; next++ {
		l, err := net.Listen("tcp", net.JoinHostPort(host, strconv.Itoa(next)))
		if err == nil || !errors.Is(err, syscall.EADDRINUSE) || next == port+portTries {
			return l, err
		}
	}
}

// summary names a few changed files and counts the rest.
func summary(names []string) string {
	const few = 3
	if len(names) <= few {
		return strings.Join(names, ", ")
	}
	return fmt.Sprintf("%s and %d more", strings.Join(names[:few], ", "), len(names)-few)
}
