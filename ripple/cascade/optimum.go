package cascade

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Optimum is the number of stages that gives the most output at a load. More
// stages give less; it is not the number of least ripple or relative drop.
type Optimum struct {
	Stages    int     // whole number with the largest mean output
	Unrounded float64 // where the mean output has its maximum

	// The usual short form √(peak f C/I), from the leading term of the drop alone.
	// Books round it either way; here to the whole number of more output by that form.
	ShortStages    int
	ShortUnrounded float64

	Mean quantity.Voltage // mean output with Stages
}

// cubic is a drop of the mean a n³ + b n² + c n, in q/C.
type cubic struct{ a, b, c float64 }

func (p cubic) at(n float64) float64 { return ((p.a*n+p.b)*n + p.c) * n }

// meanDrop is the drop of the mean for equal capacitors. Derived by charge balance;
// see the package comment.
func (c Cascade) meanDrop() cubic {
	switch {
	case c.Symmetrical && c.Square:
		return cubic{1. / 6, 1. / 8, 1. / 12}
	case c.Symmetrical:
		return cubic{1. / 6, 1. / 4, 1. / 3}
	case c.Square:
		return cubic{2. / 3, 1. / 4, 7. / 48}
	default:
		return cubic{2. / 3, 1. / 2, 1. / 3}
	}
}

// StagesForMostOutput finds the number of stages with the largest mean output for
// the capacitance, drive and load of the cascade, whatever its own number of
// stages. A lack for unequal capacitors, for no load (the output then grows without
// limit), for one with which a thousand stages would be too few, and where one period's
// load moves a capacitor by more than [LargestSwing] of the peak, so that not even one
// stage could be computed.
func (c Cascade) StagesForMostOutput(load quantity.Current) (Optimum, error) {
	if err := c.solvable(load); err != nil {
		return Optimum{}, err
	}
	each, err := c.equal()
	if err != nil {
		return Optimum{}, err
	}
	if load == 0 {
		return Optimum{}, lack.Range("without load every further stage adds to the output")
	}
	step := c.perPeriod(load, each)
	if !quantity.AtMost(step, LargestSwing*c.Peak) {
		return Optimum{}, lack.Range("one period's load moves a capacitor by %s, more than %g of the %s peak: no number of stages helps",
			quantity.Text(step), LargestSwing, quantity.Text(c.Peak))
	}
	most := c.most(step)
	if most.Stages > mostStages {
		return Optimum{}, lack.Range("with so little load every further stage up to %d adds to the output", mostStages)
	}
	return most, nil
}

// mostStages is the number of stages up to which an answer says something: past it strays, which
// the closed form leaves out, decide (common practice, no source), and a load that is rounding
// would be answered with millions.
const mostStages = 1000

func (c Cascade) most(step quantity.Voltage) Optimum {
	rung := float64(c.rung() / step)
	full := c.meanDrop()
	short := cubic{a: full.a}
	o := Optimum{Unrounded: full.peak(rung), ShortUnrounded: short.peak(rung)}
	o.Stages, o.ShortStages = full.whole(rung), short.whole(rung)
	n := float64(o.Stages)
	o.Mean = step * quantity.Voltage(rung*n-full.at(n))
	return o
}

// peak is where rung × n − drop has its maximum: 3 a n² + 2 b n + c = rung.
func (p cubic) peak(rung float64) float64 {
	return (math.Sqrt(p.b*p.b+3*p.a*(rung-p.c)) - p.b) / (3 * p.a)
}

// whole is the better of the two whole numbers about the maximum.
func (p cubic) whole(rung float64) int {
	low := max(1, math.Floor(p.peak(rung)))
	if rung*(low+1)-p.at(low+1) > rung*low-p.at(low) {
		return int(low) + 1
	}
	return int(low)
}
