package insulation

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/oil"
	"kilovet/insulation/solid"
	"kilovet/insulation/vacuum"
)

// WorkingVoltage is the peak voltage that a gap in vacuum, oil or a solid bears at its own
// clearance by the law behind ClearanceNeeded: the onset of emission, 2 kV/mm of oil, a
// fourth of the strength. It answers also where the electrodes are too sharp for any
// clearance. In air and other gases, and without a shape, there is a lack.
func WorkingVoltage(g gap.Gap) (gap.Answer[quantity.Voltage], error) {
	switch {
	case g.Medium == gap.Vacuum:
		return vacuum.Onset(g)
	case g.Medium == gap.Oil:
		return oil.WorkingVoltage(g)
	case g.Medium == gap.Solid:
		return solid.WorkingVoltage(g, solid.Published)
	}
	return gap.Answer[quantity.Voltage]{}, lack.Range("no working stress of %s is known", named(g))
}

// RadiusForWork is the sharpest radius, at the gap given, that bears a peak voltage at work.
func RadiusForWork(g gap.Gap, v quantity.Voltage) (quantity.Length, error) {
	return overRadii(g, float64(v), func(g gap.Gap) (float64, error) {
		a, err := WorkingVoltage(g)
		return float64(a.Value), err
	})
}
