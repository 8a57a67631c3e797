package build

import (
	"kilovet/hv/chain"
	"kilovet/hv/quantity"
)

// coaxial cylinders are cut out between two planes of symmetry.
func (b shapeBuilder) coaxial(p pen, a *Arrangement, d shapeSizes) {
	long := d.outer - d.inner
	a.Electrodes = []chain.Electrode{
		p.held(Sharper, -b.across, at(d.inner, 0), at(d.inner, long)),
		p.held(Blunter, 0, at(d.outer, 0), at(d.outer, long)),
	}
	a.Boundary = []chain.Boundary{p.natural(at(d.inner, 0), at(d.outer, 0)), p.natural(at(d.inner, long), at(d.outer, long))}
}

func (b shapeBuilder) concentric(p pen, a *Arrangement, d shapeSizes) {
	a.Electrodes = []chain.Electrode{
		p.held(Sharper, -b.across, ball(d.inner, 0)...),
		p.held(Blunter, 0, ball(d.outer, 0)...),
	}
}

// ball is a sphere about a place on the axis.
func ball(radius, middle quantity.Length) []mark {
	return []mark{at(0, middle-radius), arc(0, middle+radius, 0, middle, "left")}
}

// spherePlane stands over a plane without end, or in a can of which the plane is the floor.
func (b shapeBuilder) spherePlane(p pen, a *Arrangement, d shapeSizes) {
	a.Electrodes = []chain.Electrode{p.held(Sharper, -b.across, ball(d.radius, d.gap+d.radius)...)}
	top := d.gap + 2*d.radius
	if d.wall > 0 {
		a.Electrodes = append(a.Electrodes, p.held(Blunter, 0, at(0, 0), at(d.wall, 0), at(d.wall, top+d.wall), at(0, top+d.wall)))
		return
	}
	a.Boundary = []chain.Boundary{p.floor(2 * (d.gap + d.radius))}
}

// floor is an earthed plane without end: one that reaches farther out than all else.
func (p pen) floor(reach quantity.Length) chain.Boundary {
	f := p.natural(at(0, 0), at(reach, 0))
	f.Kind.V = "earth"
	return f
}

// spheres stand in open space or in an earthed can: one live and one earthed, or both at
// half the voltage.
func (b shapeBuilder) spheres(p pen, a *Arrangement, d shapeSizes) {
	low, high := quantity.Voltage(0), -b.across
	if !b.Shape.Earthed.Or(true) {
		low, high = b.across/2, -b.across/2
	}
	a.Electrodes = []chain.Electrode{
		p.held(Sharper, high, ball(d.radius, d.gap+d.radius)...),
		p.held(Blunter, low, ball(d.radius, -d.radius)...),
	}
	if d.wall > 0 {
		a.Boundary = []chain.Boundary{p.can(d.wall, -2*d.radius-d.wall, d.gap+2*d.radius+d.wall)}
	}
}

// can is an earthed wall with floor and roof.
func (p pen) can(radius, floor, roof quantity.Length) chain.Boundary {
	c := p.natural(at(0, floor), at(radius, floor), at(radius, roof), at(0, roof))
	c.Kind.V = "earth"
	return c
}

// rod is the end of a rod with a rounded rim over a plane, with a half ball at its end
// where the edge is as large as the body. It goes on upwards within a wall.
func (b shapeBuilder) rod(p pen, a *Arrangement, d shapeSizes) {
	wall := d.wall
	if wall == 0 {
		wall = d.body + 10*(d.gap+d.body)
		b.wallsAt(a, wall)
	}
	top := d.gap + d.edge + wall
	a.Electrodes = []chain.Electrode{
		p.held(Sharper, -b.across, at(0, d.gap), at(d.body-d.edge, d.gap), arc(d.body, d.gap+d.edge, d.body-d.edge, d.gap+d.edge, "left"), at(d.body, top)),
		p.held(Blunter, 0, at(0, 0), at(wall, 0), at(wall, top)),
	}
	a.Boundary = []chain.Boundary{p.natural(at(d.body, top), at(wall, top))}
}

// plates are two round ones with full rims, one live and one earthed, in open space or
// in an earthed can.
func (b shapeBuilder) plates(p pen, a *Arrangement, d shapeSizes) {
	a.Electrodes = []chain.Electrode{
		p.held(Sharper, -b.across, plate(d, d.gap, 1)...),
		p.held(Blunter, 0, plate(d, 0, -1)...),
	}
	if d.wall > 0 {
		a.Boundary = []chain.Boundary{p.can(d.wall, -2*d.edge-d.wall, d.gap+2*d.edge+d.wall)}
	}
	a.Assumed = append(a.Assumed, b.Name.V+": both plates are alike, as thick as two edge radii, and one is earthed")
}

// plate is one of two: its face at a height, its back beyond.
func plate(d shapeSizes, face quantity.Length, side int) []mark {
	flat, way, turn := d.body-d.edge, quantity.Length(side), "left"
	if side < 0 {
		turn = "right"
	}
	return []mark{at(0, face), at(flat, face), arc(flat, face+2*way*d.edge, flat, face+way*d.edge, turn), at(0, face+2*way*d.edge)}
}
