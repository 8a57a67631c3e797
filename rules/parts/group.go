// Package parts judges what the parts of a chain are rated for.
package parts

import (
	"kilovet/hv/circuit"
	"kilovet/hv/document"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/rule"
)

// group is one described part with all the elements it stands for: a column of
// capacitors is one part.
type group struct {
	subject  string
	elements []circuit.Element
}

func (g group) names() []string {
	names := make([]string, len(g.elements))
	for i, e := range g.elements {
		names[i] = e.Name
	}
	return names
}

// groups gathers the elements that a filter keeps, by described part, in order.
func groups(e *evidence.Evidence, keep func(circuit.Element) bool) []group {
	var all []group
	at := map[string]int{}
	for _, el := range e.Layout().Elements {
		if !keep(el) {
			continue
		}
		subject := evidence.PartOf(el.Name)
		i, known := at[subject]
		if !known {
			i = len(all)
			at[subject] = i
			all = append(all, group{subject: subject})
		}
		all[i].elements = append(all[i].elements, el)
	}
	return all
}

// about starts a finding on a group with the place of the rating judged.
func about(id string, concern rule.Concern, g group, at document.Place) rule.Finding {
	if at.Line == 0 {
		at.Line, at.Column = g.elements[0].Place.Line, g.elements[0].Place.Column
	}
	return rule.Finding{Rule: id, Subject: g.subject, Concern: concern, Place: at}
}

// ratings of one part, whether it has a table of its own or is a loose one.
type ratings struct {
	voltage, pulseVoltage document.Given[quantity.Voltage]
	power                 document.Given[quantity.Power]
	energy                document.Given[quantity.Energy]
	tolerance             document.Given[quantity.Fraction]
	count, strings        int
}

func ratingsOf(el circuit.Element) ratings {
	switch {
	case el.ResistorPart != nil:
		p := el.ResistorPart
		count, strings := p.Elements()
		return ratings{p.RatedVoltage, p.RatedPulseVoltage, p.RatedPower, p.RatedEnergy, p.Tolerance, count, strings}
	case el.CapacitorPart != nil:
		return ratings{voltage: el.CapacitorPart.RatedVoltage, tolerance: el.CapacitorPart.Tolerance, count: 1, strings: 1}
	}
	p := el.LoosePart
	return ratings{p.RatedVoltage, p.RatedPulseVoltage, p.RatedPower, p.RatedEnergy, p.Tolerance, 1, 1}
}

// isA reports whether an element of a kind is a described part.
func isA(kind circuit.Kind, el circuit.Element) bool {
	loose := el.LoosePart != nil && el.LoosePart.Kind.V != "meter"
	return el.Kind == kind && (el.CapacitorPart != nil || el.ResistorPart != nil || loose)
}

// each judges every group, or says that there is none.
func each(all []group, none string, judge func(group) rule.Finding) rule.Judgement {
	if len(all) == 0 {
		return rule.Over(none)
	}
	var j rule.Judgement
	for _, g := range all {
		j.Findings = append(j.Findings, judge(g))
	}
	return j
}
