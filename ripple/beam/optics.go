package beam

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Optics is the final lens as the specimen sees it.
type Optics struct {
	Chromatic   quantity.Length // coefficient Cc, referred to V*
	Spherical   quantity.Length // coefficient Cs; 0 where corrected
	Angle       quantity.Angle  // semi-angle at the specimen
	SourceImage quantity.Length // FW50
}

// widestAngle is where the third-order theory of aberrations is left.
const widestAngle quantity.Angle = 0.5

// check says where the optics leave the theory.
func (o Optics) check() error {
	switch {
	case !positive(o.Angle) || !quantity.AtMost(o.Angle, widestAngle):
		return lack.Range("third-order aberrations hold for semi-angles up to 0.5 rad, not %s", quantity.Text(o.Angle))
	case !notNegative(o.Chromatic) || !notNegative(o.Spherical) || !notNegative(o.SourceImage):
		return lack.Range("aberrations and the source image are lengths of zero or more")
	}
	return nil
}

// Factors of FW50. Both are integrals of this package's own (its tests do them),
// printed rounded to 0.18 and 0.54 by J. E. Barth and P. Kruit, Optik 101 (1996)
// 101 (from memory).
const (
	// sphericalFW50 is √2/8, in the best plane, 3/8 Cs a² before the Gaussian one.
	sphericalFW50 = math.Sqrt2 / 8
	// diffractionFW50 is that of the Airy pattern in λ/a; 0.61 λ/a is the radius of
	// its first zero, another thing.
	diffractionFW50 = 0.534832
)

// ChromaticFW50 is the disc of a distribution: Cc a κ/E times its DiscFW50.
func (o Optics) ChromaticFW50(e Particle, d Distribution) quantity.Length {
	return o.perEnergy(e) * quantity.Length(d.DiscFW50())
}

// ChromaticEdge is the diameter of the whole disc for a full width of energy, Cc a κ
// dE/E. It is an edge, not an FW50: it must not be added to those.
func (o Optics) ChromaticEdge(e Particle, fullWidth quantity.ElectronEnergy) quantity.Length {
	return o.perEnergy(e) * quantity.Length(fullWidth)
}

// perEnergy is Cc a κ/E in metres per electronvolt.
func (o Optics) perEnergy(e Particle) quantity.Length {
	return o.Chromatic * quantity.Length(float64(o.Angle)*e.Kappa()/e.energy)
}

// SphericalFW50 is 0.17678 Cs a³, in the best plane.
func (o Optics) SphericalFW50() quantity.Length {
	return o.Spherical * quantity.Length(sphericalFW50*math.Pow(float64(o.Angle), 3))
}

// DiffractionFW50 is 0.53483 λ/a.
func (o Optics) DiffractionFW50(e Particle) quantity.Length {
	return e.Wavelength() * quantity.Length(diffractionFW50/float64(o.Angle))
}

// Terms are the parts of a spot, all FW50.
type Terms struct{ SourceImage, Diffraction, Spherical, Chromatic quantity.Length }

// BarthKruit is the sum by root powers,
//
//	d² = [dI^1.3 + (dA⁴ + dS⁴)^(1.3/4)]^(2/1.3) + dC²
//
// (J. E. Barth, P. Kruit, Optik 101 (1996) 101, from memory).
func (t Terms) BarthKruit() quantity.Length {
	return quantity.Length(math.Hypot(t.geometric(), float64(t.Chromatic)))
}

// geometric is all but the chromatic term.
func (t Terms) geometric() float64 {
	wave := math.Pow(math.Pow(float64(t.Diffraction), 4)+math.Pow(float64(t.Spherical), 4), 0.25)
	return math.Pow(math.Pow(float64(t.SourceImage), 1.3)+math.Pow(wave, 1.3), 1/1.3)
}

// Quadrature is the plain sum of squares of the same terms, shown beside it.
func (t Terms) Quadrature() quantity.Length {
	return quantity.Length(math.Hypot(math.Hypot(float64(t.SourceImage), float64(t.Diffraction)),
		math.Hypot(float64(t.Spherical), float64(t.Chromatic))))
}
