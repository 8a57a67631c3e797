package rule

import (
	"fmt"
	"math"
	"strings"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// Least judges provided ≥ needed, marginal where provided < needed·(1 + margin).
func (f Finding) Least(provided, needed Amount, margin float64) Finding {
	f.Relation = AtLeast
	m := ratio(provided.Value, needed.Value)
	return f.judged(provided, needed, m, margin)
}

// Most judges provided ≤ needed, marginal where provided > needed/(1 + margin).
func (f Finding) Most(provided, needed Amount, margin float64) Finding {
	f.Relation = AtMost
	m := ratio(needed.Value, provided.Value)
	return f.judged(provided, needed, m, margin)
}

// ShareOf says what the limit is a share of.
func (f Finding) ShareOf(whole Amount) Finding {
	f.Whole = &whole
	return f
}

// ShareBy says what the limit is a share of, and where that share comes from.
func (f Finding) ShareBy(whole Amount, from Source) Finding {
	f.Whole, f.Share = &whole, from
	return f
}

// ratio is the margin; a demand of nothing is met without limit, said as a margin of a million.
func ratio(a, b float64) float64 {
	const boundless = 1e6
	if b <= 0 || a/b-1 > boundless {
		return boundless
	}
	return a/b - 1
}

func (f Finding) judged(provided, needed Amount, m, margin float64) Finding {
	if !finite(provided.Value) || !finite(needed.Value) || !finite(m) || provided.Value < 0 {
		return f.Lacking(lack.Failed("%s and %s cannot be compared", provided.Text(), needed.Text()))
	}
	f.Provided, f.Needed, f.Margin, f.Stated = &provided, &needed, &m, margin
	switch {
	case quantity.AtLeast(1+m, 1+margin):
		f.Verdict = Meets
	case quantity.AtLeast(1+m, 1):
		f.Verdict = Marginal
	default:
		f.Verdict = Fails
	}
	return f.tempered()
}

func finite(v float64) bool { return !math.IsNaN(v) && !math.IsInf(v, 0) }

// There judges a presence.
func (f Finding) There(there bool) Finding {
	f.Relation = Presence
	f.Verdict = Fails
	if there {
		f.Verdict = Meets
	}
	return f.tempered()
}

// tempered lowers a pass that rests on an assumption to marginal.
func (f Finding) tempered() Finding {
	if f.Verdict == Meets && len(f.Assumptions) > 0 {
		f.Verdict = Marginal
	}
	return f
}

// Lacking turns the reason why there is no number into a verdict.
func (f Finding) Lacking(err error) Finding {
	f.Verdict = Unassessed
	if f.Because != "" {
		f.Because += "; "
	}
	f.Because += err.Error()
	if f.Relation == "" {
		f.Relation = Presence
	}
	if l := lack.Of(err); l != nil {
		f.Missing = l.Keys
	}
	f.Remedy = f.giving()
	return f
}

// giving is the remedy of a finding that lacks keys; several that the reason has just
// listed are not listed again.
func (f Finding) giving() string {
	switch {
	case len(f.Missing) == 0:
		return "measure or calculate it by other means before switching on"
	case len(f.Missing) == 2 && f.ListsMissing():
		return "give both of these"
	case len(f.Missing) > 2 && f.ListsMissing():
		return fmt.Sprintf("give all %d of these", len(f.Missing))
	}
	return "give " + strings.Join(f.Missing, ", ")
}

// ListsMissing reports whether the reason lists every missing key as not given.
func (f Finding) ListsMissing() bool {
	return len(f.Missing) > 0 && strings.Contains(f.Because, strings.Join(f.Missing, ", ")+" not given")
}

// Assume adds what was taken for granted; a pass becomes marginal.
func (f Finding) Assume(what ...string) Finding {
	f.Assumptions = append(f.Assumptions, what...)
	return f.tempered()
}

// Passes reports whether a marginal finding is one of a limit that is passed: it is not met
// with less in hand, it is not met, and its rule says why it does not fail.
func (f Finding) Passes() bool {
	return f.Verdict == Marginal && (f.Graded || f.Margin != nil && !quantity.AtLeast(1+*f.Margin, 1))
}

// Worst is the worst verdict of some findings; none at all is unassessed.
func Worst(findings []Finding) Verdict {
	if len(findings) == 0 {
		return Unassessed
	}
	worst := Meets
	for _, f := range findings {
		if Graver(f.Verdict, worst) {
			worst = f.Verdict
		}
	}
	return worst
}

// Graver reports whether a is a worse verdict than b.
func Graver(a, b Verdict) bool { return rank(a) > rank(b) }

func rank(v Verdict) int {
	switch v {
	case Fails:
		return 3
	case Unassessed:
		return 2
	case Marginal:
		return 1
	}
	return 0
}

// Quantity writes a quantity for people, for use in sentences.
func Quantity[Q quantity.Number](q Q) string { return quantity.Text(q) }

// WithoutRemedyIfMet drops the remedy of a finding that needs none.
func (f Finding) WithoutRemedyIfMet() Finding {
	if f.Verdict == Meets {
		f.Remedy = ""
	}
	return f
}

// One is the judgement of a single finding.
func One(f Finding) Judgement { return Judgement{Findings: []Finding{f}} }

// Cited are the sources of an answer about insulation as those of a finding.
func Cited(from []gap.Source) []Source {
	all := make([]Source, len(from))
	for i, s := range from {
		all[i] = Source{Text: s.Text, Mark: Mark(s.Mark), Governs: s.Governs}
	}
	return all
}
