package network

import (
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Flow is how a current moves over a period, positive inside the element from From
// to To; Peak is the largest magnitude.
type Flow struct{ Mean, RMS, Peak quantity.Current }

// Through is the current through an element; that of a diode is without its
// junction's. It is a lack where an ideal square wave meets capacitance without
// resistance: the current is then an impulse.
func (p *Periodic) Through(name string) (Flow, error) {
	f, impulse := p.flow(p.branches(p.index(name), true))
	if impulse {
		return Flow{}, lack.Failed("the square wave charges capacitance through nothing that limits the current of %s", name)
	}
	return f, nil
}

func (p *Periodic) index(name string) int {
	for i := range p.Circuit.Elements {
		if p.Circuit.Elements[i].Name == name {
			return i
		}
	}
	panic("network: no element " + name)
}

// branch is an element whose current is known from its voltage, with a sign.
type branch struct {
	span
	element *circuit.Element
	index   int // of the element
	diode   int
	coil    int
	bare    bool // of a diode: without the junction's current
	sign    float64
}

// branches are the elements whose currents add up to that of an element: itself, or
// of a source, all that leave the nodes beyond it.
func (p *Periodic) branches(i int, bare bool) []branch {
	e := &p.Circuit.Elements[i]
	if !isTie(e) {
		return []branch{p.branch(i, 1, bare)}
	}
	f := p.track.frame
	sign := -1.0
	if f.toward[i] {
		sign = 1
	}
	beyond := map[circuit.Node]bool{}
	for _, n := range f.below[i] {
		beyond[circuit.Node(n)] = true
	}
	var list []branch
	for k := range p.Circuit.Elements {
		o := &p.Circuit.Elements[k]
		if isTie(o) || beyond[o.From] == beyond[o.To] {
			continue
		}
		s := sign
		if beyond[o.To] {
			s = -sign
		}
		list = append(list, p.branch(k, s, false))
	}
	return list
}

func (p *Periodic) branch(i int, sign float64, bare bool) branch {
	e := &p.Circuit.Elements[i]
	b := branch{span: p.spanOf(e), element: e, index: i, sign: sign, bare: bare}
	for k := range p.track.diodes {
		if p.track.diodes[k].element == i {
			b.diode = k
		}
	}
	for k := range p.track.inductors {
		if p.track.inductors[k].element == i {
			b.coil = k
		}
	}
	return b
}

// flow adds up branches over the period and reports whether the sum is an impulse
// at the jumps of a square wave, of which that in the middle of the period tells for both.
func (p *Periodic) flow(list []branch) (f Flow, impulse bool) {
	var mean, square, peak, end float64
	for k := range p.track.steps {
		st := &p.track.steps[k]
		y := p.current(list, k)
		if y[0] = end; k == 0 || st.euler {
			y[0] = y[3]
		}
		end = y[3]
		for j, c := range share {
			mean += c * st.length * y[j+1]
			square += c * st.length * y[j+1] * y[j+1]
		}
		peak = y.peak(st.euler, peak)
	}
	moved := 0.0
	for k := range p.track.steps {
		if p.track.steps[k].jump {
			q := p.jump(list, k)
			mean += q
			if k > 0 { // at the start of the period stands what its end leaves open
				moved += 2 * math.Abs(q)
			}
		}
	}
	impulse = moved > 1e-6*(math.Sqrt(square*p.track.period)+1e-9*p.track.typical*p.track.scale)
	t := p.track.period
	return Flow{quantity.Current(mean / t), quantity.Current(math.Sqrt(square / t)), quantity.Current(peak)}, impulse
}

// peak raises a peak to the largest magnitude over a step. Where a diode has just
// switched the start may be passed over: the stages then ring about the current that
// follows, of which the end of the step and the next step tell. From a start a fiftieth
// beside that current to one two fiftieths beside it, what counts passes from the turn within
// the step to the end of the step, so that a slight change makes a slight one.
func (y *samples) peak(euler bool, most float64) float64 {
	most = math.Max(most, math.Abs(y[3]))
	if euler {
		return most
	}
	if low, high := y.reach(); low >= -most && high <= most {
		return most
	}
	p := through(y[0], y[1], y[2], y[3])
	if p.monotonic() {
		return most
	}
	if low, high := p.hull(); low >= -most && high <= most {
		return most
	}
	b := parabola(y[1], y[2], y[3])
	beside, borne, smooth := math.Abs(y[0]-b[0]), 0.02*math.Abs(b[0]), 1.0
	if !(beside < 2*borne || beside == 0) {
		return most
	}
	if beside > borne {
		smooth = 2 - beside/borne
	}
	end := math.Abs(y[3])
	for _, x := range p.turns() {
		most = math.Max(most, end+smooth*(math.Abs(p.at(x))-end))
	}
	return most
}

// current is the sum of branches at the start and the stages of a step.
func (p *Periodic) current(list []branch, step int) samples {
	var sum samples
	for i := range list {
		y := p.branchCurrent(&list[i], step)
		for j, v := range y {
			sum[j] += list[i].sign * v
		}
	}
	return sum
}

func (p *Periodic) branchCurrent(b *branch, step int) samples {
	v := p.track.stages(step, &b.span)
	return p.track.currentAt(b, step, &v)
}

// currentAt is the current of a branch in a step, given the voltage across it.
func (t *track) currentAt(b *branch, step int, v *samples) samples {
	var y samples
	switch e := b.element; e.Kind {
	case circuit.Resistor:
		for j := range y {
			y[j] = v[j] / float64(e.Resistance)
		}
	case circuit.Sink:
		for j := range y {
			y[j] = float64(e.Current)
		}
	case circuit.Inductor:
		for j := range y {
			y[j] = t.currents(step, j)[b.coil]
		}
	case circuit.Capacitor:
		y = t.charging(step, v, float64(e.Capacitance))
	case circuit.Diode:
		if !b.bare {
			y = t.charging(step, v, float64(e.Rectifier.Junction))
		}
		d := &t.diodes[b.diode]
		for j := range y {
			y[j] += d.leak * v[j]
			if t.conducting(step)[b.diode] {
				y[j] += d.on * (v[j] - d.drop)
			}
		}
	}
	return y
}

// charging is the current of a capacitance: the slope of the collocation
// polynomial. What a jump moves is counted apart.
func (t *track) charging(step int, v *samples, c float64) samples {
	st := &t.steps[step]
	switch {
	case st.jump || c == 0:
		return samples{}
	case st.euler:
		i := c * (v[3] - v[0]) / st.length
		return samples{i, i, i, i}
	}
	p := v.polynomial(false)
	c /= st.length
	return samples{c * p[1], c * p.slope(node1), c * p.slope(node2), c * p.slope(1)}
}

// jump is the charge branches move at a jump of the square wave.
func (p *Periodic) jump(list []branch, step int) float64 {
	t := p.track
	before := step - 1
	if before < 0 {
		before = len(t.steps) - 1
	}
	moved := 0.0
	for i := range list {
		b := &list[i]
		c := float64(b.element.Capacitance)
		if b.element.Kind == circuit.Diode && !b.bare {
			c = float64(b.element.Rectifier.Junction)
		}
		if c > 0 {
			after, prior := t.stages(step, &b.span), t.stages(before, &b.span)
			moved += b.sign * c * (after[3] - prior[3])
		}
	}
	return moved
}
