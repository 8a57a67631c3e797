package evidence

import (
	"kilovet/hv/circuit"
	"kilovet/ripple/network"
)

// Wave is the wave-form of a node's potential over one period of the drive.
func (e *Evidence) Wave(node string) ([]network.Point, error) {
	s, err := e.solution()
	if err != nil {
		return nil, err
	}
	n, err := s.node(node)
	if err != nil {
		return nil, err
	}
	return s.Wave(n, circuit.Ground)
}

// Losses lists the mean power that every resistor, diode and load takes up.
func (e *Evidence) Losses() ([]network.Loss, error) {
	s, err := e.solution()
	if err != nil {
		return nil, err
	}
	return s.Periodic.Losses(), nil
}

// harmonics are the first so many of a voltage.
func (p periodic) harmonics(node, reference string, orders int) ([]complex128, error) {
	a, err := p.node(node)
	if err != nil {
		return nil, err
	}
	b, err := p.node(reference)
	if err != nil {
		return nil, err
	}
	return p.Harmonics(a, b, orders)
}
