package network

import (
	"fmt"
	"math"
	"testing"
)

// measuredLadder is a ladder that somebody built and read with a multimeter.
type measuredLadder struct {
	source, mark              string
	stages                    int
	farads, hertz, peak, drop float64
	load                      float64 // ohm, the instrument beside it
	reads                     float64 // V, as published
	within                    float64 // how well the network reproduces it
	simulated                 float64 // V, by an independent simulation with ideal diodes; zero where there is none
}

// eoff and bench are where the readings come from.
const (
	eoff  = "J. Eoff, voltage multipliers, part 6, table of readings"
	bench = "single-stage Greinacher circuit, electronics-project notes, 2025"
	read  = "read; drive and instrument inferred from the readings without load"
)

func parallel(a, b float64) float64 { return a * b / (a + b) }

func measuredLadders() []measuredLadder {
	const (
		load  = 462e3
		ten   = 10e6 // ohm, the instrument that explains the doublers
		one   = 1e6  // ohm, the one that explains two stages
		tap1  = 19.9095
		tap2  = 15.5248
		mains = 50
	)
	return []measuredLadder{
		{eoff, read, 1, 10e-9, mains, tap1, 0, ten, 30.7, 0.02, 31.17},
		{eoff, read, 1, 10e-9, mains, tap1, 0, parallel(load, ten), 7.4, 0.16, 6.35}, // the capacitors run empty between pulses: their tolerance decides
		{eoff, read, 1, 100e-9, mains, tap1, 0, ten, 38.1, 0.02, 38.69},
		{eoff, read, 1, 100e-9, mains, tap1, 0, parallel(load, ten), 24.0, 0.04, 24.73},
		{eoff, read, 1, 5e-6, mains, tap1, 0, parallel(load, ten), 38.7, 0.03, 0},
		{eoff, read, 1, 10e-6, mains, tap1, 0, parallel(load, ten), 38.5, 0.04, 0},
		{eoff, read, 2, 100e-9, mains, tap2, 0, one, 23.7, 0.06, 24.92},
		{eoff, read, 2, 100e-9, mains, tap2, 0, parallel(load, one), 12.3, 0.04, 12.67},
		{eoff, read, 2, 10e-6, mains, tap2, 0, parallel(load, one), 59.0, 0.05, 0},
		{bench, "read; a forward drop of 0.41 V at 9 uA taken", 1, 1e-6, 100, 5, 0.41, 1e6, 9.04, 0.01, 0},
	}
}

// Measured ladders, as well as their unstated drives, instruments and capacitor
// tolerances allow; and what an independent simulation says of the same, within 0.3 %.
func TestMeasuredLadders(t *testing.T) {
	for _, m := range measuredLadders() {
		l := ladder{stages: m.stages, frequency: m.hertz, peak: m.peak, capacitance: m.farads, drop: m.drop, on: 1,
			more: fmt.Sprintf("[[load]]\nname = \"load\"\nat = \"multiplier\"\nresistance = \"%g ohm\"\n", m.load)}
		p := steady(t, build(t, l.describe()))
		s, err := p.At(node(t, p.Circuit, "multiplier"))
		if err != nil {
			t.Fatal(err)
		}
		what := fmt.Sprintf("%s (%s): %d stages, %g F, %.3g ohm", m.source, m.mark, m.stages, m.farads, m.load)
		t.Logf("%s: reads %g V, network %.4g V, %+.1f %%", what, m.reads, float64(s.Mean), 100*(float64(s.Mean)/m.reads-1))
		near(t, what, float64(s.Mean), m.reads, m.within)
		if m.simulated != 0 && math.Abs(float64(s.Mean)/m.simulated-1) > 0.003 {
			t.Errorf("%s: %.4g V, simulated %g V", what, s.Mean, m.simulated)
		}
	}
}
