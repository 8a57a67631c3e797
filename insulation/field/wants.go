package field

import "math"

// want says how much more than allowed the last terms of q and du/ds hold of the
// field on a panel, and whether towards its end or its start.
type want struct {
	excess float64
	toEnd  bool
}

// wants lists what every panel wants, the most over its sides and the groups.
func (s *solver) wants(v *solved) map[*panel]want {
	wants := map[*panel]want{}
	for g := range s.groups {
		at, peaks, strongest := s.strengths(v, g)
		if strongest == 0 { // the earthed mirror plane has no panels
			continue
		}
		for i := range v.sides {
			sd := &v.sides[i]
			if s.finest(sd.panel) {
				continue
			}
			w := s.tail(sd, &v.u[g][i], &v.q[g][i])
			w.excess = math.Max(0, w.excess-noise/sd.panel.h)
			w.excess /= math.Max(s.measure(sd, at[i], &v.q[g][i]), faint*strongest) * s.allowed(sd, at[i], peaks)
			if before, known := wants[sd.panel]; !known || w.excess > before.excess {
				wants[sd.panel] = w
			}
		}
	}
	return wants
}

// tail is the size of the last two terms of the Legendre series of q and du/ds, and
// the end at which they have the same sign as each other.
func (s *solver) tail(sd *side, u, q *nodal) want {
	last, before := s.legendre[order-1].dot(q), s.legendre[order-2].dot(q)
	w := want{math.Hypot(last, before), last*before > 0}
	if sd.u >= 0 {
		last, before = s.legendre[order-1].dot(u), s.legendre[order-2].dot(u)
		if slope := math.Hypot(last, before) * order * order / sd.panel.h; slope > w.excess {
			w = want{slope, last*before > 0}
		}
	}
	return w
}

// strengths are the largest field at the nodes of every side; away from sharp edges
// that on every electrode; and a measure of what is strong in the figure, in which
// short panels count less: near a sharp edge the field rises with their shortness.
func (s *solver) strengths(v *solved, g int) (at []float64, peaks map[int]float64, strongest float64) {
	at, peaks, strongest = make([]float64, len(v.sides)), map[int]float64{}, 0.0
	for i := range v.sides {
		sd := &v.sides[i]
		at[i] = s.strongest(sd, &v.u[g][i], &v.q[g][i])
		if k := s.walls[sd.wall].electrode; !s.atSharp(sd.panel) {
			strongest = math.Max(strongest, at[i]*math.Sqrt(math.Min(1, wide*sd.panel.h)))
			peaks[k] = math.Max(peaks[k], at[i])
		}
	}
	return at, peaks, strongest
}

// measure is the field that the tail of a side is held against: the largest there, or
// towards a kink, beyond which it may be much less, that at the kink.
func (s *solver) measure(sd *side, at float64, q *nodal) float64 {
	if s.walls[sd.wall].kind != conductor || !s.atKink(sd.panel) {
		return at
	}
	end := &s.fineRule[0]
	if left, _ := s.grades(sd.panel); !left {
		end = &s.fineRule[finePoints-1]
	}
	return math.Max(at/10, math.Abs(end.basis.dot(q)))
}

// allowed is the tail a side may have.
func (s *solver) allowed(sd *side, at float64, peaks map[int]float64) float64 {
	switch w := &s.walls[sd.wall]; {
	case w.kind == natural:
		return naturalTail
	case w.kind == interfaces:
		return interfaceTail
	case w.kind == conductor && at >= nearPeak*peaks[w.electrode] && !s.atSharp(sd.panel):
		return peakTail
	case w.kind == conductor && s.atKink(sd.panel):
		return kinkTail
	}
	return tailLimit
}

// strongest field at the nodes of a side.
func (s *solver) strongest(sd *side, u, q *nodal) (most float64) {
	for i := range order {
		most = math.Max(most, math.Hypot(q[i], s.slope[i].dot(u)*2/sd.panel.h))
	}
	return most
}

// atSharp reports whether a panel lies near a sharp edge.
func (s *solver) atSharp(p *panel) bool {
	w := &s.walls[p.wall]
	near := func(e end, distance float64) bool { return (e.sharp || e.beside) && distance < nearSharp }
	return near(w.ends[0], p.start) || near(w.ends[1], w.curve.length-p.start-p.h)
}

// atKink reports whether a panel ends where the curvature jumps.
func (s *solver) atKink(p *panel) bool {
	left, right := s.grades(p)
	w := &s.walls[p.wall]
	return left && w.ends[0].kink || right && w.ends[1].kink
}
