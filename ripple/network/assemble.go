package network

import (
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
)

// span is where an element lies: its voltage is u[a] − u[b] + offset, and a
// missing potential (grounded) counts as zero.
type span struct {
	a, b    int
	offset  offset
	element int
}

func (s *span) volts(u []float64, square, sine float64) float64 {
	v := s.offset.at(square, sine)
	if s.a >= 0 {
		v += u[s.a]
	}
	if s.b >= 0 {
		v -= u[s.b]
	}
	return v
}

// difference is the same without the offset.
func (s *span) difference(u []float64) float64 {
	v := 0.0
	if s.a >= 0 {
		v = u[s.a]
	}
	if s.b >= 0 {
		v -= u[s.b]
	}
	return v
}

// inject adds a current that leaves a and enters b.
func (s *span) inject(y []float64, i float64) {
	if s.a >= 0 {
		y[s.a] += i
	}
	if s.b >= 0 {
		y[s.b] -= i
	}
}

// valued is an element with one value: capacitance, conductance, inductance or current.
type valued struct {
	span
	value float64
}

// rectifier is a diode: i = leak·v + max(0, v − drop)·on.
type rectifier struct {
	span
	drop, on, leak float64
	assumed        bool // the leakage is the assumed one
	replaced       bool // the on-resistance is the assumed one
}

// system is a circuit as matrices and lists: charges q = C u + …, currents G u + ….
type system struct {
	c      *circuit.Circuit
	frame  *frame
	omega  float64
	period float64
	scale  float64 // largest voltage of the sources
	grain  float64 // shortest time that is told apart
	square bool    // some source is a square wave

	n          int
	place      []int // by free potential: its unknown
	pattern    *pattern
	capacitors []valued // junction capacitances included
	resistors  []valued
	inductors  []valued
	sinks      []valued
	diodes     []rectifier

	cap, cond, coil        []float64 // capacitance, conductance without the conducting diodes and 1/L: to ground, then between unknowns
	own                    []float64 // by unknown: all capacitance at it
	couplings              []coupling
	capDirect, capSquare   []float64
	capSine                []float64
	condDirect, condSquare []float64
	condSine               []float64
	inner                  []int // unknowns that hold charge
	assumptions            []string
	typical                float64 // the smallest fitted capacitance
}

// coupling is the capacitance between two unknowns.
type coupling struct {
	i, j  int
	value float64
}

// newSystem compiles a circuit for a drive frequency. Diodes without leakage are
// given one that takes off their capacitance at a rate, in 1/s.
func newSystem(c *circuit.Circuit, frequency, leak float64) (*system, error) {
	f, err := newFrame(c, frequency)
	if err != nil {
		return nil, err
	}
	s := &system{c: c, frame: f, omega: 2 * math.Pi * frequency, period: 1 / frequency, n: f.count}
	if s.measure(frequency); s.scale == 0 {
		s.scale = 1 // nothing drives it; any scale serves
	}
	s.collect()
	s.typify()
	s.arrange()
	s.rectify(leak)
	s.stamp()
	s.grind()
	return s, s.fed()
}

// measure finds the largest voltage of the sources and whether one is a square wave.
func (s *system) measure(frequency float64) {
	for i := range s.c.Elements {
		e := &s.c.Elements[i]
		if e.Kind == circuit.Source {
			w := wave(e, frequency)
			s.scale = math.Max(s.scale, w.size())
			s.square = s.square || w.square != 0
		}
	}
}

func (s *system) span(i int) span {
	e := &s.c.Elements[i]
	f := s.frame
	return span{f.group[e.From], f.group[e.To], f.offset[e.From].plus(f.offset[e.To], -1), i}
}

// collect sorts the elements by kind; a capacitance, conductance or current of
// zero is nothing, and an open gap is nothing.
func (s *system) collect() {
	add := func(list *[]valued, i int, v float64) {
		if v != 0 {
			*list = append(*list, valued{s.span(i), v})
		}
	}
	for i := range s.c.Elements {
		e := &s.c.Elements[i]
		switch {
		case isTie(e):
		case e.Kind == circuit.Resistor:
			add(&s.resistors, i, 1/float64(e.Resistance))
		case e.Kind == circuit.Capacitor:
			add(&s.capacitors, i, float64(e.Capacitance))
		case e.Kind == circuit.Inductor:
			add(&s.inductors, i, float64(e.Inductance))
		case e.Kind == circuit.Sink:
			add(&s.sinks, i, float64(e.Current))
		case e.Kind == circuit.Diode:
			add(&s.capacitors, i, float64(e.Rectifier.Junction))
			r := e.Rectifier
			s.diodes = append(s.diodes, rectifier{span: s.span(i), drop: float64(r.Drop), leak: r.Leakage, on: 1 / float64(r.On)})
		}
	}
}

// typify finds the smallest fitted capacitance, or the largest where none is fitted.
func (s *system) typify() {
	fitted, largest := math.Inf(1), 0.0
	for i := range s.capacitors {
		c := &s.capacitors[i]
		e := &s.c.Elements[c.element]
		if e.Kind == circuit.Capacitor && e.Role != circuit.Stray {
			fitted = math.Min(fitted, c.value)
		}
		largest = math.Max(largest, c.value)
	}
	s.typical = math.Min(fitted, largest)
}

// spans visits the span of every element that joins potentials.
func (s *system) spans(visit func(*span)) {
	for _, list := range [][]valued{s.capacitors, s.resistors, s.inductors, s.sinks} {
		for i := range list {
			visit(&list[i].span)
		}
	}
	for i := range s.diodes {
		visit(&s.diodes[i].span)
	}
}

// arrange orders the unknowns for elimination and renames them accordingly.
func (s *system) arrange() {
	g := newGraph(s.n)
	s.spans(func(p *span) {
		if p.a >= 0 && p.b >= 0 {
			g.add(p.a, p.b)
		}
	})
	s.pattern, s.place = newPattern(g, s.n)
	s.spans(func(p *span) { p.a, p.b = s.at(p.a), s.at(p.b) })
}

// at is the unknown of a free potential.
func (s *system) at(group int) int {
	if group == grounded {
		return grounded
	}
	return s.place[group]
}

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
	for k, v := range u {
		q[k] = s.cap[k] * v
	}
	for i := range s.couplings {
		c := &s.couplings[i]
		d := c.value * (u[c.i] - u[c.j])
		q[c.i] += d
		q[c.j] -= d
	}
}

// fed refuses a circuit in which a constant current drains nodes that no
// conductor, coil or diode feeds: it has no periodic state.
func (s *system) fed() error {
	set := newSets(s.n + 1)
	slot := func(k int) int {
		if k == grounded {
			return s.n
		}
		return k
	}
	for _, list := range [][]valued{s.resistors, s.inductors} {
		for i := range list {
			set.join(slot(list[i].a), slot(list[i].b))
		}
	}
	for i := range s.diodes {
		set.join(slot(s.diodes[i].a), slot(s.diodes[i].b))
	}
	drawn := make([]float64, s.n+1)
	for i := range s.sinks {
		p := &s.sinks[i]
		drawn[set.find(slot(p.a))] += p.value
		drawn[set.find(slot(p.b))] -= p.value
	}
	for i := range s.sinks {
		p := &s.sinks[i]
		for _, end := range []int{p.a, p.b} {
			r := set.find(slot(end))
			if r != set.find(s.n) && math.Abs(drawn[r]) > 1e-9*math.Abs(p.value) {
				return lack.Failed("%s draws a current from nodes that nothing feeds: there is no periodic state", s.c.Elements[p.element].Name)
			}
		}
	}
	return nil
}
