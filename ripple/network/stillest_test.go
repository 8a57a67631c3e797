package network

import (
	"math"
	"testing"

	"kilovet/hv/circuit"
)

// ringing are symmetrical supplies under next to no load, whose transformer's leakage
// inductance rings with the diodes' junctions from one switching to the next.
func ringing() map[string]ladder {
	return map[string]ladder{
		"sine":   {stages: 3, topology: "symmetrical", polarity: "negative", frequency: 164, peak: 324, resistance: 15.6, inductor: 17.5e-3, capacitance: 1.07e-6, current: 67e-6, on: 0.61, junction: 1.02e-9},
		"square": {stages: 4, topology: "symmetrical", polarity: "negative", drive: "square", frequency: 577, peak: 1328, resistance: 4.2, inductor: 5.1e-3, capacitance: 0.9e-6, current: 0.8e-6, drop: 5, on: 0.45, junction: 1.3e-9, leakage: "100 nA"},
	}
}

// TestRinging: such a supply has a state, known at least as exactly as it says; the diodes
// pass the load and nothing else, and no peak passes twice that of the drive for a sine far
// below resonance.
func TestRinging(t *testing.T) {
	for name, l := range ringing() {
		c := build(t, l.describe())
		p, err := Steady(c, Options{})
		if err != nil {
			t.Fatal(name, err)
		}
		if p.Adrift > loose || p.Work.Steps > 600000 {
			t.Errorf("%s: adrift by %v after %+v", name, p.Adrift, p.Work)
		}
		top, _ := c.Node("multiplier")
		s, _ := p.At(top)
		if name == "sine" && !(float64(-s.Mean) > 6*324*0.98 && float64(-s.Mean) < 6*324*1.1) {
			t.Errorf("three stages of 324 V are %v, not about 1944 V", s.Mean)
		}
		for i := range c.Elements {
			e := &c.Elements[i]
			if e.Kind == circuit.Diode {
				if mean := float64(p.Diode(e.Name).Mean); mean < -1e-3*l.current || mean > 1.001*l.current {
					t.Errorf("%s: %s passes %g A in the mean, the load takes %g A", name, e.Name, mean, l.current)
				}
			}
		}
		taken, given := 0.0, 0.0
		for _, e := range names(c) {
			w := float64(p.Power(e))
			taken, given = taken+w, given+math.Abs(w)
		}
		if math.Abs(taken) > 1e-3*given {
			t.Errorf("%s: %g W left of %g W", name, taken, given)
		}
	}
}
