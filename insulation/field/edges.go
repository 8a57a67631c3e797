package field

import (
	"kilovet/hv/lack"
	"kilovet/hv/profile"
	"kilovet/hv/quantity"
)

// Edge is a place where the field is not smooth: a sharp edge, where it has no
// bound, or where a dielectric meets a conductor.
type Edge struct {
	At         profile.Point
	Exponent   float64 // the field goes with the distance to this power, close by
	Sharp      bool    // the exponent is negative
	Electrodes []string
	Bodies     []string
	junction   *junction
}

// Edges lists all of them. An exponent is exact for the angles and permittivities
// that meet; how far it reaches depends on the rest of the figure.
func (s *Solution) Edges() (list []Edge) {
	for i := range s.junctions {
		j := &s.junctions[i]
		e := Edge{At: s.place(*j), Exponent: j.exponent - 1, Sharp: j.exponent < 1-almost, junction: j}
		seen := map[string]bool{}
		add := func(list []string, name string) []string {
			if seen[name] {
				return list
			}
			seen[name] = true
			return append(list, name)
		}
		for _, r := range j.regions {
			e.Bodies = add(e.Bodies, s.bodyName(r))
		}
		for _, r := range j.rays {
			if r.wall >= 0 && s.walls[r.wall].electrode >= 0 {
				e.Electrodes = add(e.Electrodes, s.names[s.walls[r.wall].electrode])
			}
		}
		list = append(list, e)
	}
	return list
}

// Room is how far it is from an edge to the nearest conductor or surface of a dielectric
// that does not end there: the gap beside it, or the thickness of what has the edge.
func (s *Solution) Room(e Edge) quantity.Length {
	room := quantity.Length(s.unit)
	for i := range s.walls {
		w := &s.walls[i]
		line := &s.plane.Edges[w.edge]
		if w.kind == natural || line.Start == e.junction.node || line.End == e.junction.node {
			continue
		}
		_, far := line.Closest(e.At)
		room = min(room, far)
	}
	return room
}

// Near is the field at a distance from an edge, along every surface that ends there,
// on every side that belongs to the edge. Surfaces shorter than that are left out.
func (f *Field) Near(e Edge, distance quantity.Length) ([]Reading, error) {
	if e.junction == nil || distance <= 0 {
		return nil, lack.Range("a distance from an edge is positive")
	}
	d := float64(distance) / f.unit
	var list []Reading
	for _, r := range e.junction.rays {
		if r.wall < 0 || d > f.walls[r.wall].curve.length {
			continue
		}
		along := d
		if r.end == 1 {
			along = f.walls[r.wall].curve.length - d
		}
		list = append(list, f.along(r, along))
	}
	if len(list) == 0 {
		return nil, lack.Range("no surface at %v is %.3g mm long", e.At, float64(distance)*1e3)
	}
	return list, nil
}

// along reads a wall on the side of a ray.
func (f *Field) along(r ray, s float64) Reading {
	for _, fc := range f.values.faces() {
		sd := &f.values.sides[fc.side]
		p := sd.panel
		if sd.wall != r.wall || sd.region != r.region || s < p.start-1e-12 || s > p.start+p.h*(1+1e-9) {
			continue
		}
		if sd.orient == 0 && fc.sign != r.side {
			continue
		}
		return f.readSurface(fc, 2*(s-p.start)/p.h-1)
	}
	panic("field: a ray without a panel")
}
