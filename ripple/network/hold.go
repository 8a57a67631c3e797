package network

import (
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// HoldOptions say what is to be held at what voltage.
type HoldOptions struct {
	// Build gives the circuit at a peak of its drive.
	Build func(peak quantity.Voltage) (*circuit.Circuit, error)
	Node  string
	Set   quantity.Voltage // magnitude of the node's mean, with the polarity of the multiplier
	First quantity.Voltage // a peak to begin with
	Options
}

// Hold finds the peak of the drive at which the mean of a node is a set voltage, within a
// part in 1e8, a swift search in 1e6, and the state there. Both are sought together, drive
// and state made larger or smaller at once; where that does not get there, trial by trial.
// It is a lack where the load pulls the node to nothing, where there is no such node, and
// where no peak is found in a dozen trials.
func Hold(o HoldOptions) (quantity.Voltage, *Periodic, error) {
	if peak, p, err := o.together(0); err == nil {
		return peak, p, nil
	}
	return o.byTrials()
}

// Seek is Hold for those who have another way: it gives up where drive and state are not
// found together in little more than an ordinary search takes.
func Seek(o HoldOptions) (quantity.Voltage, *Periodic, error) {
	c, err := o.Build(o.First)
	if err != nil {
		return 0, nil, err
	}
	o.walking = true // those who have another way ask about faults
	return o.together(1500 + 30*len(c.Elements))
}

// together seeks drive and state at once, in at most a number of steps where that is
// given.
func (o *HoldOptions) together(most int) (quantity.Voltage, *Periodic, error) {
	c, err := o.Build(o.First)
	if err != nil {
		return 0, nil, err
	}
	if err := c.Doubt(); err != nil {
		return 0, nil, err
	}
	s, err := compile(c, &o.Options)
	if err != nil {
		return 0, nil, err
	}
	n, there := c.Node(o.Node)
	if !there || s.frame.loose[n] {
		return 0, nil, lack.Failed("there is no node %s that is tied to ground", o.Node)
	}
	h := o.search(s)
	if most > 0 {
		h.most = most
	}
	h.level = &level{node: o.Node, span: s.between(n, circuit.Ground), set: o.signed(c), drive: 1, trust: 1, base: make([]float64, s.states())}
	p, err := h.solve(o.similar())
	if err != nil {
		return 0, nil, err
	}
	p.trust = h.level.trust
	peak := o.First * quantity.Voltage(h.level.drive)
	p.Circuit, err = o.Build(peak)
	s.c = p.Circuit
	return peak, p, err
}

// signed is the voltage to be held, with its sign.
func (o *HoldOptions) signed(c *circuit.Circuit) float64 {
	if c.Negative {
		return -float64(o.Set)
	}
	return float64(o.Set)
}

// byTrials seeks the drive by the secant method, which asks for exact states.
func (o *HoldOptions) byTrials() (quantity.Voltage, *Periodic, error) {
	const tries = 12
	o.Swift = false
	a := o.First
	va, near, err := o.try(a)
	if err != nil {
		return 0, nil, err
	}
	if va <= 0 {
		return 0, nil, lack.Failed("the load pulls %s to nothing at %s of drive", o.Node, quantity.Text(a))
	}
	if o.holds(va) {
		return a, near, nil
	}
	b := a * o.Set / va
	for range tries {
		o.From = near
		vb, at, err := o.try(b)
		if err != nil {
			return 0, nil, err
		}
		if o.holds(vb) {
			return b, at, nil
		}
		if quantity.Equal(vb, va) {
			break
		}
		a, b, va, near = b, b+(o.Set-vb)*(b-a)/(vb-va), vb, at
	}
	return 0, nil, lack.Failed("no drive was found that holds %s at %s", o.Node, quantity.Text(o.Set))
}

// holds reports whether a mean is near enough.
func (o *HoldOptions) holds(v quantity.Voltage) bool {
	return quantity.AtMost(math.Abs(float64(v/o.Set-1)), held)
}

// try is the mean of the node at a peak, and the state it was read from.
func (o *HoldOptions) try(peak quantity.Voltage) (quantity.Voltage, *Periodic, error) {
	c, err := o.Build(peak)
	if err != nil {
		return 0, nil, err
	}
	n, there := c.Node(o.Node)
	if !there {
		return 0, nil, lack.Failed("there is no node %s", o.Node)
	}
	p, err := Steady(c, o.Options)
	if err != nil {
		return 0, nil, err
	}
	s, err := p.At(n)
	if c.Negative {
		s.Mean = -s.Mean
	}
	return s.Mean, p, err
}
