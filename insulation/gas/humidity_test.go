package gas_test

import (
	"math"
	"strings"
	"testing"

	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"
)

// IEC 60060-1, the exponent w by g (memory), all rows; steady where the branches meet.
func TestCellsOfTheHumidityExponent(t *testing.T) {
	for g, w := range map[float64]float64{0.2: 0, 0.4: 0.1, 0.6: 0.3, 0.8: 0.6, 1: 1, 1.2: 1, 1.4: 0.6, 1.6: 0.3, 1.8: 0.1, 2: 0, 3: 0, 0: 0} {
		if got := gas.HumidityExponent(g); math.Abs(got-w) > 1e-9 {
			t.Errorf("g %g: w %g, want %g", g, got, w)
		}
	}
	for _, g := range []float64{0.2, 1, 1.2, 2} {
		if step := gas.HumidityExponent(g+1e-9) - gas.HumidityExponent(g-1e-9); math.Abs(step) > 1e-7 {
			t.Errorf("w jumps by %g at %g", step, g)
		}
	}
}

// The exponent 1 judges, the cautious end; what w gives is shown and never lower. In 0.4 m,
// 4.5 kV/cm of positive streamers, g is 1.07 in dry air and both are the same; over 50 mm of
// needles g is past 2 and the standard would take nothing off.
func TestHumidityExponentIsShown(t *testing.T) {
	dry := normal
	dry.Humidity = new(quantity.Humidity(1e-3))
	shown := func(a gap.Answer[quantity.Voltage]) float64 {
		for _, b := range a.Shown {
			if strings.Contains(b.Source.Text, "power w") {
				return float64(b.Value / a.Value)
			}
		}
		t.Fatalf("nothing is shown: %+v", a)
		return 0
	}
	long, err1 := gas.PointPlane(dry, 0.4)
	short, err2 := gas.Needles(dry, 50e-3)
	if err1 != nil || err2 != nil {
		t.Fatal(err1, err2)
	}
	near(t, "long gap", shown(long), 1, 1e-9)
	near(t, "short gap", shown(short), 1/0.838, 1e-9)
	// Longer gaps never stand less for all that.
	last := quantity.Voltage(0)
	for d := quantity.Length(1e-3); d < 0.5; d *= 1.02 {
		a, err := gas.PointPlane(dry, d)
		if err != nil || a.Value < last*(1-1e-9) {
			t.Fatalf("%v: %v after %v (%v)", d, a.Value, last, err)
		}
		last = a.Value
	}
}
