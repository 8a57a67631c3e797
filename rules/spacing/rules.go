// Package spacing judges gaps and surfaces: whether all are described, and whether
// they are wide enough.
package spacing

import (
	"kilovet/hv/chain"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/rules/evidence"
	"kilovet/rules/rule"
)

// Rules lists the rules of this family.
func Rules() []rule.Rule {
	return []rule.Rule{described, clearance, creepage, breakdown, corona, junction, annulus, weakest}
}

func finding(id string, concern rule.Concern, relation rule.Relation, s *chain.Spacing) rule.Finding {
	f := rule.Finding{Rule: id, Concern: concern, Relation: relation}
	if s != nil {
		f.Subject, f.Place = s.Name.V, s.Here()
	}
	return f
}

// each judges every spacing, or says that there is none.
func each(e *evidence.Evidence, judge func(*chain.Spacing) (rule.Finding, string)) rule.Judgement {
	if len(e.Spacings()) == 0 {
		return rule.Over("no spacing is described")
	}
	var j rule.Judgement
	for _, s := range e.Spacings() {
		f, over := judge(s)
		if over != "" {
			j.PassedOver = over
			j.Exempt = append(j.Exempt, rule.Exempt{Subject: s.Name.V, Because: over})
			continue
		}
		j.Findings = append(j.Findings, told(f, s))
	}
	if len(j.Findings) > 0 {
		j.PassedOver = ""
	}
	return j
}

// concern is what a spacing is there for: life unless it only has to work.
func concern(s *chain.Spacing) rule.Concern {
	if s.Insulation.V == "functional" {
		return rule.Equipment
	}
	return rule.Life
}

// shown are the values of other sources, as sources that do not govern.
func shown[Q quantity.Number](a gap.Answer[Q]) []rule.Source {
	var all []rule.Source
	for _, b := range a.Shown {
		all = append(all, rule.Source{Text: b.Source.Text + ": " + quantity.Text(b.Value), Mark: rule.Mark(b.Source.Mark)})
	}
	return all
}
