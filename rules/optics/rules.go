// Package optics judges the electron side: emission and blur.
package optics

import (
	"fmt"
	"math"

	"kilovet/hv/document"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var blurSource = rule.Source{Text: "Barth and Kruit, Optik 101 (1996) 101: sum of FW50 terms", Mark: rule.Memory, Governs: true}

var blur = rule.Rule{
	ID: "beam.blur", Title: "Blur of the spot",
	Demands: "The whole spot, ripple included, stays within the stated allowance.",
	Applies: "Where [beam] states a blur allowance.",
	Margin:  "marginal with less than 10 % in hand",
	Concern: rule.Performance,
	Sources: []rule.Source{blurSource},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `blur_allowance       = "12 nm"`, Becomes: `blur_allowance       = "4 nm"`}},
		Changes: []rule.Change{{Rule: "beam.blur", Subject: "beam", Verdict: rule.Fails}, {Rule: "beam.disturbance", Subject: "cathode"}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		b := e.Chain().Beam
		if why := noAllowance(e); why != "" {
			return rule.Over(why)
		}
		f := rule.Finding{Rule: "beam.blur", Subject: "beam", Concern: rule.Performance, Relation: rule.AtMost, Place: b.BlurAllowance.Place,
			Under: string(evidence.Working), Sources: []rule.Source{blurSource}, Remedy: "see beam.ripple_allowed: more filtering, or less source width, angle or aberration"}
		total, err := e.BlurTotal()
		if err != nil {
			return rule.One(f.Lacking(err))
		}
		f.Because = fmt.Sprintf("the spot is %s of the %s allowed (FW50)%s", quantity.Text(total), quantity.Text(b.BlurAllowance.V), measuredRipple(e))
		f = f.Most(rule.Of(total), rule.Of(b.BlurAllowance.V), limits.BlurMargin)
		return rule.One(f.Assume(e.DisturbanceAssumptions()...).WithoutRemedyIfMet())
	},
}

var lawSource = rule.Source{Text: "an emission read and an emission computed from the stated law agree within 10 %", Mark: rule.Practice, Governs: true}

var emissionLaw = rule.Rule{
	ID: "gun.emission_law", Title: "Emission against its law",
	Demands: "A stated emission agrees with the one that the stated law and bias resistor give.",
	Applies: "Where the gun states an emission as well as cutoff and zero-bias emission.",
	Margin:  "marginal when more than 10 % apart, failing at 25 %",
	Concern: rule.Performance,
	Sources: []rule.Source{lawSource},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `emission            = "60 uA"`, Becomes: `emission            = "40 uA"`}},
		Changes: []rule.Change{{Rule: "gun.emission_law", Subject: "gun", Verdict: rule.Fails}, {Rule: "gun.regulation", Subject: "gun", Verdict: rule.Marginal}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		g := e.Chain().Gun
		if why := noGun(e); why != "" {
			return rule.Over(why)
		}
		switch {
		case !g.Emission.Set():
			return rule.Over("no emission is stated: it is that of the law")
		case e.Chain().Bias == nil:
			return rule.Over("the gun has no bias that a law of the emission could go by")
		case !g.Cutoff.Set() || !g.ZeroBiasEmission.Set():
			return rule.Over("the law has no cutoff or no scale of its own (gun.cutoff, gun.zero_bias_emission): the stated emission sets it, and nothing is left to compare")
		}
		f := rule.Finding{Rule: "gun.emission_law", Subject: "gun", Concern: rule.Performance, Relation: rule.AtMost, Place: g.Emission.Place,
			Under: string(evidence.Working), Sources: []rule.Source{lawSource}, Remedy: "correct the emission, the cutoff, the scale of the law or the bias resistor"}
		law, err := e.EmissionByLaw()
		if err != nil {
			return rule.One(f.Lacking(err))
		}
		f.Because = fmt.Sprintf("stated %s, by the law %s", quantity.Text(g.Emission.V), quantity.Text(law))
		if g.Emission.V == 0 { // nothing is a share of nothing
			return rule.One(f.There(law == 0).WithoutRemedyIfMet())
		}
		apart := quantity.Fraction(math.Abs(float64(law/g.Emission.V) - 1))
		return rule.One(f.Most(rule.Of(apart), rule.Of(limits.LawApart), float64(limits.LawApart/limits.LawComfort)-1).WithoutRemedyIfMet())
	},
}

var limitSource = rule.Source{Text: "Richardson's law for the emitting area at its temperature; near it the filament's temperature governs, not the bias", Mark: rule.Derived, Governs: true}

var emissionLimit = rule.Rule{
	ID: "gun.emission_limit", Title: "Emission against the cathode's limit",
	Demands: "The emission is at most what the emitting area gives at its temperature.",
	Applies: "Where a gun is fitted.",
	Margin:  "marginal above 80 % of the limit",
	Concern: rule.Performance,
	Sources: []rule.Source{limitSource},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `emitting_area       = "0.03 mm2"`, Becomes: `emitting_area       = "0.003 mm2"`}},
		Changes: []rule.Change{{Rule: "gun.emission_limit", Subject: "gun", Verdict: rule.Fails}, {Rule: "gun.emission_law", Subject: "gun", Verdict: rule.Marginal}, {Rule: "gun.regulation", Subject: "gun", Verdict: rule.Unassessed}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		g := e.Chain().Gun
		if why := noGun(e); why != "" {
			return rule.Over(why)
		}
		f := rule.Finding{Rule: "gun.emission_limit", Subject: "gun", Concern: rule.Performance, Relation: rule.AtMost, Place: g.EmittingArea.Place,
			Under: string(evidence.Working), Sources: []rule.Source{limitSource}, Remedy: "correct emission, area or temperature; a hotter cathode lives shorter"}
		if err := document.Need(g.EmittingArea, g.CathodeTemperature, g.WorkFunction); err != nil {
			f.Place = g.Here()
			return rule.One(f.Lacking(err))
		}
		limit, err := e.RichardsonLimit()
		if err != nil {
			return rule.One(f.Lacking(err))
		}
		i, err := e.Emission()
		if err != nil {
			return rule.One(f.Lacking(err))
		}
		f.Because = fmt.Sprintf("%s of the %s that the cathode can give", quantity.Text(i), quantity.Text(limit))
		return rule.One(f.Most(rule.Of(i), rule.Of(limit), 1/limits.EmissionComfort-1).WithoutRemedyIfMet())
	},
}

// measuredRipple says that the ripple is not a computed one.
func measuredRipple(e *evidence.Evidence) string {
	if !e.Chain().Beam.MeasuredRipple.Set() {
		return ""
	}
	return ", with the measured ripple in place of the computed one"
}

// Rules lists the rules of this family.
func Rules() []rule.Rule {
	return []rule.Rule{blur, emissionLaw, emissionLimit, cutoff, adjustment, regulating, heaterBalance, feedPower, disturbance, hum, drift, energyWidth}
}
