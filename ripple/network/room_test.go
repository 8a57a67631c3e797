package network

import "testing"

// TestGivenMemoryIsLetGo: once a state is found, what the search still tries for the
// uncertainty is not written where another search may hold its factors.
func TestGivenMemoryIsLetGo(t *testing.T) {
	c := build(t, ladder{stages: 3, frequency: 20e3, peak: 1e3, capacitance: 1e-9, current: 1e-4}.describe())
	s, err := compile(c, &Options{})
	if err != nil {
		t.Fatal(err)
	}
	h := newSearch(newShooter(s))
	p, err := h.solve(nil)
	if err != nil {
		t.Fatal(err)
	}
	if len(p.track.room.free) == 0 || p.track.factors != nil {
		t.Fatalf("%d blocks were given, %d kept", len(p.track.room.free), len(p.track.factors))
	}
	mark := trio{r: -12345}
	for i := range h.pace.factor {
		h.pace.factor[i] = mark
	}
	for _, block := range p.track.room.free {
		for _, v := range block {
			if v == mark {
				t.Fatal("memory that was given is written")
			}
		}
	}
}

// A ladder whose values are others has the same pattern, found once; one with another part has
// its own, and the patterns found last are kept.
func TestPatternsAreFoundOnce(t *testing.T) {
	of := func(stages int, like *Periodic) *system {
		l := ladder{stages: stages, frequency: 20e3, peak: 1e3, capacitance: 1e-9 * float64(stages), current: 1e-4}
		s, err := compile(build(t, l.describe()), &Options{From: like})
		if err != nil {
			t.Fatal(err)
		}
		return s
	}
	p := steady(t, build(t, ladder{stages: 3, frequency: 20e3, peak: 1e3, capacitance: 1e-9, current: 1e-4}.describe()))
	if of(3, p).pattern != p.track.pattern {
		t.Error("the pattern of the same ladder was found again")
	}
	for stages := 4; stages < 4+2*mostFound; stages++ {
		s := of(stages, p)
		if s.pattern == p.track.pattern || s.pattern.n < p.track.pattern.n {
			t.Errorf("%d stages have the pattern of three", stages)
		}
		if of(stages, p).pattern != s.pattern {
			t.Errorf("the pattern of %d stages was not kept", stages)
		}
	}
	if len(p.track.room.found) != mostFound {
		t.Errorf("%d patterns are kept", len(p.track.room.found))
	}
}
