package touch_test

import (
	"math"
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/hv/touch"
)

// Pratt et al., EMBC 2016, abstract (read): 1 mC at 1 µs, about 100 mC between 10 ms and
// 5 s, 38 mA beyond, 10 C at 300 s; the last is printed rounded, 38 mA make 11.4 C of it.
func TestChargeModelAsPrinted(t *testing.T) {
	for _, c := range []struct {
		duration quantity.Time
		charge   quantity.Charge
		within   float64
	}{
		{1e-6, 1e-3, 1e-9}, {10e-3, 100e-3, 1e-9}, {1, 100e-3, 1e-9}, {5, 100e-3, 1e-9}, {300, 10, 0.14001},
	} {
		got, err := touch.ThresholdCharge(c.duration)
		if err != nil || math.Abs(float64(got/c.charge)-1) > c.within {
			t.Errorf("%g s: %g C, %v, want %g C within %g", c.duration, got, err, c.charge, c.within)
		}
	}
	if least, _ := touch.ThresholdCharge(1e-6); math.Abs(float64(least/45e-6)-22) > 0.5 {
		t.Errorf("45 µC are %g times below the least of the model, want 22 (by hand)", least/45e-6)
	}
	if _, err := touch.ThresholdCharge(0.5e-6); lack.Of(err) == nil {
		t.Error("the model answers below its least duration")
	}
	before := quantity.Charge(0)
	for e := -6.0; e < 4; e += 0.1 {
		q, err := touch.ThresholdCharge(quantity.Time(math.Pow(10, e) * 1.0000001))
		if err != nil || q < before {
			t.Errorf("1e%.1f s: %g C after %g C, %v", e, q, before, err)
		}
		before = q
	}
}
