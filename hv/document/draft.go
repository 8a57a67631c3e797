package document

import (
	"bytes"
	"fmt"
	"io"
	"reflect"
	"strings"
	"unicode/utf8"
)

// Outline says what a draft of a description shows.
type Outline struct {
	Head string // comment before everything, lines without "#"
	// Off reports the keys and tables that stand behind a "#": there to be seen, not read.
	Off func(path string) bool
	// Instead gives the value of a key in place of its example; empty for the example.
	Instead func(path string) string
}

// Draft writes every declared key on a line of its own, with its example as the
// value and what it means and accepts as a comment. Explanations begin with "# ",
// what is switched off with "#" and the key or bracket right after it.
func Draft(w io.Writer, into any, o Outline) error {
	d := &drafter{Outline: o}
	if d.Off == nil {
		d.Off = func(string) bool { return false }
	}
	if d.Instead == nil {
		d.Instead = func(string) string { return "" }
	}
	for line := range strings.Lines(o.Head) {
		d.WriteString(strings.TrimRight("# "+line, "\n ") + "\n")
	}
	if o.Head != "" {
		d.WriteString("\n")
	}
	d.section(structType(into), "", "", false)
	_, err := d.WriteTo(w)
	return err
}

type drafter struct {
	bytes.Buffer
	Outline
}

// section writes the keys of one table: values first, as whatever follows a header
// belongs to it, then the tables with headers of their own.
func (d *drafter) section(t reflect.Type, path, prefix string, off bool) {
	declared := declare(t, path)
	for _, key := range declared {
		d.inner(key, prefix, off || d.Off(key.Path))
	}
	if prefix != "" {
		return
	}
	for _, key := range declared {
		if key.headed(path) {
			d.headed(key, off || d.Off(key.Path))
		}
	}
}

// headed reports whether a draft gives a table a header: those at the top, and lists
// of tables without an example.
func (d Declared) headed(path string) bool {
	return d.Holds == OneTable && path == "" || d.Holds == SomeTables && d.Example == ""
}

func (d *drafter) headed(key Declared, off bool) {
	header := "[" + key.Path + "]"
	if key.Holds == SomeTables {
		header = "[" + header + "]"
	}
	d.WriteString("\n")
	d.line(header, key.Means, off)
	d.section(key.kind, key.Path, "", off)
}

// inner writes what stands in a table without a header of its own.
func (d *drafter) inner(key Declared, prefix string, off bool) {
	switch {
	case key.headed(strings.TrimSuffix(key.Path, key.Key)):
	case key.Holds == OneTable:
		d.comment("# ", prefix+key.Key+": "+key.Means)
		d.section(key.kind, key.Path, prefix+key.Key+".", off)
	default:
		value := d.Instead(key.Path)
		if value == "" {
			value = key.Sample()
		}
		d.line(prefix+key.Key+" = "+value, key.explanation(), off)
		d.items(key)
	}
}

// items explains the keys of tables that a draft writes in braces.
func (d *drafter) items(key Declared) {
	if key.Holds != SomeTables {
		return
	}
	for _, inner := range declare(key.kind, key.Path) {
		d.comment("#   ", inner.Key+": "+inner.explanation())
	}
}

// A draft is as wide as a terminal; its explanations stand beside the keys.
const (
	draftWidth  = 80
	draftColumn = 44
)

// line writes a key with what it means beside it, on as many lines as that takes.
func (d *drafter) line(text, comment string, off bool) {
	if off {
		text = "#" + text
	}
	if len(text) > draftColumn {
		d.WriteString(text + "\n")
		text = ""
	}
	for _, l := range wrapped(comment, draftWidth-draftColumn-len(" # ")) {
		fmt.Fprintf(d, "%-*s # %s\n", draftColumn, text, l)
		text = ""
	}
}

// comment writes a comment of its own; its lines after the first stand further in.
func (d *drafter) comment(begin, text string) {
	for i, l := range wrapped(text, draftWidth-len(begin)-2) {
		if i == 1 {
			begin += "  "
		}
		d.WriteString(begin + l + "\n")
	}
}

// wrapped breaks a text at its spaces.
func wrapped(text string, width int) []string {
	var lines []string
	for _, word := range strings.Fields(text) {
		last := len(lines) - 1
		if last >= 0 && utf8.RuneCountInString(lines[last]+" "+word) <= width {
			lines[last] += " " + word
		} else {
			lines = append(lines, word)
		}
	}
	return lines
}

// explanation is what a comment says of a key.
func (d Declared) explanation() string {
	parts := []string{d.Means}
	switch {
	case len(d.Words) > 0:
		parts = append(parts, strings.Join(d.Words, " | "))
	case len(d.bounds) > 0:
		parts = append(parts, d.bounds.words())
	}
	if d.List == "one or many" {
		parts = append(parts, "one value or a list")
	}
	if d.Needed {
		parts = append(parts, "needed")
	}
	return strings.Join(parts, "; ")
}
