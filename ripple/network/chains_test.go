package network

import (
	"math"
	"os"
	"testing"

	"kilovet/hv/chain"
	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
)

// TestDescribedChains solves the described chains over drives, emissions and corners
// of tolerance, from nothing and from a neighbour: both must reach the same state.
func TestDescribedChains(t *testing.T) {
	for _, name := range []string{"column", "positive", "faulty"} {
		data, err := os.ReadFile("../../testdata/chains/" + name + ".toml")
		if err != nil {
			t.Fatal(err)
		}
		c, faults := chain.Read(data)
		if len(faults) > 0 {
			t.Fatal(faults)
		}
		var last *Periodic
		failed := 0
		for i := range 60 {
			tolerance := float64(i%3 - 1)
			s := circuit.Setting{
				Peak:     c.Drive.Peak.V * quantity.Voltage(0.9+0.003*float64(i)),
				Emission: quantity.Current(60e-6 * float64(i%2)),
				Corner:   func(_ string, q quantity.Fraction) float64 { return 1 + tolerance*float64(q) },
			}
			built := circuit.Build(c, s)
			cold, err := Steady(built, Options{})
			if err != nil {
				failed++
				t.Logf("%s, drive %v, emission %v, corner %g, from nothing: %v", name, s.Peak, s.Emission, tolerance, err)
				continue
			}
			warm, err := Steady(built, Options{From: last})
			if err != nil {
				failed++
				t.Logf("%s, drive %v, emission %v, corner %g, from a neighbour: %v", name, s.Peak, s.Emission, tolerance, err)
				continue
			}
			n, _ := built.Node("multiplier")
			a, _ := cold.At(n)
			b, _ := warm.At(n)
			if math.Abs(float64(a.Mean/b.Mean-1)) > 1e-6 {
				t.Errorf("%s, drive %v: %v from nothing, %v from a neighbour", name, s.Peak, a.Mean, b.Mean)
			}
			last = cold
		}
		if failed > 0 {
			t.Errorf("%s: %d of 60 not reached", name, failed)
		}
	}
}
