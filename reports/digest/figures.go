package digest

import (
	"cmp"
	"slices"
	"strings"

	"kilovet/rules/exhibit"
	"kilovet/rules/figure"
	"kilovet/rules/rule"
)

// Group is the figures that share id, meaning and basis.
type Group struct {
	ID, What, Basis string
	Rows            []Row
}

// Row is the values of one subject, one for each of the states asked for; a
// state without a figure is empty.
type Row struct {
	Subject string // what belongs to no one part is of the whole chain
	Values  []string
}

// whole is the subject of a figure that names none.
const whole = "whole chain"

// Part is the subject where the row belongs to a part of the chain; empty where
// it is of the whole.
func (r Row) Part() string {
	if r.Subject == whole {
		return ""
	}
	return r.Subject
}

// Silent reports whether the row belongs to a part and says nothing of it but nought,
// as the potential of ground does.
func (r Row) Silent() bool {
	return r.Part() != "" && !slices.ContainsFunc(r.Values, func(v string) bool {
		return v != "" && v != "0" && !strings.HasPrefix(v, "0 ")
	})
}

// States lists the states the figures know, in the order working, cold, lost and
// then of appearance; the empty state is not among them.
func States(figures []figure.Figure) []string {
	var known, others []string
	usual := []string{"working", "cold", "lost"}
	for _, s := range usual {
		if slices.ContainsFunc(figures, func(f figure.Figure) bool { return f.State == s }) {
			known = append(known, s)
		}
	}
	for _, f := range figures {
		if f.State != "" && !slices.Contains(usual, f.State) && !slices.Contains(others, f.State) {
			others = append(others, f.State)
		}
	}
	return append(known, others...)
}

// ByState lays out the figures that hold in one of the states.
func ByState(figures []figure.Figure, states []string) []Group {
	return groups(figures, states)
}

// Stateless lays out the figures to which the state does not matter.
func Stateless(figures []figure.Figure) []Group { return groups(figures, []string{""}) }

func groups(figures []figure.Figure, states []string) []Group {
	var all []Group
	for _, f := range figures {
		column := slices.Index(states, f.State)
		if column < 0 {
			continue
		}
		i := slices.IndexFunc(all, func(g Group) bool { return g.ID == f.ID && g.What == f.What && g.Basis == f.Basis })
		if i < 0 {
			i = len(all)
			all = append(all, Group{ID: f.ID, What: f.What, Basis: f.Basis})
		}
		all[i].put(f, column, len(states))
	}
	return all
}

// put writes a value into the first row of its subject whose place is still free,
// so that no figure is lost.
func (g *Group) put(f figure.Figure, column, columns int) {
	subject := cmp.Or(f.Subject, whole)
	i := slices.IndexFunc(g.Rows, func(r Row) bool { return r.Subject == subject && r.Values[column] == "" })
	if i < 0 {
		i = len(g.Rows)
		g.Rows = append(g.Rows, Row{subject, make([]string, columns)})
	}
	g.Rows[i].Values[column] = FigureText(f)
}

// FigureText writes the value of a figure for people. By how many per cent something
// changes for one per cent of its cause is no share, and is written as it is.
func FigureText(f figure.Figure) string {
	if f.Unit == "1" && strings.HasPrefix(f.What, "relative change of ") {
		return exhibit.Exponent(f.Value).Text
	}
	return Amount(rule.Amount{Value: f.Value, Unit: f.Unit})
}
