package field

import (
	"math"
	"slices"

	"kilovet/hv/lack"
)

const (
	rounds = 8 // of refinement, at most

	// Parts of the field on a panel that the last two terms of its Legendre series
	// may hold: where an electrode has its peak, on natural boundaries, at kinks,
	// elsewhere, and on interfaces.
	// The error is at most about as large, at the ends of a panel.
	peakTail      = 3e-4
	naturalTail   = 1e-3
	kinkTail      = 1e-3
	tailLimit     = 4e-3
	interfaceTail = 8e-3
	// nearPeak is the part of its electrode's peak from which a panel counts as there.
	nearPeak = 0.7
	// faint is the field, relative to the strongest away from sharp edges, below
	// which it need not be resolved on its own.
	faint = 1e-3
	// nearSharp is the distance from a sharp edge, in units of the model, below which
	// a field does not count as a peak; and 1/wide the length of a panel from which it
	// counts in full for what is strong in the figure.
	nearSharp = 0.01
	wide      = 10
	// noise is the error of potentials, relative to one volt, that the quadrature and
	// panels elsewhere leave: on a short panel it looks like a field.
	noise = 2e-8
	// peakChange is what the last refinement may change of an electrode's peak.
	peakChange = 5e-4
	// mostCuts bounds the cuts of one panel in one round.
	mostCuts = 12
	// mostExcess bounds what a first, poor solution may ask for towards a kink.
	mostExcess = 50
	// reached is how many times the length of the last panel its error is felt.
	reached = 64
	// smooths is what halving takes off the excess on a smooth wall, at least.
	smooths = 30
)

// adapt goes on from a division and divides panels until the unknowns are resolved on every one and the peaks
// stay, and returns the last two solutions: the difference tells what the last
// division has changed.
func (s *solver) adapt(panels []*panel) (coarse, fine *solved, err error) {
	var before, now []float64
	for range rounds {
		coarse, before = fine, now
		if fine, err = s.solve(panels); err != nil {
			return nil, nil, err
		}
		wants := s.wants(fine)
		now = s.peaks(fine)
		limit := s.aim
		switch largest := most(wants); {
		case largest == 0: // nothing to resolve, as in a uniform field
			return fine, fine, fine.checkBounds()
		case largest <= s.aim:
			if s.aim > float64(Fine) {
				return fine, fine, fine.checkBounds() // nobody asks by how much it is off
			}
			if coarse != nil && settled(before, now) {
				return coarse, fine, fine.checkBounds()
			}
			limit = few(wants) // one refinement more, to see what it changes
		}
		panels = s.refine(fine.panels, wants, limit)
	}
	return nil, nil, lack.Failed("the field is not resolved after %d refinements", rounds)
}

// settled reports whether no peak has changed by more than the accuracy aimed at.
func settled(before, now []float64) bool {
	for i := range now {
		if math.Abs(now[i]-before[i]) > peakChange*now[i] {
			return false
		}
	}
	return true
}

// peaks are the greatest fields on all electrodes away from their sharp edges, for
// each group in turn; those too faint to be judged are left at nothing.
func (s *solver) peaks(v *solved) (list []float64) {
	for g := range s.groups {
		peaks, strongest := make([]float64, len(s.names)), 0.0
		for i := range v.sides {
			k := s.walls[v.sides[i].wall].electrode
			if k < 0 {
				continue
			}
			peaks[k] = math.Max(peaks[k], s.peak(v.sides[i].panel, &v.q[g][i]))
			strongest = math.Max(strongest, peaks[k])
		}
		for k := range peaks {
			if peaks[k] < faint*strongest {
				peaks[k] = 0
			}
		}
		list = append(list, peaks...)
	}
	return list
}

// peak on a panel away from sharp edges.
func (s *solver) peak(p *panel, q *nodal) (most float64) {
	const points = 24
	from, to := s.away(p, nearSharp)
	for i := 0; i <= points && from < to; i++ {
		b := s.basis(from + (to-from)*float64(i)/points)
		most = math.Max(most, math.Abs(b.dot(q)))
	}
	return most
}

// few is the excess above which lie the poorest tenth of the panels, two at least.
func few(wants map[*panel]want) float64 {
	var all []float64
	for _, w := range wants {
		all = append(all, w.excess)
	}
	slices.Sort(all)
	k := max(len(all)-max(2, len(all)/10), 0)
	return math.Max(all[k]*(1-1e-9), all[len(all)-1]/20)
}

func most(wants map[*panel]want) (largest float64) {
	for _, w := range wants {
		largest = math.Max(largest, w.excess)
	}
	return largest
}

// refine cuts the panels whose excess is above a limit.
func (s *solver) refine(panels []*panel, wants map[*panel]want, limit float64) (out []*panel) {
	for _, p := range panels {
		w := wants[p]
		out = append(out, s.cutOften(p, w.excess/limit, w.toEnd, mostCuts)...)
	}
	return out
}

// cutOften cuts a panel, and the piece on the side where it is poor again: at a kink
// every cut takes only the factor of grading off the excess, at an irregular end
// nothing, so that it is cut to the last.
func (s *solver) cutOften(p *panel, excess float64, toEnd bool, cuts int) []*panel {
	if excess <= 1 || cuts == 0 || s.finest(p) {
		return []*panel{p}
	}
	a, b := s.cut(p)
	rest := excess / smooths
	switch left, right := s.grades(p); {
	case left && !right:
		rest, toEnd = min(excess, mostExcess)*s.kept(p, 0), false
	case right && !left:
		rest, toEnd = min(excess, mostExcess)*s.kept(p, 1), true
	}
	if toEnd {
		return append([]*panel{a}, s.cutOften(b, rest, toEnd, cuts-1)...)
	}
	return append(s.cutOften(a, rest, toEnd, cuts-1), b)
}

// kept is the part of the excess that a cut towards an end of a wall leaves.
func (s *solver) kept(p *panel, k int) float64 {
	if s.walls[p.wall].ends[k].irregular {
		return 1
	}
	return grade
}

// finest reports whether a panel lies so near an irregular end that nothing is
// gained by cutting it: the last panel of grading, the one beside it, which shows
// what the last cannot hold, and those farther off that are shorter than grading
// makes them.
func (s *solver) finest(p *panel) bool {
	w := &s.walls[p.wall]
	for k, before := range []float64{p.start, w.curve.length - p.start - p.h} {
		floor := floorOf(w.ends[k])
		last := before <= 1e-9*p.h && p.h <= floor
		beside := before > 1e-9*p.h && (before <= floor || before <= reached*floor && p.h <= before)
		if w.ends[k].graded() && (last || beside) {
			return true
		}
	}
	return false
}
