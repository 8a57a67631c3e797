package profile

import (
	"fmt"
	"math/cmplx"

	"kilovet/hv/quantity"
)

// sameness is the distance, relative to the extent of a drawing, below which two
// points are one: far below any tolerance of manufacture, far above rounding.
const sameness = 1e-6

// Point is a place in the half plane.
type Point struct{ R, Z quantity.Length }

// String is the point in words, as messages name it.
func (p Point) String() string {
	return fmt.Sprintf("r = %.6g mm, z = %.6g mm", float64(p.R)*1e3, float64(p.Z)*1e3)
}

// Distance to another point.
func (p Point) Distance(q Point) quantity.Length {
	return quantity.Length(cmplx.Abs(q.plane() - p.plane()))
}

// plane is the point as a complex number: a factor i turns to the left.
func (p Point) plane() complex128 { return complex(float64(p.R), float64(p.Z)) }

func point(c complex128) Point { return Point{quantity.Length(real(c)), quantity.Length(imag(c))} }

// Extent is the diagonal of the box that holds all profiles.
func Extent(profiles ...Profile) quantity.Length {
	var b box
	for _, p := range profiles {
		for _, s := range p.Segments {
			b.hold(s)
		}
	}
	return b.diagonal()
}

// box grows to hold segments.
type box struct {
	used     bool
	low, top Point
}

func (b *box) hold(s Segment) {
	for i := 0; i <= 8; i++ {
		b.point(s.At(float64(i) / 8))
	}
}

func (b *box) point(p Point) {
	if !b.used {
		b.used, b.low, b.top = true, p, p
	}
	b.low = Point{min(b.low.R, p.R), min(b.low.Z, p.Z)}
	b.top = Point{max(b.top.R, p.R), max(b.top.Z, p.Z)}
}

func (b *box) diagonal() quantity.Length { return b.low.Distance(b.top) }
