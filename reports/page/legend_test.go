package page

import (
	"strings"
	"testing"

	"kilovet/rules/exhibit"
)

func TestNotesCountOnAfterTheAlphabet(t *testing.T) {
	for n, want := range map[int]string{0: "a", 25: "z", 26: "aa", 27: "ab", 51: "az", 52: "ba", 701: "zz", 702: "aaa"} {
		if got := lettered(n); got != want {
			t.Errorf("%d reads %s, want %s", n, got, want)
		}
	}
}

// What a row is about stands in it, however often it comes again; other long texts do not.
func TestTheFirstColumnKeepsItsTexts(t *testing.T) {
	long := strings.Repeat("long ", 8)
	row := []exhibit.Cell{{Text: long}, {Text: long + "too"}}
	got, notes := withLegend(exhibit.Table{Columns: []exhibit.Column{{}, {}}, Rows: [][]exhibit.Cell{row, row}})
	if len(notes) != 1 || got.Rows[1][0].Text != long || got.Rows[1][1].Text != "note a" {
		t.Errorf("%v, %v", got.Rows, notes)
	}
}
