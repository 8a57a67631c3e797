package cascade

import (
	"math"
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

func refused(t *testing.T, c Cascade, load quantity.Current) {
	t.Helper()
	s, err := c.Loaded(load)
	if l := lack.Of(err); l == nil || l.Kind != lack.Outside {
		t.Errorf("%g A: %v, %v; want a lack outside the model", load, s.Output, err)
	}
}

func TestRefusesWhatIsNoCascade(t *testing.T) {
	good := Cascade{Peak: 2000, Frequency: 3e4, ForwardDrop: 5}.WithEqual(3, 1e-9)
	if _, err := good.Loaded(1e-5); err != nil {
		t.Fatal(err)
	}
	for name, spoil := range map[string]func(*Cascade){
		"no stages":            func(c *Cascade) { *c = c.WithEqual(0, 1e-9) },
		"one list short":       func(c *Cascade) { c.Coupling = c.Coupling[:2] },
		"no capacitance":       func(c *Cascade) { c.Smoothing[1] = 0 },
		"negative capacitance": func(c *Cascade) { c.Coupling[1] = -1e-9 },
		"no frequency":         func(c *Cascade) { c.Frequency = 0 },
		"no drive":             func(c *Cascade) { c.Peak = 0 },
		"not a number":         func(c *Cascade) { c.Peak = quantity.Voltage(math.NaN()) },
		"without end":          func(c *Cascade) { c.Frequency = quantity.Frequency(math.Inf(1)) },
		"diodes eat the drive": func(c *Cascade) { c.ForwardDrop = 2000 },
		"negative drop":        func(c *Cascade) { c.ForwardDrop = -1 },
		"drop not a number":    func(c *Cascade) { c.ForwardDrop = quantity.Voltage(math.NaN()) },
	} {
		c := good.WithEqual(3, 1e-9)
		spoil(&c)
		t.Run(name, func(t *testing.T) {
			refused(t, c, 1e-5)
			if v, err := c.NoLoad(); lack.Of(err) == nil {
				t.Errorf("without load %g", v)
			}
		})
	}
	refused(t, good, -1e-6)
	refused(t, good, quantity.Current(math.NaN()))
	refused(t, good, quantity.Current(math.Inf(1)))
}

// Each limit answers just inside and refuses just outside.
func TestLimitsOfTheLoad(t *testing.T) {
	one := Cascade{Peak: 1000, Frequency: 1000}.WithEqual(1, 1e-9)                      // swing 0.3 at 0.3 mA
	many := Cascade{Peak: 1000, Frequency: 1000}.WithEqual(8, 1e-8)                     // drop 0.6 at 0.2556 mA
	twins := Cascade{Symmetrical: true, Peak: 1000, Frequency: 1000}.WithEqual(4, 1e-9) // swing 0.0375
	square := many
	square.Square = true
	drop := func(c Cascade) quantity.Current { return quantity.Current(0.6 * 16000 / float64(c.climb(1).Drop())) }
	for _, r := range []struct {
		c    Cascade
		edge quantity.Current
	}{{one, 0.3e-3}, {many, drop(many)}, {twins, 0.3e-3 / 8}, {square, drop(square)}} {
		if _, err := r.c.Loaded(r.edge * 0.999); err != nil {
			t.Errorf("below the limit: %v", err)
		}
		refused(t, r.c, r.edge*1.001)
	}
}

// One small capacitor half way up takes the whole voltage of the top stages while
// drop and swing are still within their limits.
func TestNoCapacitorEmpties(t *testing.T) {
	c := Cascade{Peak: 1000, Frequency: 1000}.WithEqual(10, 1e-5)
	c.Smoothing[4] = 1e-9
	s := c.climb(0.39e-3)
	if s.Drop() > LargestDrop*s.NoLoad || c.swing(0.39e-3) > c.largestSwing() || s.Smoothing[9].Maximum > 0 {
		t.Fatal("another limit refuses this one")
	}
	refused(t, c, 0.39e-3)
}

func TestSquareDriveNeedsEqualCapacitors(t *testing.T) {
	c := Cascade{Peak: 1000, Frequency: 1e4, Square: true}.WithEqual(3, 1e-9)
	c.Coupling[0] = 2e-9
	refused(t, c, 1e-6)
	if _, err := c.Supply(); lack.Of(err) == nil {
		t.Error("a line was given")
	}
	if _, err := c.NoLoad(); err != nil {
		t.Errorf("the no-load voltage does not depend on the capacitors: %v", err)
	}
}

func TestPeakNeeded(t *testing.T) {
	c := Cascade{Peak: 1, Frequency: 3e4, ForwardDrop: 0.5}.WithEqual(4, 1e-9)
	c.Peak = 2000
	s, err := c.Loaded(2e-4)
	if err != nil {
		t.Fatal(err)
	}
	peak, err := c.PeakNeeded(s.Output.Mean, 2e-4)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "peak", float64(peak), 2000, 1e-9)
	idle, _ := c.PeakNeeded(s.Output.Mean, 0)
	near(t, "without load", float64(idle), float64(s.Output.Mean)/8+0.5, 1e-9)
	for _, v := range []quantity.Voltage{0, -100, quantity.Voltage(math.NaN())} {
		if _, err := c.PeakNeeded(v, 2e-4); lack.Of(err) == nil {
			t.Errorf("an answer for %g V", v)
		}
	}
	if _, err := c.PeakNeeded(100, 2e-4); lack.Of(err) == nil {
		t.Error("100 V at a load that drops far more: an answer")
	}
}

func TestStagesForMostOutputNeedsALoad(t *testing.T) {
	c := naidu()
	for _, i := range []quantity.Current{0, 1e-18, -1, 1} {
		if _, err := c.StagesForMostOutput(i); lack.Of(err) == nil {
			t.Errorf("%g A: an answer", i)
		}
	}
	c.Smoothing[2] *= 2
	if _, err := c.StagesForMostOutput(5e-3); lack.Of(err) == nil {
		t.Error("unequal capacitors: an answer")
	}
}

func TestTextbookDropIsHalfWave(t *testing.T) {
	c := naidu()
	c.Symmetrical = true
	if _, err := c.TextbookDrop(1e-3); lack.Of(err) == nil {
		t.Error("symmetrical: an answer")
	}
}
