package spacing_test

import (
	"fmt"
	"testing"

	"kilovet/rules/rule"
)

// The three exceptions to "more is better", through description and verdict. First, coaxial
// in a fixed outer conductor: past R/r = e a thinner inner one widens the gap and lowers
// what it stands; before it, it raises it.
func TestThinnerThanTheBestInnerConductorIsWorse(t *testing.T) {
	const outer = 60.0
	at := func(inner, kilovolts float64) rule.Finding {
		return findings(t, site(100)+fmt.Sprintf("[[spacing]]\nname = \"g\"\nvoltage = \"%g kV\"\nmedium = \"oil\"\nclearance = %s\nshape = { kind = \"coaxial\", inner_radius = %s, outer_radius = %s }\noil_test = \"70 kV\"\n", kilovolts, mm(outer-inner), mm(inner), mm(outer)))["spacing.breakdown | g"]
	}
	// Oil ends at 12 mm of gap; in air the whole range is open.
	air := func(inner, kilovolts float64) rule.Finding {
		return findings(t, site(100)+fmt.Sprintf("[[spacing]]\nname = \"g\"\nvoltage = \"%g kV\"\nmedium = \"air\"\nclearance = %s\nshape = { kind = \"coaxial\", inner_radius = %s, outer_radius = %s }\n", kilovolts, mm(outer-inner), mm(inner), mm(outer)))["spacing.corona | g"]
	}
	if a, b := at(50, 20), at(55, 20); !(a.Needed.Value > b.Needed.Value) {
		t.Errorf("before the best ratio: %g V at 50 mm, %g V at 55 mm", a.Needed.Value, b.Needed.Value)
	}
	best, thin, thinner := air(outer/4, 55), air(3, 55), air(1, 55)
	if !(best.Needed.Value > thin.Needed.Value && thin.Needed.Value > thinner.Needed.Value) || !rule.Graver(thinner.Verdict, best.Verdict) {
		t.Errorf("15 mm %g V (%s), 3 mm %g V, 1 mm %g V (%s)", best.Needed.Value, best.Verdict, thin.Needed.Value, thinner.Needed.Value, thinner.Verdict)
	}
}

// Second, the area effect in vacuum: more electrode under stress stands less, as area^-0.24
// (exponent from the abstract of a study of copper and stainless steel), here from 1 cm² on.
func TestMoreStressedAreaIsWorse(t *testing.T) {
	at := func(area string) rule.Finding {
		return findings(t, site(100)+fmt.Sprintf("[[spacing]]\nname = \"g\"\nvoltage = \"70 kV\"\nmedium = \"vacuum\"\nclearance = \"10 mm\"\nshape = { kind = \"plates\" }\nfinish = \"polished\"\nconditioned = true\nstressed_area = %q\n", area))["spacing.breakdown | g"]
	}
	small, large := at("100 mm2"), at("10000 mm2")
	if !(large.Needed.Value < 0.6*small.Needed.Value) || !rule.Graver(large.Verdict, small.Verdict) {
		t.Errorf("1 cm² %g V (%s), 100 cm² %g V (%s)", small.Needed.Value, small.Verdict, large.Needed.Value, large.Verdict)
	}
}
