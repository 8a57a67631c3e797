package parts

import (
	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

func isDiode(el circuit.Element) bool { return el.Kind == circuit.Diode }

var diodeReverse = rule.Rule{
	ID: "diode.reverse_voltage", Title: "Diode reverse voltage",
	Demands: "The largest reverse voltage on a diode position stays at or below " + limits.DiodeReverse.Allowed() + " of the rating of its stack.",
	Applies: "Every diode.",
	Margin:  limits.DiodeReverse.Comfort("the rating"),
	Concern: rule.Equipment,
	Sources: []rule.Source{limits.DiodeReverse.Source},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `diode = { rated_voltage = "8 kV"`, Becomes: `diode = { rated_voltage = "4.2 kV"`}},
		Changes: []rule.Change{{Rule: "diode.reverse_voltage", Subject: "multiplier.diode", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(groups(e, isDiode), "no diode is described", func(g group) rule.Finding {
			rated, at := g.elements[0].DiodeRating()
			r := rating[quantity.Voltage]{what: "reverse voltage", rated: rated, given: at.Line > 0, key: at.Key,
				derating: limits.DiodeReverse, stress: (*evidence.Evidence).ReversePeak}
			return r.judge(e, g, about("diode.reverse_voltage", rule.Equipment, g, at))
		})
	},
}

var diodeCurrent = rule.Rule{
	ID: "diode.mean_current", Title: "Diode mean current",
	Demands: "The mean forward current of a diode stays at or below " + limits.DiodeCurrent.Allowed() + " of its rating.",
	Applies: "Every diode of the multiplier.",
	Margin:  limits.DiodeCurrent.Comfort("the rating"),
	Concern: rule.Equipment,
	Sources: []rule.Source{limits.DiodeCurrent.Source},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `rated_current = "5 mA"`, Becomes: `rated_current = "80 uA"`}},
		Changes: []rule.Change{{Rule: "diode.mean_current", Subject: "multiplier.diode", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(groups(e, hasDiodePart), "no multiplier diode is described", func(g group) rule.Finding {
			rated := g.elements[0].DiodePart.RatedCurrent
			r := rating[quantity.Current]{what: "mean current", rated: rated.V, given: rated.Set(), key: rated.Key,
				derating: limits.DiodeCurrent, stress: (*evidence.Evidence).DiodeMean}
			return r.judge(e, g, about("diode.mean_current", rule.Equipment, g, rated.Place))
		})
	},
}

func hasDiodePart(el circuit.Element) bool { return el.DiodePart != nil }

var diodeSurge = rule.Rule{
	ID: "diode.surge_current", Title: "Diode current in an arc",
	Demands: "The peak current that an arc at the gun drives through a diode stays at or below its single-pulse rating.",
	Applies: "Every diode of the multiplier, regulation lost.",
	Margin:  limits.DiodeSurge.Comfort("the rating"),
	Concern: rule.Equipment,
	Fault:   true,
	Sources: []rule.Source{limits.DiodeSurge.Source},
	Example: rule.Example{
		Swaps: []rule.Swap{{Was: `surge_current = "3 A"`, Becomes: `surge_current = "50 mA"`}},
		Changes: []rule.Change{
			{Rule: "diode.surge_current", Subject: "multiplier.diode", Verdict: rule.Fails},
			{Rule: "start.diode_current", Subject: "multiplier.diode", Verdict: rule.Fails},
		},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(groups(e, hasDiodePart), "no multiplier diode is described", func(g group) rule.Finding {
			rated := g.elements[0].DiodePart.SurgeCurrent
			r := rating[quantity.Current]{what: "arc current", rated: rated.V, given: rated.Set(), key: rated.Key,
				derating: limits.DiodeSurge, conditions: evidence.LostCorners(), stress: (*evidence.Evidence).ArcDiodePeak}
			return r.judge(e, g, about("diode.surge_current", rule.Equipment, g, rated.Place))
		})
	},
}
