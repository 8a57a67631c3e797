package network

import (
	"math"

	"kilovet/hv/lack"
)

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
