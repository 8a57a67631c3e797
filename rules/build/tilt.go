package build

import (
	"slices"

	"kilovet/hv/quantity"
)

// pullsOf are the pulls that begin with an edge: as a whole with every line kept, or where
// that moves all, with sloped lines tilted; and at each end of a sloped line, tilting it.
func (d *drawing) pullsOf(e stretch, way complex128) (list []*pull) {
	if !e.along(way, d.near) {
		p, ok := d.pullOf(e, way, false)
		if !ok {
			p, ok = d.pullOf(e, way, true)
		}
		if ok {
			list = append(list, p)
		}
	}
	if !d.sloped(e) {
		return list
	}
	for _, end := range []stretch{{from: e.from, to: e.from, start: e.start, end: e.start}, {from: e.to, to: e.to, start: e.end, end: e.end}} {
		if p, ok := d.pullOf(end, way, true); ok {
			list = append(list, p)
		}
	}
	return list
}

// sloped reports whether a line may take another slope: neither along r nor along z, not
// running on into an arc, which it would meet with a corner, and with nothing drawn onto it.
func (d *drawing) sloped(e stretch) bool {
	if e.turn != 0 || e.along(1, d.near) || e.along(1i, d.near) || len(e.on) != 2 {
		return false
	}
	return !slices.ContainsFunc(d.bodies, func(b body) bool {
		return slices.ContainsFunc(b.edges, func(o stretch) bool {
			return o.turn != 0 && (slices.Contains(e.on, o.start) || slices.Contains(e.on, o.end))
		})
	})
}

// radius is the name of what a pull along r changes: a radius, and where a sloped line
// tilts also at what height, for its other end keeps its own.
func (p *pull) radius(b body) string {
	name := "radius of " + b.name
	for _, e := range p.stretched(b) {
		if p.sloped(e) {
			return name + " at z " + quantity.Text(quantity.Length(imag(p.seed.from)))
		}
	}
	return name
}
