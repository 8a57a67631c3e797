package rules_test

import (
	"fmt"
	"math"
	"slices"
	"strings"
	"testing"

	"kilovet/rules/rule"
)

const ballInOil = `format = 1
[site]
altitude = "0 m"
air_temperature = "20 degC"
pollution_degree = 2
[[field]]
name = "ball"
medium = %q
%s
[[field.electrodes]]
name = "ball"
voltage = "%s"
profile = [{ from = ["0 mm", "-10 mm"] }, { to = ["0 mm", "10 mm"], centre = ["0 mm", "0 mm"], turn = "left" }]
[[field.boundary]]
kind = "earth"
profile = [{ from = ["0 mm", "-%[4]s"] }, { to = ["0 mm", "%[4]s"], centre = ["0 mm", "0 mm"], turn = "left" }]
`

// A ball of 10 mm within an earthed one of R has the peak field V R/(r (R − r)), exact. In
// oil it may be 2 kV/mm in service, and breakdown is expected at 10 kV/mm, over 2.5 to 12 mm
// (general tables and practice, see insulation/oil).
func TestAComputedFieldInOilIsJudged(t *testing.T) {
	for _, c := range []struct {
		volts, radius      string
		strength, breaking rule.Verdict
		breakdown          float64 // 80 % of the estimate
	}{
		{"8 kV", "20 mm", rule.Marginal, rule.Marginal, 0.8 * 50e3},
		{"12 kV", "20 mm", rule.Fails, rule.Marginal, 0.8 * 50e3},
		{"45 kV", "20 mm", rule.Fails, rule.Fails, 0.8 * 50e3},
		{"8 kV", "40 mm", rule.Marginal, rule.Unassessed, 0},
		{"8 kV", "11 mm", rule.Fails, rule.Unassessed, 0},
	} {
		seen := 0
		for _, f := range reviewed(t, fmt.Appendf(nil, ballInOil, "oil", "", c.volts, c.radius)).Findings {
			switch {
			case f.Subject != "ball/ball":
			case f.Rule == "field.strength":
				if seen++; f.Verdict != c.strength {
					t.Errorf("%s, %s: strength %s: %s", c.volts, c.radius, f.Verdict, f.Because)
				}
			case f.Rule == "field.breakdown":
				if seen++; f.Verdict != c.breaking {
					t.Errorf("%s, %s: breakdown %s: %s", c.volts, c.radius, f.Verdict, f.Because)
				}
				if c.breakdown > 0 && math.Abs(f.Needed.Value/c.breakdown-1) > 1e-3 {
					t.Errorf("%s, %s: limit %g V, by hand %g V", c.volts, c.radius, f.Needed.Value, c.breakdown)
				}
			}
		}
		if seen != 2 {
			t.Errorf("%s, %s: %d findings", c.volts, c.radius, seen)
		}
	}
}

// A described field in another gas asks for its own pressure.
func TestAFieldAsksForItsOwnPressure(t *testing.T) {
	seen := false
	for _, f := range reviewed(t, fmt.Appendf(nil, ballInOil, "gas", `gas = "nitrogen"`, "8 kV", "20 mm")).Findings {
		if f.Rule != "field.strength" {
			continue
		}
		if seen = true; f.Verdict != rule.Unassessed || !slices.Contains(f.Missing, "field.pressure") || strings.Contains(f.Because, "spacing.pressure") {
			t.Errorf("%s, missing %v: %s", f.Verdict, f.Missing, f.Because)
		}
	}
	if !seen {
		t.Error("its strength is not judged")
	}
}
