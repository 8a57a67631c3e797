package page

import (
	"fmt"
	"slices"

	"kilovet/reports/digest"
	"kilovet/rules/rule"
)

// Findings that differ in their subject alone: so few have a row each, and so many share
// one, lest it fill a sheet.
const (
	fewAlike  = 2
	mostAlike = 24
)

// clusters puts findings together that differ in their subject alone, in the order of the
// first of each; those with amounts, and a few, stay apart.
func clusters(findings []rule.Finding) (all [][]rule.Finding) {
	for _, f := range findings {
		i := slices.IndexFunc(all, func(c []rule.Finding) bool { return sayTheSame(c[0], f) })
		if i < 0 {
			all = append(all, []rule.Finding{f})
			continue
		}
		all[i] = append(all[i], f)
	}
	var out [][]rule.Finding
	for _, c := range all {
		size := mostAlike
		if len(c) <= fewAlike {
			size = 1
		}
		out = slices.AppendSeq(out, slices.Chunk(c, size))
	}
	return out
}

// sayTheSame reports whether two findings that do not meet, without amounts, say the same
// of two subjects.
func sayTheSame(a, b rule.Finding) bool {
	if a.Verdict == rule.Meets || a.Needed != nil || b.Needed != nil || a.Provided != nil || b.Provided != nil {
		return false
	}
	return a.Rule == b.Rule && a.Verdict == b.Verdict && a.Concern == b.Concern && a.Because == b.Because && a.Remedy == b.Remedy && a.Under == b.Under &&
		digest.Line(a) == digest.Line(b) && slices.Equal(a.Missing, b.Missing) && slices.Equal(a.Sources, b.Sources) && slices.Equal(a.Assumptions, b.Assumptions)
}

// subjects says of what findings that are alike speak: of one beside its rule, of many
// with the reason, where there is room. Each of many leads to what it rests on alone.
func (n *writer) subjects(in digest.Chapter, c []rule.Finding) (beside, below Line) {
	if len(c) == 1 {
		return plain(c[0].Subject), Line{}
	}
	for i, f := range c {
		l := small(f.Subject)
		for _, p := range n.pointers(in, f) {
			if !n.shared(in, p, c) {
				word := f.Subject
				if i+1 < len(c) {
					word += ";" // lest it be found in the name of another
				}
				l.Links = []Link{{word, p.to}}
				break
			}
		}
		below = joined(below, l)
	}
	return plain(fmt.Sprintf("%d of the same, named with the reason", len(c))), Line{Text: "Of: " + below.Text, Weight: Small, Links: below.Links}
}
