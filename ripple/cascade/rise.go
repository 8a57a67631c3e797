package cascade

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// RisePeriods is the number of drive periods in which the output of the discharged
// cascade without load first reaches a fraction of its no-load voltage, for an
// ideal source: full drive at once, beginning with the half-period that charges the
// first coupling capacitor. A sine comes within a quarter of a period; the
// capacitors charge by diffusion, so that for equal ones it takes about 4.5 N²
// periods to 95 %. A load on the way up, source resistance and capacitance after
// the cascade lengthen it (the latter by the output resistance times it).
//
// Derived, exact for ideal diodes: each half-period ends with the charges for
// which no diode conducts. A lack for symmetrical cascades.
func (c Cascade) RisePeriods(fraction float64) (float64, error) {
	if err := c.sound(); err != nil {
		return 0, err
	}
	if c.Symmetrical {
		return 0, lack.Range("the rise of a symmetrical cascade has no estimate by charge balance")
	}
	if !(fraction > 0 && fraction < 1) {
		return 0, lack.Range("the fraction of the output to rise to must lie between 0 and 1")
	}
	l := c.discharged()
	aim := quantity.Voltage(fraction*float64(c.Stages())) * c.rung()
	for k := range mostPeriods {
		l.negative()
		l.positive()
		if quantity.AtLeast(l.output(), aim) {
			return float64(k) + 0.5, nil
		}
	}
	return 0, lack.Failed("the output does not come up within %d periods", mostPeriods)
}

// RiseTime is [Cascade.RisePeriods] in time.
func (c Cascade) RiseTime(fraction float64) (quantity.Time, error) {
	n, err := c.RisePeriods(fraction)
	return quantity.Time(n / float64(c.Frequency)), err
}

const mostPeriods = 200_000

// ladder is a half-wave cascade between pulses: the voltages of its capacitors.
type ladder struct {
	c                   Cascade
	coupling, smoothing []float64
	gap, elastance      []float64 // of the loops that the diodes close
	charge              []float64 // through them
}

func (c Cascade) discharged() *ladder {
	n := c.Stages()
	list := make([]float64, 5*n)
	part := func(i int) []float64 { return list[i*n : (i+1)*n : (i+1)*n] }
	return &ladder{c, part(0), part(1), part(2), part(3), part(4)}
}

func (l *ladder) output() quantity.Voltage {
	var sum float64
	for _, v := range l.smoothing {
		sum += v
	}
	return quantity.Voltage(sum)
}

// positive brings the drive to its positive peak: charge moves from the coupling
// column through the even diodes to the smoothing column.
func (l *ladder) positive() {
	for k := range l.gap {
		l.gap[k] = l.coupling[k] - l.smoothing[k]
		l.elastance[k] = 1/float64(l.c.Coupling[k]) + 1/float64(l.c.Smoothing[k])
	}
	l.gap[0] += float64(l.c.Peak - l.c.ForwardDrop)
	flow(l.gap, l.elastance, l.charge)
	for k, q := range l.charge {
		l.coupling[k] -= q / float64(l.c.Coupling[k])
		l.smoothing[k] += q / float64(l.c.Smoothing[k])
	}
}

// negative brings the drive to its negative peak: charge moves from the smoothing
// column, one stage below, through the odd diodes to the coupling column.
func (l *ladder) negative() {
	l.gap[0] = float64(l.c.Peak-l.c.ForwardDrop) - l.coupling[0]
	l.elastance[0] = 1 / float64(l.c.Coupling[0])
	for k := 1; k < len(l.gap); k++ {
		l.gap[k] = l.smoothing[k-1] - l.coupling[k]
		l.elastance[k] = 1/float64(l.c.Coupling[k]) + 1/float64(l.c.Smoothing[k-1])
	}
	flow(l.gap, l.elastance, l.charge)
	for k, q := range l.charge {
		l.coupling[k] += q / float64(l.c.Coupling[k])
		if k > 0 {
			l.smoothing[k-1] -= q / float64(l.c.Smoothing[k-1])
		}
	}
}

// flow finds the charge through each loop of the column. What passes loop k comes
// through diodes k and above, so it cannot grow upwards nor be negative; where a
// diode would have to conduct backwards it blocks and the loops on its two sides
// share one charge. This is the minimum of the stored energy under that condition,
// found by pooling adjacent loops from the grounded end.
func flow(gap, elastance, charge []float64) {
	type pool struct{ gap, elastance float64 }
	pools, ends := make([]pool, 0, 64), make([]int, 0, 64)
	for k := range gap {
		p := pool{gap[k], elastance[k]}
		for i := len(pools) - 1; i >= 0 && pools[i].gap*p.elastance < p.gap*pools[i].elastance; i-- {
			p = pool{p.gap + pools[i].gap, p.elastance + pools[i].elastance}
			pools, ends = pools[:i], ends[:i]
		}
		pools, ends = append(pools, p), append(ends, k+1)
	}
	from := 0
	for i, p := range pools {
		for ; from < ends[i]; from++ {
			charge[from] = max(0, p.gap/p.elastance)
		}
	}
}
