// Package radiation judges X-rays from places where electrons stop. Its estimates
// replace no survey.
package radiation

import (
	"fmt"
	"slices"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var (
	doseSource   = rule.Source{Text: "1 µSv/h at 0.1 m from an accessible surface (UK Ionising Radiations Regulations 1999, Schedule 1; German X-ray ordinance s. 5)", Mark: rule.Read, Governs: true}
	exemptSource = rule.Source{Text: "apparatus up to 5 kV is exempt (French Public Health Code R1333-106)", Mark: rule.Read, Governs: true}
)

var ports = rule.Rule{
	ID: "xray.ports", Title: "Ports and windows",
	Demands: "Above 5 kV every port, window and wall that X-rays could leave through has its own [[shield]], and this is stated.",
	Applies: "Where electrons can reach more than 5 kV.",
	Concern: rule.Life,
	Sources: []rule.Source{exemptSource},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: "ports_described = true", Becomes: ""}},
		Changes: []rule.Change{{Rule: "xray.ports", Subject: "vessel", Verdict: rule.Unassessed}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		f := rule.Finding{Rule: "xray.ports", Subject: "vessel", Concern: rule.Life, Relation: rule.Presence, Sources: []rule.Source{exemptSource}}
		reached, over, ok := energetic(e, &f)
		if !ok {
			return over
		}
		access := e.Chain().Access
		if access == nil || !access.PortsDescribed.V || len(e.Chain().Shields) == 0 {
			return rule.One(f.Lacking(lack.Because(fmt.Sprintf("electrons can reach %s; it is not stated that every port and window has its own [[shield]]", quantity.Text(reached)),
				"access.ports_described", "shield")))
		}
		if t := unshielded(e.Chain()); t != nil {
			f.Place = t.Here()
			return rule.One(f.Lacking(lack.Because(fmt.Sprintf("no [[shield]] stands before the target %s", t.Name.V), "shield")))
		}
		if err := stopped(e); err != nil {
			return rule.One(f.Lacking(err))
		}
		f.Place = access.PortsDescribed.Place
		f.Because = fmt.Sprintf("electrons can reach %s; %s described as all there are", quantity.Text(reached), rule.Number(len(e.Chain().Shields), "wall, port or window is", "walls, ports and windows are"))
		return rule.One(f.There(true))
	},
}

var shield = rule.Rule{
	ID: "xray.rate", Title: "X-rays beyond a wall",
	Demands: "The upper estimate of the rate 0.1 m outside each wall, at the highest voltage, stays at or below 1 µSv/h.",
	Applies: "Every [[shield]], where electrons can reach more than 5 kV. An estimate replaces no survey.",
	Margin:  "marginal above a third of the limit",
	Concern: rule.Life,
	Sources: []rule.Source{doseSource},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `thickness = "4 mm"`, Becomes: `thickness = "0.2 mm"`}},
		Changes: []rule.Change{{Rule: "xray.rate", Subject: "column wall", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		if len(e.Chain().Shields) == 0 {
			return rule.Over("no shield is described")
		}
		f := rule.Finding{Rule: "xray.rate", Subject: "vessel", Concern: rule.Life, Relation: rule.AtMost, Sources: []rule.Source{doseSource}}
		reached, over, ok := energetic(e, &f)
		if !ok {
			return over
		}
		var j rule.Judgement
		for i := range e.Chain().Shields {
			j.Findings = append(j.Findings, judgeShield(e, &e.Chain().Shields[i], reached, f))
		}
		return j
	},
}

// unshielded is the first target without a shield of its own.
func unshielded(c *chain.Chain) *chain.Target {
	for i := range c.Targets {
		if !slices.ContainsFunc(c.Shields, func(s chain.Shield) bool { return s.Target.V == c.Targets[i].Name.V }) {
			return &c.Targets[i]
		}
	}
	return nil
}

// stopped is a lack where the targets stop less current than the gun emits: the rest
// stops where nothing is described.
func stopped(e *evidence.Evidence) error {
	emission, err := e.Emission()
	if err != nil {
		return err
	}
	var sum quantity.Current
	for _, t := range e.Chain().Targets {
		sum += t.Current.V
	}
	if !quantity.AtLeast(sum, emission) {
		return lack.Because(fmt.Sprintf("the targets stop %s of the %s emitted", quantity.Text(sum), quantity.Text(emission)), "target.current")
	}
	return nil
}

// energetic is the voltage electrons can reach; not ok where the rule is answered by
// the judgement beside it.
func energetic(e *evidence.Evidence, f *rule.Finding) (quantity.Voltage, rule.Judgement, bool) {
	c := e.Chain()
	if !e.HasSupply() || !c.HasCathode() && len(c.Targets) == 0 && len(c.Shields) == 0 && !e.HasVessel() {
		return 0, rule.Over("neither a cathode nor a vessel is described"), false
	}
	most, err := e.Accelerating()
	if err != nil {
		return 0, rule.One(f.Lacking(err)), false
	}
	if quantity.AtMost(most.Value, limits.HarmlessBelow) {
		return 0, rule.Over("electrons cannot reach more than 5 kV"), false
	}
	f.Under = most.Under.Text()
	return most.Value, rule.Judgement{}, true
}

func judgeShield(e *evidence.Evidence, s *chain.Shield, u quantity.Voltage, f rule.Finding) rule.Finding {
	f.Subject, f.Place = s.Name.V, s.Here()
	x, err := e.Radiation(s, u)
	if err != nil {
		return f.Lacking(err)
	}
	f.Because = fmt.Sprintf("at %s the air kerma rate at 0.1 m is estimated at %s, at most %s", quantity.Text(u), quantity.Text(x.Rate), quantity.Text(x.Upper))
	f.Remedy = "thicken the wall, or use lead; survey before anybody stays near it"
	return f.Most(rule.Of(x.Upper), rule.Of(limits.DoseRate), limits.DoseComfort-1).WithoutRemedyIfMet()
}

// Rules lists the rules of this family.
func Rules() []rule.Rule { return []rule.Rule{ports, shield} }
