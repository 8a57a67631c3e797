package steady

import (
	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
)

// Opened is how a chain runs down with one part open.
type Opened struct {
	Element  string
	Slowest  Ending // of all nodes
	MostLeft Ending // of all capacitors
}

// DischargeWithOneOpen follows the decay anew with each diode and each permanent
// resistor open in turn, in the order of the circuit; of a resistor with several
// strings one string opens.
func DischargeWithOneOpen(c *circuit.Circuit, from Voltages, limit quantity.Voltage) ([]Opened, error) {
	var all []Opened
	for _, e := range c.Elements {
		if e.Kind != circuit.Diode && (e.Kind != circuit.Resistor || !e.Permanent) {
			continue
		}
		d, err := Discharge(c.OpenString(e.Name), from, limit)
		if err != nil {
			return nil, err
		}
		all = append(all, Opened{e.Name, d.Slowest(), d.MostLeft()})
	}
	return all, nil
}
