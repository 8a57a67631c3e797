package profile

import (
	"math"
	"math/cmplx"

	"kilovet/hv/quantity"
)

// meet lists the points two segments have in common within a tolerance: where
// they cross or touch, and the ends of one that lie on the other. Segments that
// run along each other meet at the ends of what they share.
func meet(a, b Segment, tol quantity.Length) []Point {
	candidates := append([]Point{a.From, a.To, b.From, b.To}, crossings(a, b, tol)...)
	var found []Point
	for _, p := range candidates {
		_, da := a.Closest(p)
		_, db := b.Closest(p)
		if da <= tol && db <= tol && !near(found, p, 2*tol) {
			found = append(found, p)
		}
	}
	return found
}

func near(points []Point, p Point, tol quantity.Length) bool {
	for _, q := range points {
		if p.Distance(q) <= tol {
			return true
		}
	}
	return false
}

// crossings of the whole lines and circles the segments lie on.
func crossings(a, b Segment, tol quantity.Length) []Point {
	switch {
	case a.Turn == Straight && b.Turn == Straight:
		return lines(a, b)
	case a.Turn == Straight:
		return lineCircle(a, b, tol)
	case b.Turn == Straight:
		return lineCircle(b, a, tol)
	}
	return circles(a, b, tol)
}

func lines(a, b Segment) []Point {
	u, v := a.To.plane()-a.From.plane(), b.To.plane()-b.From.plane()
	gap := b.From.plane() - a.From.plane()
	det := imag(cmplx.Conj(u) * v)
	if math.Abs(det) < 1e-12*cmplx.Abs(u)*cmplx.Abs(v) {
		return nil
	}
	return []Point{point(a.From.plane() + u*complex(imag(cmplx.Conj(gap)*v)/det, 0))}
}

func lineCircle(l, c Segment, tol quantity.Length) []Point {
	from, centre, radius := l.From.plane(), c.Centre.plane(), float64(c.Radius())
	unit := l.To.plane() - from
	unit /= complex(cmplx.Abs(unit), 0)
	foot := from + unit*complex(real((centre-from)*cmplx.Conj(unit)), 0)
	return chord(foot, unit, cmplx.Abs(foot-centre), radius, tol)
}

func circles(a, b Segment, tol quantity.Length) []Point {
	ca, cb := a.Centre.plane(), b.Centre.plane()
	ra, rb := float64(a.Radius()), float64(b.Radius())
	d := cmplx.Abs(cb - ca)
	if d <= float64(tol) {
		return nil
	}
	unit := (cb - ca) / complex(d, 0)
	h := (d*d + ra*ra - rb*rb) / (2 * d)
	return chord(ca+unit*complex(h, 0), unit*1i, math.Abs(h), ra, tol)
}

// chord is the two points of a circle on a line at a distance from its centre,
// given the foot of the centre on the line; the foot alone where they just touch.
func chord(foot, unit complex128, distance, radius float64, tol quantity.Length) []Point {
	if distance > radius+float64(tol) {
		return nil
	}
	if distance > radius-float64(tol) {
		return []Point{point(foot), point(foot + unit*half(distance, radius)), point(foot - unit*half(distance, radius))}
	}
	return []Point{point(foot + unit*half(distance, radius)), point(foot - unit*half(distance, radius))}
}

func half(distance, radius float64) complex128 {
	return complex(math.Sqrt(math.Max(0, radius*radius-distance*distance)), 0)
}
