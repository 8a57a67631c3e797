package network

import (
	"fmt"
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// leakages are the conductances that diodes are lent, in parts of frequency times the
// smallest fitted capacitance, where a state is not reached with their own: parts of a
// ladder that a fault cuts off are tied down by leakage alone.
var leakages = []float64{2e-2, 1e-2, 2e-3, 1e-3, 4e-4, 1e-4, 2e-5}

// cut is the first of them that serves where the ladder is cut in two: more would bridge
// the cut.
const cut = 2

// agreedWhole and agreedCut are the parts of the largest voltage by which a state may
// differ from that without the leakage lent: in a whole ladder, and in one that is cut.
const (
	agreedWhole = 0.002
	agreedCut   = 0.02
)

// reacher finds the steady state of a circuit in which something has failed.
type reacher struct {
	failed string // part that leaks what it leaks
	dead   bool   // nothing feeds the loads: parts of the ladder are cut off
	taxing bool   // the sound circuit was
	spent  Work
}

// allowance is the number of steps that all searches for one circuit may take together:
// several times what an ordinary one takes, more.
func (r *reacher) allowance(c *circuit.Circuit) int { return 20000 + 200*len(c.Elements) }

// taxingShare is the part of the allowance that one search may take where the sound circuit was
// taxing, as the number of such parts: few faults of it are reached, and none by taking longer.
const taxingShare = 3

// steady is the steady state within what is left of the allowance.
func (r *reacher) steady(c *circuit.Circuit, o Options) (*Periodic, error) {
	o.Most = r.allowance(c) - r.spent.Steps
	if o.Most <= 0 {
		return nil, lack.Failed("the periodic state was not reached because %d periods, with ever less leakage lent to the diodes, are all that a fault is allowed", r.spent.Periods)
	}
	if r.taxing {
		o.Most = min(o.Most, r.allowance(c)/taxingShare)
	}
	o.work = &r.spent
	return Steady(c, o)
}

// reach finds the steady state, and where it is not reached, or is known to be far, that
// with more leakage of the diodes, if it no longer rests on how much.
func (r *reacher) reach(c *circuit.Circuit, o Options) (*Periodic, error) {
	bare := Options{Frequency: o.Frequency}
	if !r.dead {
		p, err := r.steady(c, o)
		if err != nil && o.From != nil && !r.taxing {
			p, err = r.steady(c, bare)
		}
		if err == nil {
			return p, nil
		}
	}
	if r.dead && tall(c) {
		if p, err := r.steady(c, Options{Frequency: o.Frequency, creeping: true}); err == nil {
			return p, nil
		}
	}
	if !r.taxing {
		r.spent = Work{} // as much again
	}
	if p := r.lend(c, bare); p != nil {
		return p, nil
	}
	return r.steady(c, bare)
}

// tallest is the number of stages up to which a ladder that is cut is lent leakage at once.
// What is lent takes a taller one down with the cube of its stages, so that many amounts are
// solved until two agree, if any do: there the state with its own leakage is crept to first.
const tallest = 24

// tall reports whether a ladder has more stages than that, two diodes in each.
func tall(c *circuit.Circuit) bool {
	diodes := 0
	for i := range c.Elements {
		if e := &c.Elements[i]; e.Kind == circuit.Diode && e.Role == circuit.Ladder {
			diodes++
		}
	}
	return diodes > 2*tallest
}

// taxed reports whether a state took more than a fault is allowed, or was never reached
// as exactly as others are: a supply that rings.
func (r *reacher) taxed(p *Periodic) bool {
	return p != nil && (p.Adrift > 0 || p.Work.Steps > r.allowance(p.Circuit))
}

// lend finds the state with leakage lent to the diodes, where two amounts of it give the
// same.
func (r *reacher) lend(c *circuit.Circuit, o Options) *Periodic {
	unit := leakUnit(c, o)
	var last *Periodic
	before := 0.0
	parts, agreed := leakages, agreedWhole
	if r.dead {
		parts, agreed = parts[cut:], agreedCut
	}
	for _, part := range parts {
		next, err := r.steady(r.leaking(c, part*unit), o)
		if err != nil {
			continue
		}
		// What differs goes with the leakage lent, so this much is still to go.
		if last != nil && apart(last, next)*part/(before-part) <= agreed {
			next.Assumptions = append(next.Assumptions, fmt.Sprintf("diodes leak no less than %s would: what the fault cuts off is tied down by leakage alone, and hardly rests on how much",
				quantity.Text(quantity.Resistance(1/(part*unit)))))
			return next
		}
		last, before = next, part
	}
	return nil
}

// leaking is the circuit with diodes that leak no less than a conductance, but for the one
// that failed.
func (r *reacher) leaking(c *circuit.Circuit, least float64) *circuit.Circuit {
	return c.Each(func(e *circuit.Element) bool {
		if e.Kind == circuit.Diode && e.Name != r.failed {
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

// apart is the largest difference of two states of one circuit in the mean of a node, in
// parts of the largest voltage that a node ever has: where a fault leaves nothing but the
// drive, that is the drive's.
func apart(a, b *Periodic) float64 {
	most, largest := 0.0, 0.0
	for n := 1; n < a.Circuit.Nodes(); n++ {
		x, err := a.At(circuit.Node(n))
		y, err2 := b.At(circuit.Node(n))
		if err != nil || err2 != nil {
			continue
		}
		most = max(most, math.Abs(float64(x.Mean-y.Mean)))
		largest = max(largest, float64(y.Peak()))
	}
	if largest == 0 {
		return 0
	}
	return most / largest
}
