package spacing

import (
	"kilovet/hv/chain"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var stepSource = rule.Source{Text: "IEC 60664-1, reinforced insulation is dimensioned for 160 % of the peak; a standard of air", Mark: rule.Memory}

// classed says what the class of insulation does to the breakdown of a gap in a gas other
// than air, of which no table asks for a clearance: reinforced insulation takes the safety
// step of air, and where no class is given basic insulation is taken. Functional and basic
// insulation are judged alike.
func classed(s *chain.Spacing, x evidence.Spacing, f rule.Finding) rule.Finding {
	if !otherGas(s) {
		return f
	}
	f = f.Assume(classTaken(s)...)
	if x.Gap.Class() == gap.Reinforced {
		f.Sources = append(f.Sources, stepSource)
		f = f.Assume("reinforced insulation in " + s.Gas.V + " is dimensioned for 160 % of the peak, as in air: no standard for it was found")
	}
	if f.Verdict == rule.Marginal && f.Remedy == "" {
		f.Remedy = confirm
	}
	return f
}

// usable is the part of the breakdown estimate that the peak may be.
func usable(x evidence.Spacing) quantity.Voltage { return limits.BreakdownShare / x.Step() }
