package spacing

import (
	"fmt"
	"strings"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/gap"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var breakdownSource = rule.Source{Text: "highest voltage at most 80 % of the breakdown estimate, 50 % for comfort", Mark: rule.Practice}

var breakdown = rule.Rule{
	ID: "spacing.breakdown", Title: "Breakdown of the gap",
	Demands: "The highest voltage stays at or below 80 % of the voltage at which the gap is expected to break down; in gases other than air, where no table asks for a clearance, 160 % of it for reinforced insulation.",
	Applies: "Every spacing.",
	Margin:  "marginal above 50 % of the estimate",
	Concern: rule.Life,
	Sources: []rule.Source{breakdownSource},
	Example: rule.Example{
		Swaps: []rule.Swap{
			{Was: `clearance  = "110 mm"`, Becomes: `clearance  = "8 mm"`},
			{Was: `outer_radius = "122 mm"`, Becomes: `outer_radius = "20 mm"`},
		},
		Changes: []rule.Change{
			{Rule: "spacing.clearance", Subject: "gun feedthrough, air side", Verdict: rule.Fails},
			{Rule: "spacing.breakdown", Subject: "gun feedthrough, air side", Verdict: rule.Fails},
			{Rule: "spacing.corona", Subject: "gun feedthrough, air side", Verdict: rule.Marginal},
		},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(e, func(s *chain.Spacing) (rule.Finding, string) { return judgeBreakdown(e, s), "" })
	},
}

func judgeBreakdown(e *evidence.Evidence, s *chain.Spacing) rule.Finding {
	f := finding("spacing.breakdown", concern(s), rule.AtMost, s)
	switch {
	case s.Clearance.Set():
		f.Place = s.Clearance.Place
	case s.Of != nil && s.Creepage.Set():
		f.Place = s.Creepage.Place
	}
	x, err := e.Spacing(s)
	if err != nil {
		return f.Lacking(err)
	}
	stands := x.Assessment.Breakdown
	if stands.Lack != nil || beyondBound(x) {
		return classed(s, x, unanswered(e, f, s, x))
	}
	f.Under = x.Under.Text()
	f.Sources = append(append(rule.Cited(stands.Sources), breakdownSource), shown(stands.Answer)...)
	expected := "expected to break down at"
	if stands.AtLeast {
		expected = "that stands at least"
	}
	f.Because = fmt.Sprintf("%s across a gap %s %s (%s)", quantity.Text(x.Voltages.Peak), expected, quantity.Text(stands.Value), stands.Because)
	remarks, cited := x.Remarks()
	f.Because = strings.Join(append([]string{f.Because}, remarks...), "; ")
	f.Sources = append(f.Sources, rule.Cited(cited)...)
	f = shareOf(classed(s, x, f), x)
	limit := stands.Value * usable(x)
	f = f.ShareBy(rule.Of(stands.Value), breakdownSource).Most(rule.Of(x.Voltages.Peak), rule.Of(limit), limits.BreakdownShare/limits.BreakdownComfort-1).Assume(stands.Assumptions...).Assume(needlesTaken(s, x)...).Assume(beyond(e, s, x)...)
	switch {
	case f.Verdict == rule.Meets:
	case assumedOnly(f, limits.BreakdownShare/limits.BreakdownComfort-1):
		f.Remedy = confirm
	default:
		f.Remedy = againstBreakdown(e, s, x)
	}
	return f
}

// needlesTaken is what is taken for granted of electrodes that are not described, where it
// matters: a sharp one against a blunt one stands less than a pair of needles. Where one is
// said to be the sharper, its polarity judges and nothing is taken.
func needlesTaken(s *chain.Spacing, x evidence.Spacing) []string {
	if s.Shape != nil || x.Computed || s.SharperElectrode.Set() || s.Medium.V == "printed board" || !inAir(s) {
		return nil
	}
	least, err := insulation.AgainstPlane(x.Gap)
	if err == nil && quantity.AtMost(x.Voltages.Peak, least.Value*limits.BreakdownComfort) {
		return nil
	}
	text := "both electrodes are sharp"
	if err == nil {
		text += "; a sharp positive one against a blunt one would stand " + quantity.Text(least.Value)
	}
	return []string{text + ": give spacing.shape or spacing.sharper_electrode"}
}

var coronaSource = rule.Source{Text: "highest voltage at most the onset estimate; corona makes ozone, noise and radio interference, it does not break a gap", Mark: rule.Practice}

var corona = rule.Rule{
	ID: "spacing.corona", Title: "Corona",
	Demands: "The highest voltage stays at or below the voltage at which discharge is expected to begin.",
	Applies: "Spacings in air or gas above 2 kV peak, or narrower than the table for sharp electrodes asks.",
	Margin:  "marginal with less than 10 % in hand or with corona; it never fails",
	Concern: rule.Performance,
	Sources: []rule.Source{coronaSource},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `inner_radius = "12 mm", outer_radius = "122 mm"`, Becomes: `inner_radius = "0.3 mm", outer_radius = "110.3 mm"`}},
		Changes: []rule.Change{{Rule: "spacing.corona", Subject: "gun feedthrough, air side", Verdict: rule.Marginal}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(e, func(s *chain.Spacing) (rule.Finding, string) { return judgeCorona(e, s) })
	},
}

func judgeCorona(e *evidence.Evidence, s *chain.Spacing) (rule.Finding, string) {
	f := finding("spacing.corona", rule.Performance, rule.AtMost, s)
	if !gaseous(s) {
		return f, "corona is judged in air and gas"
	}
	if s.Of != nil && strings.HasSuffix(s.Name.V, ": "+chain.BareStrip) {
		return f, "the live metal at the end of a bare cable is that of the air side"
	}
	x, err := e.Spacing(s)
	if err != nil {
		return f.Lacking(err), ""
	}
	if s.Shape == nil && quiet(s, x) {
		return f, "at or below 2 kV peak with the clearance of sharp electrodes there is no corona"
	}
	onset := x.Assessment.Onset
	if onset.Lack != nil {
		least, err := x.OnsetAtLeast()
		if err != nil || x.Computed || !quantity.AtMost(x.Voltages.Peak, least.Value) {
			return noOnset(f, s, x), ""
		}
		onset.Answer = least
	}
	return againstOnset(e, f, s, x, onset.Answer), ""
}

// againstOnset judges the peak across a gap by where a discharge begins: at worst marginal,
// and open where it passes what is only a lower bound.
func againstOnset(e *evidence.Evidence, f rule.Finding, s *chain.Spacing, x evidence.Spacing, onset gap.Answer[quantity.Voltage]) rule.Finding {
	f.Under = x.Under.Text()
	f.Sources = append(append(rule.Cited(onset.Sources), coronaSource), shown(onset)...)
	expected := "where discharge is expected from"
	if onset.AtLeast {
		expected = "where no discharge is expected under"
	}
	f.Because = fmt.Sprintf("%s across a gap %s %s (%s)", quantity.Text(x.Voltages.Peak), expected, quantity.Text(onset.Value), onset.Because)
	if onset.AtLeast && !quantity.AtMost(x.Voltages.Peak, onset.Value) {
		return leftOpen(f, s, x, lack.Failed("only a lower bound of the onset is known"))
	}
	f = f.Most(rule.Of(x.Voltages.Peak), rule.Of(onset.Value), limits.DistanceMargin).Assume(onset.Assumptions...).Assume(beyond(e, s, x)...)
	if f.Verdict == rule.Fails {
		f.Verdict = rule.Marginal
	}
	switch {
	case f.Verdict == rule.Meets:
	case assumedOnly(f, limits.DistanceMargin):
		f.Remedy = confirm
	default:
		f.Remedy = againstCorona(s, x)
	}
	return f
}

// noOnset is the finding where no law gives the onset.
func noOnset(f rule.Finding, s *chain.Spacing, x evidence.Spacing) rule.Finding {
	return leftOpen(f, s, x, x.Assessment.Onset.Lack)
}

// leftOpen is the finding where it is not known whether a discharge begins, and what would
// tell.
func leftOpen(f rule.Finding, s *chain.Spacing, x evidence.Spacing, why *lack.Lack) rule.Finding {
	f = f.Lacking(why)
	if len(f.Missing) == 0 && !x.Computed && s.Clearance.Set() {
		f.Remedy = measured(s, "at which voltage a discharge begins in this gap", "keep the peak under it")
	}
	return f
}

// quiet reports whether a gap without shape is at or below 2 kV peak and as wide as
// the table for sharp electrodes asks.
func quiet(s *chain.Spacing, x evidence.Spacing) bool {
	need := x.Assessment.ClearanceNeeded
	return quantity.AtMost(x.Voltages.Peak, limits.QuietBelow) && need.Lack == nil && quantity.AtLeast(s.Clearance.V, need.Value)
}
