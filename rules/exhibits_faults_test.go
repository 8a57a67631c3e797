package rules_test

import (
	"math"
	"testing"
)

// TestAFaultLeavesNoRoundingAtTheOutput: with a diode open nothing feeds the column, and the
// output is nought, not the microvolts that are left of twenty thousand volts.
func TestAFaultLeavesNoRoundingAtTheOutput(t *testing.T) {
	x := tableOf(t, reviewedWhole(t, described(t, "column")), "faults.outcomes")
	most, open := 0.0, false
	for _, row := range x.Rows {
		if row[2].Value != nil {
			most = math.Max(most, math.Abs(*row[2].Value))
		}
	}
	for _, row := range x.Rows {
		v := row[2].Value
		if v != nil && *v != 0 && math.Abs(*v) < 1e-6*most {
			t.Errorf("%s: %g V of %g V", row[0].Text, *v, most)
		}
		open = open || row[0].Text == "multiplier.diode.10 open" && v != nil && *v == 0
	}
	if most < 20e3 || !open {
		t.Errorf("%g V at most, nought with a diode open: %t", most, open)
	}
}
