// Package text writes a review for a terminal: one screen that answers first,
// and, when all is asked for, everything the review holds. Words carry the
// meaning; colour, if asked for, stands beside them.
package text

import (
	"bytes"
	"cmp"
	"strings"

	"kilovet/reports/digest"
	"kilovet/rules"
	"kilovet/rules/rule"
)

// Options say how to write.
type Options struct {
	Note   string // stands on the first line, before the title
	All    bool   // everything, after the first screen
	Colour bool   // colour the verdicts
	Width  int    // columns; 0 means 80, below 40 counts as 40
}

// screen is the lines, of 24 with one for the prompt, that the first screen keeps to
// where the texts that may not be cut allow it.
const screen = 23

// How much of each list the first screen shows.
const (
	mostSummary  = 8
	fewSummary   = 4 // where much stands against switching on
	someSummary  = 6 // where nothing does
	mostSubjects = 3
	mostMissing  = 6
	leastList    = 4 // lines of what was found, whatever the rest takes
)

// gutter is the column that labels and verdicts stand in.
const gutter = 13

// Render writes the review.
func Render(r *rules.Review, o Options) []byte {
	w := newWriter(o)
	first(w, r, o)
	if o.All {
		everything(w, r)
	}
	return bytes.Clone(w.out.Bytes())
}

// first is the one screen. What comes before the review, the deference, is never cut:
// the list of what was found takes the lines that the rest leaves it, and where they
// are too few the summary gives some up.
func first(w *writer, r *rules.Review, o Options) {
	entries := append(digest.Entries(digest.Against(r)), digest.Entries(digest.Narrow(r))...)
	end := newWriter(o)
	ending(end, r)
	room := func(begin *writer) int { return screen - begin.height() - end.height() - 2 }
	few := someSummary
	if digest.Blocks(r.Verdict) {
		few = fewSummary
	}
	var begin *writer
	for most := min(mostSummary, max(few, len(r.Summary))); ; most-- {
		begin = newWriter(o)
		beginning(begin, r, o.Note, most)
		if o.All || most <= few || len(entries) <= room(begin) {
			break
		}
	}
	w.out.Write(begin.out.Bytes())
	list(w, entries, max(leastList, room(begin)))
	w.blank()
	w.out.Write(end.out.Bytes())
}

// beginning is what the chain is and what the verdict asks.
func beginning(w *writer, r *rules.Review, note string, most int) {
	w.hang("", 0, note)
	heading(w, r.Heading)
	shown := r.Summary[:min(len(r.Summary), most)]
	for _, l := range shown {
		w.told(l, linesEach(len(r.Summary), 5))
	}
	w.blank()
	w.verdict(strings.ToUpper(string(r.Verdict)), r.Verdict, digest.Sentence(r))
	w.short("", gutter, digest.Counts(r.Counts), 1)
}

// told is a line of the summary; only the screen that stands alone cuts it.
func (w *writer) told(l rules.Line, most int) {
	if w.all {
		w.hang(l.Label, gutter, l.Text)
		return
	}
	w.short(l.Label, gutter, l.Text, most)
}

// ending is what is missing, what comes before the review, and where to read on.
func ending(w *writer, r *rules.Review) {
	if missing := digest.MissingText(r, mostMissing); missing != "" {
		w.short("missing", gutter, missing, 2)
		w.blank()
	}
	w.wrap(r.Deference)
	if !w.all {
		w.wrap("Every figure, finding and source: --all. The sheet to sign: kilovet signoff.")
	}
}

// heading is the title and, behind it where the line holds them, number and
// revision.
func heading(w *writer, h rules.Heading) {
	title := cmp.Or(h.Title, "A chain without a title")
	marks := h.Document
	if h.Revision != "" {
		marks = strings.TrimSpace(marks + " revision " + h.Revision)
	}
	switch joined := title + ", " + marks; {
	case marks == "":
		w.short("", 0, title, 1)
	case runes(joined) <= w.width:
		w.short("", 0, joined, 1)
	default:
		w.short("", 0, title, 1)
		w.short("", 0, marks, 1)
	}
}

// linesEach keeps the screen one screen: where there are few entries, each is told
// at length.
func linesEach(entries, few int) int {
	if entries > few {
		return 1
	}
	return 2
}

func more(n int) string {
	if n == 1 {
		return "and 1 rule more"
	}
	return "and " + decimal(n) + " rules more"
}

// plain ends a colour.
const plain = "\x1b[0m"

// paint gives a verdict its colour: sixteen-colour codes, which follow the
// terminal's own palette.
func paint(v rule.Verdict) string {
	switch v {
	case rule.Meets:
		return "\x1b[32m"
	case rule.Marginal:
		return "\x1b[33m"
	case rule.Unassessed:
		return "\x1b[35m"
	}
	return "\x1b[1;31m"
}
