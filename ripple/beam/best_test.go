package beam

import (
	"math"
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Without source image and colour d⁴ = dA⁴ + dS⁴ is least where dA⁴ = 3 dS⁴.
func TestBestAngleInClosedForm(t *testing.T) {
	e := at(t, 100)
	s, err := Compute(e, Optics{Spherical: 1e-3, Angle: 5e-3}, Distribution{}, Disturbance{})
	if err != nil {
		t.Fatal(err)
	}
	best, err := s.BestAngle()
	if err != nil {
		t.Fatal(err)
	}
	want := math.Pow(diffractionFW50/sphericalFW50*float64(e.Wavelength())/1e-3/math.Pow(3, 0.25), 0.25)
	near(t, "angle", float64(best.Angle), want, 1e-6)
	s, _ = Compute(e, Optics{Spherical: 1e-3, Angle: best.Angle}, Distribution{}, Disturbance{})
	near(t, "spot", float64(best.TotalFW50), float64(s.TotalFW50), 1e-12)
}

// No angle beside the best one gives a smaller spot, and ripple makes it smaller.
func TestBestAngleIsBest(t *testing.T) {
	e, o, source, d := reviewed(t)
	s, _ := Compute(e, o, source, d)
	best, err := s.BestAngle()
	if err != nil {
		t.Fatal(err)
	}
	for _, k := range []float64{0.1, 0.5, 0.9, 0.99, 1.01, 1.1, 2, 10} {
		o.Angle = best.Angle * quantity.Angle(k)
		if other, _ := Compute(e, o, source, d); other.TotalFW50 < best.TotalFW50 {
			t.Errorf("%v of the best angle is better: %v < %v", k, other.TotalFW50, best.TotalFW50)
		}
	}
	quiet, err := s.BestAngleWithoutRipple()
	if err != nil {
		t.Fatal(err)
	}
	if !(quiet.Angle > best.Angle && quiet.TotalFW50 < best.TotalFW50) {
		t.Errorf("with ripple %+v, without %+v", best, quiet)
	}
}

func TestBestAngleOfAPerfectLens(t *testing.T) {
	s, _ := Compute(at(t, 20), Optics{Angle: 5e-3}, gaussian(t, 1), Disturbance{})
	_, err := s.BestAngle()
	lacking(t, "nothing rises with the angle", err, lack.Outside)
}

// The published coefficients of best angles belong to other definitions of d, each
// reached by the same minimiser: diameters 1.22 λ/a and 0.5 Cs a³ in quadrature give
// 1.29 (Cs λ³)^¼ (J. Goldstein et al., from memory), 0.61 and 0.5 give 0.769, radii
// 0.61 λ/a and Cs a³ 0.91 at 0.77 (λ/Cs)^¼ (Williams and Carter, from memory).
func TestPublishedBestAngles(t *testing.T) {
	for _, c := range []struct{ diffraction, spherical, angle, d float64 }{
		{1.22, 0.5, 1.08945, 1.29307},
		{0.61, 0.5, 0.9161, 0.7689},
		{0.61, 1, 0.770, 0.914},
	} {
		d := func(x float64) float64 {
			a := math.Exp(x)
			return math.Hypot(c.diffraction/a, c.spherical*a*a*a)
		}
		x := least(-5, 5, d)
		near(t, "angle", math.Exp(x), c.angle, 6e-4)
		near(t, "d", d(x), c.d, 6e-4)
	}
	near(t, "Goldstein, printed", 1.29307, 1.29, 3e-3)
}

// Derived: 1 kV, Cc 2 mm, 0.7 eV: 0.61 λ/a against the whole chromatic disc is least
// at 4.108 mrad, 8.141 nm.
func TestChromaticBestAngle(t *testing.T) {
	e := at(t, 1)
	d := func(x float64) float64 {
		o := Optics{Chromatic: 2e-3, Angle: quantity.Angle(math.Exp(x))}
		return math.Hypot(0.61*float64(e.Wavelength())/math.Exp(x), float64(o.ChromaticEdge(e, 0.7)))
	}
	x := least(-10, 0, d)
	near(t, "angle", math.Exp(x), 4.107743e-3, 1e-6)
	near(t, "d", d(x), 8.140865e-9, 1e-6)
}
