package gap

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Mark says how well a source is known.
type Mark string

// The marks of sources.
const (
	Read     Mark = "read"
	Memory   Mark = "memory"
	Practice Mark = "common practice, no source"
	Derived  Mark = "derived"
)

// Source is where a figure or law comes from.
type Source struct {
	Text    string
	Mark    Mark
	Governs bool // this one gave the answer
}

// Governing is the source as the one that gave the answer.
func (s Source) Governing() Source {
	s.Governs = true
	return s
}

// Plain are sources of which none governs.
func Plain(all []Source) []Source {
	var plain []Source
	for _, s := range all {
		s.Governs = false
		plain = append(plain, s)
	}
	return plain
}

// Answer is a quantity with what it rests on. The zero Answer is no answer; it
// stands beside an error.
type Answer[Q quantity.Number] struct {
	Value       Q
	Because     string   // how it comes about, one or two plain clauses
	Sources     []Source // the governing one first
	Assumptions []string // what was assumed; a verdict on them is at best marginal
	Shown       []Beside[Q]
	// AtLeast says that the truth may lie above: what exceeds the value is not known to fail.
	AtLeast bool
}

// Beside is what another source says of the same quantity, shown and not judged.
type Beside[Q quantity.Number] struct {
	Value  Q
	Source Source
}

// Result is an answer, or the lack in its place.
type Result[Q quantity.Number] struct {
	Answer[Q]
	Lack *lack.Lack // nil where there is an answer
}

// ResultOf joins what a computing function returned. An error that is no lack is
// one of the programmer.
func ResultOf[Q quantity.Number](a Answer[Q], err error) Result[Q] {
	if err == nil {
		return Result[Q]{Answer: a}
	}
	l := lack.Of(err)
	if l == nil {
		panic("gap: not a lack: " + err.Error())
	}
	return Result[Q]{Lack: l}
}

// Get is the value, or the lack as an error.
func (r Result[Q]) Get() (Q, error) {
	if r.Lack != nil {
		return 0, r.Lack
	}
	return r.Value, nil
}
