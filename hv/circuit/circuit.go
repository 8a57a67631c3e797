// Package circuit is the only place that knows what is connected to what: it turns
// a described chain into nodes and elements, merges what is linked, and edits the
// result for faults. DC, phasors, the network in time and the decay all read it.
//
// Signs: a current through an element flows inside it from From to To; the voltage
// across an element is v(From) − v(To). Ground is node 0.
package circuit

import (
	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Node is a point of one potential; several names may share one.
type Node int

// Ground is the reference of all potentials.
const Ground Node = 0

// Kind is what an element is.
type Kind int

// The kinds of element.
const (
	Resistor  Kind = iota // Resistance
	Capacitor             // Capacitance
	Inductor              // Inductance
	Diode                 // Rectifier; From is the anode
	Source                // Wave: v(From) − v(To) is given
	Sink                  // Current, constant, from From to To
	Gap                   // spark gap, gas tube, varistor: open below Strikes
)

// Role is what an element is there for.
type Role int

// The roles of elements.
const (
	Ladder   Role = iota // drive, capacitors and diodes of the multiplier
	Series               // carries the supply on towards the gun
	Shunt                // holds charge to ground
	Stray                // capacitance nobody fitted
	Load                 // draws current: load, divider, meter, bleeder, gun
	Floating             // heater supply and its feed
	Limiter              // clamp or gap
)

// Waveform is the form of a source.
type Waveform int

// The wave-forms of sources.
const (
	Direct Waveform = iota // constant Amplitude
	Sine                   // Amplitude · sin(2π f t)
	Square                 // +Amplitude in the first half of the period, −Amplitude in the second
)

// Wave is what a source gives; Amplitude is zero to peak and may be negative.
type Wave struct {
	Form      Waveform
	Amplitude quantity.Voltage
	Frequency quantity.Frequency
}

// Rectifier is a diode: i = Leakage·v + max(0, v − Drop)/On, with Junction in parallel.
type Rectifier struct {
	Drop     quantity.Voltage
	On       quantity.Resistance
	Junction quantity.Capacitance
	Leakage  float64 // conductance in siemens, both directions
}

// Element is one two-terminal element.
type Element struct {
	Name     string // unique: "filter.1.resistor"
	Kind     Kind
	Role     Role
	From, To Node

	Resistance  quantity.Resistance
	Capacitance quantity.Capacitance
	Inductance  quantity.Inductance
	Rectifier   Rectifier
	Wave        Wave
	Current     quantity.Current
	Strikes     quantity.Voltage

	// Permanent elements stay when everything that can be unplugged is unplugged.
	Permanent bool
	// Doubt is set where the value is not known well enough to compute with.
	Doubt *lack.Lack
	// Place is where the description gives the element.
	Place document.Place
	// The described part, for its ratings; nil where there is none.
	ResistorPart  *chain.Resistor
	CapacitorPart *chain.Capacitor
	DiodePart     *chain.Diode
	LoosePart     *chain.Part
	// Uneven says how one element of a resistor of many differs; zero where all are alike.
	Uneven Uneven

	from, to string // names of the ends, kept for edits
}

// Ends are the names of the two ends as the description has them.
func (e *Element) Ends() (from, to string) { return e.from, e.to }

// Circuit is a connected set of elements. It is not changed after it is built:
// edits return a new one.
type Circuit struct {
	Elements []Element
	Negative bool // polarity of the multiplier

	names  []string // every name, in order of appearance
	nodes  map[string]Node
	labels [][]string // by node
	links  []link
}

// link is an ideal connection between two names.
type link struct{ name, from, to string }

// Nodes is the number of nodes, ground included.
func (c *Circuit) Nodes() int { return len(c.labels) }

// Node finds a node by any of its names.
func (c *Circuit) Node(name string) (Node, bool) {
	n, ok := c.nodes[name]
	return n, ok
}

// Names lists all node names in order of appearance, from ground upwards.
func (c *Circuit) Names() []string { return c.names }

// Labels lists the names of one node, the first the most telling.
func (c *Circuit) Labels(n Node) []string { return c.labels[n] }

// Element finds an element by its name; nil where there is none.
func (c *Circuit) Element(name string) *Element {
	for i := range c.Elements {
		if c.Elements[i].Name == name {
			return &c.Elements[i]
		}
	}
	return nil
}

// Doubt is the first reason not to trust the circuit's values; nil where all are known.
func (c *Circuit) Doubt() error {
	for _, e := range c.Elements {
		if e.Doubt != nil {
			return e.Doubt
		}
	}
	return nil
}

// DiodeRating is the rated reverse voltage of a diode and where it is given.
func (e *Element) DiodeRating() (quantity.Voltage, document.Place) {
	if e.DiodePart != nil {
		return e.DiodePart.RatedVoltage.V, e.DiodePart.RatedVoltage.Place
	}
	if e.LoosePart != nil {
		return e.LoosePart.RatedVoltage.V, e.LoosePart.RatedVoltage.Place
	}
	return 0, document.Place{Key: "multiplier.diode.rated_voltage"}
}
