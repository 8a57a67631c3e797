package network

import (
	"fmt"
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

// TestNeighboursOfTheColdColumn starts from a state at another drive, without emission.
func TestNeighboursOfTheColdColumn(t *testing.T) {
	data, err := os.ReadFile("../../testdata/chains/column.toml")
	if err != nil {
		t.Fatal(err)
	}
	c, _ := chain.Read(data)
	at := func(peak quantity.Voltage, from *Periodic) *Periodic {
		p, err := Steady(circuit.Build(c, circuit.Setting{Peak: peak}), Options{From: from})
		if err != nil {
			t.Errorf("drive %v from a neighbour (%v): %v", peak, from != nil, err)
		}
		return p
	}
	first := at(1850, nil)
	for i := range 60 {
		at(quantity.Voltage(1700+5*i), first)
	}
}

// TestPlainLaddersAreAllReached runs over capacitances, loads and diode resistances of
// plain ladders on a stiff source, light loads on large capacitors among them.
func TestPlainLaddersAreAllReached(t *testing.T) {
	failed, all := 0, 0
	for _, n := range []int{1, 3, 6} {
		for _, farads := range []string{"100 pF", "10 nF", "1 uF"} {
			for _, load := range []string{"0 A", "1 nA", "10 uA", "200 uA"} {
				for _, ohms := range []string{"0 ohm", "1 ohm", "60 ohm"} {
					text := fmt.Sprintf("format = 1\n[drive]\nwaveform = \"sine\"\nfrequency = \"50 kHz\"\npeak = \"2.5 kV\"\n"+
						"[multiplier]\npolarity = \"negative\"\nstages = %d\ncoupling_capacitor = { value = %q }\nsmoothing_capacitor = { value = %q }\n"+
						"diode = { rated_voltage = \"10 kV\", forward_drop = \"0 V\", resistance = %q }\n"+
						"[[load]]\nname = \"l\"\nat = \"output\"\ncurrent = %q\n", n, farads, farads, ohms, load)
					c, faults := chain.Read([]byte(text))
					if len(faults) > 0 {
						t.Fatal(faults)
					}
					all++
					p, err := Steady(circuit.Build(c, circuit.Setting{Peak: c.Drive.Peak.V}), Options{})
					if err != nil {
						failed++
						t.Logf("%d stages, %s, %s, %s: %v", n, farads, load, ohms, err)
						continue
					}
					top, _ := p.Circuit.Node("multiplier")
					if s, _ := p.At(top); s.Mean > 0 || -s.Mean > quantity.Voltage(5000*n)*1.000001 {
						t.Errorf("%d stages, %s, %s, %s: %v", n, farads, load, ohms, s.Mean)
					}
				}
			}
		}
	}
	if failed > 0 {
		t.Errorf("%d of %d not reached", failed, all)
	}
}
