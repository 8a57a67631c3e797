package cascade

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Supply is a cascade seen from its load: V = no-load voltage − output resistance × I,
// with V the mean. The line is the law of the charge balance, exact in it since
// every voltage of a stiff cascade is linear in I. It says nothing about its own
// range: check the current found with [Cascade.Loaded].
type Supply struct {
	NoLoad           quantity.Voltage
	OutputResistance quantity.Resistance
}

// Supply gives the line; output resistance = drop of the mean / I, which for
// equal capacitors is the polynomial of the package comment / (f C).
func (c Cascade) Supply() (Supply, error) {
	if err := c.solvable(0); err != nil {
		return Supply{}, err
	}
	return Supply{c.climb(0).NoLoad, quantity.Resistance(c.climb(1).Drop())}, nil
}

// Voltage is the mean output at a constant load current.
func (s Supply) Voltage(load quantity.Current) quantity.Voltage {
	return s.NoLoad - quantity.Voltage(float64(s.OutputResistance)*float64(load))
}

// Into is the current into a resistor from the output to ground: the load current
// is not given with a resistor, it follows from V = NoLoad R/(R + OutputResistance).
func (s Supply) Into(r quantity.Resistance) quantity.Current {
	return quantity.Current(float64(s.NoLoad) / float64(r+s.OutputResistance))
}

// PeakNeeded is the drive that holds the mean output at the load current:
// (output + I × output resistance)/(2N) + forward drop.
func (c Cascade) PeakNeeded(output quantity.Voltage, load quantity.Current) (quantity.Voltage, error) {
	if err := c.solvable(load); err != nil {
		return 0, err
	}
	if output <= 0 {
		return 0, lack.Range("the output asked of the cascade must be above zero")
	}
	c.Peak = (output+c.climb(load).Drop())/quantity.Voltage(2*c.Stages()) + c.ForwardDrop
	_, err := c.Loaded(load)
	return c.Peak, err
}

// InputPower is the mean power the drive gives. A sine charges without loss but in
// the diodes: load × (mean output + 2N forward drops), whatever the pulses' length.
// A square drive gives all charge, N q each half-period, at its peak: 2N peak × load;
// the drop is then lost in source and diode resistance, however small. Derived.
func (c Cascade) InputPower(load quantity.Current) (quantity.Power, error) {
	s, err := c.Loaded(load)
	if err != nil {
		return 0, err
	}
	diodes := quantity.Voltage(2 * c.Stages())
	volts := s.Output.Mean + diodes*c.ForwardDrop
	if c.Square {
		volts = diodes * c.Peak
	}
	return quantity.Power(float64(volts) * float64(load)), nil
}
