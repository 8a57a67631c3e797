package network

import "math"

// finest is the shortest time that is told apart, in periods.
const finest = 1e-9

// grind finds the grain of time: the shortest step up to an event, and the time in
// which the diodes settle after a jump. A column of capacitors that hangs on a
// resistance or inductance alone, as a coupling column does while its diodes are
// open, has the potential (sum of its charges)/(h/R) or …/(h²/L): in a shorter step
// the rounding of the charges would drown it.
func (s *system) grind() {
	l := s.lands()
	s.grain = finest * s.period
	for r, c := range l.most {
		if r == l.of(grounded) || c == 0 {
			continue
		}
		s.grain = math.Max(s.grain, math.Min(shortest(c, l.leak[r], l.coil[r]), 1e-4*s.period))
	}
}

// shortest is the step below which the rounding of charges on a capacitance shows in the
// potential that its ties to the rest give it: conductances g, and 1/L.
func shortest(c, g, coil float64) float64 {
	const noise = 1e-6 // rounding over the voltage that may be told apart
	h := math.Inf(1)
	if g > 0 {
		h = noise * c / g
	}
	if coil > 0 {
		h = math.Min(h, math.Sqrt(noise*c/coil))
	}
	return h
}

// lands are the columns that capacitors join, ground the last, each with its largest
// capacitance and with what ties it to the others.
type lands struct {
	sets             sets
	ground           int
	most, leak, coil []float64
}

func (s *system) lands() *lands {
	l := &lands{newSets(s.n + 1), s.n, make([]float64, s.n+1), make([]float64, s.n+1), make([]float64, s.n+1)}
	for i := range s.capacitors {
		l.sets.join(l.slot(s.capacitors[i].a), l.slot(s.capacitors[i].b))
	}
	for i := range s.capacitors {
		r := l.of(s.capacitors[i].a)
		l.most[r] = math.Max(l.most[r], s.capacitors[i].value)
	}
	l.tie(s.resistors, l.leak, func(g float64) float64 { return g })
	l.tie(s.inductors, l.coil, func(h float64) float64 { return 1 / h })
	return l
}

func (l *lands) slot(k int) int {
	if k == grounded {
		return l.ground
	}
	return k
}

// of is the column that an unknown belongs to.
func (l *lands) of(k int) int { return l.sets.find(l.slot(k)) }

// tie adds to both columns what joins them.
func (l *lands) tie(list []valued, sum []float64, part func(float64) float64) {
	for i := range list {
		a, b := l.of(list[i].a), l.of(list[i].b)
		if a != b {
			sum[a] += part(list[i].value)
			sum[b] += part(list[i].value)
		}
	}
}
