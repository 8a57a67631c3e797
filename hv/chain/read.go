package chain

import (
	"fmt"

	"kilovet/hv/document"
)

// Read reads a description and lists every fault of it, those of single keys and
// those across keys, in document order. A chain with faults serves for nothing.
func Read(data []byte) (*Chain, document.Faults) {
	c := &Chain{}
	faults := document.Read(data, c)
	s := &survey{Chain: c, refused: faults, legible: !faults.Unread(), faults: faults}
	for _, check := range checks {
		s.code = check.code
		check.run(s)
	}
	return c, s.faults.Sorted()
}

// check is one check across keys.
type check struct {
	code document.Code
	says string // what holds in a sound description
	run  func(*survey)
}

// survey is a description under the checks across its keys.
type survey struct {
	*Chain
	refused document.Faults // what reading single keys found
	legible bool            // nothing was left unread: what is not there is absent
	faults  document.Faults
	code    document.Code // of the check that runs
	nodes   []string      // once asked for
}

// fault reports a fault at a place of the description.
func (s *survey) fault(at document.Place, what, remedy string) {
	s.faults = append(s.faults, document.Fault{Code: s.code, Key: at.Key, Line: at.Line, Column: at.Column, What: what, Remedy: remedy})
}

// sound reports whether a value was given and accepted, so that it can be judged
// against others.
func (s *survey) sound(at document.Place) bool { return at.Line > 0 && !s.refused.At(at) }

// without reports whether a key is truly absent: not given, and neither misspelt
// nor hidden in something illegible.
func (s *survey) without(given bool, key string) bool {
	return !given && s.legible && !s.refused.Meant(key)
}

// lacks is without for a leaf.
func (s *survey) lacks(at document.Place) bool { return s.without(at.Line > 0, at.Key) }

func quoted(name string) string { return fmt.Sprintf("%q", name) }
