package people

import (
	"strings"

	"kilovet/hv/circuit"
	"kilovet/rules/evidence"
)

// slow lists the corners in which charge may stay longest: nominal, and everything at the
// high end of its tolerance.
func slow() []evidence.Corner { return []evidence.Corner{evidence.Nominal, evidence.AllHigh} }

// exact is what is taken for granted of parts without a tolerance: nothing where each of
// them has one.
func exact(e *evidence.Evidence, of func(*circuit.Element) bool) []string {
	names := e.Exact(of)
	switch len(names) {
	case 0:
		return nil
	case 1:
		return []string{"the value of " + names[0] + " is exact: its tolerance is not given"}
	}
	last := len(names) - 1
	return []string{"the values of " + strings.Join(names[:last], ", ") + " and " + names[last] + " are exact: their tolerances are not given"}
}

// holds reports whether an element holds charge.
func holds(el *circuit.Element) bool { return el.Kind == circuit.Capacitor }

// discharges reports whether an element holds charge or leads it away for good.
func discharges(el *circuit.Element) bool {
	return holds(el) || el.Kind == circuit.Resistor && el.Permanent && (el.Role == circuit.Load || el.Role == circuit.Series)
}

// at gives the elements with an end at a node.
func at(e *evidence.Evidence, node string) func(*circuit.Element) bool {
	n, there := e.Layout().Node(node)
	return func(el *circuit.Element) bool { return there && (el.From == n || el.To == n) }
}
