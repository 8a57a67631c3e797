package evidence

import (
	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/ripple/network"
)

// periodic is the steady state of a circuit in time, by the names of its nodes.
type periodic struct{ *network.Periodic }

// solve finds the steady state of a circuit, from that of a similar one where given. Only
// the states of the nominal chain at its full drive are solved as exactly as it goes; those
// beside them swiftly, to a part in a million.
func (e *Evidence) solve(c *circuit.Circuit, near beside, swift bool) (periodic, error) {
	p, err := network.Steady(trusted(c), e.options(near, swift))
	e.tellSolved()
	return periodic{p}, err
}

// trusted is the circuit with the doubts outside the multiplier set aside: means and
// ratings do not rest on them, and whoever asks for ripple or charge meets them again.
func trusted(c *circuit.Circuit) *circuit.Circuit {
	if c.Doubt() == nil {
		return c
	}
	return c.Each(func(el *circuit.Element) bool {
		if el.Role != circuit.Ladder && el.Kind == circuit.Capacitor {
			el.Doubt = nil
		}
		return true
	})
}

// node is the one of a name. A mains that no feed joins to the chain stands still over a
// period of the drive: it is ground there, and its own peak is added where it is asked for.
func (p periodic) node(name string) (circuit.Node, error) {
	n, ok := p.Circuit.Node(name)
	if !ok && name == mainsNode {
		return circuit.Ground, nil
	}
	if !ok {
		return 0, lack.Failed("there is no node %s", name)
	}
	return n, nil
}

// between is how the voltage between two nodes moves.
func (p periodic) between(node, reference string) (network.Swing, error) {
	a, err := p.node(node)
	if err != nil {
		return network.Swing{}, err
	}
	b, err := p.node(reference)
	if err != nil {
		return network.Swing{}, err
	}
	return p.Between(a, b)
}

// rms of the voltage between two nodes.
func (p periodic) rms(node, reference string) (quantity.Voltage, error) {
	a, err := p.node(node)
	if err != nil {
		return 0, err
	}
	b, err := p.node(reference)
	if err != nil {
		return 0, err
	}
	return p.RMS(a, b)
}

func (p periodic) harmonic(node, reference string, k int) (complex128, error) {
	a, err := p.node(node)
	if err != nil {
		return 0, err
	}
	b, err := p.node(reference)
	if err != nil {
		return 0, err
	}
	return p.Harmonic(a, b, k)
}
