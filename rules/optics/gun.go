package optics

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var cutoffSource = rule.Source{Text: "the computed field of hole, setback, plate, tip and anode, within its band; where that has no answer, tabulated solutions of Laplace's equation; a stated cutoff more than twofold outside it belongs to another gun", Mark: rule.Derived, Governs: true}

var cutoff = rule.Rule{
	ID: "gun.cutoff", Title: "Cutoff against the gun's geometry",
	Demands: "The stated cutoff agrees with the one that the geometry gives; where none is stated, the bias stays below the estimate.",
	Applies: "Where [gun.geometry] is given and the gun has a bias.",
	Margin:  "marginal outside the band of what the geometry gives, failing by more than a factor of two",
	Concern: rule.Performance,
	Sources: []rule.Source{cutoffSource},
	Example: rule.Example{
		Swaps: []rule.Swap{{Was: `work_function       = "4.5 eV"`, Becomes: `work_function       = "4.5 eV"
geometry = { aperture_radius = "0.5 mm", plate_thickness = "0.2 mm", tip_radius = "60 um", setback = "0.3 mm", anode_distance = "10 mm" }`}},
		Changes: []rule.Change{{Rule: "gun.cutoff", Subject: "gun", Verdict: rule.Fails},
			{Rule: "field.strength", Subject: "gun/cathode", Verdict: rule.Marginal}, {Rule: "field.breakdown", Subject: "gun/cathode", Verdict: rule.Marginal},
			{Rule: "field.strength", Subject: "gun/control electrode", Verdict: rule.Marginal}, {Rule: "field.breakdown", Subject: "gun/control electrode", Verdict: rule.Marginal},
			{Rule: "field.strength", Subject: "gun/anode", Verdict: rule.Marginal}, {Rule: "field.breakdown", Subject: "gun/anode", Verdict: rule.Marginal}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		g := e.Chain().Gun
		if why := noGun(e); why != "" {
			return rule.Over(why)
		}
		if g.Geometry == nil || e.DiodeGun() {
			return rule.Over("the gun has no bias, or its geometry is not described")
		}
		f := rule.Finding{Rule: "gun.cutoff", Subject: "gun", Concern: rule.Performance, Relation: rule.AtMost, Place: g.Geometry.Here(),
			Under: string(evidence.Working), Sources: []rule.Source{cutoffSource}, Remedy: "correct the geometry or the cutoff; measure the cutoff: the bias at which the emission stops"}
		x, err := e.CutoffFromGeometry()
		if err != nil {
			return rule.One(f.Lacking(err))
		}
		band := geometryGives(e, x)
		if g.Cutoff.Set() {
			f.Because = fmt.Sprintf("stated %s; %s", quantity.Text(g.Cutoff.V), band)
			if bias, err := e.BiasVoltage(); err == nil && bias > x.High {
				f.Because += fmt.Sprintf("; a gun of that geometry would not emit at the bias of %s", quantity.Text(bias))
			}
			return rule.One(f.Most(rule.Of(quantity.Fraction(max(x.Outside(g.Cutoff.V), 1))), rule.Of(quantity.Fraction(limits.CutoffApart)), limits.CutoffApart-1).WithoutRemedyIfMet())
		}
		bias, err := e.BiasVoltage()
		if err != nil {
			return rule.One(f.Lacking(err))
		}
		f.Because = fmt.Sprintf("the bias is %s; %s", quantity.Text(bias), band)
		f = f.Most(rule.Of(bias), rule.Of(x.High), float64(x.High/x.Low)-1)
		return rule.One(f.Assume(e.CutoffAssumption()).WithoutRemedyIfMet())
	},
}

// geometryGives says the cutoff from the geometry, and beside a computed one the estimate.
func geometryGives(e *evidence.Evidence, x evidence.EstimatedCutoff) string {
	says := func(c evidence.EstimatedCutoff) string {
		return fmt.Sprintf("%s, between %s and %s", quantity.Text(c.Voltage), quantity.Text(c.Low), quantity.Text(c.High))
	}
	text := fmt.Sprintf("the geometry gives %s, at %s, by the %s", says(x), quantity.Text(x.Anode), x.By)
	if x.By == evidence.ByTable {
		return text
	}
	table, err := e.CutoffEstimate()
	if err != nil {
		return text + "; " + err.Error()
	}
	return text + "; the estimate from tabulated geometries is " + says(table)
}

var rangeSource = rule.Source{Text: "the setting of a bias keeps a tenth in hand to the ends of its adjustment", Mark: rule.Practice, Governs: true}

var adjustment = rule.Rule{
	ID: "bias.adjustment", Title: "Bias at the limits of its adjustment",
	Demands: "The bias element reaches the bias that the wanted emission needs, with a tenth in hand.",
	Applies: "Where [bias] states the ends of its adjustment.",
	Margin:  "marginal with less than 10 % in hand",
	Concern: rule.Performance,
	Sources: []rule.Source{rangeSource},
	Example: rule.Example{
		Swaps: []rule.Swap{{Was: `fed      = "control"`, Becomes: `fed      = "control"
lowest_resistance  = "1 Mohm"
highest_resistance = "4 Mohm"`}},
		Changes: []rule.Change{{Rule: "bias.adjustment", Subject: "low end", Verdict: rule.Meets}, {Rule: "bias.adjustment", Subject: "high end", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		b := e.Chain().Bias
		if why := noGun(e); why != "" {
			return rule.Over(why)
		}
		if b == nil {
			return rule.Over("there is no bias to adjust")
		}
		var all []rule.Finding
		if b.Kind.V == "fixed" {
			all = within(e.BiasSetting, b.Lowest.Set(), b.Highest.Set(), b.Lowest.V, b.Highest.V)
		} else {
			all = within(e.ResistorSetting, b.LowestResistance.Set(), b.HighestResistance.Set(), b.LowestResistance.V, b.HighestResistance.V)
		}
		if len(all) == 0 {
			return rule.Over("the ends of the bias's adjustment are not stated")
		}
		for i := range all {
			all[i].Place = b.Here()
		}
		return rule.Judgement{Findings: all}
	},
}

// within judges a setting against the ends that are stated.
func within[Q quantity.Number](setting func() (Q, string, error), low, high bool, lowest, highest Q) []rule.Finding {
	found, how, err := setting()
	judge := func(subject string, against Q, of func(rule.Finding) rule.Finding) rule.Finding {
		f := rule.Finding{Rule: "bias.adjustment", Subject: subject, Concern: rule.Performance, Under: string(evidence.Working), Sources: []rule.Source{rangeSource},
			Remedy: "choose a bias element with another range, or another emission"}
		if err != nil {
			return f.Lacking(err)
		}
		f.Because = fmt.Sprintf("%s %s; the adjustment ends at %s", how, quantity.Text(found), quantity.Text(against))
		return of(f).WithoutRemedyIfMet()
	}
	var all []rule.Finding
	if low {
		all = append(all, judge("low end", lowest, func(f rule.Finding) rule.Finding {
			return f.Least(rule.Of(found), rule.Of(lowest), limits.AdjustmentMargin)
		}))
	}
	if high {
		all = append(all, judge("high end", highest, func(f rule.Finding) rule.Finding {
			return f.Most(rule.Of(found), rule.Of(highest), limits.AdjustmentMargin)
		}))
	}
	return all
}

var regulationSource = rule.Source{Text: "self-bias regulates where it takes away at least half of a slow disturbance of the emission, and two thirds in comfort", Mark: rule.Practice, Governs: true}

var regulating = rule.Rule{
	ID: "gun.regulation", Title: "Self-bias that regulates",
	Demands: "The bias resistor takes away at least half of a slow disturbance of the emission.",
	Applies: "Where the gun is self-biased.",
	Margin:  "marginal where less than two thirds are taken away",
	Concern: rule.Performance,
	Sources: []rule.Source{regulationSource},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `zero_bias_emission  = "560 uA"`, Becomes: ""}, {Was: `{ value = "4.7 Mohm"`, Becomes: `{ value = "500 kohm"`}},
		Changes: []rule.Change{{Rule: "gun.regulation", Subject: "gun", Verdict: rule.Fails}, {Rule: "gun.emission_law", Subject: "gun"}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		c := e.Chain()
		if why := noGun(e); why != "" {
			return rule.Over(why)
		}
		if c.Bias == nil || c.Bias.Kind.V != "self" {
			return rule.Over("the gun is not self-biased")
		}
		f := rule.Finding{Rule: "gun.regulation", Subject: "gun", Concern: rule.Performance, Relation: rule.AtLeast, Place: c.Bias.Here(),
			Under: string(evidence.Working), Sources: []rule.Source{regulationSource}, Remedy: "a larger bias resistor, nearer to cutoff"}
		if _, err := e.Cutoff(); err != nil {
			return rule.One(f.Lacking(err))
		}
		r, err := e.GunRegulation()
		if err != nil {
			return rule.One(f.Lacking(err))
		}
		f.Because = fmt.Sprintf("a slow disturbance of the emission is divided by %s; up to %s, from %s on, the gun regulates", quantity.Significant(r.Suppression), quantity.Text(r.Emission), quantity.Text(r.Resistor))
		f = f.Least(rule.Of(quantity.Fraction(r.Suppression)), rule.Of(quantity.Fraction(limits.Suppression)), limits.SuppressionMargin)
		return rule.One(f.Assume(e.GunAssumptions()...).WithoutRemedyIfMet())
	},
}
