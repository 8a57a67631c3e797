package field

import "math"

// perSphere is 1/4π: potentials here are those of charge density over ε₀.
const perSphere = 1 / (4 * math.Pi)

// ring is a ring of radius s as seen from a point of radius r at the displacement
// (dr, dz) from it, with its integrals over the angle.
type ring struct{ r, s, dr, dz, i, j, h float64 }

func newRing(r, s float64, d complex128) ring {
	i, j, h := ringIntegrals(r, s, real(d), imag(d))
	return ring{r, s, real(d), imag(d), i, j, h}
}

// potential of a ring of charge, one unit for a length of the path and the whole
// turn; and its derivative when the ring moves along n, that of a double layer.
func (g *ring) potential(n complex128) (single, double float64) {
	f := perSphere * g.s
	return f * g.i, f * (real(n)*(g.dr*g.j-g.r*g.h) + imag(n)*g.dz*g.j)
}

// gradient, at the point, of the potential of the ring of charge; and the part that a
// double layer adds, written as the field of a ring current: where the moment u of a
// double layer changes by du along the path, a ring current du flows.
func (g *ring) gradient() (charge, current complex128) {
	f := perSphere * g.s
	charge = complex(-f*(g.dr*g.j+g.s*g.h), -f*g.dz*g.j)
	current = complex(f*g.dz*(g.j-g.h), f*(g.r*g.h-g.dr*g.j))
	return charge, current
}
