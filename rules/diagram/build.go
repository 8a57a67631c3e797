package diagram

import (
	"cmp"
	"fmt"
	"strings"

	"kilovet/hv/chain"
	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/rule"
)

// Of is the diagram of a chain with its findings; nil where there is no supply.
func Of(e *evidence.Evidence, findings []rule.Finding) *Diagram {
	if !e.HasSupply() {
		return nil
	}
	b := &builder{e: e.In(evidence.Working), chain: e.Chain(), circuit: e.Layout(), used: map[string]bool{}}
	d := &Diagram{Ladder: b.ladder(), Rail: b.rail(), Gun: b.gun()}
	b.hang(d)
	d.Loose = b.loose()
	d.Unknown = b.unknown
	d.mark(findings)
	return d
}

// builder takes the elements of a circuit one after the other.
type builder struct {
	e       *evidence.Evidence
	chain   *chain.Chain
	circuit *circuit.Circuit
	used    map[string]bool // elements that have their place
	unknown string
}

// part takes an element by its name; nil where there is none.
func (b *builder) part(name string) *Part {
	el := b.circuit.Element(name)
	if el == nil {
		return nil
	}
	b.used[name] = true
	from, to := el.Ends()
	return &Part{Name: name, Kind: b.kind(el), Value: b.value(el), From: from, To: to}
}

// there takes those of some elements that exist.
func (b *builder) there(names ...string) []Part {
	var all []Part
	for _, name := range names {
		if p := b.part(name); p != nil {
			all = append(all, *p)
		}
	}
	return all
}

// node is a node with its potential.
func (b *builder) node(name string) Node {
	v, err := b.e.Potential(name)
	if err != nil {
		b.unknown = cmp.Or(b.unknown, err.Error())
		return Node{Name: name}
	}
	return Node{Name: name, Potential: quantity.Text(v)}
}

func (b *builder) ladder() Ladder {
	m := b.chain.Multiplier
	l := Ladder{Foot: Node{Name: "foot"}}
	marks := []string{""}
	if m.Symmetrical() {
		marks = []string{".a", ".b"}
	}
	for _, mark := range marks {
		l.Columns = append(l.Columns, b.column(mark, m.Stages.V))
	}
	for k := 1; k <= m.Stages.V; k++ {
		l.Smoothing = append(l.Smoothing, b.there(fmt.Sprintf("multiplier.smoothing_capacitor.%d", k))...)
		l.Stages = append(l.Stages, b.node(fmt.Sprintf("stage.%d", k)))
	}
	return l
}

// column takes one coupling column; mark tells two of them apart.
func (b *builder) column(mark string, stages int) Column {
	c := Column{Source: *b.part("drive.source" + mark), Drive: Node{Name: "drive" + mark},
		Series: b.there("drive.resistance"+mark, "drive.inductance"+mark)}
	for k := 1; k <= stages; k++ {
		c.Coupling = append(c.Coupling, b.there(fmt.Sprintf("multiplier.coupling_capacitor%s.%d", mark, k))...)
		c.Nodes = append(c.Nodes, b.node(fmt.Sprintf("coupling%s.%d", mark, k)))
		c.Lower = append(c.Lower, b.there(fmt.Sprintf("multiplier.diode%s.%d", mark, 2*k-1))...)
		c.Upper = append(c.Upper, b.there(fmt.Sprintf("multiplier.diode%s.%d", mark, 2*k))...)
	}
	return c
}

// rail follows the supply from the multiplier through filters and cable to the output.
func (b *builder) rail() []Span {
	rail := []Span{{Node: b.node("multiplier")}}
	for i := range b.chain.Filters {
		name := fmt.Sprintf("filter.%d", i+1)
		s := Span{Series: b.part(name + ".resistor"), Node: b.node(name)}
		for _, p := range b.there(name + ".capacitor") {
			s.Hanging = append(s.Hanging, Hanging{Parts: []Part{p}})
		}
		rail = append(rail, s)
	}
	rail = append(rail, Span{Node: b.node("supply")})
	if cable := b.part("cable"); cable != nil {
		rail = append(rail, Span{Series: cable}) // its far end has no name
	}
	return append(rail, Span{Series: b.part("cable.gun_end_resistor"), Node: b.node("output")})
}

func (b *builder) gun() *Gun {
	if !b.chain.HasCathode() {
		return nil
	}
	g := &Gun{Cathode: b.node("cathode"), FedCathode: b.chain.Bias != nil && b.chain.Bias.Fed.V == "cathode",
		Bias: b.there("bias.source", "bias.resistor", "bias.bypass", "bias.clamp"), Emission: b.part("gun"), Heater: b.heater()}
	control, there := b.circuit.Node("control")
	cathode, _ := b.circuit.Node("cathode")
	g.Same = !there || control == cathode
	if !g.Same {
		g.Control = b.node("control")
	}
	return g
}

func (b *builder) heater() *Heater {
	h := b.chain.Heater
	if h == nil {
		return nil
	}
	heater := &Heater{A: b.node("heater.a"), B: b.node("heater.b"), Supply: *b.part("heater.supply"),
		Centre: b.there("heater.centre_resistors.1", "heater.centre_resistors.2"), Mains: b.part("mains"), Feed: b.part("heater.feed"),
		Stray: b.part("heater.capacitance_to_ground")}
	if heater.Stray != nil {
		heater.Stray.Stray = true
	}
	if f := h.Feed; f != nil && f.Kind.V != "battery" && heater.Feed == nil {
		heater.Feed = &Part{Name: "heater.feed", Kind: Transformer, From: "mains", To: "cathode"}
	}
	return heater
}

// hang puts what lies between a node of the rail and ground where it belongs.
func (b *builder) hang(d *Diagram) {
	if p := b.part("divider.upper"); p != nil {
		b.hangAt(d, p.From, Hanging{Parts: append([]Part{*p}, b.there("divider.lower")...),
			Tap: b.node("divider.tap"), Beside: b.there("divider.meter", "divider.clamp")})
	}
	for _, el := range b.circuit.Elements {
		from, to := el.Ends()
		if b.used[el.Name] || unseen(el) || from != "ground" && to != "ground" {
			continue
		}
		node := from
		if from == "ground" {
			node = to
		}
		if i := b.place(d, node); i >= 0 {
			d.Rail[i].Hanging = append(d.Rail[i].Hanging, Hanging{Parts: []Part{*b.part(el.Name)}})
		}
	}
}

// hangAt hangs something at a node of the rail, or lays it with the loose parts.
func (b *builder) hangAt(d *Diagram, node string, h Hanging) {
	if i := b.place(d, node); i >= 0 {
		d.Rail[i].Hanging = append(d.Rail[i].Hanging, h)
		return
	}
	for _, p := range append(h.Parts, h.Beside...) {
		b.used[p.Name] = false
	}
}

// place is where on the rail a node stands: under its own name, or else where it is
// the same point; −1 where it is none of them.
func (b *builder) place(d *Diagram, name string) int {
	for i, s := range d.Rail {
		if s.Node.Name == name {
			return i
		}
	}
	n, _ := b.circuit.Node(name)
	for i, s := range d.Rail {
		if m, ok := b.circuit.Node(s.Node.Name); ok && m == n {
			return i
		}
	}
	return -1
}

// loose takes what has found no place.
func (b *builder) loose() []Part {
	var all []Part
	for _, el := range b.circuit.Elements {
		if !b.used[el.Name] && !unseen(el) {
			all = append(all, *b.part(el.Name))
		}
	}
	return all
}

// unseen reports whether an element is not drawn: strays, and the leakage of a clamp.
func unseen(el circuit.Element) bool {
	return el.Role == circuit.Stray || strings.HasSuffix(el.Name, ".clamp.leakage")
}
