// Package faulttest holds the faults of a description against what comments in the
// description itself expect, at the line concerned:
//
//	peak = 1750          # FAULT 8 quantity: a number without a unit
//	title = "open
//	#^ FAULT 9 syntax: the quotes are not closed
//
// A comment that begins with #^ speaks of the line before it, where no comment can
// stand. Column and code must agree, and the text must be part of the message. The
// faults must come in document order, and no other fault may be there.
package faulttest

import (
	"fmt"
	"regexp"
	"strings"
	"testing"

	"kilovet/hv/document"
)

// want is one expected fault.
type want struct {
	line, column int
	code, text   string
}

func (w want) met(f document.Fault) bool {
	return f.Line == w.line && f.Column == w.column && string(f.Code) == w.code && strings.Contains(f.Error(), w.text)
}

func (w want) String() string {
	return fmt.Sprintf("line %d, column %d (%s): …%s…", w.line, w.column, w.code, w.text)
}

var comment = regexp.MustCompile(`FAULT (\d+) ([a-z]+): (.*?)\s*(?:# |$)`)

// expected reads the comments of a description.
func expected(text string) []want {
	var all []want
	lines := strings.Split(text, "\n")
	about := 0
	for i, line := range lines {
		if !strings.HasPrefix(line, "#^") {
			about = i + 1
		}
		for _, m := range comment.FindAllStringSubmatch(line, -1) {
			w := want{line: about, code: m[2], text: m[3]}
			fmt.Sscan(m[1], &w.column)
			all = append(all, w)
		}
	}
	return all
}

// Check fails where the faults are not those that the description's comments expect.
func Check(t testing.TB, text string, faults document.Faults) {
	t.Helper()
	wants := expected(text)
	for i := range max(len(wants), len(faults)) {
		switch {
		case i >= len(faults):
			t.Errorf("not reported: %v", wants[i])
		case i >= len(wants):
			t.Errorf("not expected: %v (%s)", faults[i], faults[i].Code)
		case !wants[i].met(faults[i]):
			t.Errorf("fault %d\nwant %v\ngot  %v (%s)", i+1, wants[i], faults[i], faults[i].Code)
		}
	}
}
