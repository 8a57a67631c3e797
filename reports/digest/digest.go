// Package digest holds what every report says the same way: the order of the
// findings, what stands against switching on, what is missing, the figures laid
// out by state, and the phrases for amounts, margins and sources. It is the leaf
// under the renderers and judges nothing.
package digest

import (
	"cmp"
	"slices"

	"kilovet/rules"
	"kilovet/rules/rule"
)

// Required are the concerns that bear on people and on the equipment itself.
var required = []rule.Concern{rule.Life, rule.Equipment}

// Sorted is the findings with the worst verdict first and, within a verdict, the
// gravest concern first; otherwise they keep the order of the rules.
func Sorted(findings []rule.Finding) []rule.Finding {
	return ordered(findings, func(a, b rule.Finding) int {
		return cmp.Or(rank(rule.Verdicts, a.Verdict, b.Verdict), rank(rule.Concerns, a.Concern, b.Concern))
	})
}

// Against is the findings that fail or are unassessed, the gravest concern first
// and, within a concern, failures first.
func Against(r *rules.Review) []rule.Finding {
	standing := slices.DeleteFunc(slices.Clone(r.Findings), func(f rule.Finding) bool { return !Blocks(f.Verdict) })
	return ordered(standing, func(a, b rule.Finding) int {
		return cmp.Or(rank(rule.Concerns, a.Concern, b.Concern), rank(rule.Verdicts, a.Verdict, b.Verdict))
	})
}

// Narrow is the findings about people and equipment that are met with little in hand
// or on an assumption, the gravest concern first.
func Narrow(r *rules.Review) []rule.Finding {
	marginal := slices.DeleteFunc(slices.Clone(r.Findings), func(f rule.Finding) bool {
		return f.Verdict != rule.Marginal || !slices.Contains(required, f.Concern)
	})
	return ordered(marginal, func(a, b rule.Finding) int { return rank(rule.Concerns, a.Concern, b.Concern) })
}

// Blocks reports whether a verdict stands against switching on.
func Blocks(v rule.Verdict) bool { return v != rule.Meets && v != rule.Marginal }

func ordered(findings []rule.Finding, by func(a, b rule.Finding) int) []rule.Finding {
	sorted := slices.Clone(findings)
	slices.SortStableFunc(sorted, by)
	return sorted
}

// rank compares by place in a list; what is not in the list comes first, so that
// an unknown word is never hidden at the end.
func rank[T comparable](list []T, a, b T) int {
	return cmp.Compare(slices.Index(list, a), slices.Index(list, b))
}
