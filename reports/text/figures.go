package text

import (
	"strings"

	"kilovet/reports/digest"
	"kilovet/rules"
)

// widest is the width of a column of values where there is room.
const widest = 13

// table sets figures: subjects to the left, a column for each state.
type table struct {
	*writer
	states []string
	column int // width of a column of values
	room   int // what is left for the subjects
}

// figures writes the figures that depend on the state as a table of states, the
// others one a line.
func figures(w *writer, r *rules.Review) {
	states := digest.States(r.Figures)
	if groups := digest.ByState(r.Figures, states); len(groups) > 0 {
		w.head("Figures by state")
		newTable(w, states).groups(groups)
	}
	if groups := digest.Stateless(r.Figures); len(groups) > 0 {
		w.head("Figures")
		newTable(w, []string{""}).groups(groups)
	}
}

func newTable(w *writer, states []string) table {
	column := min(widest, (w.width-6)/len(states))
	t := table{w, states, column, w.width - column*len(states)}
	if states[0] != "" && t.fits(states) {
		t.line(pad("", t.room) + t.cells(states))
	}
	return t
}

func (t table) groups(groups []digest.Group) {
	for _, g := range groups {
		t.wrap(g.ID + ": " + g.What)
		if g.Basis != "" {
			t.hang("  by", 5, g.Basis)
		}
		for _, row := range g.Rows {
			t.row(row)
		}
	}
}

// row writes a subject and its values; a subject too long for its column stands
// on lines of its own above them.
func (t table) row(row digest.Row) {
	lines := t.broken(row.Subject, 4)
	last := lines[len(lines)-1]
	if 4+runes(last) >= t.room || !t.fits(row.Values) || !t.fits(t.states) {
		lines, last = append(lines, ""), ""
	}
	for _, l := range lines[:len(lines)-1] {
		t.line(pad("", 4) + l)
	}
	if t.fits(row.Values) && t.fits(t.states) {
		t.line(pad(pad("", 4)+last, t.room) + t.cells(row.Values))
		return
	}
	for i, v := range row.Values {
		if v != "" {
			t.hang("", 6, t.states[i]+" "+v)
		}
	}
}

// fits reports whether every word leaves a space before it in its column.
func (t table) fits(words []string) bool {
	for _, s := range words {
		if runes(s) >= t.column {
			return false
		}
	}
	return true
}

func (t table) cells(values []string) string {
	var b strings.Builder
	for _, v := range values {
		b.WriteString(strings.Repeat(" ", t.column-runes(v)) + v)
	}
	return b.String()
}
