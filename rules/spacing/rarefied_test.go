package spacing_test

import (
	"fmt"
	"strings"
	"testing"

	"kilovet/rules/rule"
)

// 20 kV over 20 mm called vacuum: free of gas to 0.001 Torr cm (6.7e-4 mbar), unassessed between
// there and the minimum of air, 0.567 Torr cm (0.38 mbar), and past it broken down, since air stands 327 V and
// little more: 365 · 1.5/ln(15 · 1.5/ln 101) = 346 V at 1 mbar. At 1 bar it would stand 57 kV, and no law
// of vacuum says so.
func TestWhatIsNoVacuumBreaksDown(t *testing.T) {
	for _, c := range []struct {
		pressure string
		verdict  rule.Verdict
	}{{"6e-4 mbar", rule.Meets}, {"1e-3 mbar", rule.Unassessed}, {"0.3 mbar", rule.Unassessed}, {"0.4 mbar", rule.Fails}, {"1 mbar", rule.Fails}, {"100 mbar", rule.Fails}, {"1013 mbar", rule.Unassessed}} {
		f := findings(t, site(0)+fmt.Sprintf("[[spacing]]\nname = \"g\"\nvoltage = \"20 kV\"\nmedium = \"vacuum\"\ninsulation = \"basic\"\nclearance = \"20 mm\"\ntemperature = \"20 degC\"\nfinish = \"polished\"\nconditioned = true\nstressed_area = \"80 mm2\"\nshape = { kind = \"plates\" }\npressure = %q\n", c.pressure))["spacing.breakdown | g"]
		if f.Verdict != c.verdict || c.verdict == rule.Fails && !strings.Contains(f.Remedy, "pump lower") {
			t.Errorf("%s: %s: %s; %s", c.pressure, f.Verdict, f.Because, f.Remedy)
		}
		if c.pressure == "1 mbar" && !strings.Contains(f.Because, "at most 345.6 V") {
			t.Errorf("1 mbar: %s", f.Because)
		}
	}
}
