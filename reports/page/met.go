package page

import (
	"slices"
	"strings"
	"unicode/utf8"

	"kilovet/reports/digest"
	"kilovet/rules/rule"
)

// met is the table of findings that meet: those of a rule together, a line each.
func (n *writer) met(c digest.Chapter, findings []rule.Finding) []Block {
	if len(findings) == 0 {
		return nil
	}
	asked, found := amountShare(0.105, findings, limit), amountShare(0.085, findings, digest.Provided)
	t := Table{Title: "Findings that meet", Columns: []Column{{Title: "Rule and subject", Share: 0.2}, {Title: "Limit", Share: asked, Right: true}, {Title: "Found", Share: found, Right: true}, {Title: "Margin", Share: 0.085, Right: true}, {Title: "Reason", Share: 0.715 - asked - found}}}
	var unders [][]string
	for _, f := range findings {
		unders = append(unders, []string{f.Under})
	}
	l := newLegend(unders)
	for len(findings) > 0 {
		same := slices.IndexFunc(findings, func(f rule.Finding) bool {
			return f.Rule != findings[0].Rule || f.Concern != findings[0].Concern
		})
		if same < 0 {
			same = len(findings)
		}
		t.Rows = append(t.Rows, n.metRule(c, findings[:same], l)...)
		findings = findings[same:]
	}
	t.Legend = l.lines
	return []Block{t}
}

// amountShare is what a column of amounts takes of the width: usually so much, more where
// one needs it to stay on its line.
func amountShare(usual float64, findings []rule.Finding, amount func(rule.Finding) string) float64 {
	longest := 0
	for _, f := range findings {
		longest = max(longest, utf8.RuneCountInString(amount(f)))
	}
	return max(usual, min(0.15, float64(longest+2)/lineRunes))
}

// metRule is the rows of the findings of a rule; what they share stands above them.
func (n *writer) metRule(c digest.Chapter, findings []rule.Finding, l *legend) []Row {
	first := findings[0]
	concern, source := "concerns "+string(first.Concern), n.sourceLine(first)
	shared := !slices.ContainsFunc(findings, func(f rule.Finding) bool { return n.sourceLine(f).Text != source.Text })
	if len(findings) == 1 {
		return []Row{n.metRow(c, first, l, []Line{strong(first.Rule), plain(first.Subject)}, joined(small(concern), source))}
	}
	head := []Line{strong(first.Rule)}
	if shared && source.Text != "" {
		head = append(head, Line{Text: concern + "; " + source.Text, Weight: Small, Links: source.Links})
	} else {
		head = append(head, small(concern))
	}
	rows := []Row{{Group: true, Cells: []Cell{lines(head...)}}}
	for _, f := range findings {
		own := small("")
		if !shared {
			own = n.sourceLine(f)
		}
		row := n.metRow(c, f, l, []Line{plain(f.Subject)}, own)
		row.Under = true
		rows = append(rows, row)
	}
	return rows
}

func (n *writer) metRow(c digest.Chapter, f rule.Finding, l *legend, about []Line, source Line) Row {
	reason := []Line{plain(f.Because), joined(labelled("Remedy:", f.Remedy), labelled("missing:", digest.Lacking(f)))}
	for _, a := range f.Assumptions {
		reason = append(reason, labelled("Assumed:", a))
	}
	where := small(lineOf(f))
	if f.Under != "" {
		where = joined(small("under "+l.short(f.Under)), where)
	}
	reason = append(reason, joined(joined(where, source), n.seenLine(c, f)))
	return Row{Anchor: n.anchorOf(f), Cells: []Cell{
		lines(about...), lines(plain(limit(f))), lines(plain(digest.Provided(f))), lines(plain(digest.Margin(f))), lines(reason...),
	}}
}

// joined puts two lines on one.
func joined(a, b Line) Line { return joinedBy("; ", a, b) }

func joinedBy(between string, a, b Line) Line {
	switch {
	case a.Text == "":
		return b
	case b.Text == "":
		return a
	}
	return Line{Text: a.Text + between + b.Text, Weight: a.Weight, Links: append(slices.Clone(a.Links), b.Links...)}
}

// limit is what a finding asks for, with the side that meets.
func limit(f rule.Finding) string {
	needed := digest.Needed(f)
	switch {
	case needed == "":
		return ""
	case f.Relation == rule.AtMost:
		return "≤ " + needed
	}
	return "≥ " + needed
}

// lineOf is the line of the description that a finding points to; its key is said where
// the rule does not say it.
func lineOf(f rule.Finding) string {
	return strings.TrimPrefix(digest.Line(f), f.Rule+", ")
}
