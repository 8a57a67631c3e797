package field

import (
	"math"
	"math/cmplx"

	"kilovet/hv/quantity"
)

// foot is where a line starts.
type foot struct {
	region int
	x      complex128
	u      float64
	g      complex128
	into   complex128 // away from the surface
	beside complex128 // from where it is followed
}

// grazes reports whether the field at a start runs along its surface.
func (s foot) grazes() bool {
	return math.Abs(real(s.g*cmplx.Conj(s.into))) < grazing*cmplx.Abs(s.g)
}

// footOf is the start of a line from a peak, on a panel or on an earthed mirror plane.
func (f *Field) footOf(p Peak) foot {
	if p.face.side >= 0 {
		x, u, g := f.surface(f.values, p.face, p.t)
		_, path := f.values.sides[p.face.side].panel.at(p.t)
		beside, _ := f.values.sides[p.face.side].panel.at(f.off(p))
		return foot{f.regionOf(p.face), x, u, g, path * complex(0, -p.face.sign), beside}
	}
	x := complex(float64(p.At.R)/f.unit, float64(p.At.Z)/f.unit)
	region := f.faceOf[f.plane.FaceAt(f.nudged(p.At))]
	_, g := f.evaluate(f.values, region, x)
	return foot{region, x, 0, g, complex(0, f.mirror.side), x}
}

// aside is the part of a panel by which a line starts beside the end of its wall.
const aside = 1e-4

// off is the place on its panel from which the line of a peak is followed: the peak itself but,
// where it lies at the end of a wall that meets others off the axis, a little beside it. A
// line along the rim of the model, where nothing holds it, would stray.
func (f *Field) off(p Peak) float64 {
	panel := f.values.sides[p.face.side].panel
	x, _ := panel.at(p.t)
	w := &f.walls[panel.wall].curve
	switch {
	case real(x) < aside*panel.h:
	case p.t > 1-aside && panel.start+panel.h > w.length*(1-1e-9):
		return 1 - aside
	case p.t < aside-1 && panel.start < 1e-9*w.length:
		return aside - 1
	}
	return p.t
}

// axisStep is how far beside the axis, in extents of the figure, a line starts that gets
// nowhere along it.
const axisStep = 1e-3

// besideAxis is a place beside a peak on the axis, on the same panel or plane.
func (f *Field) besideAxis(p Peak) (Peak, bool) {
	if float64(p.At.R) > axisStep*f.unit/10 {
		return p, false
	}
	if p.face.side < 0 {
		p.At.R = quantity.Length(axisStep * f.unit)
		return p, true
	}
	panel := f.values.sides[p.face.side].panel
	step := math.Min(2*axisStep/panel.h, 0.1)
	if p.t > 0 {
		step = -step
	}
	p.t += step
	return p, true
}

// wide is how far a line may go from its start: some extents of the figure, and of the
// way to a plane of symmetry, which does not count to it.
func (t *tracer) wide() float64 {
	if t.mirror == nil {
		return traceWide
	}
	reach := 0.0
	for i := range t.walls {
		reach = math.Max(reach, math.Abs(imag(t.walls[i].curve.from)-float64(t.mirror.z)/t.unit))
	}
	return traceWide + 2*reach
}

// toMirror is how far a step goes until it reaches the mirror plane, and where.
func (t *tracer) toMirror(x, next complex128) (float64, complex128) {
	z := float64(t.mirror.z) / t.unit
	here, there := t.mirror.side*(imag(x)-z), t.mirror.side*(imag(next)-z)
	if there > 0 || here <= 2*onSurface || here <= there {
		return math.Inf(1), x
	}
	p := x + (next-x)*complex(here/(here-there), 0)
	return apart(x, p), complex(real(p), z)
}
