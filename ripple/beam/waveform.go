package beam

import (
	"cmp"
	"math"
	"slices"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Waveform is the form of a periodic disturbance, of amplitude one: how long it
// dwells at each value between −1 and 1 about its mean.
type Waveform struct{ table *table }

// Sine dwells at its turns: probability density 1/(π√(1 − x²)) (read), rms
// 0.35355, central half 0.70711 of its peak to peak; no FWHM.
func Sine() Waveform {
	t := &table{x: make([]float64, cells+1), c: make([]float64, cells+1), variance: 0.5, full: 2}
	for i := range t.x {
		t.c[i] = float64(i) / cells
		t.x[i] = -math.Cos(math.Pi * t.c[i])
	}
	return Waveform{t}
}

// Triangle is uniform, rising and falling or as a saw-tooth: rms 0.28868, central
// half 0.5 of its peak to peak.
func Triangle() Waveform {
	return Waveform{&table{x: []float64{-1, 1}, c: []float64{0, 1}, variance: 1.0 / 3, full: 2, fwhm: 2, bounded: true}}
}

// Square is half the time at either end.
func Square() Waveform {
	return Waveform{&table{x: []float64{-1, -1, 1, 1}, c: []float64{0, 0.5, 0.5, 1}, variance: 1, full: 2}}
}

// Sampled is the wave-form through samples one period of which is evenly spaced,
// straight between them and from the last back to the first, and its amplitude,
// half the peak to peak. The mean does not matter. More voltage must mean more
// energy: a negative cathode's samples are magnitudes. A sine in 200 samples comes
// out within 1e-4.
func Sampled(samples []quantity.Voltage) (Waveform, quantity.Voltage, error) {
	if len(samples) < 2 {
		return Waveform{}, 0, lack.Range("a wave-form needs two samples at least")
	}
	low, high, mean := math.Inf(1), math.Inf(-1), 0.0
	for _, s := range samples {
		v := float64(s)
		if math.IsNaN(v) || math.IsInf(v, 0) {
			return Waveform{}, 0, lack.Failed("the wave-form holds a sample that is no number")
		}
		low, high, mean = min(low, v), max(high, v), mean+v/float64(len(samples))
	}
	amplitude := (high - low) / 2
	if amplitude <= 1e-14*math.Max(math.Abs(low), math.Abs(high)) {
		return Triangle(), 0, nil // level: any form will do
	}
	unit := make([]float64, len(samples))
	for i, s := range samples {
		unit[i] = (float64(s) - mean) / amplitude
	}
	return Waveform{sweep(unit)}, quantity.Voltage(amplitude), nil
}

// edge is where one stretch of a wave-form ends and the next begins: by how much the
// density of what counts there changes, upwards, and what dwells there.
type edge struct{ at, density, step float64 }

// level is the rise, in amplitudes, below which a stretch counts as dwelling at
// one value.
const level = 1e-7

// sweep tabulates the time a closed polygon of mean zero dwells below each value.
func sweep(samples []float64) *table {
	weight := 1 / float64(len(samples))
	edges := make([]edge, len(samples))
	variance := 0.0
	for i, a := range samples {
		next := (i + 1) % len(samples)
		b := samples[next]
		edges[i].at = a
		variance += weight * (a*a + a*b + b*b) / 3
		if math.Abs(b-a) < level {
			edges[i].step += weight
			continue
		}
		density := weight / (b - a) // below zero where it falls: from b up to a
		edges[i].density += density
		edges[next].density -= density
	}
	slices.SortFunc(edges, func(a, b edge) int { return cmp.Compare(a.at, b.at) })
	t := accumulate(edges)
	t.variance, t.full = variance, 2
	return t
}

// accumulate adds up sorted edges to a cumulative probability.
func accumulate(edges []edge) *table {
	t := &table{x: make([]float64, 0, len(edges)), c: make([]float64, 0, len(edges))}
	sum, density, at := 0.0, 0.0, edges[0].at
	for _, e := range edges {
		if e.at > at {
			sum += density * (e.at - at)
			at = e.at
		}
		if n := len(t.x); n == 0 || t.x[n-1] < at {
			t.x, t.c = append(t.x, at), append(t.c, sum)
		}
		if e.step > 0 {
			sum += e.step
			t.x, t.c = append(t.x, at), append(t.c, sum)
		}
		density += e.density
	}
	for i := range t.c {
		t.c[i] /= sum
	}
	return t
}
