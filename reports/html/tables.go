package html

import (
	"kilovet/reports/digest"
	"kilovet/rules/figure"
)

// table is figures that share their columns.
type table struct {
	ID, Title string
	Columns   []string
	Groups    []digest.Group
}

// figureTables are the figures of a chapter that depend on the state, and the others.
func figureTables(id string, figures []figure.Figure) []table {
	var all []table
	states := digest.States(figures)
	if groups := digest.ByState(figures, states); len(groups) > 0 {
		all = append(all, table{id + "-by-state", "Figures by state", cleaned(states), cleanGroups(groups)})
	}
	if groups := digest.Stateless(figures); len(groups) > 0 {
		all = append(all, table{id + "-figures", "Figures", []string{"value"}, cleanGroups(groups)})
	}
	return all
}

func cleanGroups(groups []digest.Group) []digest.Group {
	for i := range groups {
		g := &groups[i]
		g.ID, g.What, g.Basis = clean(g.ID), clean(g.What), clean(g.Basis)
		for j := range g.Rows {
			g.Rows[j].Subject = clean(g.Rows[j].Subject)
		}
	}
	return groups
}

// Span is how many columns a row over all of them takes.
func (*reviewed) Span(columns int) int { return columns + 1 }
