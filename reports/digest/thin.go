package digest

import (
	"fmt"

	"kilovet/rules/exhibit"
)

// Lines of a picture that can be told apart, and how many stand for those that cannot.
const (
	mostLines = 8
	fewLines  = 4
)

// Thinned is a curve over time of which, where it has more lines than can be told apart, a
// few stand for all from the first to the last, and its note says which; the results hold
// all of them.
// Every other of those shown stands at an even place, so that what alternates along a
// ladder is shown on both sides. Other curves, such as outlines, need every line.
func Thinned(c exhibit.Curve) exhibit.Curve {
	n := len(c.Lines)
	if n <= mostLines || c.X.Unit != "s" {
		return c
	}
	each := (n + fewLines - 2) / (fewLines - 1)
	if each%2 == 0 {
		each++
	}
	var kept []exhibit.Line
	for i := 0; i < n; i += each {
		kept = append(kept, c.Lines[i])
	}
	if (n-1)%each != 0 {
		kept = append(kept, c.Lines[n-1])
	}
	c.Lines = kept
	said := fmt.Sprintf("of %d lines every %s is drawn, and the last", n, ordinal(each))
	if c.Note != "" {
		said = c.Note + "; " + said
	}
	c.Note = said
	return c
}

// ordinal writes an odd number above one as it counts.
func ordinal(n int) string {
	switch {
	case n%10 == 1 && n%100 != 11:
		return fmt.Sprintf("%dst", n)
	case n%10 == 3 && n%100 != 13:
		return fmt.Sprintf("%drd", n)
	}
	return fmt.Sprintf("%dth", n)
}
