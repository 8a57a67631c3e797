package touch_test

import (
	"math"
	"testing"

	"kilovet/hv/quantity"
	"kilovet/hv/touch"
)

// 4.4 µF at 80 V (note on IEC 61010-1 6.10.3 and 6.3.1, product-safety list, 2013, read):
// 352 µC against 45 µC, which fails; the line of permissible capacitance says the same.
func TestChargeThatFails(t *testing.T) {
	if q := touch.Charge(4.4e-6, 80); !(q > 45e-6) {
		t.Errorf("%v meets 45 µC", q)
	}
	c, err := touch.PermissibleCapacitance(80)
	if err != nil || !(4.4e-6 > c) {
		t.Errorf("4.4 µF at 80 V lies within %v (%v)", c, err)
	}
	near(t, "just met by", touch.Charge(c, 80), 45e-6, 1e-9)
}

// The two rules of IEC 60335-1 8.1.4 (read) meet at 15 kV within 4 %: 45 µC there are 337.5
// mJ against 350 mJ, 3.000 nF against 3.111 nF. A capacitor bank of 20 nF at 20 kV (account
// on an instrument list, read: 4 J) is 11 times over the line.
func TestWhereTheTwoRulesMeet(t *testing.T) {
	c, err := touch.CapacitanceOf(45e-6, 15e3)
	if err != nil {
		t.Fatal(err)
	}
	energy := touch.Energy(c, 15e3)
	near(t, "energy of 45 µC", energy, 337.5e-3, 1e-9)
	if apart := math.Abs(float64(energy)/0.350 - 1); apart > 0.04 || apart < 0.03 {
		t.Errorf("the rules are %v apart", apart)
	}
	line, err := touch.PermissibleCapacitance(20e3)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "20 nF at 20 kV over the line", 20e-9/line, 11.43, 1e-3)
}

// An isolated sphere of 10 cm (hobby page of J. Lux, read: about 10 pF) has 4π ε0 r = 11.13
// pF; at 100 kV 56 mJ.
func TestBareTerminal(t *testing.T) {
	c := quantity.Capacitance(4 * math.Pi * 8.8541878128e-12 * 0.1)
	near(t, "capacitance", c, 11.13e-12, 1e-3)
	near(t, "printed", c, 10e-12, 0.12)
	near(t, "energy at 100 kV", touch.Energy(c, 100e3), 56e-3, 1e-2)
}

// Corners of the zones from memory of IEC 60479-1: each corner still belongs to the zone
// below it, and what is no current has none.
func TestZonesOfDirectCurrent(t *testing.T) {
	for i, want := range map[quantity.Current]string{0: "DC-1", 2e-3: "DC-1", 2.1e-3: "DC-2", 25e-3: "DC-2", 26e-3: "DC-3", 0.15: "DC-3", 0.16: "DC-4", 10: "DC-4"} {
		if got := touch.ZoneOfDC(i); got[:4] != want {
			t.Errorf("%v A: %s, want %s", i, got, want)
		}
	}
	if touch.ZoneOfDC(quantity.Current(math.NaN())) != "not known" || touch.ZoneOfDC(-1) != "not known" {
		t.Error("no current, no zone")
	}
}
