package steady

import (
	"kilovet/hv/circuit"
	"kilovet/hv/parallel"
	"kilovet/hv/quantity"
)

// Opened is how a chain runs down with one part open.
type Opened struct {
	Element  string
	Slowest  Ending // of all nodes
	MostLeft Ending // of all capacitors
	Decay    *Decay
}

// DischargeWithOneOpen follows the decay anew with each diode and each permanent
// resistor open in turn, in the order of the circuit; of a resistor with several
// strings one string opens. What stays for ever is good to a part in a thousand;
// where all comes down the times are those of Discharge. A diode that carries nothing
// in the intact chain may as well be open.
func DischargeWithOneOpen(c *circuit.Circuit, from Voltages, limit quantity.Voltage) ([]Opened, error) {
	var names []string
	for _, e := range c.Elements {
		if e.Kind == circuit.Diode || e.Kind == circuit.Resistor && e.Permanent {
			names = append(names, e.Name)
		}
	}
	intact, err := Discharge(c, from, limit)
	if err != nil {
		return nil, err
	}
	all, errs := make([]Opened, len(names)), make([]error, len(names))
	parallel.Each(len(names), func(i int) {
		if intact.idle[names[i]] {
			all[i] = Opened{names[i], intact.Slowest(), intact.MostLeft(), intact}
			return
		}
		all[i], errs[i] = dischargeOpen(c, names[i], from, limit)
	})
	for _, err := range errs {
		if err != nil {
			return nil, err
		}
	}
	return all, nil
}

// dischargeOpen follows the decay with one part open. What stays is found with steps
// that pass over the single switchings of the diodes; the time it takes is not.
func dischargeOpen(c *circuit.Circuit, name string, from Voltages, limit quantity.Voltage) (Opened, error) {
	open := c.OpenString(name)
	d, err := discharge(open, from, limit, 0.1)
	if err != nil {
		return Opened{}, err
	}
	slowest := d.Slowest()
	if !slowest.Never || quantity.AtMost(magnitude(slowest.Rest), 1.05*limit) {
		if d, err = Discharge(open, from, limit); err != nil {
			return Opened{}, err
		}
		slowest = d.Slowest()
	}
	return Opened{name, slowest, d.MostLeft(), d}, nil
}
