package spacing

import (
	"fmt"
	"slices"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

// untested reports whether a surface has no figure for want of a tested one.
func untested(l *lack.Lack) bool { return slices.Contains(l.Keys, "spacing.tested_voltage") }

const testOne = "give the flashover of a tested surface: spacing.tested_voltage, spacing.tested_length"

// bounded judges a surface of which no figure is known by what is: too short where the
// medium alone would need more, marginal on its assumption where even dry and clean air
// would need less, and unassessed between, with both said.
func bounded(f rule.Finding, s *chain.Spacing, x evidence.Spacing, why *lack.Lack) rule.Finding {
	b := x.SurfaceBounds()
	if !s.Creepage.Set() {
		return f.Lacking(lack.Key(s.Creepage.Key))
	}
	counted, taken, err := x.Surface()
	if err != nil {
		return f.Lacking(err)
	}
	f.Under = x.Under.Text()
	f.Because = fmt.Sprintf("%s peak, %s lasting: ", quantity.Text(x.Voltages.Peak), quantity.Text(x.Voltages.LongTerm))
	switch {
	case b.Least.Lack == nil && !quantity.AtLeast(counted, b.Least.Value):
		f.Because += b.Least.Because
		f.Sources = rule.Cited(b.Least.Sources)
		f = f.Least(rule.Of(counted), rule.Of(b.Least.Value), 0)
		f.Remedy = alternatives(longer(s, b, counted), "lower the voltage") + "; that much is needed at least: " + testOne
	case b.Enough.Lack == nil && quantity.AtLeast(counted, b.Enough.Value):
		f.Under = x.Lasting.Text()
		f.Because += "no figure of this surface is known; " + b.Enough.Because
		f.Sources = rule.Cited(b.Enough.Sources)
		f = f.Least(rule.Of(counted), rule.Of(b.Enough.Value), limits.DistanceMargin).Assume(b.Enough.Assumptions...).Assume(classTaken(s)...)
		f.Remedy = testOne
	default:
		f.Because += between(b, counted)
		f = f.Lacking(why)
		f.Remedy = alternatives(testOne, longer(s, b, counted))
	}
	if taken != "" {
		f.Because += "; " + taken
	}
	return f
}

// between says what is known of a surface that is neither too short nor long enough.
func between(b insulation.SurfaceBounds, counted quantity.Length) string {
	has := quantity.Text(counted)
	switch {
	case b.Least.Lack == nil && b.Enough.Lack == nil:
		return fmt.Sprintf("%s lie between %s, too little (%s), and %s, enough (%s)", has, quantity.Text(b.Least.Value), b.Least.Because, quantity.Text(b.Enough.Value), b.Enough.Because)
	case b.Enough.Lack == nil:
		return fmt.Sprintf("%s are less than %s, which would be enough (%s)", has, quantity.Text(b.Enough.Value), b.Enough.Because)
	case b.Least.Lack == nil:
		return fmt.Sprintf("%s are more than %s, which would be too little (%s), and no pass", has, quantity.Text(b.Least.Value), b.Least.Because)
	}
	return "no bound of what it needs is known either"
}

// longer is the surface that would be enough, its comfort included.
func longer(s *chain.Spacing, b insulation.SurfaceBounds, counted quantity.Length) string {
	if b.Enough.Lack != nil {
		return ""
	}
	return wider(s, s.Creepage, b.Enough.Value+s.Creepage.V-counted)
}
