// Package phasor solves a circuit for one frequency at a time: how much of the
// multiplier's ripple, of what strays pick up and of the mains' common mode reaches
// each node. Diodes are open but for their junction capacitance and leakage, gaps and
// sinks are open.
package phasor

import (
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Phasor is a complex voltage. It is amplitude or rms, peak or half of peak to peak,
// just as what drives the circuit was given.
type Phasor complex128

// Driven is a node held at a complex voltage to ground.
type Driven struct {
	Node    string
	Voltage Phasor
}

// Transfer is a small-signal current of Conductance·(v(Plus) − v(Minus)) from From
// to To, in siemens. Where Plus and Minus are From and To it is a plain conductance.
// Emission that falls with the bias is one from cathode to ground, or to the control
// electrode, steered by cathode less control.
type Transfer struct {
	From, To    string
	Plus, Minus string
	Conductance float64
}

// Conductance is a plain conductance between two nodes, in siemens.
func Conductance(from, to string, siemens float64) Transfer {
	return Transfer{from, to, from, to, siemens}
}

// Excitation is what drives the circuit; all that is not named in it is quiet, and a
// quiet source is a connection.
type Excitation struct {
	Nodes  []Driven
	Source string // name of the one source that is active with its amplitude; empty for none
	// Ladder keeps the elements of the multiplier, its drive quiet. Leave it out where
	// driven nodes stand for the multiplier.
	Ladder bool
	Extra  []Transfer
}

// Response is the complex voltage of all nodes.
type Response struct {
	circuit *circuit.Circuit
	v       []complex128
	loose   []bool
}

// Solve finds the response at a frequency above zero. Capacitances and the like that
// the circuit doubts are a lack, as is a node or source the circuit has not, or one
// driven two ways.
func Solve(c *circuit.Circuit, f quantity.Frequency, x Excitation) (*Response, error) {
	if f <= 0 {
		return nil, lack.Range("phasors need a frequency above zero, not %g Hz", float64(f))
	}
	s := system{circuit: c, omega: 2 * math.Pi * float64(f), excitation: x}
	if err := s.collect(); err != nil {
		return nil, err
	}
	return s.solve()
}

// At is the complex voltage of a node to ground; a lack where nothing fixes it.
func (r *Response) At(node string) (Phasor, error) {
	n, there := r.circuit.Node(node)
	if !there {
		return 0, lack.Failed("there is no node %s", node)
	}
	if r.loose[n] {
		return 0, lack.Failed("%s floats: nothing joins it to the rest", node)
	}
	return Phasor(r.v[n]), nil
}

// Between is the complex voltage of one node above another.
func (r *Response) Between(node, reference string) (Phasor, error) {
	a, err := r.At(node)
	if err != nil {
		return 0, err
	}
	b, err := r.At(reference)
	return a - b, err
}
