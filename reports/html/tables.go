package html

import (
	"kilovet/reports/digest"
	"kilovet/rules"
)

// table is figures that share their columns.
type table struct {
	ID, Title string
	Columns   []string
	Groups    []digest.Group
}

// tables are the figures that depend on the state, and the others.
func tables(r *rules.Review) []table {
	var all []table
	states := digest.States(r.Figures)
	if groups := digest.ByState(r.Figures, states); len(groups) > 0 {
		all = append(all, table{"figures-by-state", "Figures by state", cleaned(states), cleanGroups(groups)})
	}
	if groups := digest.Stateless(r.Figures); len(groups) > 0 {
		all = append(all, table{"figures", "Figures", []string{"value"}, cleanGroups(groups)})
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
