package field

import (
	"fmt"
	"slices"
	"strings"

	"kilovet/hv/profile"
)

// region is a connected face of the model with one permittivity.
type region struct {
	face     int
	material int // 0 the medium, i+1 dielectric i
	constant float64
}

// wallKind says what stands between two regions, or at the end of one.
type wallKind int

const (
	conductor  wallKind = iota
	sheet               // a conductor with one region on both sides
	interfaces          // between dielectrics
	natural
)

// wall is an edge that bounds a region. Left and right are regions, −1 where there
// is none.
type wall struct {
	kind        wallKind
	curve       curve
	edge        int // in the plane
	left, right int
	electrode   int // of a conductor: which
	group       int // of a conductor: which of those that touch
	ends        [2]end
}

// end says what the field does at an end of a wall.
type end struct {
	irregular bool    // needs panels graded towards it
	sharp     bool    // the field has no bound
	slowest   float64 // exponent of the potential there, the least one
	beside    bool    // another wall's field has no bound at the same place
	kink      bool    // the curvature jumps
}

// graded reports whether panels are cut towards the end rather than in halves.
func (e end) graded() bool { return e.irregular || e.kink }

// model is an arrangement taken apart into regions and walls.
type model struct {
	*Arrangement
	outlines  []profile.Profile
	owners    []owner
	plane     *profile.Plane
	mirror    *mirror
	unit      float64 // length that counts as 1, in metres
	names     []string
	group     []int // of each electrode; electrodes that touch are one group
	groups    int
	touching  []profile.Fault // where electrodes of different name touch
	tied      [][2]int        // which they are
	faceOf    []int           // region of each face, −1 for none
	regions   []region
	walls     []wall
	junctions []junction
	resistive bool    // constants are conductivities, not permittivities
	over      float64 // seconds after a step over which fluxes are averaged; 0: none
}

// newModel lays out an arrangement and finds what is wrong with it. The error is of
// type profile.Faults.
func newModel(a *Arrangement, resistive bool) (*model, error) {
	m := &model{Arrangement: a, resistive: resistive}
	if faults := m.build(); len(faults) > 0 {
		return nil, faults
	}
	return m, nil
}

func (m *model) build() profile.Faults {
	for _, step := range []func() profile.Faults{m.draw, m.checkPlane, m.findRegions, m.findWalls, m.checkUse} {
		if faults := step(); len(faults) > 0 {
			return faults
		}
	}
	m.findJunctions()
	return nil
}

// draw lays the outlines over each other.
func (m *model) draw() profile.Faults {
	faults := m.checkNames()
	if len(faults) == 0 {
		m.outlines, m.owners, faults = m.Arrangement.outlines()
	}
	if len(faults) > 0 {
		return faults
	}
	m.mirror, m.outlines, m.owners = findMirror(m.outlines, m.owners)
	m.unit = float64(profile.Extent(m.outlines...))
	m.plane = profile.NewPlane(m.outlines)
	m.nameElectrodes()
	return nil
}

// nameElectrodes lists the electrodes, with the earthed boundary last if there is one.
func (m *model) nameElectrodes() {
	for _, e := range m.Electrodes {
		m.names = append(m.names, e.Name)
	}
	if slices.ContainsFunc(m.Boundaries, func(b Boundary) bool { return b.Kind == Earth }) {
		m.names = append(m.names, Earthed)
	}
	m.group = make([]int, len(m.names))
	for i := range m.group {
		m.group[i] = i
	}
	for n := range m.plane.Nodes {
		m.tieAt(n)
	}
	m.numberGroups()
}

// tieAt puts electrodes that meet at a node into one group.
func (m *model) tieAt(node int) {
	first := -1
	for _, e := range m.plane.Edges {
		if e.Start != node && e.End != node {
			continue
		}
		for _, k := range m.electrodesOf(e) {
			if first < 0 {
				first = k
			}
			if m.group[k] != m.group[first] {
				m.tie(first, k, m.plane.Nodes[node], e.Origins)
			}
		}
	}
}

func (m *model) tie(a, b int, at profile.Point, origins []profile.Origin) {
	from, to := m.group[b], m.group[a]
	for i, g := range m.group {
		if g == from {
			m.group[i] = to
		}
	}
	o := origins[slices.IndexFunc(origins, func(o profile.Origin) bool { return m.electrodeOf(o) == b })]
	m.tied = append(m.tied, [2]int{a, b})
	m.touching = append(m.touching, profile.Fault{Profile: m.outlines[o.Profile].Name, Stroke: o.Segment + 1, At: at,
		What: fmt.Sprintf("%s touches %s, but their potentials differ", m.names[b], m.names[a])})
}

// numberGroups numbers the groups without holes.
func (m *model) numberGroups() {
	number := map[int]int{}
	for i, g := range m.group {
		if _, known := number[g]; !known {
			number[g] = len(number)
		}
		m.group[i] = number[g]
	}
	m.groups = len(number)
}

// electrodeOf is the electrode an origin belongs to, −1 for none.
func (m *model) electrodeOf(o profile.Origin) int {
	if o.Profile == profile.Axis {
		return -1
	}
	switch w := m.owners[o.Profile]; w.kind {
	case ofElectrode:
		return w.index
	case ofEarth:
		return len(m.names) - 1
	}
	return -1
}

// electrodesOf lists the electrodes an edge belongs to.
func (m *model) electrodesOf(e profile.Edge) (list []int) {
	for _, o := range e.Origins {
		if k := m.electrodeOf(o); k >= 0 && !slices.Contains(list, k) {
			list = append(list, k)
		}
	}
	return list
}

// owned reports whether an edge belongs to a profile of a kind.
func (m *model) owned(e profile.Edge, kind ownerKind) bool {
	return slices.ContainsFunc(e.Origins, func(o profile.Origin) bool {
		return o.Profile != profile.Axis && m.owners[o.Profile].kind == kind
	})
}

// onAxis reports whether an edge lies on the axis.
func onAxis(e profile.Edge) bool { return e.Of(profile.Axis) }

// checkNames reports names that are wanting or given twice, and impossible constants.
func (m *model) checkNames() (faults profile.Faults) {
	seen := map[string]bool{Earthed: true, Medium: true}
	name := func(n string) {
		if strings.TrimSpace(n) == "" || seen[n] {
			faults = append(faults, profile.Fault{Profile: n, What: "every electrode and dielectric has a name of its own"})
		}
		seen[n] = true
	}
	if len(m.Electrodes) == 0 {
		faults = append(faults, profile.Fault{What: "there is no electrode"})
	}
	for _, e := range m.Electrodes {
		name(e.Name)
		if len(e.Profiles) == 0 {
			faults = append(faults, profile.Fault{Profile: e.Name, What: "the electrode has no outline"})
		}
	}
	if m.Permittivity != 0 && !(m.Permittivity >= 1 && m.Permittivity <= 1e6) {
		faults = append(faults, profile.Fault{Profile: Medium, What: "a relative permittivity is at least 1 and at most a million"})
	}
	for _, d := range m.Dielectrics {
		name(d.Name)
		if !(d.Permittivity >= 1 && d.Permittivity <= 1e6) {
			faults = append(faults, profile.Fault{Profile: d.Name, What: "a relative permittivity is at least 1 and at most a million"})
		}
	}
	return append(faults, m.checkEmpty()...)
}

// checkEmpty reports profiles that were never built.
func (m *model) checkEmpty() (faults profile.Faults) {
	empty := func(name string, p profile.Profile) {
		if len(p.Segments) == 0 {
			faults = append(faults, profile.Fault{Profile: name, What: "the outline has no line and no arc"})
		}
	}
	for _, e := range m.Electrodes {
		for _, p := range e.Profiles {
			empty(e.Name, p)
		}
	}
	for _, d := range m.Dielectrics {
		empty(d.Name, d.Profile)
	}
	for _, b := range m.Boundaries {
		empty("boundary", b.Profile)
	}
	return faults
}
