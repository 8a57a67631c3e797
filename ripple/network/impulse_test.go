package network

import (
	"testing"

	"kilovet/hv/circuit"
)

// TestImpulses: a sine moves no charge at once, however small a current is beside what a
// swift search leaves open; a square wave without resistance does, through what it charges.
func TestImpulses(t *testing.T) {
	for name, text := range examples() {
		c := build(t, text)
		top, _ := c.Node("multiplier")
		p, err := Steady(c.Bridge("short", c.Labels(top)[0], "ground", 1), Options{Swift: true})
		if err != nil {
			t.Fatal(name, err)
		}
		for i := range p.Circuit.Elements {
			if _, err := p.Through(p.Circuit.Elements[i].Name); err != nil {
				t.Errorf("%s: %v", name, err)
			}
		}
	}
	square := ladder{stages: 2, frequency: 50e3, peak: 1000, capacitance: 1e-9, current: 1e-6, drop: 8, on: 50, junction: 1e-12, leakage: "1 nA"}.describe()
	c := build(t, square).Each(func(e *circuit.Element) bool {
		if e.Kind == circuit.Source && e.Wave.Amplitude > 0 && e.Wave.Form != circuit.Direct {
			e.Wave.Form = circuit.Square
		}
		return true
	})
	p := steady(t, c)
	if _, err := p.Through("multiplier.coupling_capacitor.1"); err == nil {
		t.Error("a square wave charges the coupling capacitor through diodes' junctions and nothing else, and its current has a peak")
	}
}
