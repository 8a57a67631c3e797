package beam

import (
	"fmt"
	"math"
	"sort"
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Derived: Cc 10 mm, 5 mrad, 20 kV. 2 eV of full width make a whole disc of 5.096
// nm; as FWHM of a Gaussian an FW50 of 1.754 nm; 2 V peak to peak of a sine one of
// 2.059 nm, which the variance rule puts at 1.460 nm.
func TestChromaticDisc(t *testing.T) {
	o, e := Optics{Chromatic: 10e-3, Angle: 5e-3}, at(t, 20)
	near(t, "edge", float64(o.ChromaticEdge(e, 2)), 5.095969e-9, 1e-6)
	near(t, "edge, κ left out", float64(o.ChromaticEdge(e, 2))/e.Kappa(), 5e-9, 1e-9)
	source, err := GaussianFWHM(2)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "FW50 of a Gaussian", float64(o.ChromaticFW50(e, source)), 1.7539e-9, 3e-5)
	sine := Line{Amplitude: 1, Form: Sine()}
	ripple := o.ChromaticFW50(e, sine.Distribution())
	near(t, "FW50 of a sine", float64(ripple), 2.058633e-9, 3e-6)
	if math.Abs(float64(ripple)/1.460217e-9-1) < 0.2 {
		t.Error("the variance rule is 29 % low and must not come out")
	}
}

// Spherical aberration by rays: a ray at the part ρ of the angle meets a plane w
// before the Gaussian one at ρ³ − wρ (in Cs a³, w in Cs a²), ρ² uniform.
func medianOfRays(w float64) float64 {
	const rays = 20000
	r := make([]float64, rays)
	for i := range r {
		rho := math.Sqrt((float64(i) + 0.5) / rays)
		r[i] = math.Abs(rho*rho*rho - w*rho)
	}
	sort.Float64s(r)
	return 2 * r[rays/2]
}

// The printed factors are 0.18 and 0.54 (J. E. Barth, P. Kruit 1996, from memory),
// ours the integrals themselves.
func TestFactorsOfFW50(t *testing.T) {
	w := least(0, 1, medianOfRays)
	near(t, "best plane", w, 0.375, 1e-3)
	near(t, "spherical", medianOfRays(w), sphericalFW50, 1e-4)
	near(t, "spherical, printed", sphericalFW50, 0.18, 0.02)
	near(t, "in the Gaussian plane", medianOfRays(0), 0.7071068, 1e-4)
	// The Airy pattern holds 1 − J0² − J1² within v = 2π r a/λ.
	low, high := 0.0, 3.0
	for range 60 {
		v := (low + high) / 2
		if j0, j1 := math.J0(v), math.J1(v); 1-j0*j0-j1*j1 < 0.5 {
			low = v
		} else {
			high = v
		}
	}
	near(t, "diffraction", low/math.Pi, diffractionFW50, 2e-6)
	near(t, "diffraction, printed", diffractionFW50, 0.54, 0.01)
}

// Edges and radii in print are other things than FW50 and must not come out: 0.5 Cs
// a³ is the diameter of least confusion (El-Kareh 1970, read), 2 Cs a³ that in the
// Gaussian plane, 0.61 λ/a a radius.
func TestEdgesAreNotFW50(t *testing.T) {
	o, e := Optics{Spherical: 1e-3, Angle: 10e-3}, at(t, 100)
	spherical := float64(o.SphericalFW50()) / (1e-3 * 1e-6)
	near(t, "spherical", spherical, 0.17678, 1e-4)
	diffraction := float64(o.DiffractionFW50(e)) * 10e-3 / float64(e.Wavelength())
	near(t, "diffraction", diffraction, 0.53483, 1e-5)
	for _, wrong := range []float64{0.5, 2, 0.25} {
		if math.Abs(spherical/wrong-1) < 0.2 {
			t.Errorf("%v is an edge or a radius", wrong)
		}
	}
	for _, wrong := range []float64{0.61, 1.22} {
		if math.Abs(diffraction/wrong-1) < 0.1 {
			t.Errorf("%v is the first zero", wrong)
		}
	}
}

func TestSums(t *testing.T) {
	for _, c := range []struct {
		terms Terms
		want  float64
	}{
		{Terms{}, 0},
		{Terms{SourceImage: 3}, 3},
		{Terms{Diffraction: 3}, 3},
		{Terms{Spherical: 3, Chromatic: 4}, 5},
		{Terms{Diffraction: 1, Spherical: 1}, math.Pow(2, 0.25)},
		{Terms{SourceImage: 1, Diffraction: 1}, math.Pow(2, 1/1.3)},
		{Terms{SourceImage: 2, Diffraction: 1, Spherical: 1, Chromatic: 3}, math.Sqrt(math.Pow(math.Pow(2, 1.3)+math.Pow(2, 1.3/4), 2/1.3) + 9)},
	} {
		near(t, fmt.Sprint(c.terms), float64(c.terms.BarthKruit()), c.want, 1e-12)
	}
	near(t, "plain", float64(Terms{1, 2, 4, 10}.Quadrature()), 11, 1e-12)
	// The root-power sum lies now above, now below the plain one.
	image, wave := Terms{SourceImage: 1, Diffraction: 1}, Terms{Diffraction: 1, Spherical: 1}
	if !(image.BarthKruit() > image.Quadrature() && wave.BarthKruit() < wave.Quadrature()) {
		t.Error("the two sums must cross")
	}
}

func TestOpticsFailClosed(t *testing.T) {
	e := at(t, 20)
	for what, o := range map[string]Optics{
		"no angle":   {Chromatic: 1e-3},
		"wide angle": {Chromatic: 1e-3, Angle: 0.6},
		"negative":   {Chromatic: -1e-3, Angle: 1e-3},
		"no number":  {Chromatic: 1e-3, Angle: 1e-3, SourceImage: quantity.Length(math.NaN())},
	} {
		_, err := Compute(e, o, Distribution{}, Disturbance{})
		lacking(t, what, err, lack.Outside)
	}
}
