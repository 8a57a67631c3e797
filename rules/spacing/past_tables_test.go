package spacing_test

import (
	"fmt"
	"strings"
	"testing"

	"kilovet/rules/rule"
)

// Past the last rows of the tables (F.8 case A 50 kV, 100 mm; F.5 pollution degree 2, group
// I 63 kV, 320 mm; IEC 60664-1) a distance under that of the last row is too little, a
// longer one is unassessed; reinforced insulation gets there at 31.25 kV (160 %, memory).
func TestPastTheLastRowOfTheTables(t *testing.T) {
	at := func(kilovolts, clearance, creepage float64, class string) (across, along rule.Finding) {
		all := findings(t, site(0)+fmt.Sprintf("[[spacing]]\nname = \"g\"\nvoltage = \"%g kV\"\nmedium = \"air\"\nclearance = \"%g mm\"\ncreepage = \"%g mm\"\nmaterial = \"PTFE\"\ninsulation = %q\n", kilovolts, clearance, creepage, class))
		return all["spacing.clearance | g"], all["spacing.creepage | g"]
	}
	for _, c := range []struct {
		kilovolts, clearance, creepage float64
		class                          string
		across, along                  rule.Verdict
	}{
		{70, 99, 319, "basic", rule.Fails, rule.Fails},
		{70, 101, 321, "basic", rule.Unassessed, rule.Unassessed},
		{40, 99, 500, "reinforced", rule.Fails, rule.Marginal},
		{40, 101, 500, "reinforced", rule.Unassessed, rule.Marginal},
	} {
		across, along := at(c.kilovolts, c.clearance, c.creepage, c.class)
		if across.Verdict != c.across || along.Verdict != c.along {
			t.Errorf("%+v: %s (%s), %s (%s)", c, across.Verdict, across.Because, along.Verdict, along.Because)
		}
		if c.across == rule.Fails && (across.Needed.Value < 0.0999 || across.Needed.Value > 0.1001) {
			t.Errorf("%+v: needed %v", c, across.Needed)
		}
		if !strings.Contains(across.Because, "less than 100 mm is too little") || across.Remedy == "" {
			t.Errorf("%+v: %s; %s", c, across.Because, across.Remedy)
		}
	}
}
