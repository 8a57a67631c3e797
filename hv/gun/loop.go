package gun

import (
	"math"
	"math/cmplx"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Sensitivities says by how many per cent the emission changes for one per cent
// of its causes, d ln I / d ln x. They follow from differentiating the law
// I = K(Vc − Vb)^n with Vc proportional to the working voltage and, self-biased,
// Vb = R I.
type Sensitivities struct {
	// Voltage: n Vc/(Vc − Vb) at fixed bias, divided by 1 + L self-biased.
	Voltage float64
	// Resistor: −L/(1 + L); zero at fixed bias.
	Resistor float64
	// Bias is for a fixed bias alone, −n Vb/(Vc − Vb); zero self-biased.
	Bias float64
	// Limit is to what the cathode can give: near 1 where its temperature
	// governs, near 0 where space charge does.
	Limit float64
}

// Sensitivities of the emission at the point; a lack where there is none.
func (p Point) Sensitivities() (Sensitivities, error) {
	if p.Emission == 0 {
		return Sensitivities{}, lack.Range("no emission at a bias of %s, at or past cutoff", quantity.Text(p.Bias))
	}
	share := p.law.share(p.Emission)
	steep := p.law.exponent * share / float64(p.Headroom)
	loop := 1 + p.LoopGain()
	s := Sensitivities{Voltage: steep * float64(p.law.cutoff) / loop, Limit: (1 - share) / loop}
	if p.resistor > 0 {
		s.Resistor = -p.LoopGain() / loop
	} else {
		s.Bias = -steep * float64(p.Bias)
	}
	return s, nil
}

// ToTemperature is d ln I / d ln T for a cathode of the emitter at t: its own
// sensitivity as far as its limit governs. It is a lack where the law was given
// no limit: nothing then says how far above the knee the gun works.
func (p Point) ToTemperature(e Emitter, t quantity.Temperature) (float64, error) {
	if math.IsInf(float64(p.law.limit), 1) {
		return 0, lack.Because("what the cathode can give at its temperature is not known",
			"gun.emitting_area", "gun.cathode_temperature", "gun.work_function")
	}
	s, err := p.Sensitivities()
	if err != nil {
		return 0, err
	}
	own, err := e.Sensitivity(t)
	return s.Limit * own, err
}

// RegulatesTo is the largest emission, and with it the smallest resistor, at
// which self-bias divides disturbances by at least suppression. Below it, down to
// no emission, the gun regulates. Where space charge governs, 1 + n Vb/(Vc − Vb) ≥
// s gives Vb/Vc ≥ (s − 1)/(n + s − 1); the cathode's limit, where it is near, takes
// its share of the gain and moves the point further towards cutoff.
func (l Law) RegulatesTo(suppression float64) (quantity.Current, quantity.Resistance, error) {
	if !(suppression > 1) || math.IsInf(suppression, 1) {
		return 0, 0, lack.Range("regulation divides disturbances by more than 1, not by %g", suppression)
	}
	// In t of loadLine Vb/(Vc − Vb) is e^−t; the gain falls with t.
	far, near := -700.0, math.Log(l.exponent/(suppression-1))
	if l.gain(near) < suppression-1 {
		for range 100 {
			if middle := (far + near) / 2; l.gain(middle) < suppression-1 {
				near = middle
			} else {
				far = middle
			}
		}
	}
	emission := l.emission(-softplus(-near))
	return emission, quantity.Resistance(float64(l.cutoff) * logistic(-near) / float64(emission)), nil
}

// gain is the loop gain of self-bias at t of loadLine.
func (l Law) gain(t float64) float64 {
	return l.exponent * l.share(l.emission(-softplus(-t))) * math.Exp(-t)
}

// Suppression is what the loop divides a disturbance of the frequency by, with a
// bypass across the resistor: |1 + gm Zb|, Zb = R/(1 + jωRC). It is 1 + L below
// 1/(2πRC) and falls to 1 above (1 + L)/(2πRC).
func (p Point) Suppression(f quantity.Frequency, bypass quantity.Capacitance) float64 {
	turn := 2 * math.Pi * float64(f) * float64(p.resistor) * float64(bypass)
	return cmplx.Abs(1 + complex(p.LoopGain(), 0)/complex(1, turn))
}

// RegulatesUpTo is the frequency 1/(2πRC) below which the whole loop gain
// works, and (1 + L)/(2πRC) above which none is left. A lack without a resistor
// or without a bypass, where the strays decide.
func (p Point) RegulatesUpTo(bypass quantity.Capacitance) (whole, none quantity.Frequency, err error) {
	if p.resistor == 0 || !positive(bypass) {
		return 0, 0, lack.Because("the loop's corner needs a bias resistor and its bypass", "bias.resistor", "bias.bypass")
	}
	whole = quantity.Frequency(1 / (2 * math.Pi * float64(p.resistor) * float64(bypass)))
	return whole, whole * quantity.Frequency(1+p.LoopGain()), nil
}

// Fed is the electrode the output of the supply feeds.
type Fed int

// The two ways to feed a gun.
const (
	FedControl Fed = iota
	FedCathode
)

// CathodeVoltage is the magnitude of the cathode's potential: the bias below the
// output where that feeds the control electrode, else the output itself. A bias
// that eats the whole output is a lack.
func CathodeVoltage(output, bias quantity.Voltage, fed Fed) (quantity.Voltage, error) {
	if fed == FedCathode {
		return output, nil
	}
	if !(output > bias) {
		return 0, lack.Range("a bias of %s leaves nothing of an output of %s", quantity.Text(bias), quantity.Text(output))
	}
	return output - bias, nil
}

// EnergyShift is how far a change of emission moves the cathode, and with it
// the beam's energy, where the output feeds the control electrode: R dI. The
// divider senses nothing of it.
func EnergyShift(resistor quantity.Resistance, change quantity.Current) quantity.ElectronEnergy {
	return quantity.ElectronEnergy(float64(resistor) * float64(change))
}
