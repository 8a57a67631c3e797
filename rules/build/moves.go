package build

import (
	"fmt"
	"math"
	"math/cmplx"
	"slices"
	"strings"

	"kilovet/hv/chain"
	"kilovet/hv/quantity"
)

// movedDimensions are those of a described arrangement that a move of a part of it along r
// or z, or another size of a body that nothing touches, changes.
func movedDimensions(f *chain.Field) (all []Dimension) {
	d := drawingOf(f)
	known := map[string]bool{} // pulls, and distances by both names
	for _, b := range d.bodies {
		if b.kind == boundary {
			continue
		}
		for _, e := range b.edges {
			for _, way := range []complex128{1i, 1} {
				for _, p := range d.pullsOf(e, way) {
					if !known[p.signature()] {
						known[p.signature()] = true
						all = append(all, p.dimension(b, known)...)
					}
				}
			}
		}
		if size, free := d.size(b); free {
			all = append(all, size)
		}
		all = append(all, d.capped(b)...)
	}
	return all
}

// dimension is what a pull of an edge of a body changes; none where there is no length
// that says it.
func (p *pull) dimension(b body, known map[string]bool) []Dimension {
	name, now, sense := p.length(b)
	between := strings.Split(strings.TrimPrefix(name, "distance of "), " from ")
	slices.Sort(between)
	pair := fmt.Sprint(between, now)
	if !(now > 0) || known[pair] {
		return nil
	}
	known[pair] = true
	middle := (p.seed.from + p.seed.to) / 2
	return []Dimension{{
		Name: name, Key: "field", Value: quantity.Length(now), Near: &middle,
		With: func(v quantity.Length) *Arrangement { return p.by((v - quantity.Length(now)) * quantity.Length(sense)) },
	}}
}

// length is a length that a pull changes, by name, and whether it grows or shrinks with
// the move: the radius of a wall; how far an electrode is from the next one along the
// axis; the height of what is stretched.
func (p *pull) length(b body) (name string, now, sense float64) {
	if p.way == 1 {
		return p.radius(b), real(p.seed.from), 1
	}
	if name, now, sense = p.distance(b); now > 0 {
		return name, now, sense
	}
	for _, e := range p.stretched(b) {
		if l := math.Abs(imag(e.to - e.from)); now == 0 || l < now {
			now, sense = l, 1
			if top := imag(e.to) > imag(e.from); top != p.moved[e.end] {
				sense = -1
			}
		}
	}
	middle := (p.seed.from + p.seed.to) / 2
	where := "r " + quantity.Text(quantity.Length(real(middle))) + ", z " + quantity.Text(quantity.Length(imag(middle)))
	return "height of " + b.name + ", moved at " + where, now, sense
}

// distance of what moves of an electrode from the nearest conductor along the axis that
// does not move; 0 where none lies that way.
func (p *pull) distance(b body) (name string, now, sense float64) {
	if b.kind != electrode {
		return "", 0, 0
	}
	mine := p.still(b, true)
	for _, other := range p.bodies {
		if other.kind == dielectric || other.name == "" || other.kind == b.kind && other.name == b.name {
			continue
		}
		for _, y := range p.still(other, false) {
			for _, x := range mine {
				far := cmplx.Abs(x - y)
				if far > p.near && math.Abs(imag(x-y)) >= mostlyAlong*far && (now == 0 || far < now) {
					now, sense = far, math.Copysign(1, imag(x-y))
					name = "distance of " + b.name + " from " + other.name
				}
			}
		}
	}
	return name, now, sense
}

// mostlyAlong is the part of a distance that lies along the axis from which it counts so.
const mostlyAlong = 0.95

// still are places on the edges of a body that move whole, or do not move at all.
func (p *pull) still(b body, moved bool) (list []complex128) {
	for _, e := range b.edges {
		if p.moved[e.start] == moved && p.moved[e.end] == moved {
			list = append(list, e.places()...)
		}
	}
	return list
}

// size is another size of a body that touches and encloses nothing, about its middle.
func (d *drawing) size(b body) (Dimension, bool) {
	own := map[int]bool{}
	for _, e := range b.edges {
		for _, i := range e.on {
			own[i] = true
		}
	}
	bounds := boxOf(b.edges)
	for _, other := range d.bodies {
		if other.name == b.name && other.kind == b.kind {
			continue
		}
		joined := slices.ContainsFunc(other.edges, func(e stretch) bool { return slices.ContainsFunc(e.on, func(i int) bool { return own[i] }) })
		if joined || boxOf(other.edges).within(bounds) {
			return Dimension{}, false
		}
	}
	middle := (bounds.low + bounds.high) / 2
	if real(bounds.low) <= d.near {
		middle = complex(0, imag(middle))
	}
	size := 0.0
	for _, e := range b.edges {
		for _, x := range e.places() {
			size = math.Max(size, cmplx.Abs(x-middle))
		}
	}
	at := bounds.low
	return Dimension{Name: "size of " + b.name + ", its middle kept", Key: "field", Value: quantity.Length(size), Near: &at,
		With: func(v quantity.Length) *Arrangement { return d.scaled(b, middle, float64(v)/size) }}, size > 0
}

func (d *drawing) scaled(b body, middle complex128, factor float64) *Arrangement {
	grow := func(x complex128) complex128 { return middle + complex(factor, 0)*(x-middle) }
	return &Arrangement{Field: d.changed(func(e stretch) stretch {
		if !slices.ContainsFunc(b.edges, func(mine stretch) bool { return mine.start == e.start && mine.end == e.end }) {
			return e
		}
		e.from, e.to, e.centre = grow(e.from), grow(e.to), grow(e.centre)
		return e
	})}
}
