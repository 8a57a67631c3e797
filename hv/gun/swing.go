package gun

import (
	"math"
	"math/cmplx"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Diode is the law of a gun without a control electrode, I ~ V^n with n = 1.5 by
// Child's law (C. D. Child, Phys. Rev. 32 (1911) 492, from memory). It is that of
// a triode at zero bias: its cutoff means nothing, and no bias is to be put to it.
func Diode(exponent float64, emission quantity.Current) (Law, error) {
	return New(1, exponent, emission)
}

// Swing is by how much the emission moves, relatively, when the bias moves by so
// much, gm dVb/I; both peak to peak. The sign is left out: more bias, less emission.
func (p Point) Swing(bias quantity.Voltage) (quantity.Fraction, error) {
	if p.Emission == 0 {
		return 0, lack.Range("no emission at a bias of %s, at or past cutoff", quantity.Text(p.Bias))
	}
	return quantity.Fraction(float64(p.Transconductance()) * float64(bias) / float64(p.Emission)), nil
}

// SwingOfVoltage is by how much the emission moves, relatively, when the high voltage moves
// by so much at a frequency: as at fixed bias, divided by what the loop takes away there.
func (p Point) SwingOfVoltage(voltage quantity.Fraction, f quantity.Frequency, bypass quantity.Capacitance) (quantity.Fraction, error) {
	s, err := p.AtFixedBias().Sensitivities()
	return voltage * quantity.Fraction(s.Voltage/p.Suppression(f, bypass)), err
}

// SwingOfLimit is by how much the emission moves, relatively, when what the cathode
// can give moves by so much at a frequency: as far as the limit governs, divided by
// what the loop takes away there (see Suppression).
func (p Point) SwingOfLimit(limit quantity.Fraction, f quantity.Frequency, bypass quantity.Capacitance) quantity.Fraction {
	if p.Emission == 0 {
		return 0
	}
	return limit * quantity.Fraction((1-p.law.share(p.Emission))/p.Suppression(f, bypass))
}

// SwingOfBias is by how much the bias moves when the emission moves by so much at a
// frequency, I·|Zb| dI/I with Zb = R/(1 + jωRC); zero at fixed bias.
func (p Point) SwingOfBias(emission quantity.Fraction, f quantity.Frequency, bypass quantity.Capacitance) quantity.Voltage {
	turn := 2 * math.Pi * float64(f) * float64(p.resistor) * float64(bypass)
	z := float64(p.resistor) / cmplx.Abs(complex(1, turn))
	return quantity.Voltage(z * float64(p.Emission) * float64(emission))
}

// DriftOfBias is by how much a self-bias moves when its resistor changes by so much,
// relatively: Vb/(1 + L) of it, since the emission gives way; zero at fixed bias.
func (p Point) DriftOfBias(resistor quantity.Fraction) quantity.Voltage {
	if p.resistor == 0 {
		return 0
	}
	return p.Bias * quantity.Voltage(float64(resistor)/(1+p.LoopGain()))
}

// LimitSwing is the relative swing, peak to peak, of what the cathode can give when
// its temperature swings by an amplitude: 2 dT/T times the emitter's sensitivity.
func (e Emitter) LimitSwing(t quantity.Temperature, amplitude quantity.TemperatureRise) (quantity.Fraction, error) {
	s, err := e.Sensitivity(t)
	return quantity.Fraction(2 * s * float64(amplitude) / float64(t)), err
}
