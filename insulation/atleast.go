package insulation

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// ClearanceAtLeast and CreepageAtLeast are what the tables ask for at the highest voltages
// under the given ones that they answer: past their last rows they ask for no less. What
// they answer is the need itself; where they answer no lower voltage either there is a lack.
func ClearanceAtLeast(g gap.Gap, v gap.Voltages) (gap.Answer[quantity.Length], error) {
	return atLeast(g, v, ClearanceNeeded)
}

// CreepageAtLeast is ClearanceAtLeast along the surface.
func CreepageAtLeast(g gap.Gap, v gap.Voltages) (gap.Answer[quantity.Length], error) {
	return atLeast(g, v, CreepageNeeded)
}

// Shares of the voltages that are tried: down to the lowest, by a ratio, since some laws
// do not answer low voltages either.
const (
	lowest       = 1e-3
	ratioOfTries = 1.3
)

// atLeast is a need that grows with the voltage, or what it is at the highest lower voltage
// that its law answers.
func atLeast(g gap.Gap, v gap.Voltages, of func(gap.Gap, gap.Voltages) (gap.Answer[quantity.Length], error)) (gap.Answer[quantity.Length], error) {
	at := func(share float64) (gap.Answer[quantity.Length], error) {
		s := quantity.Voltage(share)
		low := v
		low.Peak, low.LongTerm, low.Alternating = s*v.Peak, s*v.LongTerm, s*v.Alternating
		return of(g, low)
	}
	a, err := at(1)
	if l := lack.Of(err); l == nil || l.Kind != lack.Outside {
		return a, err
	}
	answers := func(share float64) bool { _, err := at(share); return err == nil }
	for share := 1.0; share > lowest; share /= ratioOfTries {
		if lower := share / ratioOfTries; answers(lower) {
			return at(edge(lower, share, answers))
		}
	}
	return a, err
}
