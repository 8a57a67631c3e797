package beam

import (
	"math"

	"kilovet/hv/gun"
	"kilovet/hv/quantity"
)

// FocalSpread is the standard deviation of the focus, Cc √[(κσE/E)² + (κσV/V)² +
// (2σI/I)²], for standard deviations of the source's energy, the high voltage and
// the relative lens current (E. J. Kirkland's convention, from memory; κ derived).
// Printed "focal spreads" are also its √2-fold (1/e half-width) and 2.355-fold
// (FWHM).
func (o Optics) FocalSpread(e Particle, source quantity.ElectronEnergy, voltageRMS quantity.Voltage, lensCurrentRMS quantity.Fraction) quantity.Length {
	k := e.Kappa() / e.energy
	return o.Chromatic * quantity.Length(math.Hypot(math.Hypot(k*float64(source), k*e.charge*float64(voltageRMS)), 2*float64(lensCurrentRMS)))
}

// ImageRotation is the angle by which a magnetic lens turns the image, √(e/8m) μ₀
// NI/√V* = 0.186327 NI/√V*; a change of the high voltage turns it by −κ/2 dV/V of
// that.
func ImageRotation(e Particle, ampereTurns quantity.Current) quantity.Angle {
	const permeability = 1.25663706212e-6 // μ₀ in N/A², CODATA 2018
	return quantity.Angle(math.Sqrt(gun.ElementaryCharge/(8*electronMass)) * permeability * float64(ampereTurns) / math.Sqrt(float64(e.Corrected())))
}

// Brightness is in amperes per square metre and steradian.
type Brightness float64

// LangmuirBrightness is the most a cathode of a current density and temperature
// can give on the axis, J V*/(π kT/e) (D. Langmuir, from memory).
func LangmuirBrightness(e Particle, j quantity.CurrentDensity, t quantity.Temperature) Brightness {
	return Brightness(float64(j) * float64(e.Corrected()) / (math.Pi * float64(gun.ThermalEnergy(t))))
}
