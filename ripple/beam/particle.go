// Package beam turns what disturbs an accelerating voltage into the width of a
// beam's energy and the blur of its spot.
//
// Three things are told apart by name throughout. Amplitude is zero to peak, rms
// is rms, PeakToPeak is what it says. FW50 is the full width that holds half: of an
// energy distribution from 25 to 75 %, of a spot the diameter of the circle with
// half the current; FWHM is the full width at half maximum. Angle is always the
// semi-angle at the specimen, and every blur here is a diameter.
package beam

import (
	"math"

	"kilovet/hv/gun"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Constants, CODATA 2018; h and c are exact by definition.
const (
	planck       = 6.62607015e-34 // J s
	lightSpeed   = 299792458      // m/s
	electronMass = 9.1093837015e-31
	// restEnergy is mc²/e = 510 998.950 eV.
	restEnergy = electronMass * lightSpeed * lightSpeed / gun.ElementaryCharge
)

// Particle is an electron or ion at its final energy.
type Particle struct {
	energy, rest float64 // eV
	charge       float64 // in elementary charges
}

// Accelerated is an electron that has passed a voltage; it must be positive. All
// quantities are relativistic and hold at any voltage.
func Accelerated(v quantity.Voltage) (Particle, error) {
	if !positive(v) {
		return Particle{}, lack.Range("no beam at an accelerating voltage of %s", quantity.Text(v))
	}
	return Particle{float64(v), restEnergy, 1}, nil
}

// massUnit is the atomic mass unit as an energy, 931.49410242(28) MeV, CODATA 2018.
const massUnit = 931.49410242e6

// AcceleratedIon is an ion of a mass in atomic mass units that has passed a voltage with
// so many charges; its electrons' mass is left out of account.
func AcceleratedIon(v quantity.Voltage, massNumber float64, charges int) (Particle, error) {
	if !positive(v) || !positive(massNumber) || charges < 1 {
		return Particle{}, lack.Range("no beam of ions without a voltage, a mass and a charge above zero")
	}
	return Particle{float64(charges) * float64(v), massUnit * massNumber, float64(charges)}, nil
}

// Energy is charge times voltage.
func (e Particle) Energy() quantity.ElectronEnergy { return quantity.ElectronEnergy(e.energy) }

// Relative is a change of the accelerating voltage over that voltage.
func (e Particle) Relative(change quantity.Voltage) quantity.Fraction {
	return quantity.Fraction(float64(change) * e.charge / e.energy)
}

// Gamma is 1 + E/mc².
func (e Particle) Gamma() float64 { return 1 + e.energy/e.rest }

// Charges is the charge in elementary charges.
func (e Particle) Charges() float64 { return e.charge }

// Corrected is the relativistic voltage V* = E(1 + E/2mc²), for one charge, that stands
// in lens and wavelength laws in place of V.
func (e Particle) Corrected() quantity.Voltage {
	return quantity.Voltage(e.energy * (1 + e.energy/(2*e.rest)))
}

// Kappa is d ln V*/d ln V = (1 + E/mc²)/(1 + E/2mc²) = 2γ/(1 + γ): what a relative
// change of the high voltage counts in a magnetic lens whose aberration refers to
// V*. It multiplies energy and voltage, never the lens current.
func (e Particle) Kappa() float64 { return 2 * e.Gamma() / (1 + e.Gamma()) }

// Beta is speed over that of light, √(1 − 1/γ²).
func (e Particle) Beta() float64 {
	g := e.Gamma()
	return math.Sqrt((g-1)*(g+1)) / g
}

// Speed is in metres per second.
func (e Particle) Speed() float64 { return e.Beta() * lightSpeed }

// Wavelength is h/√(2 m e V*); m is the rest energy times e/c².
func (e Particle) Wavelength() quantity.Length {
	return quantity.Length(planck / math.Sqrt(2*e.rest*float64(e.Corrected())) * lightSpeed / gun.ElementaryCharge)
}

func positive[Q ~float64](q Q) bool { return q > 0 && !math.IsInf(float64(q), 1) }

// notNegative is for what may be absent: zero or more, and finite.
func notNegative[Q ~float64](q Q) bool { return q >= 0 && !math.IsInf(float64(q), 1) }
