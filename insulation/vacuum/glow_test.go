package vacuum_test

import (
	"strings"
	"testing"

	"kilovet/insulation/vacuum"
)

// Observation of sustained glow discharges at high vacuum in a deflector test stand, NSCL
// (scan): 90 kV, 5 µA, 0.45 W. The characters of the scan read pA, with which the power
// would be a millionth: a trap.
func TestSustainedGlowPublished(t *testing.T) {
	g := vacuum.HiddenGlow()
	near(t, "power", float64(g.Power()), 0.45, 1e-9)
	g.Current *= 1e-6
	if float64(g.Power()) > 1e-6 {
		t.Errorf("picoamperes make %v W", g.Power())
	}
	var told string
	for _, c := range vacuum.PumpDownCautions() {
		if c.Subject == "hidden discharge" {
			told = c.Text
		}
	}
	for _, part := range []string{"90 kV", "5 µA", "450 mW"} {
		if !strings.Contains(told, part) {
			t.Errorf("%q does not say %s", told, part)
		}
	}
}
