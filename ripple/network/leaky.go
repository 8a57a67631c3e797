package network

import (
	"fmt"
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
)

// leakages are the conductances that diodes are lent, in parts of frequency times the
// smallest fitted capacitance, where a state is not reached with their own: parts of a
// ladder that an open diode cuts off are tied down by leakage alone.
var leakages = []float64{1e-3, 2e-4, 2e-5, 1e-5}

// agreed is the part of the drive by which two states may differ that count as one.
const agreed = 0.01

// reach finds the steady state, and where it is not reached that with more leakage of the
// diodes, if it no longer rests on how much; if it does, leakage is led back to their own.
func reach(c *circuit.Circuit, o Options) (*Periodic, error) {
	p, err := Steady(c, o)
	if err != nil && o.From != nil {
		p, err = Steady(c, Options{Frequency: o.Frequency})
	}
	if err == nil {
		return p, nil
	}
	unit := leakUnit(c, o)
	part := 0.0
	var before, last *Periodic
	for _, part = range leakages {
		next, failed := Steady(leaking(c, part*unit), Options{Frequency: o.Frequency, From: last})
		if failed != nil {
			return nil, err
		}
		before, last = last, next
	}
	if alike(before, last) {
		last.Assumptions = append(last.Assumptions, fmt.Sprintf("diodes leak no less than %s would: with less the state was not reached, and it does not rest on it",
			quantity.Text(quantity.Resistance(1/(part*unit)))))
		return last, nil
	}
	return lessAndLess(c, o, last, part*unit, err)
}

// lessAndLess takes the leakage that diodes were lent back by halves, to their own.
func lessAndLess(c *circuit.Circuit, o Options, last *Periodic, lent float64, err error) (*Periodic, error) {
	own := math.Inf(1)
	for _, e := range c.Elements {
		if e.Kind == circuit.Diode {
			own = min(own, e.Rectifier.Leakage)
		}
	}
	for lent > own && lent > 0 {
		if lent /= 3; lent < 1e-4*own {
			lent = 0
		}
		next, failed := Steady(leaking(c, lent), Options{Frequency: o.Frequency, From: last})
		if failed != nil {
			return nil, err
		}
		last = next
	}
	return last, nil
}

// leaking is the circuit with diodes that leak no less than a conductance.
func leaking(c *circuit.Circuit, least float64) *circuit.Circuit {
	return c.Each(func(e *circuit.Element) bool {
		if e.Kind == circuit.Diode {
			e.Rectifier.Leakage = max(e.Rectifier.Leakage, least)
		}
		return true
	})
}

// leakUnit is frequency times the smallest capacitance fitted.
func leakUnit(c *circuit.Circuit, o Options) float64 {
	f, least := o.Frequency, math.Inf(1)
	if f == 0 {
		f = Drive(c)
	}
	for _, e := range c.Elements {
		if e.Kind == circuit.Capacitor && e.Role == circuit.Ladder {
			least = min(least, float64(e.Capacitance))
		}
	}
	if math.IsInf(least, 1) {
		return 0
	}
	return float64(f) * least
}

// alike reports whether two states of one circuit are the same but for a hundredth of the
// drive, in the mean of every node.
func alike(a, b *Periodic) bool {
	drive := 0.0
	for _, e := range a.Circuit.Elements {
		if e.Kind == circuit.Source && e.Role == circuit.Ladder {
			drive = max(drive, math.Abs(float64(e.Wave.Amplitude)))
		}
	}
	for n := 1; n < a.Circuit.Nodes(); n++ {
		x, err := a.At(circuit.Node(n))
		y, err2 := b.At(circuit.Node(n))
		if err != nil || err2 != nil {
			continue
		}
		if math.Abs(float64(x.Mean-y.Mean)) > agreed*drive {
			return false
		}
	}
	return true
}
