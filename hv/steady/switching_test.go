package steady

import (
	"fmt"
	"math"
	"testing"

	"kilovet/hv/quantity"
)

// A node that runs down with RC = 1 s meets one that stays at U, where the diode between them
// begins to conduct: a step ends there, τ ln(U0/U) after the start, and next to none is refused
// for it, each of which asks for the factors once more.
func TestStepsEndWhereADiodeSwitches(t *testing.T) {
	for held := quantity.Voltage(100); held < 1000; held += 100 {
		c := net(part("a", "capacitor", "x", "ground", "1 nF"), part("r", "resistor", "x", "ground", "1 Gohm"),
			part("b", "capacitor", "y", "ground", "10 uF"), diode("d", "y", "x", 0, 0))
		v := make(Voltages, c.Nodes())
		x, _ := c.Node("x")
		y, _ := c.Node("y")
		v[x], v[y] = 1000, held
		d := must(Discharge(c, v, volts60))
		want, nearest := math.Log(float64(1000/held)), math.Inf(1)
		for _, at := range d.Times {
			if math.Abs(float64(at)-want) < math.Abs(nearest-want) {
				nearest = float64(at)
			}
		}
		near(t, fmt.Sprint("nearest end of a step to where ", float64(held), " V is met"), nearest, want, 2e-3)
		if w := d.Work; w.Factorisations > w.Steps+5 {
			t.Errorf("%g V: %+v", float64(held), w)
		}
	}
}
