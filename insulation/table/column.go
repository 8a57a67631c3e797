// Package table holds the printed tables of spacing: IEC 60664-1:2020, IEC
// 61010-1:2010 as far as it was read, IPC-2221. Every table carries its edition,
// its source and the mark of that source; a lookup interpolates where the standard
// allows it, takes the first row below the table and refuses to go past its last.
package table

import (
	"fmt"
	"sort"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// Column is one column of a printed table over its rising first column.
type Column[A, V quantity.Number] struct {
	source gap.Source
	what   string // the argument, for people: "peak voltage"
	at     []A
	value  []V
	marks  []gap.Mark // of each cell; nil: that of the source
}

// Reading is a value taken from a column.
type Reading[V quantity.Number] struct {
	Value  V
	Rows   string     // the rows it comes from, for people
	Note   string     // what the standard says beside it; may be empty
	Source gap.Source // with the weaker mark of the cells used
}

// At reads the column, linear between two rows. Below the first row it returns the
// first row; past the last row there is a lack.
func (c *Column[A, V]) At(x A) (Reading[V], error) {
	i, err := c.row(x)
	if err != nil {
		return Reading[V]{}, err
	}
	if i == 0 || quantity.Equal(c.at[i], x) {
		return c.cell(i), nil
	}
	part := V((x - c.at[i-1]) / (c.at[i] - c.at[i-1]))
	r := Reading[V]{Value: c.value[i-1] + part*(c.value[i]-c.value[i-1]), Source: c.source}
	r.Rows = fmt.Sprintf("between the rows %s and %s", quantity.Text(c.at[i-1]), quantity.Text(c.at[i]))
	r.Source.Mark = weaker(c.mark(i-1), c.mark(i))
	return r, nil
}

// Step reads the first row that covers the argument, without interpolation.
func (c *Column[A, V]) Step(x A) (Reading[V], error) {
	i, err := c.row(x)
	if err != nil {
		return Reading[V]{}, err
	}
	return c.cell(i), nil
}

// Reach is the largest argument whose value does not exceed v: what a spacing of v
// stands by this column. Below the first row there is a lack; from the last row on
// it is the last argument.
func (c *Column[A, V]) Reach(v V) (A, error) {
	if !quantity.AtLeast(v, c.value[0]) {
		return 0, lack.Range("%s begins at %s", c.source.Text, quantity.Text(c.value[0]))
	}
	i := sort.Search(len(c.value), func(i int) bool { return c.value[i] > v })
	if i == len(c.value) {
		return c.Last(), nil
	}
	if i == 0 {
		return c.at[0], nil
	}
	part := A((v - c.value[i-1]) / (c.value[i] - c.value[i-1]))
	return c.at[i-1] + part*(c.at[i]-c.at[i-1]), nil
}

// First is the argument of the first row.
func (c *Column[A, V]) First() A { return c.at[0] }

// Last is the argument of the last row.
func (c *Column[A, V]) Last() A { return c.at[len(c.at)-1] }

// Source names the table.
func (c *Column[A, V]) Source() gap.Source { return c.source }

// row is the index of the first row that covers x.
func (c *Column[A, V]) row(x A) (int, error) {
	i := sort.Search(len(c.at), func(i int) bool { return quantity.AtMost(x, c.at[i]) })
	if i == len(c.at) {
		return 0, lack.Range("%s ends at a %s of %s, asked for %s",
			c.source.Text, c.what, quantity.Text(c.Last()), quantity.Text(x))
	}
	return i, nil
}

func (c *Column[A, V]) cell(i int) Reading[V] {
	r := Reading[V]{Value: c.value[i], Rows: "row " + quantity.Text(c.at[i]), Source: c.source}
	r.Source.Mark = c.mark(i)
	return r
}

func (c *Column[A, V]) mark(i int) gap.Mark {
	if c.marks == nil {
		return c.source.Mark
	}
	return c.marks[i]
}

// weaker is the mark of two sources used together.
func weaker(a, b gap.Mark) gap.Mark {
	for _, m := range []gap.Mark{gap.Memory, gap.Practice, gap.Derived} {
		if a == m || b == m {
			return m
		}
	}
	return gap.Read
}

// Of builds a column from rows of printed numbers: the first of each row is the
// argument, the k-th the value, both times the size of their unit; both must rise. A
// zero value is a blank cell and is left out.
func Of[A, V quantity.Number, R ~[]float64](source gap.Source, what string, rows []R, k int, perArgument A, perValue V) *Column[A, V] {
	c := &Column[A, V]{source: source, what: what}
	for _, row := range rows {
		if row[k] == 0 {
			continue
		}
		c.at = append(c.at, A(row[0])*perArgument)
		c.value = append(c.value, V(row[k])*perValue)
	}
	return c
}
