package spacing

import (
	"kilovet/hv/chain"
	"kilovet/insulation/gap"
	"kilovet/rules/evidence"
	"kilovet/rules/rule"

	"kilovet/hv/quantity"
)

// InFault gives what the rules of clearance and breakdown say of every spacing across
// which a fault puts more than any other condition does.
func InFault(e *evidence.Evidence) []rule.Finding {
	var all []rule.Finding
	for i := range e.Chain().Spacings {
		s := &e.Chain().Spacings[i]
		x, err := e.Spacing(s)
		if err != nil || x.Under.Fault.Name == "" {
			continue // without an answer, its own rules say so
		}
		all = append(all, raised(e, s)...)
	}
	return all
}

// raised judges one spacing at the voltage of the fault; a margin is asked of what lasts
// only.
func raised(e *evidence.Evidence, s *chain.Spacing) []rule.Finding {
	all := []rule.Finding{judgeBreakdown(e, s)}
	if !otherGas(s) {
		all = append(all, distance(e, s, "spacing.clearance", s.Clearance, func(x evidence.Spacing) gap.Result[quantity.Length] { return x.Assessment.ClearanceNeeded }))
	}
	return all
}
