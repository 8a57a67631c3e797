package table

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// altitudeRows is IEC 60664-1 Table A.2 (2007, 2020) from 2000 m on: altitude in m,
// factor on clearances. Every factor equals 80 kPa over the pressure to the printed
// digits; some rows of the copies read were scrambled and follow from that identity.
var altitudeRows = [][]float64{
	{2000, 1},
	{3000, 1.14},
	{4000, 1.29},
	{5000, 1.48},
	{6000, 1.7},
	{7000, 1.95},
	{8000, 2.25},
	{9000, 2.62},
	{10000, 3.02},
	{15000, 6.67},
	{20000, 14.5},
}

var altitude = Of(printed("A.2"), "altitude", altitudeRows, 1, metre, quantity.Fraction(1))

// AltitudeFactor multiplies the clearances of the tables, which hold up to 2000 m;
// below it is 1, past 20000 m there is a lack.
func AltitudeFactor(h quantity.Length) (Reading[quantity.Fraction], error) { return altitude.At(h) }

// referencePressure is that of the air at 2000 m, for which the clearances hold
// (IEC 60664-1 Table A.2).
const referencePressure quantity.Pressure = 80e3

// lowestPressure is that of the last row of Table A.2, 20000 m.
const lowestPressure quantity.Pressure = 5.5e3

// PressureFactor is the altitude factor of air at a given pressure, 80 kPa over
// pressure, the identity every row of Table A.2 obeys; never below 1. Below 5.5 kPa,
// the last row, there is a lack.
func PressureFactor(p quantity.Pressure) (Reading[quantity.Fraction], error) {
	if !quantity.AtLeast(p, lowestPressure) {
		return Reading[quantity.Fraction]{}, lack.Range("IEC 60664-1 Table A.2 ends at an air pressure of %s, asked for %s",
			quantity.Text(lowestPressure), quantity.Text(p))
	}
	source := printed("A.2 (factor = 80 kPa / pressure)")
	return Reading[quantity.Fraction]{
		Value:  quantity.Fraction(max(1, referencePressure/p)),
		Rows:   "at " + quantity.Text(p),
		Source: source,
	}, nil
}
