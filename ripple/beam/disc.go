package beam

import (
	"math"

	"kilovet/hv/quantity"
)

// DiscFW50 is the energy that, times Cc a κ/E, is the diameter of the chromatic
// disc that holds half the current, in the focal plane of the mean energy.
//
// A ray at the part ρ of the semi-angle with energy δ off the mean meets that
// plane Cc a ρ κ|δ|/E from the axis; the angles are evenly filled, so that ρ² is
// uniform. The diameter is twice the median of ρ|δ|, found from
//
//	P(ρ|δ| ≤ r) = ∫ min(1, r²/δ²) dC(δ) = 1/2.
//
// For a Gaussian this is 0.3442 of the FWHM, for a sine 0.4040 of its peak to
// peak (J. E. Barth, P. Kruit, Optik 101 (1996) 101 print 0.34, from memory).
func (d Distribution) DiscFW50() quantity.ElectronEnergy {
	return d.discAbout(0)
}

// BestFocus is the energy off the mean on which the disc is smallest, and its
// DiscFW50 there. For a distribution alike to both sides that is the mean itself;
// a hot cathode's lies lower.
func (d Distribution) BestFocus() (offset, disc quantity.ElectronEnergy) {
	if d.narrow() {
		return 0, 0
	}
	reach := math.Sqrt(d.table.variance)
	x := least(-reach, reach, func(x float64) float64 { return float64(d.discAbout(x)) })
	return quantity.ElectronEnergy(x * d.unit), d.discAbout(x)
}

// discAbout is DiscFW50 in the focal plane of an energy, in units of the table.
func (d Distribution) discAbout(focus float64) quantity.ElectronEnergy {
	if d.narrow() {
		return 0
	}
	return quantity.ElectronEnergy(2 * d.unit * d.table.medianRadius(focus))
}

// medianRadius solves for r by Newton steps inside a narrowing bracket.
func (t *table) medianRadius(focus float64) float64 {
	low, high := 0.0, math.Max(math.Abs(t.x[0]-focus), math.Abs(t.x[len(t.x)-1]-focus))
	r := min(math.Sqrt(t.variance)/2, high)
	for range 100 {
		within, slope := t.encircled(r, focus)
		if within > 0.5 {
			high = r
		} else {
			low = r
		}
		next := r - (within-0.5)/slope
		if !(next >= low && next <= high) {
			next = (low + high) / 2
		}
		if math.Abs(next-r) <= 1e-13*r {
			return next
		}
		r = next
	}
	return r
}

// encircled is P(ρ|δ| ≤ r) and its slope in r, 2r ∫ dC/δ² over |δ| > r.
func (t *table) encircled(r, focus float64) (within, slope float64) {
	inverse := 0.0 // ∫ dC/δ² beyond r
	for i := 1; i < len(t.x); i++ {
		a, b, p := t.x[i-1]-focus, t.x[i]-focus, t.c[i]-t.c[i-1]
		switch {
		case a >= r || b <= -r:
			inverse += p / (a * b)
		case a >= -r && b <= r:
			within += p
		default: // the circle's edge lies in the cell
			density := p / (b - a)
			within += density * (min(b, r) - max(a, -r))
			if b > r {
				inverse += density * (1/r - 1/b)
			}
			if a < -r {
				inverse += density * (1/r + 1/a)
			}
		}
	}
	return within + r*r*inverse, 2 * r * inverse
}

// least is where a function with one minimum is least, by golden section.
func least(low, high float64, f func(float64) float64) float64 {
	const golden = 0.6180339887498949
	a, b := high-golden*(high-low), low+golden*(high-low)
	fa, fb := f(a), f(b)
	for range 45 { // the bracket shrinks to 4e-10 of itself
		if fa < fb {
			high, b, fb = b, a, fa
			a = high - golden*(high-low)
			fa = f(a)
		} else {
			low, a, fa = a, b, fb
			b = low + golden*(high-low)
			fb = f(b)
		}
	}
	return (low + high) / 2
}
