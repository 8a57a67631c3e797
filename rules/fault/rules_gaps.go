package fault

import (
	"fmt"
	"slices"
	"strings"

	"kilovet/hv/chain"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/rule"
)

var gapSource = rule.Source{Text: "decision of this review: passing a tabulated clearance, or the share of the estimate that is allowed, is no flashover yet, and towards bonded metal or between parts the bonds carry what it would become; above the whole estimate it flashes over, and towards what a hand can reach nothing stands between", Mark: rule.Practice}

var gaps = rule.Rule{
	ID: "fault.spacing", Title: "Spacings in a single fault",
	Demands: "What a single fault puts across a spacing neither breaks it down nor passes the clearance of the tables, unless an independent measure switches off.",
	Applies: "Every spacing across which a fault puts more than any state does. It fails where the estimate of breakdown is passed, and where any limit is and a side can be touched; else a limit that is passed is marginal.",
	Margin:  "marginal where a limit is passed towards earthed metal or between parts and the estimate of breakdown is not; failing where that is, and where a side can be touched or is the mains",
	Concern: rule.Life,
	Sources: []rule.Source{faultSource, gapSource},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: "name       = \"stages 1 to 3\"\nfrom       = \"stage.1\"\nto         = \"stage.2\"\nalso       = [\"stage.3\"]\nmedium     = \"air\"\ninsulation = \"functional\"\nclearance  = \"18 mm\"", Becomes: "name       = \"stages 1 to 3\"\nfrom       = \"stage.1\"\nto         = \"stage.2\"\nalso       = [\"stage.3\"]\nmedium     = \"air\"\ninsulation = \"functional\"\nclearance  = \"70 mm\""}},
		Changes: []rule.Change{{Rule: "fault.spacing", Subject: "stages 1 to 3", Verdict: rule.Meets}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		if !e.HasSupply() {
			return rule.Over(noSupply)
		}
		return judgeGaps(e)
	},
}

func judgeGaps(e *evidence.Evidence) rule.Judgement {
	var found []rule.Finding
	nothing := "no fault puts more across a described spacing than the states of the chain do"
	all := e.Chain().Spacings
	for i := range all {
		f, raised := judgeGap(e, &all[i])
		if raised {
			found = append(found, f)
			continue
		}
		if _, err := e.Spacing(&all[i]); err != nil {
			nothing = "what a fault puts across a spacing is not known where its voltage is not, which the rules of that spacing say"
		}
	}
	if len(all) == 0 {
		return rule.Over("no spacing is described")
	}
	return withUnknown(found, rule.Finding{Rule: "fault.spacing", Concern: rule.Life, Sources: []rule.Source{faultSource}}, StudyAll(e), nothing)
}

// judgeGap is the worst that any fault does to one spacing.
func judgeGap(e *evidence.Evidence, s *chain.Spacing) (rule.Finding, bool) {
	mine := func(f rule.Finding) bool { return strings.HasPrefix(f.Rule, "spacing.") && f.Subject == s.Name.V }
	worst, by, found := worstOf(StudyAll(e), mine)
	if !found {
		return rule.Finding{}, false
	}
	worst, by = strongest(StudyAll(e), mine, worst, by, touches(e, s))
	f := worst
	f.Rule, f.Under, f.Because = "fault.spacing", by.Name, by.Name+": "+worst.Because
	if f.Verdict == rule.Unassessed {
		return f, true
	}
	f.Verdict = rule.Meets
	if Share(worst) <= 1 {
		return f.Assume().WithoutRemedyIfMet(), true
	}
	if m, caught := by.Caught(); caught {
		f.Relation, f.Needed, f.Provided, f.Margin = rule.Presence, nil, nil, nil
		f.Because += fmt.Sprintf("; the %s catches it: %s", m.Name, m.Because)
		return f.Assume(m.Assumes...).WithoutRemedyIfMet(), true
	}
	f.Verdict = rule.Marginal
	switch {
	case touches(e, s):
		f.Verdict, f.Concern = rule.Fails, rule.Life
	case flashes(worst):
		f.Verdict, f.Concern = rule.Fails, rule.Equipment
		f.Because += "; it flashes over to bonded metal or between parts"
	default:
		f.Because += "; a limit is passed, the estimate of breakdown is not"
	}
	f.Because += "; nothing described catches it"
	if by.Add != "" {
		f.Remedy = by.Add + "; or " + f.Remedy
	}
	return f, true
}

// strongest is what to judge a gap by in place of the worst: a flashover that nothing catches,
// and, where a limit that is passed would not fail, that nobody knows whether it is one.
func strongest(all []Outcome, mine func(rule.Finding) bool, worst rule.Finding, by Outcome, touched bool) (rule.Finding, Outcome) {
	if over, through, found := worstOf(uncaught(all), func(f rule.Finding) bool { return mine(f) && flashes(f) }); found {
		return over, through
	}
	_, caught := by.Caught()
	if weight(worst, caught) < 3 || touched {
		return worst, by
	}
	if open, through, found := worstOf(uncaught(all), func(f rule.Finding) bool {
		return mine(f) && f.Rule == "spacing.breakdown" && f.Verdict == rule.Unassessed
	}); found {
		return open, through
	}
	return worst, by
}

// flashes reports whether a finding is that a gap has more than it is expected to stand.
func flashes(f rule.Finding) bool {
	return f.Rule == "spacing.breakdown" && f.Whole != nil && f.Provided != nil && !quantity.AtMost(quantity.Voltage(f.Provided.Value), quantity.Voltage(f.Whole.Value))
}

// uncaught are the outcomes that no measure catches.
func uncaught(all []Outcome) []Outcome {
	return slices.DeleteFunc(slices.Clone(all), func(o Outcome) bool {
		_, caught := o.Caught()
		return caught
	})
}

// touches reports whether one side of a spacing can be touched.
func touches(e *evidence.Evidence, s *chain.Spacing) bool {
	var all []string
	if a := e.Chain().Access; a != nil {
		all = a.Touchable.V
	}
	all = append(slices.Clone(all), "mains")
	return slices.ContainsFunc(append([]string{s.From.V, s.To.V}, s.Also.V...), func(node string) bool { return slices.Contains(all, node) })
}
