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

	track *track
	guess []float64 // voltages of the capacitors that the search started from
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
		track: s.pace.track, guess: s.guessed()}
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

// startFrom corrects the guess by as much as the guess for a similar circuit had to
// be corrected, capacitor by capacitor: that changes little where the drive, a load
// or a value does. What was corrected is taken as a charge, since that is what loads take
// from a capacitor, and in proportion to the drive, with which most loads go.
func (s *shooter) startFrom(p *Periodic) {
	correction := map[string]float64{}
	t := p.track
	for i := range t.capacitors {
		c := &t.capacitors[i]
		reached := c.volts(t.potentials(0, 3), t.steps[0].sign, t.steps[0].sine[3])
		correction[t.c.Elements[c.element].Name] = c.value * (reached - p.guess[i])
	}
	drive := s.scale / t.scale
	for k := range s.q {
		s.q[k] = 0
	}
	for i, v := range s.guessed() {
		c := &s.capacitors[i]
		c.inject(s.q, c.value*v+drive*correction[s.c.Elements[c.element].Name])
	}
	s.pack(s.q, s.amps, s.root, s.x)
}

// guessed are the voltages of the capacitors at the negative peak of the guess, no diode
// pressed.
func (s *shooter) guessed() []float64 {
	if s.pressed != 0 {
		s.pressed = 0
		s.balance(s.step)
	}
	v := make([]float64, len(s.capacitors))
	for i := range v {
		v[i] = s.capacitors[i].volts(s.peaks.u[s.n:], -1, -1)
	}
	return v
}
