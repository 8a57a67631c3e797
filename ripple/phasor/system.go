package phasor

import (
	"math"
	"math/cmplx"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
)

// system is a circuit as a current balance for each joint: nodes that ideal sources
// and driven nodes tie together are one joint, each a fixed voltage above it.
type system struct {
	circuit    *circuit.Circuit
	omega      float64
	excitation Excitation

	transfers []transfer
	spots     []spot // by node
}

// transfer is a current y·(v(plus) − v(minus)) from one node to another; that of an
// element has plus and minus at its own ends.
type transfer struct {
	from, to, plus, minus circuit.Node
	y                     complex128
}

// spot is where a node lies: its joint, named after one of its nodes, and how far above it.
type spot struct {
	joint  circuit.Node
	offset complex128
}

// collect turns elements and excitation into transfers and joints.
func (s *system) collect() error {
	s.transfers = make([]transfer, 0, len(s.circuit.Elements)+len(s.excitation.Extra))
	s.spots = make([]spot, s.circuit.Nodes())
	for n := range s.spots {
		s.spots[n].joint = circuit.Node(n)
	}
	for i := range s.circuit.Elements {
		e := &s.circuit.Elements[i]
		if e.Role == circuit.Ladder && !s.excitation.Ladder {
			continue
		}
		if err := s.element(e); err != nil {
			return err
		}
	}
	if name := s.excitation.Source; name != "" {
		if e := s.circuit.Element(name); e == nil || e.Kind != circuit.Source {
			return lack.Failed("there is no source %s", name)
		}
	}
	if err := s.driven(); err != nil {
		return err
	}
	return s.extra()
}

func (s *system) element(e *circuit.Element) error {
	if e.Doubt != nil {
		return e.Doubt
	}
	switch e.Kind {
	case circuit.Resistor:
		if e.Resistance <= 0 {
			return lack.Failed("%s has no resistance given", e.Name)
		}
		s.arm(e, complex(1/float64(e.Resistance), 0))
	case circuit.Capacitor:
		s.arm(e, complex(0, s.omega*float64(e.Capacitance)))
	case circuit.Diode:
		s.arm(e, complex(e.Rectifier.Leakage, s.omega*float64(e.Rectifier.Junction)))
	case circuit.Inductor:
		return s.inductor(e)
	case circuit.Source:
		volts := complex128(0)
		if e.Name == s.excitation.Source {
			volts = complex(float64(e.Wave.Amplitude), 0)
		}
		return s.tie(e.Name, e.From, e.To, volts)
	}
	return nil
}

func (s *system) inductor(e *circuit.Element) error {
	if e.Inductance <= 0 {
		return s.tie(e.Name, e.From, e.To, 0)
	}
	s.arm(e, complex(0, -1/(s.omega*float64(e.Inductance))))
	return nil
}

func (s *system) arm(e *circuit.Element, y complex128) {
	s.transfers = append(s.transfers, transfer{e.From, e.To, e.From, e.To, y})
}

// tie makes v(from) − v(to) = volts, whatever current that takes.
func (s *system) tie(name string, from, to circuit.Node, volts complex128) error {
	a, b := s.spots[from], s.spots[to]
	if a.joint == b.joint {
		if gap := cmplx.Abs(a.offset - b.offset - volts); gap > 1e-9*math.Max(cmplx.Abs(volts), 1e-6) {
			return lack.Failed("%s contradicts another source or driven node by %.4g V", name, gap)
		}
		return nil
	}
	if a.joint == circuit.Ground {
		a, b, volts = b, a, -volts
	}
	shift := b.offset + volts - a.offset
	for n := range s.spots {
		if s.spots[n].joint == a.joint {
			s.spots[n] = spot{b.joint, s.spots[n].offset + shift}
		}
	}
	return nil
}

func (s *system) driven() error {
	for _, d := range s.excitation.Nodes {
		n, there := s.circuit.Node(d.Node)
		if !there {
			return lack.Failed("there is no node %s", d.Node)
		}
		if err := s.tie(d.Node, n, circuit.Ground, complex128(d.Voltage)); err != nil {
			return err
		}
	}
	return nil
}

func (s *system) extra() error {
	for _, x := range s.excitation.Extra {
		var n [4]circuit.Node
		for i, name := range []string{x.From, x.To, x.Plus, x.Minus} {
			var there bool
			if n[i], there = s.circuit.Node(name); !there {
				return lack.Failed("there is no node %s", name)
			}
		}
		s.transfers = append(s.transfers, transfer{n[0], n[1], n[2], n[3], complex(x.Conductance, 0)})
	}
	return nil
}

// reached finds the joints that something joins to ground.
func (s *system) reached() []bool {
	reached := make([]bool, len(s.spots))
	reached[circuit.Ground] = true
	for spread := true; spread; {
		spread = false
		for _, t := range s.transfers {
			a, b := s.spots[t.from].joint, s.spots[t.to].joint
			own := t.from == t.plus && t.to == t.minus && t.y != 0
			if own && reached[a] != reached[b] {
				reached[a], reached[b], spread = true, true, true
			}
		}
	}
	return reached
}

// solve balances the currents of every joint that hangs on something.
func (s *system) solve() (*Response, error) {
	reached := s.reached()
	row, size := make([]int, len(s.spots)), 0
	for n := range row {
		row[n] = -1
		if circuit.Node(n) != circuit.Ground && reached[n] && s.spots[n].joint == circuit.Node(n) {
			row[n] = size
			size++
		}
	}
	e := newEquations(size)
	for _, t := range s.transfers {
		if !reached[s.spots[t.plus].joint] && reached[s.spots[t.from].joint] || !reached[s.spots[t.minus].joint] && reached[s.spots[t.to].joint] {
			return nil, lack.Failed("a current is steered by a node that floats")
		}
		s.enter(e, row, t)
	}
	x, ok := e.solve()
	if !ok {
		return nil, lack.Failed("the circuit has no answer at this frequency: a resonance without loss")
	}
	r := &Response{s.circuit, make([]complex128, len(row)), make([]bool, len(row))}
	for n, spot := range s.spots {
		r.v[n], r.loose[n] = spot.offset, !reached[spot.joint]
		if i := row[spot.joint]; i >= 0 {
			r.v[n] += x[i]
		}
	}
	return r, nil
}

// enter adds the current of a transfer to the balances of its ends.
func (s *system) enter(e *equations, row []int, t transfer) {
	from, to := row[s.spots[t.from].joint], row[s.spots[t.to].joint]
	plus, minus := s.spots[t.plus], s.spots[t.minus]
	e.add(from, row[plus.joint], t.y)
	e.add(from, row[minus.joint], -t.y)
	e.add(to, row[plus.joint], -t.y)
	e.add(to, row[minus.joint], t.y)
	fixed := t.y * (plus.offset - minus.offset)
	e.feed(from, -fixed)
	e.feed(to, fixed)
}
