package field

import (
	"math"
	"testing"
)

// A double layer of moment u along a path is the field of ring currents du/ds and of
// the currents u at its ends; the gradient of its potential is that field.
func TestDoubleLayerIsRingCurrents(t *testing.T) {
	q := newQuadrature()
	c := curve{from: 1 + 0.2i, along: 0.6 + 0.8i, length: 1}
	p := newPanel(1, 0, &c, 0, 1, q)
	moment := func(s float64) float64 { return s * s * (1 - s) * (1 - s) } // nothing at the ends
	slope := func(s float64) float64 { return 2 * s * (1 - s) * (1 - 2*s) }
	potential := func(x complex128) (w float64) {
		for j, y := range p.x {
			r := newRing(real(x), real(y), x-y)
			_, d := r.potential(p.n[j])
			w += d * moment((1+q.nodes[j])/2) * p.ds[j]
		}
		return w
	}
	x := 4.5 + 3i
	var g complex128
	for j, y := range p.x {
		r := newRing(real(x), real(y), x-y)
		_, current := r.gradient()
		g += current * complex(slope((1+q.nodes[j])/2)*p.ds[j], 0)
	}
	const h = 1e-4
	wantR := (potential(x+h) - potential(x-h)) / (2 * h)
	wantZ := (potential(x+h*1i) - potential(x-h*1i)) / (2 * h)
	if math.Abs(real(g)-wantR) > 1e-9 || math.Abs(imag(g)-wantZ) > 1e-9 {
		t.Errorf("got %v, want (%v%+vi)", g, wantR, wantZ)
	}
}
