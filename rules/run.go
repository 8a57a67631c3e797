package rules

import (
	"slices"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/parallel"
	"kilovet/hv/trace"
	"kilovet/rules/diagram"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
	"kilovet/rules/local"
	"kilovet/rules/rule"
)

// All lists every rule, in the order in which findings are given.
func All() []rule.Rule {
	var all []rule.Rule
	for _, f := range families() {
		all = append(all, f.rules...)
	}
	return all
}

// Run reviews a chain: computes its figures, judges it by every rule, and gives the
// result as plain data. It neither reads files nor asks for the time.
func Run(c *chain.Chain, inputs []Input, program Program) *Review {
	r, _ := RunUnder(c, inputs, program, Beside{})
	return r
}

// Beside is what was read beside a description, and what was asked; what is nil was not.
type Beside struct {
	Limits *local.File
	// Ripple is the record that beam.measured_ripple names.
	Ripple *trace.Trace

	Without []string // families of rules to leave out, of Families
	// Progress is told how far lengthy work has come; never by two at once.
	Progress func(what string, done, of int)
}

// RunUnder is Run with what was read beside the description. The faults are those of
// the file of local limits that only show against this chain; there is no review then.
func RunUnder(c *chain.Chain, inputs []Input, program Program, beside Beside) (*Review, document.Faults) {
	e := evidence.New(c).Recorded(beside.Ripple).Without(beside.Without...).Telling(beside.Progress)
	r := &Review{Program: program, Inputs: inputs, Heading: heading(c), Deference: deference}
	var shown, exempt []exhibit.Table
	parallel.Do(
		func() { exempt = exemptTable(r.judge(e)) },
		func() { r.Figures = figures(e) },
		func() { r.Curves = curves(e) },
		func() { shown = tables(e) },
	)
	if faults := r.under(beside.Limits, c); len(faults) > 0 {
		return nil, faults
	}
	r.Tables = slices.Concat(dispositionTable(c, r.Findings), localTable(r.Local), shown, exempt)
	r.Diagram = diagram.Of(e, r.Findings)
	r.Cautions = cautions(c)
	r.Assumptions = assumptions(e, r.Findings)
	r.Summary = append(summary(e), localLine(r.Local)...)
	r.Verdict = rule.Worst(r.Findings)
	r.Counts = counts(r.Findings)
	return r, nil
}

// said is what one rule says.
type said struct {
	rule rule.Rule
	rule.Judgement
}

// judge has every rule say what it has to say.
func (r *Review) judge(e *evidence.Evidence) []said {
	var makers []func() []said
	for _, f := range families() {
		for _, rl := range f.rules {
			makers = append(makers, func() []said { return []said{{rl, judged(e, f, rl)}} })
		}
	}
	all := inTurn(makers...)
	for _, s := range all {
		r.take(s.rule, s.Judgement)
	}
	return all
}

// judged is what a rule says, or that it is left out.
func judged(e *evidence.Evidence, f family, r rule.Rule) rule.Judgement {
	if e.Leaves(f.name) || r.Fault && e.Leaves("faults") {
		return rule.Over(omitted)
	}
	j := r.Judge(e)
	j.Findings = onSupply(j.Findings, func() []string { return append(unsaid(e.Chain()), e.Ringing()...) })
	return j
}

func (r *Review) take(rl rule.Rule, j rule.Judgement) {
	r.Findings = append(r.Findings, j.Findings...)
	if j.PassedOver != "" {
		r.PassedOver = append(r.PassedOver, rule.PassedOver{Rule: rl.ID, Because: j.PassedOver})
	}
}

func counts(findings []rule.Finding) map[rule.Verdict]int {
	n := map[rule.Verdict]int{}
	for _, v := range rule.Verdicts {
		n[v] = 0
	}
	for _, f := range findings {
		n[f.Verdict]++
	}
	return n
}

func heading(c *chain.Chain) Heading {
	return Heading{
		Title: c.Title.V, Document: c.Document.V, Revision: c.Revision.V, Owner: c.Owner.V,
		Creator: c.Creator.V, Approver: c.Approver.V, Date: c.Date.V, DocumentType: c.DocumentType.V,
	}
}

const deference = "This review is an aid to people who know high voltage. It replaces neither local electrical codes nor the judgement of licensed persons: where they ask for more, they govern. Standards were read in second-hand copies; the printed standard governs. What was not described was not judged."

// assumptions gathers what findings and figures take for granted, each once.
func assumptions(e *evidence.Evidence, findings []rule.Finding) []string {
	var all []string
	seen := map[string]bool{}
	note := func(texts []string) {
		for _, t := range texts {
			if !seen[t] {
				seen[t] = true
				all = append(all, t)
			}
		}
	}
	for _, f := range findings {
		note(f.Assumptions)
	}
	note(e.RippleAssumptions())
	note(e.StateAssumptions())
	return all
}
