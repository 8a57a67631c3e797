package field

import (
	"math"
	"math/cmplx"
)

// values are potentials and normal derivatives on the sides of a solution, for one
// set of potentials: volts, and volts per unit length of the model.
type values struct {
	*solved
	u, q []nodal
	// slope is du/ds along the path; across, on sheets, the mean of ∂u/∂n on both
	// sides along the left normal.
	slope, across []nodal
}

// superpose adds up the solutions for the groups with their potentials.
func (s *solver) superpose(v *solved, potentials []float64) *values {
	n := len(v.sides)
	out := &values{solved: v, u: make([]nodal, n), q: make([]nodal, n), slope: make([]nodal, n), across: make([]nodal, n)}
	for g, volts := range potentials {
		for i := range n {
			for j := range order {
				out.u[i][j] += volts * v.u[g][i][j]
				out.q[i][j] += volts * v.q[g][i][j]
			}
		}
	}
	for i := range v.sides {
		if v.sides[i].u >= 0 {
			for j := range order {
				out.slope[i][j] = s.slope[j].dot(&out.u[i]) * 2 / v.sides[i].panel.h
			}
		}
	}
	for i := range v.sides {
		if v.sides[i].orient == 0 {
			s.splitSheet(out, i)
		}
	}
	return out
}

// evaluate is the potential at a point of a region and its gradient.
func (s *solver) evaluate(v *values, region int, x complex128) (u float64, gradient complex128) {
	u, gradient = s.sum(v, region, x)
	if s.mirrored {
		image, slant := s.sum(v, region, s.image(x))
		u += s.parity * image
		gradient += complex(s.parity, 0) * cmplx.Conj(slant)
	}
	return u, gradient
}

// look is evaluate for any point of a region or its rim: on a surface it is what the
// unknowns there say.
func (s *solver) look(v *values, region int, x complex128) (u float64, gradient complex128) {
	x = complex(math.Max(0, real(x)), imag(x))
	for _, i := range v.of[region] {
		sd := &v.sides[i]
		if cmplx.Abs(x-sd.panel.middle) > sd.panel.h || sd.panel.distance(x) > onSurface {
			continue
		}
		f := face{i, sd.orient}
		if sd.orient == 0 { // the side of the sheet the point lies on
			at, along := sd.panel.at(sd.panel.nearest(x))
			f.sign = -math.Copysign(1, real((x-at)*cmplx.Conj(along*1i)))
		}
		_, u, gradient = s.surface(v, f, sd.panel.nearest(x))
		return u, gradient
	}
	return s.evaluate(v, region, x)
}

// sum is Green's identity without images.
func (s *solver) sum(v *values, region int, x complex128) (u float64, gradient complex128) {
	for _, i := range v.of[region] {
		du, dg := s.effect(v, i, x)
		u, gradient = u+du, gradient+dg
	}
	return u, gradient
}

// effect is what one side adds to the potential at a point and its gradient.
func (s *solver) effect(v *values, i int, x complex128) (u float64, gradient complex128) {
	sd := &v.sides[i]
	add := func(y, along complex128, weight, q, moment, slope float64) {
		g := newRing(real(x), real(y), x-y)
		single, double := g.potential(along * 1i)
		charge, current := g.gradient()
		u += weight * (q*single - sd.orient*moment*double)
		gradient += complex(weight*q, 0)*charge - complex(sd.orient*weight*slope, 0)*current
	}
	p := sd.panel
	if cmplx.Abs(x-p.middle) > away*p.h {
		for j := range order {
			add(p.x[j], p.n[j]*-1i, p.ds[j], v.q[i][j], v.u[i][j], v.slope[i][j])
		}
		return u, gradient
	}
	s.part(x, p, -1, 1, func(y, along complex128, weight, t float64) {
		b := s.basis(t)
		add(y, along, weight, b.dot(&v.q[i]), b.dot(&v.u[i]), b.dot(&v.slope[i]))
	})
	return u, gradient
}

// splitSheet works out ∂u/∂n at the nodes of a sheet as the mean of both sides: the
// effect of all other panels, and its own without the jump.
func (s *solver) splitSheet(v *values, i int) {
	sd := &v.sides[i]
	for k, x := range sd.panel.x {
		var mean complex128
		for _, j := range v.of[sd.region] {
			if j != i {
				_, g := s.effect(v, j, x)
				mean += g
			}
		}
		if s.mirrored {
			_, g := s.sum(v, sd.region, s.image(x))
			mean += complex(s.parity, 0) * cmplx.Conj(g)
		}
		n := sd.panel.n[k]
		v.across[i][k] = real(mean*cmplx.Conj(n)) + s.ownSlope(sd.panel, k, &v.q[i])
	}
}

// ownSlope is the derivative, at a node along its normal, of the potential of the
// charge on its own panel, taken between the two sides.
func (s *solver) ownSlope(p *panel, i int, q *nodal) (sum float64) {
	n := p.n[i]
	for k := range s.self[i] {
		r := &s.self[i][k]
		d, _ := p.curve.step(p.start+p.h*(1+s.nodes[i])/2, r.t*p.h/2)
		g := newRing(real(p.x[i]), real(p.x[i])+real(d), -d)
		charge, _ := g.gradient()
		sum += r.weight * p.h / 2 * r.basis.dot(q) * real(charge*cmplx.Conj(n))
	}
	return sum
}

// face is one side of a panel that a region looks at; sheets have two.
type face struct {
	side int
	sign float64 // the region is left (−1) or right (+1) of the panel
}

// faces lists the faces of all sides of a solution.
func (v *solved) faces() (list []face) {
	for i := range v.sides {
		if o := v.sides[i].orient; o != 0 {
			list = append(list, face{i, o})
		} else {
			list = append(list, face{i, -1}, face{i, 1})
		}
	}
	return list
}

// surface is the potential and its gradient on a face, at t on its panel.
func (s *solver) surface(v *values, f face, t float64) (x complex128, u float64, gradient complex128) {
	sd := &v.sides[f.side]
	b := s.basis(t)
	x, along := sd.panel.at(t)
	across := f.sign * b.dot(&v.q[f.side])
	if sd.orient == 0 {
		across = b.dot(&v.across[f.side]) + across/2
	}
	gradient = along*complex(b.dot(&v.slope[f.side]), 0) + along*complex(0, across)
	return x, b.dot(&v.u[f.side]), gradient
}

// strength of the field on a face.
func (s *solver) strength(v *values, f face, t float64) float64 {
	_, _, g := s.surface(v, f, t)
	return cmplx.Abs(g)
}

// lookPoints are the places at which a panel is looked at before its largest field is
// searched for.
const lookPoints = 16

// glance is the largest field on a face at even places between two of its panel.
type glance struct {
	face
	from, to float64
	best     int
	most     float64
}

func (g glance) at(k int) float64 { return g.from + (g.to-g.from)*float64(k)/lookPoints }

func (s *solver) glance(v *values, f face, from, to float64) glance {
	g := glance{face: f, from: from, to: to}
	for k := range lookPoints + 1 {
		if e := s.strength(v, f, g.at(k)); e > g.most {
			g.best, g.most = k, e
		}
	}
	return g
}

// greatest is the largest field on a face, about where a glance saw it.
func (s *solver) greatest(v *values, g glance) (t, most float64) {
	low, high := g.at(max(g.best-1, 0)), g.at(min(g.best+1, lookPoints))
	inner := highestPoint(func(t float64) float64 { return s.strength(v, g.face, t) }, low, high)
	if e := s.strength(v, g.face, inner); e > g.most {
		return inner, e
	}
	return g.at(g.best), math.Abs(g.most)
}
