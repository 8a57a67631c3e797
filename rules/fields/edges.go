package fields

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/field"
	"kilovet/insulation/gap"
	"kilovet/rules/build"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var edge = rule.Rule{
	ID: "field.edge", Title: "Sharp edges",
	Demands: "The field 0.1 mm before each sharp edge of an electrode, or a fourth of the gap beside it where that is less, stays below what the medium takes there.",
	Applies: "Every electrode of a computed field with an edge that is drawn sharp, where the field has no bound.",
	Margin:  "marginal at best: an edge without a radius is judged by an assumed one",
	Concern: rule.Equipment,
	Sources: []rule.Source{limits.EdgeSource, emissionSource},
	Example: rule.Example{
		Of: "plate",
		Swaps: []rule.Swap{
			{Was: `  { from = ["12 mm", "0 mm"] },
  { to = ["15 mm", "3 mm"], centre = ["15 mm", "0 mm"], turn = "right" },`, Becomes: `  { from = ["12 mm", "0 mm"] },
  { to = ["12 mm", "3 mm"] },`},
		},
		Changes: []rule.Change{{Rule: "field.edge", Subject: "gun lead-through/plate at r 12 mm, z 3 mm", Verdict: rule.Marginal}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(e, "field.edge", "no electrode has a sharp edge", func(f *build.Arrangement, s *field.Solution, start rule.Finding) []rule.Finding {
			return judgeEdges(e, f, s, start, func(x field.Edge) bool {
				return len(x.Electrodes) > 0 && len(x.Bodies) == 1 && x.Sharp && evidence.Open(f, x.Bodies[0])
			})
		})
	},
}

var junctionSource = rule.Source{Text: "at the negative electrode the junction of metal, insulator and vacuum starts flashovers; its field is held below that of smooth metal", Mark: rule.Practice}

var junction = rule.Rule{
	ID: "field.junction", Title: "Junctions of metal, insulator and medium",
	Demands: "The field 0.1 mm from each junction of an electrode with an insulator, or a fourth of the gap beside it where that is less, in the medium, stays below what the medium takes there.",
	Applies: "Every place of a computed field where an insulator, the medium and an electrode meet.",
	Margin:  "in vacuum marginal above 5 kV/mm; marginal at best where the field rises without bound towards the junction",
	Concern: rule.Equipment,
	Sources: []rule.Source{limits.EdgeSource, junctionSource, emissionSource},
	Example: rule.Example{
		Of: "plate",
		Swaps: []rule.Swap{{Was: "[[field.boundary]]\nkind    = \"natural\"\nprofile = [{ from = [\"4 mm\", \"60 mm\"]", Becomes: `[[field.dielectrics]]
name         = "collar"
permittivity = 9.4
resistivity  = "1e12 ohm m"
material     = "alumina"
profile      = [{ from = ["4 mm", "20 mm"] }, { to = ["6 mm", "20 mm"] }, { to = ["7 mm", "24 mm"] }, { to = ["4 mm", "24 mm"] }, { to = ["4 mm", "20 mm"] }]

[[field.boundary]]
kind    = "natural"
profile = [{ from = ["4 mm", "60 mm"]`}},
		Changes: []rule.Change{
			{Rule: "field.junction", Subject: "gun lead-through/pin at r 4 mm, z 20 mm", Verdict: rule.Meets},
			{Rule: "field.junction", Subject: "gun lead-through/pin at r 4 mm, z 24 mm", Verdict: rule.Meets},
			{Rule: "field.solid", Subject: "gun lead-through/collar", Verdict: rule.Marginal},
		},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(e, "field.junction", "no insulator meets an electrode in the medium", func(f *build.Arrangement, s *field.Solution, start rule.Finding) []rule.Finding {
			return judgeEdges(e, f, s, start, func(x field.Edge) bool { return len(x.Electrodes) > 0 && meets(f, x.Bodies) })
		})
	},
}

// meets reports whether an insulator and an open space meet.
func meets(f *build.Arrangement, bodies []string) bool {
	open, closed := false, false
	for _, b := range bodies {
		open, closed = open || evidence.Open(f, b), closed || !evidence.Open(f, b)
	}
	return open && closed
}

func judgeEdges(e *evidence.Evidence, f *build.Arrangement, s *field.Solution, start rule.Finding, counts func(field.Edge) bool) (all []rule.Finding) {
	var edges []field.Edge
	for _, x := range s.Edges() {
		if counts(x) {
			all, edges = append(all, judgeEdge(e, f, x, start)), append(edges, x)
		}
	}
	return sized(all, func(i int) ([]evidence.Answer, error) { return e.EdgeAnswers(f, edges[i]) })
}

func judgeEdge(e *evidence.Evidence, f *build.Arrangement, x field.Edge, finding rule.Finding) rule.Finding {
	finding.Subject = f.Name.V + "/" + evidence.EdgeName(x)
	finding.Remedy = "round the edge, shield the junction, or lower the voltage"
	distance, err := e.JudgedAt(f, x)
	if err != nil {
		return lacking(f, finding, err)
	}
	at, err := e.AtEdge(f, x, distance)
	if err != nil {
		return lacking(f, finding, err)
	}
	finding.Under = at.Text()
	g := e.Filling(f, at.Reading.Body)
	limit, err := insulation.AtEdge(g, distance)
	if err != nil {
		return lacking(f, finding, err)
	}
	finding.Sources = append(rule.Cited(limit.Sources), limits.EdgeSource)
	finding.Because = fmt.Sprintf("%s at a distance of %s, with which the field goes to the power %.3f; %s", quantity.Text(at.Strength), quantity.Text(distance), at.Exponent, limit.Because)
	if at.Polarity == gap.Negative && g.Medium == gap.Vacuum {
		finding.Because += "; at the negative electrode, which emits"
	}
	finding = finding.Assume(taken(e, f)...).Assume(limit.Assumptions...)
	if at.Exponent < 0 {
		finding = finding.Assume(f.Name.V + ": sharp edges and joints count as broken or filled to " + quantity.Text(distance))
	}
	margin := limits.DistanceMargin
	if g.Medium == gap.Vacuum {
		finding.Sources = append(finding.Sources, comfortSource)
		margin = 1
	}
	return finding.Most(rule.Of(at.Strength), rule.Of(limit.Value), margin).WithoutRemedyIfMet()
}
