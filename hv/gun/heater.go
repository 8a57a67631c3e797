package gun

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// TipSwing is how far the emitting tip, taken to be at half the heater voltage,
// stands from the junction of two centre resistors, V |1/2 − R1/(R1 + R2)|: rms
// where the heater voltage is. It moves the beam's energy, and the bias as well.
func TipSwing(heater quantity.Voltage, r1, r2 quantity.Resistance) (quantity.Voltage, error) {
	if !positive(r1) || !positive(r2) {
		return 0, lack.Range("centre resistors of %s and %s have no junction between the ends", quantity.Text(r1), quantity.Text(r2))
	}
	return heater * quantity.Voltage(math.Abs(0.5-float64(r1/(r1+r2)))), nil
}

// TipSwingReturn is the same where one leg of the filament is the return: V/2.
func TipSwingReturn(heater quantity.Voltage) quantity.Voltage { return heater / 2 }

// TipSwingTolerance is the most two resistors of one nominal value and tolerance
// can leave: the one high, the other low, V δ/2.
func TipSwingTolerance(heater quantity.Voltage, r1, r2 quantity.Resistance, tolerance quantity.Fraction) (quantity.Voltage, error) {
	d := quantity.Resistance(tolerance)
	if d < 0 || d >= 1 {
		return 0, lack.Range("a tolerance of %s leaves no resistor", quantity.Text(tolerance))
	}
	up, err := TipSwing(heater, r1*(1+d), r2*(1-d))
	if err != nil {
		return 0, err
	}
	down, err := TipSwing(heater, r1*(1-d), r2*(1+d))
	return max(up, down), err
}

// Wire is a heating wire, long enough that its ends do not cool it, at its
// working temperature.
type Wire struct {
	Diameter    quantity.Length
	Temperature quantity.Temperature
	Emissivity  float64 // total hemispherical
	Resistivity quantity.Resistivity
}

// TungstenWire is a tungsten wire from 1500 to 3000 K; a lack elsewhere. The
// emissivities read (0.23 at 1700 K, 0.31 at 2500 K) agree within 5 %.
func TungstenWire(diameter quantity.Length, t quantity.Temperature) (Wire, error) {
	last := len(hotTungsten) - 1
	if !positive(diameter) || !inside(float64(t), hotTungsten[0].kelvin, hotTungsten[last].kelvin) {
		return Wire{}, lack.Range("tungsten wire is tabulated with a diameter above zero, from 1500 to 3000 K, not at %s", quantity.Text(t))
	}
	i := 1
	for i < last && float64(t) > hotTungsten[i].kelvin {
		i++
	}
	a, b := hotTungsten[i-1], hotTungsten[i]
	along := (float64(t) - a.kelvin) / (b.kelvin - a.kelvin)
	return Wire{diameter, t, a.emissivity + along*(b.emissivity-a.emissivity),
		quantity.Resistivity(a.resistivity + along*(b.resistivity-a.resistivity))}, nil
}

// hotTungsten is from memory of H. A. Jones and I. Langmuir, General Electric
// Review 30 (1927).
var hotTungsten = [...]struct{ kelvin, emissivity, resistivity float64 }{
	{1500, 0.192, 40.36e-8},
	{2000, 0.260, 56.67e-8},
	{2500, 0.303, 73.91e-8},
	{3000, 0.334, 92.04e-8},
}

// Current is what keeps the wire hot by radiation alone, I²ρ/A = π d ε σ T⁴ with A
// the cross-section. A hairpin whose legs end in cool posts needs more: a
// published 2.7 A for 100 µm stands against 1.7 A of this law.
func (w Wire) Current() (quantity.Current, error) {
	if !w.whole() {
		return 0, lack.Range("the long-wire law needs diameter, temperature, emissivity and resistivity above zero")
	}
	return quantity.Current(math.Sqrt(w.radiated() * w.section() / float64(w.Resistivity))), nil
}

func (w Wire) whole() bool {
	return positive(w.Diameter) && positive(w.Temperature) && positive(w.Emissivity) && positive(w.Resistivity)
}

// radiated is the power per length in watts per metre.
func (w Wire) radiated() float64 {
	return math.Pi * float64(w.Diameter) * w.Emissivity * stefanBoltzmann * math.Pow(float64(w.Temperature), 4)
}

// section is the cross-section in square metres.
func (w Wire) section() float64 { return math.Pi / 4 * float64(w.Diameter) * float64(w.Diameter) }

// currentToTemperature is d ln I/d ln T of a long tungsten wire (emissivity and
// resistivity rise with temperature); a hairpin with 5 mm legs has 1.0, one with
// 3 mm legs 0.57. Derived, material data from memory.
const currentToTemperature = 1.63

// ToHeaterCurrent is d ln J/d ln I_heater of a temperature-limited cathode on a
// long wire: the emitter's own sensitivity over 1.63. End-cooled hairpins are
// worse, up to threefold.
func (e Emitter) ToHeaterCurrent(t quantity.Temperature) (float64, error) {
	s, err := e.Sensitivity(t)
	return s / currentToTemperature, err
}

// heatCapacity is that of tungsten per volume, in joules per cubic metre and
// kelvin: 19.3 g/cm³ and 193 J/kg K near 2700 K, from memory; within a tenth from
// 2300 to 3000 K.
const heatCapacity = 19300 * 193

// TemperatureSwing is the amplitude by which alternating current of a frequency
// swings the temperature of a tungsten wire, at twice that frequency: P/(2ωC) of
// a long wire, from 2300 to 3000 K. A hairpin's swing is larger by the square of
// its current over the long wire's.
func (w Wire) TemperatureSwing(f quantity.Frequency) (quantity.TemperatureRise, error) {
	if !positive(f) || !w.whole() || !inside(float64(w.Temperature), 2300, 3000) {
		return 0, lack.Range("the swing of a heater's temperature is known for tungsten wire from 2300 to 3000 K and a frequency above zero")
	}
	omega := 2 * math.Pi * float64(f)
	return quantity.TemperatureRise(w.radiated() / (2 * omega * w.section() * heatCapacity)), nil
}

// SwingAt is TemperatureSwing of a filament that takes a current: larger by the square of
// it over the long wire's where it is the larger, since ends that are cooled ask for more.
// A current of zero is the long wire's own.
func (w Wire) SwingAt(f quantity.Frequency, current quantity.Current) (quantity.TemperatureRise, error) {
	swing, err := w.TemperatureSwing(f)
	if err != nil {
		return 0, err
	}
	long, err := w.Current()
	return swing * quantity.TemperatureRise(math.Pow(max(1, float64(current/long)), 2)), err
}

// HotResistance is that of a filament at its working voltage and current, V/I (Ohm), several
// times its cold one.
func HotResistance(v quantity.Voltage, i quantity.Current) quantity.Resistance {
	return quantity.Resistance(float64(v) / float64(i))
}
