package parts

import (
	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/hv/steady"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

func isResistor(el circuit.Element) bool { return isA(circuit.Resistor, el) }

var resistorVoltage = rule.Rule{
	ID: "resistor.voltage", Title: "Resistor voltage",
	Demands: "The voltage across each resistor element stays at or below " + limits.ResistorVoltage.Allowed() + " of its rating.",
	Applies: "Every resistor that the description gives as a part, in every state; arcs are judged apart.",
	Margin:  limits.ResistorVoltage.Comfort("the rating"),
	Concern: rule.Equipment,
	Sources: []rule.Source{limits.ResistorVoltage.Source},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `rated_voltage = "5 kV", rated_power = "500 mW"`, Becomes: `rated_voltage = "2.2 kV", rated_power = "500 mW"`}},
		Changes: []rule.Change{{Rule: "resistor.voltage", Subject: "divider.upper", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(groups(e, isResistor), "no resistor is described", func(g group) rule.Finding {
			part := ratingsOf(g.elements[0])
			r := rating[quantity.Voltage]{what: "voltage of each element", rated: part.voltage.V, given: part.voltage.Set(), key: part.voltage.Key,
				derating: limits.ResistorVoltage, stress: (*evidence.Evidence).OnePeak, tolerance: &part.tolerance}
			return r.judge(e, g, about("resistor.voltage", rule.Equipment, g, part.voltage.Place))
		})
	},
}

var resistorPower = rule.Rule{
	ID: "resistor.power", Title: "Resistor power",
	Demands: "The power in each resistor element stays at or below " + limits.ResistorPower.Allowed() + " of its rating at the air temperature of the site.",
	Applies: "Every resistor that the description gives as a part.",
	Margin:  limits.ResistorPower.Comfort("the rating"),
	Concern: rule.Equipment,
	Sources: []rule.Source{limits.ResistorPower.Source},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `rated_voltage = "5 kV", rated_power = "500 mW"`, Becomes: `rated_voltage = "5 kV", rated_power = "20 mW"`}},
		Changes: []rule.Change{{Rule: "resistor.power", Subject: "divider.upper", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(groups(e, isResistor), "no resistor is described", func(g group) rule.Finding { return judgePower(e, g) })
	},
}

func judgePower(e *evidence.Evidence, g group) rule.Finding {
	part := ratingsOf(g.elements[0])
	f := about("resistor.power", rule.Equipment, g, part.power.Place)
	share, err := ambientShare(e)
	if err != nil {
		f.Relation = rule.AtMost
		return f.Lacking(err)
	}
	r := rating[quantity.Power]{what: "power of each element", rated: part.power.V * quantity.Power(share), given: part.power.Set(), key: part.power.Key,
		derating: limits.ResistorPower, stress: (*evidence.Evidence).OnePower, tolerance: &part.tolerance}
	return r.judge(e, g, f)
}

// ambientShare is the part of a resistor's power rating left at the site's air temperature.
func ambientShare(e *evidence.Evidence) (quantity.Fraction, error) {
	site := e.Chain().Site
	if site == nil || !site.AirTemperature.Set() {
		return 0, lack.Key("site.air_temperature")
	}
	return steady.PowerShare(site.AirTemperature.V)
}
