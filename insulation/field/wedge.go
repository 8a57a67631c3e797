package field

import (
	"math"
)

// barrier is what bounds a wedge: nothing, a conductor, or a natural boundary.
type barrier int

const (
	open barrier = iota // interfaces let the field pass
	atConductor
	atNatural
)

// sector is a part of a wedge with one permittivity.
type sector struct{ angle, constant float64 }

// wedge is the field's surroundings near an edge: sectors between two barriers, or
// all around (both open).
type wedge struct {
	sectors    []sector
	start, end barrier
}

// highest exponent looked at: the terms beyond are smooth enough for the panels.
const highest = 3.2

// exponents are those λ > 0, up to the highest, for which r^λ F(φ) is a potential
// near the edge; the field goes with r^(λ−1). F and ε F'/λ pass through a sector of
// angle α as through a rotation by λα (Meixner, IEEE Trans. Antennas Propag. 20,
// 442, 1972, from memory; rederived): F = 0 ends at a conductor, F' = 0 at a natural boundary;
// all around, the rotation of the whole turn has an eigenvalue 1. Accurate to 1e-8.
func (w wedge) exponents() []float64 {
	if w.start == open {
		return touches(w.around, highest)
	}
	return crossesZero(w.between, highest)
}

// through is the matrix that takes F and ε F'/λ across all sectors.
func (w wedge) through(lambda float64) (a, b, c, d float64) {
	a, d = 1, 1
	for _, s := range w.sectors {
		sin, cos := math.Sincos(lambda * s.angle)
		up, down := sin/s.constant, -sin*s.constant
		a, b, c, d = cos*a+up*c, cos*b+up*d, down*a+cos*c, down*b+cos*d
	}
	return a, b, c, d
}

// between is zero at the exponents of a wedge between two barriers.
func (w wedge) between(lambda float64) float64 {
	a, b, c, d := w.through(lambda)
	switch {
	case w.start == atConductor && w.end == atConductor:
		return b
	case w.start == atConductor:
		return d
	case w.end == atConductor:
		return a
	}
	return c
}

// around is zero at the exponents of a wedge without barriers.
func (w wedge) around(lambda float64) float64 {
	a, _, _, d := w.through(lambda)
	return a + d - 2
}

const step = 0.0097 // of a search for zeros; no two distinct ones lie closer

// crossesZero lists the zeros of f between 0 and the limit at which it changes sign.
func crossesZero(f func(float64) float64, limit float64) (zeros []float64) {
	for x := step / 2; x < limit; x += step {
		if f(x)*f(x+step) <= 0 {
			zeros = append(zeros, bisect(f, x, x+step))
		}
	}
	return zeros
}

// touches lists zeros like crossesZero, and those at which f only touches zero from
// below: f is then a Hill discriminant less 2, whose maxima do not stay below zero.
func touches(f func(float64) float64, limit float64) (zeros []float64) {
	for x := step / 2; x < limit; x += step {
		left, middle, right := f(x), f(x+step), f(x+2*step)
		top := (middle-left)*(right-middle) <= 0 && math.Max(left, math.Max(middle, right)) <= 0
		switch {
		case left*middle <= 0:
			zeros = append(zeros, bisect(f, x, x+step))
		case top:
			if at := highestPoint(f, x, x+2*step); f(at) > -1e-3*math.Abs(left) {
				zeros = append(zeros, at)
			}
		}
	}
	return zeros
}

func bisect(f func(float64) float64, a, b float64) float64 {
	fa := f(a)
	for range 50 {
		m := (a + b) / 2
		if fm := f(m); fa*fm <= 0 {
			b = m
		} else {
			a, fa = m, fm
		}
	}
	return (a + b) / 2
}

// highestPoint of f between a and b, by golden section.
func highestPoint(f func(float64) float64, a, b float64) float64 {
	for range 60 {
		c, d := a+(b-a)*(1-1/math.Phi), a+(b-a)/math.Phi
		if f(c) > f(d) {
			b = d
		} else {
			a = c
		}
	}
	return (a + b) / 2
}
