package field

import "math"

// markKink marks where the curvature jumps between two walls that go on smoothly,
// by more than a tenth of the inverse of the shorter: the field has a kink there.
func (m *model) markKink(spokes []spoke) {
	for i, a := range spokes {
		for _, b := range spokes[:i] {
			if a.wall < 0 || b.wall < 0 || a.wall == b.wall || a.block != b.block {
				continue
			}
			opposite := math.Abs(math.Remainder(a.heading-b.heading+math.Pi, 2*math.Pi)) < 0.01
			ca, cb := &m.walls[a.wall].curve, &m.walls[b.wall].curve
			jump := math.Abs(a.bending(ca)+b.bending(cb)) * math.Min(ca.length, cb.length)
			if opposite && jump > 0.1 {
				m.walls[a.wall].ends[a.end].kink, m.walls[b.wall].ends[b.end].kink = true, true
			}
		}
	}
}

// bending of a curve as it leaves the node.
func (s spoke) bending(c *curve) float64 {
	if s.end == 1 {
		return -c.bending
	}
	return c.bending
}
