package page

import (
	"slices"
	"strings"

	"kilovet/reports/digest"
	"kilovet/rules/figure"
)

// mostAcross is how many figures of a family stand beside each other.
const mostAcross = 6

// family is figures of like subjects that do not depend on the state, to be set beside
// each other: a row for each subject.
type family struct {
	name   string // first word of the ids
	groups []digest.Group
}

// families takes the groups of several subjects out of others.
func families(groups []digest.Group) (all []family, rest []digest.Group) {
	for _, g := range groups {
		name, _, _ := strings.Cut(g.ID, ".")
		switch i := slices.IndexFunc(all, func(f family) bool { return f.name == name && len(f.groups) < mostAcross }); {
		case len(g.Rows) < 2 || repeated(g):
			rest = append(rest, g)
		case i < 0:
			all = append(all, family{name, []digest.Group{g}})
		default:
			all[i].groups = append(all[i].groups, g)
		}
	}
	return all, rest
}

// repeated reports whether a subject has several values.
func repeated(g digest.Group) bool {
	seen := map[string]bool{}
	for _, r := range g.Rows {
		if seen[r.Subject] {
			return true
		}
		seen[r.Subject] = true
	}
	return false
}

// table has a row for each subject and a column for each figure.
func (f family) table() Table {
	share := min(0.16, 0.72/float64(len(f.groups)))
	t := Table{Title: "Figures: " + f.name, Note: f.meanings(), Columns: []Column{{Title: "Subject", Share: 1 - share*float64(len(f.groups))}}}
	for _, g := range f.groups {
		t.Columns = append(t.Columns, Column{Title: heading(g.ID), Share: share, Right: true})
	}
	for _, subject := range f.subjects() {
		row := Row{Anchor: anchor("figures", f.name, subject), Cells: []Cell{lines(plain(subject))}}
		for _, g := range f.groups {
			row.Cells = append(row.Cells, lines(plain(value(g, subject))))
		}
		t.Rows = append(t.Rows, row)
	}
	return t
}

// heading is what an id says after its family.
func heading(id string) string {
	_, name, _ := strings.Cut(id, ".")
	return strings.ReplaceAll(name, "_", " ")
}

// meanings says what the columns are and how they were obtained.
func (f family) meanings() string {
	var all []string
	for i, g := range f.groups {
		text := g.ID + ": " + g.What
		if i+1 == len(f.groups) || f.groups[i+1].Basis != g.Basis {
			text += " (basis: " + g.Basis + ")"
		}
		all = append(all, text)
	}
	return strings.Join(all, "; ") + "."
}

func (f family) subjects() []string {
	var all []string
	for _, g := range f.groups {
		for _, r := range g.Rows {
			if !slices.Contains(all, r.Subject) {
				all = append(all, r.Subject)
			}
		}
	}
	return all
}

func value(g digest.Group, subject string) string {
	for _, r := range g.Rows {
		if r.Subject == subject {
			return r.Values[0]
		}
	}
	return ""
}

// besides lists the ids that stand beside others of their family.
func besides(all []figure.Figure) map[string]bool {
	ids := map[string]bool{}
	fams, _ := families(telling(digest.Stateless(all)))
	for _, f := range fams {
		for _, g := range f.groups {
			ids[g.ID] = true
		}
	}
	return ids
}
