package beam

import (
	"math"
	"testing"

	"kilovet/hv/quantity"
)

// A course text (Czech Academy of Sciences, 1.3, read) prints the wavelengths of scanning
// microscopes without relativity: kV, printed pm, both laws derived. Ours must leave the
// print by what relativity makes, and where it makes little, agree.
func TestWavelengthsPrintedWithoutRelativity(t *testing.T) {
	for _, row := range []struct{ kV, printed, without, with float64 }{
		{0.15, 100.15, 100.1373, 100.1299}, {0.25, 77.58, 77.56599, 77.5565}, {0.5, 54.86, 54.84744, 54.83402},
		{1, 38.79, 38.78299, 38.76403}, {5, 17.35, 17.34428, 17.30201}, {10, 12.27, 12.26426, 12.2047},
		{15, 10.02, 10.01373, 9.941039}, {25, 7.76, 7.756599, 7.663434}, {30, 7.08, 7.080774, 6.979082},
	} {
		ours := float64(at(t, row.kV).Wavelength()) * 1e12
		near(t, "relativistic", ours, row.with, 1e-6)
		near(t, "the print is without", row.printed, row.without, 7e-4)
		near(t, "apart by half the voltage over the rest energy", row.without/ours, 1+row.kV*1e3/restEnergy/4, 2e-4)
	}
}

// Rays of a lens with spherical aberration alone (A. B. and J. C. J. El-Kareh 1970, read): at
// least confusion the disc is a quarter of that in the Gaussian plane, three quarters of the
// way to the focus of the outermost rays. Found by search among planes, not by the formula.
func TestDiscOfLeastConfusion(t *testing.T) {
	widest := func(w float64) float64 {
		most := 0.0
		for i := range 4001 {
			rho := float64(i) / 4000
			most = math.Max(most, math.Abs(rho*rho*rho-w*rho))
		}
		return most
	}
	best := least(0, 1, widest)
	near(t, "distance, of the longitudinal aberration", best, 0.75, 1e-3)
	near(t, "radius, of that in the Gaussian plane", widest(best)/widest(0), 0.25, 2e-3)
}

// The shortest interval that holds half of a hot cathode's electrons is 1.4824 kT (derived):
// shorter than the central half, 1.7314 kT, which is what FW50 names here.
func TestShortestHalfIsNotTheCentralHalf(t *testing.T) {
	within := func(x float64) float64 { return -math.Expm1(math.Log1p(x) - x) } // of x exp(−x)
	shortest := least(0, 1, func(from float64) float64 {
		low, high := from, 32.0
		for range 60 {
			if middle := (low + high) / 2; within(middle)-within(from) < 0.5 {
				low = middle
			} else {
				high = middle
			}
		}
		return low - from
	})
	low, high := shortest, 32.0
	for range 60 {
		if middle := (low + high) / 2; within(middle)-within(shortest) < 0.5 {
			low = middle
		} else {
			high = middle
		}
	}
	near(t, "shortest half", low-shortest, 1.482399, 1e-5)
	d, err := Thermionic(1 / quantity.Temperature(8.617333262e-5))
	if err != nil {
		t.Fatal(err)
	}
	if got := float64(d.FW50()); math.Abs(got/1.482399-1) < 0.1 {
		t.Errorf("%v is the shortest half", got)
	}
}
