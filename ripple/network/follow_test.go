package network

import (
	"math"
	"testing"

	"kilovet/hv/circuit"
)

// A period carried through with a small change of its start is the one walked from there: the
// instants of switching move as far, but for a fiftieth, and the diodes' currents, which begin
// and end at those instants, have the same peaks.
func TestCarriedThroughIsAsWalked(t *testing.T) {
	for _, name := range []string{"6 stages with filter and bias", "12 stages with strays"} {
		h := searched(t, examples()[name])
		for _, part := range []float64{1e-6, -2e-7} {
			carried, walked, unchanged := h.changed(t, part)
			off, moved := switchedApart(t, carried, walked), switchedApart(t, unchanged, walked)
			if !(off < moved/50) {
				t.Errorf("%s, changed by %g: instants off by %g of the period, of %g that they move", name, part, off, moved)
			}
			for i := range h.c.Elements {
				if e := &h.c.Elements[i]; e.Kind == circuit.Diode {
					alike(t, name+", peak of "+e.Name, float64(carried.Diode(e.Name).Peak), float64(walked.Diode(e.Name).Peak), 1e-4)
				}
			}
		}
	}
}

// searched is a search that has found the state.
func searched(t *testing.T, text string) *search {
	c := build(t, text)
	s, err := compile(c, &Options{})
	if err != nil {
		t.Fatal(err)
	}
	h := newSearch(newShooter(s))
	if _, err := h.solve(nil); err != nil {
		t.Fatal(err)
	}
	return h
}

// changed is the period from the state found made larger by a part of itself: carried
// through, walked, and as it was.
func (s *search) changed(t *testing.T, part float64) (carried, walked, unchanged *Periodic) {
	x := append([]float64(nil), s.x...)
	walk := func() *Periodic { return &Periodic{Circuit: s.c, track: s.walkedAnew(t)} }
	unchanged, carried = walk(), walk()
	s.enlarge(part)
	if !carried.track.follow(s.dq, s.di, s.lanes, bearing{math.Inf(1), 0.1}) {
		t.Fatal("not followed")
	}
	axpy(1, s.step, s.x)
	walked = walk()
	copy(s.x, x)
	return carried, walked, unchanged
}

// walkedAnew is the period from the state found, finely walked.
func (s *search) walkedAnew(t *testing.T) *track {
	s.pace.bounds, s.pace.smooth, s.pace.track = fine.bounds(), true, (&track{system: s.system}).reserve()
	if err := s.walk(); err != nil {
		t.Fatal(err)
	}
	return s.pace.track
}

// enlarge makes the step in hand a part of the state, and what that is of charges and currents.
func (s *search) enlarge(part float64) {
	copy(s.step, s.x)
	scaleBy(s.step, part)
	s.unpack(s.step, s.root, s.dq, s.di)
}

// switchedApart is the largest difference of the instants at which two periods switch, in periods.
func switchedApart(t *testing.T, a, b *Periodic) float64 {
	most, at := 0.0, [2][]float64{a.track.switchings(), b.track.switchings()}
	if len(at[0]) != len(at[1]) {
		t.Fatalf("%d switchings, %d", len(at[0]), len(at[1]))
	}
	for i, x := range at[0] {
		most = math.Max(most, math.Abs(x-at[1][i])/a.track.period)
	}
	return most
}

func (t *track) switchings() []float64 {
	var at []float64
	for k := range t.steps {
		if t.steps[k].event {
			at = append(at, t.steps[k].start+t.steps[k].length)
		}
	}
	return at
}
