package steady

import (
	"testing"

	"kilovet/hv/quantity"
)

// 50 ppm/K over 4 K are 200 ppm, whichever way either points.
func TestDrift(t *testing.T) {
	for _, sign := range []float64{1, -1} {
		near(t, "cooler or warmer", float64(Drift(50e-6, quantity.TemperatureRise(sign*4))), 200e-6, 1e-12)
		near(t, "falling", float64(Drift(-50e-6, quantity.TemperatureRise(sign*4))), 200e-6, 1e-12)
	}
}
