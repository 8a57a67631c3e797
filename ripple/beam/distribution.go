package beam

import (
	"math"
	"sort"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Distribution is how the energies of the electrons lie about their mean. Its zero
// value has no width. It is never changed once made.
type Distribution struct {
	table *table
	unit  float64 // electronvolts per unit of the table
}

// table is a distribution of mean zero, by its cumulative probability c at rising
// x, uniform between the nodes; where an x stands twice, the step is probability
// at that one value. Between the nodes it is approximate; what is known exactly
// stands beside it.
type table struct {
	x, c     []float64
	variance float64
	full     float64 // full width; +Inf where there are tails
	fwhm     float64 // 0 where it is not known beforehand
	bounded  bool    // whether the density is finite everywhere
}

// Scaled is the distribution with all widths multiplied by a factor of zero or more.
func (d Distribution) Scaled(factor float64) Distribution {
	if !notNegative(factor) {
		panic("beam: distribution scaled by a negative factor")
	}
	d.unit *= factor
	return d
}

// narrow reports whether the distribution has no width at all.
func (d Distribution) narrow() bool { return d.table == nil || d.unit == 0 }

// RMS is the standard deviation.
func (d Distribution) RMS() quantity.ElectronEnergy {
	return quantity.ElectronEnergy(math.Sqrt(d.variance()))
}

func (d Distribution) variance() float64 {
	if d.narrow() {
		return 0
	}
	return d.table.variance * d.unit * d.unit
}

// FW50 is the width of the central half, from 25 to 75 % of the electrons. Where a
// level is held over a range of energies (a square wave of 1:3) the wider reading
// is taken.
func (d Distribution) FW50() quantity.ElectronEnergy {
	if d.narrow() {
		return 0
	}
	return quantity.ElectronEnergy(d.unit * (d.table.above(0.75) - d.table.below(0.25)))
}

// rounding is what a cumulative probability may be off by.
const rounding = 1e-12

// below is the least x with a cumulative probability of q.
func (t *table) below(q float64) float64 {
	i := sort.Search(len(t.c), func(i int) bool { return t.c[i] >= q-rounding })
	return t.cross(max(i-1, 0), q)
}

// above is the largest x with a cumulative probability of q.
func (t *table) above(q float64) float64 {
	i := sort.Search(len(t.c), func(i int) bool { return t.c[i] > q+rounding })
	return t.cross(max(i-1, 0), q)
}

// cross is where the cell after node i passes q.
func (t *table) cross(i int, q float64) float64 {
	step := t.c[i+1] - t.c[i]
	if step == 0 {
		return t.x[i+1]
	}
	along := min(max((q-t.c[i])/step, 0), 1)
	return t.x[i] + along*(t.x[i+1]-t.x[i])
}

// FullWidth is from the least to the greatest energy; a lack where there are tails.
func (d Distribution) FullWidth() (quantity.ElectronEnergy, error) {
	switch {
	case d.narrow():
		return 0, nil
	case math.IsInf(d.table.full, 1):
		return 0, lack.Range("a distribution with tails has no full width")
	}
	return quantity.ElectronEnergy(d.unit * d.table.full), nil
}

// FWHM is the full width at half maximum; a lack where there is none, since the
// density has no greatest value (a sine's ends) or has several peaks.
func (d Distribution) FWHM() (quantity.ElectronEnergy, error) {
	switch {
	case d.narrow():
		return 0, nil
	case !d.table.bounded:
		return 0, lack.Range("the distribution of a wave-form that dwells at its turns has no width at half maximum")
	case d.table.fwhm > 0:
		return quantity.ElectronEnergy(d.unit * d.table.fwhm), nil
	}
	width, ok := d.table.halfMaximum()
	if !ok {
		return 0, lack.Range("a distribution with several peaks has no width at half maximum")
	}
	return quantity.ElectronEnergy(d.unit * width), nil
}

// halfMaximum reads the width at half the greatest density off the even cells of a
// convolution; ok where only one stretch is above.
func (t *table) halfMaximum() (width float64, ok bool) {
	density := func(i int) float64 { return t.c[i+1] - t.c[i] }
	cells, most := len(t.c)-1, 0.0
	for i := range cells {
		most = max(most, density(i))
	}
	var crossings []float64
	for i := 1; i < cells; i++ {
		a, b := density(i-1)-most/2, density(i)-most/2
		if (a >= 0) != (b >= 0) {
			middle := (t.x[i-1] + t.x[i]) / 2
			crossings = append(crossings, middle+a/(a-b)*(t.x[i+1]-t.x[i]))
		}
	}
	if len(crossings) != 2 {
		return 0, false
	}
	return crossings[1] - crossings[0], true
}
