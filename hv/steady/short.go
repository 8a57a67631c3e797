package steady

import (
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/parallel"
	"kilovet/hv/quantity"
)

// Delivered is what a short at a node delivers.
type Delivered struct {
	// Charge is the magnitude of ∫ i dt through the short.
	Charge quantity.Charge
	// Energy is what was stored before less what is stored after, wherever it went.
	Energy quantity.Energy
	Work   Work
}

// Short joins a node ideally to ground until all currents cease: drive and heater
// quiet but connected, loads off, a fixed bias kept, diodes without drop. How charge
// parts among diodes that conduct at once rests on their resistances; these are all
// the same and small beside every other resistance. Inductors count as connections.
// A node on ground already, or on nothing once the loads are off, delivers nothing;
// else the energy includes what would have run down of itself, as in a bias bypass.
//
// Errors: a lack for a doubted capacitance, an unknown node.
func Short(c *circuit.Circuit, from Voltages, node string) (Delivered, error) {
	n, there := c.Node(node)
	if !there {
		return Delivered{}, lack.Failed("there is no node %s", node)
	}
	unloaded := c.Each(func(e *circuit.Element) bool { return e.Role != circuit.Load })
	sources := quiet(unloaded, true)
	r, err := runDown(unloaded, from, append(sources, tie{"the short", n, circuit.Ground, 0}))
	if err != nil {
		return Delivered{}, err
	}
	alone, err := reduce(unloaded, connections(unloaded, sources))
	if err != nil {
		return Delivered{}, err
	}
	group := alone.mates(n)
	if group[circuit.Ground] {
		return Delivered{}, nil
	}
	r.diode = r.smallDiode()
	r.first = r.quick()
	return r.deliver(group)
}

// Shorts are the shorts at several nodes, one by one, on all processors.
func Shorts(c *circuit.Circuit, from Voltages, nodes []string) ([]Delivered, []error) {
	all, errs := make([]Delivered, len(nodes)), make([]error, len(nodes))
	parallel.Each(len(nodes), func(i int) { all[i], errs[i] = Short(c, from, nodes[i]) })
	return all, errs
}

// smallDiode is a diode resistance well below every other: a thousandth of the
// smallest, at most an ohm.
func (r *rundown) smallDiode() float64 {
	most := 0.0
	for _, w := range r.wires {
		most = math.Max(most, w.g)
	}
	return math.Min(1, 1e-3/most)
}

// quick is a first step well below the time in which a diode that conducts empties the
// smallest capacitor: what happens meanwhile is not followed.
func (r *rundown) quick() float64 {
	least := math.Inf(1)
	for i := range r.stores {
		if c := r.stores[i].c; c > 0 {
			least = math.Min(least, c)
		}
	}
	return math.Min(firstStep, 1e-2*r.diode*least)
}

// quiet are the sources as connections; those of a fixed bias keep their voltage
// where asked.
func quiet(c *circuit.Circuit, bias bool) []tie {
	var ties []tie
	for _, e := range c.Elements {
		if e.Kind != circuit.Source {
			continue
		}
		t := tie{e.Name, e.From, e.To, 0}
		if bias && e.Role == circuit.Series {
			t.volts = mean(e.Wave)
		}
		ties = append(ties, t)
	}
	return ties
}

// rounding is the part of the largest charge that is held below which one is nothing.
const rounding = 1e-13

// deliver lets the shorted circuit run out. What the short carries is what the other
// elements bring to the nodes it is joined to.
func (r *rundown) deliver(group []bool) (Delivered, error) {
	before, charge := r.energy(), 0.0
	bring := func(e *edge, q float64) {
		if group[e.element.To] && !group[e.element.From] {
			charge += q
		}
		if group[e.element.From] && !group[e.element.To] {
			charge -= q
		}
	}
	r.count(group)
	held := 0.0
	for i := range r.stores {
		q := r.stores[i].c * r.stores[i].u
		held = math.Max(held, math.Abs(q))
		bring(&r.stores[i].edge, -q)
	}
	r.slacken()
	p := pace{tolerance: 5e-5, floor: r.highest(), done: 1e-9 * r.highest()}
	err := r.run(p, func(float64) {})
	for i := range r.stores {
		bring(&r.stores[i].edge, r.stores[i].c*r.stores[i].u)
	}
	for _, w := range r.counted {
		bring(&w.edge, w.charge)
	}
	for i := range r.valves {
		bring(&r.valves[i].edge, r.valves[i].charge)
	}
	if math.Abs(charge) <= rounding*held {
		return Delivered{Work: r.work}, err
	}
	return Delivered{magnitude(quantity.Charge(charge)), quantity.Energy(math.Max(0, before-r.energy())), r.work}, err
}

// count has the charge counted of the wires that lead out of a group of nodes.
func (r *rundown) count(group []bool) {
	for i := range r.wires {
		if e := r.wires[i].element; group[e.To] != group[e.From] {
			r.counted = append(r.counted, &r.wires[i])
		}
	}
}
