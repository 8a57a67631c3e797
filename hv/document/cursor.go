package document

import (
	"sort"
	"strings"
	"unicode/utf8"
)

// cursor turns byte offsets into lines and columns, counted in characters. Going
// forward along one line it counts on from where it was, so that a long line costs
// one pass.
type cursor struct {
	text   string
	starts []int // of the lines
	last   int   // offset last asked for
	place  Place
}

func newCursor(text string) *cursor {
	c := &cursor{text: text, starts: []int{0}, place: Place{Line: 1, Column: 1}}
	for i := strings.IndexByte(text, '\n'); i >= 0; {
		start := c.starts[len(c.starts)-1] + i + 1
		c.starts = append(c.starts, start)
		i = strings.IndexByte(text[start:], '\n')
	}
	return c
}

// at is the place of a byte offset.
func (c *cursor) at(offset int) Place {
	offset = min(max(offset, 0), len(c.text))
	line := sort.SearchInts(c.starts, offset+1)
	if line != c.place.Line || offset < c.last {
		c.last, c.place = c.starts[line-1], Place{Line: line, Column: 1}
	}
	c.place.Column += utf8.RuneCountInString(c.text[c.last:offset])
	c.last = offset
	return c.place
}
