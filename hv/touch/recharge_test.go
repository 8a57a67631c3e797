package touch_test

import (
	"strings"
	"testing"

	"kilovet/hv/quantity"
	"kilovet/hv/touch"
)

// 30 kV on 10 nF, 0.1, 1 and 2.5 % absorbed (derived): 30, 300, 750 V and 7.5 µC, 2.8 mJ.
func TestRecharge(t *testing.T) {
	for dielectric, volts := range map[string]quantity.Voltage{"PP film": 30, "PEN film": 300, "x7r": 750, "Y5U": 750, "NP0": 180, "C0G": 180, "film": 600} {
		a, err := touch.FindAbsorption(dielectric)
		if err != nil {
			t.Fatal(err)
		}
		back, err := a.Recharge(10e-9, 30e3)
		if err != nil {
			t.Fatal(err)
		}
		near(t, dielectric, back.Voltage, volts, 1e-12)
		if volts == 750 {
			near(t, "charge", back.Charge, 7.5e-6, 1e-12)
			near(t, "energy", back.Energy, 2.8125e-3, 1e-12)
		}
		if !(a.Least > 0 && a.Least <= a.Most) || a.Source == "" || (a.Mark == "derived") != (dielectric == "Y5U") {
			t.Errorf("%+v", a)
		}
		_, err = a.Recharge(-1, 30e3)
		lacking(t, "capacitance below zero", err)
	}
}

func TestNoAbsorptionIsMadeUp(t *testing.T) {
	for _, dielectric := range []string{"mica", "glass", "oiled paper", ""} {
		_, err := touch.FindAbsorption(dielectric)
		lacking(t, dielectric, err)
		if err == nil || !strings.Contains(err.Error(), "X7R") {
			t.Errorf("%q: the known ones must be named: %v", dielectric, err)
		}
	}
}
