package cascade

import (
	"math"
	"testing"

	"pgregory.net/rapid"

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
	rapid.Check(t, func(t *rapid.T) {
		c := anyCascade(t)
		c.Symmetrical = false
		n := min(c.Stages(), 5)
		c.Coupling, c.Smoothing = c.Coupling[:n], c.Smoothing[:n]
		share := rapid.Float64Range(0.01, 0.3).Draw(t, "share of the no-load voltage")
		unit := c.climb(1)
		load := quantity.Current(share * float64(unit.NoLoad/unit.Drop()))
		s := c.climb(load)
		if s.lowest() <= 0 {
			t.Skip("a capacitor empties")
		}
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

// A quasi-static sine: the drive moves in small steps and the diodes follow. This is
// the comparison behind the table of the package comment and behind LargestSwing.
func TestOverstatementByRealPulses(t *testing.T) {
	for _, r := range []struct {
		stages             int
		swing              float64 // q/(C peak)
		drop, ripple, each float64
	}{
		{1, 0.01, 0.0142, 0.0331, 0.001},
		{1, 0.1, 0.0463, 0.1111, 0.002},
		{1, 0.3, 0.0834, 0.2130, 0.003},
		{2, 0.1, 0.0400, 0.1355, 0.003},
		{2, 0.3, 0.0744, 0.3043, 0.004},
		{4, 0.1, 0.0339, 0.1950, 0.004},
	} {
		c := Cascade{Peak: 1, Frequency: 1}.Equal(r.stages, 1)
		mean, ripple := c.inTime(r.swing, 1000)
		s := c.climb(quantity.Current(r.swing))
		drop := float64(s.NoLoad) - mean
		if got := float64(s.Drop())/drop - 1; math.Abs(got-r.drop) > r.each {
			t.Errorf("%d stages at %g: drop overstated by %.4f, want %.4f", r.stages, r.swing, got, r.drop)
		}
		if got := float64(s.Ripple.PeakToPeak())/ripple - 1; math.Abs(got-r.ripple) > 2*r.each {
			t.Errorf("%d stages at %g: ripple overstated by %.4f, want %.4f", r.stages, r.swing, got, r.ripple)
		}
	}
}

// inTime follows a unit cascade (1 V, 1 Hz, 1 F) under a load of so many amperes
// through 60 n² periods of a sine, in steps, and returns mean and ripple of the last.
func (c Cascade) inTime(load float64, steps int) (mean, ripple float64) {
	l := c.discharged()
	for k := range l.coupling {
		l.coupling[k], l.smoothing[k] = 2, 2
	}
	l.coupling[0] = 1
	for range 12*c.Stages()*c.Stages() + 20 {
		low, high := math.Inf(1), math.Inf(-1)
		mean = 0
		for i := range steps {
			e := quantity.Voltage(math.Cos(2 * math.Pi * float64(i) / float64(steps)))
			for k := range l.smoothing {
				l.smoothing[k] -= load / float64(steps)
			}
			l.c.Peak = e // positive() brings the drive to +Peak, negative() to −Peak
			l.positive()
			l.c.Peak = -e
			l.negative()
			v := float64(l.output())
			mean += v / float64(steps)
			low, high = min(low, v), max(high, v)
		}
		ripple = high - low
	}
	return mean, ripple
}
