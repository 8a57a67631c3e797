package shape

import (
	"math"

	"kilovet/hv/quantity"
)

// one-sided lines have their trough at the far end.
func oneSided(r, d float64, at func(x float64) float64) Line {
	return Line{gap: quantity.Length(d), radius: quantity.Length(r), trough: quantity.Length(d), at: at}
}

// plates: E = V/d.
func plates(d float64) Line { return oneSided(d, d, func(float64) float64 { return 1 / d }) }

// coaxial cylinders: E = V/(ρ ln(R/r)), least at the inner one for R/r = e.
func coaxial(r, d float64) Line {
	k := 1 / math.Log1p(d/r) // Abdel-Salam et al., High-Voltage Engineering, 2nd ed., ch. 2
	return oneSided(r, d, func(x float64) float64 { return k / (r + x) })
}

// concentric spheres: E = V r R/((R − r) ρ²), least at the inner one for R = 2r.
func concentric(r, d float64) Line {
	k := r * (r + d) / d // exact; between two spheres the field falls as 1/ρ²
	return oneSided(r, d, func(x float64) float64 { return k / ((r + x) * (r + x)) })
}

// cylinderPlane: the field of line charges at ±a, a² = h² − r², h = r + d, at the
// height y = d − x: E = 2 a V/(acosh(h/r) (a² − y²)). At the cylinder it is
// V/(r acosh(h/r)) · √((h+r)/(h−r)).
func cylinderPlane(r, d float64) Line {
	a2 := d * (d + 2*r)
	k := 2 * math.Sqrt(a2) / acosh1p(d/r) // exact: image of a line charge
	return oneSided(r, d, func(x float64) float64 {
		return k / (2*r*d + x*(2*d-x)) // a² − (d − x)²
	})
}

// roundedEdge: an edge rounded with radius r whose two faces run away from the gap.
// A full cylinder of that radius over the plane has the sharper field: an upper bound for
// an edge that runs straight. The end of a rod of few edge radii has more.
func roundedEdge(r, d float64) Line {
	l := cylinderPlane(r, d)
	l.bound = true
	return l
}

// hyperboloid of revolution with tip radius r against a plane: E = V a/((a² − z²)
// artanh η), η² = d/(d + r), a = d/η, at the height z = d − x. At the tip it is
// 2 V/(r e ln((1+e)/(1−e))) with e = η.
func hyperboloid(r, d float64) Line {
	eta := math.Sqrt(d / (d + r))
	a := d / eta
	k := a / (math.Log1p(eta) + math.Log1p(d/r)/2) // artanh η; exact: prolate spheroidal coordinates
	return oneSided(r, d, func(x float64) float64 {
		return k / (d*r + x*(2*d-x)) // a² − (d − x)², a² = d (d + r)
	})
}

// acosh1p is arcosh(1 + t), exact for small t too.
func acosh1p(t float64) float64 { return math.Log1p(t + math.Sqrt(t*(2+t))) }
