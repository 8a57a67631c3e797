package network

import (
	"math/cmplx"
	"testing"

	"kilovet/hv/circuit"
)

// All harmonics at once are those taken one by one.
func TestHarmonicsAtOnce(t *testing.T) {
	r := references(t)[0]
	p := steady(t, build(t, r.describe()))
	n := node(t, p.Circuit, "multiplier")
	all, err := p.Harmonics(n, circuit.Ground, 48)
	if err != nil {
		t.Fatal(err)
	}
	most := 0.0
	for k, got := range all {
		one, err := p.Harmonic(n, circuit.Ground, k+1)
		if err != nil {
			t.Fatal(err)
		}
		most = max(most, cmplx.Abs(one))
		if cmplx.Abs(got-one) > 1e-7*most {
			t.Errorf("order %d: %v, alone %v", k+1, got, one)
		}
	}
}
