package cascade

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Periods to a fraction of the no-load output, equal capacitors, ideal square
// source, by simulation in time (own computation, derived). The second column is
// 1 − 1/e, 63.2 %.
func TestPeriodsToRise(t *testing.T) {
	fractions := []float64{0.50, 1 - 1/math.E, 0.90, 0.95, 0.99}
	for n, row := range map[int][]float64{
		1: {0.5, 1.5, 3.5, 4.5, 6.5},
		2: {3.5, 5.5, 13.5, 17.5, 28.5},
		3: {7.5, 11.5, 30.5, 40.5, 63.5},
		4: {12.5, 20.5, 54.5, 72.5, 113.5},
		5: {19.5, 32.5, 84.5, 112.5, 177.5},
		6: {28.5, 46.5, 122.5, 162.5, 256.5},
		8: {50.5, 82.5, 217.5, 288.5, 455.5},
	} {
		c := Cascade{Peak: 1000, Frequency: 1e4}.WithEqual(n, 1e-9)
		for i, want := range row {
			got, err := c.RisePeriods(fractions[i])
			if err != nil || math.Abs(got-want) > 1e-9 {
				t.Errorf("%d stages to %g: %g, %v, want %g", n, fractions[i], got, err, want)
			}
		}
	}
}

// K. Zhou, handout Electromagnetism VII, problem 1(a) (read): the output of a
// doubler after 1, 2, 3, 4 periods is 1, 1.5, 1.75, 1.875 times the peak; two
// stages: 1, 1.5, 1.875, 2.1875 (own computation).
func TestFirstPeriods(t *testing.T) {
	for _, r := range []struct {
		stages int
		want   []quantity.Voltage
	}{{1, []quantity.Voltage{1, 1.5, 1.75, 1.875}}, {2, []quantity.Voltage{1, 1.5, 1.875, 2.1875}}} {
		l := Cascade{Peak: 1, Frequency: 1}.WithEqual(r.stages, 1).discharged()
		for k, want := range r.want {
			l.negative()
			l.positive()
			if !quantity.Equal(l.output(), want) {
				t.Errorf("%d stages, period %d: %g, want %g", r.stages, k+1, l.output(), want)
			}
		}
	}
}

// Rise of ladders under load solved in time by an independent simulation: a light
// load hardly matters, the drive there begins with the other half-period.
func TestRiseAgainstLaddersSolvedInTime(t *testing.T) {
	for _, r := range []struct {
		c    Cascade
		want float64
	}{
		{Cascade{Peak: 5000, Frequency: 1000}.WithEqual(2, 10e-9), 0.0182075808711},
		{Cascade{Peak: 5000, Frequency: 50, ForwardDrop: 10}.WithEqual(12, 50e-9), 12.9245789511},
		{Cascade{Peak: 5000, Frequency: 50e3, ForwardDrop: 10}.WithEqual(12, 1e-9), 0.0128047254335},
		{Cascade{Peak: 3000, Frequency: 60e3, ForwardDrop: 6}.WithEqual(8, 1e-9), 0.00468737388702},
	} {
		got, err := r.c.RiseTime(0.95)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "95 %", float64(got), r.want, 0.06)
	}
}

// Whatever the capacitors, the cascade ends at its no-load voltage and on the way
// up neither falls nor exceeds it.
func TestRisesToTheNoLoadVoltage(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		c := anyCascade(t)
		l, before := c.discharged(), quantity.Voltage(0)
		noLoad, _ := c.NoLoad()
		for range 40 * c.Stages() * c.Stages() * 10 {
			l.negative()
			l.positive()
			now := l.output()
			if now > noLoad*(1+1e-9) || now < before-noLoad*1e-9 {
				t.Fatalf("%g after %g of %g", now, before, noLoad)
			}
			before = now
		}
		if before < noLoad*0.999 {
			t.Errorf("came to %g of %g", before, noLoad)
		}
	})
}

func TestRiseRefuses(t *testing.T) {
	c := Cascade{Peak: 1000, Frequency: 1e4}.WithEqual(3, 1e-9)
	for _, f := range []float64{0, 1, -0.5, 2, math.NaN()} {
		if _, err := c.RisePeriods(f); lack.Of(err) == nil {
			t.Errorf("fraction %g: an answer", f)
		}
	}
	slow := c.WithEqual(3, 1e-9)
	slow.Coupling[0] = 1e-16
	if _, err := slow.RisePeriods(0.95); lack.Of(err) == nil || lack.Of(err).Kind != lack.NotReached {
		t.Errorf("a cascade that hardly rises: %v", err)
	}
	c.Symmetrical = true
	if _, err := c.RisePeriods(0.95); lack.Of(err) == nil {
		t.Error("symmetrical: an answer")
	}
}
