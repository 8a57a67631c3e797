package field

import "math"

// perSphere is 1/4π: potentials here are those of charge density over ε₀.
const perSphere = 1 / (4 * math.Pi)

// ringPotential is the potential of a ring of charge, one unit for a length of the
// path and the whole turn, at the displacement d from it to the point; and its
// derivative when the ring moves along n. The point has radius r, the ring s.
func ringPotential(r, s float64, d, n complex128) (single, double float64) {
	i, j, h := ringIntegrals(r, s, real(d), imag(d))
	f := perSphere * s
	return f * i, f * (real(n)*(real(d)*j-r*h) + imag(n)*imag(d)*j)
}

// ringGradient is the gradient at the point of the potential of a ring of charge,
// and that of a double layer written as the field of a ring current: where the
// moment u of a double layer changes by du along the path, a ring current du flows.
func ringGradient(r, s float64, d complex128) (charge, current complex128) {
	_, j, h := ringIntegrals(r, s, real(d), imag(d))
	f := perSphere * s
	charge = complex(-f*(real(d)*j+s*h), -f*imag(d)*j)
	current = complex(f*imag(d)*(j-h), f*(r*h-real(d)*j))
	return charge, current
}

// ringEffect is ringPotential and ringGradient together.
func ringEffect(r, s float64, d, n complex128) (single, double float64, charge, current complex128) {
	i, j, h := ringIntegrals(r, s, real(d), imag(d))
	f := perSphere * s
	dr, dz := real(d), imag(d)
	single, double = f*i, f*(real(n)*(dr*j-r*h)+imag(n)*dz*j)
	return single, double, complex(-f*(dr*j+s*h), -f*dz*j), complex(f*dz*(j-h), f*(r*h-dr*j))
}
