package fault

import (
	"fmt"
	"slices"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

// worstOf finds the finding of a sort that uses most of what is allowed; one without an
// answer counts as worse than any that is met.
func worstOf(all []Outcome, sort func(rule.Finding) bool) (worst rule.Finding, by Outcome, found bool) {
	for _, o := range all {
		_, caught := o.Caught()
		for _, f := range o.Findings {
			if sort(f) && (!found || heavier(f, caught, worst, by)) {
				worst, by, found = f, o, true
			}
		}
	}
	return worst, by, found
}

func heavier(f rule.Finding, caught bool, than rule.Finding, by Outcome) bool {
	_, before := by.Caught()
	a, b := weight(f, caught), weight(than, before)
	if a != b {
		return a > b
	}
	return Share(f) > Share(than)
}

// weight orders findings: passed and not caught, without an answer, passed and caught, met.
func weight(f rule.Finding, caught bool) int {
	switch {
	case f.Verdict == rule.Fails && !caught:
		return 3
	case f.Verdict == rule.Unassessed:
		return 2
	case f.Verdict == rule.Fails:
		return 1
	}
	return 0
}

var reached = rule.Rule{
	ID: "fault.touch", Title: "Nodes within reach in a single fault",
	Demands: "With any single fault a node within reach stays at or below 120 V DC, or limited in current, charge and energy.",
	Applies: "Every node listed as touchable, the chassis, the screen of a cable, and the return of the multiplier where the enclosure is open.",
	Concern: rule.Life,
	Sources: []rule.Source{limits.TouchFaultSource, limits.FaultCurrentSource, limits.TouchChargeSource, limits.TouchEnergySource},
	Example: rule.Example{
		Swaps: []rule.Swap{{Was: `touchable       = ["divider.tap"]`, Becomes: `touchable       = ["divider.tap", "cathode"]`}},
		Changes: []rule.Change{
			{Rule: "fault.touch", Subject: "cathode", Verdict: rule.Fails},
			{Rule: "touch.voltage", Subject: "cathode", Verdict: rule.Fails},
		},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		if !e.HasSupply() {
			return rule.Over(noSupply)
		}
		if a := e.Chain().Access; a == nil || !a.Touchable.Set() {
			return rule.Over("what can be touched is not described; touch.voltage says so")
		}
		var j rule.Judgement
		for _, node := range withinReach(e) {
			if f, found := judgeReach(e, node); found {
				j.Findings = append(j.Findings, f)
			}
		}
		return withUnknown(j.Findings, rule.Finding{Rule: "fault.touch", Concern: rule.Life, Place: e.Chain().Access.Touchable.Place,
			Sources: []rule.Source{limits.TouchFaultSource}}, StudyAll(e), "no node is within reach")
	},
}

// withinReach are the nodes that can be touched in any fault, each once: every one that is
// listed, and those that only a fault lifts; of these the return not in a closed enclosure.
func withinReach(e *evidence.Evidence) []string {
	access := e.Chain().Access
	lifted := []string{circuit.Chassis, "cable.screen"}
	if !access.Enclosure.Set() || access.Enclosure.V == "open" {
		lifted = append(lifted, "foot")
	}
	var all []string
	for _, node := range append(slices.Clone(access.Touchable.V), lifted...) {
		if !slices.Contains(all, node) {
			all = append(all, node)
		}
	}
	return all
}

// judgeReach is the worst that any fault puts on one node within reach.
func judgeReach(e *evidence.Evidence, node string) (rule.Finding, bool) {
	worst, by, found := worstOf(StudyAll(e), func(f rule.Finding) bool { return f.Rule == "touch.voltage" && f.Subject == node })
	if !found {
		return rule.Finding{}, false
	}
	f := worst
	f.Rule, f.Under, f.Because = "fault.touch", by.Name, by.Name+": "+worst.Because
	f.Place = e.Chain().Access.Touchable.Place
	if f.Verdict == rule.Meets || f.Verdict == rule.Unassessed {
		return f.WithoutRemedyIfMet(), true
	}
	f.Remedy = by.Add
	if f.Remedy == "" {
		f.Remedy = "put it out of reach"
	}
	return held(e, node, by, f), true
}

// held looks for what keeps people from a node that the fault lifts.
func held(e *evidence.Evidence, node string, by Outcome, f rule.Finding) rule.Finding {
	bond, cable := e.Chain().Access.EarthBond, e.Chain().Cable
	if m, caught := by.Caught(); caught {
		f.Because += fmt.Sprintf("; the %s switches off: %s", m.Name, m.Because)
		return present(f).Assume(append(m.Assumes, "the "+m.Name+" acts before anybody is hurt")...)
	}
	switch {
	case node == circuit.Chassis && (bond == nil || !bond.Count.Set()):
		return f.Lacking(lack.Key("access.earth_bond.count"))
	case node == circuit.Chassis && bond.Count.V > 1:
		f.Because += "; a second bond holds it"
		return present(f)
	case node == "cable.screen" && cable.ScreenEarths.V > 1:
		f.Because += "; the other end of the screen holds it"
		return present(f)
	case node == "cable.screen" && !cable.ScreenEarths.Set():
		f.Because += "; " + cable.ScreenEarths.Key + " is not given"
		return present(f).Assume("the screen of the cable is earthed at both ends")
	}
	return f
}

// present turns a finding of amounts into one of presence: something holds.
func present(f rule.Finding) rule.Finding {
	f.Needed, f.Provided, f.Margin = nil, nil, nil
	return f.There(true)
}
