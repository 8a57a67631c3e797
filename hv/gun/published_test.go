package gun_test

import (
	"testing"

	"kilovet/hv/gun"
	"kilovet/hv/quantity"
)

// Printed: over 20 A/cm² of LaB6 at 1700 °C with 2.67 eV (paper on LaB6 cathodes, excerpt at
// the citations of IEEE Trans. Plasma Sci. 6 (1978) 191, read). Derived beside it: 17.1 with
// A = 29 and 70.8 with A = 120. The print lies between the two pairs, so neither is its own.
func TestLanthanumHexaborideAt1700C(t *testing.T) {
	of := func(constant quantity.RichardsonConstant) float64 {
		j, err := gun.Emitter{Constant: constant, WorkFunction: 2.67}.CurrentDensity(1973.15)
		if err != nil {
			t.Fatal(err)
		}
		return float64(j) / 1e4
	}
	low, high := of(29e4), of(120.17e4)
	near(t, "A = 29", low, 17.1025, 5e-3)
	near(t, "A = 120", high, 70.769, 5e-3)
	if low >= 20 || high <= 20 {
		t.Errorf("the printed 20 A/cm2 lies outside %v to %v", low, high)
	}
}

// Printed: 0.5 A/cm² as a limit of ultrafine tungsten filaments at 2600 K (abstract on a
// topic page, read), no equality. Derived: 0.768 A/cm² with 60 A/cm²K² and 4.5 eV, 0.642 with
// 4.54 eV: of its order, and never below it.
func TestTungstenAt2600K(t *testing.T) {
	for w, want := range map[quantity.ElectronEnergy]float64{4.5: 0.76808, 4.54: 0.6424952} {
		j, err := gun.Emitter{Constant: 60e4, WorkFunction: w}.CurrentDensity(2600)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "A/cm2", float64(j)/1e4, want, 1e-4)
		if ratio := float64(j) / 1e4 / 0.5; ratio < 1 || ratio > 2 {
			t.Errorf("%v of the printed limit is another order", ratio)
		}
	}
}

// The smaller of the two printed lowerings is rounded down by a fifth as well (Portland State
// University, read): 30 meV at 1e4 V/cm where the law has 37.9.
func TestSchottkyLoweringAsPrinted(t *testing.T) {
	near(t, "1 MV/m", float64(gun.SchottkyLowering(1e6)), 30e-3, 0.27)
	if float64(gun.SchottkyLowering(1e6)) < 30e-3 {
		t.Error("the print is rounded down, not up")
	}
}
