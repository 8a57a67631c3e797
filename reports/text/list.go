package text

import (
	"slices"
	"strings"

	"kilovet/reports/digest"
	"kilovet/rules/rule"
)

// list tells in so many lines everything that is not met, gravest first, and after it
// what is met with little in hand. Where there are lines for every entry, those left
// over tell the reasons of the first; else the gravest have a line each and the rules of
// the rest are named close together.
func list(w *writer, entries []digest.Entry, lines int) {
	if len(entries) == 0 {
		return
	}
	w.blank()
	if len(entries) > lines {
		crowd(w, entries, lines)
		return
	}
	for i, spare := 0, lines-len(entries); i < len(entries); i++ {
		w.entry(entries[i])
		if spare > 0 {
			before := w.height()
			w.short("", gutter, entries[i].First.Because, min(2, max(1, spare-(len(entries)-1-i))))
			spare -= w.height() - before
		}
	}
}

// entry is a line with a rule and its subjects.
func (w *writer) entry(e digest.Entry) {
	w.verdict(string(e.First.Verdict), e.First.Verdict, w.fit(string(e.First.Concern)+": "+e.Text(mostSubjects), w.width-gutter))
}

// crowd tells the gravest with its reason, gives as many others a line of their own as
// leaves lines for the names of all the rest, and where even those are too many counts
// the last.
func crowd(w *writer, entries []digest.Entry, lines int) {
	w.entry(entries[0])
	w.short("", gutter, entries[0].First.Because, 1)
	entries, lines = entries[1:], max(1, lines-2)
	for own := min(lines, len(entries)); own >= 0; own-- {
		if rest := w.named(entries[own:]); own+len(rest) <= lines {
			for _, e := range entries[:own] {
				w.entry(e)
			}
			w.paragraphs(rest)
			return
		}
	}
	for n := len(entries) - 1; n >= 0; n-- {
		if rest := w.named(entries[:n]); len(rest) < lines {
			w.paragraphs(rest)
			w.short("", gutter, more(len(entries)-n), 1)
			return
		}
	}
}

// line is a line of names in the gutter of a verdict; that of a line which goes on is
// empty.
type line struct {
	verdict rule.Verdict
	text    string
}

// named is the rules of entries, those of a verdict and a concern together.
func (w *writer) named(entries []digest.Entry) []line {
	var all []line
	for len(entries) > 0 {
		first := entries[0].First
		n := slices.IndexFunc(entries, func(e digest.Entry) bool { return e.First.Verdict != first.Verdict })
		if n < 0 {
			n = len(entries)
		}
		verdict := first.Verdict
		for _, text := range w.broken(names(entries[:n]), gutter) {
			all = append(all, line{verdict, text})
			verdict = ""
		}
		entries = entries[n:]
	}
	return all
}

// names is rules by their concern, with how often each was found.
func names(entries []digest.Entry) string {
	var parts []string
	concern := rule.Concern("")
	for _, e := range entries {
		text := e.First.Rule
		if e.Count > 1 {
			text += "(" + decimal(e.Count) + ")"
		}
		if e.First.Concern == concern {
			parts[len(parts)-1] += ", " + text
			continue
		}
		concern = e.First.Concern
		parts = append(parts, string(concern)+": "+text)
	}
	return strings.Join(parts, "; ")
}

func (w *writer) paragraphs(all []line) {
	for _, l := range all {
		if l.verdict == "" {
			w.hang("", gutter, l.text)
		} else {
			w.verdict(string(l.verdict), l.verdict, l.text)
		}
	}
}
