package spacing

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"strings"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/rules/evidence"
	"kilovet/rules/rule"
)

var weakest = rule.Rule{
	ID: "feedthrough.weakest", Title: "Weakest part of a feedthrough",
	Demands: "Every gap, surface and layer of a feedthrough meets what is asked of it; the weakest is named, with the dimension to change.",
	Applies: "Every [[feedthrough]].",
	Concern: rule.Life,
	Sources: []rule.Source{{Text: "the part with the gravest verdict, of those the one with the least margin", Mark: rule.Practice, Governs: true}},
	Example: rule.Example{
		Of:    "lead",
		Swaps: []rule.Swap{{Was: `air_side        = { length = "60 mm"`, Becomes: `air_side        = { length = "11 mm"`}},
		Changes: []rule.Change{
			{Rule: "feedthrough.weakest", Subject: "furnace lead", Verdict: rule.Fails},
			{Rule: "spacing.clearance", Subject: "furnace lead: air side", Verdict: rule.Fails},
			{Rule: "spacing.breakdown", Subject: "furnace lead: air side", Verdict: rule.Marginal},
		},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		if len(e.Chain().Feedthroughs) == 0 {
			return rule.Over("no feedthrough is described")
		}
		parts := judgedParts(e)
		var j rule.Judgement
		for i := range e.Chain().Feedthroughs {
			j.Findings = append(j.Findings, judgeWeakest(&e.Chain().Feedthroughs[i], parts))
		}
		return j
	},
}

// ofParts are the rules about what feedthroughs have.
func ofParts() []rule.Rule {
	return []rule.Rule{clearance, creepage, breakdown, corona, junction, annulus}
}

// judgedParts are the findings of everything that feedthroughs have.
func judgedParts(e *evidence.Evidence) []rule.Finding {
	var all []rule.Finding
	for _, r := range ofParts() {
		all = append(all, r.Judge(e).Findings...)
	}
	return all
}

// WeakestAgain are the findings of a review with those of the weakest parts made anew from
// what the findings about the parts say now, after local limits have judged them.
func WeakestAgain(c *chain.Chain, findings []rule.Finding) []rule.Finding {
	ids := map[string]bool{}
	for _, r := range ofParts() {
		ids[r.ID] = true
	}
	var parts []rule.Finding
	for _, f := range findings {
		if ids[f.Rule] {
			parts = append(parts, f)
		}
	}
	again := slices.Clone(findings)
	for i, f := range findings {
		if f.Rule != weakest.ID {
			continue
		}
		for k := range c.Feedthroughs {
			if c.Feedthroughs[k].Name.V == f.Subject {
				again[i] = judgeWeakest(&c.Feedthroughs[k], parts)
			}
		}
	}
	return again
}

func judgeWeakest(f *chain.Feedthrough, all []rule.Finding) rule.Finding {
	x := rule.Finding{Rule: "feedthrough.weakest", Subject: f.Name.V, Concern: concernOf(f), Relation: rule.Presence, Place: f.Here()}
	of := slices.Clone(all)
	of = slices.DeleteFunc(of, func(p rule.Finding) bool { return !strings.HasPrefix(p.Subject, f.Name.V+": ") })
	if len(of) == 0 {
		return x.Lacking(lack.Because("nothing of it can be judged"))
	}
	slices.SortStableFunc(of, graver)
	worst := of[0]
	x.Verdict, x.Under, x.Place, x.Remedy, x.Missing, x.Assumptions = worst.Verdict, worst.Under, worst.Place, worst.Remedy, worst.Missing, worst.Assumptions
	x.Sources = worst.Sources
	part := strings.TrimPrefix(strings.TrimPrefix(worst.Rule, "spacing."), "feedthrough.") + " of its " + strings.TrimPrefix(worst.Subject, f.Name.V+": ")
	open := 0
	for _, p := range of {
		if p.Verdict == rule.Unassessed {
			open++
		}
	}
	count := rule.Number(len(of), "finding", "findings")
	switch {
	case worst.Verdict == rule.Unassessed:
		x.Because = fmt.Sprintf("of %s about it %d cannot be judged and may be the weakest, first %s: %s", count, open, part, worst.Because)
	case open > 0:
		x.Because = fmt.Sprintf("of %s about it the weakest that can be judged is %s%s, %d more cannot: %s", count, part, inHand(worst), open, worst.Because)
	default:
		x.Because = fmt.Sprintf("of %s about it the weakest is %s%s: %s", count, part, inHand(worst), worst.Because)
	}
	return x
}

// graver puts the graver finding first, of two that are as grave the one with less in hand:
// one that fails outright has least of all, one that passes outright most.
func graver(a, b rule.Finding) int {
	switch {
	case rule.Graver(a.Verdict, b.Verdict):
		return -1
	case rule.Graver(b.Verdict, a.Verdict):
		return 1
	}
	return cmp.Compare(hand(a), hand(b))
}

// hand is the margin of a finding, that of one without as a pass or a fail has it.
func hand(f rule.Finding) float64 {
	switch {
	case f.Margin != nil:
		return *f.Margin
	case f.Verdict == rule.Fails:
		return math.Inf(-1)
	}
	return math.Inf(1)
}

// inHand is the margin of a finding in words.
func inHand(f rule.Finding) string {
	if f.Margin == nil {
		return ""
	}
	return fmt.Sprintf(" with %+.0f %% in hand", 100**f.Margin)
}

func concernOf(f *chain.Feedthrough) rule.Concern {
	if f.Insulation.V == "functional" {
		return rule.Equipment
	}
	return rule.Life
}
