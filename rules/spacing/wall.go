package spacing

import (
	"fmt"

	"kilovet/hv/chain"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

// shareOf says, of the wall of a sleeve, how the voltage on the pin divides, and what that
// takes for granted.
func shareOf(f rule.Finding, x evidence.Spacing) rule.Finding {
	if x.Wall == nil {
		return f
	}
	f.Because += "; " + x.Wall.Text
	return f.Assume(x.Wall.Taken...)
}

// strongerWall are the sizes of which each alone lets the wall of a sleeve meet its rules of
// thickness and breakdown, two at most, and what it takes without any.
func strongerWall(e *evidence.Evidence, s *chain.Spacing, x evidence.Spacing) string {
	sizes := e.WallSizes(s, x, evidence.WallAsked{AtWork: 1 / (1 + limits.DistanceMargin), OfBreakdown: limits.BreakdownComfort})
	var ways []string
	for _, z := range sizes[:min(2, len(sizes))] {
		need := upward(z.Needed)
		way := fmt.Sprintf("make %s %s or more (%s more)", z.Key, quantity.Text(need), quantity.Text(need-z.Now))
		if z.Follows != "" {
			way += ", " + z.Follows
		}
		ways = append(ways, way)
	}
	if len(ways) == 0 {
		ways = append(ways, "no one size is enough: take a stronger material")
	}
	return alternatives(ways...)
}
