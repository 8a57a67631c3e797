package network

import (
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
)

// State is what a circuit holds at an instant: the voltage of every capacitance and
// the current of every inductor, by the names of the elements, and where the drive
// stands. The zero State is everything discharged and the drive at phase zero.
type State struct {
	volts map[string]float64
	amps  map[string]float64
	phase float64 // part of the drive's period gone by
}

// State is the state at an instant of the period.
func (p *Periodic) State(at quantity.Time) State {
	t := p.track
	phase := math.Mod(float64(at)/t.period, 1)
	k := t.stepAt(phase * t.period)
	st := &t.steps[k]
	x := math.Max(0, math.Min(1, (phase*t.period-st.start)/st.length))
	s := State{map[string]float64{}, map[string]float64{}, phase}
	for i := range t.capacitors {
		c := &t.capacitors[i]
		y := t.stages(k, &c.span)
		v := y.polynomial(st.euler)
		s.volts[t.c.Elements[c.element].Name] = v.at(x)
	}
	for i := range t.inductors {
		y := samples{t.currents(k, 0)[i], t.currents(k, 1)[i], t.currents(k, 2)[i], t.currents(k, 3)[i]}
		a := y.polynomial(st.euler)
		s.amps[t.c.Elements[t.inductors[i].element].Name] = a.at(x)
	}
	return s
}

// stepAt is the step that holds an instant of the period.
func (t *track) stepAt(time float64) int {
	for k := range t.steps {
		if time <= t.steps[k].start+t.steps[k].length {
			return k
		}
	}
	return len(t.steps) - 1
}

// Highest is an instant of the period at which the magnitude of the voltage between
// two nodes is greatest, to the nearest end of a step.
func (p *Periodic) Highest(from, to circuit.Node) (quantity.Time, error) {
	points, err := p.Wave(from, to)
	if err != nil {
		return 0, err
	}
	best := points[0]
	for _, x := range points {
		if math.Abs(float64(x.Voltage)) > math.Abs(float64(best.Voltage)) {
			best = x
		}
	}
	return best.Time, nil
}
