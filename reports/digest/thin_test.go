package digest_test

import (
	"fmt"
	"strings"
	"testing"

	"kilovet/reports/digest"
	"kilovet/rules/exhibit"
)

// Of many lines so few are kept as can be told apart, the first and the last among them,
// and that is said; of few all are kept.
func TestThinned(t *testing.T) {
	for n := range 200 {
		c := exhibit.Curve{X: exhibit.Axis{Unit: "s"}}
		for i := range n {
			c.Lines = append(c.Lines, exhibit.Line{Name: fmt.Sprint("line ", i)})
		}
		got := digest.Thinned(c)
		switch {
		case n <= 8:
			if len(got.Lines) != n || got.Note != "" {
				t.Errorf("%d lines became %d, %q", n, len(got.Lines), got.Note)
			}
		case len(got.Lines) > 4 || len(got.Lines) < 3 || got.Lines[0].Name != "line 0" || got.Lines[len(got.Lines)-1].Name != fmt.Sprint("line ", n-1):
			t.Errorf("%d lines became %d: %v", n, len(got.Lines), got.Lines)
		case !strings.Contains(got.Note, fmt.Sprintf("of %d lines every ", n)):
			t.Errorf("%d lines: %q", n, got.Note)
		}
		if len(c.Lines) != n {
			t.Fatal("the curve itself was changed")
		}
	}
	if got := digest.Thinned(exhibit.Curve{X: exhibit.Axis{Unit: "m"}, Lines: make([]exhibit.Line, 120)}); len(got.Lines) != 120 || got.Note != "" {
		t.Errorf("of outlines %d are left", len(got.Lines))
	}
	if note := digest.Thinned(exhibit.Curve{X: exhibit.Axis{Unit: "s"}, Note: "Working state", Lines: make([]exhibit.Line, 120)}).Note; note != "Working state; of 120 lines every 41st is drawn, and the last" {
		t.Error(note)
	}
}
