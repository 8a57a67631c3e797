package people

import (
	"fmt"
	"slices"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

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
		return *only(f.Lacking(lack.Key("access.touchable")))
	}
	if !access.Touchable.Set() {
		f.Subject, f.Place = "access", access.Here()
		return *only(f.Lacking(lack.Key("access.touchable")))
	}
	var j rule.Judgement
	for i, node := range access.Touchable.V {
		if slices.Contains(access.Touchable.V[:i], node) {
			continue
		}
		f.Subject, f.Place = node, access.Touchable.Place
		j.Findings = append(j.Findings, touchable(e, node, f).Assume(exact(e, at(e, node))...))
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
	most, err := evidence.Worst(e, []string{node},
		func(e *evidence.Evidence, n string) (quantity.Voltage, error) { return e.Touched(n) })
	if err != nil {
		return f.Lacking(err)
	}
	f.Under = most.Under.Text()
	f.Because = fmt.Sprintf("%s reaches %s", node, quantity.Text(most.Value))
	limit, err := touchLimit(e.Under(most.Under), node)
	if err != nil {
		return f.Lacking(err)
	}
	if quantity.AtMost(most.Value, limit) {
		return f.Most(rule.Of(most.Value), rule.Of(limit), 0)
	}
	f.Remedy = "put it out of reach, or limit its voltage, current and charge"
	return limited(e.Under(most.Under), node, most.Value, f)
}

// touchLimit is the voltage that may be touched: that of a direct voltage, or the peak
// of an alternating one where more than a tenth of it swings.
func touchLimit(e *evidence.Evidence, node string) (quantity.Voltage, error) {
	peak, err := e.Between(node, "ground")
	if err != nil {
		return 0, err
	}
	swing, err := e.Swing(node, "ground")
	if err != nil {
		return 0, err
	}
	allowed := allowedIn(e)
	if e.OnMains(node) || !quantity.AtMost(swing/2, peak*limits.TouchRipple) {
		return allowed.peak, nil
	}
	return allowed.voltage, nil
}

// allowed is what may be touched.
type allowed struct {
	voltage, peak quantity.Voltage
	current       quantity.Current
	source        rule.Source // of the current
}

// allowedIn is what may be touched in the normal condition, or in a single fault.
func allowedIn(e *evidence.Evidence) allowed {
	if e.Failed() {
		return allowed{limits.FaultVoltage, limits.FaultPeak, limits.FaultCurrent, limits.FaultCurrentSource}
	}
	return allowed{limits.TouchVoltage, limits.TouchPeak, limits.TouchCurrent, limits.TouchCurrentSource}
}

// limited judges a node above the touch voltage by its charge or energy; without a
// computed current it cannot pass.
func limited(e *evidence.Evidence, node string, v quantity.Voltage, f rule.Finding) rule.Finding {
	if e.OnMains(node) {
		return carried(e, node, f)
	}
	short, err := e.ShortAt(node)
	if err != nil {
		return f.Lacking(err)
	}
	provided, needed, source := delivers(short, v)
	f.Sources = append(f.Sources, source)
	f.Because += fmt.Sprintf(", above what may be touched, and delivers %s and %s in a short", quantity.Text(short.Charge), quantity.Text(short.Energy))
	if !quantity.AtMost(provided.Value, needed.Value) {
		return f.Most(provided, needed, 0)
	}
	return carried(e, node, f)
}

// carried judges a node by the current that its supply drives through a person, for as long
// as it is on.
func carried(e *evidence.Evidence, node string, f rule.Finding) rule.Finding {
	current, err := e.TouchCurrent(node)
	if err != nil {
		return f.Lacking(err)
	}
	allowed := allowedIn(e)
	f.Sources = append(f.Sources, allowed.source)
	f.Because += fmt.Sprintf("; the supply drives %s through 2 kΩ there", quantity.Text(current))
	return f.Most(rule.Of(current), rule.Of(allowed.current), 0)
}
