package field

import (
	"math"
	"math/cmplx"
	"slices"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Line is a field line.
type Line struct {
	Points []LinePoint
	Ends   string // the electrode it ends on; empty where it leaves the model
	Closed bool   // it ends on a dielectric, of that name, and was not followed into it
}

// LinePoint is a place on a field line.
type LinePoint struct {
	Along    quantity.Length // from the start
	Strength quantity.Field
	Reading
}

// linePart is the part of the whole potential difference that one step may take.
const linePart = 0.02

// Line is the field line from a peak on an electrode to where it ends: the critical
// line of the gap, with the field along it. It passes through surfaces of
// dielectrics, where it has a place on either side.
func (f *Field) Line(from Peak) (Line, error) {
	if from.face.side >= 0 && f.walls[f.values.sides[from.face.side].wall].electrode < 0 {
		return Line{}, lack.Range("a field line is drawn from the peak on an electrode")
	}
	return f.lineFrom(from, false)
}

// Within is the field line from the place of a peak, on an electrode or on a dielectric,
// through the body that the peak lies in, to where it leaves that body. Where the peak lies
// on a surface that the line runs along it is the whole line, from its other end on.
func (f *Field) Within(from Peak) (Line, error) {
	line, err := f.lineFrom(from, true)
	if err != nil || !f.tangent(from) {
		return line, err
	}
	back, err := f.followed(from, true, true)
	return line.after(back), err
}

// tangent reports whether the field at a peak runs along the surface that it lies on.
func (f *Field) tangent(p Peak) bool { return f.footOf(p).grazes() }

// after is a line with the way back from its start before it.
func (l Line) after(back Line) Line {
	if len(back.Points) == 0 {
		return l
	}
	whole := Line{Ends: l.Ends, Closed: l.Closed}
	before := back.Points[len(back.Points)-1].Along
	for _, p := range slices.Backward(back.Points) {
		p.Along = before - p.Along
		whole.Points = append(whole.Points, p)
	}
	for _, p := range l.Points[1:] {
		p.Along += before
		whole.Points = append(whole.Points, p)
	}
	return whole
}

// lineFrom follows a line; one along the axis that gets nowhere, as where the field
// vanishes on it, gives way to one beside it.
func (f *Field) lineFrom(from Peak, within bool) (Line, error) {
	line, err := f.followed(from, within, false)
	if err == nil && line.Ends != "" {
		return line, nil
	}
	if aside, possible := f.besideAxis(from); possible {
		if other, err := f.followed(aside, within, false); err == nil && other.Ends != "" {
			return other, nil
		}
	}
	return line, err
}

// followed is the line from a peak, into the region that it faces or back out of it.
func (f *Field) followed(from Peak, within, back bool) (Line, error) {
	if from.face.side < 0 && f.mirror == nil {
		return Line{}, lack.Range("a field line is drawn from a peak on an electrode or a dielectric")
	}
	start := f.footOf(from)
	x, u, g := start.x, start.u, start.g
	if cmplx.Abs(g) == 0 {
		return Line{}, lack.Failed("at %v there is no field to follow", from.At)
	}
	if within && start.grazes() {
		start.beside += start.into * lastStep
	}
	t := &tracer{Field: f, region: start.region, along: 1, tolerance: 2e-5, within: within}
	if (real(g*cmplx.Conj(start.into)) < 0) != back {
		t.along = -1
	}
	line := Line{}
	length, here := 0.0, x
	t.put = func(x complex128, u float64, g complex128) complex128 {
		length += apart(here, x)
		here = x
		r := t.reading(t.region, x, u, g)
		line.Points = append(line.Points, LinePoint{quantity.Length(length * t.unit), r.Strength(), r})
		return x
	}
	span := f.span()
	t.longest = func(_ complex128, g complex128) float64 { return linePart * span / cmplx.Abs(g) }
	t.put(x, u, g)
	end, err := t.follow(start.beside)
	if end != nil && end.electrode >= 0 {
		line.Ends = f.names[end.electrode]
	} else if end != nil && end.kind == interfaces {
		line.Ends, line.Closed = f.bodyName(end.left+end.right-t.region), true
	}
	return line, err
}

// span is the whole potential difference, zero at infinity or the boundary included.
func (f *Field) span() float64 {
	low, high := 0.0, 0.0
	for _, v := range f.volts {
		low, high = min(low, v), max(high, v)
	}
	return high - low
}

// crossings are the points at which a curve crosses the straight way from a to b.
func (c *curve) crossings(a, b complex128) (list []complex128) {
	way := b - a
	keep := func(part float64) {
		x := a + way*complex(part, 0)
		if part < 0 || part > 1 {
			return
		}
		if s := c.project(x); s >= -1e-12 && s <= c.length+1e-12 {
			list = append(list, x)
		}
	}
	if c.radius == 0 {
		if det := imag(cmplx.Conj(way) * c.along); math.Abs(det) > 1e-14*cmplx.Abs(way) {
			keep(imag(cmplx.Conj(c.from-a)*c.along) / det)
		}
		return list
	}
	rel := a - c.centre // |rel + part·way| = radius
	p, q := real(rel*cmplx.Conj(way)), real(way*cmplx.Conj(way))
	if root := p*p - q*(real(rel*cmplx.Conj(rel))-c.radius*c.radius); root >= 0 && q > 0 {
		keep((-p - math.Sqrt(root)) / q)
		keep((-p + math.Sqrt(root)) / q)
	}
	return list
}

// project drops a point onto the curve: the length at which it lies beside it, below
// 0 or beyond the length where it does not.
func (c *curve) project(x complex128) float64 {
	if c.radius == 0 {
		return real((x - c.from) * cmplx.Conj(c.along))
	}
	spoke, _ := c.at(c.length / 2)
	return c.length/2 + cmplx.Phase((x-c.centre)/(spoke-c.centre))/c.bending
}
