// Package build turns what is described by a few dimensions, feedthroughs, guns and
// shapes of gaps, into outlines of electrodes and dielectrics whose field can be worked
// out. It computes no field and judges nothing.
package build

import (
	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// Arrangement is a figure whose field is wanted: a described one, or one built from a
// few dimensions.
type Arrangement struct {
	chain.Field
	// From says what it was built from; empty for a described one.
	From string
	// Of is the name of what it was built from.
	Of string
	// Ideal is what a closed form of the same shape takes for granted too; may be empty.
	Ideal string
	// Assumed is what building it took for granted.
	Assumed []string
	// Dimensions are those it was built from.
	Dimensions []Dimension
	// Gap is the spacing whose shape it was built from, nil for none.
	Gap *chain.Spacing
	// Err is the reason why it could not be built.
	Err error
}

// Dimension is one length of an arrangement and the arrangement with another in its
// place.
type Dimension struct {
	Name  string          // "edge radius of the hole"
	Key   string          // "feedthrough.hole.edge_radius"
	Value quantity.Length // 0 for the radius of an edge that is sharp
	// Near is where it is, r + iz in metres; nil where it is everywhere.
	Near *complex128
	With func(quantity.Length) *Arrangement
}

// pen draws outlines for the description at a place of it.
type pen struct{ place document.Place }

func given[T any](p pen, v T) document.Given[T] { return document.Given[T]{V: v, Place: p.place} }

// mark is a point of an outline; an arc leads to it where its centre is given.
type mark struct {
	r, z   quantity.Length
	centre []quantity.Length
	turn   string
}

func at(r, z quantity.Length) mark { return mark{r: r, z: z} }

func arc(r, z, centreR, centreZ quantity.Length, turn string) mark {
	return mark{r, z, []quantity.Length{centreR, centreZ}, turn}
}

// outline joins marks; one that lies where the one before does is left out.
func (p pen) outline(marks ...mark) (strokes []chain.Stroke) {
	for i, m := range marks {
		s := chain.Stroke{Table: document.Table{Place: p.place}}
		here := given(p, []quantity.Length{m.r, m.z})
		switch {
		case i == 0:
			s.From = here
		case quantity.Equal(m.r, marks[i-1].r) && quantity.Equal(m.z, marks[i-1].z):
			continue
		default:
			s.To = here
		}
		if m.centre != nil {
			s.Centre, s.Turn = given(p, m.centre), given(p, m.turn)
		}
		strokes = append(strokes, s)
	}
	return strokes
}

// at is an electrode at a node.
func (p pen) at(name, node string, marks ...mark) chain.Electrode {
	return chain.Electrode{Table: document.Table{Place: p.place}, Name: given(p, name), Node: given(p, node), Profile: p.outline(marks...)}
}

// held is an electrode at a stated voltage.
func (p pen) held(name string, v quantity.Voltage, marks ...mark) chain.Electrode {
	return chain.Electrode{Table: document.Table{Place: p.place}, Name: given(p, name), Voltage: given(p, v), Profile: p.outline(marks...)}
}

func (p pen) natural(marks ...mark) chain.Boundary {
	return chain.Boundary{Table: document.Table{Place: p.place}, Kind: given(p, "natural"), Profile: p.outline(marks...)}
}

// field is an empty arrangement in a medium.
func (p pen) field(name, medium string) chain.Field {
	return chain.Field{Table: document.Table{Place: p.place}, Name: given(p, name), Medium: given(p, medium)}
}
