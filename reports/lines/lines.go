// Package lines sets paragraphs and headings into lines of a width, for reports that
// are read in a terminal. Everything of outside origin passes through digest.Clean.
package lines

import (
	"bytes"
	"strings"

	"kilovet/reports/digest"
)

// Writer sets paragraphs into a width.
type Writer struct {
	out   bytes.Buffer
	width int
}

// New is a writer of lines of at most a width: 80 where zero, and never below 40.
func New(width int) *Writer {
	if width == 0 {
		width = 80
	}
	return &Writer{width: max(width, 40)}
}

// Line writes one line as it is, without spaces at its end.
func (w *Writer) Line(s string) {
	w.out.WriteString(strings.TrimRight(s, " "))
	w.out.WriteByte('\n')
}

// Section writes a heading; nothing where nothing stands under it.
func (w *Writer) Section(title string, entries int) {
	if entries > 0 {
		w.Line("")
		w.Hang("", 0, strings.ToUpper(title))
		w.Line("")
	}
}

// Hang writes a paragraph with a label before its first line, every line indented.
func (w *Writer) Hang(label string, indent int, s string) {
	begin := label + strings.Repeat(" ", indent-runes(label))
	all := Broken(digest.Clean(s), w.width-indent)
	if len(all) == 0 {
		w.Line(begin)
	}
	for _, line := range all {
		w.Line(begin + line)
		begin = strings.Repeat(" ", indent)
	}
}

// Bytes is what was written.
func (w *Writer) Bytes() []byte { return w.out.Bytes() }
