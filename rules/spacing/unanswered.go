package spacing

import (
	"fmt"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/gap"
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
	b, v := x.BreakdownBounds(), x.Voltages.Peak
	switch {
	case b.Least.Lack == nil && quantity.AtMost(v, b.Least.Value*usable(x)):
		return underLeast(f, x, b.Least.Answer)
	case b.Most.Lack == nil && !quantity.AtMost(v, b.Most.Value*usable(x)):
		return aboveMost(e, f, s, x, b.Most.Answer)
	}
	f.Because = within(v, b)
	f = f.Lacking(why)
	if len(f.Missing) == 0 && s.Clearance.Set() && gaseous(s) {
		f.Remedy = measured(s, "at which voltage this gap breaks down", "keep the peak under 80 % of it")
	}
	return f
}

// underLeast is the finding where the peak stays under the lower bound.
func underLeast(f rule.Finding, x evidence.Spacing, least gap.Answer[quantity.Voltage]) rule.Finding {
	f = standsAt(f, x, "least", least).ShareBy(rule.Of(least.Value), breakdownSource)
	f = f.Most(rule.Of(x.Voltages.Peak), rule.Of(least.Value*usable(x)), limits.BreakdownShare/limits.BreakdownComfort-1).Assume(least.Assumptions...)
	if f.Verdict != rule.Meets {
		f.Remedy = alternatives("lower the voltage", confirm)
	}
	return f
}

// aboveMost is the finding where the peak lies above the upper bound, of which no part may
// be used up.
func aboveMost(e *evidence.Evidence, f rule.Finding, s *chain.Spacing, x evidence.Spacing, most gap.Answer[quantity.Voltage]) rule.Finding {
	f = standsAt(f, x, "most", most).Most(rule.Of(x.Voltages.Peak), rule.Of(most.Value*usable(x)), 0)
	f.Remedy = alternatives(againstBreakdown(e, s, x), "take a stronger medium")
	if noVacuum(s, x) {
		f.Remedy = "pump lower before the voltage is switched on"
		f = f.Assume("the gas left in the vessel is " + string(x.Gap.Filling()))
	}
	return f
}

// standsAt says what a gap stands at least or at most, and why.
func standsAt(f rule.Finding, x evidence.Spacing, how string, at gap.Answer[quantity.Voltage]) rule.Finding {
	f.Sources = append(rule.Cited(at.Sources), breakdownSource)
	f.Under = x.Under.Text()
	f.Because = fmt.Sprintf("%s across a gap that stands at %s %s (%s)", quantity.Text(x.Voltages.Peak), how, quantity.Text(at.Value), at.Because)
	return shareOf(f, x)
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
