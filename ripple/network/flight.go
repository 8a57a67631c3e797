package network

import (
	"math"
	"math/cmplx"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// flight follows a circuit from a state on, step by step, with nothing to come back to.
type flight struct {
	*pace
	ledger *ledger
	phase  float64 // of the drive at the start
	swings bool    // an alternating source is on
	whole  float64 // energy measure at the start
	before []float64
}

// slow is the rate, in 1/s, at which diodes without leakage lose their charge in a
// flight: never within any time that is asked for.
const slow = 1e-12

// mostSteps is the number of steps after which a flight is given up.
const mostSteps = 50000

// unnoticed is the excess of a diode that does not count in a flight, in parts of the
// largest voltage: a diode that switches at it and not at its drop passes microamperes at
// tens of kilovolts, for as long as it takes to pass it.
const unnoticed = 1e-8

func newFlight(c *circuit.Circuit, from State) (*flight, error) {
	s, err := newSystem(c, float64(Drive(c)), slow, nil)
	if err != nil {
		return nil, err
	}
	f := &flight{pace: &pace{walker: newWalker(s), track: &track{system: s}, bounds: fine.bounds()}, ledger: newLedger(s), phase: from.phase}
	for i := range c.Elements {
		o := wave(&c.Elements[i], 1/s.period)
		f.swings = f.swings || o.sine != 0 || o.square != 0
	}
	if !f.swings {
		f.longest = math.Inf(1)
	}
	f.load(from)
	return f, nil
}

// load puts the state in: the charges of the capacitors, whatever the nodes are.
func (f *flight) load(from State) {
	f.place(make([]float64, f.n), f.amps, f.on)
	for i := range f.capacitors {
		c := &f.capacitors[i]
		v := from.volts[f.c.Elements[c.element].Name]
		f.before = append(f.before, v)
		c.inject(f.q, c.value*v)
		f.scale = math.Max(f.scale, math.Abs(v))
	}
	for i := range f.inductors {
		f.walker.amps[i] = from.amps[f.c.Elements[f.inductors[i].element].Name]
	}
	f.wave = cmplx.Rect(1, 2*math.Pi*from.phase)
	if from.phase >= 0.5 {
		f.sign = -1
	}
	f.switched()
	f.measure()
	f.whole = f.energy
	f.tolerate(0)
	for i := range f.slack {
		f.slack[i] = math.Max(f.slack[i], unnoticed*f.scale)
	}
	f.burst = f.grain
}

// measure takes what the capacitors hold as the measure of roughness, so that a
// decay stays as exact in proportion all the way down.
func (f *flight) measure() {
	sum := 0.0
	for i := range f.capacitors {
		c := &f.capacitors[i]
		v := f.before[i]
		if len(f.track.steps) > 0 {
			v = c.volts(f.u, f.sign, imag(f.wave))
		}
		sum += c.weight * v * v
	}
	f.energy = math.Max(math.Sqrt(sum), 1e-6*f.whole)
	if f.swings {
		f.energy = math.Max(f.energy, f.measureOfEnergy())
	}
	if f.energy == 0 {
		f.energy = f.measureOfEnergy()
	}
}

// run goes on until an instant or until told to stop.
func (f *flight) run(until float64, stop func() bool) error {
	if err := f.settleFor(f.grain); err != nil {
		return err
	}
	f.lastStep().jump = true
	f.ledger.enter(f.track)
	for steps := 0; f.time < until && !stop(); steps++ {
		if steps > mostSteps {
			return lack.Failed("after %d steps only %v had gone by", steps, quantity.Time(f.time))
		}
		if err := f.goOn(until); err != nil {
			return err
		}
	}
	return nil
}

// goOn takes one step, over a jump of the square wave where one is due.
func (f *flight) goOn(until float64) error {
	f.track.clear()
	edge := math.Inf(1)
	if f.square {
		edge = f.nextEdge()
	}
	if err := f.step(math.Min(until, edge)); err != nil {
		return err
	}
	if f.time >= edge {
		f.sign = -f.sign
		f.switched()
		if err := f.settleFor(f.grain); err != nil {
			return err
		}
		f.lastStep().jump = true
	}
	f.ledger.enter(f.track)
	f.measure()
	return nil
}

// nextEdge is the next instant at which the square wave jumps.
func (f *flight) nextEdge() float64 {
	half := f.time/f.period*2 + f.phase*2
	next := math.Floor(half+1e-9) + 1
	return (next - 2*f.phase) / 2 * f.period
}
