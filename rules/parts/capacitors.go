package parts

import (
	"fmt"

	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var capacitorVoltage = rule.Rule{
	ID: "capacitor.voltage", Title: "Capacitor voltage",
	Demands: "The largest voltage on a capacitor, peaks included, stays at or below " + limits.CapacitorVoltage.Allowed() + " of its rating.",
	Applies: "Every capacitor that the description gives as a part.",
	Margin:  limits.CapacitorVoltage.Comfort("the rating"),
	Concern: rule.Equipment,
	Sources: []rule.Source{limits.CapacitorVoltage.Source},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `rated_voltage = "8.5 kV"`, Becomes: `rated_voltage = "4.5 kV"`}},
		Changes: []rule.Change{{Rule: "capacitor.voltage", Subject: "multiplier.smoothing_capacitor", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(groups(e, isCapacitor), "no capacitor is described", func(g group) rule.Finding { return judgeCapacitor(e, g) })
	},
}

func isCapacitor(el circuit.Element) bool { return isA(circuit.Capacitor, el) }

func hasDielectric(el circuit.Element) bool { return el.CapacitorPart != nil }

func judgeCapacitor(e *evidence.Evidence, g group) rule.Finding {
	part := ratingsOf(g.elements[0])
	f := about("capacitor.voltage", rule.Equipment, g, part.voltage.Place)
	r := rating[quantity.Voltage]{what: "voltage", rated: part.voltage.V, given: part.voltage.Set(), key: part.voltage.Key,
		derating: limits.CapacitorVoltage, stress: (*evidence.Evidence).ElementPeak, tolerance: &part.tolerance}
	return r.judge(e, g, f)
}

var capacitorDielectric = rule.Rule{
	ID: "capacitor.dielectric", Title: "Capacitance under voltage",
	Demands: "The dielectric is known, and a class-2 ceramic has its capacitance at the working voltage stated.",
	Applies: "Every capacitor that the description gives as a part.",
	Concern: rule.Performance,
	Sources: []rule.Source{dielectricSource},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `, dielectric = "film"`, Becomes: ""}},
		Changes: []rule.Change{{Rule: "capacitor.dielectric", Subject: "bias.bypass", Verdict: rule.Marginal}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(groups(e, hasDielectric), "no capacitor is described", judgeDielectric)
	},
}

var dielectricSource = rule.Source{Text: "class-2 ceramics keep as little as a quarter of their capacitance at rated voltage (makers' bias curves)", Mark: rule.Read, Governs: true}

func judgeDielectric(g group) rule.Finding {
	el := g.elements[0]
	f := about("capacitor.dielectric", rule.Performance, g, el.CapacitorPart.Dielectric.Place)
	f.Sources = []rule.Source{dielectricSource}
	f.Relation = rule.Presence
	if el.Doubt != nil {
		return f.Lacking(el.Doubt)
	}
	if !el.CapacitorPart.Dielectric.Set() {
		f.Because = "the dielectric is not given; its capacitance is taken as independent of voltage"
		f.Remedy = "give " + el.CapacitorPart.Dielectric.Key
		return f.There(true).Assume("stable dielectric of " + g.subject)
	}
	f.Because = fmt.Sprintf("%s: its capacitance at the working voltage is known", el.CapacitorPart.Dielectric.V)
	return f.There(true)
}
