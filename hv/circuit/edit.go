package circuit

import (
	"slices"

	"kilovet/hv/quantity"
)

// Open is the circuit without one element or link: the fault of an open part.
func (c *Circuit) Open(name string) *Circuit {
	b := c.rebuild()
	b.elements = slices.DeleteFunc(b.elements, func(e Element) bool { return e.Name == name })
	b.links = slices.DeleteFunc(b.links, func(l link) bool { return l.name == name })
	return b.circuit()
}

// OpenString is the circuit with one element of a resistor open: its string carries
// nothing any more, the others all. Of a single string nothing is left.
func (c *Circuit) OpenString(name string) *Circuit {
	e := c.Element(name)
	if e == nil {
		panic("circuit: no element " + name)
	}
	strings := 1
	if e.ResistorPart != nil {
		_, strings = e.ResistorPart.Elements()
	}
	if strings == 1 {
		return c.Open(name)
	}
	rise := quantity.Resistance(strings) / quantity.Resistance(strings-1)
	return c.With(name, func(e *Element) { e.Resistance, e.Uneven.Lost = e.Resistance*rise, 1 })
}

// Short is the circuit with one element replaced by an ideal connection.
func (c *Circuit) Short(name string) *Circuit {
	e := c.Element(name)
	if e == nil {
		panic("circuit: no element " + name)
	}
	from, to := e.from, e.to
	b := c.Open(name).rebuild()
	b.link(name, from, to)
	return b.circuit()
}

// Join is the circuit with an ideal connection between two named nodes.
func (c *Circuit) Join(name, from, to string) *Circuit {
	b := c.rebuild()
	b.link(name, from, to)
	return b.circuit()
}

// Bridge is the circuit with a resistor between two named nodes: a body, a meter, a probe.
func (c *Circuit) Bridge(name, from, to string, r quantity.Resistance) *Circuit {
	b := c.rebuild()
	b.add(Element{Name: name, Kind: Resistor, Role: Load, Resistance: r}, from, to)
	return b.circuit()
}

// With is the circuit with one element changed by an edit of its values.
func (c *Circuit) With(name string, edit func(*Element)) *Circuit {
	b := c.rebuild()
	for i := range b.elements {
		if b.elements[i].Name == name {
			edit(&b.elements[i])
		}
	}
	return b.circuit()
}

// Each is the circuit with every element changed by an edit; an element for which
// the edit reports false is left out.
func (c *Circuit) Each(edit func(*Element) bool) *Circuit {
	with := *c // names and links stay, whatever hangs on them
	with.Elements = make([]Element, 0, len(c.Elements))
	for _, e := range c.Elements {
		if edit(&e) {
			e.From, e.To = c.nodes[e.from], c.nodes[e.to]
			with.Elements = append(with.Elements, e)
		}
	}
	return &with
}

// Reverse swaps the ends of an element: a diode put in the wrong way round.
func (c *Circuit) Reverse(name string) *Circuit {
	return c.With(name, func(e *Element) { e.from, e.to = e.to, e.from })
}

func (c *Circuit) rebuild() *builder {
	b := &builder{elements: slices.Clone(c.Elements), names: slices.Clone(c.names), links: slices.Clone(c.links), seen: make(map[string]bool, len(c.names)), negative: c.Negative}
	for _, n := range c.names {
		b.seen[n] = true
	}
	return b
}
