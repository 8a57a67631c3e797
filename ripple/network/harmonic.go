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

// Harmonics are the first so many complex amplitudes, each as Harmonic gives it, for less
// work: the turn of each node of the quadrature is taken once and multiplied on.
func (p *Periodic) Harmonics(from, to circuit.Node, orders int) ([]complex128, error) {
	s, err := p.span(from, to)
	if err != nil {
		return nil, err
	}
	sums := make([]complex128, orders)
	for i := range p.track.steps {
		y := p.track.stages(i, &s)
		p.track.steps[i].harmonics(y.polynomial(p.track.steps[i].euler), p.track.omega, sums)
	}
	for k := range sums {
		sums[k] *= complex(2/p.track.period, 0)
	}
	return sums, nil
}

// harmonics adds to sums the integrals of a polynomial times e^{−jkωt} over a step, k from
// one on; over 1.5 radians of the highest order the quadrature is true to 4e-11.
func (s *step) harmonics(p cubic, omega float64, sums []complex128) {
	parts := 1 + int(float64(len(sums))*omega*s.length/1.5)
	part := s.length / float64(parts)
	for m := range parts {
		for i, x := range gaussNode {
			x = (float64(m) + x) / float64(parts)
			sin, cos := math.Sincos(omega * (s.start + x*s.length))
			rotate(gaussPart[i]*p.at(x)*part, sin, cos, sums)
		}
	}
}

// rotate adds to the k-th sum a weight times the k-th power of cos − j sin, by the recurrence
// of the cosines and sines of multiple angles.
func rotate(weight, sin, cos float64, sums []complex128) {
	re, im, lastRe, lastIm := weight*cos, -weight*sin, weight, 0.0
	for k := range sums {
		sums[k] += complex(re, im)
		re, lastRe = 2*cos*re-lastRe, re
		im, lastIm = 2*cos*im-lastIm, im
	}
}
