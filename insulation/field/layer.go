package field

import "math/cmplx"

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
			s, d := ringPotential(real(x), real(p.x[j]), x-p.x[j], p.n[j])
			single[j] += factor * s * p.ds[j]
			double[j] += factor * d * p.ds[j]
		}
		return
	}
	l.part(x, p, -1, 1, func(y, along complex128, weight float64, t float64) {
		s, d := ringPotential(real(x), real(y), x-y, along*1i)
		b := l.basis(t)
		for j := range order {
			single[j] += factor * s * weight * b[j]
			double[j] += factor * d * weight * b[j]
		}
	})
}

// own is the row of a node on its own panel.
func (l *layer) own(i int, p *panel, single, double *nodal) {
	for k := range l.self[i] {
		q := &l.self[i][k]
		d, along := p.curve.step(p.start+p.h*(1+l.nodes[i])/2, q.t*p.h/2)
		s, m := ringPotential(real(p.x[i]), real(p.x[i])+real(d), -d, along*1i)
		w := q.weight * p.h / 2
		for j := range order {
			single[j] += s * w * q.basis[j]
			double[j] += m * w * q.basis[j]
		}
	}
}

// deepest halving: parts of 1e-12 of a panel.
const deepest = 40

// part visits quadrature points on a … b of a panel for an integrand that is
// nearly singular at x: halves until every piece is its own length away.
func (l *layer) part(x complex128, p *panel, a, b float64, visit func(y, along complex128, weight, t float64)) {
	l.pieces(x, p, a, b, deepest, visit)
}

func (l *layer) pieces(x complex128, p *panel, a, b float64, depth int, visit func(y, along complex128, weight, t float64)) {
	middle, half := (a+b)/2, (b-a)/2
	m, _ := p.at(middle)
	if depth > 0 && cmplx.Abs(x-m) < p.h*half {
		l.pieces(x, p, a, middle, depth-1, visit)
		l.pieces(x, p, middle, b, depth-1, visit)
		return
	}
	for k, g := range l.gauss {
		t := middle + half*g
		y, along := p.at(t)
		visit(y, along, l.gaussW[k]*half*p.h/2, t)
	}
}
