package field

import "math"

// cone is the field's surroundings near a point of the axis: sectors of the polar
// angle, from the upper axis (0) or a barrier to the lower axis (π) or a barrier.
type cone struct {
	wedge
	from float64 // polar angle at which the first sector begins
}

// flat reports whether nothing but planes across the axis meet at the point: then
// the exponents are whole numbers.
func (c cone) flat() bool {
	at := c.from
	right := func(a float64) bool {
		return math.Abs(math.Remainder(a, math.Pi/2)) < 1e-3
	}
	for _, s := range c.sectors {
		if !right(at) {
			return false
		}
		at += s.angle
	}
	return right(at)
}

// exponents are those λ up to the highest for which ρ^λ F(θ) is a potential near the
// point: F fulfils Legendre's equation in every sector, is regular on the axis, and
// ε F' passes through the interfaces. Integrated by Runge and Kutta's fourth-order
// rule; accurate to 1e-6.
func (c cone) exponents() []float64 {
	if c.flat() {
		return []float64{1, 2, 3}
	}
	return crossesZero(c.mismatch, highest)
}

// mismatch is zero at an exponent: what is wrong at the far end, or, where that is
// the axis, the Wronskian of the solutions from both ends in the middle.
func (c cone) mismatch(lambda float64) float64 {
	far := c.from
	for _, s := range c.sectors {
		far += s.angle
	}
	if c.end != open {
		f, slope := c.shoot(lambda, far)
		if c.end == atConductor {
			return f
		}
		return slope
	}
	meet := c.from + c.sectors[0].angle
	if len(c.sectors) == 1 {
		meet = (c.from + far) / 2
	}
	f, slope := c.shoot(lambda, meet)
	g, slant := c.upsideDown().shoot(lambda, math.Pi-meet)
	return f*slant + g*slope
}

// upsideDown is the cone seen from below.
func (c cone) upsideDown() cone {
	u := cone{wedge: wedge{start: c.end, end: c.start}}
	far := c.from
	for i := range c.sectors {
		s := c.sectors[len(c.sectors)-1-i]
		u.sectors, far = append(u.sectors, s), far+s.angle
	}
	u.from = math.Pi - far
	return u
}

// shoot integrates F and D = ε sin θ F' from the near end to a polar angle.
func (c cone) shoot(lambda, until float64) (f, d float64) {
	nu, theta := lambda*(lambda+1), c.from
	f = 1
	switch c.start {
	case atConductor:
		f, d = 0, 1
	case open: // series about the axis
		theta = 1e-3
		f, d = 1-nu*theta*theta/4, -nu*theta*theta/2*c.sectors[0].constant
	}
	end := c.from
	for _, s := range c.sectors {
		end += s.angle
		stop := math.Min(end, until)
		if stop > theta {
			f, d = legendreStep(nu, s.constant, theta, stop, f, d)
			theta = stop
		}
	}
	return f, d
}

// legendreStep carries F and ε sin θ F' from a to b in one sector.
func legendreStep(nu, eps, a, b, f, d float64) (float64, float64) {
	const steps = 200
	// Even steps in ln tan θ/2, in which dF = D/ε, dD = −ν ε sin²θ F.
	u, du := math.Log(math.Tan(a/2)), (math.Log(math.Tan(b/2))-math.Log(math.Tan(a/2)))/steps
	rate := func(u, f, d float64) (float64, float64) {
		sin := 1 / math.Cosh(u)
		return d / eps, -nu * eps * sin * sin * f
	}
	for range steps {
		f1, d1 := rate(u, f, d)
		f2, d2 := rate(u+du/2, f+du/2*f1, d+du/2*d1)
		f3, d3 := rate(u+du/2, f+du/2*f2, d+du/2*d2)
		f4, d4 := rate(u+du, f+du*f3, d+du*d3)
		f += du / 6 * (f1 + 2*f2 + 2*f3 + f4)
		d += du / 6 * (d1 + 2*d2 + 2*d3 + d4)
		u += du
	}
	return f, d
}
