package rules

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/ripple/network"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
)

// loadSteps lists what the output does when the emission comes and goes, and how far from its
// set value regulation may hold it.
func loadSteps(c *collector, e *evidence.Evidence) {
	const basis = evidence.Basis
	if d, err := e.LoadRemoved(); err == nil {
		add(c, "step.removed", "", basis, max(d.After, -d.After), nil)
		add(c, "step.settling", "", basis, d.Settled, nil)
	}
	if d, err := e.LoadApplied(); err == nil {
		add(c, "step.applied", "", basis, max(d.After, -d.After), nil)
		add(c, "step.applied_settling", "", basis, d.Settled, nil)
	}
	if least, most, err := e.HeldBetween(); err == nil {
		add(c, "regulation.least", "", "hv.steady", least, nil)
		add(c, "regulation.most", "", "hv.steady", most, nil)
	}
}

// stepTable shows the load step and says what is modelled of it.
func stepTable(e *evidence.Evidence) []exhibit.Table {
	d, err := e.LoadRemoved()
	if err != nil {
		return nil
	}
	t := exhibit.Table{
		ID: "chain.load_step", Chapter: exhibit.Multiplier, Title: "When the emission comes and goes", Basis: evidence.Basis,
		Columns: []exhibit.Column{{Head: "case"}, {Head: "output before", Unit: "V"}, {Head: "output after", Unit: "V"}, {Head: "95 % of the way after", Unit: "s"}},
		Note:    "the drive stays where it was",
	}
	row := func(what string, d *network.Changed) {
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(what), exhibit.Number(max(d.Before, -d.Before)), exhibit.Number(max(d.After, -d.After)), exhibit.Number(d.Settled)})
	}
	row("emission stops", d)
	if applied, err := e.LoadApplied(); err == nil {
		row("emission sets in", applied)
	}
	if e.Chain().Regulation != nil {
		t.Note = "no regulation acts: " + t.Note + "; a regulation quicker than the settling holds the set voltage, a slower one lets the output go so far first; the loop itself is not described and not modelled"
	}
	if least, most, err := e.HeldBetween(); err == nil {
		t.Note += fmt.Sprintf("; with the divider's error the set voltage means %s to %s", quantity.Text(least), quantity.Text(most))
	}
	return []exhibit.Table{t}
}
