package text_test

import (
	"strings"
	"testing"

	"kilovet/reports/internal/sample"
	"kilovet/reports/text"
	"kilovet/rules/exhibit"
)

// Tables stand in columns, numbers to the right with their prefixes; where the columns
// do not fit, each cell has its line.
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
	if got := string(text.Render(r, text.Options{All: true, Width: 60})); !strings.Contains(got, "  - c: 1 nm\n") {
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

// A narrow column breaks at spaces and after strokes, points and hyphens; the wide ones
// give way first.
func TestColumnsAreNotBrokenInsideWords(t *testing.T) {
	r := sample.Sound()
	v := 1.25
	r.Tables = []exhibit.Table{{
		ID: "t", Chapter: exhibit.Beam, Title: "Ways", Basis: "none",
		Columns: []exhibit.Column{{Head: "path"}, {Head: "what"}, {Head: "voltage", Unit: "V"}, {Head: "what it does"}},
		Rows: [][]exhibit.Cell{{exhibit.Words("mains/feed/transformer"), exhibit.Words("common mode through the screened heater feed and its capacitance to everything else"),
			{Value: &v}, exhibit.Words("blurs; bands in a dwell where the regulation of temperature is slow")}},
	}}
	got := string(text.Render(r, text.Options{All: true, Width: 60}))
	for _, want := range []string{"transformer", "capacitance", "everything", "regulation", "temperature", "1.25 V"} {
		if !strings.Contains(got, want) {
			t.Errorf("%q is broken in\n%s", want, got)
		}
	}
	if !strings.Contains(got, "mains/") || strings.Contains(got, "mains/feed/t") {
		t.Errorf("the path is not broken at its strokes in\n%s", got)
	}
}
