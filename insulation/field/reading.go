package field

import (
	"math"
	"math/cmplx"

	"kilovet/hv/lack"
	"kilovet/hv/profile"
	"kilovet/hv/quantity"
)

// Reading is the field at a point.
type Reading struct {
	At            profile.Point
	Body          string // a dielectric, the medium, or an electrode
	Potential     quantity.Voltage
	Radial, Axial quantity.Field // E = −grad φ
}

// Strength of the field.
func (r Reading) Strength() quantity.Field {
	return quantity.Field(math.Hypot(float64(r.Radial), float64(r.Axial)))
}

// onSurface is the distance, in units of the model, at which a point counts as on a
// surface: what snapping of outlines may leave.
const onSurface = 1e-6

// At is the field at a point: one reading within a body; one for each side on a
// surface, the left one along the outline first. Inside an electrode there is no
// field. Outside the model it is a lack. Error about that of the peaks; close to a
// sharp edge, from a thousandth of the figure's extent on, some per cent.
func (f *Field) At(p profile.Point) ([]Reading, error) {
	x := f.inner(p)
	if on := f.surfaceAt(x); len(on) > 0 {
		return on, nil
	}
	face := f.plane.FaceAt(f.nudged(p))
	if r := f.faceOf[face]; r >= 0 && !f.beyondMirror(x) {
		return []Reading{f.read(r, x)}, nil
	}
	if k := f.inside(face); k >= 0 {
		return []Reading{{At: p, Body: f.names[k], Potential: quantity.Voltage(f.volts[f.group[k]])}}, nil
	}
	return nil, lack.Range("the point %v lies outside the model", p)
}

// nudged is a point moved off the axis and off the mirror plane, into the model.
func (m *model) nudged(p profile.Point) profile.Point {
	little := quantity.Length(1e-7 * m.unit)
	p.R = max(p.R, little)
	if m.mirror != nil && max(p.Z-m.mirror.z, m.mirror.z-p.Z) < little {
		p.Z += quantity.Length(m.mirror.side) * little
	}
	return p
}

// beyondMirror reports whether a point lies on the other side of the mirror plane.
func (m *model) beyondMirror(x complex128) bool {
	if m.mirror == nil {
		return false
	}
	return m.mirror.side*(imag(x)-float64(m.mirror.z)/m.unit) < -1e-9
}

// inside is the electrode whose metal fills a face without a field, −1 for none.
func (m *model) inside(face int) int {
	found := -1
	for _, e := range m.plane.Edges {
		if e.Left != face && e.Right != face {
			continue
		}
		for _, k := range m.electrodesOf(e) {
			if face == 0 || found >= 0 && m.group[found] != m.group[k] {
				return -1
			}
			found = k
		}
	}
	return found
}

// surfaceAt lists the readings on all sides of a surface at a point, none away from
// surfaces. Where several meet it is the one that tells most: an interface, else a
// conductor, else a boundary.
func (f *Field) surfaceAt(x complex128) (list []Reading) {
	var on *panel
	for _, p := range f.values.panels {
		if cmplx.Abs(x-p.middle) > p.h || p.distance(x) > onSurface {
			continue
		}
		if on == nil || telling(f.walls[p.wall].kind) > telling(f.walls[on.wall].kind) {
			on = p
		}
	}
	if on == nil {
		return nil
	}
	for _, fc := range f.values.faces() {
		if f.values.sides[fc.side].panel == on {
			list = append(list, f.readSurface(fc, on.nearest(x)))
		}
	}
	return list
}

func telling(k wallKind) int {
	switch k {
	case interfaces:
		return 2
	case natural:
		return 0
	}
	return 1
}

// readSurface is the field on a face.
func (f *Field) readSurface(fc face, t float64) Reading {
	x, u, g := f.surface(f.values, fc, t)
	return f.reading(f.regionOf(fc), x, u, g)
}

// read is the field at a point of a region.
func (f *Field) read(region int, x complex128) Reading {
	u, g := f.evaluate(f.values, region, x)
	return f.reading(region, x, u, g)
}

func (f *Field) reading(region int, x complex128, u float64, g complex128) Reading {
	return Reading{At: f.outer(x), Body: f.bodyName(region), Potential: quantity.Voltage(u),
		Radial: quantity.Field(-real(g) / f.unit), Axial: quantity.Field(-imag(g) / f.unit)}
}

// Surface is a place on the surface of a dielectric with the field on both sides.
type Surface struct {
	Along           quantity.Length // from the start of the surface
	Inside, Outside Reading         // outside: of the medium, or of another dielectric
	along           quantity.Field
}

// Tangential is the size of the field along the surface, the same on both sides.
func (s Surface) Tangential() quantity.Field { return s.along }

// Along is the field along the free surfaces of a dielectric, a run for every piece
// between corners. Close to a sharp edge it rises
// without bound: the last places there are as near as the panels go.
func (f *Field) Along(dielectric string) ([][]Surface, error) {
	k, err := f.body(dielectric)
	if err != nil {
		return nil, err
	}
	var runs [][]Surface
	for i := range f.walls {
		w := &f.walls[i]
		if w.kind != interfaces {
			continue
		}
		left, right := f.regions[w.left].material, f.regions[w.right].material
		if k != left && k != right {
			continue
		}
		runs = append(runs, f.run(i, k == left))
	}
	return runs, nil
}

// run reads a wall at the nodes of its panels; the dielectric is on its left or not.
func (f *Field) run(wall int, onLeft bool) (run []Surface) {
	v := f.values
	for i := range v.sides {
		sd := &v.sides[i]
		if sd.wall != wall || sd.orient > 0 {
			continue
		}
		for _, t := range f.nodes {
			s := Surface{Along: quantity.Length((sd.panel.start + sd.panel.h*(1+t)/2) * f.unit)}
			s.Inside, s.Outside = f.readSurface(face{i, -1}, t), f.readSurface(face{i + 1, 1}, t)
			b := f.basis(t)
			s.along = quantity.Field(math.Abs(b.dot(&v.slope[i])) / f.unit)
			if !onLeft {
				s.Inside, s.Outside = s.Outside, s.Inside
			}
			run = append(run, s)
		}
	}
	return run
}
