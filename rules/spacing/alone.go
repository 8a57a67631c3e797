package spacing

import (
	"kilovet/hv/chain"
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/gap"
	"kilovet/rules/evidence"
)

// gapShort is what is said of a longer surface that alone is not enough: the gap it bridges
// falls short too, and no size of it is known that helps.
func gapShort(s *chain.Spacing, x evidence.Spacing) string {
	if x.Gap.Medium != gap.Vacuum || !s.Clearance.Set() || x.Gap.Shape == nil {
		return ""
	}
	most := x.Across().BreakdownBounds().Most // the breakdown itself where a law answers the gap
	if most.Lack != nil || quantity.AtLeast(most.Value, comfortable(x)) {
		return ""
	}
	return " for the surface; for the gap " + conflict(s, x)
}

// surfaceShort is what is said of a wider gap that alone is not enough: the surface across it
// falls short too, and no length of it is known that helps.
func surfaceShort(s *chain.Spacing, x evidence.Spacing) string {
	d, err := longEnough(s, x)
	if x.Gap.Medium != gap.Vacuum || !s.Creepage.Set() || err != nil {
		return ""
	}
	a, err := insulation.Breakdown(insulation.WithGap(x.Gap, d), x.Voltages.Sharp)
	if err != nil || quantity.AtLeast(a.Value, comfortable(x)) {
		return ""
	}
	return " for the gap; for the surface no one length is enough: divide it into stages, or give a tested one"
}
