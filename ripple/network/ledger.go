package network

import (
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
)

// Stress is what an element went through in a stretch of time.
type Stress struct {
	Least, Greatest quantity.Voltage // across it, from From to To
	Peak            quantity.Current // largest magnitude; of a diode without its junction's
	Charge          quantity.Charge  // passed from From to To
	Energy          quantity.Energy  // taken up
}

// ReversePeak is the largest voltage against the forward direction.
func (s Stress) ReversePeak() quantity.Voltage { return -s.Least }

// Stresses are those of all elements of a circuit.
type Stresses struct {
	Circuit *circuit.Circuit
	of      []Stress
}

// Of is the stress of one element.
func (s *Stresses) Of(name string) Stress {
	for i := range s.Circuit.Elements {
		if s.Circuit.Elements[i].Name == name {
			return s.of[i]
		}
	}
	panic("network: no element " + name)
}

// ledger adds up stresses step by step.
type ledger struct {
	Stresses
	view     *Periodic
	branches [][]branch
	spans    []span
	plain    []branch  // by element: itself, of a diode with its junction
	parts    [][]part  // by element: of a tie, whose currents add up to its own
	last     []float64 // current at the end of the step before
	whole    []samples // current in the step, that of a diode with its junction's
}

// part is an element whose current is a part of another's.
type part struct {
	element int
	sign    float64
}

func newLedger(s *system) *ledger {
	n := len(s.c.Elements)
	l := &ledger{Stresses: Stresses{s.c, make([]Stress, n)}, view: &Periodic{Circuit: s.c, track: &track{system: s}},
		branches: make([][]branch, n), spans: make([]span, n), plain: make([]branch, n), parts: make([][]part, n), last: make([]float64, n), whole: make([]samples, n)}
	for i := range s.c.Elements {
		e := &s.c.Elements[i]
		l.of[i].Least, l.of[i].Greatest = quantity.Voltage(math.Inf(1)), quantity.Voltage(math.Inf(-1))
		l.branches[i] = l.view.branches(i, true)
		l.spans[i] = l.view.spanOf(e)
		if !isTie(e) {
			l.plain[i] = l.branches[i][0]
			continue
		}
		for k := range l.branches[i] {
			b := &l.branches[i][k]
			l.parts[i] = append(l.parts[i], part{b.index, b.sign})
		}
	}
	return l
}

// enter adds the steps of a track.
func (l *ledger) enter(t *track) {
	l.view.track = t
	for k := range t.steps {
		for i := range l.of {
			if l.parts[i] == nil {
				l.add(i, k)
			}
		}
		for i := range l.of {
			if l.parts[i] != nil {
				l.gather(i, k)
			}
		}
	}
}

// add enters one step of an element.
func (l *ledger) add(i, k int) {
	if l.plain[i].element == nil { // a tie that nothing hangs on
		return
	}
	v := l.view.track.stages(k, &l.spans[i])
	y := l.view.track.currentAt(&l.plain[i], k, &v)
	l.whole[i] = y
	if e := l.plain[i].element; e.Kind == circuit.Diode && e.Rectifier.Junction > 0 {
		j := l.view.track.charging(k, &v, float64(e.Rectifier.Junction))
		for m := range j {
			l.whole[i][m] += j[m]
		}
	}
	l.book(i, k, &v, y)
}

// gather enters one step of a tie.
func (l *ledger) gather(i, k int) {
	var y samples
	for _, p := range l.parts[i] {
		for m, x := range l.whole[p.element] {
			y[m] += p.sign * x
		}
	}
	v := l.view.track.stages(k, &l.spans[i])
	l.book(i, k, &v, y)
}

// book enters voltage and current of one step.
func (l *ledger) book(i, k int, v *samples, y samples) {
	st, s := &l.view.track.steps[k], &l.of[i]
	s.Least, s.Greatest = v.widen(st.euler, s.Least, s.Greatest)
	y[0], l.last[i] = l.last[i], y[3]
	s.Peak = quantity.Current(y.peak(st.euler, float64(s.Peak)))
	for j, c := range share {
		s.Charge += quantity.Charge(c * st.length * y[j+1])
		s.Energy += quantity.Energy(c * st.length * y[j+1] * v[j+1])
	}
}

// reaches is the first instant within a track at which a voltage times sign reaches a
// level, infinite where it does not, and the highest it has at the end of a step.
func (t *track) reaches(s *span, sign, level float64) (at, highest float64) {
	at, highest = math.Inf(1), math.Inf(-1)
	for k := range t.steps {
		st := &t.steps[k]
		y := t.stages(k, s)
		highest = max(highest, sign*y[3])
		if !math.IsInf(at, 1) {
			continue
		}
		for j := range y {
			y[j] = sign*y[j] - level
		}
		p := y.polynomial(st.euler)
		if _, high := p.hull(); high > 0 {
			if x := p.rise(0); x <= 1 {
				at = st.start + x*st.length
			} else if p[0] >= 0 {
				at = st.start
			}
		}
	}
	return at, highest
}
