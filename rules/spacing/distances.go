package spacing

import (
	"fmt"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var clearance = rule.Rule{
	ID: "spacing.clearance", Title: "Clearance",
	Demands: "The distance through the medium is at least what the tables ask for at the highest voltage over states and corners; in vacuum, oil and solids what working stress asks for.",
	Applies: "Every spacing but those in gases other than air, where the breakdown estimate decides.",
	Margin:  "marginal with less than 10 % in hand",
	Concern: rule.Life,
	Sources: []rule.Source{
		{Text: "IEC 60664-1:2020 Table F.8, case A unless impulse tested", Mark: rule.Read, Governs: true},
		{Text: "IEC 60664-1:2020 Table F.2 where mains or drive reach the gap", Mark: rule.Read},
	},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: "clearance  = \"12 mm\"\ncreepage   = \"30 mm\"", Becomes: "clearance  = \"1.2 mm\"\ncreepage   = \"30 mm\""}},
		Changes: []rule.Change{{Rule: "spacing.clearance", Subject: "drive lead to the enclosure", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(e, func(s *chain.Spacing) (rule.Finding, string) {
			if otherGas(s) {
				return rule.Finding{}, "no table asks for a clearance in gases other than air: the breakdown estimate decides"
			}
			return distance(e, s, "spacing.clearance", s.Clearance, func(x evidence.Spacing) gap.Result[quantity.Length] { return x.Assessment.ClearanceNeeded }), ""
		})
	},
}

var creepage = rule.Rule{
	ID: "spacing.creepage", Title: "Creepage distance",
	Demands: "The distance along the surface is at least what the tables ask for at the highest lasting voltage, and never less than the clearance needed.",
	Applies: "Every spacing in air or on a printed board, and surfaces in vacuum where a creepage distance is given.",
	Margin:  "marginal with less than 10 % in hand",
	Concern: rule.Life,
	Sources: []rule.Source{{Text: "IEC 60664-1:2020 Table F.5", Mark: rule.Read, Governs: true}},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `creepage   = "150 mm"`, Becomes: `creepage   = "30 mm"`}},
		Changes: []rule.Change{{Rule: "spacing.creepage", Subject: "gun feedthrough, air side", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(e, func(s *chain.Spacing) (rule.Finding, string) {
			if !inAir(s) && !s.Creepage.Set() {
				return rule.Finding{}, "creepage is judged on surfaces in air, and in vacuum where one is given"
			}
			if !inAir(s) && s.Medium.V != "vacuum" {
				f := finding("spacing.creepage", concern(s), rule.AtLeast, s)
				f.Place = s.Creepage.Place
				return f.Lacking(lack.Range("surfaces in %s are not judged", s.Medium.V)), ""
			}
			return distance(e, s, "spacing.creepage", s.Creepage, func(x evidence.Spacing) gap.Result[quantity.Length] { return x.Assessment.CreepageNeeded }), ""
		})
	},
}

func otherGas(s *chain.Spacing) bool { return s.Medium.V == "gas" && s.Gas.Or("air") != "air" }

func inAir(s *chain.Spacing) bool {
	return s.Medium.V == "air" || s.Medium.V == "printed board" || s.Medium.V == "gas" && s.Gas.Or("air") == "air"
}

// distance judges a given distance against the needed one.
func distance(e *evidence.Evidence, s *chain.Spacing, id string, given document.Given[quantity.Length], needed func(evidence.Spacing) gap.Result[quantity.Length]) rule.Finding {
	f := finding(id, concern(s), rule.AtLeast, s)
	if given.Set() {
		f.Place = given.Place
	}
	x, err := e.Spacing(s)
	if err != nil {
		return f.Lacking(err)
	}
	need := needed(x)
	if need.Lack != nil {
		return f.Lacking(need.Lack)
	}
	f.Under = x.Under.Text()
	if id == "spacing.creepage" {
		f.Under = x.Lasting.Text()
	}
	f.Sources = append(rule.Cited(need.Sources), shown(need.Answer)...)
	f.Because = fmt.Sprintf("%s peak, %s lasting: %s", quantity.Text(x.Voltages.Peak), quantity.Text(x.Voltages.LongTerm), need.Because)
	f.Remedy = fmt.Sprintf("widen it to %s or more, or lower the voltage", quantity.Text(need.Value))
	if !given.Set() {
		return f.Lacking(lack.Key(given.Key))
	}
	return f.Least(rule.Of(given.V), rule.Of(need.Value), limits.DistanceMargin).Assume(need.Assumptions...).WithoutRemedyIfMet()
}
