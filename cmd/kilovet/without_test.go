package main

import (
	"bytes"
	"testing"
	"time"
)

// Progress is told once work lasts, in one line that is cleared in the end; nobody is
// told where nobody watches.
func TestProgressIsToldOnceWorkLasts(t *testing.T) {
	var out bytes.Buffer
	lasting := make(chan time.Time, 1)
	p := &progress{to: &out, lasting: lasting}
	p.tell("single faults", 1, 3)
	if out.Len() > 0 {
		t.Errorf("told at once: %q", out.String())
	}
	lasting <- time.Time{}
	p.tell("single faults", 2, 3)
	p.tell("single faults", 3, 3)
	p.end()
	if got, want := out.String(), "\rkilovet: single faults, 2 of 3\rkilovet: single faults, 3 of 3\r\033[K"; got != want {
		t.Errorf("%q, want %q", got, want)
	}
	quiet := world{err: &out}.progress()
	out.Reset()
	quiet.tell("single faults", 1, 3)
	quiet.end()
	if out.Len() > 0 {
		t.Errorf("told nobody: %q", out.String())
	}
}
