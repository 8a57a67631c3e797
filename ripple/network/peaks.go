package network

import "math"

// peaks is the charge balance of a circuit between the two peaks of its drive: the
// potentials at the positive peak (first half of the vectors) and at the negative
// one (second half), half a period of currents between them. Its matrix is
// symmetric and the diodes are monotonic, so the solution is the minimum of a
// convex function, which Newton's method with a line search always reaches. It
// starts the shooting method from nothing, faults included.
type peaks struct {
	*walker
	pattern  *pattern
	place    []int // by unknown, then those of the negative peak
	base     []float64
	factor   []float64
	diagonal []float64 // of the matrix before it was factorised
	pull     []float64 // right-hand side without the diodes
	y, u, d  []float64
	soft     []float64 // by diode: on-conductance, no more than needed to tie its ends together
	early    []int     // entries between potentials at the positive peak
	shift    float64   // of the prepared equations
	pressed  float64
}

func newPeaks(s *system) *peaks {
	n := s.n
	g := newGraph(2 * n)
	s.spans(func(p *span) {
		if p.a >= 0 && p.b >= 0 {
			g.add(p.a, p.b)
			g.add(n+p.a, n+p.b)
		}
	})
	for _, c := range s.couplings {
		g.add(c.i, n+c.j)
		g.add(c.j, n+c.i)
	}
	for _, k := range s.inner {
		g.add(k, n+k)
	}
	p := &peaks{walker: newWalker(s)}
	p.pattern, p.place = s.room.pattern(g, 2*n)
	p.base, p.factor, p.diagonal = make([]float64, p.pattern.size()), make([]float64, p.pattern.size()), make([]float64, 2*n)
	p.pull, p.y, p.u, p.d = make([]float64, 2*n), make([]float64, 2*n), make([]float64, 2*n), make([]float64, 2*n)
	p.on = make([]bool, 2*len(s.diodes))
	for i := range p.on {
		p.on[i] = true
	}
	p.soften()
	p.sort()
	p.assemble()
	return p
}

// stiff is how many times the capacitance at its ends a diode may pass in half a
// period: enough to tie them together, and little enough for its voltage to show
// through rounding whether it conducts, at any load.
const stiff = 100

func (p *peaks) soften() {
	p.soft = make([]float64, len(p.diodes))
	for i := range p.diodes {
		d := &p.diodes[i]
		p.soft[i] = d.on
		if c := least(p.own, d.a, d.b); c > 0 {
			p.soft[i] = math.Min(p.soft[i], stiff*c/p.half())
		}
	}
}

// sort finds the entries between potentials at the positive peak.
func (p *peaks) sort() {
	early := make([]bool, 2*p.n)
	for k := range p.n {
		early[p.place[k]] = true
	}
	for k := range 2 * p.n {
		if !early[k] {
			continue
		}
		p.early = append(p.early, k)
		for e := p.pattern.start[k]; e < p.pattern.start[k+1]; e++ {
			if early[p.pattern.row[e]] {
				p.early = append(p.early, 2*p.n+int(e))
			}
		}
	}
}

// half is the time between the peaks.
func (p *peaks) half() float64 { return p.period / 2 }

// enter adds a value between two unknowns of one half.
func (p *peaks) enter(m []float64, s *span, value float64, half int) {
	if s.a == s.b {
		return
	}
	add := func(k int) {
		if k >= 0 {
			m[p.place[k+half*p.n]] += value
		}
	}
	add(s.a)
	add(s.b)
	if s.a >= 0 && s.b >= 0 {
		m[p.pattern.entry(p.place[s.a+half*p.n], p.place[s.b+half*p.n])] -= value
	}
}

// assemble fills in what does not depend on the diodes' states.
func (p *peaks) assemble() {
	for half := range 2 {
		p.admit(half)
		p.drive(half)
	}
	cross := func(i, j int, v float64) { p.base[p.pattern.entry(p.place[i], p.place[p.n+j])] -= v }
	for _, k := range p.inner {
		cross(k, k, p.own[k])
	}
	for _, c := range p.couplings {
		cross(c.i, c.j, -c.value)
		cross(c.j, c.i, -c.value)
	}
}

// admit enters what joins the potentials of one peak.
func (p *peaks) admit(half int) {
	h := p.half()
	for i := range p.capacitors {
		p.enter(p.base, &p.capacitors[i].span, p.capacitors[i].value, half)
	}
	for i := range p.resistors {
		p.enter(p.base, &p.resistors[i].span, h*p.resistors[i].value, half)
	}
	for i := range p.diodes {
		p.enter(p.base, &p.diodes[i].span, h*p.diodes[i].leak, half)
	}
	for i := range p.inductors {
		l := &p.inductors[i]
		p.enter(p.base, &l.span, h*h/l.value, half)
	}
}

// drive enters what sources and loads bring to the unknowns at one peak.
func (p *peaks) drive(half int) {
	h, s := p.half(), 1-2*float64(half)
	y := p.pull[half*p.n : (half+1)*p.n]
	for k := range y {
		y[k] = -2 * s * (p.capSquare[k] + p.capSine[k])
	}
	for i := range p.resistors {
		r := &p.resistors[i]
		r.inject(y, -h*r.value*r.offset.at(s, s))
	}
	for i := range p.diodes {
		d := &p.diodes[i]
		if d.a != d.b {
			d.inject(y, -h*d.leak*d.offset.at(s, s))
		}
	}
	for i := range p.sinks {
		p.sinks[i].inject(y, -h*p.sinks[i].value)
	}
	for i := range p.inductors {
		l := &p.inductors[i]
		l.inject(y, -h*h/l.value*l.offset.at(s, s))
	}
}

// renew enters the sources anew.
func (p *peaks) renew() {
	p.pressed = 0
	p.drive(0)
	p.drive(1)
}

// over is a diode's voltage beyond its drop at a peak.
func (p *peaks) over(i, half int, u []float64) float64 {
	s := 1 - 2*float64(half)
	return p.diodes[i].volts(u[half*p.n:(half+1)*p.n], s, s) - p.diodes[i].drop
}

// press makes every diode pass a part of the charge of its capacitance at the
// drive's peak, by a current that leads as much back past it: the ladder stands
// lower, and every diode that has a part in the state conducts.
func (p *peaks) press(part float64) {
	for i := range p.diodes {
		d := &p.diodes[i]
		if c := least(p.own, d.a, d.b); d.a != d.b {
			q := (part - p.pressed) * c * p.scale / 2
			d.inject(p.pull[:p.n], q)
			d.inject(p.pull[p.n:], q)
		}
	}
	p.pressed = part
}
