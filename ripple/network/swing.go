package network

import (
	"math"
	"sync"

	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
)

// Swing is how a voltage moves over a period; Least and Greatest carry their sign
// and are found between the steps too.
type Swing struct{ Mean, Least, Greatest quantity.Voltage }

// PeakToPeak is the ripple.
func (s Swing) PeakToPeak() quantity.Voltage { return s.Greatest - s.Least }

// Peak is the largest magnitude.
func (s Swing) Peak() quantity.Voltage { return max(s.Greatest, -s.Least) }

// At is the potential of a node to ground. It is a lack where nothing ties the node
// to ground.
func (p *Periodic) At(n circuit.Node) (Swing, error) { return p.Between(n, circuit.Ground) }

// Between is the voltage from one node to another.
func (p *Periodic) Between(from, to circuit.Node) (Swing, error) {
	s, err := p.span(from, to)
	if err != nil {
		return Swing{}, err
	}
	return p.swings.of([2]circuit.Node{from, to}, func() Swing { return p.swing(&s) }), nil
}

// swings remembers those that were asked for, by ends.
type swings struct {
	sync.Mutex
	known map[[2]circuit.Node]Swing
}

func (s *swings) of(ends [2]circuit.Node, swing func() Swing) Swing {
	s.Lock()
	defer s.Unlock()
	w, known := s.known[ends]
	if !known {
		if s.known == nil {
			s.known = map[[2]circuit.Node]Swing{}
		}
		w = swing()
		s.known[ends] = w
	}
	return w
}

// Across is the voltage across an element, from From to To.
func (p *Periodic) Across(name string) Swing {
	s := p.spanOf(p.element(name))
	return p.swing(&s)
}

func (p *Periodic) element(name string) *circuit.Element {
	e := p.Circuit.Element(name)
	if e == nil {
		panic("network: no element " + name)
	}
	return e
}

func (p *Periodic) swing(s *span) Swing {
	w := Swing{Least: quantity.Voltage(math.Inf(1)), Greatest: quantity.Voltage(math.Inf(-1))}
	sum := 0.0
	for k := range p.track.steps {
		y := p.track.stages(k, s)
		for j, c := range share {
			sum += c * p.track.steps[k].length * s.difference(p.track.potentials(k, j+1))
		}
		w.Least, w.Greatest = y.widen(p.track.steps[k].euler, w.Least, w.Greatest)
	}
	w.Mean = quantity.Voltage(s.offset.direct + sum/p.track.period) // a sine and a square wave have none
	if math.Abs(float64(w.Mean)) < nought*float64(w.Peak()) {
		w.Mean = 0
	}
	return w
}

// nought is the share of the peak below which a mean is only what the sum leaves behind.
const nought = 1e-9

// samples are a quantity at the start and the stages of a step.
type samples [4]float64

// stages are the voltages across a span in one step.
func (t *track) stages(step int, s *span) samples {
	st, n := &t.steps[step], t.n
	u := t.u[4*step*n : 4*(step+1)*n]
	fixed, swing := s.offset.direct+s.offset.square*st.sign, s.offset.sine
	y := samples{fixed + swing*st.sine[0], fixed + swing*st.sine[1], fixed + swing*st.sine[2], fixed + swing*st.sine[3]}
	if k := s.a; k >= 0 {
		y[0], y[1], y[2], y[3] = y[0]+u[k], y[1]+u[n+k], y[2]+u[2*n+k], y[3]+u[3*n+k]
	}
	if k := s.b; k >= 0 {
		y[0], y[1], y[2], y[3] = y[0]-u[k], y[1]-u[n+k], y[2]-u[2*n+k], y[3]-u[3*n+k]
	}
	return y
}

// polynomial is the quantity over the step; where the diodes settled
// only the end is known.
func (y *samples) polynomial(euler bool) cubic {
	if euler {
		return cubic{y[3], 0, 0, 0}
	}
	return through(y[0], y[1], y[2], y[3])
}

// widen widens a range to what the quantity does over the step.
func (y *samples) widen(euler bool, least, greatest quantity.Voltage) (quantity.Voltage, quantity.Voltage) {
	if euler {
		return min(least, quantity.Voltage(y[3])), max(greatest, quantity.Voltage(y[3]))
	}
	if low, high := y.reach(); low >= float64(least) && high <= float64(greatest) {
		return least, greatest
	}
	p := through(y[0], y[1], y[2], y[3])
	low, high := y[0], y[3]
	if p.monotonic() {
		if low > high {
			low, high = high, low
		}
	} else if low, high = p.hull(); low < float64(least) || high > float64(greatest) {
		low, high = p.extremes()
	}
	if low < float64(least) {
		least = quantity.Voltage(low)
	}
	if high > float64(greatest) {
		greatest = quantity.Voltage(high)
	}
	return least, greatest
}

// extremes are the least and the greatest of the cubic on [0, 1].
func (p *cubic) extremes() (low, high float64) {
	low, high = p[0], p[0]
	for _, x := range p.turns() {
		v := p.at(x)
		low, high = min(low, v), max(high, v)
	}
	return low, high
}

// reach is what a cubic through samples surely stays within: it leaves their range by
// less than the range itself.
func (y *samples) reach() (low, high float64) {
	low, high = y[0], y[0]
	for _, v := range y[1:] {
		if v > high {
			high = v
		} else if v < low {
			low = v
		}
	}
	return low - (high - low), high + (high - low)
}

// rangeOf is the least and the greatest of four, in comparisons that a processor foresees where
// they rise or fall.
func rangeOf(a, b, c, d float64) (low, high float64) {
	low, high = a, b
	if b < a {
		low, high = b, a
	}
	if c < low {
		low = c
	} else if c > high {
		high = c
	}
	if d < low {
		low = d
	} else if d > high {
		high = d
	}
	return low, high
}

// Point is a voltage at an instant of the period.
type Point struct {
	Time    quantity.Time
	Voltage quantity.Voltage
}

// Wave is the wave-form of the voltage between two nodes: the start and the stages
// of every step, the instants at which diodes switch among them.
func (p *Periodic) Wave(from, to circuit.Node) ([]Point, error) {
	s, err := p.span(from, to)
	if err != nil {
		return nil, err
	}
	points := make([]Point, 0, 3*len(p.track.steps))
	for k := range p.track.steps {
		st := &p.track.steps[k]
		y := p.track.stages(k, &s)
		if st.euler {
			points = append(points, Point{quantity.Time(st.start), quantity.Voltage(y[3])})
			continue
		}
		for j, c := range [3]float64{node1, node2, 1} {
			points = append(points, Point{quantity.Time(st.start + c*st.length), quantity.Voltage(y[j+1])})
		}
	}
	return points, nil
}
