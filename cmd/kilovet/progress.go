package main

import (
	"fmt"
	"io"
	"sync"
	"time"
)

// progress tells on a terminal how far lengthy work has come, once it has lasted.
type progress struct {
	to    io.Writer // nil where nobody watches
	timer *time.Timer

	lock         sync.Mutex
	begun, ended bool
	counting     bool   // something is being told of whose number is known
	said         string // last
}

// quiet is how long nothing is told.
const quiet = time.Second

// progress is told nobody where a terminal cannot clear a line.
func (w world) progress() *progress {
	if !w.watched || w.env("TERM") == "dumb" {
		return &progress{}
	}
	p := &progress{to: w.err, said: "working it out"}
	p.timer = time.AfterFunc(quiet, p.begin)
	return p
}

// begin tells what was told last, and from now on at once.
func (p *progress) begin() {
	p.lock.Lock()
	defer p.lock.Unlock()
	if !p.ended {
		p.begun = true
		p.write()
	}
}

// tell says how far work has come; where its end is not known, of is zero, and it gives way
// to work whose end is.
func (p *progress) tell(what string, done, of int) {
	if p.to == nil {
		return
	}
	p.lock.Lock()
	defer p.lock.Unlock()
	switch {
	case of > 0:
		p.said, p.counting = fmt.Sprintf("%s, %d of %d", what, done, of), done < of
	case p.counting:
		return
	default:
		p.said = fmt.Sprintf("%s, %d so far", what, done)
	}
	if p.begun {
		p.write()
	}
}

func (p *progress) write() { fmt.Fprintf(p.to, "\r\033[Kkilovet: %s", p.said) }

// end clears the line; nothing is told after it.
func (p *progress) end() {
	p.lock.Lock()
	defer p.lock.Unlock()
	if p.timer != nil {
		p.timer.Stop()
	}
	if p.begun && !p.ended {
		fmt.Fprint(p.to, "\r\033[K")
	}
	p.ended, p.begun = true, false
}
