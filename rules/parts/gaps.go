package parts

import (
	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

func isGap(el circuit.Element) bool { return el.Kind == circuit.Gap }

var gapStrikes = rule.Rule{
	ID: "gap.strikes", Title: "Gaps and clamps at rest",
	Demands: "No gap, gas tube, varistor or clamp strikes while nothing has failed; every figure takes them as open.",
	Applies: "Every spark gap, clamp and varistor, in every state.",
	Margin:  limits.InsulationVoltage.Comfort("its voltage"),
	Concern: rule.Equipment,
	Sources: []rule.Source{limits.InsulationVoltage.Source},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `clamp    = { voltage = "1.2 kV", kind = "spark gap" }`, Becomes: `clamp    = { voltage = "250 V", kind = "spark gap" }`}},
		Changes: []rule.Change{{Rule: "gap.strikes", Subject: "bias.clamp", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(groups(e, isGap), "no gap or clamp is described", func(g group) rule.Finding {
			r := rating[quantity.Voltage]{what: "voltage", rated: g.elements[0].Strikes, given: true,
				derating: limits.InsulationVoltage, stress: (*evidence.Evidence).ElementPeak}
			return r.judge(e, g, about("gap.strikes", rule.Equipment, g, g.elements[0].Place))
		})
	},
}
