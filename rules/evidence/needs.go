package evidence

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/gap"
	"kilovet/insulation/solid"
	"kilovet/insulation/vacuum"
)

// The sizes below ask the laws of a spacing backwards.

// GapFor is the distance at which the spacing breaks down at a voltage, its sharpest
// radius kept.
func (x Spacing) GapFor(v quantity.Voltage) (quantity.Length, error) {
	return insulation.ClearanceForBreakdown(x.Gap, v, x.Voltages.Sharp)
}

// Across is the spacing without the surface that bridges it in vacuum, which has a size of
// its own.
func (x Spacing) Across() Spacing {
	if x.Gap.Medium == gap.Vacuum {
		x.Gap.Creepage = 0
	}
	return x
}

// StandsFrom is a distance, or the least of longer ones that are tried, at which a law answers
// that the spacing stands a voltage.
func (x Spacing) StandsFrom(d quantity.Length, v quantity.Voltage) (quantity.Length, error) {
	const ratio, most = 1.02, 30.0
	for at := d; at < most*d; at *= ratio {
		if a, err := x.StandsOver(at); err == nil && quantity.AtLeast(a.Value, v) {
			return at, nil
		}
	}
	return 0, lack.Failed("no distance is known to stand %s", quantity.Text(v))
}

// StandsOver is what the spacing stands over another distance, the sharpest radius kept.
func (x Spacing) StandsOver(d quantity.Length) (gap.Answer[quantity.Voltage], error) {
	return insulation.Breakdown(insulation.WithGap(x.Across().Gap, d), x.Voltages.Sharp)
}

// RadiusFor is the sharpest radius at which it breaks down at a voltage, the distance kept.
func (x Spacing) RadiusFor(v quantity.Voltage) (quantity.Length, error) {
	return insulation.RadiusForBreakdown(x.Gap, v, x.Voltages.Sharp)
}

// AtWork is the peak that the distance bears at most by the law which asks for it, in
// vacuum, oil and solids.
func (x Spacing) AtWork() (gap.Answer[quantity.Voltage], error) {
	return insulation.WorkingAtMost(x.Gap)
}

// HasWork reports whether a working stress, which a radius can be too sharp for, asks for
// the distance.
func (x Spacing) HasWork() bool {
	return x.Gap.Medium == gap.Vacuum || x.Gap.Medium == gap.Oil || x.Gap.Medium == gap.Solid
}

// RadiusAtWork is the sharpest radius with which a share of the distance bears a peak.
func (x Spacing) RadiusAtWork(v quantity.Voltage, share float64) (quantity.Length, error) {
	return insulation.RadiusForWork(insulation.WithGap(x.Gap, x.Gap.Clearance*quantity.Length(share)), v)
}

// BearsAtWork reports whether a share of the distance bears a peak at work.
func (x Spacing) BearsAtWork(v quantity.Voltage, share float64) bool {
	a, err := insulation.WorkingVoltage(insulation.WithGap(x.Gap, x.Gap.Clearance*quantity.Length(share)))
	return err == nil && quantity.AtLeast(a.Value, v)
}

// Dimensioned is the peak that the class of insulation is dimensioned for.
func (x Spacing) Dimensioned() quantity.Voltage { return x.Voltages.For(x.Gap.Class()).Peak }

// Asked is the peak that the breakdown estimate is held against.
func (x Spacing) Asked() quantity.Voltage { return x.Voltages.Peak * x.Step() }

// Step is what the peak is multiplied by before it is held against the breakdown estimate:
// in gases other than air, where no table has a safety step, that of the class of insulation.
func (x Spacing) Step() quantity.Voltage {
	if x.Gap.Medium == gap.InGas && x.Gap.Filling() != gap.AirGas {
		return gap.Voltages{Peak: 1}.For(x.Gap.Class()).Peak
	}
	return 1
}

// IfNegative is what the spacing would stand with its sharper electrode negative, where
// the polarity is not known.
func (x Spacing) IfNegative() (quantity.Voltage, error) {
	if x.Voltages.Sharp != gap.Unknown {
		return 0, lack.Failed("the polarity is known")
	}
	a, err := insulation.Breakdown(x.Gap, gap.Negative)
	return a.Value, err
}

// SurfaceFor is the length of surface in vacuum that flashes over at a voltage.
func (x Spacing) SurfaceFor(v quantity.Voltage) (quantity.Length, error) {
	return insulation.CreepageForFlashover(x.Gap, v)
}

// ClearanceAtLeast and CreepageAtLeast are what the tables of air ask for at the highest
// voltages that they answer.
func (x Spacing) ClearanceAtLeast() (gap.Answer[quantity.Length], error) {
	return insulation.ClearanceAtLeast(x.Gap, x.Voltages)
}

// CreepageAtLeast is ClearanceAtLeast along the surface.
func (x Spacing) CreepageAtLeast() (gap.Answer[quantity.Length], error) {
	return insulation.CreepageAtLeast(x.Gap, x.Voltages)
}

// SurfaceBounds are what is known of the length of surface where no figure of it is.
func (x Spacing) SurfaceBounds() insulation.SurfaceBounds {
	return insulation.CreepageBounds(x.Gap, x.Voltages)
}

// BreakdownBounds are what is known of the breakdown where no law gives it.
func (x Spacing) BreakdownBounds() insulation.StrengthBounds {
	return insulation.BreakdownBounds(x.Gap, x.Voltages.Sharp)
}

// OnsetAtLeast is the voltage under which no discharge starts where no law gives the onset.
func (x Spacing) OnsetAtLeast() (gap.Answer[quantity.Voltage], error) {
	return insulation.OnsetAtLeast(x.Gap)
}

// RadiusForOnset is the sharpest radius at which a discharge starts at a voltage.
func (x Spacing) RadiusForOnset(v quantity.Voltage) (quantity.Length, error) {
	return insulation.RadiusForOnset(x.Gap, v)
}

// GapForOnset is the distance at which a discharge starts at a voltage.
func (x Spacing) GapForOnset(v quantity.Voltage) (quantity.Length, error) {
	return insulation.ClearanceForOnset(x.Gap, v)
}

// WorkingShare is the part of the breakdown that a working voltage may be: a fourth in
// solids, where nothing else is asked all of it.
func WorkingShare(g gap.Gap) quantity.Fraction {
	if g.Medium == gap.Solid {
		return solid.Published.Of
	}
	return 1
}

// PeakMet is the highest peak that the distance meets the table for.
func (x Spacing) PeakMet() (quantity.Voltage, error) { return insulation.PeakByTable(x.Gap) }

// InOil is the distance between the same electrodes in oil.
func (x Spacing) InOil() (quantity.Length, error) {
	g := x.Gap
	g.Medium = gap.Oil
	a, err := insulation.ClearanceNeeded(g, x.Voltages)
	return a.Value, err
}

// GapForOnset is the distance across an annulus at which it discharges at a voltage.
func (a Annulus) GapForOnset(v quantity.Voltage) (quantity.Length, error) {
	return insulation.ClearanceForOnset(a.Gap, v)
}

// Remarks are what is said of a spacing beside its estimates: of solids the flat void that
// would discharge first, and whether a discharge test is asked for; in vacuum the voltage
// of conditioning. The sources belong to them.
func (x Spacing) Remarks() (texts []string, sources []gap.Source) {
	switch x.Gap.Medium {
	case gap.Vacuum:
		a := vacuum.ConditioningVoltage(x.Voltages.Peak)
		return []string{"conditioning takes up to " + quantity.Text(a.Value)}, gap.Plain(a.Sources)
	case gap.Solid:
		if v, err := insulation.WorstVoid(x.Gap); err == nil {
			texts = append(texts, "a flat void of "+quantity.Text(v.Size)+" in it would discharge from "+quantity.Text(v.Voltage)+" alternating")
		}
		if asked, source := insulation.DischargeTestAsked(x.Gap, x.Voltages); asked {
			texts = append(texts, "a partial discharge test is asked for")
			sources = append(sources, source)
		}
	}
	return texts, sources
}
