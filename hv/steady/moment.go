package steady

import (
	"math"

	"kilovet/hv/quantity"
)

// InTheEnd is the time at which nothing moves any more.
var InTheEnd = quantity.Time(math.Inf(1))

// AtTime is the potential of a node at a time, linear between those that the decay was
// followed at; from the last of them on it stays.
func (d *Decay) AtTime(node string, t quantity.Time) (quantity.Voltage, error) {
	v, err := d.At(node)
	if err != nil {
		return 0, err
	}
	for i := 1; i < len(v); i++ {
		if from, to := d.Times[i-1], d.Times[i]; t < to && to > from {
			along := quantity.Voltage((max(t, from) - from) / (to - from))
			return v[i-1] + (v[i]-v[i-1])*along, nil
		}
	}
	return v[len(v)-1], nil
}
