package page

import (
	"testing"

	"kilovet/rules/exhibit"
)

func amount(v float64) exhibit.Cell { return exhibit.Cell{Value: &v} }

// Half a line is enough where no name is broken for it; words may be.
func TestHalfALineBreaksNoNames(t *testing.T) {
	for name, want := range map[string]bool{
		"multiplier.diode.3":               true,
		"multiplier.coupling_capacitor.20": false,
		"columns to the wall":              true,
	} {
		table := exhibit.Table{Columns: []exhibit.Column{{Head: "part"}, {Head: "mean", Unit: "V"}, {Head: "peak", Unit: "V"}, {Head: "ripple", Unit: "V"}}}
		table.Rows = [][]exhibit.Cell{{{Text: name}, amount(1234), amount(1234), amount(1234)}}
		if _, narrow := columns(table); narrow != want {
			t.Errorf("%s: narrow %t", name, narrow)
		}
	}
}

// Numbers stand at the right, with a short word among them; a sentence does not.
func TestAShortWordLeavesNumbersAtTheRight(t *testing.T) {
	for text, want := range map[string]bool{"": true, "none": true, "as long as touched": false} {
		table := exhibit.Table{Columns: []exhibit.Column{{Head: "width", Unit: "eV"}}, Rows: [][]exhibit.Cell{{amount(1)}, {{Text: text}}}}
		if all, _ := columns(table); all[0].Right != want {
			t.Errorf("%q: %t", text, all[0].Right)
		}
	}
}
