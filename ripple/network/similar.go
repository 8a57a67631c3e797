package network

import "kilovet/hv/circuit"

// similar is what a search starts from: a state of a similar circuit, and of two others
// that differ as the circuit at hand does from that one; nil where there are none.
type similar struct {
	state, before, after *Periodic
	loose                bool // hardly more than leakage holds the state: no haste is made from it
}

// loosely is how many times what a period changes a correction may be for a swift search from
// that state: where hardly more than leakage ties a column down, the charges come back to 1e-5 of
// what the diodes pass while voltages are hundredths off. With a fault that has to do: what such
// a column comes to hangs on leakages that nobody knows as well.
const loosely = 1e5

// similar is nil where there is no state to start from.
func (o *Options) similar() *similar {
	if o.From == nil {
		return nil
	}
	return &similar{o.From, o.Before, o.After, !o.walking && o.From.amplified > loosely}
}

// corrections are the charges by which the guess of a state had to be corrected, by
// capacitor, for each volt of the drive: they are what loads take from it, and most loads go
// with the drive.
func (p *Periodic) corrections() map[string]float64 {
	t, all := p.track, map[string]float64{}
	for i := range t.capacitors {
		c := &t.capacitors[i]
		reached := c.volts(t.potentials(0, 3), t.steps[0].sign, t.steps[0].sine[3])
		guessed := c.volts(p.peaks[t.n:], -1, -1)
		all[t.c.Elements[c.element].Name] = c.value * (reached - guessed) / t.scale
	}
	return all
}

// corrections are those that a similar circuit leads to expect.
func (o *similar) corrections() map[string]float64 {
	all := o.state.corrections()
	if o.before == nil {
		return all
	}
	before := o.before.corrections()
	for name, after := range o.after.corrections() {
		all[name] += after - before[name]
	}
	return all
}

// startFrom corrects the guess by as much as the guess for a similar circuit had to
// be corrected, capacitor by capacitor: that changes little where the drive, a load
// or a value does.
func (s *search) startFrom(o *similar) {
	s.aimBeside(o.state)
	correction, guess := o.corrections(), s.guessed()
	for k := range s.q {
		s.q[k] = 0
	}
	for i := range s.capacitors {
		c := &s.capacitors[i]
		c.inject(s.q, c.value*c.volts(guess[s.n:], -1, -1)+s.scale*correction[s.c.Elements[c.element].Name])
	}
	s.pack(s.q, s.amps, s.root, s.x)
}

// aimBeside guesses the drive from the circuit between the peaks, as far beside which the
// mean stands as that of the similar circuit stood beside its own.
func (s *search) aimBeside(p *Periodic) {
	l := s.level
	if l == nil {
		return
	}
	n, there := p.Circuit.Node(l.node)
	if !there {
		return
	}
	span := p.track.between(n, circuit.Ground)
	m := p.track.n
	beside := float64(p.swing(&span).Mean) - middle(&span, p.peaks[:m], p.peaks[m:])
	if p.trust != 0 {
		l.trust = p.trust
	}
	const passes = 2
	for range passes {
		if f := (l.set - beside) / s.foreseen(); f > 0.5 && f < 2 {
			s.driveTo(l.drive * f)
		}
	}
}

// guessed are the potentials at the peaks of the guess, no diode pressed.
func (s *shooter) guessed() []float64 {
	if s.pressed != 0 {
		s.pressed = 0
		s.balance(s.step)
	}
	return append([]float64(nil), s.peaks.u...)
}
