package readings

import (
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/fault"
)

// hypothesis is one thing that may be wrong with the chain.
type hypothesis struct {
	name   string
	change evidence.Fault
	// scale is the part and the way in which it is off, where it may be off by more or
	// less; neighbours of one scale follow each other. Size says by how much.
	scale, size string
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

// off are the factors by which a value is tried.
var off = [...]float64{0.1, 0.3, 0.6, 1.6, 3, 10}

// leaks are the resistances that a leaking diode is tried with.
var leaks = [...]quantity.Resistance{100e6, 10e6, 1e6, 100e3, 10e3}

// drifted are the ways in which a part may be off without having failed.
func drifted(el circuit.Element) []hypothesis {
	var all []hypothesis
	add := func(what, size string, edit func(*circuit.Element)) {
		h := hypothesis{scale: el.Name + " " + what, size: size}
		h.name = h.scale + " " + size
		h.change = evidence.Fault{Name: h.name, Edit: func(c *circuit.Circuit) *circuit.Circuit { return c.With(el.Name, edit) }}
		all = append(all, h)
	}
	value := func(change func(*circuit.Element, float64)) {
		for _, k := range off {
			add("off by a factor of", quantity.Significant(k), func(x *circuit.Element) { change(x, k) })
		}
	}
	switch {
	case el.Kind == circuit.Diode && el.Role == circuit.Ladder:
		for _, r := range leaks {
			add("leaking", quantity.Text(r), func(x *circuit.Element) { x.Rectifier.Leakage = math.Max(x.Rectifier.Leakage, 1/float64(r)) })
		}
	case el.Kind == circuit.Capacitor && el.CapacitorPart != nil:
		value(func(x *circuit.Element, k float64) { x.Capacitance *= quantity.Capacitance(k) })
	case el.Kind == circuit.Resistor && el.Resistance > 0 && el.ResistorPart != nil:
		value(func(x *circuit.Element, k float64) { x.Resistance *= quantity.Resistance(k) })
	}
	return all
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
