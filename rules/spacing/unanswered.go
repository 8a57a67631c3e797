package spacing

import (
	"fmt"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

// beyondBound reports whether a peak lies above what is only a lower bound of the breakdown.
func beyondBound(x evidence.Spacing) bool {
	stands := x.Assessment.Breakdown
	return stands.AtLeast && !quantity.AtMost(x.Voltages.Peak, stands.Value*usable(x))
}

// unanswered judges a gap whose breakdown no law gives at its distance by its bounds: it
// holds under the lower, fails above the upper and is unassessed between.
func unanswered(e *evidence.Evidence, f rule.Finding, s *chain.Spacing, x evidence.Spacing) rule.Finding {
	why := x.Assessment.Breakdown.Lack
	if why == nil {
		why = lack.Failed("only a lower bound of the breakdown is known")
	}
	if x.Computed { // the line of a computed field has no other distance
		return f.Lacking(why)
	}
	const least = "least"
	b, v := x.BreakdownBounds(), x.Voltages.Peak
	stands := func(at quantity.Voltage, how, because string, comfort float64) rule.Finding {
		f.Under = x.Under.Text()
		f.Because = fmt.Sprintf("%s across a gap that stands at %s %s (%s)", quantity.Text(v), how, quantity.Text(at), because)
		f = shareOf(f, x)
		if how == least { // an upper bound may not be used up
			f = f.ShareBy(rule.Of(at), breakdownSource)
		}
		return f.Most(rule.Of(v), rule.Of(at*usable(x)), comfort)
	}
	switch {
	case b.Least.Lack == nil && quantity.AtMost(v, b.Least.Value*usable(x)):
		f.Sources = append(rule.Cited(b.Least.Sources), breakdownSource)
		f = stands(b.Least.Value, least, b.Least.Because, limits.BreakdownShare/limits.BreakdownComfort-1).Assume(b.Least.Assumptions...)
		if f.Verdict != rule.Meets {
			f.Remedy = alternatives("lower the voltage", confirm)
		}
		return f
	case b.Most.Lack == nil && !quantity.AtMost(v, b.Most.Value*usable(x)):
		f.Sources = append(rule.Cited(b.Most.Sources), breakdownSource)
		f = stands(b.Most.Value, "most", b.Most.Because, 0)
		f.Remedy = alternatives(againstBreakdown(e, s, x), "take a stronger medium")
		if noVacuum(s, x) {
			f.Remedy = "pump lower before the voltage is switched on"
			f = f.Assume("the gas left in the vessel is " + string(x.Gap.Filling()))
		}
		return f
	}
	f.Because = within(v, b)
	f = f.Lacking(why)
	if len(f.Missing) == 0 && s.Clearance.Set() && gaseous(s) {
		f.Remedy = measured(s, "at which voltage this gap breaks down", "keep the peak under 80 % of it")
	}
	return f
}

// noVacuum reports whether a gap that is called vacuum has a pressure at which the laws of
// vacuum do not hold.
func noVacuum(s *chain.Spacing, x evidence.Spacing) bool {
	_, err := insulation.Rarefied(x.Gap)
	return s.Medium.V == "vacuum" && err == nil
}

// measured says what to measure where no law answers, and what else would do.
func measured(s *chain.Spacing, what, then string) string {
	in, other := s.Medium.V, ""
	if s.Medium.V == "gas" {
		in = s.Gas.Or("air") + " at " + quantity.Text(s.Pressure.V)
		if otherGas(s) && s.Gas.V != "sulphur hexafluoride" {
			other = ", or take air or sulphur hexafluoride, whose laws are known"
		}
	}
	return fmt.Sprintf("measure %s in %s and %s%s", what, in, then, other)
}

// within says what the bounds leave open.
func within(v quantity.Voltage, b insulation.StrengthBounds) string {
	text := ""
	if b.Least.Lack == nil {
		text = fmt.Sprintf("at least %s (%s)", quantity.Text(b.Least.Value), b.Least.Because)
	}
	if b.Most.Lack == nil {
		if text != "" {
			text += " and "
		}
		text += fmt.Sprintf("at most %s (%s), an upper limit and no pass", quantity.Text(b.Most.Value), b.Most.Because)
	}
	if text == "" {
		return ""
	}
	return quantity.Text(v) + " across a gap that stands " + text
}
