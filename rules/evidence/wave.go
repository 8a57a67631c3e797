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
