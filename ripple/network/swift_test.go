package network

import (
	"math"
	"testing"
)

// TestSwift compares states that are solved swiftly with those solved to 1e-9: a part in a
// million of the voltages, a thousandth of the diodes' means, and fewer periods.
func TestSwift(t *testing.T) {
	for name, text := range examples() {
		c := build(t, text)
		exact := steady(t, c)
		swift, err := Steady(c, Options{Swift: true})
		if err != nil {
			t.Fatal(name, err)
		}
		if swift.Work.Periods >= exact.Work.Periods {
			t.Errorf("%s: %d periods, %d without haste", name, swift.Work.Periods, exact.Work.Periods)
		}
		top, _ := c.Node("multiplier")
		a, _ := exact.At(top)
		b, _ := swift.At(top)
		if math.Abs(float64(b.Mean/a.Mean-1)) > 1e-6 {
			t.Errorf("%s: %v, exact %v", name, b.Mean, a.Mean)
		}
		const diode = "multiplier.diode.1"
		i, j := exact.Diode(diode).Mean, swift.Diode(diode).Mean
		if !(math.Abs(float64(j/i-1)) <= 1e-3) {
			t.Errorf("%s: %v through %s, exact %v", name, j, diode, i)
		}
	}
}
