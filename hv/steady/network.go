package steady

import (
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
)

// network is a circuit whose ideal connections are gone: nodes joined by sources
// and inductors are one, each a fixed voltage above it. Ground is joint 0.
type network struct {
	circuit *circuit.Circuit
	spots   []spot // by node of the circuit
	joints  int
}

// spot is where a node of the circuit lies: its joint and how far above it.
type spot struct {
	joint  int
	offset float64
}

// tie is an ideal connection: v(from) − v(to) = volts.
type tie struct {
	name     string
	from, to circuit.Node
	volts    float64
}

// reduce joins the tied nodes; ties that contradict each other are a lack.
func reduce(c *circuit.Circuit, ties []tie) (*network, error) {
	n := &network{circuit: c, spots: make([]spot, c.Nodes())}
	for i := range n.spots {
		n.spots[i].joint = i
	}
	for _, t := range ties {
		if err := n.join(t); err != nil {
			return nil, err
		}
	}
	n.number()
	return n, nil
}

// join moves all nodes of one joint to another, ground's joint staying.
func (n *network) join(t tie) error {
	from, to, rise := n.spots[t.from], n.spots[t.to], t.volts
	if from.joint == to.joint {
		if gap := from.offset - to.offset - rise; math.Abs(gap) > 1e-9*math.Max(math.Abs(rise), 1e-3) {
			return lack.Failed("%s contradicts another source or connection by %.4g V", t.name, math.Abs(gap))
		}
		return nil
	}
	if from.joint == n.spots[circuit.Ground].joint {
		from, to, rise = to, from, -rise
	}
	shift := to.offset + rise - from.offset
	for i := range n.spots {
		if n.spots[i].joint == from.joint {
			n.spots[i] = spot{to.joint, n.spots[i].offset + shift}
		}
	}
	return nil
}

// number counts the joints through, ground first.
func (n *network) number() {
	numbers := make([]int, len(n.spots))
	for i := range numbers {
		numbers[i] = -1
	}
	for i := range n.spots {
		j := &numbers[n.spots[i].joint]
		if *j < 0 {
			*j = n.joints
			n.joints++
		}
		n.spots[i].joint = *j
	}
}

// at is the potential of a node when the joints have the potentials v.
func (n *network) at(node circuit.Node, v []float64) float64 {
	return v[n.spots[node].joint] + n.spots[node].offset
}

// joined are the potentials of the joints, each by its first node; ground's is zero.
func (n *network) joined(v Voltages) []float64 {
	joined := make([]float64, n.joints)
	for i := len(v) - 1; i > 0; i-- {
		joined[n.spots[i].joint] = float64(v[i]) - n.spots[i].offset
	}
	joined[0] = 0
	return joined
}

// across is the voltage over an element, From above To.
func (n *network) across(e *circuit.Element, v []float64) float64 {
	return n.at(e.From, v) - n.at(e.To, v)
}

// ends are the joints of an element and the voltage over it when both are at zero.
func (n *network) ends(e *circuit.Element) (from, to int, offset float64) {
	f, t := n.spots[e.From], n.spots[e.To]
	return f.joint, t.joint, f.offset - t.offset
}

// mates lists which nodes share the joint of a node.
func (n *network) mates(node circuit.Node) []bool {
	mates := make([]bool, len(n.spots))
	for i := range n.spots {
		mates[i] = n.spots[i].joint == n.spots[node].joint
	}
	return mates
}
