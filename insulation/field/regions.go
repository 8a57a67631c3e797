package field

import (
	"fmt"

	"kilovet/hv/profile"
)

// infinity is the conductor that open space ends at.
const infinity = -1

// findRegions finds the faces in which there is a field: those that hang together,
// through interfaces, with at least two conductors. The inside of an electrode and
// what lies beyond the boundary are not among them.
func (m *model) findRegions() profile.Faults {
	material, faults := m.materials()
	if len(faults) > 0 {
		return faults
	}
	part := m.parts()
	ends := m.conductorsOf(part)
	const outside = 0
	if m.outsideEnds() {
		if faults := m.checkBare(); len(faults) > 0 {
			return faults
		}
		delete(ends, outside)
	}
	live := 0
	for p := range m.plane.Faces {
		if len(ends[p]) >= 2 {
			live++
		}
	}
	// A body around all others is an enclosure: the space beyond it is not modelled.
	if len(ends[outside]) == 2 && live > 1 {
		delete(ends, outside)
	}
	m.faceOf = make([]int, m.plane.Faces)
	for f := range m.faceOf {
		m.faceOf[f] = -1
		if len(ends[part[f]]) >= 2 {
			m.faceOf[f] = len(m.regions)
			m.regions = append(m.regions, region{f, material[f], m.constant(material[f])})
		}
	}
	if len(m.regions) == 0 {
		return profile.Faults{{Profile: m.outlines[0].Name, What: "nowhere is there a field between two electrodes; " + m.whyDead()}}
	}
	return m.checkOpen()
}

func (m *model) whyDead() string {
	if m.outsideEnds() {
		return "the outlines and boundaries leave the model open"
	}
	return "one electrode encloses everything"
}

// constant is what the flux in a material is proportional to.
func (m *model) constant(material int) float64 {
	switch {
	case m.resistive:
		return m.conductivity(material)
	case m.over > 0: // ε + σ T/ε₀: the transform of displacement and current
		return m.permittivity(material) + m.leak(material)*m.over/vacuumPermittivity
	}
	return m.permittivity(material)
}

func (m *model) permittivity(material int) float64 {
	if material > 0 {
		return m.Dielectrics[material-1].Permittivity
	}
	if m.Permittivity == 0 {
		return 1
	}
	return m.Permittivity
}

// materials says what fills each face, and reports bodies that overlap.
func (m *model) materials() ([]int, profile.Faults) {
	material := make([]int, m.plane.Faces)
	var faults profile.Faults
	for p, o := range m.owners {
		if o.kind != ofDielectric {
			continue
		}
		for f, inside := range m.plane.Inside(p) {
			if inside && material[f] != 0 {
				faults = append(faults, m.overlap(p, f, m.Dielectrics[material[f]-1].Name))
				break
			}
			if inside {
				material[f] = o.index + 1
			}
		}
	}
	return material, faults
}

func (m *model) overlap(outline, face int, other string) profile.Fault {
	f := profile.Fault{Profile: m.outlines[outline].Name, What: fmt.Sprintf("the dielectric overlaps %s", other)}
	for _, e := range m.plane.Edges {
		if e.Left == face || e.Right == face {
			f.At = e.At(0.5)
			for _, o := range e.Origins {
				if o.Profile == outline {
					f.Stroke = o.Segment + 1
					return f
				}
			}
		}
	}
	return f
}

// passable reports whether a field passes through an edge.
func (m *model) passable(e profile.Edge) bool {
	return len(m.electrodesOf(e)) == 0 && m.owned(e, ofDielectric) && !m.owned(e, ofNatural) && !m.owned(e, ofMirror) && !onAxis(e)
}

// parts numbers the faces that hang together through interfaces, each part by its
// first face; part 0 is the unbounded one.
func (m *model) parts() []int {
	part := make([]int, m.plane.Faces)
	for f := range part {
		part[f] = f
	}
	for _, e := range m.plane.Edges {
		if !m.passable(e) {
			continue
		}
		from, to := max(part[e.Left], part[e.Right]), min(part[e.Left], part[e.Right])
		for f := range part {
			if part[f] == from {
				part[f] = to
			}
		}
	}
	return part
}

// conductorsOf lists the groups of electrodes each part borders.
func (m *model) conductorsOf(part []int) map[int]map[int]bool {
	ends := map[int]map[int]bool{}
	for _, p := range part {
		ends[p] = map[int]bool{}
	}
	for _, e := range m.plane.Edges {
		left, right := e.Left, e.Right
		if onAxis(e) { // beyond it there is nothing
			left, right = beside(e), beside(e)
		}
		for _, k := range m.electrodesOf(e) {
			ends[part[left]][m.group[k]] = true
			ends[part[right]][m.group[k]] = true
		}
	}
	ends[0][infinity] = true
	return ends
}

// outsideEnds reports whether the unbounded face is beyond a boundary of the model.
func (m *model) outsideEnds() bool {
	for _, e := range m.plane.Edges {
		closes := m.owned(e, ofNatural) || m.owned(e, ofEarth)
		if closes && !m.owned(e, ofMirror) && !onAxis(e) && (e.Left == 0) != (e.Right == 0) {
			return true
		}
	}
	return false
}

// checkBare reports interfaces that are bare to the outside of a model that ends.
func (m *model) checkBare() (faults profile.Faults) {
	for _, e := range m.plane.Edges {
		if m.passable(e) && (e.Left == 0) != (e.Right == 0) {
			faults = append(faults, m.at(e, ofDielectric, "beyond this surface there is no model: the body sticks out of it, or a boundary is wanting"))
		}
	}
	return faults
}

// checkOpen reports natural boundaries that do not close the figure: those that end
// in nothing, or else all that have the model on both sides.
func (m *model) checkOpen() (open profile.Faults) {
	var loose profile.Faults
	for _, e := range m.plane.Edges {
		inside := m.faceOf[e.Left] >= 0 && m.faceOf[e.Right] >= 0
		if !inside || !m.owned(e, ofNatural) || m.owned(e, ofMirror) || len(m.electrodesOf(e)) > 0 || onAxis(e) {
			continue
		}
		for _, n := range []int{e.Start, e.End} {
			if len(m.plane.Around(n)) == 1 {
				f := m.at(e, ofNatural, "the boundary ends here and meets nothing: the figure is open")
				f.At = m.plane.Nodes[n]
				loose = append(loose, f)
			}
		}
		open = append(open, m.at(e, ofNatural, "the model lies on both sides of a natural boundary: it must close the figure"))
	}
	if len(loose) > 0 {
		return loose
	}
	return open
}

// at makes a fault of an edge's origin of a kind.
func (m *model) at(e profile.Edge, kind ownerKind, what string) profile.Fault {
	for _, o := range e.Origins {
		if o.Profile != profile.Axis && m.owners[o.Profile].kind == kind {
			return profile.Fault{Profile: m.outlines[o.Profile].Name, Stroke: o.Segment + 1, At: e.At(0.5), What: what}
		}
	}
	return profile.Fault{At: e.At(0.5), What: what}
}
