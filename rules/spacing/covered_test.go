package spacing_test

import (
	"fmt"
	"strings"
	"testing"

	"kilovet/rules/rule"
)

// A coated board in pollution degree 3, 5 kV, FR-4: IEC 60664-1 Table F.5 asks for 20 mm at
// degree 1, 80 mm at degree 3, group III. That the coating brings degree 1 (IEC 60664-3) is from
// memory and taken for granted, so between the two nothing is met; a bare board fails there,
// and from 88 mm on, a tenth in hand, nothing is taken.
func TestCoatingIsTakenForGranted(t *testing.T) {
	at := func(board string, creepage, degree float64) rule.Finding {
		text := fmt.Sprintf("format = 1\n[site]\naltitude = \"0 m\"\nair_temperature = \"20 degC\"\npollution_degree = %g\n[[spacing]]\nname = \"g\"\nvoltage = \"5 kV\"\nmedium = \"printed board\"\ninsulation = \"basic\"\nmaterial = \"FR-4\"\nclearance = \"20 mm\"\nboard = %q\ncreepage = \"%g mm\"\n", degree, board, creepage)
		return findings(t, text)["spacing.creepage | g"]
	}
	for _, board := range []string{"internal", "polymer coated", "conformal coated", "termination coated"} {
		for creepage, want := range map[float64]rule.Verdict{19: rule.Fails, 21: rule.Marginal, 87: rule.Marginal, 89: rule.Meets} {
			f := at(board, creepage, 3)
			taken := strings.Contains(strings.Join(f.Assumptions, " "), "at degree 3 80 mm would be needed")
			if f.Verdict != want || taken == (creepage == 89) {
				t.Errorf("%s, %g mm: %s %v", board, creepage, f.Verdict, f.Assumptions)
			}
		}
		if f := at(board, 23, 1); f.Verdict != rule.Meets {
			t.Errorf("%s in degree 1: %s %v", board, f.Verdict, f.Assumptions)
		}
		if f := at(board, 23, 4); f.Verdict != rule.Marginal || len(f.Assumptions) != 1 {
			t.Errorf("%s in degree 4: %s %v", board, f.Verdict, f.Assumptions)
		}
	}
	if f := at("external uncoated", 79, 3); f.Verdict != rule.Fails {
		t.Errorf("bare: %s", f.Verdict)
	}
}
