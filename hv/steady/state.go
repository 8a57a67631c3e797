// Package steady finds what a circuit does when nothing changes any more, or when
// it only runs down: potentials and currents at DC for a given law of the supply,
// the errors and stresses of a measuring divider, stored energy, what a short
// delivers, and how long a chain stays charged after switching off.
package steady

import (
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// State is a circuit at DC: capacitors open, inductors short, gaps open, sources at
// their mean, sinks constant, diodes outside the ladder piecewise linear, the ladder left out.
type State struct {
	Circuit *circuit.Circuit
	Drawn   quantity.Current // from the multiplier, positive where it delivers; zero where a node is held

	network *network
	v       []float64 // by joint
	loose   []bool    // by joint: no path to anything that fixes its potential
	on      []bool    // by element: diodes that conduct
}

// Fixed is a node held at a voltage to ground.
type Fixed struct {
	Node    string
	Voltage quantity.Voltage
}

// Held is the DC state of a circuit with nodes held at given voltages, whatever
// feeds them; ladder elements are left out, so other ladder nodes have no potential.
func Held(c *circuit.Circuit, held ...Fixed) (*State, error) {
	var fixed []tie
	for _, h := range held {
		n, there := c.Node(h.Node)
		if !there {
			return nil, lack.Failed("there is no node %s", h.Node)
		}
		fixed = append(fixed, tie{h.Node, n, circuit.Ground, float64(h.Voltage)})
	}
	return settled(c, fixed)
}

// At is the potential of a node to ground, with its sign; a lack where nothing fixes it.
func (s *State) At(n circuit.Node) (quantity.Voltage, error) {
	if s.loose[s.network.spots[n].joint] {
		return 0, lack.Failed("%s floats: no DC path fixes its potential", s.Circuit.Labels(n)[0])
	}
	return quantity.Voltage(s.network.at(n, s.v)), nil
}

// Potential is the potential of a named node to ground, with its sign.
func (s *State) Potential(node string) (quantity.Voltage, error) {
	n, there := s.Circuit.Node(node)
	if !there {
		return 0, lack.Failed("there is no node %s", node)
	}
	return s.At(n)
}

// Across is the voltage over a named element, From above To.
func (s *State) Across(element string) (quantity.Voltage, error) {
	e := s.Circuit.Element(element)
	if e == nil {
		return 0, lack.Failed("there is no element %s", element)
	}
	from, err := s.At(e.From)
	if err != nil {
		return 0, err
	}
	to, err := s.At(e.To)
	return from - to, err
}

// Current is the current through a named element, inside it from From to To. That
// of an ideal source or an inductor is not resolved: a lack.
func (s *State) Current(element string) (quantity.Current, error) {
	v, err := s.Across(element)
	if err != nil {
		return 0, err
	}
	e := s.Circuit.Element(element)
	switch {
	case e.Role == circuit.Ladder:
		return 0, lack.Failed("%s is inside the multiplier, which is replaced by its law", element)
	case e.Kind == circuit.Source || e.Kind == circuit.Inductor:
		return 0, lack.Failed("the current of %s is not resolved", element)
	}
	return quantity.Current(s.through(e, float64(v))), nil
}

func (s *State) through(e *circuit.Element, v float64) float64 {
	switch e.Kind {
	case circuit.Resistor:
		return v / float64(e.Resistance)
	case circuit.Sink:
		return float64(e.Current)
	case circuit.Diode:
		return e.Rectifier.Leakage*v + math.Max(0, v-float64(e.Rectifier.Drop))/onResistance(e)
	}
	return 0
}

// Struck is a gap or clamp whose voltage has reached its striking voltage; the
// state takes it as open all the same.
type Struck struct {
	Element string
	Voltage quantity.Voltage // magnitude
}

// Struck lists the gaps that would strike, in the order of the circuit.
func (s *State) Struck() []Struck {
	var struck []Struck
	for i := range s.Circuit.Elements {
		e := &s.Circuit.Elements[i]
		if e.Kind != circuit.Gap {
			continue
		}
		v, err := s.Across(e.Name)
		if v = quantity.Voltage(math.Abs(float64(v))); err == nil && quantity.AtLeast(v, e.Strikes) {
			struck = append(struck, Struck{e.Name, v})
		}
	}
	return struck
}

// leaving is the current that leaves a group of nodes through all elements but the ladder's.
func (s *State) leaving(group []bool) float64 {
	sum := 0.0
	for i := range s.Circuit.Elements {
		e := &s.Circuit.Elements[i]
		if e.Role == circuit.Ladder || group[e.From] == group[e.To] || s.stranded(e) {
			continue
		}
		i := s.through(e, s.network.across(e, s.v))
		if group[e.To] {
			i = -i
		}
		sum += i
	}
	return sum
}

// stranded reports whether an element ends on a node without a path, so that no
// steady current can flow in it.
func (s *State) stranded(e *circuit.Element) bool {
	return s.loose[s.network.spots[e.From].joint] || s.loose[s.network.spots[e.To].joint]
}
