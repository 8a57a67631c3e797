package chain

import (
	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// sizesOf are the sizes that a shape must have, and those that it may have besides.
func (sh *Shape) sizesOf() (wanted, more []string) {
	wanted = append(wanted, sizesOf[sh.Kind.V]...)
	switch sh.Kind.V {
	case "plates":
		if sh.BodyRadius.Set() {
			return append(wanted, "edge_radius", "body_radius"), []string{"wall_radius"}
		}
	case "rounded edge":
		if sh.BodyRadius.Set() {
			return wanted, []string{"body_radius", "wall_radius"}
		}
		return wanted, []string{"body_radius"}
	case "sphere-plane", "sphere-sphere":
		return wanted, []string{"wall_radius"}
	}
	return wanted, nil
}

// shapeField judges whether the field of a shape can be worked out where that is asked,
// and whether the clearance is the shortest way.
func (s *survey) shapeField(sh *Shape, clearance document.Given[quantity.Length], medium document.Given[string]) {
	if !sh.IsComputed() || !s.sound(sh.Kind.Place) {
		return
	}
	switch at := sh.Computed.Place; {
	case !sh.Computed.V:
	case sh.Kind.V == "cylinder-plane" || sh.Kind.V == "parallel cylinders":
		s.fault(at, "a cylinder along a plane or another is no figure of revolution: its field is not worked out", "leave it out; the closed form is exact")
	case sh.Kind.V == "rounded edge" && s.lacks(sh.BodyRadius.Place):
		s.fault(at, "a rounded edge whose body is not known has no field to work out", `give body_radius, as in body_radius = "30 mm", or leave it out; the closed form is an upper bound`)
	case sh.Kind.V == "plates" && s.lacks(sh.BodyRadius.Place):
		s.fault(at, "plates without a rim have a uniform field, there is nothing to work out", "give edge_radius and body_radius of the plates, or leave it out")
	}
	if medium.V == "solid" || medium.V == "printed board" {
		s.fault(sh.Kind.Place, "the field of a shape is worked out in air, gas, vacuum and oil, not in "+medium.V, "leave computed, body_radius and wall_radius out, or describe a [[field]]")
	}
	s.shapeWall(sh, clearance)
}

// shapeWall holds the sizes of round bodies and of the wall against each other.
func (s *survey) shapeWall(sh *Shape, clearance document.Given[quantity.Length]) {
	body, edge := sh.BodyRadius, sh.EdgeRadius
	if body.Set() && s.sound(edge.Place) && !quantity.AtLeast(body.V, edge.V) {
		s.fault(body.Place, "a body of a smaller radius than its edge", "give the outer radius of the body; a rod with a half ball at its end has both alike")
	}
	reach := max(body.V, sh.Radius.V)
	if sh.WallRadius.Set() && s.sound(clearance.Place) && reach > 0 && !quantity.AtLeast(sh.WallRadius.V, reach+clearance.V) {
		s.fault(sh.WallRadius.Place, "the wall is nearer than the clearance", "the clearance is the shortest distance: give that to the wall, or the wall farther out")
	}
}
