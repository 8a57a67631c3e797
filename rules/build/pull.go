package build

import (
	"fmt"
	"slices"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// pull moves a part of a drawing along r or z: the points that move, with whatever is
// drawn onto them. Lines in the direction of the move that have one end in it grow or
// shrink, and where it tilts sloped lines take another slope; nothing else changes its
// form.
type pull struct {
	*drawing
	way   complex128 // 1 along r, i along z
	moved []bool     // by the number of the point
	seed  stretch    // what it began with
	tilts bool
}

// pullOf is the least part of a drawing that can move with an edge; ok is false where
// that is all of it, or where it would leave the axis.
func (d *drawing) pullOf(seed stretch, way complex128, tilts bool) (p *pull, ok bool) {
	p = &pull{d, way, make([]bool, len(d.points)), seed, tilts}
	p.take(seed.start, seed.end)
	for grown := true; grown; {
		grown = false
		for _, b := range d.bodies {
			for _, e := range b.edges {
				grown = p.follow(e) || grown
			}
		}
	}
	leaves := false
	for i, m := range p.moved {
		leaves = leaves || m && way == 1 && real(d.points[i]) <= d.near
	}
	return p, slices.Contains(p.moved, false) && !leaves
}

// take adds points; it reports whether one is new.
func (p *pull) take(points ...int) (grown bool) {
	for _, i := range points {
		grown = grown || !p.moved[i]
		p.moved[i] = true
	}
	return grown
}

// follow adds what must move because of an edge: the other end of one that cannot be
// stretched, what lies on one that moves whole, and one that something moves off. It
// reports whether that was new.
func (p *pull) follow(e stretch) (grown bool) {
	slides := e.along(p.way, p.near) || p.tilts && p.sloped(e)
	for _, i := range e.on {
		if p.moved[i] && !slides {
			grown = p.take(e.start, e.end) || grown
		}
	}
	if p.moved[e.start] && p.moved[e.end] {
		grown = p.take(e.on...) || grown
	}
	return grown
}

// stretched are the edges of a body that grow or shrink.
func (p *pull) stretched(b body) (list []stretch) {
	for _, e := range b.edges {
		if p.moved[e.start] != p.moved[e.end] {
			list = append(list, e)
		}
	}
	return list
}

// signature tells pulls apart; that of all the rest being pulled the other way is the
// same.
func (p *pull) signature() string {
	text := fmt.Sprint(p.way)
	for _, m := range p.moved {
		text += fmt.Sprint(m == p.moved[0])
	}
	return text
}

// by is the drawing with the part moved so far.
func (p *pull) by(far quantity.Length) *Arrangement {
	shift := p.way * complex(float64(far), 0)
	a := &Arrangement{}
	a.Field = p.changed(func(e stretch) stretch {
		m := e
		from, to := p.moved[e.start], p.moved[e.end]
		if from {
			m.from += shift
		}
		if to {
			m.to += shift
		}
		if from && to {
			m.centre += shift
		}
		if from != to && dot(m.to-m.from, e.to-e.from) <= 0 || real(m.from) < 0 || real(m.to) < 0 {
			a.Err = lack.Range("there is no room to move it so far")
		}
		return m
	})
	return a
}
