package phasor

import (
	"math"
	"slices"

	"gonum.org/v1/gonum/dsp/fourier"

	"kilovet/hv/quantity"
)

// PeakToPeak is the swing of a sum of harmonics of one fundamental, given by their complex
// amplitudes, the k-th at index k−1. It is sampled at 1024 instants of the period, which
// misses of the crest of the n-th harmonic at most a part (π n/1024)²/2: 1 % for n = 48. There
// are fewer than 512.
func PeakToPeak(amplitudes []complex128) quantity.Voltage {
	const samples = 1024
	if len(amplitudes) >= samples/2 {
		panic("phasor: too many harmonics to sample")
	}
	spectrum := make([]complex128, samples/2+1)
	copy(spectrum[1:], amplitudes)
	v := fourier.NewFFT(samples).Sequence(nil, spectrum) // of both halves of the spectrum: doubled
	return quantity.Voltage(slices.Max(v)-slices.Min(v)) / 2
}

// Taper weighs harmonic k of a series of steps that is cut after n, which would overshoot
// them by a tenth: sin x/x with x = π k/(n + 1) (C. Lanczos, Applied Analysis, 1956,
// ch. IV, from memory).
func Taper(k, n int) float64 {
	x := math.Pi * float64(k) / float64(n+1)
	return math.Sin(x) / x
}
