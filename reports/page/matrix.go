package page

import (
	"cmp"
	"slices"
	"strings"
	"unicode/utf8"

	"kilovet/reports/digest"
)

// matrix is figures of like subjects beside each other: a row for each subject, a
// column for each figure and state.
type matrix struct {
	name   string // first word of the ids
	groups []digest.Group
	states [][]int // of each group, the places of the states it has values in
}

// takes reports whether a group fits beside the others: at least half of the subjects
// are shared, and a line holds the row.
func (m matrix) takes(g digest.Group, used []int) bool {
	shared := 0
	known := m.subjects()
	for _, r := range g.Rows {
		if slices.Contains(known, r.Subject) {
			shared++
		}
	}
	if 2*shared < max(len(known), len(g.Rows)) {
		return false
	}
	m.groups, m.states = append(slices.Clone(m.groups), g), append(slices.Clone(m.states), used)
	return m.wide() <= matrixRunes
}

// wide is how many runes a row takes.
func (m matrix) wide() int {
	sum := m.subjectWide()
	for i, g := range m.groups {
		for _, s := range m.states[i] {
			sum += columnWide(g, s)
		}
	}
	return sum
}

// Sizes of matrices in runes.
const (
	mostSubject   = 36
	foldedSubject = 22
	numberSpace   = 2   // beside a number
	matrixRunes   = 117 // of a whole line; it has no long words
)

func (m matrix) subjectWide() int {
	n := 0
	for _, s := range m.subjects() {
		n = max(n, utf8.RuneCountInString(s)*letter/digit+numberSpace)
	}
	return min(n, mostSubject)
}

// narrow reports whether half a line is enough, with long names on two.
func (m matrix) narrow() bool {
	subject := m.subjectWide()
	return m.wide()-subject+min(subject, foldedSubject) <= halfRunes
}

func columnWide(g digest.Group, state int) int {
	n := len("working")
	for _, r := range g.Rows {
		n = max(n, utf8.RuneCountInString(r.Values[state]))
	}
	return n + numberSpace
}

// table has a row for each subject; subjects that share every number share a row.
func (m matrix) table(states []string) Table {
	line := max(m.wide(), halfRunes)
	if m.narrow() {
		line = halfRunes
	}
	t := Table{Title: "Figures: " + m.name, Note: m.meanings(), Columns: []Column{{Title: "Subject"}}}
	for i, g := range m.groups {
		for _, s := range m.states[i] {
			c := Column{Over: heading(g.ID), Title: states[s], Right: true, Share: float64(columnWide(g, s)) / float64(line)}
			if len(m.states[i]) == 1 {
				c.Title, c.Over = strings.TrimSuffix(c.Over+", "+states[s], ", "), ""
			}
			t.Columns = append(t.Columns, c)
		}
	}
	rest := 1.0
	for _, c := range t.Columns {
		rest -= c.Share
	}
	t.Columns[0].Share = rest
	for _, r := range m.folded() {
		row := Row{Anchor: m.anchor(r.subjects[0]), Cells: []Cell{lines(plain(names(r.subjects)))}}
		for _, v := range r.values {
			row.Cells = append(row.Cells, lines(plain(v)))
		}
		t.Rows = append(t.Rows, row)
	}
	return t
}

// anchor names the row of a subject.
func (m matrix) anchor(subject string) string { return anchor("figures", m.groups[0].ID, subject) }

// alike is subjects with the same values.
type alike struct {
	subjects []string
	values   []string
}

// folded is the rows of the matrix: those that follow each other with the same numbers
// are one.
func (m matrix) folded() []alike {
	var all []alike
	for _, s := range m.subjects() {
		v := m.values(s)
		if n := len(all); n > 0 && slices.Equal(all[n-1].values, v) {
			all[n-1].subjects = append(all[n-1].subjects, s)
			continue
		}
		all = append(all, alike{[]string{s}, v})
	}
	return all
}

func (m matrix) values(subject string) []string {
	var all []string
	for i, g := range m.groups {
		at := slices.IndexFunc(g.Rows, func(r digest.Row) bool { return r.Subject == subject })
		for _, s := range m.states[i] {
			if at < 0 {
				all = append(all, "")
			} else {
				all = append(all, g.Rows[at].Values[s])
			}
		}
	}
	return all
}

func (m matrix) subjects() []string {
	var all []string
	seen := map[string]bool{}
	for _, g := range m.groups {
		for _, r := range g.Rows {
			if !seen[r.Subject] {
				seen[r.Subject] = true
				all = append(all, r.Subject)
			}
		}
	}
	return all
}

// meanings says what the columns are and how they were obtained.
func (m matrix) meanings() string {
	var all []string
	for i, g := range m.groups {
		text := g.ID + ": " + g.What
		if i+1 == len(m.groups) || m.groups[i+1].Basis != g.Basis {
			text += " (basis: " + cmp.Or(g.Basis, "not named") + ")"
		}
		all = append(all, text)
	}
	return strings.Join(all, "; ") + "."
}

// heading is what an id says after its family.
func heading(id string) string {
	_, name, found := strings.Cut(id, ".")
	if !found {
		name = id
	}
	return strings.ReplaceAll(name, "_", " ")
}
