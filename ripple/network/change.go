package network

import (
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// ChangeOptions say what is watched after a change.
type ChangeOptions struct {
	Node  circuit.Node
	Share quantity.Fraction // of the way to its new mean; zero is 95 %
}

// Changed is how a circuit went from one periodic state to another.
type Changed struct {
	Before, After quantity.Voltage // means of the node
	// Settled is the end of the first period whose mean has gone the share of the way; to
	// the nearest period.
	Settled quantity.Time
	Work    Work
}

// Change follows a circuit from the periodic state of another, taken at phase zero, to its
// own: a load that comes or goes, a drive that jumps. Both have the same capacitors and
// inductors, by name. Single periods are walked at first and at the end, leaps of many
// between them. It is a lack where the node does not move, or takes more than 400 leaps.
func Change(from, to *Periodic, o ChangeOptions) (*Changed, error) {
	if o.Share == 0 {
		o.Share = 0.95
	}
	before, err := from.At(o.Node)
	if err != nil {
		return nil, err
	}
	after, err := to.At(o.Node)
	if err != nil {
		return nil, err
	}
	if quantity.Equal(before.Mean, after.Mean) {
		return nil, lack.Failed("%s stays where it was", to.Circuit.Labels(o.Node)[0])
	}
	c := &change{options: o, out: Changed{Before: before.Mean, After: after.Mean}}
	if err := c.begin(from, to); err != nil {
		return nil, err
	}
	err = c.follow()
	c.out.Work = c.glide.pace.work
	c.out.Work.Products = c.glide.work.Products
	return &c.out, err
}

// change is a change under way.
type change struct {
	options ChangeOptions
	glide   *glide
	way     span
	out     Changed
}

// begin puts the state of one circuit into the other.
func (c *change) begin(from, to *Periodic) error {
	s, err := newSystem(to.Circuit, float64(to.Frequency), smallestLeak*float64(to.Frequency), to)
	if err != nil {
		return err
	}
	h := newShooter(s)
	h.pace.care = coarse
	h.guess(0)
	passed := math.Max(h.pace.passed, 0.1*s.typical*s.scale)
	h.take(to.State(0))
	goal := append([]float64(nil), h.x...)
	h.take(from.State(0))
	h.judge(passed)
	axpy(-1, h.x, goal)
	c.glide = newGlide(h, norm(goal))
	c.way, err = to.span(c.options.Node, circuit.Ground)
	return err
}

// take makes a state that another circuit held that of this one.
func (h *shooter) take(from State) {
	q, amps := make([]float64, h.n), make([]float64, len(h.inductors))
	for i := range h.capacitors {
		k := &h.capacitors[i]
		k.inject(q, k.value*from.volts[h.c.Elements[k.element].Name])
	}
	for i := range h.inductors {
		amps[i] = from.amps[h.c.Elements[h.inductors[i].element].Name]
	}
	h.pack(q, amps, h.roots(), h.x)
}

// gone is the share of the way that the mean of the period walked last has gone.
func (c *change) gone() float64 {
	t := c.glide.linear
	mean := 0.0
	for k := range t.steps {
		y := t.stages(k, &c.way)
		for j, w := range share {
			mean += w * t.steps[k].length * y[j+1] / t.period
		}
	}
	return (mean - float64(c.out.Before)) / float64(c.out.After-c.out.Before)
}

// follow goes on until the node has gone the share of the way. Where a leap went past it,
// it goes back and takes shorter ones.
func (c *change) follow() error {
	e, at := c.glide, foothold{beyond: math.Inf(1)}
	for range 400 {
		if err := e.here(); err != nil {
			return err
		}
		e.judge(math.Max(e.pace.passed, e.linear.passed()))
		gone := c.gone()
		switch past := gone >= float64(c.options.Share); {
		case past && e.periods-at.periods <= 1:
			c.out.Settled = quantity.Time((e.periods + 1) * e.period)
			return nil
		case past:
			at.beyond, at.above = e.periods, gone
			e.back()
		default:
			at.periods, at.below = e.periods, gone
		}
		e.advance(at.reach(math.Inf(1), float64(c.options.Share)))
	}
	return lack.Failed("the change took more than 400 leaps")
}
