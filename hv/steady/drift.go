package steady

import (
	"math"

	"kilovet/hv/quantity"
)

// Drift is the size of the relative change |α ΔT| of what has a temperature coefficient.
func Drift(coefficient quantity.PerKelvin, change quantity.TemperatureRise) quantity.Fraction {
	return quantity.Fraction(math.Abs(float64(coefficient) * float64(change)))
}
