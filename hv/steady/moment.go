package steady

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// InTheEnd is the time at which nothing moves any more.
var InTheEnd = quantity.Time(math.Inf(1))

// AtTime is the potential of a node at a time; from the last that the decay was followed at
// on it stays.
func (d *Decay) AtTime(node string, t quantity.Time) (quantity.Voltage, error) {
	n, there := d.circuit.Node(node)
	if !there {
		return 0, lack.Failed("there is no node %s", node)
	}
	voltage := func(v Voltages) quantity.Voltage { return v[n] }
	for i := 1; i < len(d.Times); i++ {
		if from, to := d.Times[i-1], d.Times[i]; t < to && to > from {
			s := d.stretch(i-1, voltage)
			return quantity.Voltage(s.at(float64((max(t, from) - from) / (to - from)))), nil
		}
	}
	return voltage(d.history[len(d.history)-1]), nil
}
