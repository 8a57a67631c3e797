package people

import (
	"fmt"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

func missing(keys ...string) error { return lack.Key(keys...) }

var touch = rule.Rule{
	ID: "touch.voltage", Title: "Nodes within reach",
	Demands: "A node that a person or tool can reach is at or below 60 V DC, or limited in current, charge and energy.",
	Applies: "Every node listed as touchable, in every state.",
	Concern: rule.Life,
	Sources: []rule.Source{limits.TouchVoltageSource, limits.TouchCurrentSource, limits.TouchChargeSource, limits.TouchEnergySource, limits.StricterCharge},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `touchable       = ["divider.tap"]`, Becomes: `touchable       = ["divider.tap", "cathode"]`}},
		Changes: []rule.Change{{Rule: "touch.voltage", Subject: "cathode", Verdict: rule.Fails}},
	},
	Judge: judgeTouch,
}

func judgeTouch(e *evidence.Evidence) rule.Judgement {
	if !e.HasSupply() {
		return rule.Over("no supply is described")
	}
	f := rule.Finding{Rule: "touch.voltage", Concern: rule.Life, Relation: rule.AtMost, Sources: touchSources()}
	access := e.Chain().Access
	if access == nil {
		f.Subject = "access"
		return *only(f.Lacking(missing("access.touchable")))
	}
	if !access.Touchable.Set() {
		f.Subject, f.Place = "access", access.Here()
		return *only(f.Lacking(missing("access.touchable")))
	}
	var j rule.Judgement
	for _, node := range access.Touchable.V {
		f.Subject, f.Place = node, access.Touchable.Place
		j.Findings = append(j.Findings, touchable(e, node, f))
	}
	if len(j.Findings) == 0 {
		return rule.Over("no node is within reach")
	}
	return j
}

func touchSources() []rule.Source {
	return []rule.Source{limits.TouchVoltageSource, limits.StricterCharge}
}

func touchable(e *evidence.Evidence, node string, f rule.Finding) rule.Finding {
	most, err := evidence.Largest(e, evidence.Ratings(), []string{node},
		func(e *evidence.Evidence, n string) (quantity.Voltage, error) { return e.Between(n, "ground") })
	if err != nil {
		return f.Lacking(err)
	}
	f.Under = most.Under.Text()
	f.Because = fmt.Sprintf("%s reaches %s", node, quantity.Text(most.Value))
	if quantity.AtMost(most.Value, limits.TouchVoltage) {
		return f.Most(rule.Of(most.Value), rule.Of(limits.TouchVoltage), 0)
	}
	f.Remedy = "put it out of reach, or limit its voltage, current and charge"
	return limited(e.Under(most.Under), node, most.Value, f)
}

// limited judges a node above the touch voltage by its charge or energy; without a
// computed current it cannot pass.
func limited(e *evidence.Evidence, node string, v quantity.Voltage, f rule.Finding) rule.Finding {
	short, err := e.ShortAt(node)
	if err != nil {
		return f.Lacking(err)
	}
	provided, needed, source := delivers(short, v)
	f.Sources = append(f.Sources, source)
	f.Because += fmt.Sprintf(", above 60 V, and delivers %s and %s in a short", quantity.Text(short.Charge), quantity.Text(short.Energy))
	if !quantity.AtMost(provided.Value, needed.Value) {
		return f.Most(provided, needed, 0)
	}
	current, err := e.ShortCurrent(node)
	if err != nil {
		return f.Lacking(err)
	}
	f.Sources = append(f.Sources, limits.TouchCurrentSource)
	f.Because += fmt.Sprintf("; the supply drives %s into a short there", quantity.Text(current))
	return f.Most(rule.Of(current), rule.Of(limits.TouchCurrent), 0)
}
