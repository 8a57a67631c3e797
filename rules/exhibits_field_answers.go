package rules

import (
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
)

// answerTables list how the field at the weakest point goes with each dimension, and the
// smallest change of one that meets the rule.
func answerTables(e *evidence.Evidence) (all []exhibit.Table) {
	for _, f := range e.Arrangements() {
		answers, err := e.Answers(f)
		weak, err2 := e.Weakest(f)
		if first(err, err2) != nil || len(answers) == 0 {
			continue
		}
		t := exhibit.Table{
			ID: "field.answers", Subject: f.Name.V, Chapter: exhibit.Spacings, Basis: fieldBasis,
			Title:   "What each dimension does to the weakest point",
			Columns: []exhibit.Column{{Head: "dimension"}, {Head: "now", Unit: "m"}, {Head: "field goes with its power", Unit: "1"}, {Head: "meets the rule at", Unit: "m"}},
			Note:    "At " + quantity.Text(weak.Strength) + ", r " + quantity.Text(weak.At.R) + ", z " + quantity.Text(weak.At.Z) + "; all other dimensions and the voltages kept. Solved again for each.",
		}
		for _, a := range answers {
			now, power := exhibit.Number(a.Value), exhibit.Exponent(a.Power)
			if !(a.Value > 0) {
				now, power = exhibit.Words("sharp"), exhibit.Words("–")
			}
			t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(a.Name), now, power, exhibit.OrWords(a.Needed, a.Err)})
		}
		all = append(all, t)
	}
	return all
}

// cutoffTable sets the cutoff of the tables beside that of the computed field.
func cutoffTable(e *evidence.Evidence) []exhibit.Table {
	by, err := e.CutoffByField()
	if err != nil {
		return nil
	}
	t := exhibit.Table{
		ID: "gun.cutoffs", Chapter: exhibit.Beam, Title: "Cutoff from the geometry, two ways", Basis: fieldBasis + ", hv.gun",
		Columns: []exhibit.Column{{Head: "by"}, {Head: "over the voltage", Unit: "1"}, {Head: "cutoff", Unit: "V"}, {Head: "from", Unit: "V"}, {Head: "to", Unit: "V"}},
		Note:    "The computed field governs: control electrode with a fully rounded hole, tip on a rod as thick; its band is that of the setback's tolerance and of the hole's edges between rounded and sharp. The tables are an estimate: sharp holes, with their own band.",
	}
	row := func(what string, ratio float64, v, low, high quantity.Voltage) {
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(what), exhibit.Number(quantity.Fraction(ratio)), exhibit.Number(v), exhibit.Number(low), exhibit.Number(high)})
	}
	row(evidence.ByField, by.Ratio.Ratio, by.Voltage, by.Low, by.High)
	if table, err := e.CutoffEstimate(); err == nil {
		row(evidence.ByTable, table.Ratio.Ratio, table.Voltage, table.Low, table.High)
	} else {
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(evidence.ByTable), exhibit.Words(err.Error()), exhibit.Words("–"), exhibit.Words("–"), exhibit.Words("–")})
	}
	if g := e.Chain().Gun; g.Cutoff.Set() {
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words("as stated"), exhibit.Words("–"), exhibit.Number(g.Cutoff.V), exhibit.Words("–"), exhibit.Words("–")})
	}
	return []exhibit.Table{t}
}
