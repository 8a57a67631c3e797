package steady

import (
	"testing"

	"kilovet/hv/chain"
	"kilovet/hv/quantity"
)

// What comes back on the capacitors of a column stands one above the other up to a node;
// a resistor in series passes it on, a load does not; of two ways to ground the one that
// gives more counts. By addition.
func TestWhatComesBackAddsUpAColumn(t *testing.T) {
	described := supplyOf("negative", 3, 2e-9)
	described.Loads = []chain.Load{{Name: given("load", "load"), At: given("at", "supply"), Resistance: given("resistance", quantity.Resistance(1e9))}}
	described.Parts = []chain.Part{part("link", "resistor", "stage.3", "top", "1 Mohm"), part("shunt", "capacitor", "top", "ground", "500 pF")}
	c := build(described)
	back := map[string]quantity.Voltage{
		"multiplier.coupling_capacitor.1": -5, "multiplier.coupling_capacitor.2": -6, "multiplier.coupling_capacitor.3": -7,
		"multiplier.smoothing_capacitor.1": -10, "multiplier.smoothing_capacitor.2": -20, "multiplier.smoothing_capacitor.3": -30,
		"part.shunt": -55,
	}
	for name := range back {
		e := c.Element(name)
		if e == nil {
			t.Fatalf("there is no %s", name)
		}
		if from, _ := e.Ends(); from == "ground" || from == "drive" {
			back[name] = -back[name]
		}
	}
	got := Recovered(c, back)
	for node, want := range map[string]quantity.Voltage{
		"ground": 0, "coupling.1": 5, "coupling.2": 11, "coupling.3": 18, "stage.1": 10, "stage.2": 30, "stage.3": 60, "top": 60,
	} {
		n, there := c.Node(node)
		if !there {
			t.Fatalf("there is no node %s", node)
		}
		near(t, node, float64(got[n]), float64(want), 1e-9)
	}
}
