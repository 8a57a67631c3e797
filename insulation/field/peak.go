package field

import (
	"math"
	"slices"

	"kilovet/hv/lack"
	"kilovet/hv/profile"
	"kilovet/hv/quantity"
)

// Peak is the greatest field on an electrode, or in a body.
type Peak struct {
	Strength quantity.Field
	At       profile.Point
	Body     string            // on whose side: a dielectric, or the medium
	Error    quantity.Fraction // of the strength, estimated from the last refinement
	face     face
	t        float64
}

// smallestError is claimed even where the last refinement has changed less: what
// the tails of the panels still hold.
const smallestError = 1e-4

// Peak is the greatest field on an electrode. An electrode with a sharp edge has
// none: the lack names the edge.
func (f *Field) Peak(electrode string) (Peak, error) { return f.PeakBeyond(electrode, 0) }

// PeakBeyond is the greatest field on an electrode at least a distance away from
// every sharp edge.
func (f *Field) PeakBeyond(electrode string, distance quantity.Length) (Peak, error) {
	k, err := f.electrode(electrode)
	if err != nil {
		return Peak{}, err
	}
	if f.mirror != nil && f.mirror.earthed && electrode == Earthed {
		plane := f.planePeak()
		walls, err := f.peak("the electrode "+electrode, float64(distance)/f.unit, func(w *wall) bool { return w.electrode == k })
		if err == nil && walls.Strength > plane.Strength {
			return walls, nil
		}
		return plane, nil
	}
	return f.peak("the electrode "+electrode, float64(distance)/f.unit, func(w *wall) bool { return w.electrode == k })
}

// PeakOn is the greatest field on the outline of that name, or on one of its
// segments; segment −1 stands for all.
func (f *Field) PeakOn(outline string, segment int) (Peak, error) {
	return f.peak("the outline "+outline, 0, func(w *wall) bool {
		return slices.ContainsFunc(f.plane.Edges[w.edge].Origins, func(o profile.Origin) bool {
			return o.Profile != profile.Axis && f.outlines[o.Profile].Name == outline && (segment < 0 || o.Segment == segment)
		})
	})
}

// PeakIn is the greatest field in a dielectric, or in the medium: it lies on its
// rim. A sharp edge anywhere on the rim leaves it without.
func (f *Field) PeakIn(body string) (Peak, error) { return f.PeakInBeyond(body, 0) }

// PeakInBeyond is the greatest field in a body at least a distance away from every
// sharp edge.
func (f *Field) PeakInBeyond(body string, distance quantity.Length) (Peak, error) {
	k, err := f.body(body)
	if err != nil {
		return Peak{}, err
	}
	in := func(r int) bool { return r >= 0 && f.regions[r].material == k }
	// A plane of symmetry runs through the inside of the body: its greatest field lies at
	// the ends of that, where other walls have it too.
	all := func(w *wall) bool {
		symmetry := w.kind == natural && w.curve.radius == 0 && imag(w.curve.along) == 0
		return (in(w.left) || in(w.right)) && !symmetry
	}
	return f.search("the rim of "+body, float64(distance)/f.unit, all, in)
}

func (f *Field) peak(what string, distance float64, on func(*wall) bool) (Peak, error) {
	return f.search(what, distance, on, func(r int) bool { return r >= 0 })
}

// search finds the greatest field on walls, on their sides in regions.
func (f *Field) search(what string, distance float64, on func(*wall) bool, in func(int) bool) (Peak, error) {
	if distance == 0 {
		if j := f.sharpOn(on, in); j != nil {
			return Peak{}, lack.Range("%s has a sharp edge at %v, where the field goes with the distance to the power %.3f: it has no peak; judge it by the field at a distance",
				what, f.place(*j), j.exponent-1)
		}
	}
	best, fine := f.greatestOn(f.values, distance, on, in)
	_, coarse := f.greatestOn(f.less, distance, on, in)
	if best.side < 0 {
		return Peak{}, lack.Failed("%s borders no field", what)
	}
	sd := &f.values.sides[best.side]
	x, _ := sd.panel.at(best.t)
	p := Peak{Strength: quantity.Field(fine / f.unit), At: f.outer(x), face: best.face, t: best.t, Body: f.bodyName(f.regionOf(best.face))}
	if fine > 0 {
		p.Error = quantity.Fraction(math.Max(smallestError, math.Abs(fine-coarse)/fine))
	}
	return p, nil
}

// spot is a place on a face.
type spot struct {
	face
	t float64
}

// worthwhile is the part of the largest field seen at a glance from which a face is
// searched: between two places of a glance the field does not rise by as much.
const worthwhile = 0.9

// greatestOn looks through the faces of walls.
func (f *Field) greatestOn(v *values, distance float64, on func(*wall) bool, in func(int) bool) (best spot, most float64) {
	var seen []glance
	for _, fc := range v.faces() {
		sd := &v.sides[fc.side]
		if !on(&f.walls[sd.wall]) || !in(sd.region) {
			continue
		}
		if from, to := f.away(sd.panel, distance); from < to {
			seen = append(seen, f.glance(v, fc, from, to))
			most = math.Max(most, seen[len(seen)-1].most)
		}
	}
	best.side = -1
	enough := worthwhile * most
	for _, g := range seen {
		if g.most < enough && best.side >= 0 {
			continue
		}
		if t, e := f.greatest(v, g); e > most || best.side < 0 {
			best, most = spot{g.face, t}, e
		}
	}
	return best, most
}

// away is the part of a panel at least a distance from the sharp ends of its wall,
// and clear of what panels beside a sharp edge cannot hold.
func (s *solver) away(p *panel, distance float64) (from, to float64) {
	w := &s.walls[p.wall]
	low := math.Max(p.start, w.ends[0].clear(distance))
	high := math.Min(p.start+p.h, w.curve.length-w.ends[1].clear(distance))
	return 2*(low-p.start)/p.h - 1, 2*(high-p.start)/p.h - 1
}

// clear is the length from an end over which the field is not looked at.
func (e end) clear(distance float64) float64 {
	switch {
	case e.sharp:
		return distance
	case e.beside:
		return 8 * floorOf(e)
	}
	return 0
}

// sharpOn is a sharp edge on one of the walls, on a side in one of the regions.
func (f *Field) sharpOn(on func(*wall) bool, in func(int) bool) *junction {
	for i := range f.junctions {
		j := &f.junctions[i]
		if j.exponent >= 1-almost {
			continue
		}
		for _, r := range j.rays {
			if r.wall >= 0 && on(&f.walls[r.wall]) && in(r.region) {
				return j
			}
		}
	}
	return nil
}

// regionOf is the region a face looks at.
func (f *Field) regionOf(fc face) int { return f.values.sides[fc.side].region }

// planePeak is the greatest field on an earthed mirror plane, found by looking along
// it out to twice the extent of the figure.
func (f *Field) planePeak() Peak {
	z := float64(f.mirror.z) / f.unit
	at := func(v *values, r float64) float64 {
		region := f.faceOf[f.plane.FaceAt(f.nudged(f.outer(complex(r, z))))]
		if region < 0 {
			return 0
		}
		_, g := f.evaluate(v, region, complex(r, z))
		return math.Abs(imag(g))
	}
	const points = 128
	best, most := 0.0, 0.0
	for k := range points + 1 {
		s := float64(k) / points
		if r := 2 * s * s; at(f.values, r) > most {
			best, most = s, at(f.values, r)
		}
	}
	s := highestPoint(func(s float64) float64 { return at(f.values, 2*s*s) }, math.Max(0, best-1.0/points), best+1.0/points)
	if e := at(f.values, 2*s*s); e > most {
		best, most = s, e
	}
	p := Peak{Strength: quantity.Field(most / f.unit), At: f.outer(complex(2*best*best, z)), Body: Medium, face: face{side: -1}}
	if most > 0 {
		p.Error = quantity.Fraction(math.Max(smallestError, math.Abs(most-at(f.less, 2*best*best))/most))
	}
	return p
}
