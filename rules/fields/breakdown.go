package fields

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/insulation/field"
	"kilovet/insulation/gap"
	"kilovet/rules/build"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var shareSource = rule.Source{Text: "highest voltage at most 80 % of the breakdown estimate, 50 % for comfort", Mark: rule.Practice}

var breakdown = rule.Rule{
	ID: "field.breakdown", Title: "Breakdown of computed gaps",
	Demands: "The voltage along the critical line of each electrode stays at or below 80 % of the breakdown estimate of this very shape, for the polarity it has.",
	Applies: "Every computed field in vacuum, air, gas or oil, where the field line from the greatest field on an electrode ends on another.",
	Margin:  "marginal above 50 % of the estimate",
	Concern: rule.Equipment,
	Sources: []rule.Source{shareSource, {Text: "vacuum: 40 kV/mm or 39 kV/√mm at the field of the electrode; air: streamer onset, or what sharp electrodes at the distance stand; another gas: streamer onset; oil: 10 kV/mm at the electrode, from 2.5 to 12 mm", Mark: rule.Derived, Governs: true}},
	Example: rule.Example{
		Of:    "plate",
		Swaps: []rule.Swap{{Was: `voltage = "-20 kV"`, Becomes: `voltage = "-40 kV"`}},
		Changes: []rule.Change{
			{Rule: "field.strength", Subject: "gun lead-through/pin", Verdict: rule.Marginal},
			{Rule: "field.strength", Subject: "gun lead-through/plate", Verdict: rule.Marginal},
			{Rule: "field.breakdown", Subject: "gun lead-through/pin", Verdict: rule.Fails},
			{Rule: "field.breakdown", Subject: "gun lead-through/plate", Verdict: rule.Fails},
		},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(e, "field.breakdown", "insulators stand in the way of every critical line", func(f *build.Arrangement, s *field.Solution, start rule.Finding) []rule.Finding {
			return judgeBreakdowns(e, f, s, start)
		})
	},
}

func judgeBreakdowns(e *evidence.Evidence, f *build.Arrangement, s *field.Solution, start rule.Finding) (all []rule.Finding) {
	least, where := -1, evidence.Where{}
	for _, name := range s.Electrodes() {
		for _, body := range facing(f, s, name) {
			one := start
			one.Subject = subject(f, name, body)
			w := e.ClearOfEdges(f, evidence.Where{Electrode: name, Body: body})
			j, judged := judgeBreakdown(e, f, w, one)
			if !judged {
				continue
			}
			all = append(all, j)
			if short(j) && (least < 0 || *j.Margin < *all[least].Margin) {
				least, where = len(all)-1, w
			}
		}
	}
	for i := range all {
		switch {
		case i == least:
			all[i].Remedy = oneDimension(e, f, where, all[i].Verdict == rule.Fails)
		case short(all[i]):
			all[i].Remedy = fmt.Sprintf("see to %s first, of which less is in hand; %s", all[least].Subject, all[i].Remedy)
		}
	}
	return all
}

// short reports whether a voltage is above its comfort, and not only what is taken for
// granted keeps it from being met.
func short(f rule.Finding) bool {
	return f.Margin != nil && !quantity.AtLeast(1+*f.Margin, 1+f.Stated)
}

// oneDimension names the least changes of one dimension with which the voltage is the
// comfortable share of the breakdown, else those with which it is the share that may be used,
// or why there is none.
func oneDimension(e *evidence.Evidence, f *build.Arrangement, w evidence.Where, fails bool) string {
	const lower = ", or lower the voltage"
	enough, not, err := namedDimensions(e.BreakdownAnswers(f, w, limits.BreakdownComfort))
	if enough == "" && fails && err == nil && not != "" {
		if least, _, _ := namedDimensions(e.BreakdownAnswers(f, w, limits.BreakdownShare)); least != "" {
			return "one of these is just enough, none for comfort: " + least + lower
		}
	}
	switch {
	case enough != "":
		return "one of these is enough: " + enough + lower
	case err != nil:
		return "widen the gap or round its electrodes, by how much was not found: " + err.Error() + lower
	case not != "":
		return "no one dimension is enough, change several (" + not + ")" + lower
	}
	return "widen the gap or round its electrodes; its outline has no dimension that could be changed alone" + lower
}

// judgeBreakdown judges one critical line; none that an insulator closes, and none of
// an electrode without a field.
func judgeBreakdown(e *evidence.Evidence, f *build.Arrangement, w evidence.Where, finding rule.Finding) (rule.Finding, bool) {
	if p, err := e.Stress(f, w); err == nil && !(p.Strength > 0) {
		return finding, false
	}
	c, err := e.Critical(f, w)
	switch {
	case err != nil:
		return lacking(f, finding, err), true
	case c.Traced.Closed:
		return finding, false
	}
	finding.Under = c.Text()
	stands := c.Strength.Breakdown
	if stands.Lack != nil {
		return lacking(f, finding, stands.Lack), true
	}
	finding.Sources = append(rule.Cited(stands.Sources), shareSource)
	finding.Because = fmt.Sprintf("%s along %s of field line to %s, expected to break down at %s (%s)%s",
		quantity.Text(c.Volts), quantity.Text(c.Line.Gap()), c.Traced.Ends, quantity.Text(stands.Value), stands.Because, polarities(c))
	finding.Remedy = "widen the gap, round its electrodes, or lower the voltage"
	limit := stands.Value * limits.BreakdownShare
	return finding.Assume(taken(e, f)...).Assume(stands.Assumptions...).ShareBy(rule.Of(stands.Value), shareSource).
		Most(rule.Of(c.Volts), rule.Of(limit), limits.BreakdownShare/limits.BreakdownComfort-1).WithoutRemedyIfMet(), true
}

// polarities shows both where they differ.
func polarities(c evidence.Critical) string {
	p, n := c.Positive, c.Negative
	if p.Lack != nil || n.Lack != nil || quantity.Equal(p.Value, n.Value) {
		return ""
	}
	side := "of unknown sign"
	if c.Polarity != gap.Unknown {
		side = string(c.Polarity)
	}
	return fmt.Sprintf("; positive %s, negative %s, here %s", quantity.Text(p.Value), quantity.Text(n.Value), side)
}
