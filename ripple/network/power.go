package network

import (
	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
)

// DiodeFigures are what a diode has to bear in the periodic state.
type DiodeFigures struct {
	ReversePeak quantity.Voltage
	Flow                          // without the current of the junction capacitance
	Conducting  quantity.Fraction // part of the period in which it conducts
}

// Diode gives the figures of one diode.
func (p *Periodic) Diode(name string) DiodeFigures {
	i := p.index(name)
	list := p.branches(i, true)
	f, _ := p.flow(list)
	b := &list[0]
	time, peak := 0.0, 0.0
	for k := range p.track.steps {
		if !p.track.conducting(k)[b.diode] {
			continue
		}
		time += p.track.steps[k].length
		y := p.current(list, k)
		peak = y.peak(p.track.steps[k].euler, peak)
	}
	f.Peak = quantity.Current(peak)
	return DiodeFigures{-p.Across(name).Least, f, quantity.Fraction(time / p.track.period)}
}

// Power is the mean power an element takes up; that of a source which feeds the
// circuit is negative.
func (p *Periodic) Power(name string) quantity.Power {
	i := p.index(name)
	s := p.spanOf(&p.Circuit.Elements[i])
	list := p.branches(i, false)
	sum := 0.0
	for k := range p.track.steps {
		st := &p.track.steps[k]
		v, y := p.track.stages(k, &s), p.current(list, k)
		for j, c := range share {
			sum += c * st.length * v[j+1] * y[j+1]
		}
		if st.jump {
			sum += p.jump(list, k) * p.midway(&s, k)
		}
	}
	return quantity.Power(sum / p.track.period)
}

// midway is the mean of a voltage before and after a jump.
func (p *Periodic) midway(s *span, step int) float64 {
	before := step - 1
	if before < 0 {
		before = len(p.track.steps) - 1
	}
	x, y := p.track.stages(before, s), p.track.stages(step, s)
	return (x[3] + y[3]) / 2
}

// InputPower is the mean of e·i over all alternating sources of the drive's
// frequency, before their resistance.
func (p *Periodic) InputPower() quantity.Power {
	var sum quantity.Power
	for i := range p.Circuit.Elements {
		e := &p.Circuit.Elements[i]
		if o := wave(e, float64(p.Frequency)); o.sine != 0 || o.square != 0 {
			sum -= p.Power(e.Name)
		}
	}
	return sum
}

// Loss is the mean power an element takes up.
type Loss struct {
	Element *circuit.Element
	Power   quantity.Power
}

// Losses lists what every resistor, diode and constant current takes up, in the
// order of the circuit.
func (p *Periodic) Losses() []Loss {
	var list []Loss
	for i := range p.Circuit.Elements {
		e := &p.Circuit.Elements[i]
		if e.Kind == circuit.Resistor || e.Kind == circuit.Diode || e.Kind == circuit.Sink {
			list = append(list, Loss{e, p.Power(e.Name)})
		}
	}
	return list
}
