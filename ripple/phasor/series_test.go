package phasor_test

import (
	"math"
	"testing"

	"kilovet/ripple/phasor"
)

// A sine of amplitude 3 swings by 6; cos x + cos 2x from 2 at x = 0 to −9/8 where
// cos x = −1/4.
func TestPeakToPeak(t *testing.T) {
	for _, c := range []struct {
		amplitudes []complex128
		want       float64
	}{{nil, 0}, {[]complex128{3i}, 6}, {[]complex128{1, 1}, 2 + 9./8}} {
		if got := float64(phasor.PeakToPeak(c.amplitudes)); math.Abs(got-c.want) > 1e-4 {
			t.Errorf("%v swings by %g, want %g", c.amplitudes, got, c.want)
		}
	}
}

// The square wave 4/π Σ sin kx/k over odd k, cut after 47: as it stands it overshoots by
// 8.9 % of the step (Gibbs), weighed by 1.2 % of it (R. W. Hamming, from memory); the step
// is twice the amplitude.
func TestTaper(t *testing.T) {
	const n = 48
	var bare, tapered []complex128
	for k := 1; k <= n; k++ {
		a := complex(0, 0)
		if k%2 == 1 {
			a = complex(0, -4/(math.Pi*float64(k)))
		}
		bare, tapered = append(bare, a), append(tapered, a*complex(phasor.Taper(k, n), 0))
	}
	if over := float64(phasor.PeakToPeak(bare))/2 - 1; math.Abs(over-0.179) > 0.01 {
		t.Errorf("a cut series overshoots by %g of the amplitude, want 0.179", over)
	}
	if over := float64(phasor.PeakToPeak(tapered))/2 - 1; math.Abs(over-0.024) > 0.004 {
		t.Errorf("weighed it overshoots by %g of the amplitude, want 0.024", over)
	}
}
