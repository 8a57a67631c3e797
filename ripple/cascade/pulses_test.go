package cascade

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/quantity"
)

// pulsed brings a half-wave ladder to its steady state pulse by pulse from near it,
// finding at every pulse which diodes conduct; the load takes half a period's charge
// in between. It knows nothing of the closed forms but the start.
func pulsed(t *rapid.T, c Cascade, load quantity.Current) (top, beforeFall, afterFall, end quantity.Voltage, l *ladder) {
	l = c.discharged()
	for k := range l.coupling {
		l.coupling[k], l.smoothing[k] = float64(c.rung()), float64(c.rung())
	}
	l.coupling[0] /= 2
	half := float64(load) / float64(c.Frequency) / 2
	discharge := func() {
		for k := range l.smoothing {
			l.smoothing[k] -= half / float64(c.Smoothing[k])
		}
	}
	for range 200_000 {
		discharge()
		l.positive()
		was := top
		top = l.output()
		discharge()
		beforeFall = l.output()
		l.negative()
		afterFall = l.output()
		end = afterFall - quantity.Voltage(half*sumOfElastance(c))
		if math.Abs(float64(top-was)) < 1e-13*float64(c.Peak) {
			return
		}
	}
	t.Fatal("no steady state")
	return
}

func sumOfElastance(c Cascade) float64 {
	var sum float64
	for _, s := range c.Smoothing {
		sum += 1 / float64(s)
	}
	return sum
}

// Closed forms against pulses, any capacitors: every level of the output wave-form.
func TestClosedFormsAgainstPulses(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		c := anyCascade(t)
		c.Symmetrical = false
		n := min(c.Stages(), 5)
		c.Coupling, c.Smoothing = c.Coupling[:n], c.Smoothing[:n]
		load := anyLoad(t, c)
		s := c.climb(load)
		top, before, after, end, l := pulsed(t, c, load)
		w := s.Ripple
		for i, got := range []quantity.Voltage{top, before, after, end} {
			_, b, a, e := w.corners()
			want := s.Output.Maximum + []quantity.Voltage{0, b, a, e}[i]
			if math.Abs(float64(got-want)) > 1e-7*float64(s.NoLoad) {
				t.Errorf("level %d of the output: %g, want %g", i, got, want)
			}
		}
		for k := range l.coupling {
			if math.Abs(l.coupling[k]-float64(s.Coupling[k].Maximum)) > 1e-7*float64(s.NoLoad) {
				t.Errorf("coupling capacitor %d after the negative peak: %g, want %g", k+1, l.coupling[k], s.Coupling[k].Maximum)
			}
		}
	})
}
