package gun

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Noise across the bias, rms, over all frequencies. The loop turns the resistor
// R into R' = R/(1 + L) for every current that enters at the cathode, and R' with
// the bypass C has the noise bandwidth 1/(4R'C); hence the two closed forms.

// ShotNoise is the rms voltage across the bias from the shot noise of the
// emission, √(2eI · R'² · 1/(4R'C)) = √(e I R'/(2C)). It is an upper bound: space
// charge smooths the emission.
func (p Point) ShotNoise(bypass quantity.Capacitance) (quantity.Voltage, error) {
	if err := p.noiseless(bypass); err != nil {
		return 0, err
	}
	square := ElementaryCharge * float64(p.Emission) * p.closedLoopResistance() / (2 * float64(bypass))
	return quantity.Voltage(math.Sqrt(square)), nil
}

// ResistorNoise is the rms voltage across the bias from the thermal noise of the
// resistor at its temperature, √(4kT/R · R'² · 1/(4R'C)) = √(kT/C · 1/(1 + L)).
func (p Point) ResistorNoise(bypass quantity.Capacitance, t quantity.Temperature) (quantity.Voltage, error) {
	if err := p.noiseless(bypass); err != nil {
		return 0, err
	}
	if !positive(t) {
		return 0, lack.Range("thermal noise needs a temperature above zero")
	}
	return quantity.Voltage(math.Sqrt(Boltzmann * float64(t) / float64(bypass) / (1 + p.LoopGain()))), nil
}

// closedLoopResistance is R' = R/(1 + L) in ohms.
func (p Point) closedLoopResistance() float64 { return float64(p.resistor) / (1 + p.LoopGain()) }

// noiseless says why there is no bandwidth to reckon noise over.
func (p Point) noiseless(bypass quantity.Capacitance) error {
	if p.resistor > 0 && positive(bypass) {
		return nil
	}
	return lack.Because("noise across the bias needs its resistor and the capacitance across it", "bias.resistor", "bias.bypass")
}
