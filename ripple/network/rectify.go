package network

import (
	"fmt"
	"math"
)

// Values assumed where the description says nothing, small enough not to matter:
const (
	// A diode with no or less on-resistance gets one with ω R C of this size, C being
	// the smaller of the capacitances at its two ends: the peak is missed by 1e-5 rad.
	smallestAngle = 1e-5
	// A diode without leakage gets one that loses this fraction of the charge of
	// that capacitance in a period. Without load and leakage the state depends on
	// history; this picks the one that a vanishing leakage would leave.
	smallestLeak = 1e-10
	// Of diodes between nodes without capacitance.
	bareOn   = 1e3   // siemens
	bareLeak = 1e-16 // siemens
)

// rectify replaces an on-resistance of next to nothing and a leakage of zero.
func (s *system) rectify(leak float64) {
	local := make([]float64, s.n)
	for i := range s.capacitors {
		c := &s.capacitors[i]
		for _, k := range []int{c.a, c.b} {
			if k >= 0 && c.a != c.b {
				local[k] += c.value
			}
		}
	}
	var replaced bool
	for i := range s.diodes {
		d := &s.diodes[i]
		c := least(local, d.a, d.b)
		most := s.omega * c / smallestAngle
		if c == 0 {
			most = bareOn
		}
		if d.on > most {
			d.on, d.replaced, replaced = most, true, true
		}
		if d.leak == 0 {
			d.leak = math.Max(leak*c, bareLeak)
		}
	}
	if replaced {
		s.assumptions = append(s.assumptions, fmt.Sprintf("diodes with next to no on-resistance are given one of ω R C = %g", smallestAngle))
	}
}

// least is the smaller capacitance at two unknowns, zero where neither has one.
func least(local []float64, a, b int) float64 {
	c := math.Inf(1)
	for _, k := range []int{a, b} {
		if k >= 0 && local[k] > 0 {
			c = math.Min(c, local[k])
		}
	}
	if math.IsInf(c, 1) {
		return 0
	}
	return c
}
