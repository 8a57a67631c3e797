package network

import "kilovet/hv/quantity"

// page is the step that is being entered. What the ledger does with the four samples of
// each element stands in single variables, which stay in registers.
type page struct {
	*step
	u0, u1, u2, u3 []float64    // potentials at the start and the stages
	amps           [4][]float64 // of the coils
	on             []bool
	diodes         []rectifier
	w1, w2, w3     float64 // weights of the stages
	rate           float64 // one over the length; zero where a jump precedes the step
}

func newPage(t *track, k int) page {
	st := &t.steps[k]
	p := page{step: st, on: t.conducting(k), diodes: t.diodes, w1: share1 * st.length, w2: share2 * st.length, w3: share3 * st.length}
	p.u0, p.u1, p.u2, p.u3 = t.potentials(k, 0), t.potentials(k, 1), t.potentials(k, 2), t.potentials(k, 3)
	for j := range p.amps {
		p.amps[j] = t.currents(k, j)
	}
	if !st.jump {
		p.rate = 1 / st.length
	}
	return p
}

// across is the voltage across a span at the start and the stages.
func (p *page) across(s *span) (v0, v1, v2, v3 float64) {
	fixed, swing := s.offset.direct+s.offset.square*p.sign, s.offset.sine
	v0, v1, v2, v3 = fixed+swing*p.sine[0], fixed+swing*p.sine[1], fixed+swing*p.sine[2], fixed+swing*p.sine[3]
	if k := s.a; k >= 0 {
		v0, v1, v2, v3 = v0+p.u0[k], v1+p.u1[k], v2+p.u2[k], v3+p.u3[k]
	}
	if k := s.b; k >= 0 {
		v0, v1, v2, v3 = v0-p.u0[k], v1-p.u1[k], v2-p.u2[k], v3-p.u3[k]
	}
	return
}

// charging is the current of a capacitance at the stages: the slope of the collocation
// polynomial. What a jump moves is counted apart.
func (p *page) charging(c, v0, v1, v2, v3 float64) (y1, y2, y3 float64) {
	c *= p.rate
	if p.euler {
		y := c * (v3 - v0)
		return y, y, y
	}
	d1, d2, d3 := v1-v0, v2-v0, v3-v0
	y1 = c * (slopes[0][0]*d1 + slopes[0][1]*d2 + slopes[0][2]*d3)
	y2 = c * (slopes[1][0]*d1 + slopes[1][1]*d2 + slopes[1][2]*d3)
	y3 = c * (slopes[2][0]*d1 + slopes[2][1]*d2 + slopes[2][2]*d3)
	return
}

// add enters one step of an element.
func (l *ledger) add(a *account, p *page) {
	var y1, y2, y3 float64
	v0, v1, v2, v3 := p.across(&a.span)
	switch {
	case a.coil >= 0:
		y1, y2, y3 = p.amps[1][a.coil], p.amps[2][a.coil], p.amps[3][a.coil]
	case a.c != 0:
		y1, y2, y3 = p.charging(a.c, v0, v1, v2, v3)
	default:
		y1, y2, y3 = a.i0+a.g*v1, a.i0+a.g*v2, a.i0+a.g*v3
		if a.diode >= 0 && p.on[a.diode] {
			d := &p.diodes[a.diode]
			y1, y2, y3 = y1+d.on*(v1-d.drop), y2+d.on*(v2-d.drop), y3+d.on*(v3-d.drop)
		}
	}
	if a.needed {
		w := &l.whole[a.index]
		w[0], w[1], w[2] = y1, y2, y3
		if a.junction > 0 {
			x1, x2, x3 := p.charging(a.junction, v0, v1, v2, v3)
			w[0], w[1], w[2] = w[0]+x1, w[1]+x2, w[2]+x3
		}
	}
	l.of[a.index].look(p.euler, v0, v1, v2, v3)
	l.book(a.index, p, y1, y2, y3, v1, v2, v3)
}

// gather enters one step of a tie.
func (l *ledger) gather(a *tieAccount, p *page) {
	var y1, y2, y3 float64
	for _, o := range a.parts {
		w := &l.whole[o.element]
		y1, y2, y3 = y1+o.sign*w[0], y2+o.sign*w[1], y3+o.sign*w[2]
	}
	v0, v1, v2, v3 := p.across(&a.span)
	l.of[a.index].look(p.euler, v0, v1, v2, v3)
	l.book(a.index, p, y1, y2, y3, v1, v2, v3)
}

// look widens the range of the voltage to what it does over a step. A cubic leaves the
// range of its samples by less than the range itself.
func (s *Stress) look(euler bool, v0, v1, v2, v3 float64) {
	low, high := rangeOf(v0, v1, v2, v3)
	if low-(high-low) >= float64(s.Least) && high+(high-low) <= float64(s.Greatest) {
		return
	}
	y := samples{v0, v1, v2, v3}
	s.Least, s.Greatest = y.widen(euler, s.Least, s.Greatest)
}

// book enters the current of one step, and what it takes with it.
func (l *ledger) book(i int, p *page, y1, y2, y3, v1, v2, v3 float64) {
	s := &l.of[i]
	y0 := l.last[i]
	l.last[i] = y3
	low, high := rangeOf(y0, y1, y2, y3)
	if low-(high-low) < -float64(s.Peak) || high+(high-low) > float64(s.Peak) {
		y := samples{y0, y1, y2, y3}
		s.Peak = quantity.Current(y.peak(p.euler, float64(s.Peak)))
	}
	q1, q2, q3 := p.w1*y1, p.w2*y2, p.w3*y3
	s.Charge += quantity.Charge(q1 + q2 + q3)
	s.Energy += quantity.Energy(q1*v1 + q2*v2 + q3*v3)
}
