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
	island := newSets(s.n + 1)
	slot := func(k int) int {
		if k == grounded {
			return s.n
		}
		return k
	}
	for i := range s.capacitors {
		island.join(slot(s.capacitors[i].a), slot(s.capacitors[i].b))
	}
	most, leak, coil := make([]float64, s.n+1), make([]float64, s.n+1), make([]float64, s.n+1)
	for i := range s.capacitors {
		c := &s.capacitors[i]
		r := island.find(slot(c.a))
		most[r] = math.Max(most[r], c.value)
	}
	tie := func(list []valued, sum []float64, part func(float64) float64) {
		for i := range list {
			a, b := island.find(slot(list[i].a)), island.find(slot(list[i].b))
			if a != b {
				sum[a] += part(list[i].value)
				sum[b] += part(list[i].value)
			}
		}
	}
	tie(s.resistors, leak, func(g float64) float64 { return g })
	tie(s.inductors, coil, func(l float64) float64 { return 1 / l })
	s.grain = finest * s.period
	for r, c := range most {
		if r == island.find(s.n) || c == 0 {
			continue
		}
		const noise = 1e-6 // rounding over the voltage that may be told apart
		h := math.Inf(1)
		if leak[r] > 0 {
			h = noise * c / leak[r]
		}
		if coil[r] > 0 {
			h = math.Min(h, math.Sqrt(noise*c/coil[r]))
		}
		s.grain = math.Max(s.grain, math.Min(h, 1e-4*s.period))
	}
}
