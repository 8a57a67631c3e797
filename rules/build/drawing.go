package build

import (
	"math"
	"math/cmplx"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// drawing is a described arrangement as bodies of edges, for whoever moves a part of it.
type drawing struct {
	field  *chain.Field
	bodies []body
	near   float64      // two points this close are one
	points []complex128 // ends of edges, each once
}

// body is an electrode, a dielectric or a boundary, which has a name where it is earthed;
// pieces of one electrode are one body.
type body struct {
	name  string
	kind  bodyKind
	edges []stretch
}

type bodyKind int

const (
	electrode bodyKind = iota
	dielectric
	boundary
)

// stretch is a line or an arc of an outline, r + iz.
type stretch struct {
	from, to complex128
	centre   complex128
	turn     float64 // +1 to the left, −1 to the right, 0 for a line
	// Numbers of points: its ends, and all that lie on it.
	start, end int
	on         []int
}

// drawingOf takes a field apart; bodies without an outline are left out.
func drawingOf(f *chain.Field) *drawing {
	d := &drawing{field: f}
	add := func(kind bodyKind, name string, strokes []chain.Stroke) {
		for i := range d.bodies {
			if b := &d.bodies[i]; b.kind == kind && b.name == name && kind == electrode {
				b.edges = append(b.edges, stretchesOf(strokes)...)
				return
			}
		}
		if edges := stretchesOf(strokes); len(edges) > 0 {
			d.bodies = append(d.bodies, body{name, kind, edges})
		}
	}
	for _, el := range f.Electrodes {
		add(electrode, el.Name.V, el.Profile)
	}
	for _, di := range f.Dielectrics {
		add(dielectric, di.Name.V, di.Profile)
	}
	for _, b := range f.Boundary {
		name := ""
		if b.Kind.V == "earth" {
			name = "the earthed boundary"
		}
		add(boundary, name, b.Profile)
	}
	d.near = 1e-6 * float64(sizeOf(f))
	d.number()
	return d
}

// number gives every point its number and finds what lies on the edges.
func (d *drawing) number() {
	each := func(do func(e *stretch)) {
		for i := range d.bodies {
			for k := range d.bodies[i].edges {
				do(&d.bodies[i].edges[k])
			}
		}
	}
	each(func(e *stretch) { e.start, e.end = d.point(e.from), d.point(e.to) })
	each(func(e *stretch) {
		for i, x := range d.points {
			if e.holds(x, d.near) {
				e.on = append(e.on, i)
			}
		}
	})
}

// point is the number of a point.
func (d *drawing) point(x complex128) int {
	for i, p := range d.points {
		if cmplx.Abs(p-x) <= d.near {
			return i
		}
	}
	d.points = append(d.points, x)
	return len(d.points) - 1
}

func stretchesOf(strokes []chain.Stroke) (edges []stretch) {
	for i := 1; i < len(strokes); i++ {
		from, there := plane(startOf(strokes[i-1]))
		to, also := plane(strokes[i].To)
		if !there || !also {
			continue
		}
		e := stretch{from: from, to: to}
		if centre, arc := plane(strokes[i].Centre); arc {
			e.centre, e.turn = centre, 1
			if strokes[i].Turn.V == "right" {
				e.turn = -1
			}
		}
		edges = append(edges, e)
	}
	return edges
}

// places are points along an edge, from end to end.
func (e stretch) places() []complex128 {
	const pieces = 16
	list := make([]complex128, pieces+1)
	sweep := 0.0
	if e.turn != 0 {
		sweep = cmplx.Phase((e.to - e.centre) / (e.from - e.centre))
		if sweep*e.turn <= 0 {
			sweep += 2 * math.Pi * e.turn
		}
	}
	for k := range list {
		part := float64(k) / pieces
		if e.turn == 0 {
			list[k] = e.from + complex(part, 0)*(e.to-e.from)
			continue
		}
		list[k] = e.centre + (e.from-e.centre)*cmplx.Rect(1, part*sweep)
	}
	return list
}

// holds reports whether a point lies on an edge, within a distance.
func (e stretch) holds(x complex128, near float64) bool {
	if e.turn == 0 {
		way := e.to - e.from
		part := dot(x-e.from, way) / math.Max(dot(way, way), 1e-300)
		return cmplx.Abs(x-e.from-complex(math.Min(1, math.Max(0, part)), 0)*way) <= near
	}
	if math.Abs(cmplx.Abs(x-e.centre)-cmplx.Abs(e.from-e.centre)) > near {
		return false
	}
	if cmplx.Abs(x-e.from) <= near || cmplx.Abs(x-e.to) <= near {
		return true
	}
	turn := func(to complex128) float64 {
		a := cmplx.Phase((to-e.centre)/(e.from-e.centre)) * e.turn
		if a <= 0 {
			a += 2 * math.Pi
		}
		return a
	}
	return turn(x) <= turn(e.to)
}

// along reports whether an edge is a line in a direction.
func (e stretch) along(way complex128, near float64) bool {
	return e.turn == 0 && math.Abs(imag((e.to-e.from)*cmplx.Conj(way))) <= near
}

// box is the least and the greatest r and z of bodies' edges.
type box struct{ low, high complex128 }

func boxOf(edges []stretch) box {
	b := box{complex(math.Inf(1), math.Inf(1)), complex(math.Inf(-1), math.Inf(-1))}
	for _, e := range edges {
		for _, x := range e.places() {
			b.low = complex(math.Min(real(b.low), real(x)), math.Min(imag(b.low), imag(x)))
			b.high = complex(math.Max(real(b.high), real(x)), math.Max(imag(b.high), imag(x)))
		}
	}
	return b
}

// within reports whether a box lies in another.
func (b box) within(other box) bool {
	return real(b.low) >= real(other.low) && imag(b.low) >= imag(other.low) && real(b.high) <= real(other.high) && imag(b.high) <= imag(other.high)
}

// changed is the arrangement with its edges changed.
func (d *drawing) changed(change func(e stretch) stretch) chain.Field {
	out := *d.field
	out.Electrodes, out.Dielectrics, out.Boundary = nil, nil, nil
	for _, el := range d.field.Electrodes {
		el.Profile = d.redrawn(el.Profile, change)
		out.Electrodes = append(out.Electrodes, el)
	}
	for _, di := range d.field.Dielectrics {
		di.Profile = d.redrawn(di.Profile, change)
		out.Dielectrics = append(out.Dielectrics, di)
	}
	for _, b := range d.field.Boundary {
		b.Profile = d.redrawn(b.Profile, change)
		out.Boundary = append(out.Boundary, b)
	}
	return out
}

func (d *drawing) redrawn(strokes []chain.Stroke, change func(e stretch) stretch) []chain.Stroke {
	out := append([]chain.Stroke(nil), strokes...)
	put := func(g *document.Given[[]quantity.Length], x complex128) {
		g.V = []quantity.Length{quantity.Length(real(x)), quantity.Length(imag(x))}
	}
	for i, e := range stretchesOf(strokes) {
		e.start, e.end = d.point(e.from), d.point(e.to)
		m := change(e)
		if i == 0 {
			put(&out[0].From, m.from)
		}
		put(&out[i+1].To, m.to)
		if e.turn != 0 {
			put(&out[i+1].Centre, m.centre)
		}
	}
	return out
}
