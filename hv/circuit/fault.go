package circuit

import (
	"fmt"
	"slices"

	"kilovet/hv/quantity"
)

// Hold is the circuit with one element replaced by a source of constant voltage from
// its first end to its second: a gap that has struck, a bias that has charged itself.
func (c *Circuit) Hold(name string, v quantity.Voltage) *Circuit {
	e := c.Element(name)
	if e == nil {
		panic("circuit: no element " + name)
	}
	held := Element{Name: name, Kind: Source, Role: Limiter, Permanent: e.Permanent, Place: e.Place, Wave: Wave{Direct, v, 0}}
	from, to := e.Ends()
	b := c.Open(name).rebuild()
	b.add(held, from, to)
	return b.circuit()
}

// Charge is the circuit with a further source of constant voltage between two nodes.
func (c *Circuit) Charge(name, from, to string, v quantity.Voltage) *Circuit {
	b := c.rebuild()
	b.add(Element{Name: name, Kind: Source, Role: Limiter, Permanent: true, Wave: Wave{Direct, v, 0}}, from, to)
	return b.circuit()
}

// Move is the circuit with the ends of its elements connected anew: the edit is given
// each element with the names of its ends and gives the names they are to have.
func (c *Circuit) Move(edit func(e *Element, from, to string) (string, string)) *Circuit {
	b := c.rebuild()
	for i := range b.elements {
		e := &b.elements[i]
		e.from, e.to = edit(e, e.from, e.to)
		b.name(e.from)
		b.name(e.to)
	}
	return b.circuit()
}

// Chassis is what ground becomes for everything but drive and multiplier where the earth
// link between the two is open.
const Chassis = "chassis"

// Unearthed is the circuit with the earth link open: what stood on ground, but for drive
// and multiplier, stands on a chassis of its own.
func (c *Circuit) Unearthed() *Circuit {
	lifted := func(node string) string {
		if node == "ground" {
			return Chassis
		}
		return node
	}
	return c.Move(func(e *Element, from, to string) (string, string) {
		if e.Role == Ladder {
			return from, to
		}
		return lifted(from), lifted(to)
	})
}

// strayOfWinding is the capacitance to ground of a drive whose return is open: common
// practice, no source; direct voltages do not rest on it.
const strayOfWinding quantity.Capacitance = 50e-12

// Unreturned is the circuit with the return of the multiplier open: its foot is tied to
// ground by the stray of the drive alone.
func (c *Circuit) Unreturned() *Circuit {
	b := c.Open("multiplier return").rebuild()
	b.add(Element{Name: "stray.winding", Kind: Capacitor, Role: Stray, Capacitance: strayOfWinding, Permanent: true}, "foot", "ground")
	return b.circuit()
}

// Reference is the node that measuring devices refer to: ground, or the chassis where
// that came off it.
func (c *Circuit) Reference() string {
	if _, lifted := c.Node(Chassis); lifted {
		return Chassis
	}
	return "ground"
}

// strayOfBody is what an open capacitor leaves between its leads: common practice, no
// source.
const strayOfBody quantity.Capacitance = 1e-12

// Broken is the circuit with a capacitor open inside: the stray of its body is left.
func (c *Circuit) Broken(name string) *Circuit {
	return c.With(name, func(e *Element) { e.Capacitance = min(e.Capacitance, strayOfBody) })
}

// Links lists the names of the ideal connections between nodes, in order.
func (c *Circuit) Links() []string {
	var all []string
	for _, l := range c.links {
		if !slices.Contains(all, l.name) {
			all = append(all, l.name)
		}
	}
	return all
}

// Sane says what is wrong with a circuit: nothing where every element has a name of its
// own and ends that are nodes, and values that are finite.
func (c *Circuit) Sane() error {
	seen := map[string]bool{}
	for _, e := range c.Elements {
		switch {
		case seen[e.Name]:
			return fmt.Errorf("circuit: %s stands twice", e.Name)
		case int(e.From) >= c.Nodes() || int(e.To) >= c.Nodes() || e.From < 0 || e.To < 0:
			return fmt.Errorf("circuit: %s ends at no node", e.Name)
		case !valued(e):
			return fmt.Errorf("circuit: %s has no value that can be computed with", e.Name)
		}
		seen[e.Name] = true
	}
	return nil
}

// valued reports whether the value that makes the element is finite and not negative.
func valued(e Element) bool {
	v := 0.0
	switch e.Kind {
	case Resistor:
		v = float64(e.Resistance)
	case Capacitor:
		v = float64(e.Capacitance)
	case Inductor:
		v = float64(e.Inductance)
	case Sink:
		v = float64(e.Current)
	case Gap:
		v = float64(e.Strikes)
	case Source:
		v = max(float64(e.Wave.Amplitude), -float64(e.Wave.Amplitude))
	}
	return v >= 0 && v <= 1e300
}
