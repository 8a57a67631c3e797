package steady

import (
	"testing"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// bridge is the unbalanced bridge of five resistors 1, 2, 3, 4 and 5 ohm.
func bridge() *circuit.Circuit {
	c := supplyOf("positive", 1, 1e-9)
	return build(c).
		Bridge("one", "coupling.1", "stage.1", 1).
		Bridge("two", "coupling.1", "drive", 2).
		Bridge("three", "stage.1", "ground", 3).
		Bridge("four", "drive", "ground", 4).
		Bridge("five", "stage.1", "drive", 5)
}

// The bridge by hand: with 1 V at coupling.1 the node equations of stage.1 and drive,
// (1 + 1/3 + 1/5) x − y/5 = 1 and (1/2 + 1/4 + 1/5) y − x/5 = 1/2, have the solution
// that Cramer's rule gives; the current (1 − x) + (1 − y)/2 gives the resistance.
func TestOhmsOfABridge(t *testing.T) {
	// Cramer: D = (23/15)(19/20) − 1/25, x = (19/20 + 1/10)/D, y = (23/30 + 1/5)/D.
	d := 23.0/15*19/20 - 1.0/25
	x, y := (19.0/20+1.0/10)/d, (23.0/30+1.0/5)/d
	near(t, "bridge", float64(must(Ohms(bridge(), "coupling.1", "ground"))), 1/((1-x)+(1-y)/2), 1e-12)
	near(t, "either way round", float64(must(Ohms(bridge(), "ground", "coupling.1"))), 1/((1-x)+(1-y)/2), 1e-12)
}

// Between two nodes off ground the rest of the network hangs in parallel: 5 ohm with
// (1 + 2) and (3 + 4) ohm is 1/(1/5 + 1/3 + 1/7).
func TestOhmsOffGround(t *testing.T) {
	near(t, "five", float64(must(Ohms(bridge(), "stage.1", "drive"))), 1/(1.0/5+1.0/3+1.0/7), 1e-12)
}

func TestOhmsOfNothing(t *testing.T) {
	c := build(supplyOf("positive", 2, 1e-9))
	if _, err := Ohms(c, "stage.1", "stage.2"); lack.Of(err) == nil {
		t.Errorf("nothing joins them: %v", err)
	}
	if _, err := Ohms(c, "stage.1", "nowhere"); lack.Of(err) == nil {
		t.Errorf("no such node: %v", err)
	}
	if r, err := Ohms(c, "multiplier", "stage.2"); err != nil || r != quantity.Resistance(0) {
		t.Errorf("one node: %v, %v", r, err)
	}
}
