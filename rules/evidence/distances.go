package evidence

import (
	"fmt"

	"kilovet/hv/chain"
	"kilovet/hv/quantity"
	"kilovet/insulation"
)

// DistanceFor is the gap of a spacing whose breakdown estimate is the peak that it is
// asked to stand over a share; its shape keeps its sharpest radius.
func (e *Evidence) DistanceFor(s *chain.Spacing, share float64) (quantity.Length, error) {
	return e.distance(s, fmt.Sprintf("breakdown %g", share), func(x Spacing) (quantity.Length, error) {
		return insulation.ClearanceForBreakdown(x.Gap, x.Asked()/quantity.Voltage(share), x.Voltages.Sharp)
	})
}

// QuietDistance is the gap of a spacing at which a discharge is expected to begin at the
// highest voltage across it over a share.
func (e *Evidence) QuietDistance(s *chain.Spacing, share float64) (quantity.Length, error) {
	return e.distance(s, fmt.Sprintf("onset %g", share), func(x Spacing) (quantity.Length, error) {
		return insulation.ClearanceForOnset(x.Gap, x.Voltages.Peak/quantity.Voltage(share))
	})
}

func (e *Evidence) distance(s *chain.Spacing, what string, find func(Spacing) (quantity.Length, error)) (quantity.Length, error) {
	return remember(e.Under(Condition{}), "distance "+what+" "+s.Name.V, func() (quantity.Length, error) {
		x, err := e.Spacing(s)
		if err != nil {
			return 0, err
		}
		return find(x)
	})
}
