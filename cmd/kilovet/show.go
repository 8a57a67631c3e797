package main

import (
	"bytes"
	"context"
	"crypto/sha256"
	"encoding/hex"
	"errors"
	"fmt"
	"net"
	"net/http"
	"os"
	"os/signal"
	"path/filepath"
	"slices"
	"syscall"
	"time"

	"github.com/spf13/cobra"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/reports/html"
	"kilovet/rules"
)

// showing is a description that is shown while it is written.
type showing struct {
	world
	path    string
	local   string
	without []string
	port    int
}

func showCommand(w world) *cobra.Command {
	s := &showing{world: w}
	command := &cobra.Command{
		Use:   "show CHAIN.toml",
		Short: "Show a description's review in the browser, anew whenever it is saved",
		Example: `  kilovet show chain.toml              says the address to open
  kilovet show --port 8123 chain.toml  at a port of your own
  kilovet show --local house.toml chain.toml
                                       under a stricter local code`,
		Long: `Serve the review of a description as a page to this computer alone. The page
follows the file, and that of --local: it is made anew whenever one is saved,
and shows faults at their lines. It ends with Ctrl+C.`,
		Args: cobra.ExactArgs(1),
		RunE: func(c *cobra.Command, args []string) error {
			s.path = args[0]
			return s.run(c.Context())
		},
		ValidArgsFunction: descriptions,
	}
	localFlag(command.Flags(), &s.local)
	withoutFlag(command.Flags(), &s.without)
	command.Flags().IntVar(&s.port, "port", 0, "`PORT` to listen on; 0 takes a free one")
	return command
}

// lookEvery is how often the file is looked at.
const lookEvery = 300 * time.Millisecond

func (s *showing) run(ctx context.Context) error {
	if s.path == "-" {
		return exitf(unusable, "what comes on standard input is not saved anew; give a file")
	}
	if err := leavable(s.without); err != nil {
		return err
	}
	if _, err := s.read(); err != nil {
		return err
	}
	if _, err := s.code(); err != nil {
		return err
	}
	listener, err := net.Listen("tcp4", fmt.Sprintf("127.0.0.1:%d", s.port))
	if err != nil {
		return exitf(unusable, "port %d cannot be used: %v", s.port, err)
	}
	ctx, stop := signal.NotifyContext(ctx, os.Interrupt, syscall.SIGTERM)
	defer stop()
	ticker := time.NewTicker(lookEvery)
	defer ticker.Stop()
	return s.serve(ctx, listener, ticker.C)
}

// serve shows the page until the context ends; it looks at the file on each tick.
func (s *showing) serve(ctx context.Context, listener net.Listener, ticks <-chan time.Time) error {
	b := newBoard(listener.Addr().(*net.TCPAddr).Port)
	seen := &follower{showing: s, board: b}
	if err := seen.look(); err != nil {
		return err
	}
	server := &http.Server{Handler: b, ReadHeaderTimeout: 5 * time.Second, BaseContext: func(net.Listener) context.Context { return ctx }}
	ended := make(chan error, 1)
	go func() { ended <- server.Serve(listener) }()
	defer server.Close()
	if err := s.show([]byte(fmt.Sprintf("http://%s/ shows %s; Ctrl+C ends it\n", listener.Addr(), s.path))); err != nil {
		return err
	}
	for {
		select {
		case <-ctx.Done():
			return nil
		case err := <-ended:
			return exitf(unusable, "the page is no longer served: %v", err)
		case <-ticks:
			if err := seen.look(); err != nil {
				return err
			}
		}
	}
}

func (s *showing) read() (source, error) {
	return (&reviewing{world: s.world}).input([]string{s.path})
}

// follower puts a new page on the board whenever the file has changed.
type follower struct {
	*showing
	board  *board
	last   string // version shown
	missed int    // looks in a row that found no file
}

// patience is how many looks may find no file before that is shown: editors that
// replace a file leave it away for a moment.
const patience = 2

func (f *follower) look() error {
	given, away := f.read()
	code, without := f.code()
	if away == nil && without == nil {
		f.missed = 0
	} else if f.missed++; f.missed < patience {
		return nil
	}
	if away != nil {
		given = source{name: f.path, note: away.Error()}
	}
	if without != nil {
		code = source{name: f.local, note: without.Error()}
	}
	sum := sha256.Sum256(slices.Concat(given.data, []byte(given.note), f.beside(given), []byte{0}, code.data, []byte(code.note)))
	version := hex.EncodeToString(sum[:8])
	if version == f.last {
		return nil
	}
	page, err := f.page(given, code, version)
	if err != nil {
		return defect(err)
	}
	f.last = version
	f.board.put(page, version)
	return nil
}

// page is the review of a description under a local code, or the faults of one of them;
// a note says why there is none.
func (s *showing) page(given, code source, version string) ([]byte, error) {
	o := html.Options{Version: version}
	for _, file := range []source{given, code} {
		if file.note != "" {
			return html.Faults(filepath.Base(file.name), nil, document.Faults{{Line: 1, Column: 1, What: file.note}}, o)
		}
	}
	c, faults := rules.Read(given.data)
	if len(faults) == 0 {
		faults = recordFaults(c, given)
	}
	if len(faults) > 0 {
		return html.Faults(filepath.Base(given.name), given.data, faults, o)
	}
	r := &reviewing{world: s.world, local: s.local, without: s.without}
	if s.local != "" {
		limits, faults := rules.ReadLocal(code.data)
		if len(faults) > 0 {
			return html.Faults(filepath.Base(code.name), code.data, faults, o)
		}
		r.under = &localLimits{code.name, limits, inputOf("local limits", code)}
	}
	review, faults, err := r.judged(c, given)
	switch {
	case err != nil:
		return nil, errors.New("a description without faults was refused")
	case len(faults) > 0:
		return html.Faults(filepath.Base(code.name), code.data, faults, o)
	}
	o.Diagram = review.Diagram
	return html.RenderWith(review, o)
}

// code is the file of --local; empty where none is named.
func (s *showing) code() (source, error) {
	if s.local == "" {
		return source{}, nil
	}
	return limitsFile(s.local)
}

// beside is what was read beside a description, so that a change of it is seen.
func (s *showing) beside(given source) []byte {
	if !bytes.Contains(given.data, []byte("measured_ripple")) {
		return nil
	}
	c, faults := rules.Read(given.data)
	if len(faults) > 0 {
		return nil
	}
	r, err := rippleRecord(c, given)
	switch {
	case err != nil:
		return []byte(err.Error())
	case r == nil:
		return nil
	}
	return r.data
}

// recordFaults are the faults of the record that a description names, at the key that
// names it.
func recordFaults(c *chain.Chain, given source) document.Faults {
	r, err := rippleRecord(c, given)
	if err != nil {
		at := c.Beam.MeasuredRipple.Place
		return document.Faults{{Key: at.Key, Line: at.Line, Column: at.Column, What: err.Error(), Remedy: "name a file beside the description"}}
	}
	if r == nil {
		return nil
	}
	if _, fault := r.read(c); fault != nil {
		return document.Faults{*fault}
	}
	return nil
}
