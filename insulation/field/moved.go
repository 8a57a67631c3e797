package field

import (
	"maps"
	"slices"
)

// Moved is the field of an arrangement whose outlines are those of this one with other
// lengths: a little other, and it is solved once on the division of this one, so that what
// the division lacks is the same in both and their difference is that of the lengths. Where
// walls have come or gone, or are divided otherwise, it is solved as Solve does, with that
// aim. What lies between panels that have not moved is kept.
func (s *Solution) Moved(a Arrangement, aim Aim) (*Solution, error) {
	return s.moved(a, aim, func(next *solver, panels []*panel) (*Solution, error) {
		v, err := next.solve(panels)
		if err != nil {
			return nil, err
		}
		return &Solution{solver: next, coarse: v, fine: v}, v.checkBounds()
	})
}

// MovedFar is Moved for lengths that may be much other: the division is refined where that
// aim needs it.
func (s *Solution) MovedFar(a Arrangement, aim Aim) (*Solution, error) {
	return s.moved(a, aim, (*solver).solution)
}

func (s *Solution) moved(a Arrangement, aim Aim, solve func(*solver, []*panel) (*Solution, error)) (*Solution, error) {
	m, err := newModel(&a, s.resistive)
	if err != nil {
		return nil, err
	}
	if s.resistive {
		if err := m.held(); err != nil {
			return nil, err
		}
	}
	if !slices.EqualFunc(s.walls, m.walls, alike) {
		return m.solution(aim)
	}
	next := newSolver(m)
	next.made, next.aim = s.made, float64(aim)
	if next.mirrored == s.mirrored && next.parity == s.parity && same(next.mirrorZ, s.mirrorZ) {
		next.blocks = maps.Clone(s.blocks)
	}
	panels := make([]*panel, len(s.fine.panels))
	for i, p := range s.fine.panels {
		panels[i] = next.carried(p, &s.walls[p.wall].curve)
	}
	return solve(next, panels)
}

// alike reports whether two walls can be divided in the same way.
func alike(a, b wall) bool {
	return a.kind == b.kind && a.edge == b.edge && a.left == b.left && a.right == b.right &&
		a.electrode == b.electrode && a.group == b.group && (a.curve.radius > 0) == (b.curve.radius > 0) &&
		a.ends[0].like(b.ends[0]) && a.ends[1].like(b.ends[1])
}

// like reports whether the panels at two ends are graded in the same way.
func (e end) like(other end) bool {
	return e.irregular == other.irregular && e.sharp == other.sharp && e.beside == other.beside && e.kink == other.kink
}

// carried is a panel at the same part of its wall, and the same panel where that has not
// moved.
func (s *solver) carried(p *panel, from *curve) *panel {
	to := &s.walls[p.wall].curve
	if *to == *from {
		return p
	}
	scale := to.length / from.length
	return s.panel(p.wall, p.start*scale, p.h*scale)
}

// same length, in units of a model.
func same(a, b float64) bool { return a-b <= 1e-15 && b-a <= 1e-15 }
