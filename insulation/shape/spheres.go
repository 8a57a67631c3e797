package shape

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// closest is the least gap over radius at which the image series is summed; closer
// spheres are plates within 1e-4.
const closest = 1e-4

// spheres are the arrangements solved by image charges.
func spheres(s gap.Shape, r, d float64) (Line, error) {
	if d/r < closest {
		return Line{}, lack.Range("a gap of %s is under a ten-thousandth of the radius: describe the electrodes as plates", quantity.Text(quantity.Length(d)))
	}
	switch {
	case s.Kind == gap.SpherePlane:
		return spherePlane(r, d), nil
	case s.Kind == gap.SphereSphere && s.Symmetric:
		return mirrored(spherePlane(r, d/2)), nil
	case s.Kind == gap.SphereSphere:
		return sphereEarthed(r, d), nil
	}
	return Line{}, lack.Range("no field is known here for the shape %q", string(s.Kind))
}

// image is a charge in units of 4πε₀ for one volt, and how far its place lies from
// the facing pole of its own sphere.
type image struct{ charge, depth float64 }

// tail is the share of the field below which the images are cut off.
const tail = 1e-15

// images is the series of charges in a sphere over a plane, q(k+1) = q(k) r/(2h − s),
// s(k+1) = r²/(2h − s), s the distance from the centre towards the plane, h = r + d
// (exact; textbook image series). The same series, taken in turn, serves two equal
// spheres of which one is earthed, with 2h the distance of the centres.
func images(r, span float64) []image {
	q, s, sum := r, 0.0, 0.0
	var list []image
	for {
		list = append(list, image{q, r - s})
		field := q / ((r - s) * (r - s))
		if sum += field; field < tail*sum {
			return list
		}
		q, s = q*r/(span-s), r*r/(span-s)
	}
}

// spherePlane: a sphere of radius r at V, d over an earthed plane.
func spherePlane(r, d float64) Line {
	list := images(r, 2*(r+d))
	return oneSided(r, d, func(x float64) float64 {
		sum := 0.0
		for _, i := range list {
			here, there := i.depth+x, i.depth+2*d-x // the charge, its mirror image
			sum += i.charge * (1/(here*here) + 1/(there*there))
		}
		return sum
	})
}

// sphereEarthed: two equal spheres in free space, one at V, one earthed; the field is
// highest at the live one.
func sphereEarthed(r, d float64) Line {
	list := images(r, 2*r+d)
	l := oneSided(r, d, func(x float64) float64 {
		sum, near, far := 0.0, x, d-x
		for _, i := range list { // even ones in the live sphere, odd ones in the earthed
			a := i.depth + near
			sum += i.charge / (a * a)
			near, far = far, near
		}
		return sum
	})
	l.trough = quantity.Length(lowest(l.at, d))
	return l
}

// lowest is where a convex function on 0…d is least, to a thousandth of d, by the
// golden section.
func lowest(f func(float64) float64, d float64) float64 {
	golden := (math.Sqrt(5) - 1) / 2
	a, b := 0.0, d
	for b-a > 1e-3*d {
		if c, e := b-golden*(b-a), a+golden*(b-a); f(c) < f(e) {
			b = e
		} else {
			a = c
		}
	}
	return (a + b) / 2
}
