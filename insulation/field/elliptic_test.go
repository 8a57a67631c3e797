package field

import (
	"math"
	"testing"
)

// The trapezium rule over the angle converges geometrically for rings apart.
func TestRingIntegralsAgainstQuadrature(t *testing.T) {
	for _, c := range [][3]float64{{1, 1, 0.5}, {1, 2, 0}, {0, 1, 1}, {1, 0, 0.3}, {1e-6, 1, 1e-3}, {3, 2.5, -0.4}, {1, 1.1, 0.02}} {
		r, rs, dz := c[0], c[1], c[2]
		var want [3]float64
		const n = 20000
		for k := range n {
			cos := math.Cos(2 * math.Pi * float64(k) / n)
			d := math.Sqrt(r*r + rs*rs + dz*dz - 2*r*rs*cos)
			for i, f := range []float64{1 / d, 1 / (d * d * d), (1 - cos) / (d * d * d)} {
				want[i] += f * 2 * math.Pi / n
			}
		}
		i0, j0, j1 := ringIntegrals(r, rs, r-rs, dz)
		for i, got := range []float64{i0, j0, j1} {
			if math.Abs(got-want[i]) > 1e-12*math.Abs(want[0]+want[1]) {
				t.Errorf("r %v, rs %v, dz %v, integral %d: got %v, want %v", r, rs, dz, i, got, want[i])
			}
		}
	}
}

func BenchmarkRingIntegrals(b *testing.B) {
	x := 0.0
	for i := range b.N {
		i0, j0, j1 := ringIntegrals(1, 1.5, -0.5, 0.001*float64(i%1000))
		x += i0 + j0 + j1
	}
	_ = x
}
