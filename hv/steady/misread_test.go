package steady_test

import (
	"math"
	"testing"

	"kilovet/hv/quantity"
	"kilovet/hv/steady"
)

// A divider that reads 1 % low is held at 20 kV by 20.2 kV, one that reads 1 % high by
// 19.8 kV.
func TestMisread(t *testing.T) {
	least, most, err := steady.Misread(20e3, 0.01)
	if err != nil || math.Abs(float64(least)-20e3/1.01) > 1e-6 || math.Abs(float64(most)-20e3/0.99) > 1e-6 {
		t.Errorf("%v to %v, %v", least, most, err)
	}
	for _, wrong := range []quantity.Fraction{1, 2, -0.1, quantity.Fraction(math.NaN())} {
		if _, _, err := steady.Misread(20e3, wrong); err == nil {
			t.Errorf("an error of %v is taken", wrong)
		}
	}
}
