package network

import "math"

// The state of the shooting method is one vector: the charges of the unknowns that
// hold any, each over the root of its capacitance, then the inductor currents
// times the root of the inductance. Its length is then a root of energy.

// roots are what the entries of a state are multiplied with.
func (s *system) roots() []float64 {
	x := make([]float64, 0, s.states())
	for _, k := range s.inner {
		x = append(x, 1/math.Sqrt(s.own[k]))
	}
	for i := range s.inductors {
		x = append(x, math.Sqrt(s.inductors[i].value))
	}
	return x
}

// pack makes a state of charges and currents.
func (s *system) pack(q, amps, scale, x []float64) {
	for j, k := range s.inner {
		x[j] = q[k] * scale[j]
	}
	m := len(s.inner)
	for i, a := range amps {
		x[m+i] = a * scale[m+i]
	}
}

// unpack makes charges and currents of a state.
func (s *system) unpack(x, scale, q, amps []float64) {
	for k := range q {
		q[k] = 0
	}
	for j, k := range s.inner {
		q[k] = x[j] / scale[j]
	}
	m := len(s.inner)
	for i := range amps {
		amps[i] = x[m+i] / scale[m+i]
	}
}

func norm(x []float64) float64 { return math.Sqrt(dot(x, x)) }

func abs(x float64) float64 {
	if x < 0 {
		return -x
	}
	return x
}

func largest(x []float64) float64 {
	m := 0.0
	for _, v := range x {
		if v = abs(v); v > m || v != v {
			m = v
		}
	}
	return m
}

// states is the number of state variables.
func (s *system) states() int { return len(s.inner) + len(s.inductors) }
