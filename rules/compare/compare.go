// Package compare judges how two reviews differ: which inputs changed, which figures
// moved, which verdicts became better or worse. Its result is plain data.
package compare

import (
	"kilovet/hv/document"
	"kilovet/rules/figure"
	"kilovet/rules/rule"
)

// Side is one of the two reviews: what was described and what came of it.
type Side struct {
	Inputs   []document.Written
	Figures  []figure.Figure
	Findings []rule.Finding
	Verdict  rule.Verdict
}

// Difference is how the new side differs from the old.
type Difference struct {
	Was, Is  rule.Verdict // of the whole, old and new
	Inputs   []Input
	Figures  []Figure
	Findings []Finding
	// Worse reports whether the whole or any finding has a worse verdict than before,
	// one fails or is unassessed that was not there, or one that was met is gone and its
	// rule judges fewer than it did.
	Worse bool
}

// Input is a value of the description that changed; Old or New is empty where it is
// not given.
type Input struct {
	Key, At   string // without and with what tells tables of one kind apart
	Old, New  string // as they stand in the files
	Rewritten bool   // written differently, the same value
	Renamed   bool   // the name of a table that holds what it held
}

// Figure is a figure that moved; Old or New is nil where it is not listed.
type Figure struct {
	ID, Subject, State, What, Unit string
	Old, New                       *float64
	Change                         *float64 // relative to the magnitude of the old; nil where there is none
}

// Finding is a finding whose verdict changed; Old or New is nil where it is not there.
type Finding struct {
	Rule, Subject string
	Old, New      *rule.Finding
	Worse         bool
}

// Of compares two sides. A table that bears another name and holds the same is one
// changed name, and what is said of it is compared with what was said under the old one.
func Of(old, new Side) Difference {
	renamed := renames(old.Inputs, new.Inputs)
	old = old.under(renamed, leads(old.Inputs, new.Inputs, renamed))
	d := Difference{Was: old.Verdict, Is: new.Verdict,
		Inputs: inputs(old.Inputs, new.Inputs, renamed), Figures: figures(old.Figures, new.Figures), Findings: findings(old.Findings, new.Findings)}
	d.Worse = rule.Graver(d.Is, d.Was)
	for _, f := range d.Findings {
		d.Worse = d.Worse || f.Worse
	}
	return d
}

// Nothing reports whether the sides are the same.
func (d Difference) Nothing() bool {
	return len(d.Inputs)+len(d.Figures)+len(d.Findings) == 0 && d.Was == d.Is
}

// pair is what two lists hold under one name.
type pair[T any] struct{ old, new *T }

// pairs puts together what bears the same name in two lists: all of the new list in
// its order, then what only the old one has.
func pairs[T any, K comparable](old, new []T, name func(*T) K) []pair[T] {
	var all []pair[T]
	place := map[K]int{}
	for i := range new {
		place[name(&new[i])] = i
		all = append(all, pair[T]{nil, &new[i]})
	}
	for i := range old {
		if at, ok := place[name(&old[i])]; ok {
			all[at].old = &old[i]
		} else {
			all = append(all, pair[T]{&old[i], nil})
		}
	}
	return all
}

// first is the one that is there; of both, the new.
func (p pair[T]) first() *T {
	if p.new != nil {
		return p.new
	}
	return p.old
}
