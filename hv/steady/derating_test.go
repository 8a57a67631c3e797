package steady_test

import (
	"math"
	"testing"

	"kilovet/hv/quantity"
	"kilovet/hv/steady"
)

// Full to 70 degC, half at 112.5 degC in the middle, nothing from 155 degC.
func TestPowerShare(t *testing.T) {
	for degC, want := range map[float64]float64{-40: 1, 25: 1, 70: 1, 112.5: 0.5, 138: 0.2} {
		got, err := steady.PowerShare(quantity.Temperature(degC + 273.15))
		if err != nil || math.Abs(float64(got)-want) > 1e-9 {
			t.Errorf("%g degC: %v, %v, want %g", degC, got, err, want)
		}
	}
	if _, err := steady.PowerShare(155 + 273.15); err == nil {
		t.Error("power is left at 155 degC")
	}
}
