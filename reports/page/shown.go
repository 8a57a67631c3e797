package page

import (
	"slices"

	"kilovet/reports/digest"
	"kilovet/rules/exhibit"
)

// told is a figure of several subjects of which tables show every value.
type told struct {
	digest.Group
	tables []string // their anchors
}

// shown is the numbers that tables show, by the first word of their row.
type shown map[number]string

// number is a number and the subject of its row, as printed.
type number struct{ subject, value string }

func newShown(tables []exhibit.Table) shown {
	all := shown{}
	for _, t := range tables {
		for _, row := range t.Rows[:min(len(t.Rows), longTable)] {
			for i, c := range row {
				if c.Value != nil {
					all.put(number{row[0].Text, digest.Cell(t.Columns[i].Unit, c.Value, "")}, anchor("table", t.ID, t.Subject))
				}
			}
		}
	}
	return all
}

// put keeps the first table that shows a number.
func (s shown) put(n number, table string) {
	if s[n] == "" {
		s[n] = table
	}
}

// all is the tables that show every value of a figure; none where one is in none.
func (s shown) all(g digest.Group) []string {
	var tables []string
	for _, r := range g.Rows {
		for _, v := range r.Values {
			if v == "" {
				continue
			}
			t := s[number{r.Subject, v}]
			if t == "" {
				return nil
			}
			if !slices.Contains(tables, t) {
				tables = append(tables, t)
			}
		}
	}
	return tables
}
