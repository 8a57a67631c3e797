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

// A sphere of 10 mm in hydrogen has a lower bound of its breakdown that no distance takes to
// twice 6 kV; one takes it to 7.5 kV, of which 6 kV are 80 %. It is named, is enough, and a
// tenth less is not known to be.
func TestADistanceThatIsMarginalStillIsNamedWhereNoneIsComfortable(t *testing.T) {
	at := func(clearance float64) rule.Finding {
		return findings(t, site(0)+fmt.Sprintf("[[spacing]]\nname = \"g\"\nvoltage = \"6 kV\"\nmedium = \"gas\"\ngas = \"hydrogen\"\npressure = \"1 bar\"\ntemperature = \"20 degC\"\ninsulation = \"functional\"\nclearance = \"%g mm\"\nshape = { kind = \"sphere-plane\", radius = \"10 mm\" }\n", clearance))["spacing.breakdown | g"]
	}
	f := at(0.3)
	var need float64
	if n, err := fmt.Sscanf(f.Remedy, "make spacing.clearance %g mm or more", &need); n != 1 || err != nil || f.Verdict != rule.Fails || !strings.Contains(f.Remedy, "marginal still") {
		t.Fatalf("%s: %s", f.Verdict, f.Remedy)
	}
	if f = at(need); f.Verdict != rule.Marginal {
		t.Errorf("%g mm: %s: %s", need, f.Verdict, f.Because)
	}
	if f = at(0.9 * need); f.Verdict != rule.Unassessed {
		t.Errorf("%g mm: %s: %s", 0.9*need, f.Verdict, f.Because)
	}
}

// More voltage never makes a surface in vacuum look better: alumina of 10 kV at 10 mm by the root
// of the length asks for 122.5 mm at 35 kV and for more than the 300 mm that are known past 54.8 kV,
// so 299 mm are too little there and 310 mm are left open.
func TestASurfacePastTheLongestKnownFailsWhereItIsShorter(t *testing.T) {
	at := func(kilovolts, creepage float64) rule.Finding {
		return findings(t, site(0)+fmt.Sprintf("[[spacing]]\nname = \"g\"\nvoltage = \"%g kV\"\nmedium = \"vacuum\"\ninsulation = \"basic\"\nclearance = \"14 mm\"\ncreepage = \"%g mm\"\nmaterial = \"alumina\"\njunction_angle = \"60 deg\"\nshape = { kind = \"plates\" }\n", kilovolts, creepage))["spacing.creepage | g"]
	}
	for _, c := range []struct {
		kilovolts, creepage float64
		verdict             rule.Verdict
	}{{35, 120, rule.Fails}, {35, 140, rule.Marginal}, {60, 14.7, rule.Fails}, {105, 299, rule.Fails}, {60, 310, rule.Unassessed}, {105, 310, rule.Unassessed}} {
		if f := at(c.kilovolts, c.creepage); f.Verdict != c.verdict {
			t.Errorf("%g kV along %g mm: %s: %s", c.kilovolts, c.creepage, f.Verdict, f.Because)
		}
	}
}
