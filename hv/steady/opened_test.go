package steady

import (
	"math"
	"testing"
)

// Two stages with a bleeder of two strings. Diodes 2 and 3 carry nothing while an
// intact ladder runs down, so it does not matter that they are open; with diode 1 or
// 4 open the coupling column keeps some. One string open doubles the time.
func TestDischargeWithOneOpen(t *testing.T) {
	described := supplyOf("negative", 2, 1e-9)
	described.Bleeders = append(described.Bleeders, bleeder("output", 2e9))
	described.Bleeders[0].Resistor.Strings = given("strings", 2)
	c := build(described)
	from := noLoad(c, 2, 1000)
	intact := must(Discharge(c, from, volts60)).Slowest()
	all := must(DischargeWithOneOpen(c, from, volts60))
	longer := map[string]float64{"bleeder.1": 2, "multiplier.diode.2": 1, "multiplier.diode.3": 1}
	for _, o := range all {
		factor, ends := longer[o.Element]
		if o.Slowest.Never == ends || o.MostLeft.Never == ends {
			t.Errorf("%+v", o)
		}
		if ends {
			near(t, o.Element, float64(o.Slowest.Time/intact.Time), factor, 1e-3)
		}
	}
	if len(all) != 5 {
		t.Errorf("%d parts opened", len(all))
	}
}

func TestPotentialsOfAnotherCircuitPanic(t *testing.T) {
	defer func() {
		if recover() == nil {
			t.Error("no panic")
		}
	}()
	c, _ := bledLadder("negative", 2, 1e9)
	Discharge(c, Voltages{0}, volts60)
}

// Diode 1 of two stages open, by hand in units of the peak: all goes as with it until
// coupling.1 would pass ground at stage.2 = 1; then the coupling column is not held,
// C/2 goes on beside the C/2 of the smoothing column, coupling.1 falls below ground
// and ends at −1/2.
func TestFirstDiodeOpen(t *testing.T) {
	c, from := bledLadder("positive", 2, 1e9)
	d := must(Discharge(c.Open("multiplier.diode.1"), from, volts60))
	near(t, "coupling.1", float64(must(d.Node("coupling.1")).Rest), -500, 1e-3)
	near(t, "output", float64(must(must(d.Node("output")).Lasts())),
		math.Log(4.0/3)/2+math.Log(3000.0/60), 1e-3)
}
