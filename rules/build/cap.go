package build

import (
	"math"
	"slices"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// capped is another radius of a rod that ends in a half ball on the axis, the place of
// its end kept; none where something else hangs on it.
func (d *drawing) capped(b body) (all []Dimension) {
	for _, e := range b.edges {
		pole, rim := e.start, e.end
		if real(d.points[pole]) > d.near {
			pole, rim = rim, pole
		}
		radius := real(d.points[rim])
		flat := math.Abs(imag(d.points[rim]-e.centre)) <= d.near && math.Abs(real(e.centre)) <= d.near
		if e.turn == 0 || real(d.points[pole]) > d.near || !flat {
			continue
		}
		for _, shank := range b.edges {
			if slices.Contains([]int{shank.start, shank.end}, rim) && shank.along(1i, d.near) && d.hangsFree(e, shank, rim) {
				near := d.points[pole]
				all = append(all, Dimension{Name: "radius of " + b.name + ", its end kept", Key: "field", Value: quantity.Length(radius), Near: &near,
					With: func(v quantity.Length) *Arrangement { return d.thickened(shank, pole, rim, float64(v)/radius) }})
			}
		}
	}
	return all
}

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
	wider := complex((times-1)*real(d.points[rim]), 0)
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
