package beam

import (
	"math"
	"testing"

	"kilovet/hv/gun"
)

// Derived: Cc 2 mm, 1 ppm at 100 kV: 2.178 nm, 2 nm without κ.
func TestFocusShift(t *testing.T) {
	o := Optics{Chromatic: 2e-3, Angle: 5e-3}
	near(t, "100 kV", float64(o.FocusShift(at(t, 100), 0.1)), 2.178253e-9, 1e-6)
	// A disc of radius a df, half of it within 1/√2.
	df := o.FocusShift(at(t, 100), 0.1)
	near(t, "defocus", float64(o.DefocusFW50(at(t, 100), Line{Amplitude: 0.1, Form: Sine()})), 2*5e-3*float64(df)/math.Sqrt2, 1e-9)
}

// Derived: factors of deflection, and the edge of a 500 µm field at 100 kV for 1e-5.
func TestScanEdge(t *testing.T) {
	for kV, want := range map[float64]float64{1: 0.9990, 20: 0.9815, 100: 0.9255, 200: 0.8824, 300: 0.8570} {
		near(t, "electrostatic", Electrostatic.Sensitivity(at(t, kV)), want, 1e-4)
	}
	near(t, "magnetic", Magnetic.Sensitivity(at(t, 100)), 0.5445656, 5e-6)
	near(t, "magnetic edge", float64(Magnetic.EdgeShift(at(t, 100), 500e-6, 1)), 1.361408e-9, 5e-6)
	near(t, "electrostatic edge", float64(Electrostatic.EdgeShift(at(t, 100), 500e-6, 1)), 2.313651e-9, 5e-6)
	// Slopes of the laws themselves: x ~ 1/p and x ~ 1/(pv).
	up, down := at(t, 100.01), at(t, 99.99)
	p := func(e Particle) float64 { return e.Gamma() * e.Beta() }
	near(t, "1/p", math.Log(p(up)/p(down))/math.Log(100.01/99.99), Magnetic.Sensitivity(at(t, 100)), 1e-6)
	near(t, "1/pv", math.Log(p(up)*up.Beta()/p(down)/down.Beta())/math.Log(100.01/99.99), Electrostatic.Sensitivity(at(t, 100)), 1e-6)
}

// Derived: Cc 1.2 mm, 0.7 eV FWHM, 0.2 V rms, 1 ppm of lens current at 200 kV. κ on
// the energy terms alone; the figure without κ and the 1/e width are traps.
func TestFocalSpread(t *testing.T) {
	o, e := Optics{Chromatic: 1.2e-3}, at(t, 200)
	source, err := GaussianFWHM(0.7)
	if err != nil {
		t.Fatal(err)
	}
	got := float64(o.FocalSpread(e, source.RMS(), 0.2, 1e-6))
	near(t, "standard deviation", got, 3.466638e-9, 2e-4)
	near(t, "1/e half-width", got*math.Sqrt2, 4.902567e-9, 2e-4)
	if math.Abs(got/3.221978e-9-1) < 0.05 {
		t.Error("κ must not be left out")
	}
	lens := float64(o.FocalSpread(e, 0, 0, 1e-6))
	near(t, "κ does not touch the lens current", lens, 1.2e-3*2e-6, 1e-12)
}

func TestImageRotation(t *testing.T) {
	near(t, "1000 A at 100 kV (derived)", float64(ImageRotation(at(t, 100), 1000)), 0.5623472, 1e-5)
	up, down := at(t, 100*(1+5e-6)), at(t, 100*(1-5e-6))
	near(t, "turn for 1e-5", float64(ImageRotation(up, 1000)-ImageRotation(down, 1000)), -3.062337e-6, 1e-4)
}

// Derived: 1.6 A/cm² at 2700 K: 2.403e5 A/cm² sr at 100 kV, 4.464e4 at 20 kV.
func TestLangmuirBrightness(t *testing.T) {
	near(t, "100 kV", float64(LangmuirBrightness(at(t, 100), 1.6e4, 2700))/1e4, 240312, 2e-5)
	near(t, "20 kV", float64(LangmuirBrightness(at(t, 20), 1.6e4, 2700))/1e4, 44635.5, 2e-5)
	j, err := gun.Tungsten().CurrentDensity(2700)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "in proportion to the density", float64(LangmuirBrightness(at(t, 20), j, 2700)/LangmuirBrightness(at(t, 20), 1.6e4, 2700)), float64(j)/1.6e4, 1e-12)
}
