package network

import "testing"

// The work of a periodic state: periods, steps, factorisations and carried changes,
// and its growth from 12 to 60 stages, at most with the square of the stages.
func TestWork(t *testing.T) {
	e := examples()
	cost := func(name string, periods, steps int) float64 {
		w := steady(t, build(t, e[name])).Work
		if w.Periods > periods || w.Steps > steps*w.Periods || w.Factorisations > 5*w.Steps || w.Products > 15*w.Periods {
			t.Errorf("%s: %+v", name, w)
		}
		each := float64(w.Steps) / float64(w.Periods)
		return (float64(w.Factorisations) + float64(w.Products)*each) * float64(w.Unknowns)
	}
	cost("6 stages with filter and bias", 15, 150)
	twelve := cost("12 stages with strays", 15, 200)
	sixty := cost("60 stages with strays", 15, 900)
	if growth := sixty / twelve; growth > 25*1.3 {
		t.Errorf("from 12 to 60 stages the work grew by %.3g", growth)
	}
}

// Neither a step nor a change carried through the period allocates.
func TestInnerLoopsAllocateNothing(t *testing.T) {
	c := build(t, examples()["12 stages with strays"])
	f := float64(Drive(c))
	s, err := newSystem(c, f, smallestLeak*f, nil)
	if err != nil {
		t.Fatal(err)
	}
	h := newShooter(s)
	h.guess(0)
	h.pace.bounds = fine.bounds()
	if err := h.walk(); err != nil {
		t.Fatal(err)
	}
	x := append([]float64(nil), h.r...)
	if n := testing.AllocsPerRun(20, func() { h.minus(h.pace.track, x) }); n != 0 {
		t.Errorf("carrying a change allocates %g times", n)
	}
	w := h.pace.walker
	step := s.period / 1000
	if n := testing.AllocsPerRun(50, func() {
		w.try(step)
		w.crossing()
		w.roughness()
		w.accept(step)
	}); n != 0 {
		t.Errorf("a step allocates %g times", n)
	}
}

// A neighbour starts the search nearer.
func TestWarmStart(t *testing.T) {
	cold := steady(t, build(t, examples()["12 stages with strays"]))
	warm, err := Steady(cold.Circuit, Options{From: cold})
	if err != nil {
		t.Fatal(err)
	}
	if warm.Work.Periods >= cold.Work.Periods {
		t.Errorf("%d periods from the state itself, %d from nothing", warm.Work.Periods, cold.Work.Periods)
	}
}
