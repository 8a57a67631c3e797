package field

import (
	"cmp"
	"math"
	"slices"
)

// lookOnAxis does the same for a node on the axis: spokes to the right of it, by
// their polar angle.
func (m *model) lookOnAxis(node int, spokes []spoke) {
	above, right := m.besideAxis(spokes)
	c := cone{wedge: wedge{start: open}}
	j := junction{node: node}
	theta, in := 0.0, above
	step := func(angle float64) {
		if in >= 0 {
			c.sectors = append(c.sectors, sector{angle - theta, math.Max(m.regions[in].constant, leastConstant)})
			j.regions = append(j.regions, in)
		}
	}
	flush := func(end barrier) {
		if len(c.sectors) > 0 {
			c.end = end
			m.record(j, c.exponents())
		}
		c, j = cone{wedge: wedge{start: end}, from: theta}, junction{node: node, metal: end == atConductor}
	}
	for i := len(right) - 1; i >= 0; i-- { // clockwise: from the upper axis down
		s := right[i]
		angle := math.Pi/2 - s.heading
		step(angle)
		if in >= 0 && s.wall >= 0 {
			j.rays = append(j.rays, s.ray(in, true))
			j.metal = j.metal || s.block == atConductor
		}
		theta = angle
		if s.block != open {
			flush(s.block)
		}
		in = m.before(s, spokes, spokes[len(spokes)-1])
		if in >= 0 && s.wall >= 0 {
			j.rays = append(j.rays, s.ray(in, false))
		}
	}
	step(math.Pi)
	flush(open)
}

// besideAxis lists the spokes right of the axis, counter-clockwise, and the region
// right of the upper axis.
func (m *model) besideAxis(spokes []spoke) (above int, right []spoke) {
	above = -1
	for _, s := range spokes {
		if math.Abs(s.heading) < math.Pi/2-1e-6 {
			right = append(right, s)
		}
	}
	slices.SortFunc(right, func(a, b spoke) int { return cmp.Compare(a.heading, b.heading) })
	if len(right) > 0 {
		above = right[len(right)-1].beyond
	}
	return above, right
}
