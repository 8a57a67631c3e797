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
	last     []float64 // current at the end of the step before
}

func newLedger(s *system) *ledger {
	n := len(s.c.Elements)
	l := &ledger{Stresses: Stresses{s.c, make([]Stress, n)}, view: &Periodic{Circuit: s.c, track: &track{system: s}},
		branches: make([][]branch, n), spans: make([]span, n), last: make([]float64, n)}
	for i := range s.c.Elements {
		l.of[i].Least, l.of[i].Greatest = quantity.Voltage(math.Inf(1)), quantity.Voltage(math.Inf(-1))
		l.branches[i] = l.view.branches(i, true)
		l.spans[i] = l.view.spanOf(&s.c.Elements[i])
	}
	return l
}

// enter adds the steps of a track.
func (l *ledger) enter(t *track) {
	l.view.track = t
	for k := range t.steps {
		for i := range l.of {
			l.add(i, k)
		}
	}
}

func (l *ledger) add(i, k int) {
	st, s := &l.view.track.steps[k], &l.of[i]
	v, y := l.view.track.stages(k, &l.spans[i]), l.view.current(l.branches[i], k)
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
