package network

import (
	"math"
	"testing"
)

// TestTallCutLadders: a tall ladder in which a diode is the wrong way round is crept to with
// its own leakage. That is the state which half as much leakage again leaves within what cut
// ladders have to agree by, no leakage was lent, and it takes one search of ordinary length.
func TestTallCutLadders(t *testing.T) {
	l := ladder{stages: tallest + 2, frequency: 25e3, peak: 450, resistance: 600, capacitance: 22e-9, current: 60e-6, drop: 12, on: 60, junction: 1e-12, leakage: "50 nA"}
	whole := build(t, l.describe())
	for _, part := range []string{"multiplier.diode.5", "multiplier.diode.30"} {
		c, ended := fed(whole.Reverse(part))
		if len(ended) == 0 {
			t.Fatalf("%s reversed still feeds the load", part)
		}
		s, err := Settle(whole.Reverse(part), Failed{Part: part, Ladder: true}, Options{})
		if err != nil {
			t.Fatalf("%s: %v", part, err)
		}
		r := reacher{failed: part, dead: true}
		least := 0.0
		for _, e := range c.Elements {
			least = math.Max(least, e.Rectifier.Leakage)
		}
		leaky, err := r.steady(r.leaking(c, 1.5*least), Options{})
		if err != nil {
			t.Fatalf("%s with more leakage: %v", part, err)
		}
		if d := apart(leaky, s.Periodic); d == 0 || d > agreedCut {
			t.Errorf("%s: half as much leakage again moves the state by %.3g", part, d)
		}
		if len(s.Assumptions) != len(leaky.Assumptions) {
			t.Errorf("%s assumes %q", part, s.Assumptions)
		}
		if w := s.Work; w.Steps > 20000 || w.Periods > 60 {
			t.Errorf("%s took %+v", part, w)
		}
	}
}

// TestTallIsCounted in stages of the ladder.
func TestTallIsCounted(t *testing.T) {
	for stages, want := range map[int]bool{tallest: false, tallest + 1: true} {
		l := ladder{stages: stages, frequency: 25e3, peak: 450, resistance: 600, capacitance: 22e-9, current: 60e-6, drop: 12, on: 60, junction: 1e-12}
		if tall(build(t, l.describe())) != want {
			t.Errorf("%d stages", stages)
		}
	}
}
