package readings

import (
	"math"
	"strings"

	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/fault"
)

// hypothesis is one thing that may be wrong with the chain.
type hypothesis struct {
	name   string
	change evidence.Fault
	off    *amount // nil where it is all or nothing
}

// amount is by how much a part is off in one way. Those of one scale follow each other
// towards the healthy part.
type amount struct {
	scale  string // "divider.upper too low,"
	size   string // "0.3"
	unit   string // "of its value"
	beyond string // what lies between this one, the last of its scale, and a healthy part: "above"
}

func (a amount) text(size string) string {
	return strings.TrimSpace(a.scale + " " + size + " " + a.unit)
}

// hypotheses lists every fault and error of assembly of the library, and parts that
// are merely off: their values by a factor, diodes that leak.
func hypotheses(e *evidence.Evidence) []hypothesis {
	var all []hypothesis
	for _, f := range fault.Of(e) {
		all = append(all, hypothesis{name: f.Name, change: f.Change()})
	}
	for _, el := range e.Layout().Elements {
		all = append(all, drifted(el)...)
	}
	return all
}

// drifted are the ways in which a part may be off without having failed.
func drifted(el circuit.Element) []hypothesis {
	switch {
	case el.Kind == circuit.Diode && el.Role == circuit.Ladder:
		return leaking(el.Name)
	case el.Kind == circuit.Capacitor && el.CapacitorPart != nil:
		return offValue(el.Name, func(x *circuit.Element, k float64) { x.Capacitance *= quantity.Capacitance(k) })
	case el.Kind == circuit.Resistor && el.Resistance > 0 && el.ResistorPart != nil:
		return offValue(el.Name, func(x *circuit.Element, k float64) { x.Resistance *= quantity.Resistance(k) })
	}
	return nil
}

func leaking(diode string) []hypothesis {
	var all []hypothesis
	for _, r := range [...]quantity.Resistance{10e3, 100e3, 1e6, 10e6, 100e6} {
		a := amount{diode + " leaking,", quantity.Text(r), "", "above"}
		all = append(all, hypothesisOf(diode, a, func(x *circuit.Element) { x.Rectifier.Leakage = math.Max(x.Rectifier.Leakage, 1/float64(r)) }))
	}
	return all
}

func offValue(part string, change func(*circuit.Element, float64)) []hypothesis {
	var all []hypothesis
	add := func(scale, unit, beyond string, factors ...float64) {
		for _, k := range factors {
			a := amount{part + " " + scale + ",", quantity.Significant(k), unit, beyond}
			all = append(all, hypothesisOf(part, a, func(x *circuit.Element) { change(x, k) }))
		}
	}
	add("too low", "of its value", "above", 0.01, 0.1, 0.3, 0.6)
	add("too high", "times its value", "below", 10, 3, 1.6)
	return all
}

func hypothesisOf(part string, a amount, edit func(*circuit.Element)) hypothesis {
	name := a.text(a.size)
	return hypothesis{name, evidence.Fault{Name: name, Edit: func(c *circuit.Circuit) *circuit.Circuit { return c.With(part, edit) }}, &a}
}

// both is a change upon another.
func both(one, other evidence.Fault) evidence.Fault {
	switch {
	case one.Edit == nil:
		return other
	case other.Edit == nil:
		one.Name += ", " + other.Name
		return one
	}
	joint := one
	joint.Name += ", " + other.Name
	joint.Edit = func(c *circuit.Circuit) *circuit.Circuit { return other.Edit(one.Edit(c)) }
	return joint
}
