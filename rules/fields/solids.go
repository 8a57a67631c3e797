package fields

import (
	"fmt"

	"kilovet/hv/chain"
	"kilovet/hv/quantity"
	"kilovet/insulation/field"
	"kilovet/insulation/gap"
	"kilovet/rules/build"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var shareOfStrength = rule.Source{Text: "working stress a fourth of the short-time strength, Naidu and Kamaraju, High Voltage Engineering, ex. 4.3; a fifth for a long life under DC (memory)", Mark: rule.Read}

var solids = rule.Rule{
	ID: "field.solid", Title: "Strength used of solids",
	Demands: "The computed field in each insulator stays at or below a fourth of its strength at the length of field line through it.",
	Applies: "Every insulator of a computed field.",
	Margin:  "marginal above a fifth of the strength",
	Concern: rule.Equipment,
	Sources: []rule.Source{shareOfStrength},
	Example: rule.Example{
		Of: "plate",
		Swaps: []rule.Swap{{Was: "[[field.boundary]]\nkind    = \"natural\"\nprofile = [{ from = [\"4 mm\", \"60 mm\"]", Becomes: `[[field.dielectrics]]
name         = "collar"
permittivity = 9.4
profile      = [{ from = ["4 mm", "20 mm"] }, { to = ["6 mm", "20 mm"] }, { to = ["7 mm", "24 mm"] }, { to = ["4 mm", "24 mm"] }, { to = ["4 mm", "20 mm"] }]

[[field.boundary]]
kind    = "natural"
profile = [{ from = ["4 mm", "60 mm"]`}},
		Changes: []rule.Change{
			{Rule: "field.strength", Subject: "gun lead-through/pin", Verdict: rule.Marginal},
			{Rule: "field.strength", Subject: "gun lead-through/plate", Verdict: rule.Marginal},
			{Rule: "field.junction", Subject: "gun lead-through/pin at r 4 mm, z 20 mm", Verdict: rule.Marginal},
			{Rule: "field.junction", Subject: "gun lead-through/pin at r 4 mm, z 24 mm", Verdict: rule.Marginal},
			{Rule: "field.solid", Subject: "gun lead-through/collar", Verdict: rule.Unassessed},
		},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(e, "field.solid", "no insulator lies in a computed field", func(f *build.Arrangement, _ *field.Solution, start rule.Finding) (all []rule.Finding) {
			var places []evidence.Where
			for i := range f.Dielectrics {
				if d := &f.Dielectrics[i]; !d.Fill.Set() {
					all = append(all, judgeSolid(e, f, d, start))
					places = append(places, e.ClearOfEdges(f, evidence.Where{Body: d.Name.V}))
				}
			}
			return sized(all, func(i int) ([]evidence.Answer, error) { return e.PlaceAnswers(f, places[i]) })
		})
	},
}

func judgeSolid(e *evidence.Evidence, f *build.Arrangement, d *chain.Dielectric, finding rule.Finding) rule.Finding {
	finding.Subject = f.Name.V + "/" + d.Name.V
	if d.Line > 0 {
		finding.Place = d.Here()
	}
	used, err := e.SolidUse(f, d)
	if used.Field != nil {
		finding.Under, finding.Because = used.Text(), told(used.Stress, used.Where)
	}
	if err != nil {
		return finding.Lacking(err)
	}
	finding.Remedy = "make the insulator thicker, fill the gaps beside it, or lower the voltage"
	p, stands := used.Stress, used.Stands
	finding.Sources = append([]rule.Source{governing(shareOfStrength)}, cited(stands.Sources)...)
	finding.Because += fmt.Sprintf(", %.3g %% of the %s that it stands (%s)", 100*float64(p.Strength/stands.Value), quantity.Text(stands.Value), stands.Because)
	limit := stands.Value * limits.StrengthShare
	return finding.Assume(taken(e, f)...).Assume(stands.Assumptions...).
		Most(rule.Of(p.Strength), rule.Of(limit), limits.StrengthShare/limits.StrengthComfort-1).WithoutRemedyIfMet()
}

func governing(s rule.Source) rule.Source {
	s.Governs = true
	return s
}

// cited are sources of which none governs.
func cited(from []gap.Source) []rule.Source {
	all := rule.Cited(from)
	for i := range all {
		all[i].Governs = false
	}
	return all
}
