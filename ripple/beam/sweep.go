package beam

import (
	"math"

	"kilovet/hv/quantity"
)

// AtAngle is the terms of the spot at another semi-angle, energies and source image as
// they are.
func (s Spot) AtAngle(a quantity.Angle) Terms {
	o := s.Optics
	o.Angle = a
	return Terms{o.SourceImage, o.DiffractionFW50(s.Particle), o.SphericalFW50(), o.ChromaticFW50(s.Particle, s.Energies)}
}

// Angles are so many semi-angles, evenly spaced by ratio, around those that matter: from
// a fifth of the smallest to five times the largest, within third-order theory.
func Angles(count int, around ...quantity.Angle) []quantity.Angle {
	low, high := math.Inf(1), 0.0
	for _, a := range around {
		low, high = math.Min(low, float64(a)), math.Max(high, float64(a))
	}
	low, high = low/5, math.Min(high*5, float64(widestAngle))
	all := make([]quantity.Angle, count)
	for i := range all {
		all[i] = quantity.Angle(low * math.Pow(high/low, float64(i)/float64(count-1)))
	}
	return all
}

// Density is the share of particles per electronvolt at an energy off the mean.
type Density struct {
	Energy quantity.ElectronEnergy
	Share  float64 // per electronvolt
}

// Densities are the density over so many equal steps of energy, a mean over each, as far
// as all but a thousandth at either end reach; nothing for a distribution without width.
func (d Distribution) Densities(steps int) []Density {
	if d.narrow() || steps < 1 {
		return nil
	}
	low, high := d.table.below(0.001), d.table.above(0.999)
	if !(high > low) {
		return nil
	}
	width := (high - low) / float64(steps)
	all := make([]Density, steps)
	for i := range all {
		a := low + float64(i)*width
		share := d.table.upTo(a+width) - d.table.upTo(a)
		all[i] = Density{quantity.ElectronEnergy((a + width/2) * d.unit), share / (width * d.unit)}
	}
	return all
}

// upTo is the cumulative probability at x.
func (t *table) upTo(x float64) float64 {
	low, high := 0, len(t.x)-1
	if x <= t.x[low] {
		return 0
	}
	if x >= t.x[high] {
		return 1
	}
	for high-low > 1 {
		if middle := (low + high) / 2; t.x[middle] <= x {
			low = middle
		} else {
			high = middle
		}
	}
	if t.x[high] == t.x[low] {
		return t.c[low]
	}
	return t.c[low] + (t.c[high]-t.c[low])*(x-t.x[low])/(t.x[high]-t.x[low])
}
