package html

import (
	"html/template"

	"kilovet/reports/digest"
	"kilovet/rules/figure"
)

// table is figures that share their columns.
type table struct {
	ID, Title string
	Columns   []string
	Groups    []group
}

// group is the figures that share id, meaning and basis.
type group struct {
	ID, What, Basis string
	Rows            template.HTML
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

func cleanGroups(groups []digest.Group) []group {
	all := make([]group, len(groups))
	for i, g := range groups {
		all[i] = group{clean(g.ID), clean(g.What), clean(g.Basis), figureRows(g)}
	}
	return all
}

// Span is how many columns a row over all of them takes.
func (*reviewed) Span(columns int) int { return columns + 1 }
