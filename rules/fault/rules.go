package fault

import (
	"fmt"
	"slices"
	"strings"

	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

// Rules lists the rules of this family.
func Rules() []rule.Rule {
	return []rule.Rule{computed, ratings, gaps, reached, overVoltageTrip, overCurrentTrip, standingArc}
}

var faultSource = rule.Source{Text: "one fault at a time with what follows from it (IEC 61010-1 4.4, from memory)", Mark: rule.Memory, Governs: true}

const noSupply = "no supply is described"

var computed = rule.Rule{
	ID: "fault.computed", Title: "Every single fault computed",
	Demands: "Every single fault and every error of assembly of the library can be computed, so that it can be judged.",
	Applies: "Where a supply is described; what is not computed is judged by nobody.",
	Concern: rule.Equipment,
	Sources: []rule.Source{faultSource},
	Example: rule.Example{
		Swaps: []rule.Swap{{Was: `cutoff              = "420 V"`, Becomes: ""}},
		Changes: []rule.Change{
			{Rule: "fault.computed", Subject: "chain"},
			{Rule: "fault.computed", Subject: "bias.resistor open", Verdict: rule.Unassessed},
			{Rule: "fault.computed", Subject: "bias.resistor shorted", Verdict: rule.Unassessed},
			{Rule: "fault.computed", Subject: "bias.bypass shorted", Verdict: rule.Unassessed},
			{Rule: "fault.computed", Subject: "bias.clamp shorted", Verdict: rule.Unassessed},
			{Rule: "fault.rating", Subject: "chain", Verdict: rule.Unassessed},
			{Rule: "fault.spacing", Subject: notComputed, Verdict: rule.Unassessed},
			{Rule: "fault.touch", Subject: notComputed, Verdict: rule.Unassessed},
			{Rule: "gun.emission_law", Subject: "gun"},
			{Rule: "gun.regulation", Subject: "gun", Verdict: rule.Unassessed},
		},
	},
	Judge: judgeComputed,
}

func judgeComputed(e *evidence.Evidence) rule.Judgement {
	if !e.HasSupply() {
		return rule.Over(noSupply)
	}
	all := rule.Finding{Rule: "fault.computed", Subject: "chain", Concern: rule.Equipment, Relation: rule.Presence,
		Place: e.Chain().Multiplier.Here(), Sources: []rule.Source{faultSource}}
	outcomes := StudyAll(e)
	var j rule.Judgement
	for _, o := range outcomes {
		if o.Err != nil {
			f := all
			f.Subject, f.Because = o.Name, "its consequences are not known"
			j.Findings = append(j.Findings, f.Lacking(o.Err))
		}
	}
	if len(j.Findings) == 0 {
		all.Because = fmt.Sprintf("%d single faults and errors of assembly were computed, each with the regulation's answer", len(outcomes))
		all.Remedy = "take what a fault does to parts that it cuts off for an estimate"
		j.Findings = []rule.Finding{all.There(true).Assume(taken(outcomes)...).Assume(e.Opposing()...).WithoutRemedyIfMet()}
	}
	return j
}

// taken is what the outcomes rest on beyond the description, each once.
func taken(all []Outcome) []string {
	var texts []string
	for _, o := range all {
		for _, a := range o.Assumptions {
			if !slices.Contains(texts, a) {
				texts = append(texts, a)
			}
		}
	}
	return texts
}

var ratings = rule.Rule{
	ID: "fault.rating", Title: "Ratings in a single fault",
	Demands: "No single fault and no error of assembly takes another part above its rating, unless an independent measure of [protection] switches off.",
	Applies: "Every class of faults of the library. One broken part may cost another, hurting nobody: that is marginal and does not fail. Cable and heater feed keep the voltage from hands and mains: passing their rating fails.",
	Margin:  "marginal above the whole rating; for cable and heater feed failing there",
	Concern: rule.Equipment,
	Sources: []rule.Source{limits.FaultSource, faultSource, gradeSource},
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
	Judge: func(e *evidence.Evidence) rule.Judgement {
		if !e.HasSupply() {
			return rule.Over(noSupply)
		}
		var j rule.Judgement
		for _, c := range classes(StudyAll(e)) {
			if f, passed := judgeClass(e, c); passed {
				j.Findings = append(j.Findings, f)
			}
		}
		j.Findings = append(j.Findings, summary(e, j.Findings))
		return j
	},
}

// class is the outcomes of one class of faults.
type class struct {
	name     string
	outcomes []Outcome
}

// classes gathers outcomes by their class, in order.
func classes(all []Outcome) []class {
	var list []class
	at := map[string]int{}
	for _, o := range all {
		i, known := at[o.Class]
		if !known {
			i = len(list)
			at[o.Class] = i
			list = append(list, class{name: o.Class})
		}
		list[i].outcomes = append(list[i].outcomes, o)
	}
	return list
}

// isRating reports whether a finding is about what a part is rated for.
func isRating(f rule.Finding) bool {
	return !strings.HasPrefix(f.Rule, "touch.") && !strings.HasPrefix(f.Rule, "spacing.")
}

// over are the findings of an outcome that pass a limit, of one sort.
func (o Outcome) over(sort func(rule.Finding) bool) []rule.Finding {
	var all []rule.Finding
	for _, f := range o.Passed() {
		if sort(f) {
			all = append(all, f)
		}
	}
	return all
}

// judgeClass gives the worst that a class of faults does to other parts: what nothing
// catches before what something does.
func judgeClass(e *evidence.Evidence, c class) (rule.Finding, bool) {
	var worst *rule.Finding
	var by Outcome
	passing, uncaught := 0, 0
	for _, o := range c.outcomes {
		over := o.over(isRating)
		if len(over) == 0 {
			continue
		}
		passing++
		_, caught := o.Caught()
		if !caught {
			uncaught++
		}
		most := gravest(over)
		_, before := by.Caught()
		if worst == nil || graver(most, caught, *worst, before) {
			worst, by = &most, o
		}
	}
	if worst == nil {
		return rule.Finding{}, false
	}
	f := rule.Finding{Rule: "fault.rating", Subject: c.name, Concern: rule.Equipment, Relation: rule.AtMost, Place: worst.Place,
		Under: by.Name, Sources: []rule.Source{limits.FaultSource}, Needed: worst.Needed, Provided: worst.Provided, Margin: worst.Margin,
		Because: fmt.Sprintf("%s: %s; %s", by.Name, worst.Because, ofClass(passing, len(c.outcomes)))}
	if m, caught := by.Caught(); caught {
		f.Relation, f.Needed, f.Provided, f.Margin = rule.Presence, nil, nil, nil
		f.Because += fmt.Sprintf("; the %s catches it: %s", m.Name, m.Because)
		return f.There(true).Assume(m.Assumes...), true
	}
	f.Verdict, f.Graded = rule.Marginal, true
	if keepsOff(*worst) {
		f.Verdict, f.Concern, f.Graded = rule.Fails, worst.Concern, false
	}
	f.Because += fmt.Sprintf(", %s caught by nothing described (%s)", ofThem(uncaught, passing), whyNot(by.Measures))
	f.Remedy = by.Add
	if f.Remedy == "" {
		f.Remedy = addRegulation
	}
	return f, true
}

// ofClass says how many faults of a class pass a rating.
func ofClass(passing, all int) string {
	switch {
	case all == 1:
		return "the only such fault passes a rating"
	case passing == 1:
		return fmt.Sprintf("1 of %d such faults passes a rating", all)
	}
	return fmt.Sprintf("%d of %d such faults pass a rating", passing, all)
}

func ofThem(n, all int) string {
	if all == 1 {
		return "and is"
	}
	return fmt.Sprintf("%d of them", n)
}

// whyNot says why no measure catches a fault.
func whyNot(all []Measure) string {
	if len(all) == 0 {
		return "no trip is described"
	}
	words := make([]string, len(all))
	for i, m := range all {
		words[i] = m.Name + ": " + m.Because
	}
	return strings.Join(words, "; ")
}

// summary says of all classes together what they do; what fails is a finding of its own.
func summary(e *evidence.Evidence, findings []rule.Finding) rule.Finding {
	f := rule.Finding{Rule: "fault.rating", Subject: "chain", Concern: rule.Equipment, Relation: rule.Presence,
		Place: e.Chain().Multiplier.Here(), Sources: []rule.Source{limits.FaultSource}}
	caught, met := 0, 0
	for _, x := range findings {
		if x.Relation == rule.Presence {
			caught++
		}
		if x.Verdict == rule.Meets {
			met++
		}
	}
	f.Because = fmt.Sprintf("of %s %s another part above its rating; of these an independent trip catches %d",
		rule.Number(len(classes(StudyAll(e))), "class of faults", "classes of faults"), rule.Number(len(findings), "takes", "take"), caught)
	if err := firstOf(uncomputed(StudyAll(e)), unrated(StudyAll(e))); err != nil {
		f.Because = "of what was computed and has a rating: " + f.Because
		return f.Lacking(err)
	}
	if met == len(findings) {
		return f.There(true)
	}
	f.Because += "; " + fmt.Sprintf("%s a part above its rating, which is marginal by decision: one broken part may cost another", rule.Number(len(findings)-met, "leaves", "leave"))
	f.Verdict, f.Graded, f.Remedy = rule.Marginal, true, "read the table of faults, the worst first, and add what stands beside each"
	return f
}
