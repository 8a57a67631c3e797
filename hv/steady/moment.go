package steady

import (
	"math"

	"kilovet/hv/quantity"
)

// InTheEnd is the time at which nothing moves any more.
var InTheEnd = quantity.Time(math.Inf(1))

// AtTime is the potential of a node at a time, between those that the decay was followed at
// as an exponential, across zero as a line; from the last of them on it stays.
func (d *Decay) AtTime(node string, t quantity.Time) (quantity.Voltage, error) {
	v, err := d.At(node)
	if err != nil {
		return 0, err
	}
	for i := 1; i < len(v); i++ {
		if from, to := d.Times[i-1], d.Times[i]; t < to && to > from {
			return falling(v[i-1], v[i], float64((max(t, from)-from)/(to-from))), nil
		}
	}
	return v[len(v)-1], nil
}

// falling is between two voltages, a part of the way along.
func falling(a, b quantity.Voltage, along float64) quantity.Voltage {
	if ratio := float64(b / a); ratio > 0 {
		return a * quantity.Voltage(math.Pow(ratio, along))
	}
	return a + (b-a)*quantity.Voltage(along)
}
