package field

import (
	"math"
	"math/cmplx"
)

// block holds what a panel does to the nodes of another: row i, column j is the
// potential at node i of the polynomial of node j, as a charge and as a double
// layer along the left normal.
type block struct{ single, double [order]nodal }

// away is the distance from the middle of a panel, in its lengths, beyond which
// its nodes alone serve as quadrature points: error below 1e-9 for what a panel
// resolves.
const away = 1.4

// layer computes what panels do elsewhere. In a model with a mirror plane every
// panel has an image, counted through the image of the point.
type layer struct {
	*quadrature
	mirrored bool
	mirrorZ  float64
	parity   float64 // +1 natural, −1 earthed
}

// image of a point in the mirror plane.
func (l *layer) image(x complex128) complex128 { return complex(real(x), 2*l.mirrorZ-imag(x)) }

// block of the nodes of panel to, for the polynomials of panel from.
func (l *layer) block(to, from *panel) *block {
	b := new(block)
	for i, x := range to.x {
		if to == from {
			l.own(i, from, &b.single[i], &b.double[i])
		} else {
			l.row(x, from, 1, &b.single[i], &b.double[i])
		}
		if l.mirrored {
			l.row(l.image(x), from, l.parity, &b.single[i], &b.double[i])
		}
	}
	return b
}

// row adds the potentials at x of the polynomials of a panel.
func (l *layer) row(x complex128, p *panel, factor float64, single, double *nodal) {
	if cmplx.Abs(x-p.middle) > away*p.h {
		for j := range order {
			g := newRing(real(x), real(p.x[j]), x-p.x[j])
			s, d := g.potential(p.n[j])
			single[j] += factor * s * p.ds[j]
			double[j] += factor * d * p.ds[j]
		}
		return
	}
	l.spread(x, p, -1, 1, factor, single, double)
}

// spread adds the potentials at x of the polynomials on a part of a panel close by.
func (l *layer) spread(x complex128, p *panel, from, to, factor float64, single, double *nodal) {
	l.part(x, p, from, to, func(y, along complex128, weight float64, t float64) {
		g := newRing(real(x), real(y), x-y)
		s, d := g.potential(along * 1i)
		b := l.basis(t)
		for j := range order {
			single[j] += factor * s * weight * b[j]
			double[j] += factor * d * weight * b[j]
		}
	})
}

// own is the row of a node on its own panel.
func (l *layer) own(i int, p *panel, single, double *nodal) {
	if real(p.x[i]) < p.h/2 {
		l.ownNearAxis(i, p, single, double)
		return
	}
	for k := range l.self[i] {
		r := &l.self[i][k]
		l.ownPoint(i, p, r.t, r.weight, &r.basis, single, double)
	}
}

// ownPoint adds a quadrature point at a distance off in t from a node.
func (l *layer) ownPoint(i int, p *panel, off, weight float64, basis, single, double *nodal) {
	d, along := p.curve.step(p.start+p.h*(1+l.nodes[i])/2, off*p.h/2)
	g := newRing(real(p.x[i]), real(p.x[i])+real(d), -d)
	s, m := g.potential(along * 1i)
	w := weight * p.h / 2
	for j := range order {
		single[j] += s * w * basis[j]
		double[j] += m * w * basis[j]
	}
}

// ownNearAxis does the same where the panel comes near its own image beyond the
// axis: the rule for the logarithm serves only as far as half the radius goes.
func (l *layer) ownNearAxis(i int, p *panel, single, double *nodal) {
	t := l.nodes[i]
	reach := real(p.x[i]) / p.h
	for _, end := range []float64{-1, 1} {
		near := end * math.Min(reach, math.Abs(end-t))
		for k := range l.log {
			r := &l.log[k]
			basis := l.basis(t + near*r.t)
			l.ownPoint(i, p, near*r.t, math.Abs(near)*r.weight, &basis, single, double)
		}
		low, high := math.Min(t+near, end), math.Max(t+near, end)
		if high > low {
			l.spread(p.x[i], p, low, high, 1, single, double)
		}
	}
}

// leastPart is the length of a part of a panel, in units of the model, that is not
// halved further: rounding of coordinates.
const leastPart = 1e-14

// part visits quadrature points on a … b of a panel for an integrand that is
// nearly singular at x: halves until every piece is its own length away.
func (l *layer) part(x complex128, p *panel, a, b float64, visit func(y, along complex128, weight, t float64)) {
	middle, half := (a+b)/2, (b-a)/2
	m, _ := p.at(middle)
	if cmplx.Abs(x-m) < p.h*half && p.h*half > leastPart {
		l.part(x, p, a, middle, visit)
		l.part(x, p, middle, b, visit)
		return
	}
	for k, g := range l.gauss {
		t := middle + half*g
		y, along := p.at(t)
		visit(y, along, l.gaussW[k]*half*p.h/2, t)
	}
}
