package steady

import (
	"math"
	"slices"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
)

// rundown is a circuit of capacitors, resistors and ideal diodes left to itself.
// Its state is the voltage of every capacitor.
type rundown struct {
	net    *network
	stores []store
	wires  []wire
	valves []valve

	mesh    *mesh
	factors *factors
	always  feed      // conductances and currents of the wires
	still   feed      // those with the capacitors in an implicit Euler stage
	g       []float64 // by slot, with the diodes
	current []float64 // by joint, fed in
	v       []float64 // by joint
	most    float64   // largest capacitor voltage
	diode   float64   // ohm, common to all diodes that conduct; zero for ideal ones
	gOn     float64   // of a conducting diode
	lost    bool      // the diodes did not settle
	fresh   bool      // the factors are those of the present step and diodes
	work    Work
}

// Work is how much a computation took.
type Work struct{ Steps, Factorisations int }

// edge joins two joints; offset is the voltage over it when both are at zero.
type edge struct {
	element  *circuit.Element
	from, to int
	offset   float64
	slot     int
}

// store is a capacitor with its voltage and the one it is taken to start a stage from.
type store struct {
	edge
	c, u, start float64
	end         float64         // of the stage
	g           float64         // of an implicit Euler stage
	rise        [stages]float64 // slopes of the stages times the step
}

// wire is a resistor.
type wire struct {
	edge
	g float64
	flow
}

// valve is an ideal diode.
type valve struct {
	edge
	on bool
	flow
}

// flow counts the charge through an edge: the mean current of the step, and in all.
type flow struct{ passed, charge float64 }

// runDown prepares a circuit to be left to itself from the given potentials. Ideal
// connections are those given beside inductors, whose ringing is not followed.
func runDown(c *circuit.Circuit, from Voltages, given []tie) (*rundown, error) {
	if len(from) != c.Nodes() {
		panic("steady: potentials of another circuit")
	}
	net, err := reduce(c, connections(c, given))
	if err != nil {
		return nil, err
	}
	r := &rundown{net: net}
	for i := range c.Elements {
		if err := r.add(&c.Elements[i], from); err != nil {
			return nil, err
		}
	}
	r.weave()
	return r, nil
}

// connections are those given and the inductors.
func connections(c *circuit.Circuit, given []tie) []tie {
	all := slices.Clone(given)
	for i := range c.Elements {
		if e := &c.Elements[i]; e.Kind == circuit.Inductor {
			all = append(all, tie{e.Name, e.From, e.To, 0})
		}
	}
	return all
}

// add sorts an element in; gaps stay open, sinks are off.
func (r *rundown) add(e *circuit.Element, from Voltages) error {
	f, t, offset := r.net.ends(e)
	at := edge{element: e, from: f, to: t, offset: offset}
	switch e.Kind {
	case circuit.Capacitor:
		r.stores = append(r.stores, store{edge: at, c: float64(e.Capacitance), u: float64(from.across(e))})
	case circuit.Resistor:
		if e.Resistance <= 0 && e.Doubt == nil {
			return lack.Failed("%s has no resistance given", e.Name)
		}
		r.wires = append(r.wires, wire{edge: at, g: 1 / float64(e.Resistance)})
	case circuit.Diode:
		r.valves = append(r.valves, valve{edge: at})
	default:
		return nil
	}
	if e.Doubt != nil {
		return e.Doubt
	}
	return nil
}

// weave plans the mesh and gives every edge its slot.
func (r *rundown) weave() {
	var pairs [][2]int
	r.eachEdge(func(e *edge) { pairs = append(pairs, [2]int{e.from, e.to}) })
	r.mesh = newMesh(r.net.joints, pairs)
	r.eachEdge(func(e *edge) { e.slot = r.mesh.slot(e.from, e.to) })
	r.factors = r.mesh.newFactors()
	joints := r.net.joints
	r.always, r.still = newFeed(r.mesh.size, joints), newFeed(r.mesh.size, joints)
	for i := range r.wires {
		w := &r.wires[i]
		r.always.lay(&w.edge, w.g)
		r.always.drive(&w.edge, w.g)
	}
	r.g, r.current, r.v = make([]float64, r.mesh.size), make([]float64, joints), make([]float64, joints)
	r.most = r.highest()
}

func (r *rundown) eachEdge(visit func(*edge)) {
	for i := range r.stores {
		visit(&r.stores[i].edge)
	}
	for i := range r.wires {
		visit(&r.wires[i].edge)
	}
	for i := range r.valves {
		visit(&r.valves[i].edge)
	}
}

// over is the voltage over an edge.
func (r *rundown) over(e *edge) float64 { return r.v[e.from] - r.v[e.to] + e.offset }

// feed is what a network of conductances is solved from.
type feed struct {
	g       []float64 // by slot
	current []float64 // by joint, fed in
	sum     []float64 // by joint, of all conductances there
}

func newFeed(slots, joints int) feed {
	return feed{make([]float64, slots), make([]float64, joints), make([]float64, joints)}
}

// lay adds the conductance of an edge.
func (f *feed) lay(e *edge, g float64) {
	if e.slot == noSlot {
		return
	}
	f.g[e.slot] += g
	f.sum[e.from] += g
	f.sum[e.to] += g
}

// drive adds the current of a conductance.
func (f *feed) drive(e *edge, g float64) {
	if e.slot == noSlot {
		return
	}
	i := -g * e.offset
	f.current[e.from] += i
	f.current[e.to] -= i
}

// copy takes what another feed has.
func (f *feed) copy(o *feed) {
	copy(f.g, o.g)
	copy(f.current, o.current)
	copy(f.sum, o.sum)
}

// highest is the largest capacitor voltage.
func (r *rundown) highest() float64 {
	most := 0.0
	for i := range r.stores {
		if u := math.Abs(r.stores[i].u); u > most {
			most = u
		}
	}
	return most
}

// energy is what the capacitors hold.
func (r *rundown) energy() float64 {
	sum := 0.0
	for i := range r.stores {
		sum += r.stores[i].c * r.stores[i].u * r.stores[i].u / 2
	}
	return sum
}
