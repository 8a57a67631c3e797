// Package lack says why there is no number. A computing function that physics
// or the description leaves without an answer returns a *Lack as its error; only
// rules turn it into a verdict.
package lack

import (
	"errors"
	"fmt"
	"strings"
)

// Kind is the reason a number is wanting.
type Kind int

const (
	// Missing: the description does not hold what is needed.
	Missing Kind = iota
	// Outside: the value lies outside the range of the model.
	Outside
	// NotReached: the computation ended without an answer.
	NotReached
)

// Lack is the reason why there is no number.
type Lack struct {
	Kind Kind
	Keys []string // of the description: what is missing or lies outside
	Why  string   // one plain clause
}

// Error says why, in plain words.
func (l *Lack) Error() string { return l.Why }

// Key is a lack for want of keys of the description.
func Key(keys ...string) *Lack {
	return &Lack{Kind: Missing, Keys: keys, Why: strings.Join(keys, ", ") + " not given"}
}

// Because is a lack for want of keys, in words of its own.
func Because(why string, keys ...string) *Lack { return &Lack{Kind: Missing, Keys: keys, Why: why} }

// Range is a lack because a value lies outside a model; why names the model and its range.
func Range(format string, args ...any) *Lack {
	return &Lack{Kind: Outside, Why: fmt.Sprintf(format, args...)}
}

// Failed is a lack because a computation did not reach its answer.
func Failed(format string, args ...any) *Lack {
	return &Lack{Kind: NotReached, Why: fmt.Sprintf(format, args...)}
}

// Of finds the lack in an error; nil where there is none.
func Of(err error) *Lack {
	var l *Lack
	if errors.As(err, &l) {
		return l
	}
	return nil
}
