package cascade

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Swing is how a voltage moves over a period of the drive, after the pulses.
type Swing struct{ Mean, Maximum, Minimum quantity.Voltage }

// State is the steady state of a cascade under a constant load current.
type State struct {
	NoLoad quantity.Voltage
	Output Swing // top of the smoothing column

	Nodes      []Swing            // stage.k to ground
	Smoothing  []Swing            // across each smoothing capacitor
	CouplingDC []quantity.Voltage // mean of coupling.k to ground
	Coupling   []Swing            // across each coupling capacitor
	// DiodeReverse is the peak reverse voltage of diodes 1 … 2N, without overshoot.
	DiodeReverse []quantity.Voltage

	Ripple Waveform // of the output
	// Column is what the top of the coupling column, coupling.N, moves by besides the
	// drive: its alternating voltage is the drive plus this. The columns of a
	// symmetrical cascade do so in opposite halves.
	Column Waveform
}

// Drop is what the mean output lies below the no-load voltage.
func (s State) Drop() quantity.Voltage { return s.NoLoad - s.Output.Mean }

// DropOfMaximum is what the largest output lies below the no-load voltage.
func (s State) DropOfMaximum() quantity.Voltage { return s.NoLoad - s.Output.Maximum }

// DropOfMinimum is what the smallest output lies below the no-load voltage.
func (s State) DropOfMinimum() quantity.Voltage { return s.NoLoad - s.Output.Minimum }

// Limits of the charge balance, from the comparison in time that the package
// comment shows: within both it overstates the ripple of a sine drive by at most a
// third and the drop by at most an eighth (a quarter, where the coupling capacitors
// are much the larger); beyond, the error grows steeply.
const (
	// LargestSwing limits (I/f) (1/C coupling + 1/C smoothing)/2 of any stage, as a
	// fraction of the peak of a sine drive. Of a symmetrical cascade, whose columns
	// must cancel, it is divided by N^1.5.
	LargestSwing = 0.3
	// LargestDrop limits the drop of the mean as a fraction of the no-load voltage.
	// Beyond two thirds the top stages of a long ladder would have no voltage left.
	LargestDrop = 0.6
)

// Loaded is the steady state under the constant current load: magnitude, at the
// top of the smoothing column.
//
// It holds for a stiff source without strays; what it leaves out is told by
// [Cascade.SourceDrop] and [Cascade.StrayDrop]. A lack is returned for a square
// drive with unequal capacitors and beyond [LargestSwing] and [LargestDrop].
func (c Cascade) Loaded(load quantity.Current) (State, error) {
	if err := c.solvable(load); err != nil {
		return State{}, err
	}
	s := c.climb(load)
	if err := c.within(load, s); err != nil {
		return State{}, err
	}
	return s, nil
}

func (c Cascade) solvable(load quantity.Current) error {
	if err := c.sound(); err != nil {
		return err
	}
	if !(load >= 0) || math.IsInf(float64(load), 0) {
		return lack.Range("the load current must be a magnitude; a cascade cannot take current back")
	}
	if _, err := c.equal(); c.Square && err != nil {
		return lack.Range("charge balance with a square drive is worked out for equal capacitors only")
	}
	return nil
}

// within refuses a state outside the model.
func (c Cascade) within(load quantity.Current, s State) error {
	if limit := c.largestSwing(); !c.Square && !quantity.AtMost(c.swing(load), limit) {
		return lack.Range("one period's load moves capacitors by %s, more than %s at the %s peak of the drive: the charging pulses are too long for charge balance",
			quantity.Text(c.swing(load)), quantity.Text(limit), quantity.Text(c.Peak))
	}
	if s.lowest() <= 0 && quantity.AtMost(s.Drop(), LargestDrop*s.NoLoad) {
		return lack.Range("the load would empty a capacitor of the cascade: there charge balance fails")
	}
	if !quantity.AtMost(s.Drop(), LargestDrop*s.NoLoad) {
		return lack.Range("the load would take %s of the %s the cascade gives without load: beyond %g of it charge balance fails",
			quantity.Text(s.Drop()), quantity.Text(s.NoLoad), LargestDrop)
	}
	return nil
}

func (c Cascade) largestSwing() quantity.Voltage {
	if c.Symmetrical {
		return c.Peak * quantity.Voltage(LargestSwing*math.Pow(float64(c.Stages()), -1.5))
	}
	return LargestSwing * c.Peak
}

// swing is the largest movement of a stage's capacitors by one period's load.
func (c Cascade) swing(load quantity.Current) quantity.Voltage {
	var most quantity.Voltage
	for k := range c.Smoothing {
		most = max(most, (c.perPeriod(load, c.Coupling[k])+c.perPeriod(load, c.Smoothing[k]))/2)
	}
	return most
}

// lowest is the smallest voltage any capacitor falls to.
func (s State) lowest() quantity.Voltage {
	low := s.NoLoad
	for k := range s.Smoothing {
		low = min(low, s.Smoothing[k].Minimum, s.Coupling[k].Minimum)
	}
	return low
}

// perPeriod is what the load takes from a capacitor in a period, I/(f C).
func (c Cascade) perPeriod(load quantity.Current, of quantity.Capacitance) quantity.Voltage {
	return quantity.Voltage(float64(load) / (float64(c.Frequency) * float64(of)))
}

// climb sums the voltages up from the grounded end. After the pulse at the
// positive peak coupling.k = stage.k + forward drop, so both capacitors of a stage
// carry the same voltage (the first coupling capacitor lacks the peak); after the
// pulse at the negative peak coupling.k = stage.k−1 − forward drop, so a coupling
// capacitor is filled to the smoothing capacitor below it. Derived; for equal
// capacitors the sums are the polynomials of the package comment.
func (c Cascade) climb(load quantity.Current) State {
	n := c.Stages()
	s := State{NoLoad: quantity.Voltage(n) * c.rung()}
	filled := c.Peak - c.ForwardDrop // the coupling capacitor, after the negative peak
	source := filled                 // what the drive adds at the positive peak, stage 1 only
	var top, column Waveform         // stage.k and coupling.k against their values after the positive peak
	var high, direct quantity.Voltage
	for k := range n {
		b := c.balance(float64(n - k))
		qp, qs := c.perPeriod(load, c.Coupling[k]), c.perPeriod(load, c.Smoothing[k])
		drawn, held := quantity.Voltage(b.pulse)*qp, quantity.Voltage(b.hold)*qp
		after := filled - drawn + source // the smoothing capacitor, after the positive peak
		own := wave(b, qs)
		low := after - own.First - own.Fall // the same, after the negative peak

		high += after
		top = top.plus(own)
		s.Smoothing = append(s.Smoothing, own.above(after))
		s.Nodes = append(s.Nodes, top.above(high))
		s.Coupling = append(s.Coupling, Swing{filled - (drawn+held/2)/2, filled, filled - drawn - held})
		column = column.plus(Waveform{Rise: -drawn, First: held, Fall: -drawn - held})
		direct += s.Coupling[k].Mean
		s.CouplingDC = append(s.CouplingDC, direct)
		s.DiodeReverse = append(s.DiodeReverse, after+c.ForwardDrop, low+c.ForwardDrop)
		filled, source = low, 0
	}
	top.Period, column.Period = period(c.Frequency), period(c.Frequency)
	s.Ripple, s.Column, s.Output = top, column, s.Nodes[n-1]
	return s
}

func period(f quantity.Frequency) quantity.Time { return quantity.Time(1 / float64(f)) }
