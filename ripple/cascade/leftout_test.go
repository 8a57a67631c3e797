package cascade

import (
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

func TestAssumptions(t *testing.T) {
	stiff := Cascade{Peak: 2000, Frequency: 1e4, SourceResistance: 60, DiodeResistance: 40}.Equal(3, 1e-9)
	near(t, "R f C", stiff.Stiffness(), 1e-3, 1e-9)
	if list := stiff.Assumptions(); len(list) != 0 {
		t.Errorf("at the limit a source is stiff: %v", list)
	}
	for _, r := range []struct {
		of    string
		spoil func(*Cascade)
	}{
		{"source resistance", func(c *Cascade) { c.SourceResistance = 61 }},
		{"source resistance", func(c *Cascade) { c.DiodeResistance = 41 }},
		{"source resistance", func(c *Cascade) { c.Coupling[2] = 1.1e-9 }},
		{"leakage inductance", func(c *Cascade) { c.Inductance = 1e-6 }},
		{"stray capacitance", func(c *Cascade) { c.Junction = 1e-12 }},
		{"stray capacitance", func(c *Cascade) { c.BetweenColumns = 1e-12 }},
		{"stray capacitance", func(c *Cascade) { c.ToGround = 1e-12 }},
	} {
		c := stiff.Equal(3, 1e-9)
		r.spoil(&c)
		if list := c.Assumptions(); len(list) != 1 || list[0].Of != r.of || list[0].Text == "" {
			t.Errorf("%s: %v", r.of, list)
		}
	}
}

func TestPartsOfTheDrop(t *testing.T) {
	ideal := Cascade{Peak: 2000, Frequency: 1e4}.Equal(3, 1e-9)
	real := ideal
	real.SourceResistance, real.Junction = 100, 1e-12
	inductive := ideal
	inductive.Inductance = 1e-3
	type part func(Cascade, quantity.Current) (quantity.Voltage, error)
	for _, r := range []struct {
		what   string
		c      Cascade
		part   part
		load   quantity.Current
		lacks  bool
		answer float64
	}{
		{"ideal source", ideal, Cascade.SourceDrop, 1e-5, false, 0},
		{"resistance, no load", Cascade{Peak: 2000, Frequency: 1e4, SourceResistance: 100}.Equal(3, 1e-9), Cascade.SourceDrop, 0, false, 0},
		{"resistance and strays, no load", real, Cascade.SourceDrop, 0, true, 0},
		{"resistance", real, Cascade.SourceDrop, 1e-5, true, 0},
		{"inductance", inductive, Cascade.SourceDrop, 1e-5, true, 0},
		{"no strays", ideal, Cascade.StrayDrop, 1e-5, false, 0},
		{"strays", real, Cascade.StrayDrop, 1e-5, true, 0},
		{"strays, no load", real, Cascade.StrayDrop, 0, false, 12000 * (1 - DiscreteEfficiency(3, 1e-3))},
	} {
		got, err := r.part(r.c, r.load)
		if (lack.Of(err) != nil) != r.lacks {
			t.Errorf("%s: %v", r.what, err)
		}
		near(t, r.what, float64(got)+1, r.answer+1, 1e-9)
	}
}

// Source resistance solved in time, one stage at q/(C peak) = 0.01 (own
// computation): the drop, in q/C, that StiffBelow rests on.
func TestStiffLimitCostsOnePercent(t *testing.T) {
	at := map[float64]float64{0: 1.479, 0.001: 1.492, 0.01: 1.732}
	if at[StiffBelow]/at[0] > 1.01 || at[10*StiffBelow]/at[0] < 1.15 {
		t.Error("the limit does not lie where the drop begins to grow")
	}
	c := Cascade{Peak: 100, Frequency: 1}.Equal(1, 1)
	near(t, "stiff drop", float64(c.climb(1).Drop()), at[0], 0.015)
	near(t, "three stages", float64(c.Equal(3, 1).climb(1).Drop()), 23.25, 0.011)
}

// Independent solution in time, 9 stages of 220 pF with R f C = 0.023 and strays
// (computed): the stiff figures are wrong there, and the assumptions say so.
func TestLargeResistanceIsSaid(t *testing.T) {
	c := Cascade{Peak: 2000, Frequency: 70e3, ForwardDrop: 5, SourceResistance: 1000, DiodeResistance: 500, Junction: 1e-12}.Equal(9, 220e-12)
	s, err := c.Loaded(1e-4)
	if err != nil {
		t.Fatal(err)
	}
	if inTime := quantity.Voltage(22025.0869858); s.Output.Mean-inTime < 0.05*inTime {
		t.Errorf("mean %g", s.Output.Mean)
	}
	if list := c.Assumptions(); len(list) != 2 {
		t.Errorf("%v", list)
	}
}

// Strays under load have no closed form; the no-load loss alone already explains
// most of what the ladder solved in time lacks (5 stages, 5 pF junctions, light load).
func TestStraysAtLightLoad(t *testing.T) {
	c := Cascade{Peak: 3000, Frequency: 30e3, ForwardDrop: 6, Junction: 5e-12, BetweenColumns: 1e-12, ToGround: 1e-12}.Equal(5, 1e-9)
	s, err := c.NoLoadWithStrays()
	if err != nil {
		t.Fatal(err)
	}
	inTime := 24317.0200466
	if float64(s.Mean) < inTime {
		t.Errorf("without load %g, below %g under load", s.Mean, inTime)
	}
	ripple := float64(s.Maximum - s.Minimum)
	t.Logf("no load %g, ripple %g against 722.25 in time", s.Mean, ripple)
}
