package rules

import (
	"kilovet/hv/chain"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
	"kilovet/rules/spacing"
)

// distances shows for each spacing without a clearance the one that its rules would
// ask for.
func distances(e *evidence.Evidence) []exhibit.Table {
	var all []exhibit.Table
	for i := range e.Chain().Spacings {
		s := &e.Chain().Spacings[i]
		if enough := spacing.DistancesOf(e, s); len(enough) > 0 {
			all = append(all, distanceTable(s, enough))
		}
	}
	return all
}

func distanceTable(s *chain.Spacing, enough []spacing.Enough) exhibit.Table {
	t := exhibit.Table{
		ID: "spacing.distances", Subject: s.Name.V, Chapter: exhibit.Spacings, Title: "Distance needed: " + s.Name.V,
		Columns: []exhibit.Column{{Head: "rule"}, {Head: "at least", Unit: "m"}, {Head: "with the margin", Unit: "m"}, {Head: "why"}},
		Basis:   "the laws that judge a spacing, asked backwards",
		Note:    "The largest of them decides. A clearance once given is judged anew.",
	}
	if s.Shape != nil {
		t.Note += " The shape keeps its sharpest radius."
	}
	for _, n := range enough {
		t.Rows = append(t.Rows, distanceRow(n))
	}
	return t
}

func distanceRow(n spacing.Enough) []exhibit.Cell {
	if n.Least.Err != nil {
		return []exhibit.Cell{exhibit.Words(n.Rule), {}, {}, exhibit.Words("not known: " + n.Least.Err.Error())}
	}
	return []exhibit.Cell{exhibit.Words(n.Rule), exhibit.Number(n.Least.Length), distanceCell(n.Comfort), exhibit.Words(n.Because)}
}

func distanceCell(d spacing.Distance) exhibit.Cell {
	if d.Err != nil {
		return exhibit.Words("not known: " + d.Err.Error())
	}
	return exhibit.Number(d.Length)
}
