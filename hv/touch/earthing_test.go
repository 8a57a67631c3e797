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

// 30 kV on 10 nF through a rod of 100 kohm (derived).
func ExampleEarth() {
	e, _ := touch.Earth(10e-9, 30e3, 100e3)
	fmt.Println(quantity.Text(e.Peak), quantity.Text(e.Energy), quantity.Text(e.Time), "to 60 V")
	// Output: 300 mA 4.5 J 6.215 ms to 60 V
}

// Homework exercise on a bleeder: 260 kohm and 85 µF fall to 0.35 % in 125 s; with 125
// ohm they rise to 86.5 % in 21.25 ms (printed with 2RC).
func TestDischargeTimes(t *testing.T) {
	fall, err := touch.DischargeTime(260e3, 85e-6, 1, 0.0035)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "fall", fall, 125, 2e-3)
	rise, err := touch.DischargeTime(125, 85e-6, 1, 1-0.865)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "rise", rise, 21.25e-3, 2e-3)
	for u, folds := range map[quantity.Voltage]float64{5e3: 4.42, 10e3: 5.12, 30e3: 6.21, 50e3: 6.73, 100e3: 7.42} { // derived
		s, err := touch.DischargeTime(1, 1, u, touch.Discharged)
		if err != nil {
			t.Fatal(err)
		}
		near(t, fmt.Sprint(u, " V"), float64(s), folds, 2e-3)
	}
}

// The trap of five time constants: 202 V of 30 kV are left, not less than 60 V.
func TestFiveTimeConstantsAreNotEnough(t *testing.T) {
	left, err := touch.Remaining(1e6, 1e-9, 30e3, 5e-3)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "left of 30 kV", left, 202, 2e-3)
	if left < touch.Discharged {
		t.Error("must be above what counts as discharged")
	}
}

// A bleeder of ten in series with one open never discharges.
func TestOpenBleederNeverDischarges(t *testing.T) {
	_, err := touch.DischargeTime(quantity.Resistance(math.Inf(1)), 1e-9, 30e3, 60)
	lacking(t, "open", err)
	left, err := touch.Remaining(quantity.Resistance(math.Inf(1)), 1e-9, 30e3, 3600)
	if err != nil || left != 30e3 {
		t.Errorf("after an hour: %v, %v", left, err)
	}
}

func TestDischargeRoundTrips(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		c := quantity.Capacitance(math.Pow(10, rapid.Float64Range(-12, -5).Draw(t, "log capacitance")))
		u := quantity.Voltage(rapid.Float64Range(61, 1e5).Draw(t, "voltage"))
		within := quantity.Time(math.Pow(10, rapid.Float64Range(-3, 3).Draw(t, "log time")))
		r, err := touch.ResistanceFor(within, c, u, 60)
		if err != nil {
			t.Fatal(err)
		}
		s, err := touch.DischargeTime(r, c, u, 60)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "time", s, within, 1e-12)
		left, err := touch.Remaining(r, c, u, within)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "left", left, 60, 1e-9)
		rod, err := touch.Earth(c, u, r)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "rod", rod.Time, within, 1e-12)
		near(t, "time constant", float64(rod.TimeConstant), float64(r)*float64(c), 1e-12)
	})
}

func TestNothingToDischarge(t *testing.T) {
	s, err := touch.DischargeTime(1e6, 1e-9, 50, 60)
	if err != nil || s != 0 {
		t.Errorf("%v, %v", s, err)
	}
	_, err = touch.ResistanceFor(5, 1e-9, 50, 60)
	lacking(t, "any resistance does", err)
	_, err = touch.ResistanceFor(0, 1e-9, 500, 60)
	lacking(t, "no time", err)
}
