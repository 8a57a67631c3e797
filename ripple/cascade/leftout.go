package cascade

import (
	"fmt"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// StiffBelow is the R f C up to which a source counts as stiff: there, at
// q/(C peak) = 0.01, source resistance raises the drop of one stage by 1 % (17 % at
// R f C = 0.01) and of three stages by 0.2 % (own computation in time, derived).
// The lighter the load, the larger the share; on long ladders broader pulses may
// even lower the drop a little.
const StiffBelow = 0.001

// Stiffness is R f C: the resistance of source and diode against the largest
// capacitor of the ladder in a period.
func (c Cascade) Stiffness() float64 {
	var largest quantity.Capacitance
	for k := range c.Smoothing {
		largest = max(largest, c.Smoothing[k], c.Coupling[k])
	}
	return float64(c.SourceResistance+c.DiodeResistance) * float64(c.Frequency) * float64(largest)
}

// strays reports whether any stray or junction capacitance is there.
func (c Cascade) strays() bool { return c.Junction+c.BetweenColumns+c.ToGround > 0 }

// Assumption is something that is there and that the charge balance leaves out.
type Assumption struct {
	Of   string // "source resistance"
	Text string // what is computed instead, one sentence
}

// Assumptions lists what [Cascade.Loaded] leaves out: source and diode resistance
// above [StiffBelow], any leakage inductance (no closed form is known; it can raise
// or lower the output), any stray capacitance and any unbalance of a symmetrical drive.
func (c Cascade) Assumptions() []Assumption {
	var list []Assumption
	if r := c.Stiffness(); !quantity.AtMost(r, StiffBelow) {
		list = append(list, Assumption{"source resistance",
			fmt.Sprintf("computed for a stiff source; with source and diode resistance R f C is %s, stiff is up to %g", quantity.Significant(r), StiffBelow)})
	}
	if c.Inductance > 0 {
		list = append(list, Assumption{"leakage inductance",
			"computed without leakage inductance; it can raise or lower the output"})
	}
	if c.strays() {
		list = append(list, Assumption{"stray capacitance",
			"computed without stray and junction capacitance, which lower the output of long ladders most"})
	}
	if c.Symmetrical && c.Unbalance != 0 {
		list = append(list, Assumption{"unbalance",
			"computed for balanced halves; an unbalance brings ripple at the drive frequency, of the half-wave kind"})
	}
	return list
}

// SourceDrop is what resistance and inductance of the source and resistance of the
// diodes take from the mean output: zero without load, and zero for a stiff source,
// which up to [StiffBelow] means within about 1 % of the load's own drop; else a
// lack, since no closed form exists.
func (c Cascade) SourceDrop(load quantity.Current) (quantity.Voltage, error) {
	if err := c.solvable(load); err != nil {
		return 0, err
	}
	stiff := quantity.AtMost(c.Stiffness(), StiffBelow) && c.Inductance == 0
	if stiff || load == 0 && !c.strays() {
		return 0, nil
	}
	return 0, lack.Failed("the drop by source resistance and leakage inductance has no closed form; it needs the network in time")
}

// StrayDrop is what stray and junction capacitances take from the mean output:
// zero without them; without load as [Cascade.NoLoadWithStrays]; under load a lack,
// since no closed form joins the two.
func (c Cascade) StrayDrop(load quantity.Current) (quantity.Voltage, error) {
	if err := c.solvable(load); err != nil || !c.strays() {
		return 0, err
	}
	if load > 0 {
		return 0, lack.Failed("the drop by stray capacitance under load has no closed form; it needs the network in time")
	}
	s, err := c.NoLoadWithStrays()
	return c.climb(0).NoLoad - s.Mean, err
}
