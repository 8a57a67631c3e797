package rule

import "kilovet/rules/evidence"

// Rule is one demand as a value: what it asks, when, with which source and margin,
// and how it judges. Help, the rule's page and the tests are made from it.
type Rule struct {
	ID      string // "spacing.creepage"
	Title   string // a few words
	Demands string // what must be true, one sentence
	Applies string // when, one sentence
	Margin  string // what separates meets from marginal; empty where nothing does
	Concern Concern
	Sources []Source
	Example Example
	// Fault says that the rule judges what a single fault or a flashover does: it is left
	// out with the family of faults, whatever family it stands in.
	Fault bool
	// Judge gives the findings, one a subject; or, where the rule does not apply,
	// none and the reason.
	Judge func(*evidence.Evidence) Judgement
}

// Judgement is what a rule says of a chain: findings, or why it was passed over.
type Judgement struct {
	Findings   []Finding
	PassedOver string
	Exempt     []Exempt
}

// Exempt is a subject that a rule does not apply to, and why.
type Exempt struct{ Subject, Because string }

// Over is the judgement of a rule that does not apply.
func Over(because string) Judgement { return Judgement{PassedOver: because} }

// Example shows the rule at work: a change of one to three keys of a built-in
// description and every finding that changes with it.
type Example struct {
	Of      string // the built-in description that is changed; "column" where empty
	Swaps   []Swap
	Changes []Change
}

// Swap replaces a text that occurs exactly once in the built-in description.
type Swap struct{ Was, Becomes string }

// Change is a finding whose verdict differs after the swaps; Verdict is empty where
// the finding is gone.
type Change struct {
	Rule, Subject string
	Verdict       Verdict
}
