package evidence

import (
	"fmt"
	"slices"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// knob is one value of the chain that ripple depends on.
type knob struct {
	name string
	unit string // SI
	now  float64
	more bool // more of it means less ripple
	// steep is set where ripple may go with more than the first power of the value.
	steep bool
	set   func(c *chain.Chain, factor float64)
}

// knobs lists what could be changed against ripple: filter resistors and capacitors, drive
// frequency, the capacitors of the multiplier, and the pickup past the filter.
func (e *Evidence) knobs() []knob {
	var all []knob
	c := e.chain
	for i := range c.Filters {
		all = append(all, filterResistor(c, i))
		if c.Filters[i].Capacitor != nil {
			all = append(all, filterCapacitor(c, i))
		}
	}
	all = append(all,
		knob{"drive.frequency", "Hz", float64(c.Drive.Frequency.V), true, true, func(c *chain.Chain, f float64) {
			drive := *c.Drive
			drive.Frequency.V *= quantity.Frequency(f)
			c.Drive = &drive
		}},
		knob{"multiplier capacitors", "F", float64(c.Multiplier.SmoothingCapacitor.Value.V[0]), true, false, func(c *chain.Chain, f float64) {
			m := *c.Multiplier
			m.CouplingCapacitor, m.SmoothingCapacitor = scaled(m.CouplingCapacitor, f), scaled(m.SmoothingCapacitor, f)
			c.Multiplier = &m
		}})
	if p := c.Multiplier.PickupToOutput; p.V > 0 {
		all = append(all, knob{"multiplier.pickup_to_output", "F", float64(p.V), false, false, func(c *chain.Chain, f float64) {
			m := *c.Multiplier
			m.PickupToOutput.V *= quantity.Capacitance(f)
			c.Multiplier = &m
		}})
	}
	return all
}

func filterResistor(c *chain.Chain, i int) knob {
	return knob{fmt.Sprintf("filter.%d.resistor", i+1), "ohm", float64(c.Filters[i].Resistor.Total()), true, false, func(c *chain.Chain, f float64) {
		c.Filters = slices.Clone(c.Filters)
		r := *c.Filters[i].Resistor
		r.Value.V *= quantity.Resistance(f)
		c.Filters[i].Resistor = &r
	}}
}

func filterCapacitor(c *chain.Chain, i int) knob {
	return knob{fmt.Sprintf("filter.%d.capacitor", i+1), "F", float64(c.Filters[i].Capacitor.Value.V[0]), true, false, func(c *chain.Chain, f float64) {
		c.Filters = slices.Clone(c.Filters)
		c.Filters[i].Capacitor = scaled(c.Filters[i].Capacitor, f)
	}}
}

// scaled is a capacitor of so many times the capacitance.
func scaled(c *chain.Capacitor, factor float64) *chain.Capacitor {
	with := *c
	for _, list := range []*document.Given[[]quantity.Capacitance]{&with.Value, &with.ValueAtVoltage} {
		list.V = slices.Clone(list.V)
		for i := range list.V {
			list.V[i] *= quantity.Capacitance(factor)
		}
	}
	return &with
}
