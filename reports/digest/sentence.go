package digest

import (
	"fmt"
	"slices"

	"kilovet/rules"
	"kilovet/rules/rule"
)

// Sentence says in one plain sentence what the verdict asks of people.
func Sentence(r *rules.Review) string {
	fails := count(r, rule.Fails, required)
	open := count(r, rule.Unassessed, required)
	switch {
	case len(r.Findings) == 0:
		return "Nothing was judged: this says nothing about switching on."
	case fails > 0:
		return "Do not switch on: " + of(fails, "fails", "fail") + " on life or equipment."
	case open > 0:
		return "Do not switch on yet: " + of(open, "is", "are") + " unassessed on life or equipment."
	case count(r, rule.Fails, rule.Concerns) > 0:
		return "Nothing fails on life or equipment; the performance asked for is not reached."
	case count(r, rule.Unassessed, rule.Concerns) > 0:
		return "Nothing fails on life or equipment; the performance is not fully assessed."
	case r.Verdict == rule.Marginal:
		return "Every rule that applies is met, some with less than the stated margin."
	}
	return "Every rule that applies is met."
}

func count(r *rules.Review, v rule.Verdict, concerns []rule.Concern) int {
	n := 0
	for _, f := range r.Findings {
		if f.Verdict == v && slices.Contains(concerns, f.Concern) {
			n++
		}
	}
	return n
}

func of(n int, one, many string) string {
	if n == 1 {
		return "1 finding " + one
	}
	return fmt.Sprintf("%d findings %s", n, many)
}
