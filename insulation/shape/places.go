package shape

import (
	"math"
	"slices"

	"kilovet/hv/quantity"
)

// Places are the fields along the line at a voltage across it, from the more highly
// stressed electrode to the other, twice that many steps or fewer: they lie closest at the
// electrodes, within what the field falls over there.
func (l Line) Places(v quantity.Voltage, steps int) []Sample {
	along := crowded(l.radius, l.trough, steps)
	if l.trough < l.gap {
		far := crowded(l.radius, l.gap-l.trough, steps)
		slices.Reverse(far)
		for _, x := range far[1:] {
			along = append(along, l.gap-x)
		}
	}
	all := make([]Sample, len(along))
	for i, x := range along {
		all[i] = Sample{Along: x, Field: quantity.Field(float64(l.PerVolt(x)) * float64(v))}
	}
	return all
}

// crowded are places from 0 to a length, their steps growing with the distance from 0 past
// a radius.
func crowded(radius, length quantity.Length, steps int) []quantity.Length {
	all := make([]quantity.Length, steps+1)
	top := math.Log1p(float64(length / radius))
	for k := range all {
		all[k] = radius * quantity.Length(math.Expm1(top*float64(k)/float64(steps)))
	}
	all[steps] = length // not beyond by rounding
	return all
}
