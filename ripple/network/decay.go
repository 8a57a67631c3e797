package network

import (
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// DecayOptions say what is watched after switching off.
type DecayOptions struct {
	Nodes []circuit.Node
	Below quantity.Voltage // magnitude that counts as safe
	Until quantity.Time    // zero is 1e6 s
}

// Fall is how one node came down.
type Fall struct {
	Node   circuit.Node
	After  quantity.Time // from when on the magnitude is below; meaningless with Lack
	Lack   error         // why it was not seen to come down
	Points []Point       // at the ends of the steps, which grow with time
}

// Decay follows the potentials of nodes after switching off, from microseconds to a
// million seconds. What is still connected, how diodes count and that the sources
// are off is the circuit's to say.
func Decay(c *circuit.Circuit, from State, o DecayOptions) ([]Fall, error) {
	f, err := newFlight(c, from)
	if err != nil {
		return nil, err
	}
	until := float64(o.Until)
	if until == 0 {
		until = 1e6
	}
	d := &decay{flight: f, below: float64(o.Below)}
	for _, n := range o.Nodes {
		d.watch(n)
	}
	if err := f.run(until, d.look); err != nil {
		return nil, err
	}
	return d.end(), nil
}

// decay is a decay under way.
type decay struct {
	*flight
	below float64
	falls []Fall
	spans []span
	above []bool
}

func (d *decay) watch(n circuit.Node) {
	s := d.frame
	d.falls = append(d.falls, Fall{Node: n, Lack: s.known(d.c, n)})
	d.spans = append(d.spans, span{d.at(s.group[n]), grounded, s.offset[n], -1})
	d.above = append(d.above, false)
}

// look records the steps just taken; a decay is followed to its end.
func (d *decay) look() bool {
	for k := range d.track.steps {
		st := &d.track.steps[k]
		for i := range d.falls {
			y := d.track.stages(k, &d.spans[i])
			d.falls[i].Points = append(d.falls[i].Points, Point{quantity.Time(st.start + st.length), quantity.Voltage(y[3])})
			d.cross(i, st, &y)
		}
	}
	return false
}

// cross notes where the magnitude passes the limit in one step.
func (d *decay) cross(i int, st *step, y *samples) {
	above := math.Abs(y[3]) > d.below
	if above || !d.above[i] {
		d.above[i] = above
		return
	}
	d.above[i] = false
	sign := math.Copysign(1, y[0])
	p := y.polynomial(st.euler)
	low, high := 0.0, 1.0
	for range 50 {
		if x := (low + high) / 2; sign*p.at(x) > d.below {
			low = x
		} else {
			high = x
		}
	}
	d.falls[i].After = quantity.Time(st.start + high*st.length)
}

func (d *decay) end() []Fall {
	for i := range d.falls {
		f := &d.falls[i]
		if f.Lack == nil && d.above[i] {
			v := f.Points[len(f.Points)-1].Voltage
			f.Lack = lack.Failed("%s still stands at %s after %s", d.c.Labels(f.Node)[0], quantity.Text(v), quantity.Text(quantity.Time(d.time)))
		}
	}
	return d.falls
}
