package beam

import (
	"math"

	"gonum.org/v1/gonum/dsp/fourier"
)

// resolution is how many grid steps make one standard deviation of a convolution,
// mostSteps how many it may have in all.
const (
	resolution = 150
	mostSteps  = 1 << 16
)

// Convolve is the distribution of the sum of independent energies. Variances add
// exactly; the widths it gives are within 1e-4 (measured against mixtures summed
// point by point).
func Convolve(parts ...Distribution) Distribution {
	var wide []Distribution
	for _, d := range parts {
		if !d.narrow() {
			wide = append(wide, d)
		}
	}
	switch len(wide) {
	case 0:
		return Distribution{}
	case 1:
		return wide[0]
	}
	variance, span, full, bounded := 0.0, 0.0, 0.0, false
	for _, d := range wide {
		variance += d.variance()
		span += d.unit * (d.table.x[len(d.table.x)-1] - d.table.x[0])
		full += d.unit * d.table.full
		bounded = bounded || d.table.bounded
	}
	step := max(math.Sqrt(variance)/resolution, span/mostSteps)
	t := gather(product(wide, step))
	t.settle(variance / step / step)
	t.full, t.bounded = full/step, bounded
	return Distribution{t, step}
}

// grid is probability at whole multiples of a step, from the first on.
type grid struct {
	first int
	mass  []float64
}

// product convolves on a common grid by way of the spectra.
func product(parts []Distribution, step float64) grid {
	grids := make([]grid, len(parts))
	sum, size := grid{}, 1
	for i, d := range parts {
		grids[i] = d.onGrid(step)
		sum.first += grids[i].first
		size += len(grids[i].mass) - 1
	}
	fft := fourier.NewFFT(convenient(size))
	padded := make([]float64, fft.Len())
	spectrum := make([]complex128, fft.Len()/2+1)
	other := make([]complex128, fft.Len()/2+1)
	for i, g := range grids {
		clear(padded[copy(padded, g.mass):])
		if i == 0 {
			fft.Coefficients(spectrum, padded)
			continue
		}
		for k, c := range fft.Coefficients(other, padded) {
			spectrum[k] *= c
		}
	}
	sum.mass = fft.Sequence(padded, spectrum)[:size]
	for i := range sum.mass {
		sum.mass[i] /= float64(fft.Len())
	}
	return sum
}

// convenient is the least length of at least n with the factors 2 and 3 alone.
func convenient(n int) int {
	size := 1
	for size < n {
		size *= 2
	}
	for _, fewer := range []int{size / 4 * 3, size / 16 * 9, size / 32 * 27} {
		if fewer >= n && fewer < size {
			size = fewer
		}
	}
	return size
}

// onGrid shares each energy between the two nearest multiples of the step, in the
// inverse ratio of its distances to them, so that the mean stays.
func (d Distribution) onGrid(step float64) grid {
	t, unit := d.table, d.unit/step
	last := len(t.x) - 1
	first := int(math.Floor(t.x[0] * unit))
	g := grid{first, make([]float64, int(math.Floor(t.x[last]*unit))-first+2)}
	b := t.x[0]*unit - float64(first)
	for i := 1; i <= last; i++ {
		a, p := b, t.c[i]-t.c[i-1]
		b = t.x[i]*unit - float64(first)
		if p > 0 {
			g.share(a, b, p)
		}
	}
	return g
}

// share spreads probability evenly from a to b, in steps from the first node.
func (g grid) share(a, b, p float64) {
	k := int(a)
	for rest := b - a; float64(k+1) < b; k++ {
		end := float64(k + 1)
		part := p * (end - a) / rest
		g.at(k, (a+end)/2, part)
		p, a, rest = p-part, end, b-end
	}
	g.at(k, (a+b)/2, p)
}

// at puts probability at x between the nodes k and k + 1.
func (g grid) at(k int, x, p float64) {
	right := p * (x - float64(k))
	g.mass[k] += p - right
	g.mass[k+1] += right
}

// gather makes a table of a grid, each node's mass spread evenly over its cell.
func gather(g grid) *table {
	n := len(g.mass)
	t := &table{x: make([]float64, n+1), c: make([]float64, n+1)}
	for k, m := range g.mass {
		t.x[k] = float64(g.first+k) - 0.5
		t.c[k+1] = t.c[k] + max(m, 0)
	}
	t.x[n] = float64(g.first+n) - 0.5
	whole := t.c[n]
	for k := range t.c {
		t.c[k] /= whole
	}
	return t
}

// settle brings mean and variance to what they must be: sharing between nodes and
// spreading over cells have widened the distribution by some thousandths of a step.
func (t *table) settle(variance float64) {
	mean, square := 0.0, 0.0
	for i := 1; i < len(t.x); i++ {
		a, b, p := t.x[i-1], t.x[i], t.c[i]-t.c[i-1]
		mean += p * (a + b) / 2
		square += p * (a*a + a*b + b*b) / 3
	}
	narrower := math.Sqrt(variance / (square - mean*mean))
	for i := range t.x {
		t.x[i] = (t.x[i] - mean) * narrower
	}
	t.variance = variance
}
