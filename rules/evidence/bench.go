package evidence

import (
	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/hv/steady"
)

// Reads is the magnitude of the mean voltage between two nodes: what a voltmeter shows.
// What is left of the difference of two equal potentials is nothing. Of the mains it tells
// nothing, a lack: that it reads nothing there does not say that there is none.
func (e *Evidence) Reads(at, to string) (quantity.Voltage, error) {
	if e.OnMains(at) || e.OnMains(to) {
		return 0, lack.Failed("the mains alternates: a voltmeter for direct voltage shows nothing of it")
	}
	s, err := e.swing(at, to)
	if err != nil {
		return 0, err
	}
	stands, err := e.swing(at, "ground")
	if magnitude(s.Mean) < alikeShare*stands.Peak() {
		return 0, err
	}
	return magnitude(s.Mean), err
}

// alikeShare is the share of a potential below which two nodes have the same.
const alikeShare = 1e-9

// ReturnCurrent is the magnitude of the mean current in the return of the multiplier:
// what the lowest diodes pass, since capacitors pass none.
func (e *Evidence) ReturnCurrent() (quantity.Current, error) {
	s, err := e.solution()
	if err != nil {
		return 0, err
	}
	foot, err := s.node("foot")
	if err != nil {
		return 0, err
	}
	var total quantity.Current
	for _, el := range s.Circuit.Elements {
		if el.Kind != circuit.Diode || el.Role != circuit.Ladder || el.From != foot && el.To != foot {
			continue
		}
		f, err := s.Through(el.Name)
		if err != nil {
			return 0, err
		}
		if el.From == foot {
			total += f.Mean
		} else {
			total -= f.Mean
		}
	}
	return max(total, -total), nil
}

// Ohms is what an ohmmeter reads between two nodes with everything off.
func (e *Evidence) Ohms(from, to string) (quantity.Resistance, error) {
	c, err := e.Circuit()
	if err != nil {
		return 0, err
	}
	return steady.Ohms(c, from, to)
}
