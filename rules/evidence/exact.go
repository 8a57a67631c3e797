package evidence

import (
	"slices"

	"kilovet/hv/circuit"
	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// Exact names the described parts of some elements whose values count as exact in every
// corner, because no tolerance of theirs is given, in the order of the circuit.
func (e *Evidence) Exact(of func(*circuit.Element) bool) []string {
	var names []string
	all := e.Layout().Elements
	for i := range all {
		t, has := toleranceOf(&all[i])
		if name := PartOf(all[i].Name); has && !t.Set() && of(&all[i]) && !slices.Contains(names, name) {
			names = append(names, name)
		}
	}
	return names
}

// toleranceOf is the tolerance of an element, where its description can give one.
func toleranceOf(el *circuit.Element) (t document.Given[quantity.Fraction], has bool) {
	switch {
	case el.ResistorPart != nil:
		return el.ResistorPart.Tolerance, true
	case el.CapacitorPart != nil:
		return el.CapacitorPart.Tolerance, true
	case el.LoosePart != nil && (el.Kind == circuit.Resistor || el.Kind == circuit.Capacitor):
		return el.LoosePart.Tolerance, true
	}
	return t, false
}
