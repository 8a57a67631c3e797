package field

import "math"

// crossing is a side of a fine cell that a level crosses: of the place (i, j) the side
// along r, or along z.
type crossing struct {
	i, j   int
	upward bool
}

// speck is the number of places up to which a path is one of the grid, at a surface.
const speck = 4

// contours are the paths along which a grid has a level: through every cell straight
// from side to side, joined end to end.
func (g *grid) contours(level float64) (paths [][]complex128) {
	ways := map[crossing][]crossing{}
	var order []crossing
	link := func(a, b crossing) {
		for _, pair := range [][2]crossing{{a, b}, {b, a}} {
			if ways[pair[0]] == nil {
				order = append(order, pair[0])
			}
			ways[pair[0]] = append(ways[pair[0]], pair[1])
		}
	}
	for j := range g.m {
		for i := range g.n {
			g.cross(i, j, level, link)
		}
	}
	used := map[crossing]bool{}
	for _, single := range []bool{true, false} { // open paths from their ends, then closed ones
		for _, start := range order {
			if used[start] || single && len(ways[start]) != 1 {
				continue
			}
			if path := g.walk(start, ways, used, level); len(path) > speck {
				paths = append(paths, path)
			}
		}
	}
	return paths
}

// cross links the sides of a cell that a level crosses. Cells with a corner that has no
// potential, and those wholly in metal, have none.
func (g *grid) cross(i, j int, level float64, link func(a, b crossing)) {
	around := [4][2]int{{i, j}, {i + 1, j}, {i + 1, j + 1}, {i, j + 1}}
	var above [4]bool
	free := false
	for k, p := range around {
		at := g.index(p[0], p[1])
		if math.IsNaN(g.u[at]) {
			return
		}
		above[k], free = g.u[at] > level, free || g.region[at] >= 0
	}
	if !free {
		return
	}
	sides := [4]crossing{{i, j, false}, {i + 1, j, true}, {i, j + 1, false}, {i, j, true}}
	var hit []crossing
	for k := range sides {
		if above[k] != above[(k+1)%4] {
			hit = append(hit, sides[k])
		}
	}
	for k := 1; k < len(hit); k += 2 {
		link(hit[k-1], hit[k])
	}
}

// walk follows a path as far as it goes.
func (g *grid) walk(start crossing, ways map[crossing][]crossing, used map[crossing]bool, level float64) (path []complex128) {
	here, on := start, true
	for on {
		used[here] = true
		path = append(path, g.place(here, level))
		on = false
		for _, next := range ways[here] {
			if !used[next] {
				here, on = next, true
				break
			}
		}
	}
	if last := ways[here]; len(path) > 3 && len(last) == 2 && (last[0] == start || last[1] == start) {
		path = append(path, path[0])
	}
	return path
}

// place is where on a side the level is.
func (g *grid) place(c crossing, level float64) complex128 {
	a, b := g.index(c.i, c.j), g.index(c.i+1, c.j)
	from, way := g.at(c.i, c.j), complex(real(g.step), 0)
	if c.upward {
		b, way = g.index(c.i, c.j+1), complex(0, imag(g.step))
	}
	part := (level - g.u[a]) / (g.u[b] - g.u[a])
	return from + way*complex(math.Min(math.Max(part, 0), 1), 0)
}
