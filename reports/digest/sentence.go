package digest

import (
	"fmt"
	"slices"
	"strings"

	"kilovet/hv/quantity"
	"kilovet/rules"
	"kilovet/rules/rule"
)

// Sentence says in plain words what the verdict asks of people, and where only a part
// was judged, that it was.
func Sentence(r *rules.Review) string {
	if len(r.Findings) == 0 {
		return "Nothing was judged: this says nothing about switching on."
	}
	return strings.TrimSpace(asked(r) + " " + Scope(r))
}

func asked(r *rules.Review) string {
	fails := count(r, rule.Fails, required)
	open := count(r, rule.Unassessed, required)
	switch {
	case fails > 0:
		return "Do not switch on: " + of(fails, "fails", "fail") + "."
	case open > 0:
		return "Do not switch on yet: " + of(open, "is unassessed", "are unassessed") + "."
	case count(r, rule.Fails, rule.Concerns) > 0:
		return "Nothing about people or equipment fails; the performance asked for is not reached."
	case count(r, rule.Unassessed, rule.Concerns) > 0:
		return "Nothing about people or equipment fails; the performance is not fully assessed."
	case slices.ContainsFunc(r.Findings, rule.Finding.Passes):
		return "Nothing fails; " + passed(r) + " where the rule calls that marginal, as in a single fault; the rest is met, some with little in hand or resting on an assumption."
	case r.Verdict == rule.Marginal:
		return "Every rule that applies is met, some with little in hand or resting on an assumption."
	}
	return "Every rule that applies is met."
}

// passed says how many findings are of limits that are passed.
func passed(r *rules.Review) string {
	n := 0
	for _, f := range r.Findings {
		if f.Passes() {
			n++
		}
	}
	if n == 1 {
		return "1 limit is passed"
	}
	return fmt.Sprintf("%d limits are passed", n)
}

// Marginal says in which way a finding is marginal.
func Marginal(f rule.Finding) string {
	switch {
	case f.Passes():
		return "not met: the limit is passed, and the rule calls that marginal; kilovet basis " + f.Rule + " says why"
	case len(f.Assumptions) > 0 && (f.Margin == nil || quantity.AtLeast(1+*f.Margin, 1+f.Stated)):
		return "met on an assumption: " + strings.Join(f.Assumptions, "; ")
	case len(f.Assumptions) > 0:
		return "met with less than the stated margin, and on an assumption: " + strings.Join(f.Assumptions, "; ")
	case f.Margin == nil:
		return "met with a reserve, for the reason beside"
	}
	return "met with less than the stated margin"
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
		return "1 finding about people or equipment " + one
	}
	return fmt.Sprintf("%d findings about people or equipment %s", n, many)
}
