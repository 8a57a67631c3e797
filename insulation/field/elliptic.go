package field

import "math"

// ringIntegrals are integrals over the angle θ between two coaxial rings of radii r
// and s, apart by dr = r − s and dz, with R the distance of two of their points:
//
//	i = ∫ dθ/R,  j = ∫ dθ/R³,  h = ∫ (1 − cos θ) dθ/R³,  0 ≤ θ ≤ 2π.
//
// They are complete elliptic integrals of the parameter m = 4 r s/ρ², with ρ the
// longest distance and δ the shortest: i = 4 K/ρ, j = 4 E/(ρ δ²), and, since
// R² = δ² + 2 r s (1 − cos θ), h = (i − δ² j)/(2 r s) (Durand, Électrostatique I,
// 1964, ch. III, from memory; rederived). K and K − E come from the
// arithmetic-geometric mean (Abramowitz, Stegun 17.6), so that nothing cancels,
// neither near the axis nor near the ring. Rounding: a few 1e-16 of each.
func ringIntegrals(r, s, dr, dz float64) (i, j, h float64) {
	sum := r + s
	long, short := sum*sum+dz*dz, dr*dr+dz*dz
	m := 4 * r * s / long
	kc := math.Sqrt(short / long)
	a, b := (1+kc)/2, math.Sqrt(kc)
	c := m / (4 * a) // c₁ = (1 − k')/2
	t, weight := c*c, 1.0
	for c > 1e-8*a && weight < 1e6 { // c₁² + 2 c₂² + 4 c₃² …; without end only at δ = 0
		next := (a + b) / 2
		b = math.Sqrt(a * b)
		a = next
		c = c * c / (4 * a)
		weight *= 2
		t += weight * c * c
	}
	i = 2 * math.Pi / (a * math.Sqrt(long))
	j = i * (1 - m/2 - t) / short
	h = i / long
	if m > 0 {
		h *= 1 + 2*t/m
	}
	return i, j, h
}
