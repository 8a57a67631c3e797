package spacing

import (
	"fmt"

	"kilovet/hv/chain"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var sparkSource = rule.Source{Text: "an annulus of gas or vacuum beside an insulator takes most of the voltage and must not discharge: each spark eats the insulator", Mark: rule.Practice}

var annulus = rule.Rule{
	ID: "feedthrough.annulus", Title: "Annulus beside the sleeve",
	Demands: "The part of the voltage on a gap between pin and sleeve, or sleeve and hole, stays at or below that at which the gap begins to spark or emit; the worse of the sharing just after switching, by layers and by the computed field, and after DC has settled judges.",
	Applies: "Feedthroughs whose sleeve does not fill its hole or is wider than its pin.",
	Margin:  "marginal with less than 10 % in hand",
	Concern: rule.Equipment,
	Sources: []rule.Source{sparkSource},
	Example: rule.Example{
		Of:    "lead",
		Swaps: []rule.Swap{{Was: `inner_radius = "10 mm", outer_radius = "26 mm"`, Becomes: `inner_radius = "10.6 mm", outer_radius = "26 mm", inner_gap = "air"`}},
		Changes: []rule.Change{
			{Rule: "feedthrough.annulus", Subject: "furnace lead: pin to sleeve", Verdict: rule.Fails},
			{Rule: "feedthrough.weakest", Subject: "furnace lead", Verdict: rule.Fails},
		},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		if len(e.Chain().Feedthroughs) == 0 {
			return rule.Over("no feedthrough is described")
		}
		var j rule.Judgement
		for i := range e.Chain().Feedthroughs {
			f := &e.Chain().Feedthroughs[i]
			annuli := e.Annuli(f)
			for _, a := range annuli {
				j.Findings = append(j.Findings, judgeAnnulus(e, f, a))
			}
			if len(annuli) == 0 {
				j.Exempt = append(j.Exempt, rule.Exempt{Subject: f.Name.V, Because: "it has no annulus beside its sleeve"})
			}
		}
		if j.Findings == nil {
			j.PassedOver = "no feedthrough has an annulus beside its sleeve"
		}
		return j
	},
}

func judgeAnnulus(e *evidence.Evidence, f *chain.Feedthrough, a evidence.Annulus) rule.Finding {
	x := rule.Finding{Rule: "feedthrough.annulus", Subject: a.Name, Concern: rule.Equipment, Relation: rule.AtMost, Place: a.Place}
	v, under, err := e.AcrossPin(f)
	if err != nil {
		return x.Lacking(err)
	}
	mean, err := e.Mean(f)
	if err != nil {
		return x.Lacking(err)
	}
	if a.Starts.Lack != nil {
		return x.Lacking(a.Starts.Lack)
	}
	x.Under = under.Text()
	takes := a.Takes(v.Peak, mean)
	x.Because = fmt.Sprintf("%s of %s across %s of %s, which starts at %s (%s); %s", quantity.Text(takes), quantity.Text(v.Peak),
		quantity.Text(a.Gap.Clearance), a.Medium, quantity.Text(a.Starts.Value), a.Starts.Because, shared(a))
	x.Sources = append(rule.Cited(a.Starts.Sources), sparkSource)
	x = x.Most(rule.Of(takes), rule.Of(a.Starts.Value), limits.DistanceMargin).Assume(a.Starts.Assumptions...)
	if a.Assumed {
		x = x.Assume("what fills " + a.Name + " is not given and taken as air")
	}
	if x.Verdict != rule.Meets {
		x.Remedy = alternatives("close the annulus: metallise the wall of the sleeve and join it to the metal beside it, or fill it with bonded compound", widened(a, takes))
	}
	return x
}

// shared says how the voltage divides, and when.
func shared(a evidence.Annulus) string {
	text := "its part is not known just after switching"
	if a.Switched > 0 {
		text = fmt.Sprintf("it takes %s just after switching", quantity.Text(a.Switched))
	}
	if a.Field.Lack == nil {
		text += fmt.Sprintf(" (%s by the greatest computed field, %s)", quantity.Text(a.Field.Value), a.Field.Because)
	}
	text += fmt.Sprintf(", %s once DC has settled", quantity.Text(a.Settled))
	if a.Settling.Lack != nil {
		return text + ", when is not known"
	}
	return text + ", with a time constant of " + quantity.Text(a.Settling.Value)
}

// widened is the gap at which the annulus alone would hold its voltage.
func widened(a evidence.Annulus, takes quantity.Voltage) string {
	if a.Settled < 1 { // its part grows with its width
		return ""
	}
	d, err := a.GapForOnset(takes * quantity.Voltage(1+limits.DistanceMargin))
	if err != nil || quantity.AtMost(d, a.Gap.Clearance) {
		return ""
	}
	return fmt.Sprintf("leave %s in place of %s", quantity.Text(d), quantity.Text(a.Gap.Clearance))
}
