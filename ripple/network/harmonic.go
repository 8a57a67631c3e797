package network

import (
	"math"

	"kilovet/hv/circuit"
)

// Harmonic is the complex amplitude A, zero to peak in volts, of the k-th harmonic
// of the voltage between two nodes: the part Re(A e^{j 2π k f t}), k ≥ 1.
func (p *Periodic) Harmonic(from, to circuit.Node, k int) (complex128, error) {
	s, err := p.span(from, to)
	if err != nil {
		return 0, err
	}
	var sum complex128
	for i := range p.track.steps {
		y := p.track.stages(i, &s)
		sum += p.track.steps[i].harmonic(y.polynomial(p.track.steps[i].euler), float64(k)*p.track.omega)
	}
	return sum * complex(2/p.track.period, 0), nil
}

// Gauss-Legendre nodes and weights of order ten on [0, 1].
var (
	gaussNode = [5]float64{0.04691007703066800360, 0.23076534494715845448, 0.5, 0.76923465505284154552, 0.95308992296933199640}
	gaussPart = [5]float64{0.11846344252809454376, 0.23931433524968323402, 0.28444444444444444444, 0.23931433524968323402, 0.11846344252809454376}
)

// harmonic is the integral of a polynomial times e^{−jωt} over a step.
func (s *step) harmonic(p cubic, omega float64) complex128 {
	var sum complex128
	parts := 1 + int(omega*s.length)
	for m := range parts {
		for i, x := range gaussNode {
			x = (float64(m) + x) / float64(parts)
			sin, cos := math.Sincos(omega * (s.start + x*s.length))
			sum += complex(gaussPart[i]*p.at(x)*cos, -gaussPart[i]*p.at(x)*sin)
		}
	}
	return sum * complex(s.length/float64(parts), 0)
}
