package network

import (
	"math"

	"kilovet/hv/circuit"
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
	value  float64
	weight float64 // of a capacitor: the same, at most the typical
}

// rectifier is a diode: i = leak·v + max(0, v − drop)·on.
type rectifier struct {
	span
	drop, on, leak float64
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
	room   *room

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
// given one that takes off their capacitance at a rate, in 1/s. It shares the room of the state
// of a similar circuit; of none it has its own.
func newSystem(c *circuit.Circuit, frequency, leak float64, like *Periodic) (*system, error) {
	f, err := newFrame(c, frequency)
	if err != nil {
		return nil, err
	}
	s := &system{c: c, frame: f, omega: 2 * math.Pi * frequency, period: 1 / frequency, n: f.count, room: roomOf(like)}
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
			*list = append(*list, valued{span: s.span(i), value: v})
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
	for i := range s.capacitors {
		c := &s.capacitors[i]
		c.weight = math.Min(c.value, s.typical)
	}
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
	s.pattern, s.place = s.room.pattern(g, s.n)
	s.spans(func(p *span) { p.a, p.b = s.at(p.a), s.at(p.b) })
}

// at is the unknown of a free potential.
func (s *system) at(group int) int {
	if group == grounded {
		return grounded
	}
	return s.place[group]
}
