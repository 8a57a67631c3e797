package steady

import (
	"math"
	"slices"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
)

// rundown is a circuit of capacitors, resistors and ideal diodes left to itself.
// Its state is the potential of every joint.
type rundown struct {
	net    *network
	stores []store
	wires  []wire
	valves []valve

	counted []*wire // whose charge is asked for

	mesh    *mesh
	factors *factors
	links   []link
	always  feed      // of the wires
	held    feed      // of the capacitors, as conductances over a second
	still   []float64 // by slot: conductances in an implicit Euler stage, diodes apart
	ends    []int     // joints but ground that a diode ends on
	rate    float64   // one over the length of the stage
	state   []float64 // by joint
	start   []float64 // by joint: what a stage starts from
	fed     []float64 // by joint: currents fed in there, those of diodes apart
	current []float64 // by joint, with the diodes
	v       []float64 // by joint, at the end of a stage
	change  [stages][]float64
	least   float64 // of the largest capacitor voltage: of those between joints of fixed distance
	most    float64 // largest capacitor voltage
	next    float64 // the same at the end of the step tried
	first   float64 // s: length of the first step
	before  float64 // s: length of the step whose changes are at hand; zero after one that was refused
	diode   float64 // ohm, common to all diodes that conduct; zero for ideal ones
	gOn     float64 // of a conducting diode
	lost    bool    // the diodes did not settle
	fresh   bool    // the factors are those of the present step and diodes
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

// store is a capacitor with its voltage before and after.
type store struct {
	edge
	c, u float64
}

// link is all capacitance between two joints, with one offset.
type link struct {
	from, to  int32
	c, offset float64
	slack     float64 // by how much more than others it may be wrong
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
	r := &rundown{net: net, state: net.joined(from), first: firstStep}
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
	r.always, r.held, r.still = newFeed(r.mesh.size, joints), newFeed(r.mesh.size, joints), make([]float64, r.mesh.size)
	for i := range r.wires {
		r.always.lay(&r.wires[i].edge, r.wires[i].g)
	}
	for i := range r.stores {
		r.held.lay(&r.stores[i].edge, r.stores[i].c)
		r.link(&r.stores[i])
	}
	for i := range r.valves {
		v := &r.valves[i]
		for _, joint := range [2]int{v.from, v.to} {
			if joint != 0 && !slices.Contains(r.ends, joint) {
				r.ends = append(r.ends, joint)
			}
		}
	}
	for _, row := range []*[]float64{&r.start, &r.fed, &r.current, &r.v, &r.change[0], &r.change[1], &r.change[2]} {
		*row = make([]float64, joints)
	}
	for j, c := range r.held.sum {
		if c == 0 {
			r.state[j] = 0 // holds no charge: where nothing leads to it, it shows nothing
		}
	}
	r.most = r.highest()
}

// slacken lets an error have the same energy at every capacitor: a stray one beside a
// ladder's may be wrong by more than one that stands at the highest voltage and holds most.
func (r *rundown) slacken() {
	const tightest, loosest = 1.0 / 64, 64
	held, highest := 0.0, r.highest()
	for i := range r.stores {
		held = math.Max(held, math.Sqrt(r.stores[i].c)*math.Abs(r.stores[i].u))
	}
	if highest == 0 {
		return
	}
	for i := range r.links {
		l := &r.links[i]
		l.slack = math.Max(tightest, math.Min(held/highest/math.Sqrt(l.c), loosest))
	}
}

// link adds a store to the links, or to one of them where they are alike.
func (r *rundown) link(s *store) {
	if s.slot == noSlot {
		r.least = math.Max(r.least, math.Abs(s.offset))
		return
	}
	l := link{int32(s.from), int32(s.to), s.c, s.offset, 1}
	if l.from > l.to {
		l.from, l.to, l.offset = l.to, l.from, -l.offset
	}
	for i := range r.links {
		if o := &r.links[i]; o.from == l.from && o.to == l.to && o.offset == l.offset {
			o.c += l.c
			return
		}
	}
	r.links = append(r.links, l)
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

// over is the voltage over an edge at the end of a stage.
func (r *rundown) over(e *edge) float64 { return r.v[e.from] - r.v[e.to] + e.offset }

// feed is what edges of one kind conduct.
type feed struct {
	g   []float64 // by slot
	sum []float64 // by joint, of all that ends there
}

func newFeed(slots, joints int) feed {
	return feed{make([]float64, slots), make([]float64, joints)}
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
