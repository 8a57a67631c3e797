package insulation_test

import (
	"testing"

	"kilovet/insulation"
	"kilovet/insulation/gap"
)

// Sulphur hexafluoride of 20 mbar has a law of plates over half a metre that answers neither
// 112 kV nor 112 V: past its end it needs no less than at it.
func TestPastALawThatDoesNotBeginAtZero(t *testing.T) {
	g := bench()
	g.Medium, g.Gas, g.Pressure, g.Creepage = gap.InGas, gap.SulphurHexafluoride, 2e3, 0.1
	within := insulation.CreepageBounds(g, gap.Voltages{Peak: 56e3, LongTerm: 56e3}).Least
	past := insulation.CreepageBounds(g, gap.Voltages{Peak: 90e3, LongTerm: 90e3}).Least
	if within.Lack != nil || past.Lack != nil || past.Value < within.Value {
		t.Errorf("56 kV needs %v (%v), 90 kV %v (%v)", within.Value, within.Lack, past.Value, past.Lack)
	}
}
