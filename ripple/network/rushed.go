package network

import (
	"math"

	"kilovet/hv/lack"
)

// A period is walked in a rush where more than this part of it is settlings, one short
// step after another.
const rushed = 1e-2

// inSettlings is the part of the period that was walked in settlings.
func (p *Periodic) inSettlings() float64 {
	sum := 0.0
	for i := range p.track.steps {
		if s := &p.track.steps[i]; s.euler {
			sum += s.length
		}
	}
	return sum / p.track.period
}

// astray is the part of the power that may be left over in a rush.
const astray = 1e-4

// sober refuses a state whose power does not balance after a walk in a rush: then rounding
// has decided which diodes conduct, and stiff resistors make much of what it leaves.
func (p *Periodic) sober() error {
	if p.inSettlings() < rushed {
		return nil
	}
	taken, given := 0.0, 0.0
	for i := range p.Circuit.Elements {
		name := p.Circuit.Elements[i].Name
		if _, err := p.Through(name); err != nil {
			return nil // an impulse, whose power nothing limits
		}
		w := float64(p.Power(name))
		taken, given = taken+w, given+math.Abs(w)
	}
	if math.Abs(taken) > astray*given+p.rounding() {
		return lack.Failed("rounding decides which diodes conduct: the powers of the parts do not balance")
	}
	return nil
}

// rounding is the power that rounding alone may leave, however little the rest is: of
// the energy that the largest capacitance swings with, over hundreds of steps, and of the
// current of the steepest diode or inductance, whose voltage and drop are known to 52 bits.
func (p *Periodic) rounding() float64 {
	const least = 1e-30 // W: a circuit without a source rests at what is left of numbers
	peak, roomiest, steepest := 0.0, 0.0, 0.0
	for i := range p.Circuit.Elements {
		e := &p.Circuit.Elements[i]
		peak = max(peak, float64(e.Wave.Amplitude), float64(e.Rectifier.Drop))
		roomiest = max(roomiest, float64(e.Capacitance))
		if e.Inductance > 0 {
			steepest = max(steepest, 1/(float64(e.Resistance)+float64(e.Inductance)*float64(p.Frequency)))
		}
	}
	for i := range p.track.diodes {
		steepest = max(steepest, p.track.diodes[i].on)
	}
	charge := (1e-9*p.track.typical + 1e-12*roomiest) * float64(p.Frequency)
	return peak*peak*(charge+0x1p-52*steepest) + least
}
