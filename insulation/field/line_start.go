package field

import "math"

// foot is where a line starts.
type foot struct {
	region int
	x      complex128
	u      float64
	g      complex128
	into   complex128 // away from the surface
}

// footOf is the start of a line from a peak, on a panel or on an earthed mirror plane.
func (f *Field) footOf(p Peak) foot {
	if p.face.side >= 0 {
		x, u, g := f.surface(f.values, p.face, p.t)
		_, path := f.values.sides[p.face.side].panel.at(p.t)
		return foot{f.regionOf(p.face), x, u, g, path * complex(0, -p.face.sign)}
	}
	x := complex(float64(p.At.R)/f.unit, float64(p.At.Z)/f.unit)
	region := f.faceOf[f.plane.FaceAt(f.nudged(p.At))]
	_, g := f.evaluate(f.values, region, x)
	return foot{region, x, 0, g, complex(0, f.mirror.side)}
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
