// Package gas knows what air and other gases stand: density, the law of uniform
// fields, Paschen's law with measured minima, Peek's corona laws, the streamer
// criterion along a critical line, sharp electrodes and measuring sphere gaps.
//
// Onset, where the first avalanche grows into a self-sustained discharge, and
// breakdown, where it crosses the gap, are two answers: they coincide where the field
// is nearly uniform and part where it is not.
package gas

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// The reference of the density: 20 °C and 760 Torr.
const (
	referencePressure    quantity.Pressure    = 101325
	referenceTemperature quantity.Temperature = 293.15
)

// State is a gas at a pressure and temperature.
type State struct {
	Gas         gap.Gas
	Pressure    quantity.Pressure
	Temperature quantity.Temperature
	Humidity    *quantity.Humidity // absolute, air only; nil: as the data were taken, 8.5 or 11 g/m³
}

// Density is relative to 20 °C and 101.325 kPa: δ = (p/p₀)(T₀/T).
func (s State) Density() quantity.Fraction {
	return quantity.Fraction(s.Pressure/referencePressure) * quantity.Fraction(referenceTemperature/s.Temperature)
}

// density25 is relative to 25 °C and 760 Torr, the reference of Peek and of the AIEE
// tables: 0.392 b/(273 + t), b in Torr; 1.7 % above Density.
func (s State) density25() quantity.Fraction { return s.Density() * 298.15 / 293.15 }

// reduced is the product of a pressure taken to 20 °C and a length.
func (s State) reduced(d quantity.Length) quantity.PressureLength {
	return quantity.PressureLength(float64(s.Density()) * float64(referencePressure) * float64(d))
}

// StateOf is the gas of a gap: its pressure, or that of its altitude, and its
// temperature. What is missing is a lack.
func StateOf(g gap.Gap) (State, error) {
	s := State{Gas: g.Filling(), Pressure: g.TruePressure(), Temperature: g.Temperature, Humidity: g.Humidity}
	if s.Temperature <= 0 {
		return s, lack.Key("site.air_temperature")
	}
	if s.Pressure > 0 {
		return s, nil
	}
	if s.Gas != gap.AirGas {
		return s, lack.Key("spacing.pressure")
	}
	if g.Altitude == nil {
		return s, lack.Key("site.altitude")
	}
	var err error
	s.Pressure, err = AltitudePressure(*g.Altitude)
	return s, err
}

// AltitudePressure is the mean pressure of the air at an altitude up to 11 km, the
// standard atmosphere: p = 101325 Pa (1 − 2.25577e-5 h)^5.25588. Weather moves it by
// some 5 %.
func AltitudePressure(h quantity.Length) (quantity.Pressure, error) {
	if h < -500 || h > 11000 {
		return 0, lack.Range("the standard atmosphere holds from -500 m to 11 km, asked for %s", quantity.Text(h))
	}
	return referencePressure * quantity.Pressure(math.Pow(1-2.25577e-5*float64(h), 5.25588)), nil // ICAO standard atmosphere
}
