package network

import (
	"math"
	"slices"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// ArcOptions say where an arc strikes and how it is followed.
type ArcOptions struct {
	From, To   circuit.Node        // To is ground by default
	Resistance quantity.Resistance // of the arc; zero is an ideal short
	// Hold is the current below which the arc counts as ceased; zero is 1 mA.
	Hold quantity.Current
	// Until is how long it is followed at most; zero is 100 periods of the drive, and
	// 100 s where no alternating source is on.
	Until quantity.Time
}

// Discharge is what an arc did.
type Discharge struct {
	// Stresses of every element, the arc among them as "arc".
	Stresses
	Charge quantity.Charge // through the arc, from From to To
	Energy quantity.Energy // in the arc, and in the ideal connections that share out charge at once
	Ceased quantity.Time   // from when on its current is below Hold
	// Held and Left are the energies of all capacitances and inductors before and at
	// the end.
	Held, Left quantity.Energy
	// Burning is set where the current was not below Hold at the end.
	Burning bool
	Work    Work

	peak    quantity.Current
	impulse bool
}

// Peak is the largest current of the arc. It is a lack where an ideal short meets a
// capacitance without resistance.
func (d *Discharge) Peak() (quantity.Current, error) {
	if d.impulse {
		return 0, lack.Failed("nothing limits the current of an ideal short across a capacitor")
	}
	return d.peak, nil
}

// Arc follows a circuit from a state on after an arc has struck between two nodes.
// Whether drive and loads are on is the circuit's to say: with the amplitude of a
// source at zero the source is a short. The arc is a resistance and does not go out
// by itself; it counts as ceased once its current stays below Hold.
func Arc(c *circuit.Circuit, from State, o ArcOptions) (*Discharge, error) {
	f, err := newFlight(struck(c, o), from)
	if err != nil {
		return nil, err
	}
	a := &arc{flight: f, hold: float64(o.Hold), index: len(c.Elements)}
	view := Periodic{Circuit: f.c, track: f.track}
	a.branches = view.branches(a.index, true)
	if a.hold == 0 {
		a.hold = 1e-3
	}
	until := float64(o.Until)
	if until == 0 {
		until = 100
		if f.swings {
			until = 100 * f.period
		}
	}
	if err := f.run(until, a.ceased); err != nil {
		return nil, err
	}
	return a.result(), nil
}

// struck is the circuit with the arc in it.
func struck(c *circuit.Circuit, o ArcOptions) *circuit.Circuit {
	with := *c
	with.Elements = append(slices.Clone(c.Elements), circuit.Element{
		Name: "arc", Kind: circuit.Resistor, Role: circuit.Limiter, From: o.From, To: o.To, Resistance: o.Resistance})
	return &with
}

// arc is an arc under way.
type arc struct {
	*flight
	hold     float64
	index    int
	branches []branch // of the arc
	last     float64  // instant at which the current was last above hold
	begun    bool
	moved    float64 // charge shared out at once
	held     float64 // energy before
	wasted   float64 // energy lost in that
}

// ceased looks at the last step; it ends a flight without drive once the current has
// been small for three times as long as it was not.
func (a *arc) ceased() bool {
	if !a.begun {
		a.begun = true
		a.share()
	}
	view := Periodic{Circuit: a.c, track: a.track}
	for k := range a.track.steps {
		y := view.current(a.branches, k)
		for j := range y {
			if math.Abs(y[j]) >= a.hold && j > 0 {
				a.last = a.track.steps[k].start + a.track.steps[k].length
			}
		}
	}
	return !a.swings && a.time > 4*a.last+a.period
}

// share is what moves at once when ideal connections join capacitors.
func (a *arc) share() {
	for i := range a.branches {
		b := &a.branches[i]
		for k := range a.capacitors {
			if c := &a.capacitors[k]; &a.c.Elements[c.element] == b.element {
				a.moved += b.sign * c.value * (a.track.stages(0, &b.span)[3] - a.before[k])
			}
		}
	}
	for k := range a.capacitors {
		a.held += a.capacitors[k].value / 2 * a.before[k] * a.before[k]
	}
	for i := range a.inductors {
		a.held += a.inductors[i].value / 2 * a.walker.amps[i] * a.walker.amps[i]
	}
	a.wasted = a.held - a.stored()
}

// stored is the energy of all capacitances and inductors.
func (a *arc) stored() float64 {
	sum := 0.0
	for k := range a.capacitors {
		c := &a.capacitors[k]
		v := c.volts(a.u, a.sign, imag(a.wave))
		sum += c.value / 2 * v * v
	}
	for i := range a.inductors {
		sum += a.inductors[i].value / 2 * a.walker.amps[i] * a.walker.amps[i]
	}
	return sum
}

func (a *arc) result() *Discharge {
	s := a.ledger.of[a.index]
	d := &Discharge{Stresses: a.ledger.Stresses, Charge: s.Charge + quantity.Charge(a.moved), Energy: s.Energy,
		Held: quantity.Energy(a.held), Left: quantity.Energy(a.stored()),
		Ceased: quantity.Time(a.last), Burning: a.last > 0.99*a.time, Work: a.work, peak: s.Peak}
	d.impulse = isTie(&a.c.Elements[a.index]) && math.Abs(a.moved) > 1e-9*a.typical*a.scale
	if d.impulse {
		d.Energy += quantity.Energy(a.wasted)
	}
	return d
}
