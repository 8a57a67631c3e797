package evidence

import (
	"errors"
	"strings"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/profile"
	"kilovet/insulation/field"
)

// Outline is the code of faults of outlines.
const Outline document.Code = "outline"

// OutlineFaults lists what is wrong with the outlines of all fields, as faults of the
// description, given those that were found in it already: an arrangement that bears one
// of them is not looked at.
func OutlineFaults(c *chain.Chain, found document.Faults) document.Faults {
	var all document.Faults
	e := New(c)
	for i := range c.Fields {
		f := &c.Fields[i]
		if beset(c, i, found) {
			continue
		}
		s := sketchOf(f)
		wrong := s.faults
		if len(wrong) == 0 {
			errors.As(field.Inspect(s.Arrangement, e.onePotential(f, len(found) == 0)), &wrong)
		}
		for _, w := range wrong {
			all = append(all, s.fault(f, w))
		}
	}
	return all
}

// fault is one of an outline as one of the description.
func (s *sketch) fault(f *chain.Field, wrong profile.Fault) document.Fault {
	at, remedy := s.place(f, wrong), "correct the outline"
	if wrong.At != (profile.Point{}) {
		remedy += " about " + wrong.At.String()
	}
	return document.Fault{Code: Outline, Key: at.Key, Line: at.Line, Column: at.Column, What: wrong.What, Remedy: remedy}
}

// beset reports whether a fault was found between the head of a field and the next.
func beset(c *chain.Chain, i int, found document.Faults) bool {
	from := c.Fields[i].Here().Line
	for _, f := range found {
		next := i+1 < len(c.Fields) && f.Line >= c.Fields[i+1].Here().Line
		if f.Key == "" || strings.HasPrefix(f.Key, "field") && f.Line >= from && !next {
			return true
		}
	}
	return false
}

// onePotential tells which electrodes have one potential: the same voltage, or the same node
// of the circuit, where the description is sound enough to have one.
func (e *Evidence) onePotential(f *chain.Field, sound bool) func(a, b string) bool {
	held := map[string]chain.Electrode{}
	for _, el := range f.Electrodes {
		held[el.Name.V] = el
	}
	return func(a, b string) bool {
		x, y := held[a], held[b] // the earthed boundary is not held: 0 V
		if earthed(x) && earthed(y) || x.Node.V == y.Node.V && x.Voltage.V == y.Voltage.V {
			return true
		}
		if !sound || !x.Node.Set() || !y.Node.Set() {
			return false
		}
		n, known := e.Layout().Node(x.Node.V)
		m, also := e.Layout().Node(y.Node.V)
		return known && also && n == m
	}
}

func earthed(el chain.Electrode) bool {
	return el.Node.V == "ground" || !el.Node.Set() && el.Voltage.V == 0
}
