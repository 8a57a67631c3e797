// Package vessel judges the vacuum vessel as a path for discharges.
package vessel

import (
	"fmt"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/vacuum"
	"kilovet/rules/evidence"
	"kilovet/rules/rule"
)

var freeSource = rule.Source{Text: "marginal above 0.001 Torr cm over the longest path: below it electrons cross without multiplying", Mark: rule.Practice}

var permit = rule.Rule{
	ID: "vacuum.permit", Title: "Pressure that permits high voltage",
	Demands: "High voltage is permitted only below 0.01 Torr cm over the longest straight path between parts at different potential.",
	Applies: "Where a gun or a vessel is described, or a supply with a spacing in vacuum.",
	Margin:  "marginal above 0.001 Torr cm",
	Concern: rule.Equipment,
	Sources: []rule.Source{{Text: "no high voltage above 0.01 Torr cm over the longest path", Mark: rule.Practice, Governs: true}, freeSource},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `pressure_permit = "4e-5 mbar"`, Becomes: `pressure_permit = "1e-3 mbar"`}},
		Changes: []rule.Change{{Rule: "vacuum.permit", Subject: "vessel", Verdict: rule.Fails}},
	},
	Judge: judgePermit,
}

func judgePermit(e *evidence.Evidence) rule.Judgement {
	c := e.Chain()
	if c.Gun == nil && !e.HasVessel() {
		return rule.Over("no vessel and no gun is described")
	}
	f := rule.Finding{Rule: "vacuum.permit", Subject: "vessel", Concern: rule.Equipment, Relation: rule.AtMost}
	if c.Vacuum == nil {
		return rule.One(f.Lacking(lack.Key("vacuum")))
	}
	f.Place = c.Vacuum.PressurePermit.Place
	if err := document.Need(c.Vacuum.PressurePermit, c.Vacuum.LongestPath); err != nil {
		return rule.One(f.Lacking(err))
	}
	limits, err := e.Vessel().Permit()
	if err != nil {
		return rule.One(f.Lacking(err))
	}
	f.Sources = append(rule.Cited(limits.Crowded.Sources), freeSource)
	f.Because = fmt.Sprintf("permitted below %s; over %s up to %s is free of discharge, none above %s", quantity.Text(c.Vacuum.PressurePermit.V),
		quantity.Text(c.Vacuum.LongestPath.V), quantity.Text(limits.Free.Value), quantity.Text(limits.Crowded.Value))
	if !quantity.AtMost(c.Vacuum.PressurePermit.V, vacuum.FeedthroughPressure) {
		f.Because += "; ratings of feedthroughs hold below " + quantity.Text(vacuum.FeedthroughPressure)
		f.Sources = append(f.Sources, rule.Cited([]gap.Source{vacuum.FeedthroughSource})...)
	}
	f.Remedy = "permit high voltage only below " + quantity.Text(limits.Free.Value) + ", or shorten the longest path"
	margin := float64(limits.Crowded.Value/limits.Free.Value) - 1
	f = f.Most(rule.Of(c.Vacuum.PressurePermit.V), rule.Of(limits.Crowded.Value), margin)
	return rule.One(f.Assume(takenFor(c.Vacuum)...).WithoutRemedyIfMet())
}

// takenFor is what is taken for granted of the gas and its gauge.
func takenFor(v *chain.Vacuum) []string {
	var all []string
	if !v.Gas.Set() {
		all = append(all, "the gas of the vessel is not given and counts as air")
	}
	if g := v.Gas.Or("air"); g != "air" && g != "nitrogen" && !v.GaugeFactor.Set() {
		all = append(all, "the gauge is taken to read true in "+g+": no gauge_factor is given")
	}
	return all
}

// Rules lists the rules of this family.
func Rules() []rule.Rule { return []rule.Rule{permit} }
