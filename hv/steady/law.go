package steady

import (
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Law is the DC behaviour of a multiplier: the mean voltage at its top for the mean
// current drawn from it, both as magnitudes. It should not rise with the current.
type Law func(quantity.Current) (quantity.Voltage, error)

// Linear is the law of a multiplier with a no-load voltage and an output resistance.
func Linear(noLoad quantity.Voltage, output quantity.Resistance) Law {
	return func(i quantity.Current) (quantity.Voltage, error) {
		return noLoad - quantity.Voltage(float64(output)*float64(i)), nil
	}
}

const top = "multiplier" // the node the law holds at

// Potentials is the DC state of a circuit whose multiplier follows a law. Ladder
// elements are left out: nothing but the top may draw current from them.
//
// Errors: a lack where there is no multiplier, where a part draws current inside
// it, where its top is shorted, where the law gives no positive voltage for the
// constant currents alone, and those of the law itself.
func Potentials(c *circuit.Circuit, law Law) (*State, error) {
	s := supply{circuit: c, law: law, sign: 1}
	if c.Negative {
		s.sign = -1
	}
	if err := s.check(); err != nil {
		return nil, err
	}
	return s.solve()
}

// supply is a multiplier seen from outside.
type supply struct {
	circuit *circuit.Circuit
	law     Law
	sign    float64
	node    circuit.Node
	mates   []bool // nodes ideally connected to the top
}

func (s *supply) check() error {
	inside := interior(s.circuit)
	node, there := s.circuit.Node(top)
	if inside == nil || !there {
		return lack.Key("multiplier")
	}
	alone, err := reduce(s.circuit, ties(s.circuit, nil))
	if err != nil {
		return err
	}
	s.node, s.mates = node, alone.mates(node)
	if s.mates[circuit.Ground] {
		return lack.Failed("the top of the multiplier is shorted to ground")
	}
	foot, there := s.circuit.Node("foot")
	if !there || foot != circuit.Ground {
		return lack.Failed("the return of the multiplier is open")
	}
	return s.tapped(inside)
}

// interior lists the nodes that ladder elements touch; nil without any.
func interior(c *circuit.Circuit) []bool {
	var inside []bool
	for _, e := range c.Elements {
		if e.Role == circuit.Ladder {
			if inside == nil {
				inside = make([]bool, c.Nodes())
			}
			inside[e.From], inside[e.To] = true, true
		}
	}
	return inside
}

// tapped refuses what draws current from inside the ladder: the law does not cover it.
func (s *supply) tapped(inside []bool) error {
	for i := range s.circuit.Elements {
		e := &s.circuit.Elements[i]
		if e.Role == circuit.Ladder || !direct(e) {
			continue
		}
		for _, n := range []circuit.Node{e.From, e.To} {
			if inside[n] && n != circuit.Ground && !s.mates[n] {
				return lack.Failed("%s draws current inside the multiplier, below its top", e.Name)
			}
		}
	}
	return nil
}

// direct reports whether an element can carry a steady current.
func direct(e *circuit.Element) bool {
	switch e.Kind {
	case circuit.Capacitor, circuit.Gap:
		return false
	case circuit.Sink:
		return e.Current != 0
	}
	return true
}

// solve finds the voltage at which the law and the circuit agree. The current drawn
// rises and the law falls with the voltage, so there is one such voltage.
func (s *supply) solve() (*State, error) {
	highest, err := s.law(0)
	if err != nil {
		return nil, err
	}
	low, err := s.excess(0)
	if err != nil {
		return nil, err
	}
	if low <= 0 {
		return nil, lack.Range("the multiplier cannot deliver the constant currents drawn from it")
	}
	high, err := s.excess(float64(highest))
	if err != nil {
		return nil, err
	}
	volts, err := s.settle(0, low, float64(highest), high)
	if err != nil {
		return nil, err
	}
	return s.state(volts)
}

// excess is by how much the law's voltage lies above the one assumed.
func (s *supply) excess(volts float64) (float64, error) {
	st, err := s.state(volts)
	if err != nil {
		return 0, err
	}
	v, err := s.law(st.Drawn)
	return float64(v) - volts, err
}

// settle closes in on zero excess between a and b by the Illinois form of regula
// falsi, which is exact after one step for a linear law.
func (s *supply) settle(a, fa, b, fb float64) (float64, error) {
	if fb >= 0 {
		return b, nil
	}
	for range 100 {
		x := b - fb*(b-a)/(fb-fa)
		fx, err := s.excess(x)
		if err != nil {
			return 0, err
		}
		if math.Abs(fx) <= 1e-12*math.Abs(x) {
			return x, nil
		}
		if (fx > 0) != (fb > 0) {
			a, fa = b, fb
		} else {
			fa /= 2
		}
		b, fb = x, fx
	}
	return 0, lack.Failed("the voltage of the multiplier does not settle")
}

func (s *supply) state(volts float64) (*State, error) {
	st, err := settled(s.circuit, []tie{{top, s.node, circuit.Ground, s.sign * volts}})
	if err != nil {
		return nil, err
	}
	st.Drawn = quantity.Current(s.sign * st.leaving(s.mates))
	return st, nil
}
