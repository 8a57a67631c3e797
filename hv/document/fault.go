package document

import (
	"cmp"
	"fmt"
	"slices"
	"strings"
)

// Code names a kind of fault. The reader's own codes follow; checks across keys add theirs.
type Code string

// The faults that the reader itself finds.
const (
	Size     Code = "size"     // the file is larger than a description can be
	Encoding Code = "encoding" // the file is not UTF-8
	Empty    Code = "empty"    // the file holds no key
	Syntax   Code = "syntax"   // a line cannot be read as TOML
	Nesting  Code = "nesting"  // tables or lists within each other too deeply
	Twice    Code = "twice"    // a key or table is given a second time
	Unknown  Code = "unknown"  // a key that is not declared
	Form     Code = "form"     // a table where a value is wanted, one where several are, and the reverse
	Type     Code = "type"     // text for a number, a number for yes or no, and the like
	Quantity Code = "quantity" // no unit, a wrong unit, a decimal comma, not a finite number
	Range    Code = "range"    // outside the accepted range
	Word     Code = "word"     // not one of the accepted words
	Text     Code = "text"     // empty, too long, or with control characters
	Length   Code = "length"   // a list with the wrong number of values
	Missing  Code = "missing"  // a key without which its table makes no sense
)

// Codes lists the faults that the reader itself finds.
func Codes() []Code {
	return []Code{Size, Encoding, Empty, Syntax, Nesting, Twice, Unknown, Form, Type, Quantity, Range, Word, Text, Length, Missing}
}

// Fault is one thing wrong with a description: where, what, and what to write
// instead. Line and Column count characters from one; Key bears no indices.
type Fault struct {
	Code         Code
	Key          string
	Line, Column int
	What         string
	Remedy       string
}

// Error writes the fault on one line.
func (f Fault) Error() string {
	text := fmt.Sprintf("line %d, column %d: ", f.Line, f.Column)
	if f.Key != "" {
		text += f.Key + ": "
	}
	text += f.What
	if f.Remedy != "" {
		text += "; " + f.Remedy
	}
	return text
}

// Faults are all faults of one description in document order.
type Faults []Fault

// Error writes every fault on a line of its own.
func (fs Faults) Error() string {
	lines := make([]string, len(fs))
	for i, f := range fs {
		lines[i] = f.Error()
	}
	return strings.Join(lines, "\n")
}

// Err is the faults as an error; nil where there are none.
func (fs Faults) Err() error {
	if len(fs) == 0 {
		return nil
	}
	return fs
}

// Sorted puts the faults into document order; those of one place keep theirs.
func (fs Faults) Sorted() Faults {
	slices.SortStableFunc(fs, func(a, b Fault) int {
		return cmp.Or(cmp.Compare(a.Line, b.Line), cmp.Compare(a.Column, b.Column))
	})
	return fs
}

// Unread reports whether some part of the description could not be read at all and
// not even its key is known, so that what seems to be absent may only be illegible.
func (fs Faults) Unread() bool {
	return slices.ContainsFunc(fs, func(f Fault) bool {
		return f.Key == "" && slices.Contains([]Code{Size, Encoding, Empty, Syntax, Nesting}, f.Code)
	})
}
