package parts

import (
	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

// starting is the one condition in which a start is judged.
func starting() []evidence.Condition { return []evidence.Condition{{State: evidence.Working}} }

var startCurrent = rule.Rule{
	ID: "start.diode_current", Title: "Diode current while starting",
	Demands: "The largest current of a diode on the way up from discharged stays at or below its single-pulse rating.",
	Applies: "Every diode of the multiplier; full drive at once, or the ramp where drive.ramp describes one; nominal values, loads on.",
	Margin:  limits.DiodeSurge.Comfort("the rating"),
	Concern: rule.Equipment,
	Sources: []rule.Source{limits.DiodeSurge.Source},
	Example: rule.Example{
		Swaps: []rule.Swap{{Was: `surge_current = "3 A"`, Becomes: `surge_current = "400 mA"`}},
		Changes: []rule.Change{
			{Rule: "start.diode_current", Subject: "multiplier.diode", Verdict: rule.Fails},
		},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(groups(e, hasDiodePart), "no multiplier diode is described", func(g group) rule.Finding {
			rated := g.elements[0].DiodePart.SurgeCurrent
			r := rating[quantity.Current]{what: "current on the way up", rated: rated.V, given: rated.Set(), key: rated.Key,
				derating: limits.DiodeSurge, conditions: starting(), stress: (*evidence.Evidence).StartDiodePeak}
			f := r.judge(e, g, about("start.diode_current", rule.Equipment, g, rated.Place))
			return onTheRamp(e, f)
		})
	},
}

var startVoltage = rule.Rule{
	ID: "start.voltage", Title: "Voltages while starting",
	Demands: "On the way up from discharged no capacitor of the columns and no diode sees more than its rating.",
	Applies: "Capacitors and diodes of the multiplier, until the top has 95 % of its final mean; full drive at once, or the ramp where drive.ramp describes one.",
	Margin:  limits.StartVoltage.Comfort("the rating"),
	Concern: rule.Equipment,
	Sources: []rule.Source{limits.StartVoltage.Source},
	Example: rule.Example{
		Swaps: []rule.Swap{{Was: `rated_voltage = "8.5 kV"`, Becomes: `rated_voltage = "3.5 kV"`}},
		Changes: []rule.Change{
			{Rule: "capacitor.voltage", Subject: "multiplier.smoothing_capacitor", Verdict: rule.Fails},
			{Rule: "start.voltage", Subject: "multiplier.smoothing_capacitor", Verdict: rule.Fails},
		},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(groups(e, isLadderPart), "no multiplier is described", func(g group) rule.Finding {
			r := rating[quantity.Voltage]{what: "voltage on the way up", derating: limits.StartVoltage, conditions: starting(), stress: (*evidence.Evidence).StartVoltage}
			el := g.elements[0]
			at := el.Place
			if el.CapacitorPart != nil {
				v := el.CapacitorPart.RatedVoltage
				r.rated, r.given, r.key, at = v.V, v.Set(), v.Key, v.Place
			} else {
				r.rated, at = el.DiodeRating()
				r.given, r.key = at.Line > 0, at.Key
			}
			return onTheRamp(e, r.judge(e, g, about("start.voltage", rule.Equipment, g, at)))
		})
	},
}

func isLadderPart(el circuit.Element) bool {
	return el.Role == circuit.Ladder && (el.CapacitorPart != nil || el.DiodePart != nil)
}

// onTheRamp says which start was judged.
func onTheRamp(e *evidence.Evidence, f rule.Finding) rule.Finding {
	if f.Provided == nil {
		return f
	}
	f.Under = "start at full drive"
	if e.Chain().Drive.Ramp.Set() {
		f.Under = "start on the ramp"
	}
	return f
}
