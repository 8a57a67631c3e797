package cascade

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Both forms for the loss by strays across the diodes, and the ladder simulated in
// time (own computation), 4 figures.
func TestEfficiencyForms(t *testing.T) {
	for _, r := range []struct {
		stages                          int
		ratio                           float64
		continuous, discrete, simulated float64
	}{
		{2, 0.01, 0.9499, 0.9307, 0.9306},
		{4, 0.01, 0.8300, 0.8022, 0.8022},
		{8, 0.01, 0.5760, 0.5500, 0.5500},
		{8, 0.0025, 0.8300, 0.8162, 0.8162},
		{10, 0.001, 0.8850, 0.8771, 0.8771},
	} {
		near(t, "continuous", ContinuousEfficiency(r.stages, r.ratio), r.continuous, 1e-4)
		near(t, "discrete", DiscreteEfficiency(r.stages, r.ratio), r.discrete, 1e-4)
		near(t, "simulated", DiscreteEfficiency(r.stages, r.ratio), r.simulated, 1.5e-4)
		c := Cascade{Peak: 1000, Frequency: 3e4, Junction: quantity.Capacitance(r.ratio * 1e-9)}.WithEqual(r.stages, 1e-9)
		s, err := c.NoLoadWithStrays()
		if err != nil {
			t.Fatal(err)
		}
		near(t, "network of capacitors", float64(s.Mean)/(2000*float64(r.stages)), r.discrete, 1e-4)
	}
}

// The network of capacitors, solved row by row, is the closed discrete form.
func TestNetworkOfStraysIsTheDiscreteForm(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(1, 60).Draw(t, "stages")
		ratio := math.Exp(rapid.Float64Range(-12, 1).Draw(t, "logarithm of the ratio"))
		c := Cascade{Peak: 1000, Frequency: 3e4, Junction: quantity.Capacitance(ratio * 1e-9)}.WithEqual(n, 1e-9)
		s, err := c.NoLoadWithStrays()
		if err != nil {
			t.Fatal(err)
		}
		noLoad, _ := c.NoLoad()
		same(t, s.Mean, quantity.Voltage(DiscreteEfficiency(n, ratio))*noLoad, noLoad)
	})
}

func TestEfficiencyLimits(t *testing.T) {
	for _, form := range []func(int, float64) float64{DiscreteEfficiency, ContinuousEfficiency} {
		near(t, "no strays", form(6, 0), 1, 0)
		near(t, "hardly any", form(6, 1e-12), 1, 1e-6)
		if e := form(60, 1e6); !(e > 0 && e < 1e-4) {
			t.Errorf("nothing but strays: %g", e)
		}
	}
	// one stage and two capacitors can be written out: with r = Cs/C the drive is
	// divided to a = (1+r)/(1+3r+r²), stage.1 = r a/(1+r); output 2a − stage.1
	for _, r := range []float64{0.01, 0.1, 1} {
		want := (2*(1+r) - r) / (1 + 3*r + r*r) / 2
		near(t, "one stage", DiscreteEfficiency(1, r), want, 1e-12)
	}
}

// With more stages the continuous form comes nearer; it is never below the exact one.
func TestContinuousFormIsOptimistic(t *testing.T) {
	for _, ratio := range []float64{1e-4, 1e-3, 1e-2} {
		for n := 1; n <= 60; n++ {
			excess := ContinuousEfficiency(n, ratio)/DiscreteEfficiency(n, ratio) - 1
			if excess < 0 || excess > 0.052 {
				t.Errorf("%d stages, ratio %g: %g above the exact form", n, ratio, excess)
			}
		}
	}
}

func TestStraysOnlyTake(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		c := anyCascade(t)
		ideal, err := c.NoLoadWithStrays()
		if err != nil {
			t.Fatal(err)
		}
		noLoad, _ := c.NoLoad()
		same(t, ideal.Mean, noLoad, noLoad)
		same(t, ideal.Maximum-ideal.Minimum, 0, noLoad)
		c.Junction, c.BetweenColumns, c.ToGround = drawn(t, "junction"), drawn(t, "columns"), drawn(t, "ground")
		s, err := c.NoLoadWithStrays()
		if err != nil {
			t.Fatal(err)
		}
		if s.Mean > noLoad*(1+1e-9) || s.Mean < 0 {
			t.Errorf("mean %g of %g", s.Mean, noLoad)
		}
		if c.Symmetrical {
			same(t, s.Maximum, s.Minimum, noLoad)
		}
	})
}

func drawn(t *rapid.T, name string) quantity.Capacitance {
	return quantity.Capacitance(rapid.Float64Range(0, 3e-11).Draw(t, name))
}

// Without strays between the columns nothing alternates on the smoothing column, so
// that its capacitance to ground carries no current.
func TestStrayToGroundAloneTakesNothing(t *testing.T) {
	c := Cascade{Peak: 1000, Frequency: 3e4, ToGround: 1e-10}.WithEqual(5, 1e-9)
	s, err := c.NoLoadWithStrays()
	if err != nil {
		t.Fatal(err)
	}
	near(t, "mean", float64(s.Mean), 10e3, 1e-12)
}

// With one stage the capacitance to ground lies across the smoothing capacitor.
func TestStrayToGroundOfOneStage(t *testing.T) {
	c := Cascade{Peak: 1000, Frequency: 3e4, Junction: 5e-11, ToGround: 3e-10}.WithEqual(1, 1e-9)
	larger := Cascade{Peak: 1000, Frequency: 3e4, Junction: 5e-11}.WithEqual(1, 1e-9)
	larger.Smoothing[0] += 3e-10
	got, err := c.NoLoadWithStrays()
	if err != nil {
		t.Fatal(err)
	}
	want, _ := larger.NoLoadWithStrays()
	near(t, "mean", float64(got.Mean), float64(want.Mean), 1e-12)
	near(t, "maximum", float64(got.Maximum), float64(want.Maximum), 1e-12)
}

// A symmetrical one-stage cascade: the coupling capacitor and both junctions divide
// the drive, and each of the two diodes in series gives what is left.
func TestSymmetricalStrays(t *testing.T) {
	c := Cascade{Symmetrical: true, Peak: 1000, Frequency: 3e4, ForwardDrop: 10, Junction: 1e-11, BetweenColumns: 5e-12}.WithEqual(1, 1e-9)
	s, err := c.NoLoadWithStrays()
	if err != nil {
		t.Fatal(err)
	}
	near(t, "mean", float64(s.Mean), 2*(1000/(1+0.025)-10), 1e-12)
}

// Diodes that the weakened drive no longer opens give nothing.
func TestWeakDriveLeavesUpperDiodesShut(t *testing.T) {
	c := Cascade{Peak: 1, Frequency: 3e4, ForwardDrop: 0.5, Junction: 1e-9}.WithEqual(6, 1e-9)
	s, err := c.NoLoadWithStrays()
	if err != nil {
		t.Fatal(err)
	}
	if s.Mean < 0 || s.Mean > 0.5 {
		t.Errorf("mean %g", s.Mean)
	}
}

func TestNegativeStrayIsRefused(t *testing.T) {
	c := Cascade{Peak: 1000, Frequency: 3e4, ToGround: -1e-12}.WithEqual(2, 1e-9)
	if _, err := c.NoLoadWithStrays(); lack.Of(err) == nil {
		t.Error("an answer")
	}
}
