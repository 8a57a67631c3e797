package steady

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Power of a film resistor falls linearly between these: common practice, no source.
const (
	FullPowerTo  quantity.Temperature = 70 + 273.15
	NoPowerAbove quantity.Temperature = FullPowerTo + quantity.Temperature(RatedRise)
)

// PowerShare is the part of a film resistor's power rating that is left in air of a
// temperature: all of it to 70 degC, falling linearly to nothing at 155 degC. A lack where
// nothing is left.
func PowerShare(air quantity.Temperature) (quantity.Fraction, error) {
	if quantity.AtLeast(air, NoPowerAbove) {
		return 0, lack.Range("air at %s leaves a film resistor no power", quantity.Text(air))
	}
	return quantity.Fraction(min(1, float64((NoPowerAbove-air)/(NoPowerAbove-FullPowerTo)))), nil
}
