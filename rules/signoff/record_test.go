package signoff_test

import (
	"strings"
	"testing"

	"kilovet/rules/rule"
	"kilovet/rules/signoff"
)

// What concerns life is answered by a value with its unit, a day and an instrument, and by
// nothing less; a value of another quantity answers nothing.
func TestWhatAMeasurementMustRecord(t *testing.T) {
	for _, c := range []struct{ rule, measurement, more, against string }{
		{"xray.ports", "0.2 uSv/h at 0.1 m from the port at 23 kV, survey meter SM-2, 2025-03-04", "", ""},
		{"xray.ports", "0.2 uSv/h at 0.1 m", `instrument = "survey meter SM-2"` + "\n" + `date = "2025-03-04"`, ""},
		{"spacing.described", "110 mm; 40 kV DC for 10 min, 2025-03-01, tester T-4", "", ""},
		{"spacing.described", "stood 40 kV with tester T-4 on 2025-03-01", "", ""},
		{"rod.there", "0.1 ohm, 2025-03-01, ohmmeter", "", ""},
		{"xray.ports", "0", "", "a value with its unit"},
		{"xray.ports", "nothing was seen", "", "a value with its unit"},
		{"xray.ports", "0 uSv/h, survey meter SM-2, 2025-03-04", "", "above zero"},
		{"xray.ports", "23 kV, survey meter SM-2, 2025-03-04", "", "a dose rate in uSv/h"},
		{"spacing.described", "it held for 10 min, tester T-4, 2025-03-01", "", "a voltage or a length"},
		{"spacing.described", "110 mm, tester T-4", "", "the day"},
		{"spacing.described", "110 mm, tester T-4, 2025-13-41", "", "the day"},
		{"spacing.described", "110 mm, 2025-03-01", "", "with what it was measured"},
	} {
		d := decide(t, whole+accepted(c.rule, "thing", "measured", "record = \"MR-1\"\nmeasurement = \""+c.measurement+"\"\n"+c.more+"\n"), rule.Concerns, finding(c.rule, rule.Life, rule.Unassessed))
		why := pointsAgainst(d)
		if d.Issued() != (c.against == "") || !strings.Contains(why, c.against) {
			t.Errorf("%s, %q: issued %t, %q", c.rule, c.measurement, d.Issued(), why)
		}
	}
}

func pointsAgainst(d signoff.Decision) string {
	var all []string
	for _, p := range d.Points {
		all = append(all, p.Against)
	}
	return strings.Join(all, "; ")
}
