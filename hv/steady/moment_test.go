package steady

import (
	"math"
	"testing"

	"kilovet/hv/quantity"
)

// 10 nF through 1 Gohm fall by e in 10 s; what is left in the end is next to nothing.
func TestAtTime(t *testing.T) {
	net := storeWith("10 nF", 1e9)
	d := must(Discharge(net, standing(net, 1000), volts60))
	for _, folds := range []float64{0, 0.5, 1, 2.5} {
		near(t, "after some time constants", float64(must(d.AtTime("output", quantity.Time(10*folds)))), 1000*math.Exp(-folds), 3e-3)
	}
	if end := must(d.AtTime("output", InTheEnd)); end > 1 {
		t.Errorf("%v stays", end)
	}
	if _, err := d.AtTime("nowhere", 0); err == nil {
		t.Error("there is no such node")
	}
}
