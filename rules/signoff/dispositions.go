package signoff

import (
	"fmt"
	"slices"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/rules/rule"
)

// Disposition is what is to become of an open point, and who answers for it.
type Disposition struct {
	Rule, Subject       string
	Word                string // accepted, restricted, measured
	Name, Reason        string
	Record, Measurement string // of a measurement; may be empty
	Instrument, Date    string // of it, where the measurement itself does not say them
	Place               document.Place
}

// Measured is what was measured, with what and when.
func (d Disposition) Measured() string {
	text := d.Measurement
	if d.Instrument != "" {
		text += ", " + d.Instrument
	}
	if d.Date != "" {
		text += ", " + d.Date
	}
	return text
}

// Dispositions are those of a description.
func Dispositions(c *chain.Chain) []Disposition {
	var all []Disposition
	for _, a := range c.Accepted {
		all = append(all, Disposition{a.Rule.V, a.Subject.V, a.Disposition.V, a.Name.V, a.Reason.V, a.Record.V, a.Measurement.V, a.Instrument.V, a.Date.V, a.Rule.Place})
	}
	return all
}

// about reports whether a disposition is about a finding: its rule and subject, or the
// only finding of its rule where it names no subject.
func about(d Disposition, f rule.Finding, findings []rule.Finding) bool {
	if d.Rule != f.Rule {
		return false
	}
	if d.Subject != "" {
		return d.Subject == f.Subject
	}
	return count(d.Rule, findings) == 1
}

func count(id string, findings []rule.Finding) int {
	n := 0
	for _, f := range findings {
		if f.Rule == id {
			n++
		}
	}
	return n
}

// idle says why a disposition has no effect.
func idle(d Disposition, findings []rule.Finding) string {
	n := count(d.Rule, findings)
	switch {
	case n == 0:
		return "the rule judges nothing here"
	case d.Subject == "":
		if n == 1 {
			return "the rule is met"
		}
		return fmt.Sprintf("the rule judges %d things: name the subject", n)
	}
	var subjects []string
	for _, f := range findings {
		if f.Rule == d.Rule && f.Subject == d.Subject {
			return "the rule is met there"
		}
		if f.Rule == d.Rule {
			subjects = append(subjects, f.Subject)
		}
	}
	if near, ok := document.Nearest(d.Subject, subjects); ok {
		return fmt.Sprintf("the rule judges nothing of this name; was %q meant?", near)
	}
	return "the rule judges nothing of this name"
}

// Faults are the dispositions of a description that name no rule.
func Faults(c *chain.Chain, ids []string) document.Faults {
	var faults document.Faults
	for _, a := range c.Accepted {
		if a.Rule.V == "" || slices.Contains(ids, a.Rule.V) {
			continue
		}
		remedy := "kilovet basis lists the rules"
		if near, ok := document.Nearest(a.Rule.V, ids); ok {
			remedy = fmt.Sprintf("was %q meant? ", near) + remedy
		}
		faults = append(faults, document.Fault{Code: "rule", Key: a.Rule.Key, Line: a.Rule.Line, Column: a.Rule.Column, What: fmt.Sprintf("there is no rule %q", a.Rule.V), Remedy: remedy})
	}
	return faults
}
