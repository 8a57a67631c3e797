// Package people judges what could hurt somebody: charge and energy within reach,
// how they are discharged, and how people are kept away.
package people

import (
	"strings"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

// delivers says how a charge and an energy at a voltage stand to the touch limits:
// the one that judges at that voltage, and its source.
func delivers(s evidence.Short, v quantity.Voltage) (provided, needed rule.Amount, source rule.Source) {
	if quantity.AtMost(v, limits.ChargeRuleTo) {
		return rule.Of(s.Charge), rule.Of(limits.TouchCharge), limits.TouchChargeSource
	}
	return rule.Of(s.Energy), rule.Of(limits.TouchEnergy), limits.TouchEnergySource
}

// hazardous finds the first node that is above the touch voltage and not limited in
// current, charge and energy, in any state, nominal or with every part at the high end of
// its tolerance. What is not known counts as not limited.
func hazardous(e *evidence.Evidence) (node string, found bool, err error) {
	for _, corner := range slow() {
		for _, state := range evidence.States {
			in := e.Under(evidence.Condition{State: state, Corner: corner})
			for _, node := range in.Nodes() {
				over, err := exceeds(in, node)
				if err != nil || over {
					return node, over, err
				}
			}
		}
	}
	return "", false, nil
}

func exceeds(e *evidence.Evidence, node string) (bool, error) {
	v, err := e.Between(node, "ground")
	if err != nil || quantity.AtMost(v, limits.TouchVoltage) {
		return false, err
	}
	short, err := e.ShortAt(node)
	if err != nil {
		return false, err
	}
	provided, needed, _ := delivers(short, v)
	if !quantity.AtMost(provided.Value, needed.Value) {
		return true, nil
	}
	i, err := e.TouchCurrent(node)
	return err != nil || !quantity.AtMost(i, limits.TouchCurrent), nil
}

// needsCare starts a rule that is mandatory where there is hazardous charge. It
// gives the judgement at once where the rule does not apply or cannot be judged.
func needsCare(e *evidence.Evidence, f rule.Finding) (*chain.Access, *rule.Judgement) {
	if !e.HasSupply() {
		over := rule.Over("no supply is described")
		return nil, &over
	}
	if e.Chain().Access == nil {
		return nil, only(f.Lacking(lack.Key("access")))
	}
	_, found, err := hazardous(e)
	if err != nil {
		return nil, only(f.Lacking(err))
	}
	if !found {
		over := rule.Over(strings.Join(append([]string{"no node delivers more than the touch limits"}, exact(e, holds)...), "; "))
		return nil, &over
	}
	return e.Chain().Access, nil
}

func only(f rule.Finding) *rule.Judgement { return &rule.Judgement{Findings: []rule.Finding{f}} }
