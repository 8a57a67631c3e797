package network

import "testing"

// One half of a symmetrical drive has come off: half the ladder hangs on next to nothing
// and rounding switches its diodes at every step, beside a resistor of milliohms. What the
// parts take up is then nothing like what the source gives, and no figure is printed.
func TestWhatRoundingDecidesIsALack(t *testing.T) {
	l := ladder{stages: 1, topology: "symmetrical", polarity: "positive", drive: "square",
		frequency: 1e7, peak: 1e4, capacitance: 2.7072220412326355e-07, resistance: 0.005869139191689006, leakage: "0 A"}
	if p, err := Steady(build(t, l.describe()).Open("drive.source.a"), Options{}); err == nil {
		t.Errorf("input power %g W with nothing that takes it", -float64(p.Power("drive.source.b")))
	}
}
