package rules

import (
	"fmt"
	"math"
	"strings"

	"kilovet/hv/chain"
	"kilovet/hv/quantity"
	"kilovet/rules/exhibit"
	"kilovet/rules/figure"
	"kilovet/rules/readings"
	"kilovet/rules/rule"
	"kilovet/rules/signoff"
)

// SignOff is what a sheet to sign holds beside the review.
type SignOff struct {
	signoff.Decision
	Code    string
	Hazards []Line // what can hurt somebody, in figures
	// Readings is what was read at a first power-up; nil where none are given.
	Readings *readings.Comparison
}

// SignOffOf decides whether a sheet is issued for a review of a chain, and for readings
// of its first power-up where there are some: then every one must be as planned.
func SignOffOf(c *chain.Chain, r *Review, required []rule.Concern, read *readings.Comparison) SignOff {
	s := SignOff{signoff.Decide(c, r.Findings, required), r.Code(required), hazards(r), read}
	switch {
	case read == nil || read.Sound:
	case read.Sign == readings.Reversed:
		s.Against = append(s.Against, "the polarity that was read is the wrong one: kilovet readings says what that points to")
	case len(read.Rows) == 0:
		s.Against = append(s.Against, "the form of readings is empty: nothing was read")
	case read.Bent:
		s.Against = append(s.Against, "every reading lies within its bounds, and yet they do not agree with each other: kilovet readings says what that points to")
	default:
		s.Against = append(s.Against, fmt.Sprintf("readings outside their bounds: %d of %d; kilovet readings says which, and what that points to", astray(read), len(read.Rows)))
	}
	return s
}

func astray(read *readings.Comparison) int {
	n := 0
	for _, row := range read.Rows {
		if !row.Within {
			n++
		}
	}
	return n
}

// Code is the short code of a sheet for the review with those concerns required.
func (r *Review) Code(required []rule.Concern) string {
	s := signoff.Subject{Program: r.Program.Name + " " + r.Program.Version, Required: required, Findings: r.Findings}
	for _, in := range r.Inputs {
		s.Inputs = append(s.Inputs, signoff.Input{Role: in.Role, SHA256: in.SHA256})
	}
	return s.Code()
}

// hazards says in figures what can hurt somebody; what has no figure is left to the
// findings.
func hazards(r *Review) []Line {
	var lines []Line
	for _, h := range []struct {
		label, id string
		of        func(figure.Figure) bool
		text      string // the value and then where
	}{
		{"voltage", "potential", nil, "up to %s to ground (mean), at %s"},
		{"stored energy", "stored.energy", whole, "up to %s in the whole chain%.0s"},
		{"charge", "stored.charge", nil, "up to %s in a short at %s"},
		{"discharge", "stored.discharge_time", whole, "%s to 60 V through what is permanent, at the slowest node%.0s"},
		{"one part open", "stored.left", nil, "up to %s stays after any time with %s open"},
		{"residue", "stored.residue", whole, "an intact ladder keeps up to %s%.0s"},
	} {
		if f, ok := largest(r.Figures, h.id, h.of); ok && f.Value != 0 {
			value := rule.Amount{Value: math.Abs(f.Value), Unit: f.Unit}.Text()
			lines = append(lines, Line{h.label, fmt.Sprintf(h.text, value, f.Subject) + stateOf(f)})
		}
	}
	for _, f := range r.Findings {
		if strings.HasPrefix(f.Rule, "xray.") {
			lines = append(lines, Line{"X-rays", fmt.Sprintf("%s, %s: %s", f.Subject, f.Verdict, f.Because)})
		}
	}
	return lines
}

func whole(f figure.Figure) bool { return f.Subject == "" }

func stateOf(f figure.Figure) string {
	if f.State == "" {
		return ""
	}
	return " (" + f.State + ")"
}

// largest is the figure of the largest magnitude under an id.
func largest(figures []figure.Figure, id string, of func(figure.Figure) bool) (most figure.Figure, found bool) {
	type pure float64
	for _, f := range figures {
		if f.ID != id || of != nil && !of(f) {
			continue
		}
		if !found || !quantity.AtMost(pure(math.Abs(f.Value)), pure(math.Abs(most.Value))) {
			most, found = f, true
		}
	}
	return most, found
}

// dispositionTable shows the dispositions of a description and the points they are about.
func dispositionTable(c *chain.Chain, findings []rule.Finding) []exhibit.Table {
	if len(c.Accepted) == 0 {
		return nil
	}
	t := exhibit.Table{
		ID: "signoff.dispositions", Chapter: exhibit.Chain, Title: "Dispositions of open points",
		Columns: []exhibit.Column{{Head: "rule and subject"}, {Head: "verdict"}, {Head: "disposition"}, {Head: "reason and record"}},
		Basis:   "[[accepted]] of the description",
		Note:    "They change no verdict. A sheet to sign counts them, by the rules of kilovet signoff.",
	}
	d := signoff.Decide(c, findings, rule.Concerns)
	row := func(a signoff.Disposition, subject, verdict string) {
		record := strings.Trim(a.Record+": "+a.Measured(), ": ")
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(strings.TrimSuffix(a.Rule+": "+subject, ": ")), exhibit.Words(verdict),
			exhibit.Words(a.Word + " by " + a.Name), exhibit.Words(strings.TrimSuffix(a.Reason+"; "+record, "; "))})
	}
	for _, p := range d.Points {
		if p.Disposition != nil {
			row(*p.Disposition, p.Finding.Subject, string(p.Finding.Verdict))
		}
	}
	for _, i := range d.Idle {
		row(i.Disposition, i.Subject, "without effect: "+i.Because)
	}
	return []exhibit.Table{t}
}
