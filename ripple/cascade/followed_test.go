package cascade

import (
	"math"
	"testing"

	"kilovet/hv/quantity"
)

// follower moves the drive of a cascade in small steps and lets the diodes follow,
// for tests. Two columns share one smoothing column; a half-wave cascade has one.
// It starts at the no-load state and knows nothing of the closed forms.
type follower struct {
	c       Cascade
	columns []*ladder
}

func (c Cascade) follower() follower {
	f := follower{c: c, columns: []*ladder{c.charged()}}
	if c.Symmetrical {
		b := c.charged()
		b.smoothing = f.columns[0].smoothing
		f.columns = append(f.columns, b)
	}
	return f
}

// charged is the ladder without load.
func (c Cascade) charged() *ladder {
	l := c.discharged()
	for k := range l.coupling {
		l.coupling[k], l.smoothing[k] = float64(c.rung()), float64(c.rung())
	}
	l.coupling[0] /= 2
	return l
}

// at holds the first drive at a part of its peak, the second at the opposite.
func (f follower) at(part float64) {
	for i, l := range f.columns {
		e := quantity.Voltage(part) * f.c.Peak
		if i == 1 {
			e = -e
		}
		l.c.Peak = e // positive brings the drive to Peak, negative to −Peak
		l.positive()
		l.c.Peak = -e
		l.negative()
	}
}

// half is half a period: the drive goes from zero to a peak without load, then the
// load takes its charge, with the drive held there (square) or gone (sine).
func (f follower) half(sign float64, charge float64) (high, low quantity.Voltage) {
	const ramp, hold = 400, 200
	for i := range ramp {
		f.at(sign * math.Sin(math.Pi/2*float64(i+1)/ramp))
	}
	high = f.columns[0].output()
	steps := 1
	if f.c.Square {
		steps = hold
	}
	for range steps {
		for k := range f.columns[0].smoothing {
			f.columns[0].smoothing[k] -= charge / float64(steps) / float64(f.c.Smoothing[k])
		}
		if f.c.Square {
			f.at(sign)
		}
	}
	return high, f.columns[0].output()
}

// Closed forms against the followed cascade, all four kinds: every corner of the
// output wave-form. What is left is the size of the steps.
func TestClosedFormsAgainstFollowedDrive(t *testing.T) {
	unequal := Cascade{Coupling: []quantity.Capacitance{0.7, 1.9, 0.4}, Smoothing: []quantity.Capacitance{1.1, 0.5, 1.6}}
	for _, r := range []struct {
		name string
		c    Cascade
	}{
		{"half-wave, sine, unequal", unequal},
		{"half-wave, square, 1 stage", Cascade{Square: true}.WithEqual(1, 1)},
		{"half-wave, square, 3 stages", Cascade{Square: true}.WithEqual(3, 1)},
		{"symmetrical, sine, unequal", Cascade{Symmetrical: true, Coupling: unequal.Coupling, Smoothing: unequal.Smoothing}},
		{"symmetrical, sine, 4 stages", Cascade{Symmetrical: true}.WithEqual(4, 1)},
		{"symmetrical, square, 2 stages", Cascade{Symmetrical: true, Square: true}.WithEqual(2, 1)},
	} {
		t.Run(r.name, func(t *testing.T) {
			r.c.Peak, r.c.Frequency, r.c.ForwardDrop = 10, 1, 0.1
			const load = 0.1
			want, err := r.c.Loaded(load)
			if err != nil {
				t.Fatal(err)
			}
			f := r.c.follower()
			var got [4]quantity.Voltage
			for range 40 * r.c.Stages() * r.c.Stages() / 2 {
				got[0], got[1] = f.half(1, load/2)
				got[2], got[3] = f.half(-1, load/2)
			}
			a, b, c, d := want.Ripple.corners()
			for i, corner := range []quantity.Voltage{a, b, c, d} {
				drop := float64(want.NoLoad - want.Output.Maximum - corner)
				near(t, "drop at a corner", float64(want.NoLoad-got[i]), drop, 1e-3)
			}
		})
	}
}

// A sine and the load together, in steps: what the law overstates by real pulses.
// These are the figures of the package comment, and those at the limits that
// LargestSwing rests on.
func TestOverstatementByRealPulses(t *testing.T) {
	stiff := Cascade{Coupling: []quantity.Capacitance{10}, Smoothing: []quantity.Capacitance{1}}
	small := Cascade{Coupling: []quantity.Capacitance{1, 1, 1}, Smoothing: []quantity.Capacitance{1, 0.2, 1}}
	equal, twins := Cascade{}, Cascade{Symmetrical: true}
	for _, r := range []struct {
		name         string
		c            Cascade
		swing        float64 // (I/f) (1/P + 1/S)/2 over the peak
		drop, ripple float64
	}{
		{"1 stage", equal.WithEqual(1, 1), 0.01, 0.014, 0.033},
		{"1 stage", equal.WithEqual(1, 1), 0.1, 0.046, 0.111},
		{"1 stage", equal.WithEqual(1, 1), 0.3, 0.083, 0.213},
		{"2 stages", equal.WithEqual(2, 1), 0.3, 0.074, 0.304},
		{"4 stages", equal.WithEqual(4, 1), 0.1, 0.034, 0.195},
		{"large coupling capacitor", stiff, 0.3, 0.229, 0.211},
		{"small smoothing capacitor", small, 0.3, 0.085, 0.240},
		{"symmetrical, 1 stage", twins.WithEqual(1, 1), 0.3, 0.118, 0.312},
		{"symmetrical, 3 stages", twins.WithEqual(3, 1), 0.1, 0.047, 0.421},
		{"symmetrical, 3 stages at the limit", twins.WithEqual(3, 1), 0.0577, 0.035, 0.293},
	} {
		t.Run(r.name, func(t *testing.T) {
			r.c.Peak, r.c.Frequency = 1, 1
			load := quantity.Current(r.swing) / quantity.Current(r.c.swing(1))
			mean, ripple := r.c.follower().sine(load)
			s := r.c.climb(load)
			near(t, "drop", float64(s.Drop()/(s.NoLoad-mean)), 1+r.drop, 0.003)
			near(t, "ripple", float64(s.Ripple.PeakToPeak()/ripple), 1+r.ripple, 0.012)
		})
	}
}

// sine follows the drive to the steady state and gives mean and ripple of the last period.
func (f follower) sine(load quantity.Current) (mean, ripple quantity.Voltage) {
	const steps = 600
	n := f.c.Stages()
	for range 20*n*n + 12 {
		mean = 0
		low, high := quantity.Voltage(math.Inf(1)), quantity.Voltage(math.Inf(-1))
		for i := range steps {
			for k := range f.columns[0].smoothing {
				f.columns[0].smoothing[k] -= float64(load) / steps / float64(f.c.Smoothing[k])
			}
			f.at(math.Cos(2 * math.Pi * float64(i) / steps))
			v := f.columns[0].output()
			mean += v / steps
			low, high = min(low, v), max(high, v)
		}
		ripple = high - low
	}
	return mean, ripple
}
