package touch_test

import (
	"fmt"
	"math"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/quantity"
	"kilovet/hv/touch"
)

// 1 µF at 10 kV through 1000 ohm: M. Mitolo, Electrical Safety of Low-Voltage Systems
// p. 221 prints 50 J, 10 A, 3 ms, 4000 mA and 0.048 A²s, the last two rounded.
func ExampleThrough() {
	s, _ := touch.Through(1e-6, 10e3, touch.Design().Resistance)
	fmt.Println(quantity.Text(s.Energy), quantity.Text(s.Peak), quantity.Text(s.Duration), quantity.Text(s.RMS), float64(s.SquareTime), "A²s")
	// Output: 50 J 10 A 3 ms 4.082 A 0.05 A²s
}

func TestShockAsPrinted(t *testing.T) {
	s, err := touch.Through(1e-6, 10e3, 1000)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "rms", s.RMS, 4.0, 0.04)
	near(t, "square time", s.SquareTime, 0.048, 0.045)
	near(t, "charge", s.Charge, 10e-3, 1e-12)
}

// The rms over 3RC gives the whole square time, which in the body's resistance is the
// whole energy.
func TestShockKeepsItsEnergy(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		c := quantity.Capacitance(math.Pow(10, rapid.Float64Range(-12, -5).Draw(t, "log capacitance")))
		u := quantity.Voltage(math.Pow(10, rapid.Float64Range(0, 5).Draw(t, "log voltage")))
		r := touch.Bodies()[rapid.IntRange(0, 2).Draw(t, "body")].Resistance
		s, err := touch.Through(c, u, r)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "rms", float64(s.RMS*s.RMS)*float64(s.Duration), float64(s.SquareTime), 1e-12)
		near(t, "heat", float64(s.SquareTime)*float64(r), float64(s.Energy), 1e-12)
		near(t, "charge", float64(s.Peak)*float64(s.Duration)/3, float64(s.Charge), 1e-12)
		back, err := touch.VoltageOf(c, s.Energy)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "voltage", back, u, 1e-12)
	})
}

func TestBodies(t *testing.T) {
	var before quantity.Resistance
	for _, b := range touch.Bodies() {
		if b.Resistance <= before || b.Source == "" || b.Mark != "read" && b.Mark != "memory" {
			t.Errorf("%+v after %v", b, before)
		}
		before = b.Resistance
	}
}

// Published worked examples: charge in C, energy in J.
func TestStored(t *testing.T) {
	for _, row := range []struct {
		source string
		c      quantity.Capacitance
		u      quantity.Voltage
		charge quantity.Charge
		energy quantity.Energy
	}{
		{"note on IEC 61010-1 6.10.3 (product-safety list, 2013)", 4.4e-6, 80, 352e-6, 0},
		{"IEC 60335-1 8.1.4: 0.1 µF and 45 µC meet at 450 V", 0.1e-6, 450, 45e-6, 0},
		{"university exercise 17-9, defibrillator", 80e-6, 2500, 0.2, 250},
		{"textbook exercise Q63PE", 10e-6, 9e3, 0.09, 405},
		{"pulse capacitor bank, instrument list", 20e-9, 20e3, 0, 4},
	} {
		if row.charge != 0 {
			near(t, row.source, touch.Charge(row.c, row.u), row.charge, 1e-12)
		}
		if row.energy != 0 {
			near(t, row.source, touch.Energy(row.c, row.u), row.energy, 1e-12)
		}
	}
	// Textbook exercise: 40 J in 8 µF are 3.16 kV and 25.3 mC.
	u, err := touch.VoltageOf(8e-6, 40)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "40 J in 8 µF", u, 3.16e3, 1e-3)
	near(t, "its charge", touch.Charge(8e-6, u), 25.3e-3, 1e-3)
	_, err = touch.VoltageOf(0, 1)
	lacking(t, "no capacitance", err)
}

// Body currents. Forum worked example: 277 V through 33 and 5 kohm, 8.4 and 55.4 mA.
// IEEE Std 80's let-go data: 9 mA at 21 V hand to hand (2330 ohm), 10.2 V hand to feet
// (1130 ohm).
func TestCurrentThroughABody(t *testing.T) {
	for _, row := range []struct {
		u            quantity.Voltage
		series, body quantity.Resistance
		want         quantity.Current
	}{{277, 0, 33e3, 8.4e-3}, {277, 0, 5e3, 55.4e-3}, {277, 4e3, 1e3, 55.4e-3}, {21, 0, 2330, 9e-3}, {10.2, 0, 1130, 9e-3}, {0, 0, 1000, 0}} {
		got, err := touch.Current(row.u, row.series, row.body)
		if err != nil {
			t.Fatal(err)
		}
		near(t, fmt.Sprint(row.u, " V"), got, row.want, 3e-3)
	}
	for _, bad := range [][3]float64{{100, 0, 0}, {100, -1, 500}, {math.NaN(), 0, 500}, {-100, 0, 500}, {100, 0, math.NaN()}} {
		_, err := touch.Current(quantity.Voltage(bad[0]), quantity.Resistance(bad[1]), quantity.Resistance(bad[2]))
		lacking(t, fmt.Sprint(bad), err)
	}
}
