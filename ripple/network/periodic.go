package network

import (
	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
)

// Periodic is the periodic state of a circuit: one period of it, from phase zero
// of the drive.
type Periodic struct {
	Circuit   *circuit.Circuit
	Frequency quantity.Frequency
	Work      Work
	// Uncertainty is the largest difference of a capacitor's voltage between this
	// solution and one on a mesh about half as fine, so a bound of the error with a
	// wide margin.
	Uncertainty quantity.Voltage
	// Adrift is the part of the voltages by which charges that only leakage ties down may be
	// off, where a circuit rings so that no walk over a period comes back more exactly.
	Adrift quantity.Fraction
	// Assumptions are what was assumed beyond the description, in plain words.
	Assumptions []string

	track  *track
	swings swings
	peaks  []float64 // potentials at the peaks of the guess, no diode pressed
	trust  float64   // what the mean changed by over what it was to, where it was held; else zero
	// amplified is by how much more than what a period changes a correction was, at most.
	amplified float64
}

// periodic takes the state out of the shooter.
func (s *shooter) periodic() *Periodic {
	s.unpack(s.x, s.root, s.q, s.amps)
	w := s.work
	w.add(s.pace.work)
	w.add(s.peaks.work)
	w.Unknowns, w.States = s.n, s.states()
	s.room.give(s.pace.track)
	s.pace.factor = make([]trio, s.pattern.size()) // what was given belongs to others
	return &Periodic{Circuit: s.c, Frequency: quantity.Frequency(1 / s.period), Work: w, Assumptions: s.assumptions,
		track: s.pace.track, peaks: s.guessed()}
}

// Period is the length of the period.
func (p *Periodic) Period() quantity.Time { return quantity.Time(p.track.period) }

// span is the way between two nodes.
func (p *Periodic) span(from, to circuit.Node) (span, error) {
	s := p.track.system
	if s.frame.loose[from] != s.frame.loose[to] {
		for _, n := range []circuit.Node{from, to} {
			if err := s.frame.known(s.c, n); err != nil {
				return span{}, err
			}
		}
	}
	return s.between(from, to), nil
}

// between is the way between two nodes.
func (s *system) between(from, to circuit.Node) span {
	f := s.frame
	return span{s.at(f.group[from]), s.at(f.group[to]), f.offset[from].plus(f.offset[to], -1), -1}
}

// spanOf is the way across an element.
func (p *Periodic) spanOf(e *circuit.Element) span {
	return p.track.system.between(e.From, e.To)
}
