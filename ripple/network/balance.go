package network

import "math"

// solve finds the potentials at the peaks.
func (p *peaks) solve() {
	for range 200 {
		p.newton()
		for k := range p.d {
			p.d[k] = p.y[k] - p.u[k]
		}
		t := p.search()
		axpy(t, p.d, p.u)
		p.work.Guesses++
		if !p.change() && (t == 1 || t < 1e-9) || largest(p.d) <= 1e-8*largest(p.u) {
			return
		}
	}
}

// lean counts diodes that all but conduct as conducting, for the answers: at next to
// no load rounding alone would decide.
func (p *peaks) lean() {
	for i := range p.diodes {
		for half := range 2 {
			p.on[2*i+half] = p.over(i, half, p.u) > -1e-8*largest(p.u)
		}
	}
	p.prepare(0)
}

// newton solves with the diodes as they are.
func (p *peaks) newton() {
	h, n := p.half(), p.n
	copy(p.y, p.pull)
	for half := range 2 {
		s := 1 - 2*float64(half)
		for i := range p.diodes {
			if d := &p.diodes[i]; p.on[2*i+half] {
				d.inject(p.y[half*n:(half+1)*n], -h*p.soft[i]*(d.offset.at(s, s)-d.drop))
			}
		}
	}
	p.prepare(0)
	for k, v := range p.y {
		p.d[p.place[k]] = v
	}
	p.pattern.solveReal(p.factor, p.d)
	for k := range p.y {
		p.y[k] = p.d[p.place[k]]
	}
}

// prepare factorises with the diodes as they are, the first half scaled for answers
// to (1 + shift − M).
func (p *peaks) prepare(shift float64) {
	copy(p.factor, p.base)
	for half := range 2 {
		for i := range p.diodes {
			if d := &p.diodes[i]; p.on[2*i+half] {
				p.enter(p.factor, &d.span, p.half()*p.soft[i], half)
			}
		}
	}
	if p.shift = shift; shift != 0 {
		for _, k := range p.early {
			p.factor[k] *= 1 + shift
		}
	}
	p.pattern.factoriseReal(p.factor, p.diagonal)
}

// passed is the largest charge a diode passes in a period.
func (p *peaks) passed() float64 {
	most := 0.0
	for i := range p.diodes {
		sum := 0.0
		for half := range 2 {
			sum += p.half() * p.soft[i] * math.Max(0, p.over(i, half, p.u))
		}
		most = math.Max(most, sum)
	}
	return most
}

// change brings the diodes' states up to date.
func (p *peaks) change() (changed bool) {
	for i := range p.diodes {
		for half := range 2 {
			on := p.over(i, half, p.u) > 0
			changed = changed || on != p.on[2*i+half]
			p.on[2*i+half] = on
		}
	}
	return changed
}

// search is the part of the correction at which the convex function is least.
func (p *peaks) search() float64 {
	p.way.start, p.way.curve = p.slope()
	p.way.kinks = p.way.kinks[:0]
	for i := range p.diodes {
		for half := range 2 {
			rate := p.diodes[i].difference(p.d[half*p.n : (half+1)*p.n])
			p.way.kinks = append(p.way.kinks, kink{p.over(i, half, p.u), rate, p.half() * p.soft[i] * rate})
		}
	}
	return p.way.least()
}

// slope is the derivative of the function without the diodes along the correction,
// and its rate of change.
func (p *peaks) slope() (start, curve float64) {
	product := func(i, j int, v float64) {
		start += v * (p.d[i]*p.u[j] + p.d[j]*p.u[i])
		curve += v * 2 * p.d[i] * p.d[j]
	}
	origin := make([]int, len(p.place))
	for k, at := range p.place {
		origin[at] = k
		start += p.base[at]*p.d[k]*p.u[k] - p.pull[k]*p.d[k]
		curve += p.base[at] * p.d[k] * p.d[k]
	}
	for k := range p.pattern.n {
		for e := p.pattern.start[k]; e < p.pattern.start[k+1]; e++ {
			product(origin[k], origin[p.pattern.row[e]], p.base[p.pattern.n+int(e)])
		}
	}
	return start, curve
}

// answer replaces a change r of the charges over a period by the correction that
// (1 + shift − M) makes of it, M being the map of this circuit between its peaks: the
// preconditioner of the shooting method. With the change δ of the start,
// (C + h G) u₁ = δ, (C + h G) u₂ = C u₁ and (1 + shift) δ = C u₂ + r.
func (p *peaks) answer(r []float64) {
	n := p.n
	for k := range p.d {
		p.d[k] = 0
	}
	for k, v := range r {
		p.d[p.place[k]] = v
	}
	p.pattern.solveReal(p.factor, p.d)
	for k := range n {
		p.y[k] = p.d[p.place[n+k]]
	}
	p.charge(p.y[:n], p.d[:n])
	for k := range r {
		r[k] = (r[k] + p.d[k]) / (1 + p.shift)
	}
}
