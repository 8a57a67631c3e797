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
	All    bool // everything, after the first screen
	Colour bool // colour the verdicts
	Width  int  // columns; 0 means 80, below 40 counts as 40
}

// How much of each list the first screen shows.
const (
	mostSummary  = 8
	mostAgainst  = 4
	mostSubjects = 3
	mostMissing  = 6

	mostDeference = 3 // lines
)

// gutter is the column that labels and verdicts stand in.
const gutter = 13

// Render writes the review.
func Render(r *rules.Review, o Options) []byte {
	w := newWriter(o)
	first(w, r)
	if o.All {
		everything(w, r)
	} else {
		w.wrap("Every figure, finding and source: --all. A sheet to sign: --pdf FILE.")
	}
	return bytes.Clone(w.out.Bytes())
}

// first is the one screen.
func first(w *writer, r *rules.Review) {
	heading(w, r.Heading)
	shown := r.Summary[:min(len(r.Summary), mostSummary)]
	for _, l := range shown {
		w.short(l.Label, gutter, l.Text, linesEach(len(shown), 6))
	}
	w.blank()
	w.verdict(strings.ToUpper(string(r.Verdict)), r.Verdict, digest.Sentence(r))
	w.short("", gutter, digest.Counts(r.Counts), 1)
	against(w, r)
	if missing := digest.MissingText(r, mostMissing); missing != "" {
		w.short("missing", gutter, missing, 2)
	}
	w.blank()
	deferring(w, r.Deference)
}

// deferring says what comes before the review: in full where all is shown, its
// beginning on the one screen.
func deferring(w *writer, s string) {
	if w.all {
		w.wrap(s)
		return
	}
	w.short("", 0, s, mostDeference)
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
	w.blank()
}

// against lists what stands against switching on, gravest first.
func against(w *writer, r *rules.Review) {
	entries := digest.Entries(digest.Against(r))
	if len(entries) == 0 {
		return
	}
	w.blank()
	for i, e := range entries {
		if i == mostAgainst {
			w.short("", gutter, more(len(entries)-i), 1)
			break
		}
		w.verdict(string(e.First.Verdict), e.First.Verdict, w.fit(string(e.First.Concern)+": "+e.Text(mostSubjects), w.width-gutter))
		w.short("", gutter, e.First.Because, linesEach(len(entries), 2))
	}
	w.blank()
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
