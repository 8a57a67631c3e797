package steady

import (
	"errors"
	"math"
	"slices"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Figures the error of a divider rests on where the description has none of its own.
const (
	// RatedRise is the rise of a resistor at its rated power: from 70 to 155 degC,
	// the line along which power derates. Common practice, no source.
	RatedRise quantity.TemperatureRise = 85
	// ReferenceTemperature is that at which a resistor has its value, 25 degC:
	// common practice, no source.
	ReferenceTemperature quantity.Temperature = 298.15
)

// Share is what one arm adds to the relative error of its resistance.
type Share struct {
	Tolerance   quantity.Fraction
	Temperature quantity.Fraction // |temperature coefficient| · |T − 25 degC|
	Voltage     quantity.Fraction // |voltage coefficient| · voltage of an element
	// Elements is the temperature the elements reach; zero where no coefficient asks for it.
	Elements quantity.Temperature
}

// Sum is the linear sum of the share.
func (s Share) Sum() quantity.Fraction { return s.Tolerance + s.Temperature + s.Voltage }

// Budget is the worst-case error of a divider and where it comes from.
type Budget struct {
	Upper, Lower Share
	Total        quantity.Fraction // of the reading
}

// Budget sums the errors of both arms, linearly, and weighs them with 1 − 1/ratio:
// an arm that drifts alone moves the reading by so much of it. Elements are warmer
// than the air by their thermal resistance, or by 85 K at rated power. The lack
// names all keys that are missing.
func (d *Divider) Budget() (Budget, error) {
	ratio, err := d.Ratio()
	if err != nil {
		return Budget{}, err
	}
	loads, err := d.arms()
	if err != nil {
		return Budget{}, err
	}
	if len(loads) < 2 {
		return Budget{}, lack.Failed("an arm of the divider is open")
	}
	upper, errUpper := d.share(loads[0])
	lower, errLower := d.share(loads[1])
	weight := quantity.Fraction(1 - 1/ratio)
	return Budget{upper, lower, weight * (upper.Sum() + lower.Sum())}, joined(errUpper, errLower)
}

// share is the error of one arm at the voltage its elements bear.
func (d *Divider) share(l load) (s Share, err error) {
	r := l.part
	tolerance, e1 := r.Tolerance.Need()
	coefficient, e2 := r.TemperatureCoefficient.Need()
	perVolt, e3 := r.VoltageCoefficient.Need()
	var e4 error
	if coefficient != 0 {
		s.Elements, e4 = warmth(r, d.air, quantity.Power(l.power()))
	}
	s.Tolerance = tolerance
	s.Temperature = quantity.Fraction(math.Abs(float64(coefficient)) * math.Abs(float64(s.Elements-ReferenceTemperature)))
	s.Voltage = quantity.Fraction(math.Abs(float64(perVolt)) * float64(l.voltage))
	return s, joined(e1, e2, e3, e4)
}

// warmth is the temperature of an element that turns a power into heat.
func warmth(r *chain.Resistor, air document.Given[quantity.Temperature], p quantity.Power) (quantity.Temperature, error) {
	ambient, err := air.Need()
	if air.Key == "" && err != nil {
		err = lack.Key("site.air_temperature")
	}
	rise, errRise := Rise(r, p)
	return ambient + quantity.Temperature(rise), joined(err, errRise)
}

// Rise is how much warmer than its surroundings an element is that turns a power
// into heat: thermal resistance × power where given, else 85 K × power/rated power.
// The lack names rated power where both are missing.
func Rise(r *chain.Resistor, p quantity.Power) (quantity.TemperatureRise, error) {
	if r.ThermalResistance.Set() {
		return quantity.TemperatureRise(float64(r.ThermalResistance.V) * float64(p)), nil
	}
	rated, err := r.RatedPower.Need()
	if err != nil {
		return 0, err
	}
	return RatedRise * quantity.TemperatureRise(p/rated), nil
}

// joined is one lack that names the keys of all; nil where there is none.
func joined(errs ...error) error {
	var keys []string
	for _, err := range errs {
		if err == nil {
			continue
		}
		l := lack.Of(err)
		if l == nil || l.Kind != lack.Missing {
			return errors.Join(errs...)
		}
		for _, key := range l.Keys {
			if !slices.Contains(keys, key) {
				keys = append(keys, key)
			}
		}
	}
	if keys == nil {
		return nil
	}
	return lack.Key(keys...)
}

// Drift is by how much the held voltage moves, relatively, when the air at the divider
// changes by so much: |temperature coefficient| of both arms, taken to oppose each other,
// weighed as in Budget. A regulated output goes with it.
func (d *Divider) Drift(change quantity.TemperatureRise) (quantity.Fraction, error) {
	ratio, err := d.Ratio()
	if err != nil {
		return 0, err
	}
	upper, e1 := d.part.Upper.TemperatureCoefficient.Need()
	lower, e2 := d.part.Lower.TemperatureCoefficient.Need()
	sum := math.Abs(float64(upper)) + math.Abs(float64(lower))
	return quantity.Fraction((1 - 1/ratio) * sum * float64(change)), joined(e1, e2)
}
