package field

import (
	"fmt"

	"kilovet/hv/profile"
	"kilovet/hv/quantity"
)

// findWalls turns the edges that border a region into walls.
func (m *model) findWalls() (faults profile.Faults) {
	for i, e := range m.plane.Edges {
		left, right := m.faceOf[e.Left], m.faceOf[e.Right]
		electrodes := m.electrodesOf(e)
		if onAxis(e) {
			if len(electrodes) > 0 && m.faceOf[beside(e)] >= 0 {
				faults = append(faults, m.at(e, ofElectrode, "the electrode runs along the axis: a conductor needs a radius"))
			}
			continue
		}
		if left < 0 && right < 0 || m.owned(e, ofMirror) && len(electrodes) == 0 {
			continue
		}
		w := wall{edge: i, curve: newCurve(e.Segment, m.unit), left: left, right: right, electrode: -1, group: -1}
		switch {
		case len(electrodes) > 0:
			w.electrode, w.group, w.kind = electrodes[0], m.group[electrodes[0]], conductor
			if left == right {
				w.kind = sheet
			}
		case m.owned(e, ofNatural):
			w.kind = natural
		default:
			w.kind = interfaces
		}
		m.walls = append(m.walls, w)
	}
	return faults
}

// beside is the face right of an edge on the axis, the axis looked at upwards.
func beside(e profile.Edge) int {
	if e.To.Z < e.From.Z {
		return e.Left
	}
	return e.Right
}

// checkPlane reports what lies too close to be told apart and not close enough to
// be one.
func (m *model) checkPlane() (faults profile.Faults) {
	for i, n := range m.plane.Nodes {
		for _, e := range m.plane.Edges {
			if e.Start == i || e.End == i || onlyAxis(e) && n.R <= 40*m.plane.Tolerance {
				continue
			}
			if _, d := e.Closest(n); d < 20*m.plane.Tolerance && !m.joined(i, e, 4*d) {
				faults = append(faults, m.nearMiss(e, n, d))
			}
		}
	}
	return faults
}

// joined reports whether a node hangs together with an edge over a short way.
func (m *model) joined(node int, e profile.Edge, way quantity.Length) bool {
	if e.Start == node || e.End == node {
		return true
	}
	for _, d := range m.plane.Around(node) {
		g := m.plane.Edges[d/2]
		if onlyAxis(g) {
			continue
		}
		if l := g.Length(); l < way && m.joined(g.Start+g.End-node, e, way-l) {
			return true
		}
	}
	return false
}

func onlyAxis(e profile.Edge) bool { return len(e.Origins) == 1 && onAxis(e) }

func (m *model) nearMiss(e profile.Edge, n profile.Point, d quantity.Length) profile.Fault {
	f := profile.Fault{At: n, What: fmt.Sprintf("another outline ends %.3g µm from this one: let them meet, or part them", float64(d)*1e6)}
	for _, o := range e.Origins {
		if o.Profile != profile.Axis {
			f.Profile, f.Stroke = m.outlines[o.Profile].Name, o.Segment+1
		}
	}
	return f
}

// checkUse reports bodies that no field reaches.
func (m *model) checkUse() (faults profile.Faults) {
	electrodes, dielectrics := map[int]bool{}, map[int]bool{}
	for _, w := range m.walls {
		electrodes[w.electrode] = true
	}
	for _, r := range m.regions {
		dielectrics[r.material-1] = true
	}
	for i, e := range m.Electrodes {
		if !electrodes[i] {
			faults = append(faults, profile.Fault{Profile: e.Profiles[0].Name,
				What: e.Name + " borders no part of the model in which there is a field"})
		}
	}
	for i, d := range m.Dielectrics {
		if !dielectrics[i] {
			faults = append(faults, profile.Fault{Profile: d.Profile.Name,
				What: d.Name + " lies where there is no field: inside an electrode or outside the model"})
		}
	}
	return append(faults, m.checkBuried()...)
}

// checkBuried reports dielectrics of which a part lies in metal.
func (m *model) checkBuried() (faults profile.Faults) {
	for p, o := range m.owners {
		if o.kind != ofDielectric {
			continue
		}
		for f, inside := range m.plane.Inside(p) {
			if inside && m.faceOf[f] < 0 {
				faults = append(faults, profile.Fault{Profile: m.outlines[p].Name, At: m.pointOf(f),
					What: "a part of the dielectric lies inside an electrode or outside the model"})
				break
			}
		}
	}
	return faults
}

// pointOf is a point on the rim of a face.
func (m *model) pointOf(face int) profile.Point {
	for _, e := range m.plane.Edges {
		if (e.Left == face || e.Right == face) && !onlyAxis(e) {
			return e.At(0.5)
		}
	}
	return profile.Point{}
}
