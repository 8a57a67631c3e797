package difference

import (
	"bytes"
	"strings"
	"unicode/utf8"

	"kilovet/reports/digest"
)

// writer sets paragraphs into a width.
type writer struct {
	out   bytes.Buffer
	width int
}

func newWriter(width int) *writer {
	if width == 0 {
		width = 80
	}
	return &writer{width: max(width, 40)}
}

func (w *writer) line(s string) {
	w.out.WriteString(strings.TrimRight(s, " "))
	w.out.WriteByte('\n')
}

// section writes a heading; nothing where nothing stands under it.
func (w *writer) section(title string, entries int) {
	if entries > 0 {
		w.line("")
		w.line(strings.ToUpper(title))
		w.line("")
	}
}

// hang writes a paragraph with a label before its first line, every line indented.
func (w *writer) hang(label string, indent int, s string) {
	line := label + strings.Repeat(" ", indent-utf8.RuneCountInString(label))
	empty := true
	for _, word := range w.words(s, indent) {
		if !empty && utf8.RuneCountInString(line)+1+utf8.RuneCountInString(word) > w.width {
			w.line(line)
			line, empty = strings.Repeat(" ", indent), true
		}
		if !empty {
			line += " "
		}
		line, empty = line+word, false
	}
	w.line(line)
}

// words takes a text apart; a word wider than a line is cut.
func (w *writer) words(s string, indent int) []string {
	var all []string
	for _, word := range strings.Fields(digest.Clean(s)) {
		runes := []rune(word)
		for most := w.width - indent; len(runes) > most; runes = runes[most:] {
			all = append(all, string(runes[:most]))
		}
		all = append(all, string(runes))
	}
	return all
}
