package optics

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/ripple/beam"
	"kilovet/rules/evidence"
	"kilovet/rules/rule"
)

var widthSource = rule.Source{Text: "the total energies of a hot cathode have 2.446 kT of full width at half maximum (2.45 in textbooks, from memory); what the beam adds only widens it: measured tungsten guns have 1 to 3 eV (JEOL, glossary of SEM terms, read)", Mark: rule.Derived, Governs: true}

var energyWidth = rule.Rule{
	ID: "beam.energy_width", Title: "Energy width against the cathode's temperature",
	Demands: "A stated energy width of the source is not below what its temperature alone makes.",
	Applies: "Where [beam] states the energy width of electrons and [gun] the cathode's temperature.",
	Margin:  "none: a width below it is a mistake",
	Concern: rule.Performance,
	Sources: []rule.Source{widthSource},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `energy_width         = "1.5 eV"`, Becomes: `energy_width         = "0.5 eV"`}},
		Changes: []rule.Change{{Rule: "beam.energy_width", Subject: "beam", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		b, g := e.Chain().Beam, e.Chain().Gun
		switch {
		case noGun(e) != "":
			return rule.Over(noGun(e))
		case b == nil || !b.EnergyWidth.Set() || e.Ions():
			return rule.Over("no energy width of electrons is stated")
		case !g.CathodeTemperature.Set():
			return rule.Over("the temperature of the cathode is not stated")
		}
		f := rule.Finding{Rule: "beam.energy_width", Subject: "beam", Concern: rule.Performance, Relation: rule.AtLeast, Place: b.EnergyWidth.Place,
			Under: string(evidence.Working), Sources: []rule.Source{widthSource}, Remedy: "correct the width (full, at half maximum, in eV) or the temperature; leave the width out for the thermal one"}
		least := beam.ThermalFWHM(g.CathodeTemperature.V)
		f.Because = fmt.Sprintf("stated %s; at %s the cathode alone makes %s", quantity.Text(b.EnergyWidth.V), quantity.Text(g.CathodeTemperature.V), quantity.Text(least))
		return rule.One(f.Least(rule.Of(b.EnergyWidth.V), rule.Of(least), 0).WithoutRemedyIfMet())
	},
}
