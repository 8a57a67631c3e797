package chain

import (
	"fmt"
	"slices"
	"strings"

	"kilovet/hv/document"
)

// Read reads a description and lists every fault of it, those of single keys and
// those across keys, in document order. A chain with faults serves for nothing.
func Read(data []byte) (*Chain, document.Faults) {
	c := &Chain{}
	faults := document.Read(data, c)
	s := newSurvey(c, faults)
	for _, check := range checks {
		s.code = check.Code
		check.run(s)
	}
	return c, append(faults, s.faults...).Sorted()
}

// Check is one check across keys.
type Check struct {
	Code document.Code
	Says string // what holds in a sound description
	run  func(*survey)
}

// Checks lists all checks across keys.
func Checks() []Check { return slices.Clone(checks) }

// survey is a description under the checks across its keys.
type survey struct {
	*Chain
	refused map[spot]bool // given, but not accepted
	void    map[spot]bool // so much so that nothing is known of it
	legible bool          // nothing was left unread: what is not there is absent
	nodes   map[string]bool
	listed  []string // the nodes in order
	faults  document.Faults
	code    document.Code // of the check that runs
}

// spot is a line and column.
type spot struct{ line, column int }

func newSurvey(c *Chain, found document.Faults) *survey {
	s := &survey{Chain: c, refused: map[spot]bool{}, void: map[spot]bool{}, legible: !found.Unread(), nodes: map[string]bool{}, listed: c.Nodes()}
	for _, f := range found {
		at := spot{f.Line, f.Column}
		s.refused[at] = true
		switch f.Code {
		case document.Form, document.Syntax, document.Nesting, document.Twice:
			s.void[at] = true
		}
	}
	for _, name := range s.listed {
		s.nodes[name] = true
	}
	return s
}

// fault reports a fault at a place of the description, unless it only follows from
// one found in reading.
func (s *survey) fault(at document.Place, what, remedy string) {
	if !s.void[spot{at.Line, at.Column}] {
		s.faults = append(s.faults, document.Fault{Code: s.code, Key: at.Key, Line: at.Line, Column: at.Column, What: what, Remedy: remedy})
	}
}

// sound reports whether a value was given and accepted, so that it can be judged
// against others.
func (s *survey) sound(at document.Place) bool {
	return at.Line > 0 && !s.refused[spot{at.Line, at.Column}]
}

// without reports whether something is truly absent: neither given nor perhaps
// hidden in something illegible.
func (s *survey) without(given bool) bool { return !given && s.legible }

// lacks is without for a leaf.
func (s *survey) lacks(at document.Place) bool { return s.without(at.Line > 0) }

// withArticle puts the article before a word.
func withArticle(word string) string {
	if strings.ContainsAny(word[:1], "aeio") {
		return "an " + word
	}
	return "a " + word
}

func quoted(name string) string { return fmt.Sprintf("%q", name) }
