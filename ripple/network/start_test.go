package network

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/quantity"
)

// The rise against the independent simulation: within one period of the drive or
// 1 %, most within a hundredth of a period; peaks of the start within 3 %.
func TestStartAgainstSimulation(t *testing.T) {
	for _, r := range references(t) {
		p := steady(t, build(t, r.describe()))
		s, err := Start(p, StartOptions{Node: node(t, p.Circuit, "multiplier")})
		if err != nil {
			t.Errorf("%s: %v", r.ID, err)
			continue
		}
		got, want := float64(s.Reached), r.Results.Rise.Value
		if d := math.Abs(got - want); d > math.Max(1/r.Inputs.F, 0.01*want) {
			t.Errorf("%s: up after %g s, want %g s", r.ID, got, want)
		}
		r.compareStart(t, s)
	}
}

func (r *reference) compareStart(t *testing.T, s *Startup) {
	column := ""
	if r.Inputs.Topology == "symmetric" {
		column = ".a"
	}
	_, _, diodes := r.parts(column)
	for i, name := range diodes {
		d := s.Of(name)
		if v := float64(d.ReversePeak()); v > 1.001*r.Results.StartPiv.Value[i] || v < 0.8*r.Results.StartPiv.Value[i] {
			t.Errorf("%s %s reverse peak at start: %g, want not quite %g", r.ID, name, v, r.Results.StartPiv.Value[i])
		}
		near(t, r.ID+" "+name+" inrush", float64(d.Peak), r.Results.StartDiode.Value[i], 0.03)
	}
	near(t, r.ID+" source inrush", float64(s.Of("drive.source"+column).Peak), r.Results.StartSource.Value, 0.03)
}

// Sixty stages take sixteen thousand periods to come up; the work stays that of a
// few hundred.
func TestStartTakesFewPeriods(t *testing.T) {
	l := ladder{stages: 24, frequency: 50e3, peak: 1000, resistance: 100, capacitance: 1e-9, current: 1e-6, drop: 8, on: 50, leakage: "1 nA"}
	p := steady(t, build(t, l.describe()))
	s, err := Start(p, StartOptions{Node: node(t, p.Circuit, "multiplier")})
	if err != nil {
		t.Fatal(err)
	}
	if s.Reached < quantity.Time(2000/l.frequency) || s.Work.Periods > 250 {
		t.Errorf("up after %v with %d periods walked", s.Reached, s.Work.Periods)
	}
}

// What leaps pass over does not show: the rise, and the largest currents and voltages on the way,
// against every period walked. The first three are ladders of stiff diodes, whose charges a leap
// leaves wrong; in the last the period after a long leap is not to be foreseen.
func TestLeapsAgainstEveryPeriod(t *testing.T) {
	for i, l := range []ladder{
		{stages: 4, resistance: 3.45, capacitance: 3.373e-9, current: 1.295e-4, drop: 3.64, on: 1.153, leakage: "1 nA"},
		{stages: 4, resistance: 4.365, capacitance: 1.2437e-9, drop: 4.024, on: 11.15, leakage: "1 nA"},
		{stages: 7, resistance: 20.79, capacitance: 3.293e-9, current: 8.329e-4, drop: 2.5, on: 1.2767, leakage: "1 nA"},
		{stages: 6, resistance: 600, capacitance: 2.2e-9, current: 1e-4, drop: 8, on: 50, leakage: "1 nA"},
		{stages: 5, resistance: 50, capacitance: 1e-9, current: 1e-5, drop: 8, on: 300, leakage: "1 nA"},
		{stages: 18, resistance: 600, capacitance: 2.2e-9, current: 4e-5, drop: 8, on: 50, leakage: "1 nA"},
	} {
		l.frequency, l.peak = 50e3, 1000
		p := steady(t, build(t, l.describe()))
		o := StartOptions{Node: node(t, p.Circuit, "multiplier")}
		got, err := Start(p, o)
		o.every = true
		want, err2 := Start(p, o)
		if err != nil || err2 != nil {
			t.Fatal(err, err2)
		}
		if 3*got.Work.Periods > 2*want.Work.Periods {
			t.Errorf("ladder %d: %d periods walked of %d", i, got.Work.Periods, want.Work.Periods)
		}
		if d := math.Abs(float64(got.Reached - want.Reached)); d > math.Max(1.1/l.frequency, 0.005*float64(want.Reached)) {
			t.Errorf("ladder %d: up %.2f periods off", i, d*l.frequency)
		}
		for _, e := range p.Circuit.Elements {
			if a, b := float64(got.Of(e.Name).Peak), float64(want.Of(e.Name).Peak); math.Abs(a-b) > 0.01*b {
				t.Errorf("ladder %d: %s has %g, walked through %g", i, e.Name, a, b)
			}
			a, b := got.Of(e.Name), want.Of(e.Name)
			if low, high := math.Abs(float64(a.Least-b.Least)), math.Abs(float64(a.Greatest-b.Greatest)); math.Max(low, high) > 0.01*2000 {
				t.Errorf("ladder %d: %s goes from %v to %v, walked from %v to %v", i, e.Name, a.Least, a.Greatest, b.Least, b.Greatest)
			}
		}
	}
}

// With the period that passes after it a leap ends before what is known to lie beyond, whatever
// the voltages foretell: else it would be taken again and again.
func TestLeapsEndBeforeWhatLiesBeyond(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		periods := math.Floor(rapid.Float64Range(0, 1e4).Draw(t, "periods"))
		f := foothold{periods: periods, beyond: periods + math.Floor(rapid.Float64Range(2, 500).Draw(t, "beyond"))}
		level := rapid.Float64Range(1, 1e5).Draw(t, "level")
		f.below, f.above = level*rapid.Float64Range(0, 1).Draw(t, "below"), level*rapid.Float64Range(1, 2).Draw(t, "above")
		if leap := f.reach(math.Inf(1), level); leap < 1 || leap > 1 && periods+leap+1 >= f.beyond {
			t.Errorf("a leap of %g from %g ends beyond %g", leap, periods, f.beyond)
		}
	})
}

// Periods to 95 % of the no-load output, equal capacitors, ideal source, every pulse
// levelling what it joins: 40.5, 72.5, 162.5, 288.5 for 3, 4, 6, 8 stages. Derived by
// an independent simulation for a square wave; a sine within a quarter of a period.
func TestStartOfUnloadedLadders(t *testing.T) {
	for n, want := range map[int]float64{1: 4.5, 2: 17.5, 3: 40.5, 4: 72.5, 5: 112.5, 6: 162.5, 8: 288.5} {
		l := ladder{stages: n, frequency: 50e3, peak: 1000, capacitance: 1e-9, on: 1}
		p := steady(t, build(t, l.describe()))
		s, err := Start(p, StartOptions{Node: node(t, p.Circuit, "multiplier")})
		if err != nil {
			t.Errorf("%d stages: %v", n, err)
			continue
		}
		if got := float64(s.Reached) * l.frequency; math.Abs(got-want) > 1 {
			t.Errorf("%d stages: up after %.2f periods, want %g", n, got, want)
		}
	}
}

// A slow ramp puts the rise where the drive passes 95 %.
func TestRamp(t *testing.T) {
	l := ladder{stages: 2, frequency: 50e3, peak: 1000, capacitance: 1e-9, current: 1e-5, on: 20}
	p := steady(t, build(t, l.describe()))
	s, err := Start(p, StartOptions{Node: node(t, p.Circuit, "multiplier"), Ramp: 0.1})
	if err != nil {
		t.Fatal(err)
	}
	if d := float64(s.Reached)/0.095 - 1; math.Abs(d) > 0.01 {
		t.Errorf("up after %v on a ramp of 100 ms", s.Reached)
	}
	// Behind a stiff source the first capacitor takes the source's own voltage.
	if v := s.Of("drive.source").Greatest; v < 0.9*1000 || v > 1000 {
		t.Errorf("the source reached %v on its ramp to 1 kV", v)
	}
	if i := s.Of("drive.source").Peak; i > 2*s.Of("multiplier.diode.1").Peak {
		t.Errorf("the source gave %v, the first diode took %v", i, s.Of("multiplier.diode.1").Peak)
	}
	inrush, err := Start(p, StartOptions{Node: node(t, p.Circuit, "multiplier")})
	if err != nil {
		t.Fatal(err)
	}
	if name := "multiplier.diode.1"; s.Of(name).Peak > inrush.Of(name).Peak/2 {
		t.Errorf("inrush %v with a ramp, %v without", s.Of(name).Peak, inrush.Of(name).Peak)
	}
}
