package cascade

import (
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/quantity"
)

// No other number of stages gives more, whichever the kind.
func TestNoOtherNumberOfStagesGivesMore(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		kind := rapid.SampledFrom(kinds).Draw(t, "kind")
		c := Cascade{Symmetrical: kind.symmetrical, Square: kind.square, Peak: 1000, Frequency: 1000, ForwardDrop: 3}.WithEqual(1, 1e-9)
		load := quantity.Current(rapid.Float64Range(1e-6, 2.9e-4).Draw(t, "load"))
		o, err := c.StagesForMostOutput(load)
		if err != nil {
			t.Fatal(err)
		}
		same(t, c.WithEqual(o.Stages, 1e-9).climb(load).Output.Mean, o.Mean, 1000*quantity.Voltage(o.Stages))
		for n := max(1, o.Stages-3); n <= o.Stages+3; n++ {
			if v := c.WithEqual(n, 1e-9).climb(load).Output.Mean; v > o.Mean*(1+1e-9) {
				t.Errorf("%d stages give %g, %d are said to give most, %g", n, v, o.Stages, o.Mean)
			}
		}
		if d := o.Unrounded - float64(o.Stages); d > 1 || d < -1 {
			t.Errorf("%g rounded to %d", o.Unrounded, o.Stages)
		}
	})
}

// The short form is √(peak f C/I), and at it two thirds of the no-load voltage are
// left: V = (4/3) n peak (C. L. Wadhwa, High Voltage Engineering, example 2.1; Naidu
// and Kamaraju, example 6.1; both read in transcriptions). The full form gives less.
func TestShortForm(t *testing.T) {
	c := naidu()
	c.Peak, c.Frequency = 100e3, 150
	load := quantity.Current(100e3 * 150 * 50e-9 / 900) // √… = 30
	o, err := c.StagesForMostOutput(load)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "unrounded", o.ShortUnrounded, 30, 1e-9)
	if o.ShortStages != 30 {
		t.Errorf("%d stages", o.ShortStages)
	}
	n := float64(o.ShortStages)
	q := float64(c.perPeriod(load, 50e-9))
	near(t, "(4/3) n peak", 2*n*100e3-2./3*n*n*n*q, 4./3*n*100e3, 1e-9)
	near(t, "full form at 30 stages", float64(c.WithEqual(30, 50e-9).climb(load).Output.Mean), 3949e3, 1e-3)
	if o.Mean >= 4000e3 || o.Unrounded >= 30 {
		t.Errorf("full form: %g stages, %g V", o.Unrounded, o.Mean)
	}
}

// A symmetrical cascade bears twice the stages, by the leading term.
func TestSymmetricalOptimumIsTwice(t *testing.T) {
	c := Cascade{Peak: 1000, Frequency: 1000}.WithEqual(1, 1e-9)
	half, _ := c.StagesForMostOutput(1e-6)
	c.Symmetrical = true
	full, _ := c.StagesForMostOutput(1e-6)
	near(t, "ratio", full.ShortUnrounded/half.ShortUnrounded, 2, 1e-9)
}
