package insulation_test

import (
	"strings"
	"testing"

	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/gap"
)

// Creepage never below clearance: at low voltages on good material the clearance for
// the impulse rules.
func TestCreepageIsNeverUnderTheClearance(t *testing.T) {
	g := bench()
	g.Material, g.PollutionDegree = "PTFE", 1
	v := gap.Voltages{Peak: 1000, LongTerm: 700, RatedImpulse: 6000}
	c, err := insulation.CreepageNeeded(g, v)
	if err != nil || !quantity.Equal(c.Value, 5.5e-3) || !strings.Contains(c.Because, "not under the clearance") {
		t.Errorf("creepage %v, %q (%v), want the 5.5 mm of the clearance", c.Value, c.Because, err)
	}
}

func TestIndexOutranksName(t *testing.T) {
	g := bench()
	g.Material, g.CTI = "PTFE", new(quantity.Voltage(150))
	c, err := insulation.CreepageNeeded(g, gap.Voltages{Peak: 10e3, LongTerm: 10e3})
	if err != nil || !quantity.Equal(c.Value, 100e-3) {
		t.Errorf("PTFE with a measured index of 150: %v (%v), want that of group IIIb", c.Value, err)
	}
}
