// Package insulation says what a gap or surface needs and what it stands: the
// clearance and creepage that the printed tables ask for, the peak field of its shape,
// the voltage at which a discharge starts and the one at which it breaks down, each a
// value with its sources or the lack in its place. It knows no chain and gives no
// verdict.
package insulation

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// Strength is what a gap stands, whatever the voltage across it.
type Strength struct {
	Onset      gap.Result[quantity.Voltage] // a discharge starts
	FieldLimit gap.Result[quantity.Field]   // peak field at onset
	Breakdown  gap.Result[quantity.Voltage] // it crosses the gap
}

// Assessment is what is known of a gap at some voltages.
type Assessment struct {
	ClearanceNeeded gap.Result[quantity.Length]
	CreepageNeeded  gap.Result[quantity.Length]
	FieldPeak       gap.Result[quantity.Field] // at the peak voltage
	Strength
}

// Assess answers everything about a gap. What it stands is the dear part and depends on
// the voltages by the polarity only: for many voltages, StrengthOf is asked once.
func Assess(g gap.Gap, v gap.Voltages) Assessment {
	return Assessment{
		ClearanceNeeded: gap.ResultOf(ClearanceNeeded(g, v)),
		CreepageNeeded:  gap.ResultOf(CreepageNeeded(g, v)),
		FieldPeak:       gap.ResultOf(FieldPeak(g, v)),
		Strength:        StrengthOf(g, v.Sharp),
	}
}

// StrengthOf is what a gap stands, with the polarity of its sharper electrode.
func StrengthOf(g gap.Gap, sharp gap.Polarity) Strength {
	onset := gap.ResultOf(Onset(g))
	return Strength{
		Onset:      onset,
		FieldLimit: gap.ResultOf(fieldAt(g, onset)),
		Breakdown:  gap.ResultOf(breakdown(g, sharp, onset)),
	}
}

// inAir refuses what is not a gap or surface in air.
func inAir(g gap.Gap) error {
	switch {
	case g.Medium == gap.Air, g.Medium == gap.PrintedBoard:
		return nil
	case g.Medium == gap.InGas && g.Filling() == gap.AirGas:
		return nil
	case g.Medium == gap.InGas:
		return lack.Range("the printed tables are those of air; in %s the breakdown estimate decides", string(g.Gas))
	}
	return lack.Range("the printed tables are those of air, not of %s", string(g.Medium))
}

// inGas refuses what is not filled with air or another gas.
func inGas(g gap.Gap) error {
	switch g.Medium {
	case gap.Air, gap.InGas:
		return nil
	case gap.PrintedBoard:
		return lack.Range("a discharge along a printed board is not estimated")
	}
	return lack.Range("the laws of gases do not hold for %s", string(g.Medium))
}
