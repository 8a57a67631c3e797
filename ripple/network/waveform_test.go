package network

import (
	"math"
	"testing"

	"kilovet/hv/circuit"
)

// The wave-forms agree with the figures taken from the steps: r.m.s. of a stiff sine is
// amplitude/√2, a diode's wave-form carries its mean and its peak.
func TestWaveFormsAgreeWithFigures(t *testing.T) {
	l := ladder{stages: 3, frequency: 50e3, peak: 1000, resistance: 100, capacitance: 1e-9, current: 1e-4, drop: 8, on: 50}
	p := steady(t, build(t, l.describe()))
	rms, err := p.RMS(node(t, p.Circuit, "drive.source"), circuit.Ground)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "r.m.s. of the source", float64(rms), 1000/math.Sqrt2, 1e-6)
	for _, name := range []string{"multiplier.diode.1", "multiplier.diode.6", "drive.source"} {
		flow, err := p.Through(name)
		if err != nil {
			t.Fatal(err)
		}
		points, peak, charge := p.Current(name), 0.0, 0.0
		for i, x := range points {
			peak = math.Max(peak, math.Abs(float64(x.Current)))
			if i > 0 {
				charge += float64(x.Time-points[i-1].Time) * float64(x.Current+points[i-1].Current) / 2
			}
		}
		near(t, name+" peak", peak, float64(flow.Peak), 0.02)
		if mean := charge * 50e3; math.Abs(mean-float64(flow.Mean)) > 0.02*float64(flow.RMS) {
			t.Errorf("%s: mean of the wave-form %g, of the steps %g", name, mean, float64(flow.Mean))
		}
	}
}
