package field

import (
	"math"
	"slices"

	"kilovet/hv/profile"
)

// almost is how far an exponent may lie from a whole number and count as one: a
// bend of 0.2 degrees, the rounding of a drawing.
const almost = 1e-3

// leastConstant stands for nothing where exponents are worked out, beside the
// constant 1 of the best conductor.
const leastConstant = 1e-6

// junction is a wedge or cone at a node where the field is not smooth.
type junction struct {
	node     int
	exponent float64 // of the potential, the lowest
	rays     []ray
	regions  []int
	metal    bool
}

// ray is a wall that ends at a junction, and the side of it on the wedge.
type ray struct {
	wall, end int
	region    int
	side      float64 // −1 left of the wall, +1 right
}

// spoke is an edge, or a mirror plane, that leaves a node.
type spoke struct {
	heading float64
	block   barrier
	wall    int // −1 for none
	end     int
	beyond  int // region counter-clockwise of it, −1 for none
}

// ray is the side of a spoke counter-clockwise of it, or clockwise.
func (s spoke) ray(region int, counterclockwise bool) ray {
	r := ray{s.wall, s.end, region, 1}
	if counterclockwise == (s.end == 0) {
		r.side = -1
	}
	return r
}

// findJunctions looks at the surroundings of every node.
func (m *model) findJunctions() {
	wallOf := map[int]int{}
	for i, w := range m.walls {
		wallOf[w.edge] = i
	}
	for n, at := range m.plane.Nodes {
		spokes := m.spokes(n, wallOf)
		m.markKink(spokes)
		if at.R <= 2*m.plane.Tolerance {
			m.lookOnAxis(n, spokes)
			continue
		}
		if m.mirror != nil && math.Abs(float64(at.Z-m.mirror.z)) <= 2*float64(m.plane.Tolerance) {
			spokes = m.foldAtMirror(spokes)
		}
		m.lookAround(n, spokes)
	}
}

// spokes lists what leaves a node, counter-clockwise.
func (m *model) spokes(node int, wallOf map[int]int) (list []spoke) {
	for _, d := range m.plane.Around(node) {
		e := m.plane.Edges[d/2]
		s := spoke{wall: -1, end: d % 2, beyond: m.faceOf[e.Left]}
		s.heading = float64(e.Heading(0))
		if d%2 == 1 {
			s.beyond = m.faceOf[e.Right]
			s.heading = float64(e.Reversed().Heading(0))
		}
		if w, found := wallOf[d/2]; found {
			s.wall, s.block = w, blocks(m.walls[w].kind)
		}
		list = append(list, s)
	}
	return list
}

func blocks(k wallKind) barrier {
	switch k {
	case conductor, sheet:
		return atConductor
	case natural:
		return atNatural
	}
	return open
}

// foldAtMirror puts the mirror plane itself in as a barrier, and closes what lies
// beyond it.
func (m *model) foldAtMirror(spokes []spoke) []spoke {
	block := atNatural
	if m.mirror.earthed {
		block = atConductor
	}
	out := 0.0 // the side on which the model lies
	for _, s := range spokes {
		out += math.Sin(s.heading)
	}
	kept := slices.DeleteFunc(slices.Clone(spokes), func(s spoke) bool { return math.Abs(math.Sin(s.heading)) < 1e-3 })
	left, right := spoke{heading: math.Pi, block: block, wall: -1, beyond: -1}, spoke{block: block, wall: -1, beyond: -1}
	switch last := spokes[len(spokes)-1]; {
	case len(kept) == 0:
		return nil
	case out > 0:
		right.beyond = m.before(kept[0], spokes, last)
	default:
		left.beyond = m.before(kept[0], spokes, last)
	}
	kept = append(kept, left, right)
	slices.SortFunc(kept, func(a, b spoke) int { return compareTurn(a.heading, b.heading) })
	return kept
}

// before is the region clockwise of a spoke.
func (m *model) before(s spoke, spokes []spoke, last spoke) int {
	for _, o := range spokes {
		if o == s {
			return last.beyond
		}
		last = o
	}
	return -1
}

func compareTurn(a, b float64) int {
	turn := func(x float64) float64 { return math.Mod(x+4*math.Pi, 2*math.Pi) }
	switch {
	case turn(a) < turn(b):
		return -1
	case turn(a) > turn(b):
		return 1
	}
	return 0
}

// lookAround splits the surroundings of a node into wedges and looks at each.
func (m *model) lookAround(node int, spokes []spoke) {
	if len(spokes) == 0 {
		return
	}
	first := slices.IndexFunc(spokes, func(s spoke) bool { return s.block != open || s.beyond < 0 })
	if first < 0 {
		m.lookInto(node, spokes, spokes[0], open)
		return
	}
	turned := append(slices.Clone(spokes[first:]), spokes[:first]...)
	for len(turned) > 0 {
		n := 1
		for n < len(turned) && turned[n].block == open && turned[n].beyond >= 0 {
			n++
		}
		last := spokes[first]
		if n < len(turned) {
			last = turned[n]
		}
		if turned[0].beyond >= 0 {
			m.lookInto(node, turned[:n], last, turned[0].block)
		}
		turned = turned[n:]
	}
}

// lookInto works out the exponents of the wedge that opens at each of the spokes and
// ends at the last.
func (m *model) lookInto(node int, spokes []spoke, last spoke, start barrier) {
	w := wedge{start: start, end: last.block}
	j := junction{node: node, metal: start == atConductor || last.block == atConductor}
	all := append(slices.Clone(spokes), last)
	for i, s := range spokes {
		next := all[i+1]
		angle := math.Mod(next.heading-s.heading+4*math.Pi, 2*math.Pi)
		if angle < 1e-9 {
			angle += 2 * math.Pi
		}
		w.sectors = append(w.sectors, sector{angle, math.Max(m.regions[s.beyond].constant, leastConstant)})
		j.regions = append(j.regions, s.beyond)
		j.rays = append(j.rays, s.ray(s.beyond, true), next.ray(s.beyond, false))
	}
	m.record(j, w.exponents())
}

// record keeps a junction where the field is not smooth, and tells the walls.
func (m *model) record(j junction, exponents []float64) {
	irregular, least := false, highest
	for _, x := range exponents {
		least = min(least, x)
		if math.Abs(x-math.Round(x)) > almost {
			irregular = true
		}
	}
	j.exponent = least
	materials := map[int]bool{}
	for _, r := range j.regions {
		materials[m.regions[r].material] = true
	}
	if least < 1-almost || j.metal && len(materials) > 1 {
		m.junctions = append(m.junctions, j)
	}
	for _, r := range j.rays {
		if r.wall >= 0 && least < 1-almost {
			m.walls[r.wall].ends[r.end].sharp = true
		}
	}
	if irregular {
		m.gradeAround(j.node, least)
	}
}

// gradeAround has the panels of all walls at a node graded towards it, for all feel
// what the panels beside cannot hold.
func (m *model) gradeAround(node int, exponent float64) {
	for i := range m.walls {
		w := &m.walls[i]
		edge := &m.plane.Edges[w.edge]
		for k, n := range []int{edge.Start, edge.End} {
			if n != node {
				continue
			}
			if e := &w.ends[k]; !e.irregular || exponent < e.slowest {
				e.irregular, e.slowest = true, exponent
			}
			w.ends[k].beside = w.ends[k].beside || exponent < 1-almost
		}
	}
}

// at is the place of a junction.
func (m *model) place(j junction) profile.Point { return m.plane.Nodes[j.node] }
