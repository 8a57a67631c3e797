package spacing

import (
	"fmt"
	"math"

	"kilovet/hv/chain"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/rule"
)

// square is the angle above which the field at the junction rises without limit.
const square quantity.Angle = math.Pi / 2

var (
	wedgeSource    = rule.Source{Text: "field r^m where insulator, metal and vacuum meet: m is negative above 90 degrees inside the insulator (potential of two wedges)", Mark: rule.Derived, Governs: true}
	negativeSource = rule.Source{Text: "flashover starts at the negative end: shield it first (DC electric-field modifications produced by solid insulators bridging a uniform-field vacuum gap, abstract)", Mark: rule.Read}
)

var junction = rule.Rule{
	ID: "spacing.junction", Title: "Junction of metal, insulator and vacuum",
	Demands: "At the negative electrode the insulator meets the metal at 90 degrees or less inside the insulator, or a shield covers the junction.",
	Applies: "Every surface in vacuum that bridges two electrodes.",
	Margin:  "marginal above 90 degrees behind a shield, and where the angle is not given",
	Concern: rule.Equipment,
	Sources: []rule.Source{wedgeSource, negativeSource},
	Example: rule.Example{
		Swaps: []rule.Swap{{Was: "[[target]]\n", Becomes: `[[spacing]]
name = "stand-off in vacuum"
from = "control"
to = "ground"
medium = "vacuum"
insulation = "basic"
clearance = "100 mm"
creepage = "100 mm"
material = "alumina"
junction_angle = "110 deg"
shape = { kind = "plates" }
finish = "polished"
conditioned = true
stressed_area = "100 mm2"

[[target]]
`}},
		Changes: []rule.Change{
			{Rule: "spacing.junction", Subject: "stand-off in vacuum", Verdict: rule.Fails},
			{Rule: "spacing.clearance", Subject: "stand-off in vacuum", Verdict: rule.Meets},
			{Rule: "spacing.creepage", Subject: "stand-off in vacuum", Verdict: rule.Marginal},
			{Rule: "spacing.breakdown", Subject: "stand-off in vacuum", Verdict: rule.Marginal},
		},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(e, func(s *chain.Spacing) (rule.Finding, string) {
			if s.Medium.V != "vacuum" || !s.Creepage.Set() {
				return rule.Finding{}, "no surface in vacuum is described"
			}
			return judgeJunction(e, s), ""
		})
	},
}

func judgeJunction(e *evidence.Evidence, s *chain.Spacing) rule.Finding {
	f := finding("spacing.junction", rule.Equipment, rule.AtMost, s)
	f.Sources = []rule.Source{wedgeSource, negativeSource}
	angle := s.JunctionAngle.Or(square)
	if s.JunctionAngle.Set() {
		f.Place = s.JunctionAngle.Place
	} else {
		f = f.Assume("the insulator of " + s.Name.V + " is taken to meet its negative electrode at 90 degrees: no angle is given")
	}
	f.Because = fmt.Sprintf("%s inside the insulator at the negative electrode", degrees(angle))
	if m, err := e.Junction(s, angle); err == nil {
		f.Because += fmt.Sprintf(", where the field goes as r^%+.2f", float64(m))
	}
	f = f.Most(rule.Of(angle), rule.Of(square), 0)
	f.Remedy = "cut the insulator to 90 degrees or less at the negative electrode, the wider base on it, or shield the junction"
	if f.Verdict == rule.Fails && s.Shielded.V {
		f.Verdict = rule.Marginal
		f.Because += "; a shield covers the junction"
	}
	return f.WithoutRemedyIfMet()
}

func degrees(a quantity.Angle) string {
	return quantity.Significant(float64(a)*180/math.Pi) + " degrees"
}
