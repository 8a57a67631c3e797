// Package supply judges the drive, the multiplier as a whole and its divider.
package supply

import (
	"fmt"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var headroomSource = rule.Source{Text: "a regulated drive keeps " + quantity.Text(quantity.Fraction(limits.HeadroomMargin)) + " in hand at full load", Mark: rule.Practice, Governs: true}

var headroom = rule.Rule{
	ID: "drive.headroom", Title: "Headroom of the drive",
	Demands: "The drive can give the peak that holds the set voltage at full load.",
	Applies: "Where the output is regulated.",
	Margin:  "marginal with less than " + quantity.Text(quantity.Fraction(limits.HeadroomMargin)) + " in hand",
	Concern: rule.Performance,
	Sources: []rule.Source{headroomSource},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `peak       = "1.85 kV"`, Becomes: `peak       = "1.7 kV"`}},
		Changes: []rule.Change{{Rule: "drive.headroom", Subject: "drive", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		c := e.Chain()
		if c.Regulation == nil {
			return rule.Over("the output is not regulated")
		}
		f := rule.Finding{Rule: "drive.headroom", Subject: "drive", Concern: rule.Performance, Relation: rule.AtLeast,
			Place: c.Drive.Peak.Place, Under: string(evidence.Working), Sources: []rule.Source{headroomSource}}
		needed, err := e.PeakNeeded()
		if err != nil {
			return rule.One(f.Lacking(err))
		}
		f.Because = fmt.Sprintf("%s peak holds %s under load, the drive gives %s", quantity.Text(needed), quantity.Text(c.Regulation.Set.V), quantity.Text(c.Drive.Peak.V))
		f.Remedy = "raise the drive, add a stage, raise frequency or capacitance, or lower the load"
		f = f.Least(rule.Of(c.Drive.Peak.V), rule.Of(needed), limits.HeadroomMargin)
		return rule.One(f.Assume(e.Opposing()...).WithoutRemedyIfMet())
	},
}

var balanceSource = rule.Source{Text: "at light load a fraction of a per cent of unbalance gives a symmetrical cascade the ripple of a half-wave one (charge balance)", Mark: rule.Derived, Governs: true}

var balance = rule.Rule{
	ID: "multiplier.balance", Title: "Balance of a symmetrical drive",
	Demands: "The amplitude mismatch of the two halves is known, since it decides the ripple.",
	Applies: "Where the multiplier is symmetrical.",
	Concern: rule.Performance,
	Sources: []rule.Source{balanceSource},
	Example: rule.Example{
		Of:    "positive",
		Swaps: []rule.Swap{{Was: `unbalance  = "1 %"`, Becomes: ""}},
		Changes: []rule.Change{
			{Rule: "multiplier.balance", Subject: "multiplier.ripple", Verdict: rule.Unassessed},
			{Rule: "multiplier.unbalance", Subject: "multiplier.ripple"},
		},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		c := e.Chain()
		if c.Multiplier == nil || !c.Multiplier.Symmetrical() {
			return rule.Over("the multiplier is not symmetrical")
		}
		f := rule.Finding{Rule: "multiplier.balance", Subject: "multiplier.ripple", Concern: rule.Performance, Relation: rule.Presence,
			Place: c.Drive.Unbalance.Place, Sources: []rule.Source{balanceSource}}
		if !c.Drive.Unbalance.Set() {
			f.Place = c.Drive.Here()
			return rule.One(f.Lacking(lack.Because("the ripple of a symmetrical drive rests on its unbalance, which is not given; it was computed for none", c.Drive.Unbalance.Key)))
		}
		f.Because = "the ripple is computed with an unbalance of " + quantity.Text(c.Drive.Unbalance.V)
		return rule.One(f.There(true))
	},
}
