package fault

import (
	"fmt"
	"slices"

	"kilovet/hv/circuit"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var standingSource = rule.Source{Text: "an arc at the gun is no rare event: what the drive feeds into it must end before a resistor in its way burns; how long a trip takes is not reckoned", Mark: rule.Practice}

var standingArc = rule.Rule{
	ID: "series.arc_power", Title: "Series resistors while an arc stands",
	Demands: "While an arc at output or cathode stands, no resistor in its way takes more than its rated power, or a trip ends it.",
	Applies: "Filter, gun-end and bias resistors and loose ones in the lead, with the drive where the regulation takes it. The energy of the stored charge is judged apart.",
	Margin:  "marginal above the rating where a trip ends it, failing where none does",
	Concern: rule.Equipment,
	Sources: []rule.Source{limits.FaultSource, standingSource},
	Example: rule.Example{
		Swaps: []rule.Swap{{Was: `over_current = { trip = "200 uA", senses = "return", acts_on = "drive supply" }`, Becomes: ""}},
		Changes: []rule.Change{
			{Rule: "series.arc_power", Subject: "filter.1.resistor", Verdict: rule.Fails},
			{Rule: "fault.rating", Subject: "arc", Verdict: rule.Marginal},
			{Rule: "fault.rating", Subject: "cable shorted", Verdict: rule.Marginal},
			{Rule: "fault.rating", Subject: "bleeder shorted", Verdict: rule.Marginal},
			{Rule: "fault.rating", Subject: "filter capacitor shorted", Verdict: rule.Marginal},
			{Rule: "fault.rating", Subject: "heater feed breakdown", Verdict: rule.Marginal},
			{Rule: "protection.over_current", Subject: "chain"},
		},
	},
	Judge: judgeStandingArc,
}

func judgeStandingArc(e *evidence.Evidence) rule.Judgement {
	if !e.HasSupply() {
		return rule.Over(noSupply)
	}
	arcs := slices.DeleteFunc(slices.Clone(StudyAll(e)), func(o Outcome) bool { return o.Class != "arc" })
	parts := inTheWay(e)
	if len(parts) == 0 {
		return rule.Over("no series resistor is described")
	}
	var found []rule.Finding
	for _, part := range parts {
		if f, raised := judgeInTheWay(part, arcs); raised {
			found = append(found, f)
		}
	}
	return withUnknown(found, rule.Finding{Rule: "series.arc_power", Concern: rule.Equipment, Sources: []rule.Source{limits.FaultSource, standingSource}},
		arcs, "no arc puts more power into a series resistor than working does")
}

// inTheWay names the series resistors that are described as parts, in the order of the
// circuit.
func inTheWay(e *evidence.Evidence) []string {
	var all []string
	for _, el := range e.Layout().Elements {
		if el.Kind == circuit.Resistor && el.Role == circuit.Series && (el.ResistorPart != nil || loose(el)) {
			all = append(all, evidence.PartOf(el.Name))
		}
	}
	return slices.Compact(all)
}

// judgeInTheWay is the worst that any standing arc does to one resistor.
func judgeInTheWay(part string, arcs []Outcome) (rule.Finding, bool) {
	worst, by, found := worstOf(arcs, func(f rule.Finding) bool { return f.Rule == "resistor.power" && f.Subject == part })
	if !found {
		return rule.Finding{}, false
	}
	f := worst
	f.Rule, f.Concern, f.Under, f.Because, f.Sources = "series.arc_power", rule.Equipment, by.Name, by.Name+": "+worst.Because, []rule.Source{limits.FaultSource, standingSource}
	switch {
	case f.Verdict == rule.Unassessed:
		return f, true
	case Share(worst) <= 1:
		f.Verdict = rule.Meets
		return f.WithoutRemedyIfMet(), true
	}
	f.Remedy = "an over-current trip that does not rest on what failed, or resistors that bear the power"
	if m, caught := by.Caught(); caught {
		f.Verdict = rule.Marginal
		f.Because += fmt.Sprintf(", until the %s ends it: %s", m.Name, m.Because)
		return f.Assume(m.Assumes...), true
	}
	f.Verdict = rule.Fails
	f.Because += "; nothing described ends it (" + whyNot(by.Measures) + ")"
	return f, true
}
