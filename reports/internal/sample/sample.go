// Package sample holds finished reviews that the tests of all renderers share.
// Their numbers are made up: a renderer must carry them, not understand them.
package sample

import (
	"kilovet/hv/document"
	"kilovet/rules"
	"kilovet/rules/figure"
	"kilovet/rules/rule"
)

// SHA is a well-formed digest.
const SHA = "b94d27b9934d3e08a52e52d7da7dabfac484efe37a5380ee9088f7ace2efcde9"

// Deference is what the samples defer with.
const Deference = "Local electrical codes and the judgement of a licensed engineer come before this review; it replaces neither."

// Failing is a review of ordinary size in which something fails, something is
// unassessed, something is marginal and something is met.
func Failing() *rules.Review {
	return &rules.Review{
		Program: rules.Program{Name: "kilovet", Version: "0.1.0"},
		Inputs:  []rules.Input{{Role: "description", Name: "chain.toml", SHA256: SHA}},
		Heading: rules.Heading{Title: "Thin-film bench, 20 kV diffraction column", Document: "HV-0042", Revision: "B",
			Owner: "Bench group", Creator: "A. N. Other", DocumentType: "design review"},
		Summary: []rules.Line{
			{Label: "supply", Text: "half-wave cascade of 6 stages, negative, sine drive 1.75 kV at 38 kHz"},
			{Label: "regulation", Text: "held at 20 kV on node output"},
			{Label: "output", Text: "-20.0 kV at 60 µA"},
			{Label: "ripple", Text: "0.42 V peak to peak at the cathode"},
			{Label: "blur", Text: "9.8 nm of 12 nm allowed"},
		},
		Verdict: rule.Fails,
		Counts:  map[rule.Verdict]int{rule.Fails: 1, rule.Unassessed: 1, rule.Marginal: 1, rule.Meets: 2},
		Figures: figures(),
		Findings: []rule.Finding{
			diode(), creepage(), limit(), enclosure(), blur(),
		},
		Cautions:    []rule.Caution{{Subject: "x-rays", Text: "Beams above 5 kV make x-rays wherever electrons stop; measure before use."}},
		PassedOver:  []rule.PassedOver{{Rule: "heater.common_mode", Because: "the heater is fed from a battery"}},
		Assumptions: []string{"a screen divides the coupled common mode by 1000"},
		Deference:   Deference,
	}
}

func figures() []figure.Figure {
	return []figure.Figure{
		{ID: "potential", Subject: "cathode", State: "working", What: "mean over a drive period, to ground", Value: -19612.4, Unit: "V", Basis: "ripple.network"},
		{ID: "potential", Subject: "cathode", State: "cold", What: "mean over a drive period, to ground", Value: -20000.5, Unit: "V", Basis: "ripple.network"},
		{ID: "potential", Subject: "cathode", State: "lost", What: "mean over a drive period, to ground", Value: -24800, Unit: "V", Basis: "ripple.network"},
		{ID: "potential", Subject: "control", State: "working", What: "mean over a drive period, to ground", Value: -20000, Unit: "V", Basis: "ripple.network"},
		{ID: "multiplier.ripple", State: "working", What: "peak to peak at the top of the smoothing column", Value: 3.25e-1, Unit: "V", Basis: "ripple.network"},
		{ID: "divider.ratio", What: "sensed node to tap, meter connected", Value: 1010.1, Unit: "1", Basis: "hv.steady"},
		{ID: "divider.error", What: "worst case", Value: 0.0213, Unit: "1", Basis: "hv.steady"},
		{ID: "stored.energy", What: "sum over all parts", Value: 0.613, Unit: "J", Basis: "hv.steady"},
		{ID: "stored.energy", Subject: "cable", What: "sum over all parts", Value: 0.0264, Unit: "J", Basis: "hv.steady"},
	}
}

func amount(v float64, unit string) *rule.Amount { return &rule.Amount{Value: v, Unit: unit} }

func margin(v float64) *float64 { return &v }

func diode() rule.Finding {
	return rule.Finding{Rule: "rating.diode_reverse", Verdict: rule.Marginal, Concern: rule.Equipment, Relation: rule.AtMost,
		Needed: amount(6800, "V"), Provided: amount(5900, "V"), Margin: margin(6800.0/5900 - 1), Under: "lost, upper corner",
		Because: "The stack sees 74 % of its rating.", Remedy: "Take a stack of 9 kV or more.",
		Assumptions: []string{"the reverse voltage divides evenly over the stack"},
		Sources:     []rule.Source{{Text: "diode derating to 70 %", Mark: rule.Practice, Governs: true}},
		Place:       document.Place{Key: "multiplier.diode", Line: 24, Column: 9}}
}

func creepage() rule.Finding {
	return rule.Finding{Rule: "spacing.creepage", Subject: "gun feedthrough, air side", Verdict: rule.Fails, Concern: rule.Life, Relation: rule.AtLeast,
		Needed: amount(0.125, "m"), Provided: amount(0.11, "m"), Margin: margin(0.11/0.125 - 1), Under: "cold",
		Because: "The creepage of 110 mm is less than the 125 mm that 20 kV needs on this material at pollution degree 2.",
		Remedy:  "Lengthen the surface path by 15 mm, or use a material of a higher comparative tracking index.",
		Sources: []rule.Source{{Text: "IEC 60664-1:2020 Table F.5", Mark: rule.Read, Governs: true}, {Text: "IEC 61010-1:2010 Table K.13", Mark: rule.Memory}},
		Place:   document.Place{Key: "spacing.creepage", Line: 97, Column: 14}}
}

func limit() rule.Finding {
	return rule.Finding{Rule: "rating.cable", Subject: "cable", Verdict: rule.Unassessed, Concern: rule.Equipment, Relation: rule.AtMost,
		Because: "The highest voltage of a regulated chain is not known without the limit of its drive.",
		Remedy:  "Give drive.peak_limit.", Missing: []string{"drive.peak_limit"},
		Sources: []rule.Source{{Text: "cable rating", Mark: rule.Derived, Governs: true}}, Place: document.Place{Key: "drive.peak_limit"}}
}

func enclosure() rule.Finding {
	return rule.Finding{Rule: "access.enclosure", Verdict: rule.Meets, Concern: rule.Life, Relation: rule.Presence,
		Because: "The enclosure is interlocked.", Sources: []rule.Source{{Text: "IEC 61010-1:2010 clause 6", Mark: rule.Memory, Governs: true}},
		Place: document.Place{Key: "access.enclosure", Line: 80, Column: 1}}
}

func blur() rule.Finding {
	return rule.Finding{Rule: "beam.blur", Subject: "specimen", Verdict: rule.Meets, Concern: rule.Performance, Relation: rule.AtMost,
		Needed: amount(12e-9, "m"), Provided: amount(9.8e-9, "m"), Margin: margin(12/9.8 - 1), Under: "working",
		Because: "The spot stays inside the allowance.", Sources: []rule.Source{{Text: "Barth and Kruit, Optik 101 (1996)", Mark: rule.Read, Governs: true}},
		Place: document.Place{Key: "beam.blur_allowance", Line: 71, Column: 3}}
}

// Sound is a review in which everything is met.
func Sound() *rules.Review {
	r := Failing()
	r.Findings = []rule.Finding{enclosure(), blur()}
	r.Verdict, r.Counts = rule.Meets, map[rule.Verdict]int{rule.Meets: 2}
	r.Assumptions, r.Cautions, r.PassedOver = nil, nil, nil
	return r
}

// Empty is a review of nothing.
func Empty() *rules.Review {
	return &rules.Review{Program: rules.Program{Name: "kilovet", Version: "0.1.0"}, Verdict: rule.Unassessed, Deference: Deference}
}
