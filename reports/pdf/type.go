package pdf

import (
	"slices"
	"strings"
	"unicode/utf8"

	"kilovet/reports/digest"
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

// wanted is a text in a style and a width.
type wanted struct {
	style style
	text  string
	width float64
}

// wrap breaks a text into lines of a width: at spaces, but not between a number and its
// unit, in a word too long for a
// line after one of its joints, and failing that anywhere. What is asked for again is
// remembered; the lines belong to all who asked.
func (f *fonts) wrap(t style, s string, width float64) []set {
	if s == "" {
		return nil
	}
	asked := wanted{t, s, width}
	lines, known := f.wrapped[asked]
	if !known {
		lines = slices.Clip(f.broken(t, spaced(f.guard(t.face, s)), width))
		f.wrapped[asked] = lines
	}
	return lines
}

// spaced has one space between words and none around them.
func spaced(s string) string {
	if !strings.Contains(s, "  ") && !strings.HasPrefix(s, " ") && !strings.HasSuffix(s, " ") {
		return s
	}
	return strings.Join(strings.Fields(s), " ")
}

// broken breaks a text whose words have one space between them.
func (f *fonts) broken(t style, s string, width float64) []set {
	var lines []set
	end := 0      // of the words that fit
	length := 0.0 // of those, in em
	for at := 0; at < len(s); {
		next := at
		reach := length
		if end > 0 {
			reach += f.em(t.face, ' ')
			next++
		}
		word := held(s, next)
		for _, r := range s[next:word] {
			reach += f.em(t.face, r)
		}
		if reach*t.size*points <= width {
			end, length, at = word, reach, word
			continue
		}
		if end > 0 {
			lines = append(lines, set{style: t, text: s[:end]})
			s, at = s[end+1:], 0
		} else {
			cut := f.joint(t, s[:word], width)
			lines = append(lines, set{style: t, text: s[:cut]})
			s, at = strings.TrimPrefix(s[cut:], " "), 0
		}
		end, length = 0, 0
	}
	if s == "" {
		return lines
	}
	return append(lines, set{style: t, text: s})
}

// held is where the piece that begins here ends: no line parts a number and its unit.
func held(s string, from int) int {
	for at := from; ; at++ {
		i := strings.IndexByte(s[at:], ' ')
		if i < 0 {
			return len(s)
		}
		if at += i; digest.Parts(s, at) {
			return at
		}
	}
}

// joint is where to break a piece that is longer than the width: at the last space of the
// part that fits, or after its last joint, at least after its first rune.
func (f *fonts) joint(t style, s string, width float64) int {
	fits, best, sum := 0, 0, 0.0
	if i := strings.IndexByte(s, ' '); i > 0 && f.width(t, s[:i]) <= width {
		return i
	}
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

// fit sets a text on at most so many lines and shows where it was cut: between two words
// where its last line has some.
func (f *fonts) fit(t style, s string, width float64, most int) []set {
	lines := f.wrap(t, s, width)
	if len(lines) <= most {
		return lines
	}
	lines = slices.Clone(lines[:most])
	last := lines[most-1].text
	for last != "" && f.width(t, last+"…") > width {
		_, size := utf8.DecodeLastRuneInString(last)
		last = last[:len(last)-size]
		if i := strings.LastIndexByte(last, ' '); i > 0 {
			last = last[:i]
		}
	}
	lines[most-1].text = last + "…"
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
