package field

import (
	"math"
	"math/cmplx"

	"kilovet/hv/profile"
	"kilovet/hv/quantity"
)

// Window is a part of the half plane, from its lower left to its upper right corner.
type Window struct{ From, To profile.Point }

// Picture is what is seen of a field in a window.
type Picture struct {
	Equipotentials []Equipotential
	Shades         []Shade
}

// Shade is where the field lies between two sizes, as boxes.
type Shade struct {
	Least, Most quantity.Field
	Boxes       []Window
}

const (
	cells = 26 // about, along each side of a picture, in which the field is worked out
	parts = 4  // of such a cell, along each side
)

// Picture draws equipotential lines at levels, and shades where the field lies between
// two neighbouring sizes, which rise. The field is worked out on a coarse grid and
// finely beside surfaces; between, the lines go by value and gradient of the corners,
// exact to the second order. They are for the eye: one may miss its level by a hundredth
// of the window. Levels at which an electrode stands have none.
func (f *Field) Picture(w Window, levels []quantity.Voltage, sizes []quantity.Field) Picture {
	g := f.grid(w)
	g.fill()
	var p Picture
	for _, level := range levels {
		if f.isElectrode(float64(level)) {
			continue
		}
		for _, path := range g.contours(float64(level)) {
			p.Equipotentials = append(p.Equipotentials, Equipotential{level, f.outerPath(path)})
		}
	}
	for k := 1; k < len(sizes); k++ {
		p.Shades = append(p.Shades, Shade{sizes[k-1], sizes[k], g.between(sizes[k-1], sizes[k])})
	}
	return p
}

// grid of fine places over a window; i runs along r, j along z.
type grid struct {
	*Field
	from     complex128
	step     complex128 // dr + i dz of a fine cell
	n, m     int        // fine cells along both sides
	u        []float64  // potential; not a number where there is none
	e        []float64  // strength
	gradient []complex128
	region   []int  // −1 in metal and outside the model
	bounded  []bool // coarse cells through which a surface passes
}

func (f *Field) grid(w Window) *grid {
	a, b := f.inner(w.From), f.inner(w.To)
	side := math.Sqrt(math.Max(real(b-a), 1e-9)*math.Max(imag(b-a), 1e-9)) / cells
	count := func(length float64) int { return parts * min(max(int(math.Round(length/side)), 4), 3*cells) }
	g := &grid{Field: f, from: a, n: count(real(b - a)), m: count(imag(b - a))}
	g.step = complex(real(b-a)/float64(g.n), imag(b-a)/float64(g.m))
	places := (g.n + 1) * (g.m + 1)
	g.u, g.e, g.gradient = make([]float64, places), make([]float64, places), make([]complex128, places)
	g.region, g.bounded = make([]int, places), make([]bool, g.n/parts*(g.m/parts))
	return g
}

func (g *grid) index(i, j int) int { return j*(g.n+1) + i }

func (g *grid) at(i, j int) complex128 {
	return g.from + complex(real(g.step)*float64(i), imag(g.step)*float64(j))
}

// fill works out the corners of coarse cells, then what lies between.
func (g *grid) fill() {
	g.markSurfaces()
	for j := 0; j <= g.m; j += parts {
		for i := 0; i <= g.n; i += parts {
			g.workOut(i, j)
		}
	}
	for j := 0; j < g.m; j += parts {
		for i := 0; i < g.n; i += parts {
			g.fillCell(i, j)
		}
	}
}

// markSurfaces walks along every edge of the figure.
func (g *grid) markSurfaces() {
	for _, e := range g.plane.Edges {
		if onlyAxis(e) {
			continue
		}
		c := newCurve(e.Segment, g.unit)
		steps := 1 + int(3*c.length/math.Min(real(g.step), imag(g.step)))
		for k := range min(steps, 20000) + 1 {
			x, _ := c.at(c.length * float64(k) / float64(min(steps, 20000)))
			x -= g.from
			i, j := int(math.Floor(real(x)/real(g.step)/parts)), int(math.Floor(imag(x)/imag(g.step)/parts))
			for _, a := range []int{i, i - 1} { // one on the side of a cell bounds both
				if a >= 0 && a < g.n/parts && j >= 0 && j < g.m/parts && (a == i || real(x)/real(g.step)-float64(i*parts) < 0.1) {
					g.bounded[j*(g.n/parts)+a] = true
				}
			}
		}
	}
}

// workOut is the field at a place.
func (g *grid) workOut(i, j int) {
	k, x := g.index(i, j), g.at(i, j)
	g.region[k], g.u[k], g.e[k], g.gradient[k] = -1, math.NaN(), 0, 0
	if g.beyondMirror(x) {
		return
	}
	face := g.plane.FaceAt(g.nudged(g.outer(x)))
	r := g.faceOf[face]
	if r < 0 {
		if metal := g.inside(face); metal >= 0 {
			g.u[k] = g.volts[g.group[metal]]
		}
		return
	}
	u, gradient := g.look(g.values, r, x)
	g.region[k], g.u[k], g.gradient[k], g.e[k] = r, u, gradient, cmplx.Abs(gradient)
}

// fillCell fills a coarse cell: by its corners where they lie in one region and no
// surface passes, else place by place.
func (g *grid) fillCell(i, j int) {
	corners := [4]int{g.index(i, j), g.index(i+parts, j), g.index(i, j+parts), g.index(i+parts, j+parts)}
	plain := !g.bounded[j/parts*(g.n/parts)+i/parts]
	for _, c := range corners {
		plain = plain && g.region[c] == g.region[corners[0]] && (g.region[c] >= 0 || !math.IsNaN(g.u[c]))
	}
	for b := range parts + 1 {
		for a := range parts + 1 {
			switch corner := a%parts == 0 && b%parts == 0; {
			case corner:
			case plain:
				g.blend(corners, i, j, a, b)
			case a < parts && b < parts || i+a == g.n || j+b == g.m || g.fresh(i+a, j+b):
				g.workOut(i+a, j+b)
			}
		}
	}
}

// fresh reports whether a place on the far side of a cell was not worked out yet.
func (g *grid) fresh(i, j int) bool {
	k := g.index(i, j)
	return g.u[k] == 0 && g.e[k] == 0
}

// blend is the mean of the corners' values and of their tangents, both by area: exact
// for potentials of the second degree.
func (g *grid) blend(corners [4]int, i, j, a, b int) {
	s, t := float64(a)/parts, float64(b)/parts
	shares := [4]float64{(1 - s) * (1 - t), s * (1 - t), (1 - s) * t, s * t}
	k, x := g.index(i+a, j+b), g.at(i+a, j+b)
	u, e := 0.0, 0.0
	for c, share := range shares {
		at := corners[c]
		way := x - g.at(at%(g.n+1), at/(g.n+1))
		u += share * (g.u[at] + real(g.gradient[at]*cmplx.Conj(way))/2)
		e += share * g.e[at]
	}
	g.u[k], g.e[k], g.region[k] = u, e, g.region[corners[0]]
}

// between gathers the fine cells whose field lies between two sizes into boxes, one for
// every run along r.
func (g *grid) between(least, most quantity.Field) (boxes []Window) {
	for j := range g.m {
		start := -1
		for i := range g.n + 1 {
			inside := i < g.n && g.shaded(i, j, float64(least)*g.unit, float64(most)*g.unit)
			switch {
			case inside && start < 0:
				start = i
			case !inside && start >= 0:
				boxes = append(boxes, Window{g.outer(g.at(start, j)), g.outer(g.at(i, j+1))})
				start = -1
			}
		}
	}
	return stacked(boxes)
}

// shaded reports whether the mean field of a cell, of which a corner lies in a region,
// is between two sizes.
func (g *grid) shaded(i, j int, least, most float64) bool {
	sum, n := 0.0, 0
	for _, k := range []int{g.index(i, j), g.index(i+1, j), g.index(i, j+1), g.index(i+1, j+1)} {
		if g.region[k] >= 0 {
			sum, n = sum+g.e[k], n+1
		}
	}
	return n >= 2 && sum >= least*float64(n) && sum < most*float64(n)
}

// stacked joins boxes that stand on each other with the same sides.
func stacked(boxes []Window) (out []Window) {
	for _, b := range boxes {
		joined := false
		for k := len(out) - 1; k >= 0 && out[k].To.Z >= b.From.Z-(b.To.Z-b.From.Z)/2 && !joined; k-- {
			o := &out[k]
			if quantity.Equal(o.From.R, b.From.R) && quantity.Equal(o.To.R, b.To.R) && quantity.Equal(o.To.Z, b.From.Z) {
				o.To.Z, joined = b.To.Z, true
			}
		}
		if !joined {
			out = append(out, b)
		}
	}
	return out
}
