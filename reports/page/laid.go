package page

import (
	"slices"
	"strings"

	"kilovet/reports/digest"
)

// laid is the figures of a chapter set in tables: matrices of those of several
// subjects, those that are the same for several subjects, and lists of the others; what
// tables of the review show already is not set again.
type laid struct {
	states   []string // the last is that of figures to which the state does not matter
	matrices []matrix
	alike    []digest.Group
	byState  []digest.Group
	others   []digest.Group
	told     []told
	silent   bool // rows that are nought throughout were left out
}

// layFigures sorts figures into tables.
func layFigures(c digest.Chapter) laid {
	l := laid{states: append(digest.States(c.Figures), "")}
	shown := newShown(c.Tables)
	groups := digest.ByState(c.Figures, l.states)
	l.silent = slices.ContainsFunc(groups, func(g digest.Group) bool { return slices.ContainsFunc(g.Rows, digest.Row.Silent) })
	for _, g := range telling(groups) {
		used := statesOf(g)
		switch many := len(g.Rows) > 1 && !repeated(g); {
		case many && len(shown.all(g)) > 0:
			l.told = append(l.told, told{g, shown.all(g)})
		case many && sameThroughout(g):
			l.alike = append(l.alike, joinedRows(g))
		case many:
			l.place(g, used)
		case len(used) == 1 && used[0] == len(l.states)-1:
			l.others = append(l.others, g)
		default:
			l.byState = append(l.byState, g)
		}
	}
	return l
}

// sameThroughout reports whether all subjects have the same values.
func sameThroughout(g digest.Group) bool {
	return !slices.ContainsFunc(g.Rows, func(r digest.Row) bool { return !slices.Equal(r.Values, g.Rows[0].Values) })
}

// joinedRows is a group with one row for all its subjects.
func joinedRows(g digest.Group) digest.Group {
	var all []string
	for _, r := range g.Rows {
		all = append(all, r.Subject)
	}
	g.Rows = []digest.Row{{Subject: names(all), Values: g.Rows[0].Values}}
	return g
}

// place puts a group beside others of its family whose subjects it shares, while there
// is room.
func (l *laid) place(g digest.Group, used []int) {
	name, _, _ := strings.Cut(g.ID, ".")
	i := slices.IndexFunc(l.matrices, func(m matrix) bool { return m.name == name && m.takes(g, used) })
	if i < 0 {
		i = len(l.matrices)
		l.matrices = append(l.matrices, matrix{name: name})
	}
	m := &l.matrices[i]
	m.groups, m.states = append(m.groups, g), append(m.states, used)
}

// statesOf is the places of the states that a group has values in.
func statesOf(g digest.Group) []int {
	var used []int
	for i := range g.Rows[0].Values {
		if slices.ContainsFunc(g.Rows, func(r digest.Row) bool { return r.Values[i] != "" }) {
			used = append(used, i)
		}
	}
	return used
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
