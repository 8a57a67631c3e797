package main

import (
	"fmt"
	"io"
	"slices"
	"strings"
	"time"

	"github.com/spf13/pflag"

	"kilovet/rules"
)

func withoutFlag(set *pflag.FlagSet, without *[]string) {
	set.StringSliceVar(without, "without", nil, "leave out `FAMILIES` of rules, "+strings.Join(rules.Families(), ",")+": quicker, but never sound")
}

// leavable refuses families that cannot be left out.
func leavable(without []string) error {
	for _, f := range without {
		if !slices.Contains(rules.Families(), f) {
			return exitf(unusable, "--without %s: no such family; choose from %s", f, strings.Join(rules.Families(), ","))
		}
	}
	return nil
}

// progress tells on a terminal how far lengthy work has come, once it has lasted.
type progress struct {
	to      io.Writer // nil where nobody watches
	lasting <-chan time.Time
	begun   bool
}

// quiet is how long nothing is told.
const quiet = time.Second

func (w world) progress() *progress {
	if !w.watched {
		return &progress{}
	}
	return &progress{to: w.err, lasting: time.After(quiet)}
}

func (p *progress) tell(what string, done, of int) {
	if p.to == nil {
		return
	}
	select {
	case <-p.lasting:
		p.begun = true
	default:
	}
	if p.begun {
		fmt.Fprintf(p.to, "\rkilovet: %s, %d of %d", what, done, of)
	}
}

// end clears the line.
func (p *progress) end() {
	if p.begun {
		fmt.Fprint(p.to, "\r\033[K")
	}
}
