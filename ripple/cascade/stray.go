package cascade

import (
	"math"

	"gonum.org/v1/gonum/mat"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// NoLoadWithStrays is the output without load and leakage, with the stray and
// junction capacitances: its mean and, since nothing smooths it, the alternating
// part the strays carry to the top.
//
// The strays draw current from the coupling column at any frequency, so that the
// drive reaches the upper diodes weakened. In the steady state no diode passes
// charge: the ladder is a network of capacitors that divides the drive, and each
// diode has charged what it stands between to the amplitude across it, less the
// forward drop. The output is the sum over all diodes. Exact for a stiff drive of
// either shape and any capacitors; for equal ones with strays across the diodes
// alone it is [DiscreteEfficiency]. A ladder once charged higher stays higher, as
// nothing discharges it. Derived; the loss was first treated by E. Everhart and
// P. Lorrain, Rev. Sci. Instrum. 24 (1953) 221 (abstract read).
func (c Cascade) NoLoadWithStrays() (Swing, error) {
	if err := c.sound(); err != nil {
		return Swing{}, err
	}
	if c.Junction < 0 || c.BetweenColumns < 0 || c.ToGround < 0 {
		return Swing{}, lack.Range("a stray capacitance must not be below zero")
	}
	coupling, stage, err := c.divided()
	if err != nil {
		return Swing{}, err
	}
	var mean, below quantity.Voltage
	for k := range coupling {
		odd, even := coupling[k]-below, coupling[k]-stage[k]
		mean += max(0, abs(odd)-c.ForwardDrop) + max(0, abs(even)-c.ForwardDrop)
		below = stage[k]
	}
	return Swing{mean, mean + abs(below), mean - abs(below)}, nil
}

func abs(v quantity.Voltage) quantity.Voltage { return quantity.Voltage(math.Abs(float64(v))) }

// divided gives the alternating amplitudes (zero to peak, with sign) at coupling.k
// and stage.k of the ladder as a network of capacitors. A symmetrical cascade's
// halves cancel at every stage.k.
func (c Cascade) divided() (coupling, stage []quantity.Voltage, err error) {
	n := c.Stages()
	matrix, drive := c.capacitances()
	var factor mat.BandCholesky
	var volts mat.VecDense
	if !factor.Factorize(matrix) || factor.SolveVecTo(&volts, drive) != nil {
		return nil, nil, lack.Failed("the network of stray capacitances has no solution")
	}
	for k := range n {
		coupling = append(coupling, quantity.Voltage(volts.AtVec(2*k)))
		stage = append(stage, quantity.Voltage(volts.AtVec(2*k+1)))
	}
	return coupling, stage, nil
}

// capacitances is the nodal matrix of the ladder, coupling.k in row 2k−2, stage.k
// in row 2k−1 (from zero), and the charge the drive injects.
func (c Cascade) capacitances() (*mat.SymBandDense, *mat.VecDense) {
	n := c.Stages()
	m, drive := mat.NewSymBandDense(2*n, min(2, 2*n-1), nil), mat.NewVecDense(2*n, nil)
	at := func(i, j int, value float64) { m.SetSymBand(i, j, m.At(i, j)+value) }
	between := func(i, j int, value quantity.Capacitance) {
		low, high := c.atRest(min(i, j)), c.atRest(max(i, j))
		if !low {
			at(min(i, j), min(i, j), float64(value))
		}
		if !high {
			at(max(i, j), max(i, j), float64(value))
		}
		if !low && !high {
			at(min(i, j), max(i, j), -float64(value))
		}
	}
	for k := range n {
		coupling, stage := 2*k, 2*k+1
		between(coupling, coupling-2, c.Coupling[k])
		between(stage, stage-2, c.Smoothing[k])
		between(coupling, stage-2, c.Junction)
		between(coupling, stage, c.Junction+c.BetweenColumns)
		between(stage, -1, c.ToGround)
		if c.atRest(stage) {
			at(stage, stage, 1) // a row of its own: no voltage
		}
	}
	drive.SetVec(0, float64(c.Coupling[0])*float64(c.Peak))
	return m, drive
}

// atRest reports whether a row's voltage is given: ground, the drive (its charge is
// injected instead), and every stage.k of a symmetrical cascade.
func (c Cascade) atRest(row int) bool { return row < 0 || c.Symmetrical && row%2 == 1 }

// DiscreteEfficiency is output over 2N peak without load for equal capacitors C
// with the capacitance ratio × C across every diode, and no other strays:
// cosh t = 1 + ratio/2, sinh 2Nt / [4N sinh(t/2) cosh((2N+1/2)t)]. Derived, exact;
// forward drops not counted.
func DiscreteEfficiency(stages int, ratio float64) float64 {
	if ratio == 0 {
		return 1
	}
	n, t := float64(stages), math.Acosh(1+ratio/2)
	// sinh 2nt / cosh (2n+1/2)t, without overflow
	quotient := math.Exp(-t/2) * -math.Expm1(-4*n*t) / (1 + math.Exp(-(4*n+1)*t))
	return quotient / (4 * n * math.Sinh(t/2))
}

// ContinuousEfficiency is the form of the transmission line, tanh x / x with
// x = 2N √ratio (E. Everhart and P. Lorrain 1953, from memory). It is optimistic
// by 1 to 5 % for up to ten stages and small losses; [DiscreteEfficiency] is exact.
func ContinuousEfficiency(stages int, ratio float64) float64 {
	x := 2 * float64(stages) * math.Sqrt(ratio)
	if x == 0 {
		return 1
	}
	return math.Tanh(x) / x
}
