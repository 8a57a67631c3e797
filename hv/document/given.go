// Package document reads a TOML description into tagged structs. It is the only
// importer of the TOML library: positions, faults and nearest keys come from here.
package document

import (
	"reflect"

	"kilovet/hv/lack"
)

// Place is where something stands in a description. Key is known even where the
// thing was not given; Line and Column count from one and are zero then.
type Place struct {
	Key          string // without indices: "spacing.creepage"
	Line, Column int
}

// Here reports the place itself; parts embed Place, so that findings can point at them.
func (p Place) Here() Place { return p }

// Given is a leaf of a description: its value and whether and where it was given.
type Given[T any] struct {
	V T // the zero value where not given
	Place
}

// Set reports whether the description holds the value.
func (g Given[T]) Set() bool { return g.Line > 0 }

// Or is the value, or the default where none was given.
func (g Given[T]) Or(d T) T {
	if g.Set() {
		return g.V
	}
	return d
}

// Need is the value, or a lack that names the key.
func (g Given[T]) Need() (T, error) {
	if g.Set() {
		return g.V, nil
	}
	return g.V, lack.Key(g.Key)
}

// slot opens the leaf to the reader: where the value goes and where its place goes.
func (g *Given[T]) slot() (reflect.Value, *Place) { return reflect.ValueOf(&g.V).Elem(), &g.Place }

// Table is embedded in every struct that a table of the description fills; its
// place is that of the table's header or opening brace.
type Table struct{ Place }

// Leaf is any Given.
type Leaf interface {
	Set() bool
	Here() Place
}

// Need is nil where all leaves were given, else a lack that names those that were not.
func Need(leaves ...Leaf) error {
	var keys []string
	for _, l := range leaves {
		if !l.Set() {
			keys = append(keys, l.Here().Key)
		}
	}
	if keys == nil {
		return nil
	}
	return lack.Key(keys...)
}
