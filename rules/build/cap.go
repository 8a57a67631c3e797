package build

import (
	"math"
	"math/cmplx"
	"slices"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// capped is another radius of a rod that ends in a half ball on the axis, or of the tip of
// a cone that runs on from it, the place of the end kept; none where something else hangs
// on it.
func (d *drawing) capped(b body) (all []Dimension) {
	for _, e := range b.edges {
		pole, rim := e.start, e.end
		if real(d.points[pole]) > d.near {
			pole, rim = rim, pole
		}
		if e.turn == 0 || real(d.points[pole]) > d.near || math.Abs(real(e.centre)) > d.near {
			continue
		}
		radius, near := cmplx.Abs(d.points[rim]-e.centre), d.points[pole]
		for _, shank := range b.edges {
			if !slices.Contains([]int{shank.start, shank.end}, rim) || !d.runsOn(e, shank, rim) || !d.hangsFree(e, shank, rim) {
				continue
			}
			name := "radius of "
			if !shank.along(1i, d.near) {
				name = "tip radius of "
			}
			all = append(all, Dimension{Name: name + b.name + ", its end kept", Key: "field", Value: quantity.Length(radius), Near: &near,
				With: func(v quantity.Length) *Arrangement { return d.thickened(shank, pole, rim, float64(v)/radius) }})
		}
	}
	return all
}

// runsOn reports whether a line leaves an arc at its rim without a corner, and leads along
// the axis at all.
func (d *drawing) runsOn(ball, shank stretch, rim int) bool {
	spoke, way := d.points[rim]-ball.centre, shank.to-shank.from
	return shank.turn == 0 && !shank.along(1, d.near) && math.Abs(dot(spoke, way)) <= smoothly*cmplx.Abs(spoke)*cmplx.Abs(way)
}

// smoothly is the angle below which a line runs on from an arc.
const smoothly = 1e-4

// hangsFree reports whether only lines across the axis end on a shank, and nothing on the
// half ball at its rim.
func (d *drawing) hangsFree(ball, shank stretch, rim int) bool {
	for _, b := range d.bodies {
		for _, e := range b.edges {
			joins := slices.ContainsFunc(shank.on, func(i int) bool { return e.start == i || e.end == i })
			same := e.start == shank.start && e.end == shank.end || e.start == ball.start && e.end == ball.end
			if joins && !same && (!e.along(1, d.near) || e.start == rim || e.end == rim) {
				return false
			}
		}
	}
	return len(ball.on) == 2
}

// thickened is the drawing with a rod so many times as thick.
func (d *drawing) thickened(shank stretch, pole, rim int, times float64) *Arrangement {
	end := d.points[pole]
	off, slope := complex(times-1, 0)*(d.points[rim]-end), shank.to-shank.from
	wider := complex(real(off)-imag(off)*real(slope)/imag(slope), 0) // at the same height
	a := &Arrangement{}
	move := func(i int) complex128 {
		switch {
		case i == rim:
			return end + complex(times, 0)*(d.points[rim]-end)
		case slices.Contains(shank.on, i):
			return d.points[i] + wider
		}
		return d.points[i]
	}
	a.Field = d.changed(func(e stretch) stretch {
		m := e
		m.from, m.to = move(e.start), move(e.end)
		if e.start == pole && e.end == rim || e.start == rim && e.end == pole {
			m.centre = end + complex(times, 0)*(e.centre-end)
		}
		if dot(m.to-m.from, e.to-e.from) <= 0 {
			a.Err = lack.Range("there is no room for it")
		}
		return m
	})
	return a
}
