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

// Electron is an electron at its final energy.
type Electron struct{ energy float64 } // eV

// Accelerated is an electron that has passed a voltage; it must be positive. All
// quantities are relativistic and hold at any voltage.
func Accelerated(v quantity.Voltage) (Electron, error) {
	if !positive(v) {
		return Electron{}, lack.Range("no beam at an accelerating voltage of %s", quantity.Text(v))
	}
	return Electron{float64(v)}, nil
}

// Energy is charge times voltage.
func (e Electron) Energy() quantity.ElectronEnergy { return quantity.ElectronEnergy(e.energy) }

// Gamma is 1 + E/mc².
func (e Electron) Gamma() float64 { return 1 + e.energy/restEnergy }

// Corrected is the relativistic voltage V* = V(1 + V/2mc²) that stands in lens and
// wavelength laws in place of V.
func (e Electron) Corrected() quantity.Voltage {
	return quantity.Voltage(e.energy * (1 + e.energy/(2*restEnergy)))
}

// Kappa is d ln V*/d ln V = (1 + E/mc²)/(1 + E/2mc²) = 2γ/(1 + γ): what a relative
// change of the high voltage counts in a magnetic lens whose aberration refers to
// V*. It multiplies energy and voltage, never the lens current.
func (e Electron) Kappa() float64 { return 2 * e.Gamma() / (1 + e.Gamma()) }

// Beta is speed over that of light, √(1 − 1/γ²).
func (e Electron) Beta() float64 {
	g := e.Gamma()
	return math.Sqrt((g-1)*(g+1)) / g
}

// Speed is in metres per second.
func (e Electron) Speed() float64 { return e.Beta() * lightSpeed }

// Wavelength is h/√(2 m e V*).
func (e Electron) Wavelength() quantity.Length {
	return quantity.Length(planck / math.Sqrt(2*electronMass*gun.ElementaryCharge*float64(e.Corrected())))
}

func positive[Q ~float64](q Q) bool { return q > 0 && !math.IsInf(float64(q), 1) }

// notNegative is for what may be absent: zero or more, and finite.
func notNegative[Q ~float64](q Q) bool { return q >= 0 && !math.IsInf(float64(q), 1) }
