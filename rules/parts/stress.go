package parts

import (
	"fmt"

	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

// rating is a stress to be judged against a rating by a derating.
type rating[Q quantity.Number] struct {
	what       string // "reverse voltage"
	rated      Q
	given      bool
	key        string
	derating   limits.Derating
	conditions []evidence.Condition // nil: every state and corner
	stress     func(*evidence.Evidence, string) (Q, error)
	// tolerance of the part's value, where it has one: not given, it counts as none.
	tolerance *document.Given[quantity.Fraction]
}

// judge fills in a finding: the largest stress over conditions and elements against
// the failing share of the rating.
func (r rating[Q]) judge(e *evidence.Evidence, g group, f rule.Finding) rule.Finding {
	f.Relation = rule.AtMost
	f.Sources = []rule.Source{r.derating.Source}
	f.Remedy = fmt.Sprintf("fit a part with a higher rating of %s, or lower the stress", r.what)
	if !r.given {
		return f.Lacking(lack.Key(r.key))
	}
	names := g.left(e)
	if len(names) == 0 {
		return f
	}
	most, err := r.worst(e, names)
	if err != nil {
		return f.Lacking(err)
	}
	f.Under = most.Under.Text()
	f.Because = fmt.Sprintf("%s of %s reaches %s of the %s rated", r.what, most.Name, quantity.Text(most.Value), quantity.Text(r.rated))
	if r.tolerance != nil && !r.tolerance.Set() {
		f = f.Assume("the value of " + g.subject + " is exact: its tolerance is not given")
	}
	share := r.derating
	if e.Failed() {
		share = share.InFault()
	}
	f = f.ShareOf(rule.Of(r.rated)).Most(rule.Of(most.Value), rule.Of(Q(float64(r.rated)*float64(share.Fails))), share.Margin())
	return f.WithoutRemedyIfMet()
}

// wellBelow is the share of what would be marginal up to which the corner by sign is not
// sought: tolerances do not double a stress. An assumption of this review.
const wellBelow = 0.5

// worst is the largest stress over conditions and elements; over every state and corner
// it takes the corner by the sign of each part's sensitivity too, where the stress is not
// well below what would be marginal.
func (r rating[Q]) worst(e *evidence.Evidence, names []string) (evidence.Extreme[Q], error) {
	if r.conditions != nil {
		return evidence.Largest(e, r.conditions, names, r.stress)
	}
	if e.Failed() {
		return evidence.Largest(e, e.Ratings(), names, r.stress)
	}
	most, err := evidence.Largest(e, evidence.Ratings(), names, r.stress)
	if err != nil || float64(most.Value) <= wellBelow*float64(r.rated)*float64(r.derating.Marginal) {
		return most, err
	}
	return evidence.BySign(e, most, r.stress)
}
