package text

import (
	"bytes"
	"strconv"
	"strings"
	"unicode/utf8"

	"kilovet/reports/digest"
	"kilovet/reports/lines"
	"kilovet/rules/rule"
)

// writer sets lines into a width. Everything of outside origin passes through
// digest.Clean on its way in.
type writer struct {
	out    bytes.Buffer
	width  int
	colour bool
	all    bool
}

func newWriter(o Options) *writer {
	width := o.Width
	if width == 0 {
		width = 80
	}
	return &writer{width: max(width, 40), colour: o.Colour, all: o.All}
}

// blank writes one empty line, never two.
func (w *writer) blank() {
	if w.out.Len() > 0 && !bytes.HasSuffix(w.out.Bytes(), []byte("\n\n")) {
		w.out.WriteByte('\n')
	}
}

// height is how many lines stand so far.
func (w *writer) height() int { return bytes.Count(w.out.Bytes(), []byte("\n")) }

func (w *writer) line(s string) {
	w.out.WriteString(strings.TrimRight(s, " "))
	w.out.WriteByte('\n')
}

// wrap writes a paragraph over the whole width.
func (w *writer) wrap(s string) { w.hang("", 0, s) }

// hang writes a paragraph: the label before its first line, the following lines
// under the first. A label too long for its column takes a line of its own.
func (w *writer) hang(label string, indent int, s string) {
	w.lines(label, indent, w.broken(s, indent))
}

// short is hang, cut after so many lines.
func (w *writer) short(label string, indent int, s string, most int) {
	lines := w.broken(s, indent)
	if len(lines) > most {
		lines = lines[:most]
		lines[most-1] = w.fit(lines[most-1]+" …", w.width-indent)
	}
	w.lines(label, indent, lines)
}

func (w *writer) broken(s string, indent int) []string {
	return lines.Broken(digest.Clean(s), w.width-indent)
}

func (w *writer) lines(label string, indent int, lines []string) {
	label = digest.Clean(label)
	if runes(label) > indent {
		w.line(w.fit(strings.TrimRight(label, " "), w.width))
		label = ""
	}
	for _, l := range lines {
		w.line(pad(label, indent) + l)
		label = ""
	}
}

// verdict writes a paragraph in the gutter of a verdict, coloured if asked.
func (w *writer) verdict(word string, v rule.Verdict, s string) {
	label := pad(word, gutter)
	if w.colour {
		label = paint(v) + word + plain + pad("", gutter-runes(word))
	}
	for _, l := range w.broken(s, gutter) {
		w.line(label + l)
		label = pad("", gutter)
	}
}

// fit shortens a text to a width, between two words if it has more than one, and shows
// that it did.
func (w *writer) fit(s string, width int) string {
	s = digest.Clean(s)
	if runes(s) <= width {
		return s
	}
	begin := string([]rune(s)[:width-1])
	if i := strings.LastIndexByte(begin, ' '); i > 0 && s[len(begin)] != ' ' {
		begin = begin[:i]
	}
	return strings.TrimRight(begin, " ") + "…"
}

func pad(s string, width int) string { return s + strings.Repeat(" ", max(0, width-runes(s))) }

func runes(s string) int { return utf8.RuneCountInString(s) }

func decimal(n int) string { return strconv.Itoa(n) }
