package page

import (
	"strconv"
	"strings"
)

func plain(s string) Line  { return Line{Text: s} }
func strong(s string) Line { return Line{Text: s, Weight: Strong} }
func small(s string) Line  { return Line{Text: s, Weight: Small} }

// labelled puts a label before a text; an empty text stays empty.
func labelled(label, s string) Line { return plain(prefixed(label, s)) }

func labelledSmall(label, s string) Line { return small(prefixed(label, s)) }

func prefixed(label, s string) string {
	if s == "" {
		return ""
	}
	return label + " " + s
}

// linked is a line that leads to an anchor as a whole.
func linked(l Line, to string) Line {
	if to != "" {
		l.Links = append(l.Links, Link{To: to})
	}
	return l
}

// lines is a cell of the lines that are not empty.
func lines(all ...Line) Cell {
	var kept []Line
	for _, l := range all {
		if strings.TrimSpace(l.Text) != "" {
			kept = append(kept, l)
		}
	}
	return Cell{Lines: kept}
}

// shortened cuts a text for the first sheet between two words, lest half a number be
// taken for one, and shows that it did; the whole of it stands on a later one.
func shortened(s string) string {
	r := []rune(s)
	if len(r) <= mostReason {
		return s
	}
	begin := string(r[:mostReason-1])
	if i := strings.LastIndexByte(begin, ' '); i > 0 && r[mostReason-1] != ' ' {
		begin = begin[:i]
	}
	return strings.TrimSpace(begin) + "…"
}

func count(n int, thing string) string {
	if n == 1 {
		return "1 " + thing
	}
	return strconv.Itoa(n) + " " + thing + "s"
}
