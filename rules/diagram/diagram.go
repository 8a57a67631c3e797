// Package diagram puts the circuit of a chain into the order in which it is drawn:
// the ladder with its stages, what lies between its top and the output, the gun, and
// all else. Its result is plain data with every text ready; whoever draws it
// computes nothing.
package diagram

import "kilovet/rules/rule"

// Diagram is a circuit ready to be drawn.
type Diagram struct {
	Ladder Ladder
	Rail   []Span // from the top of the smoothing column to the output
	Gun    *Gun   // nil where the chain ends at the output
	Loose  []Part // what has no place of its own: drawn between the names of its nodes

	Marks []Mark // by number, the worst first
	// Elsewhere counts the findings worth a mark that speak of nothing drawn here.
	Elsewhere int
	// Unknown says why the nodes bear no potentials; empty where they do.
	Unknown string
}

// Kind is what a part is.
type Kind string

// The kinds of part.
const (
	Resistor    Kind = "resistor"
	Capacitor   Kind = "capacitor"
	Inductor    Kind = "inductor"
	Diode       Kind = "diode"
	Alternating Kind = "alternating source"
	Direct      Kind = "direct source"
	Battery     Kind = "battery"
	Drain       Kind = "constant current" // from From to To
	SparkGap    Kind = "spark gap"
	GasTube     Kind = "gas tube"
	Varistor    Kind = "varistor"
	Zener       Kind = "zener"
	Meter       Kind = "meter"
	Cable       Kind = "cable"
	Transformer Kind = "isolation transformer"
)

// Part is one part between two nodes; a diode conducts from From to To.
type Part struct {
	Name     string // of the circuit: "filter.1.resistor"
	Kind     Kind
	Value    string // for people; empty where there is none
	From, To string // names of the nodes
	Mark     int    // number of the mark; 0 where there is none
	Stray    bool   // a capacitance that nobody fitted
}

// Node is a named point.
type Node struct {
	Name      string
	Potential string // mean in the working state, for people; empty where not known
	Mark      int
}

// Ladder is the multiplier with its drive. All lists by stage begin at the foot.
type Ladder struct {
	Columns   []Column
	Smoothing []Part // capacitors of the smoothing column
	Stages    []Node // its nodes
	Foot      Node
}

// Column is a coupling column with the half of the drive that feeds it.
type Column struct {
	Source       Part
	Series       []Part // from the source to the column
	Drive        Node
	Coupling     []Part
	Nodes        []Node
	Lower, Upper []Part // diodes to the smoothing column below, and above
}

// Span is a piece of the line from the multiplier to the output: what leads to a
// node, and what hangs there.
type Span struct {
	Series  *Part // nil where nothing lies between
	Node    Node  // without a name where the description gives none
	Hanging []Hanging
}

// Hanging is what lies between a node and ground: parts in series and, from the node
// before the last of them, parts beside it.
type Hanging struct {
	Parts  []Part
	Tap    Node // before the last part, where there are several
	Beside []Part
}

// Gun is what the output feeds: control electrode and cathode with all between them.
type Gun struct {
	Control, Cathode Node
	Same             bool   // control electrode and cathode are one node
	FedCathode       bool   // the output feeds the cathode
	Bias             []Part // between cathode and control electrode
	Heater           *Heater
	Emission         *Part // nil where no gun is fitted
}

// Heater is the filament with its floating supply.
type Heater struct {
	A, B   Node
	Centre []Part // from each end to the cathode; none where heater.a is the cathode
	Supply Part
	Feed   *Part // carries the power across the high voltage
	Mains  *Part // what drives the feed's common mode
	Stray  *Part // of the floating supply to ground
}

// Mark is what the rules say against a part or node.
type Mark struct {
	Number  int
	Verdict rule.Verdict // the worst
	Subject string
	Rules   []string
}

// Parts lists every part of the diagram.
func (d *Diagram) Parts() []*Part {
	var all []*Part
	for i := range d.Ladder.Columns {
		c := &d.Ladder.Columns[i]
		all = append(all, &c.Source)
		for _, parts := range [][]Part{c.Series, c.Coupling, c.Lower, c.Upper} {
			all = append(all, each(parts)...)
		}
	}
	all = append(all, each(d.Ladder.Smoothing)...)
	for _, s := range d.Rail {
		all = appendThere(all, s.Series)
		for _, h := range s.Hanging {
			all = append(append(all, each(h.Parts)...), each(h.Beside)...)
		}
	}
	all = append(all, d.Gun.parts()...)
	return append(all, each(d.Loose)...)
}

func (g *Gun) parts() []*Part {
	if g == nil {
		return nil
	}
	all := appendThere(each(g.Bias), g.Emission)
	if h := g.Heater; h != nil {
		all = append(all, each(h.Centre)...)
		all = appendThere(all, &h.Supply, h.Feed, h.Mains, h.Stray)
	}
	return all
}

func appendThere(all []*Part, parts ...*Part) []*Part {
	for _, p := range parts {
		if p != nil {
			all = append(all, p)
		}
	}
	return all
}

// Nodes lists every node of the diagram that has a name.
func (d *Diagram) Nodes() []*Node {
	var all []*Node
	add := func(nodes ...*Node) {
		for _, n := range nodes {
			if n.Name != "" {
				all = append(all, n)
			}
		}
	}
	for i := range d.Ladder.Columns {
		add(&d.Ladder.Columns[i].Drive)
		add(each(d.Ladder.Columns[i].Nodes)...)
	}
	add(each(d.Ladder.Stages)...)
	for i := range d.Rail {
		add(&d.Rail[i].Node)
		for j := range d.Rail[i].Hanging {
			add(&d.Rail[i].Hanging[j].Tap)
		}
	}
	if g := d.Gun; g != nil {
		add(&g.Control, &g.Cathode)
		if g.Heater != nil {
			add(&g.Heater.A, &g.Heater.B)
		}
	}
	return all
}

// each lists the members of a slice by their address.
func each[T any](list []T) []*T {
	all := make([]*T, len(list))
	for i := range list {
		all[i] = &list[i]
	}
	return all
}
