package rules_test

import (
	"math"
	"testing"

	"kilovet/hv/chain"
	"kilovet/hv/circuit"
	"kilovet/ripple/network"
	"kilovet/rules/evidence"
)

// TestDecayAgainstTheNetwork follows the decay of the column a second time, with the
// network's own integration from the state in which it was switched off: only what is
// permanent is left, diodes conduct without drop and do not leak.
func TestDecayAgainstTheNetwork(t *testing.T) {
	c, _ := chain.Read(described(t, "column"))
	e := evidence.New(c).In(evidence.Lost)
	p, err := e.Network()
	if err != nil {
		t.Fatal(err)
	}
	off := p.Circuit.Each(func(el *circuit.Element) bool {
		el.Wave.Amplitude = 0
		el.Rectifier.Drop, el.Rectifier.Leakage = 0, 0
		return el.Permanent || el.Kind != circuit.Resistor && el.Kind != circuit.Sink
	})
	names := []string{"output", "stage.1", "stage.2", "stage.6", "coupling.6"}
	o := network.DecayOptions{Below: 60}
	for _, name := range names {
		n, _ := off.Node(name)
		o.Nodes = append(o.Nodes, n)
	}
	falls, err := network.Decay(off, p.State(0), o)
	if err != nil {
		t.Fatal(err)
	}
	for i, f := range falls {
		d, err := e.DischargeOf(names[i])
		if err != nil || d.Never || f.Lack != nil {
			t.Fatalf("%s: %v %v %v", names[i], err, d.Never, f.Lack)
		}
		if got, want := float64(f.After), float64(d.Time); math.Abs(got/want-1) > 0.01 {
			t.Errorf("%s: 60 V after %g s by the network, %g s by the decay", names[i], got, want)
		}
	}
}
