package people

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var absorptionSource = rule.Source{Text: "dielectric absorption as makers measure it (15 min charged, 10 s shorted, read after 15 min), the upper end of what is published of each dielectric", Mark: rule.Read}

var recharge = rule.Rule{
	ID: "discharge.recharge", Title: "Charge that comes back",
	Demands: "What dielectric absorption brings back after a short discharge stays at or below 60 V, or a rod stays on what was discharged.",
	Applies: "Where a node holds more charge or energy than may be touched. What the capacitors of a column get back stands one above the other.",
	Margin:  "marginal above 60 V where a rod is described",
	Concern: rule.Life,
	Sources: []rule.Source{limits.TouchVoltageSource, limits.RodSource, absorptionSource},
	Example: rule.Example{
		Swaps: []rule.Swap{{Was: `earthing_rod    = { resistance = "100 kohm", rated_voltage = "50 kV", rated_energy = "20 J" }`, Becomes: ""}},
		Changes: []rule.Change{
			{Rule: "rod.there", Subject: "chain", Verdict: rule.Fails},
			{Rule: "discharge.one_open", Subject: "chain", Verdict: rule.Fails},
			{Rule: "discharge.residue", Subject: "chain", Verdict: rule.Fails},
			{Rule: "discharge.recharge", Subject: "chain", Verdict: rule.Fails},
			{Rule: "rod.voltage", Subject: "earthing rod"},
			{Rule: "rod.energy", Subject: "earthing rod"},
		},
	},
	Judge: judgeRecharge,
}

func judgeRecharge(e *evidence.Evidence) rule.Judgement {
	f := rule.Finding{Rule: "discharge.recharge", Subject: "chain", Concern: rule.Life, Relation: rule.AtMost, Sources: []rule.Source{limits.TouchVoltageSource, limits.RodSource, absorptionSource}}
	access, done := needsCare(e, f)
	if done != nil {
		return *done
	}
	f.Place = access.Here()
	var back evidence.Return
	for _, c := range evidence.LostCorners() {
		b, err := e.Under(c).MostComesBack()
		if err != nil {
			return *only(f.Lacking(err))
		}
		if f.Under == "" || b.Voltage > back.Voltage {
			back, f.Under = b, c.Text()
		}
	}
	f.Because = fmt.Sprintf("up to %s come back at %s after a short discharge", quantity.Text(back.Voltage), back.Column)
	if back.Parts > 1 {
		f.Because = fmt.Sprintf("up to %s come back over the whole column of %s after a short discharge, what its %d capacitors get back by themselves added up", quantity.Text(back.Voltage), back.Column, back.Parts)
	}
	f.Remedy = "leave the rod on, or short what was discharged, until the work is done"
	if quantity.AtMost(back.Voltage, limits.TouchVoltage) || access.EarthingRod == nil {
		return *only(f.Most(rule.Of(back.Voltage), rule.Of(limits.TouchVoltage), 0).Assume(back.Assumed...).WithoutRemedyIfMet())
	}
	f.Relation = rule.Presence
	return *only(f.There(true).Assume(append(back.Assumed, "the rod stays on what was discharged until the work is done")...))
}
