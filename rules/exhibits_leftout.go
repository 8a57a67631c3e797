package rules

import (
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
)

// leftOut says which parts of the review of gun and beam were not made, and why.
func leftOut(e *evidence.Evidence) []exhibit.Table {
	if !e.HasSupply() {
		return nil
	}
	t := exhibit.Table{
		ID: "beam.left_out", Chapter: exhibit.Beam, Title: "Left out of gun and beam", Basis: "as described",
		Columns: []exhibit.Column{{Head: "what"}, {Head: "because"}},
	}
	for _, o := range e.LeftOut() {
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(o.What), exhibit.Words(o.Because)})
	}
	if len(t.Rows) == 0 {
		return nil
	}
	return []exhibit.Table{t}
}
