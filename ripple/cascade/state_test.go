package cascade

import (
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/quantity"
)

// What is said of nodes, capacitors and output must be one state.
func TestNodesAreSumsOfCapacitors(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		c := anyCascade(t)
		s := c.climb(anyLoad(t, c))
		var smoothing, coupling quantity.Voltage
		for k := range s.Smoothing {
			smoothing += s.Smoothing[k].Mean
			coupling += s.Coupling[k].Mean
			same(t, s.Nodes[k].Mean, smoothing, s.NoLoad)
			same(t, s.CouplingDC[k], coupling, s.NoLoad)
			ordered(t, s.Smoothing[k])
			ordered(t, s.Coupling[k])
			ordered(t, s.Nodes[k])
		}
		same(t, s.Output.Mean, smoothing, s.NoLoad)
		same(t, s.Output.Maximum-s.Output.Minimum, s.Ripple.PeakToPeak(), s.NoLoad)
	})
}

func ordered(t *rapid.T, s Swing) {
	t.Helper()
	if s.Minimum > s.Mean || s.Mean > s.Maximum {
		t.Errorf("minimum %g, mean %g, maximum %g", s.Minimum, s.Mean, s.Maximum)
	}
}

// The column's own movement and the swings across its capacitors are one.
func TestColumnIsTheSumOfCouplingSwings(t *testing.T) {
	for _, kind := range kinds {
		c := unit(4)
		c.Symmetrical, c.Square = kind.symmetrical, kind.square
		s := c.climb(1)
		var high, low, mean quantity.Voltage
		for _, swing := range s.Coupling {
			high, low, mean = high+swing.Maximum, low+swing.Minimum, mean+swing.Mean
		}
		near(t, kind.name+": peak to peak", float64(s.Column.PeakToPeak()), float64(high-low), 1e-9)
		near(t, kind.name+": before the positive pulse", float64(s.Column.At(0.75)), float64(high-mean), 1e-9)
		near(t, kind.name+": before the negative pulse", float64(s.Column.At(0.5-1e-12)), float64(low-mean), 1e-9)
		near(t, kind.name+": closed", float64(s.Column.Rise), float64(s.Column.First+s.Column.Fall+s.Column.Second), 1e-9)
	}
}

// Upper capacitors of a loaded cascade carry less than lower ones, never more than
// twice the peak; no diode is reversed by more than that either.
func TestStressFallsUpwards(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		c := anyCascade(t)
		s := c.climb(anyLoad(t, c))
		for k := range s.Smoothing {
			if s.Smoothing[k].Maximum > 2*c.Peak || s.DiodeReverse[2*k] > 2*c.Peak || s.DiodeReverse[2*k+1] > s.DiodeReverse[2*k]*(1+1e-12) {
				t.Errorf("stage %d: %+v, reverse %v", k+1, s.Smoothing[k], s.DiodeReverse[2*k:2*k+2])
			}
			if k > 0 && s.Smoothing[k].Maximum > s.Smoothing[k-1].Maximum {
				t.Errorf("stage %d carries more than the one below", k+1)
			}
		}
	})
}

// Equal capacitors in one list or two, of one value or a hair apart, are one cascade.
func TestListedCapacitorsAgainstEqual(t *testing.T) {
	c := Cascade{Peak: 3000, Frequency: 3e4}.WithEqual(5, 1e-9)
	listed := c
	listed.Smoothing = []quantity.Capacitance{1e-9, 1e-9 * (1 + 1e-12), 1e-9, 1e-9, 1e-9}
	a, b := c.climb(1e-4), listed.climb(1e-4)
	near(t, "drop", float64(a.Drop()), float64(b.Drop()), 1e-9)
	listed.Square = true
	if _, err := listed.Loaded(1e-4); err != nil {
		t.Errorf("a hair apart is still equal: %v", err)
	}
}

// Twice the frequency in the half-wave formulas is not the symmetrical cascade: its
// drop tends to half, its ripple to n times.
func TestSymmetricalIsNotHalfWaveAtTwiceTheFrequency(t *testing.T) {
	for _, n := range []int{3, 6, 12} {
		c := unit(n)
		c.Frequency = 2
		wrong := c.climb(1)
		c.Frequency, c.Symmetrical = 1, true
		right := c.climb(1)
		if ratio := wrong.Drop() / right.Drop(); ratio < 1.5 || ratio > 2 {
			t.Errorf("%d stages: the wrong drop is %g of the right one", n, ratio)
		}
		near(t, "ripple", float64(wrong.Ripple.PeakToPeak()/right.Ripple.PeakToPeak()), float64(n+1)/2, 1e-9)
	}
}

func TestEnergy(t *testing.T) {
	c := Cascade{Peak: 1000, Frequency: 1e4}.WithEqual(6, 1e-9)
	e, err := c.StoredEnergy()
	if err != nil {
		t.Fatal(err)
	}
	near(t, "half-wave: C peak² (4N − 3/2)", float64(e), 1e-9*1e6*(24-1.5), 1e-12)
	c.Symmetrical = true
	e, _ = c.StoredEnergy()
	near(t, "symmetrical: a second coupling column", float64(e), 1e-9*1e6*(24-1.5+.5+5*2), 1e-12)
}
