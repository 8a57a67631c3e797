package pdf

import (
	"strings"

	"kilovet/reports/page"
)

// style is a cut of the type at a size.
type style struct {
	face face
	size float64 // points
}

// The styles of the sheets.
var (
	body         = style{regular, 7.5}
	strong       = style{bold, 7.5}
	inCell       = style{regular, 7}
	strongInCell = style{bold, 7}
	small        = style{regular, 6}
	heading      = style{bold, 12}
	column       = style{bold, 6.5}
	tag          = style{bold, 6.2}
	word         = style{bold, 17}
	answer       = style{bold, 10.5}
	label        = style{regular, 5}
)

// leading is the distance of two base lines, in millimetres.
func (t style) leading() float64 { return t.size * points * 1.26 }

// styleOf is the style of a line in a table.
func styleOf(w page.Weight) style {
	switch w {
	case page.Strong:
		return strongInCell
	case page.Small:
		return small
	}
	return inCell
}

// set is one line of text, ready to be placed.
type set struct {
	style style
	text  string
	links []page.Link
	sheet string // an anchor; the number of its sheet stands in place of the text
}

// wrap breaks a text into lines of a width: at spaces, in a word too long for a
// line after one of its joints, and failing that anywhere.
func (f *fonts) wrap(t style, s string, width float64) []set {
	var lines []set
	line := ""
	for _, w := range strings.Fields(f.guard(t.face, s)) {
		if joined := strings.TrimSpace(line + " " + w); f.width(t, joined) <= width {
			line = joined
			continue
		}
		if line != "" {
			lines = append(lines, set{style: t, text: line})
		}
		line = w
		for f.width(t, line) > width {
			at := f.joint(t, line, width)
			lines, line = append(lines, set{style: t, text: line[:at]}), line[at:]
		}
	}
	if line == "" {
		return lines
	}
	return append(lines, set{style: t, text: line})
}

// joint is where to break a word that is longer than the width: after the last
// joint of the part that fits, at least after its first rune.
func (f *fonts) joint(t style, s string, width float64) int {
	fits, best, sum := 0, 0, 0.0
	for i, r := range s {
		sum += f.em(t.face, r) * t.size * points
		if sum > width && i > 0 {
			break
		}
		fits = i + len(string(r))
		if strings.ContainsRune("._-/:", r) {
			best = fits
		}
	}
	if best > 0 {
		return best
	}
	return fits
}

// fit sets a text on at most so many lines and shows where it was cut.
func (f *fonts) fit(t style, s string, width float64, most int) []set {
	lines := f.wrap(t, s, width)
	if len(lines) <= most {
		return lines
	}
	lines = lines[:most]
	last := []rune(lines[most-1].text)
	for len(last) > 0 && f.width(t, string(last)+"…") > width {
		last = last[:len(last)-1]
	}
	lines[most-1].text = string(last) + "…"
	return lines
}

// cell sets the paragraphs of a cell.
func (f *fonts) cell(lines []page.Line, width float64) []set {
	var all []set
	for _, l := range lines {
		t := styleOf(l.Weight)
		if l.Sheet != "" {
			all = append(all, set{style: t, links: l.Links, sheet: l.Sheet})
			continue
		}
		for _, s := range f.wrap(t, l.Text, width) {
			s.links = l.Links
			all = append(all, s)
		}
	}
	return all
}

func height(lines []set) float64 {
	sum := 0.0
	for _, l := range lines {
		sum += l.style.leading()
	}
	return sum
}
