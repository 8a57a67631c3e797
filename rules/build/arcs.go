package build

import (
	"math"
	"math/cmplx"

	"kilovet/hv/quantity"
)

// smooth draws a curve through its places, r + iz, as pairs of arcs that run on into each
// other: each pair meets where both tangent lengths are alike (Bolton, Computer-Aided
// Design 7 (1975) 137, from memory).
func smooth(where, along func(float64) complex128, places []float64) []mark {
	start := where(places[0])
	marks := []mark{at(quantity.Length(real(start)), quantity.Length(imag(start)))}
	for i := 1; i < len(places); i++ {
		u, v := unit(along(places[i-1])), unit(along(places[i]))
		from, to := where(places[i-1]), where(places[i])
		way := to - from
		l := tangent(way, u, v)
		middle := (from + u*complex(l, 0) + to - v*complex(l, 0)) / 2
		marks = append(marks, turning(from, middle, u), turning(to, middle, v).to(to))
	}
	return marks
}

func unit(x complex128) complex128 { return x / complex(cmplx.Abs(x), 0) }

// dot is the product of two ways.
func dot(a, b complex128) float64 { return real(a * cmplx.Conj(b)) }

// tangent is how far the bends of a pair of arcs lie from its ends.
func tangent(way, u, v complex128) float64 {
	even := 2 * (1 - dot(u, v))
	part := dot(way, u+v)
	if even < 1e-12 {
		return dot(way, way) / (2 * part)
	}
	return (math.Sqrt(part*part+even*dot(way, way)) - part) / even
}

// turning is the arc that leads to a point, with a tangent at the other end of it.
func turning(from, to, along complex128) mark {
	normal := along * 1i
	way := to - from
	off := dot(way, normal)
	m := at(quantity.Length(real(to)), quantity.Length(imag(to)))
	if math.Abs(off) < 1e-9*cmplx.Abs(way) {
		return m
	}
	radius := dot(way, way) / (2 * off)
	centre := from + normal*complex(radius, 0)
	m.centre = []quantity.Length{quantity.Length(real(centre)), quantity.Length(imag(centre))}
	m.turn = "left"
	if radius < 0 {
		m.turn = "right"
	}
	return m
}

// to is the same arc to another end.
func (m mark) to(x complex128) mark {
	m.r, m.z = quantity.Length(real(x)), quantity.Length(imag(x))
	return m
}
