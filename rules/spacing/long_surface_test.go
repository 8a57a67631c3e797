package spacing_test

import (
	"fmt"
	"strings"
	"testing"

	"kilovet/rules/rule"
)

// A surface of alumina in vacuum, 10 kV at 10 mm and growing as the root: at 30 kV its creepage
// asks for 90 mm, and 80 % of its flashover for 37.5 kV, 140.6 mm, half of it for 60 kV and 360 mm,
// past the 300 mm that are known. Both findings say the length that serves both; with it
// neither fails.
func TestTheLengthOfASurfaceInVacuumServesBothRules(t *testing.T) {
	at := func(kilovolts float64, length string) map[string]rule.Finding {
		return findings(t, site(0)+fmt.Sprintf("[[feedthrough]]\nname = \"gun\"\nvoltage = \"%g kV\"\npin = { radius = \"10 mm\" }\nhole = { radius = \"30 mm\" }\nsleeve = { material = \"alumina\", inner_radius = \"10 mm\", outer_radius = \"30 mm\" }\nvacuum_side = { length = %q }\n", kilovolts, length))
	}
	for _, c := range []struct {
		kilovolts    float64
		length, asks string
		marginal     bool
	}{{30, "20 mm", "141 mm or more (121 mm more), marginal still", true}, {10, "5 mm", "40 mm or more (35 mm more)", false}} {
		all := at(c.kilovolts, c.length)
		for _, id := range []string{"spacing.creepage", "spacing.breakdown"} {
			f := all[id+" | gun: vacuum side"]
			if f.Verdict != rule.Fails || !strings.Contains(f.Remedy, "vacuum_side.length "+c.asks) || strings.Contains(f.Remedy, "marginal") != c.marginal {
				t.Errorf("%s at %g kV: %s: %s", id, c.kilovolts, f.Verdict, f.Remedy)
			}
		}
		if f := all["feedthrough.weakest | gun"]; c.kilovolts == 10 && !strings.Contains(f.Remedy, c.asks) {
			t.Errorf("weakest at %g kV: %s", c.kilovolts, f.Remedy)
		}
		wide, _, _ := strings.Cut(c.asks, " or")
		for _, id := range []string{"spacing.creepage", "spacing.breakdown"} {
			if f := at(c.kilovolts, wide)[id+" | gun: vacuum side"]; f.Verdict != rule.Marginal {
				t.Errorf("%s at %g kV, %s: %s: %s", id, c.kilovolts, wide, f.Verdict, f.Because)
			}
		}
	}
}
