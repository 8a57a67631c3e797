package network

// stamp fills the matrices and the vectors that go with the sources.
func (s *system) stamp() {
	size := s.pattern.size()
	s.cap, s.cond, s.coil = make([]float64, size), make([]float64, size), make([]float64, size)
	for _, v := range []*[]float64{&s.capDirect, &s.capSquare, &s.capSine, &s.condDirect, &s.condSquare, &s.condSine} {
		*v = make([]float64, s.n)
	}
	for i := range s.capacitors {
		c := &s.capacitors[i]
		s.enter(s.cap, &c.span, c.value)
		c.offsets(c.value, s.capDirect, s.capSquare, s.capSine)
	}
	for i := range s.resistors {
		r := &s.resistors[i]
		s.enter(s.cond, &r.span, r.value)
		r.offsets(r.value, s.condDirect, s.condSquare, s.condSine)
	}
	for i := range s.diodes {
		d := &s.diodes[i]
		s.enter(s.cond, &d.span, d.leak)
		d.offsets(d.leak, s.condDirect, s.condSquare, s.condSine)
	}
	for i := range s.inductors {
		s.enter(s.coil, &s.inductors[i].span, 1/s.inductors[i].value)
	}
	for i := range s.sinks {
		s.sinks[i].inject(s.condDirect, s.sinks[i].value)
	}
	s.gather()
}

// gather lists what C couples and which unknowns hold charge.
func (s *system) gather() {
	s.own = append([]float64(nil), s.cap[:s.n]...)
	for k := range s.n {
		for e := s.pattern.start[k]; e < s.pattern.start[k+1]; e++ {
			if v := s.cap[s.n+int(e)]; v != 0 {
				i := int(s.pattern.row[e])
				s.couplings = append(s.couplings, coupling{i, k, v})
				s.own[i] += v
				s.own[k] += v
			}
		}
	}
	for k, c := range s.own {
		if c != 0 {
			s.inner = append(s.inner, k)
		}
	}
}

// enter adds an admittance between two unknowns, or from one to ground.
func (s *system) enter(m []float64, p *span, value float64) {
	switch {
	case p.a == p.b:
	case p.a < 0:
		m[p.b] += value
	case p.b < 0:
		m[p.a] += value
	default:
		m[s.pattern.entry(p.a, p.b)] += value
	}
}

// offsets adds what the sources drive through a value.
func (p *span) offsets(value float64, direct, square, sine []float64) {
	if p.a == p.b {
		return
	}
	p.inject(direct, value*p.offset.direct)
	p.inject(square, value*p.offset.square)
	p.inject(sine, value*p.offset.sine)
}

// charge multiplies C with a vector of potentials.
func (s *system) charge(u, q []float64) {
	c, q := s.cap[:len(u)], q[:len(u)]
	for k, v := range u {
		q[k] = c[k] * v
	}
	for i := range s.couplings {
		c := &s.couplings[i]
		d := c.value * (u[c.i] - u[c.j])
		q[c.i] += d
		q[c.j] -= d
	}
}
