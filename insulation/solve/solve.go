// Package solve finds where a rising function of one variable crosses zero.
package solve

import (
	"math"

	"kilovet/hv/lack"
)

// tolerance is the relative width of the bracket at which a search ends; steps is
// how many evaluations it may take, more than halving alone would need.
const (
	tolerance = 1e-12
	steps     = 100
)

// point is a place and the value of the function there.
type point struct{ x, y float64 }

// Level is the x between lo and hi, both positive, at which a positive rising function
// takes a value, searched on logarithmic scales. A value under that at lo or above that
// at hi is given back as the error that low or high makes; an error of f ends the search.
func Level(lo, hi, want float64, f func(float64) (float64, error), low, high func() error) (float64, error) {
	place := func(u float64) float64 { return lo * math.Exp(u-1) } // u from 1: Rise wants no zero
	excess := func(u float64) (float64, error) {
		y, err := f(place(u))
		return math.Log(y / want), err
	}
	top := 1 + math.Log(hi/lo)
	least, err := excess(1)
	if err != nil {
		return 0, err
	}
	most, err := excess(top)
	switch {
	case err != nil:
		return 0, err
	case math.Abs(least) <= tolerance:
		return lo, nil
	case math.Abs(most) <= tolerance:
		return hi, nil
	case least > 0:
		return 0, low()
	case most < 0:
		return 0, high()
	}
	u, err := Rise(1, top, excess)
	return place(u), err
}

// Rise is the x between lo and hi, both positive, at which the continuous rising
// function f crosses zero, to 1e-12 of x. A function that has one sign at both ends
// has no crossing there: the programmer's fault. An error of f ends the search.
//
// Source: T. R. Chandrupatla, Advances in Engineering Software 28 (1997) 145:
// inverse quadratic interpolation where it is trustworthy, else halving.
func Rise(lo, hi float64, f func(float64) (float64, error)) (float64, error) {
	b, err := at(lo, f)
	if err != nil {
		return 0, err
	}
	a, err := at(hi, f)
	if err != nil {
		return 0, err
	}
	if b.y > 0 || a.y < 0 {
		panic("solve: no crossing between the ends")
	}
	if a.y == 0 || b.y == 0 {
		return closest(a, b).x, nil
	}
	part := 0.5 // of the way from a to b
	for range steps {
		c, err := at(a.x+part*(b.x-a.x), f)
		if err != nil {
			return 0, err
		}
		// a becomes the newest point, b the end beyond the crossing, c the point dropped.
		if (c.y > 0) == (a.y > 0) {
			a, c = c, a
		} else {
			a, b, c = c, a, b
		}
		best := closest(a, b)
		least := tolerance * best.x / math.Abs(b.x-a.x)
		if least > 0.5 || best.y == 0 {
			return best.x, nil
		}
		part = math.Min(math.Max(interpolate(a, b, c), least), 1-least)
	}
	return 0, lack.Failed("no crossing found between %g and %g", a.x, b.x)
}

func at(x float64, f func(float64) (float64, error)) (point, error) {
	y, err := f(x)
	return point{x, y}, err
}

// interpolate is the part of the way from a to b at which the inverse parabola
// through three points crosses zero, or a half where it would turn between them.
func interpolate(a, b, c point) float64 {
	xi, phi := (a.x-b.x)/(c.x-b.x), (a.y-b.y)/(c.y-b.y)
	if !(phi*phi < xi && (1-phi)*(1-phi) < 1-xi) { // Chandrupatla, criterion
		return 0.5
	}
	alpha := (c.x - a.x) / (b.x - a.x)
	return a.y/(b.y-a.y)*c.y/(b.y-c.y) + alpha*a.y/(c.y-a.y)*b.y/(c.y-b.y)
}

func closest(a, b point) point {
	if math.Abs(a.y) < math.Abs(b.y) {
		return a
	}
	return b
}

// Above is the least of hi, 2 hi, 4 hi, … at which f is not negative: an upper end
// for Rise. It gives up past limit.
func Above(hi, limit float64, f func(float64) (float64, error)) (float64, error) {
	for x := hi; x <= limit; x *= 2 {
		y, err := f(x)
		if err != nil {
			return 0, err
		}
		if y >= 0 {
			return x, nil
		}
	}
	return 0, lack.Failed("no crossing found up to %g", limit)
}
