package phasor

import (
	"math"
	"math/cmplx"

	"kilovet/hv/quantity"
)

// PeakToPeak is the swing of a sum of harmonics of one fundamental, given by their complex
// amplitudes, the k-th at index k−1. It is sampled at 1024 instants of the period, which
// misses of the crest of the n-th harmonic at most a part (π n/1024)²/2: 1 % for n = 48.
func PeakToPeak(amplitudes []complex128) quantity.Voltage {
	const samples = 1024
	least, most := math.Inf(1), math.Inf(-1)
	for i := range samples {
		turn := cmplx.Exp(complex(0, 2*math.Pi*float64(i)/samples))
		v, w := 0.0, turn
		for _, a := range amplitudes {
			v += real(a * w)
			w *= turn
		}
		least, most = math.Min(least, v), math.Max(most, v)
	}
	return quantity.Voltage(most - least)
}

// Taper weighs harmonic k of a series of steps that is cut after n, which would overshoot
// them by a tenth: sin x/x with x = π k/(n + 1) (C. Lanczos, Applied Analysis, 1956,
// ch. IV, from memory).
func Taper(k, n int) float64 {
	x := math.Pi * float64(k) / float64(n+1)
	return math.Sin(x) / x
}
