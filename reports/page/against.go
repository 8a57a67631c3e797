package page

import (
	"slices"
	"strings"

	"kilovet/reports/digest"
	"kilovet/rules/rule"
)

// The titles of what the first sheet lists, the gravest first.
const (
	stands = "Stands against switching on"
	passes = "A limit is passed where the rule calls that marginal"
	little = "Met with little in hand or on an assumption"
)

// against is what stands against switching on and, after it, what passes a limit and what
// is met with little in hand: as many rows as the sheet holds.
func (n *writer) against() []Block {
	r := n.review
	if len(r.Findings) == 0 {
		return nil
	}
	narrow := digest.Narrow(r)
	met := slices.DeleteFunc(slices.Clone(narrow), rule.Finding.Passes)
	narrow = slices.DeleteFunc(narrow, func(f rule.Finding) bool { return !f.Passes() })
	var blocks []Block
	t := Table{Columns: []Column{{Title: "", Share: 0.15}, {Title: "", Share: 0.32}, {Title: "Why", Share: 0.44}, {Title: "Sheet", Share: 0.09, Right: true}}, Fill: true}
	for _, part := range []struct {
		title    string
		findings []rule.Finding
	}{{stands, digest.Against(r)}, {passes, narrow}, {little, met}} {
		rows := n.entryRows(part.findings)
		switch {
		case len(rows) == 0:
			continue
		case len(t.Rows) == 0:
			t.Columns[1].Title = part.title
		default:
			rows = append([]Row{{Group: true, Cells: []Cell{lines(strong(part.title))}}}, rows...)
		}
		t.Rows = append(t.Rows, rows...)
	}
	if t.Columns[1].Title != stands {
		blocks = append(blocks, Paragraph{"No finding stands against switching on."})
	}
	if len(t.Rows) > 0 {
		blocks = append(blocks, t)
	}
	return blocks
}

// entryRows is a row for each rule, and one for those that one thing leaves unassessed.
func (n *writer) entryRows(findings []rule.Finding) []Row {
	var rows []Row
	for all := digest.Entries(findings); len(all) > 0; {
		var same []digest.Entry
		same, all = likeFirst(all)
		first := same[0].First
		to := n.anchorOf(first)
		about := []Line{linked(strong(first.Rule), to), small(shortened(strings.TrimSuffix("concerns "+string(first.Concern)+": "+same[0].Names(mostSubjects), ": ")))}
		if len(same) > 1 {
			about = []Line{n.ruleNames(same), small("concerns " + string(first.Concern))}
		}
		rows = append(rows, Row{Stands: len(same), Cells: []Cell{
			{Verdict: first.Verdict}, lines(about...), lines(plain(shortened(first.Because))), {Lines: []Line{{Sheet: to, Links: []Link{{To: to}}}}},
		}})
	}
	return rows
}

// likeFirst takes from entries the first and, where that is unassessed, those of its
// concern that are for the same reason.
func likeFirst(entries []digest.Entry) (same, rest []digest.Entry) {
	first := entries[0].First
	for i, e := range entries {
		f := e.First
		if i == 0 || f.Verdict == rule.Unassessed && first.Verdict == f.Verdict && f.Concern == first.Concern && f.Because == first.Because {
			same = append(same, e)
		} else {
			rest = append(rest, e)
		}
	}
	return same, rest
}

// mostRules is how many rules a row of the first sheet names.
const mostRules = 8

// ruleNames is the rules of entries, each with a link.
func (n *writer) ruleNames(entries []digest.Entry) Line {
	l := Line{Weight: Strong}
	var names []string
	for _, e := range entries[:min(len(entries), mostRules)] {
		names = append(names, e.First.Rule)
		l.Links = append(l.Links, Link{e.First.Rule, n.anchorOf(e.First)})
	}
	l.Text = strings.Join(names, ", ")
	if more := len(entries) - mostRules; more > 0 {
		l.Text += " and " + count(more, "rule") + " more"
	}
	return l
}

// Rest is the row that stands for those of a table from the given one on.
func (t Table) Rest(from int) Row {
	n := 0
	for _, r := range t.Rows[from:] {
		n += r.Stands
	}
	return Row{Group: true, Cells: []Cell{lines(strong("And " + count(n, "rule") + " more, on the sheets that follow."))}}
}
