package network

import (
	"testing"

	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
)

// Two stages without load give four times the peak less the forward drop of each of the
// four diodes: 4 (1008 − 8) V are 4 kV, from wherever the search begins.
func TestHoldFindsTheDrive(t *testing.T) {
	l := ladder{stages: 2, frequency: 50e3, capacitance: 1e-9, drop: 8, on: 1}
	o := HoldOptions{Node: "multiplier", Set: 4000, Build: func(peak quantity.Voltage) (*circuit.Circuit, error) {
		l.peak = float64(peak)
		return build(t, l.describe()), nil
	}}
	for _, first := range []quantity.Voltage{100, 1000, 5000} {
		o.First = first
		peak, p, err := Hold(o)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "peak", float64(peak), 1008, 1e-4)
		s, err := p.At(node(t, p.Circuit, "multiplier"))
		if err != nil {
			t.Fatal(err)
		}
		near(t, "mean", float64(s.Mean), 4000, 1e-8)
	}
	o.Node = "nowhere"
	if _, _, err := Hold(o); err == nil {
		t.Error("a node that is not there is held")
	}
}
