package text_test

import (
	"strings"
	"testing"

	"kilovet/reports/internal/sample"
	"kilovet/reports/text"
	"kilovet/rules/exhibit"
)

// Tables stand in columns, numbers to the right with their prefixes.
func TestTablesAndCurves(t *testing.T) {
	r := sample.Sound()
	r.Tables, r.Curves = sample.Tables(), sample.Curves()[:1]
	got := string(text.Render(r, text.Options{All: true}))
	for _, want := range []string{
		"\nTABLES\n\nWhere the power goes\n  part                 mean power     share  where it is lost\n  multiplier.diode.0          0 W       0 %  in the part\n  multiplier.diode.1     1.234 mW  0.3623 %  in the part\n",
		"  Means over a period.\n  by ripple.network\n",
		"CURVES, DRAWN BY --PDF AND --HTML\n\n- Ripple over one period of the drive. Voltage less its mean over time. Line\n  multiplier: from 0 s to 40 µs",
	} {
		if !strings.Contains(got, want) {
			t.Errorf("%q is missing in\n%s", want, got)
		}
	}
}

func TestATableThatDoesNotFitIsAList(t *testing.T) {
	r := sample.Sound()
	r.Tables = sample.Tables()[1:]
	if got := string(text.Render(r, text.Options{All: true, Width: 60})); !strings.Contains(got, "-12.35 kV; c: 1 nm;\n") {
		t.Error(got)
	}
}

// A column gives up width, and wraps, before a table is taken apart.
func TestAWideColumnIsWrapped(t *testing.T) {
	r := sample.Sound()
	v := 1.0
	r.Tables = []exhibit.Table{{Title: "Wide", Basis: "b", Columns: []exhibit.Column{{Head: "what"}, {Head: "voltage", Unit: "V"}},
		Rows: [][]exhibit.Cell{{exhibit.Words("a text that is rather longer than half a line of the terminal is wide"), {Value: &v}}}}}
	got := string(text.Render(r, text.Options{All: true, Width: 40}))
	if want := "  what                           voltage\n  a text that is rather longer       1 V\n  than half a line of the\n  terminal is wide\n"; !strings.Contains(got, want) {
		t.Errorf("%q is missing in\n%s", want, got)
	}
}

// paths is a table with a column of names and two of prose.
func paths(what string) exhibit.Table {
	v := 1.25
	return exhibit.Table{
		ID: "t", Chapter: exhibit.Beam, Title: "Ways", Basis: "none",
		Columns: []exhibit.Column{{Head: "path"}, {Head: "what"}, {Head: "voltage", Unit: "V"}, {Head: "what it does"}},
		Rows:    [][]exhibit.Cell{{exhibit.Words("mains/feed/transformer"), exhibit.Words(what), {Value: &v}, exhibit.Words("blurs")}},
	}
}

// A name breaks after strokes, points and hyphens where it must, and nothing else does.
func TestColumnsAreNotBrokenInsideWords(t *testing.T) {
	r := sample.Sound()
	r.Tables = []exhibit.Table{paths("common mode through the screened heater feed")}
	got := string(text.Render(r, text.Options{All: true, Width: 50}))
	if want := "  mains/feed/  common mode    1.25 V  blurs\n  transformer  through the\n"; !strings.Contains(got, want) {
		t.Errorf("%q is missing in\n%s", want, got)
	}
}

// Where a column would be a stack of single words each row is a list: short texts beside
// each other, numbers with their units, long ones on lines of their own.
func TestATableOfThinColumnsIsAList(t *testing.T) {
	r := sample.Sound()
	r.Tables = []exhibit.Table{paths("common mode through the screened heater feed and its capacitance to everything else")}
	got := string(text.Render(r, text.Options{All: true, Width: 60}))
	if want := "  - mains/feed/transformer\n      what: common mode through the screened heater feed and\n      its capacitance to everything else\n      voltage: 1.25 V; what it does: blurs\n"; !strings.Contains(got, want) {
		t.Errorf("%q is missing in\n%s", want, got)
	}
}

// No width breaks a word that would have room on a line of its own.
func TestNoWordIsBroken(t *testing.T) {
	r := sample.Failing()
	r.Inputs = nil // their digests are longer than a line
	r.Tables = append(sample.Tables()[:1], paths("common mode through the screened heater feed and its capacitance"))
	whole := map[string]bool{}
	for _, word := range words(text.Render(r, text.Options{All: true, Width: 5000})) {
		whole[word] = true
	}
	for _, width := range []int{100, 80, 60} {
		for _, word := range words(text.Render(r, text.Options{All: true, Width: width})) {
			if !whole[word] && len(word) < 50 {
				t.Errorf("%q stands in %d columns, not in wide ones", word, width)
			}
		}
	}
}

// words are the words of a text, names taken apart where they may be divided.
func words(text []byte) []string {
	return strings.FieldsFunc(string(text), func(c rune) bool { return strings.ContainsRune(" \n/.-:;,()[]…", c) })
}
