package network

import (
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
)

// RMS is the r.m.s. value of the voltage between two nodes over the period, by the
// quadrature of the steps. It is a lack where nothing ties the nodes together.
func (p *Periodic) RMS(from, to circuit.Node) (quantity.Voltage, error) {
	s, err := p.span(from, to)
	if err != nil {
		return 0, err
	}
	sum := 0.0
	for k := range p.track.steps {
		y := p.track.stages(k, &s)
		for j, c := range share {
			sum += c * p.track.steps[k].length * y[j+1] * y[j+1]
		}
	}
	return quantity.Voltage(math.Sqrt(sum / p.track.period)), nil
}

// CurrentPoint is a current at an instant of the period.
type CurrentPoint struct {
	Time    quantity.Time
	Current quantity.Current
}

// Current is the wave-form of the current through an element at the stages of every
// step; that of a diode is without its junction's, that of a source without the impulse
// at a jump of a square wave.
func (p *Periodic) Current(name string) []CurrentPoint {
	list := p.branches(p.index(name), true)
	points := make([]CurrentPoint, 0, 3*len(p.track.steps))
	for k := range p.track.steps {
		st, y := &p.track.steps[k], p.current(list, k)
		if st.euler {
			points = append(points, CurrentPoint{quantity.Time(st.start), quantity.Current(y[3])})
			continue
		}
		for j, c := range [3]float64{node1, node2, 1} {
			points = append(points, CurrentPoint{quantity.Time(st.start + c*st.length), quantity.Current(y[j+1])})
		}
	}
	return points
}
