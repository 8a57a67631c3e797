package field

import (
	"math"
)

const (
	grade      = 0.2         // next panel's length towards an irregular end, relative
	nearness   = 1.5         // a panel is no longer than this times its distance to an irregular point
	bend       = math.Pi / 2 // most an arc panel turns
	longRadius = 5           // a natural boundary's panel spans radii up to this ratio
	precision  = 1e-5        // what may be lost where grading stops
	shortest   = 1e-7        // no panel is shorter, or rounding would show
	coarsest   = 2e-4        // length at which it stops, at most
	kinkFloor  = 1e-5        // where grading towards a jump of curvature stops
)

// feature is a point near which the field changes fast.
type feature struct {
	at    complex128
	floor float64 // no panel need be shorter
}

// floorOf is the length at which grading towards an irregular end stops: what is
// lost beyond goes with the length to twice the exponent of the potential.
func floorOf(e end) float64 {
	if !e.irregular {
		return kinkFloor
	}
	return math.Max(shortest, math.Min(coarsest, math.Pow(precision, 1/(2*e.slowest))))
}

// firstFloor is the same for the first division.
func firstFloor(e end) float64 { return math.Max(shortest, math.Pow(1e-2, 1/(2*e.slowest))) }

// features lists the irregular points of the model.
func (m *model) features() (list []feature) {
	for _, w := range m.walls {
		for k, e := range w.ends {
			if e.irregular {
				at, _ := w.curve.at(float64(k) * w.curve.length)
				list = append(list, feature{at, floorOf(e)})
			}
		}
	}
	return list
}

// firstMesh divides the walls by geometry alone: arcs by their bend, everything by
// its distance to irregular points, with panels graded towards those.
func (s *solver) firstMesh() (mesh []*panel) {
	features := s.features()
	for i := range s.walls {
		mesh = append(mesh, s.divide(s.panel(i, 0, s.walls[i].curve.length), features)...)
	}
	return mesh
}

func (s *solver) panel(wall int, start, h float64) *panel {
	s.made++
	return newPanel(s.made, wall, &s.walls[wall].curve, start, h, s.quadrature)
}

// divide cuts a panel until its pieces are fit.
func (s *solver) divide(p *panel, features []feature) []*panel {
	if s.made > 4*maxPanels || !s.unfit(p, features) {
		return []*panel{p}
	}
	a, b := s.cut(p)
	return append(s.divide(a, features), s.divide(b, features)...)
}

// cut divides a panel: near its irregular end, else in halves.
func (s *solver) cut(p *panel) (a, b *panel) {
	at := 0.5
	switch left, right := s.grades(p); {
	case left && !right:
		at = grade
	case right && !left:
		at = 1 - grade
	}
	return s.panel(p.wall, p.start, p.h*at), s.panel(p.wall, p.start+p.h*at, p.h*(1-at))
}

// grades says at which ends of a panel its wall has an irregular end or a kink.
func (s *solver) grades(p *panel) (left, right bool) {
	w := &s.walls[p.wall]
	first := p.start == 0
	last := p.start+p.h >= w.curve.length*(1-1e-9)
	return first && w.ends[0].graded(), last && w.ends[1].graded()
}

// unfit reports whether geometry alone says that a panel is too long.
func (s *solver) unfit(p *panel, features []feature) bool {
	w := &s.walls[p.wall]
	left, right := s.grades(p)
	switch {
	case p.h*math.Abs(w.curve.bending) > bend*1.01,
		left && right,
		left && w.ends[0].irregular && p.h > firstFloor(w.ends[0]),
		right && w.ends[1].irregular && p.h > firstFloor(w.ends[1]):
		return true
	}
	if a, b := s.radii(p); w.kind == natural && a > 1e-9 && b > longRadius*a {
		return true
	}
	for _, f := range features {
		if d := p.distance(f.at); d > 1e-9 && p.h > s.reach(w, f)*math.Max(d, f.floor) {
			return true
		}
	}
	return s.besideSmall(p)
}

// besideSmall reports whether a panel is much longer than a wall nearby and the
// distance to it.
func (s *solver) besideSmall(p *panel) bool {
	for i := range s.walls {
		c := &s.walls[i].curve
		if i == p.wall || s.walls[i].kind == natural || p.h <= nearness*c.length {
			continue
		}
		middle, _ := c.at(c.length / 2)
		if p.h > nearness*(c.length+p.distance(middle)) {
			return true
		}
	}
	return false
}

// radii are those of the two ends of a panel, the smaller one first.
func (s *solver) radii(p *panel) (small, large float64) {
	a, _ := p.at(-1)
	b, _ := p.at(1)
	return min(real(a), real(b)), max(real(a), real(b))
}

// reach is how many times its distance to a feature a panel may be long: more along
// a wall that ends there, where grading makes it so.
func (s *solver) reach(w *wall, f feature) float64 {
	from, _ := w.curve.at(0)
	to, _ := w.curve.at(w.curve.length)
	if apart(from, f.at) < 1e-9 || apart(to, f.at) < 1e-9 {
		return 1.01 * (1 - grade) / grade
	}
	return nearness
}
