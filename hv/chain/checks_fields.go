package chain

import (
	"math"

	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// checkElectrodes asks of each electrode for a node or a potential, the same for all
// pieces of one name.
func checkElectrodes(s *survey) {
	for i := range s.Fields {
		first := map[string]*Electrode{}
		for j := range s.Fields[i].Electrodes {
			e := &s.Fields[i].Electrodes[j]
			s.electrodePotential(e)
			if other := first[e.Name.V]; other == nil {
				first[e.Name.V] = e
			} else if s.sound(e.Name.Place) && (other.Node.V != e.Node.V || other.Voltage.V != e.Voltage.V) {
				s.fault(e.Name.Place, "another piece of this electrode has another potential", "give all pieces of one name the same node or voltage, or another name")
			}
		}
	}
}

func (s *survey) electrodePotential(e *Electrode) {
	switch {
	case e.Node.Set() && e.Voltage.Set():
		s.fault(e.Voltage.Place, "both a node and a voltage", "keep one of the two")
	case s.lacks(e.Node.Place) && s.lacks(e.Voltage.Place):
		s.fault(e.Here(), "neither a node nor a voltage", `give one, as in voltage = "0 V"`)
	case e.Node.Set() && s.without(s.Multiplier != nil) && e.Node.V != "ground":
		s.fault(e.Node.Place, "without a multiplier nothing tells the voltage of a node", `give voltage in place of node, as in voltage = "20 kV"`)
	}
}

// checkProfiles follows every outline stroke by stroke.
func checkProfiles(s *survey) {
	for i := range s.Fields {
		f := &s.Fields[i]
		for j := range f.Electrodes {
			s.profile(f.Electrodes[j].Profile, false)
		}
		for j := range f.Dielectrics {
			s.profile(f.Dielectrics[j].Profile, true)
		}
		for j := range f.Boundary {
			s.profile(f.Boundary[j].Profile, false)
		}
		for j := range f.Probes {
			s.radius(f.Probes[j].At)
		}
	}
}

func (s *survey) profile(strokes []Stroke, closed bool) {
	sound := true
	for i := range strokes {
		if !s.sound(strokes[i].Place) {
			return
		}
		if i == 0 {
			sound = s.start(&strokes[i]) && sound
		} else {
			sound = s.stroke(&strokes[i], &strokes[i-1]) && sound
		}
	}
	if len(strokes) == 1 && sound {
		s.fault(strokes[0].Here(), "a profile of one point", `go on with { to = ["12 mm", "5 mm"] }`)
		return
	}
	if n := len(strokes); closed && sound && n > 1 && distance(strokes[0].From.V, strokes[n-1].To.V) > closeness {
		s.fault(strokes[n-1].To.Place, "the outline of a dielectric does not end where it starts", "end it at its first point")
	}
}

// closeness is the distance at which two points of a drawing count as one: rounding
// of a drawing to a tenth of a micrometre.
const closeness quantity.Length = 1e-7

// start judges the first stroke; it reports whether a point is known.
func (s *survey) start(st *Stroke) bool {
	if s.lacks(st.From.Place) {
		s.fault(st.Here(), "a profile that starts nowhere", `begin with { from = ["0 mm", "5 mm"] }`)
	}
	for _, at := range []document.Place{st.To.Place, st.Centre.Place, st.Turn.Place} {
		if at.Line > 0 {
			s.fault(at, "the first stroke is a point", "put lines and arcs in strokes of their own")
		}
	}
	return s.radius(st.From)
}

// stroke judges a line or arc from the end of the one before; it reports whether
// the next point is known.
func (s *survey) stroke(st, before *Stroke) bool {
	if st.From.Set() {
		s.fault(st.From.Place, "a stroke starts where the one before ends", "give from in the first stroke only")
	}
	if s.lacks(st.To.Place) {
		s.fault(st.Here(), "a stroke that leads nowhere", `give to, as in { to = ["12 mm", "5 mm"] }`)
	}
	switch {
	case st.Centre.Set() && s.lacks(st.Turn.Place):
		s.fault(st.Centre.Place, "an arc without a turn", `give turn = "left" or turn = "right", as seen along the path`)
	case st.Turn.Set() && s.lacks(st.Centre.Place):
		s.fault(st.Turn.Place, "an arc without a centre", `give centre, as in centre = ["12 mm", "8 mm"]`)
	}
	begin := before.To
	if before.From.Set() {
		begin = before.From
	}
	known := s.radius(st.To) && s.point(begin)
	if known && distance(begin.V, st.To.V) <= closeness && !st.Centre.Set() {
		s.fault(st.To.Place, "a line to where it starts", "leave the stroke out")
	}
	if known && s.point(st.Centre) {
		s.arc(st, begin.V)
	}
	return known
}

// arc compares the radii at both ends of an arc.
func (s *survey) arc(st *Stroke, begin []quantity.Length) {
	first, last := distance(begin, st.Centre.V), distance(st.To.V, st.Centre.V)
	if first <= closeness || !near(first, last) {
		s.fault(st.Centre.Place, "the ends of the arc are "+quantity.Text(first)+" and "+quantity.Text(last)+" from its centre",
			"give a centre that is as far from both ends, within 1 %")
	}
}

func (s *survey) point(p document.Given[[]quantity.Length]) bool {
	return s.sound(p.Place) && len(p.V) == 2
}

// radius refuses points on the wrong side of the axis; it reports whether there is a
// point to go on from.
func (s *survey) radius(p document.Given[[]quantity.Length]) bool {
	if !s.point(p) {
		return false
	}
	if p.V[0] < 0 {
		s.fault(p.Place, "r is negative", "give the distance from the axis first, then z along it")
	}
	return p.V[0] >= 0
}

func distance(a, b []quantity.Length) quantity.Length {
	return quantity.Length(math.Hypot(float64(a[0]-b[0]), float64(a[1]-b[1])))
}
