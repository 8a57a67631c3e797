package fields

import (
	"fmt"
	"slices"
	"strings"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/insulation/field"
	"kilovet/rules/build"
	"kilovet/rules/evidence"
	"kilovet/rules/rule"
)

var surfaceSource = rule.Source{Text: "an insulator between electrodes lowers what the gap stands: a discharge runs along its surface first; the field alone does not tell when", Mark: rule.Practice}

var surface = rule.Rule{
	ID: "field.surface", Title: "Surfaces that join electrodes",
	Demands: "The free surface of an insulator, or of several that touch one another, that joins electrodes at different potential is judged: by a [[spacing]] with this field that gives its creepage.",
	Applies: "Every described field with such an insulator.",
	Concern: rule.Equipment,
	Sources: []rule.Source{surfaceSource},
	Example: rule.Example{
		Of: "plate",
		Swaps: []rule.Swap{{Was: "[[field.boundary]]\nkind    = \"natural\"\nprofile = [{ from = [\"4 mm\", \"60 mm\"]", Becomes: `[[field.dielectrics]]
name         = "disc"
permittivity = 9.4
resistivity  = "1e12 ohm m"
material     = "alumina"
profile      = [{ from = ["4 mm", "30 mm"] }, { to = ["50 mm", "30 mm"] }, { to = ["50 mm", "36 mm"] }, { to = ["4 mm", "36 mm"] }, { to = ["4 mm", "30 mm"] }]

[[field.boundary]]
kind    = "natural"
profile = [{ from = ["4 mm", "60 mm"]`}},
		Changes: []rule.Change{
			{Rule: "field.junction", Subject: "gun lead-through/pin at r 4 mm, z 30 mm", Verdict: rule.Meets},
			{Rule: "field.junction", Subject: "gun lead-through/pin at r 4 mm, z 36 mm", Verdict: rule.Meets},
			{Rule: "field.junction", Subject: "gun lead-through/plate at r 50 mm, z 30 mm", Verdict: rule.Meets},
			{Rule: "field.junction", Subject: "gun lead-through/plate at r 50 mm, z 36 mm", Verdict: rule.Meets},
			{Rule: "field.surface", Subject: "gun lead-through/disc", Verdict: rule.Unassessed},
			{Rule: "field.solid", Subject: "gun lead-through/disc", Verdict: rule.Fails},
		},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(e, "field.surface", "no free surface of an insulator in a described field joins electrodes, or a spacing judges it", func(f *build.Arrangement, s *field.Solution, start rule.Finding) []rule.Finding {
			return judgeSurfaces(e, f, s, start)
		})
	},
}

func judgeSurfaces(e *evidence.Evidence, f *build.Arrangement, s *field.Solution, start rule.Finding) (all []rule.Finding) {
	if f.From != "" || judgedAlong(e, f) {
		return nil
	}
	for _, stack := range stacks(f, s) {
		if a, b, joined := joins(f, s, stack); joined {
			one := start
			names := strings.Join(stack, " and ")
			one.Subject, one.Sources = f.Name.V+"/"+names, []rule.Source{surfaceSource}
			why := fmt.Sprintf("the surface of %s joins %s and %s, and no spacing with this field gives its creepage", names, a, b)
			one = one.Lacking(lack.Because(why, "spacing.field", "spacing.creepage"))
			one.Remedy = fmt.Sprintf("describe a [[spacing]] with field = %q, its clearance, creepage and material", f.Name.V)
			all = append(all, one)
		}
	}
	return all
}

// stacks are the insulators with a free surface, those that touch one another together.
func stacks(f *build.Arrangement, s *field.Solution) (all [][]string) {
	seen := map[string]bool{}
	for _, body := range s.Bare() {
		if evidence.Open(f, body) || seen[body] {
			continue
		}
		seen[body] = true
		stack := []string{body}
		for i := 0; i < len(stack); i++ {
			for _, other := range s.Joined(stack[i]) {
				if !evidence.Open(f, other) && !seen[other] {
					seen[other] = true
					stack = append(stack, other)
				}
			}
		}
		all = append(all, stack)
	}
	return all
}

// judgedAlong reports whether a spacing judges the surface in a field.
func judgedAlong(e *evidence.Evidence, f *build.Arrangement) bool {
	return slices.ContainsFunc(e.Chain().Spacings, func(s chain.Spacing) bool { return s.Field.V == f.Name.V && s.Creepage.Set() })
}

// joins gives two electrodes of different potential that a stack of insulators touches.
func joins(f *build.Arrangement, s *field.Solution, stack []string) (a, b string, joined bool) {
	for _, name := range s.Electrodes() {
		if !slices.ContainsFunc(s.Facing(name), func(body string) bool { return slices.Contains(stack, body) }) {
			continue
		}
		if a == "" {
			a = name
		} else if potential(f, name) != potential(f, a) {
			return a, name, true
		}
	}
	return "", "", false
}

// potential says what an electrode is at: a node, or a fixed voltage; earth where it is no
// electrode of the description.
func potential(f *build.Arrangement, electrode string) string {
	const earth = "0"
	i := slices.IndexFunc(f.Electrodes, func(x chain.Electrode) bool { return x.Name.V == electrode })
	if i < 0 || f.Electrodes[i].Node.V == "ground" {
		return earth
	}
	if x := &f.Electrodes[i]; !x.Node.Set() {
		return fmt.Sprint(float64(x.Voltage.V))
	}
	return f.Electrodes[i].Node.V
}
