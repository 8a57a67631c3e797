package main

import (
	"bytes"
	"testing"
)

// Progress is told once work lasts, in one line that is cleared in the end: first of what
// has no known end, then of what has; nobody is told where nobody watches.
func TestProgressIsToldOnceWorkLasts(t *testing.T) {
	var out bytes.Buffer
	p := &progress{to: &out}
	p.tell("states of the circuit", 1, 0)
	if out.Len() > 0 {
		t.Errorf("told at once: %q", out.String())
	}
	p.begin()
	p.tell("states of the circuit", 2, 0)
	p.tell("single faults", 2, 3)
	p.tell("states of the circuit", 3, 0)
	p.tell("single faults", 3, 3)
	p.tell("states of the circuit", 4, 0)
	p.end()
	p.begin()
	p.tell("states of the circuit", 5, 0)
	const line = "\r\033[K"
	want := ""
	for _, said := range []string{"states of the circuit, 1 so far", "states of the circuit, 2 so far", "single faults, 2 of 3", "single faults, 3 of 3", "states of the circuit, 4 so far"} {
		want += line + "kilovet: " + said
	}
	if got := out.String(); got != want+line {
		t.Errorf("%q, want %q", got, want+line)
	}
	out.Reset()
	dumb := func(string) string { return "dumb" }
	for _, w := range []world{{err: &out}, {err: &out, watched: true, env: dumb}} {
		unseen := w.progress()
		unseen.tell("single faults", 1, 3)
		unseen.end()
		if unseen.to != nil || out.Len() > 0 {
			t.Errorf("told nobody: %q", out.String())
		}
	}
}
