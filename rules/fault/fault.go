// Package fault is the library of what can fail in a chain and of what can be assembled
// wrongly, one thing at a time: each a change of the chain's circuit, with what it is
// and what helps. It judges the chain with each of them in turn.
package fault

import (
	"strings"

	"kilovet/hv/circuit"
	"kilovet/rules/evidence"
)

// LadderReversed is the name of the fault that every diode of the multiplier is the wrong
// way round.
const LadderReversed = "whole ladder reversed"

// Kind is what happens to a part.
type Kind string

// The kinds of fault.
const (
	Open     Kind = "open"
	Shorted  Kind = "shorted"
	Reversed Kind = "reversed"
	Value    Kind = "value" // off by a factor
	Lost     Kind = "lost"  // a function or a connection that is not there any more
	Arc      Kind = "arc"
)

// Fault is one thing that failed or was assembled wrongly.
type Fault struct {
	Name     string // "multiplier.diode.3 open", unique in a chain
	Class    string // "diode open"
	Part     string // the element or connection concerned, as the circuit names it
	Kind     Kind
	Assembly bool // an error of assembly, there from the first power-up on
	// Lifts are nodes that are at ground as long as all is well, and within reach: what
	// the fault puts on them can be touched.
	Lifts []string
	// Add is what helps against its consequences.
	Add string

	edit  func(*circuit.Circuit) *circuit.Circuit
	loop  evidence.Loop
	whole bool // the part is no part any more
}

// Condition is the chain at work with the fault.
func (f Fault) Condition() evidence.Condition {
	return evidence.Condition{State: evidence.Working, Fault: f.Change()}
}

// Change is the fault as a change of the circuit.
func (f Fault) Change() evidence.Fault {
	return evidence.Fault{Name: f.Name, Edit: f.edit, Loop: f.loop, Part: f.Part, Gone: f.whole,
		Strains: f.strains(),
		Cuts:    strings.HasPrefix(f.Part, "multiplier.diode") && f.Kind != Shorted}
}

// strains reports whether the regulation is likely to end at its limit: with a fault of the
// ladder, with what pulls the output to ground, and with a divider that reads nothing.
func (f Fault) strains() bool {
	on := func(part string) bool { return strings.HasPrefix(f.Part, part) }
	switch {
	case f.Kind == Value:
		return false
	case f.Kind == Arc, on("multiplier"), on("earth link"):
		return true
	case on("divider"):
		return f.whole
	}
	return f.whole && f.Kind == Shorted && (on("bleeder") || on("cable") || on("heater.feed") || strings.HasSuffix(f.Part, ".capacitor"))
}

// Of lists every fault and every error of assembly of a chain, in the order of its
// circuit; none where no supply is described.
func Of(e *evidence.Evidence) []Fault {
	if !e.HasSupply() {
		return nil
	}
	l := &lister{chain: e.Chain(), circuit: e.Layout()}
	for _, el := range l.circuit.Elements {
		l.element(el)
	}
	l.connections()
	l.functions()
	l.arcs()
	l.assembly()
	return l.all
}
