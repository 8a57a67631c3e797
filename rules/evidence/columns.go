package evidence

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/ripple/cascade"
)

// columns takes the capacitors of a cascade from the circuit, tolerance corner and
// value at voltage included.
func (e *Evidence) columns(c *cascade.Cascade) error {
	built := e.Layout()
	if err := built.Doubt(); err != nil {
		return err
	}
	column := "multiplier.coupling_capacitor"
	if c.Symmetrical {
		column += ".a"
	}
	scale := e.corner()
	value := func(name string) quantity.Capacitance {
		el := built.Element(name)
		if scale == nil {
			return el.Capacitance
		}
		return el.Capacitance * quantity.Capacitance(scale(name, el.CapacitorPart.Tolerance.V))
	}
	for k := 1; k <= e.chain.Multiplier.Stages.V; k++ {
		c.Coupling = append(c.Coupling, value(fmt.Sprintf("%s.%d", column, k)))
		c.Smoothing = append(c.Smoothing, value(fmt.Sprintf("multiplier.smoothing_capacitor.%d", k)))
	}
	return nil
}
