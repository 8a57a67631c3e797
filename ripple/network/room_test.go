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
