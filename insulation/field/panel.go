package field

import (
	"math"
	"math/cmplx"

	"kilovet/hv/profile"
)

// curve is a segment of a profile in units of the model's extent; a point is
// r + i z.
type curve struct {
	from, along    complex128 // of a line: start and unit vector
	centre         complex128 // of an arc
	radius         float64    // 0 for a line
	phase, bending float64    // angle of the start, signed curvature
	length         float64
}

func newCurve(s profile.Segment, unit float64) curve {
	at := func(p profile.Point) complex128 { return complex(float64(p.R)/unit, float64(p.Z)/unit) }
	c := curve{from: at(s.From), length: float64(s.Length()) / unit}
	if s.Turn == profile.Straight {
		c.along = (at(s.To) - c.from) / complex(c.length, 0)
		return c
	}
	c.centre, c.radius = at(s.Centre), float64(s.Radius())/unit
	c.phase = cmplx.Phase(c.from - c.centre)
	c.bending = math.Copysign(1/c.radius, float64(s.Sweep()))
	return c
}

// at is the point at a length from the start, and the unit vector along the path.
func (c *curve) at(s float64) (x, along complex128) {
	if c.radius == 0 {
		return c.from + c.along*complex(s, 0), c.along
	}
	sin, cos := math.Sincos(c.phase + s*c.bending)
	spoke := complex(cos, sin)
	return c.centre + spoke*complex(c.radius, 0), spoke * complex(0, c.bending*c.radius)
}

// step is the displacement from the point at a length s to that at s + ds, without
// loss where ds is small, and the unit vector along the path there.
func (c *curve) step(s, ds float64) (d, along complex128) {
	if c.radius == 0 {
		return c.along * complex(ds, 0), c.along
	}
	sin, cos := math.Sincos(ds * c.bending / 2)
	half := complex(cos, sin)
	_, start := c.at(s)
	return start * half * complex(2*sin/c.bending, 0), start * half * half
}

// panel is a piece of a wall with its nodes.
type panel struct {
	id       int // tells panels of all refinements apart
	wall     int
	start, h float64 // along the wall's curve
	curve    *curve
	x, n     [order]complex128 // nodes; normals to the left of the path
	ds       nodal             // weights of the length
	middle   complex128
}

func newPanel(id, wall int, c *curve, start, h float64, q *quadrature) *panel {
	p := &panel{id: id, wall: wall, start: start, h: h, curve: c}
	for i, t := range q.nodes {
		x, along := p.at(t)
		p.x[i], p.n[i], p.ds[i] = x, along*1i, q.weights[i]*h/2
	}
	p.middle, _ = p.at(0)
	return p
}

// at is the point and direction at t in −1 … 1.
func (p *panel) at(t float64) (x, along complex128) { return p.curve.at(p.start + p.h*(1+t)/2) }

// nearest is the t in −1 … 1 at which the panel comes closest to a point.
func (p *panel) nearest(x complex128) float64 {
	c := p.curve
	s := 0.0
	if c.radius == 0 {
		s = real((x - c.from) * cmplx.Conj(c.along))
	} else {
		spoke, _ := p.curve.at(p.start + p.h/2)
		turn := cmplx.Phase((x - c.centre) / (spoke - c.centre))
		if math.IsNaN(turn) {
			turn = 0
		}
		s = p.start + p.h/2 + turn/c.bending
	}
	return math.Max(-1, math.Min(1, 2*(s-p.start)/p.h-1))
}

// distance from a point to the panel.
func (p *panel) distance(x complex128) float64 {
	at, _ := p.at(p.nearest(x))
	return cmplx.Abs(at - x)
}

// apart is the distance of two points.
func apart(a, b complex128) float64 { return cmplx.Abs(a - b) }
