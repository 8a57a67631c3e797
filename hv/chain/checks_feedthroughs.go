package chain

import (
	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// checkFeedthroughs asks for parts that go into each other, and for ends as of spacings.
func checkFeedthroughs(s *survey) {
	for i := range s.Feedthroughs {
		f := &s.Feedthroughs[i]
		s.feedthroughEnds(f)
		s.feedthroughSides(f)
		s.feedthroughRadii(f)
		s.feedthroughSurfaces(f)
	}
}

func (s *survey) feedthroughEnds(f *Feedthrough) {
	const either = `give node, or voltage, as in voltage = "20 kV"`
	node, voltage := f.Node.Set(), f.Voltage.Set()
	switch {
	case voltage && node:
		s.fault(f.Voltage.Place, "both a node and a voltage", "keep one of the two")
	case voltage && f.To.Set():
		s.fault(f.To.Place, "the node of the plate beside a stated voltage", "give node in place of voltage, or leave it out")
	case voltage && f.Also.Set():
		s.fault(f.Also.Place, "further nodes beside a stated voltage", "give node in place of voltage, or leave it out")
	case s.lacks(f.Node.Place) && s.lacks(f.Voltage.Place):
		s.fault(f.Here(), "neither a node nor a voltage", either)
	case node && s.without(s.Multiplier != nil):
		s.fault(f.Node.Place, "without a multiplier nothing tells the voltage of a node", `give voltage in place of node, as in voltage = "20 kV"`)
	case node && f.Node.V == f.To.Or("ground"):
		s.fault(f.Node.Place, "pin and plate on the same node", "name the node of the pin")
	}
}

func (s *survey) feedthroughSides(f *Feedthrough) {
	switch {
	case s.without(f.AirSide != nil) && s.without(f.VacuumSide != nil):
		s.fault(f.Here(), "a feedthrough without a side", "describe air_side, vacuum_side or both: length at least")
	case f.AirSide != nil && f.VacuumSide != nil && s.without(f.Sleeve != nil):
		s.fault(f.Here(), "air on one side and vacuum on the other, and no sleeve between", "describe sleeve: its material at least")
	case f.Strip != nil && s.without(f.AirSide != nil):
		s.fault(f.Strip.Here(), "a bared cable without a side in air", "describe air_side, or leave the strip out")
	}
}

// feedthroughRadii holds pin, sleeve and hole against each other.
func (s *survey) feedthroughRadii(f *Feedthrough) {
	if f.Pin == nil || f.Hole == nil {
		return
	}
	pin, hole := f.Pin.Radius, f.Hole.Radius
	s.larger(hole, pin, "the hole is not wider than the pin", "give the radius of the hole, not its diameter, and that of the pin")
	s.rounding(f)
	if f.Sleeve == nil {
		return
	}
	inner, outer := f.Sleeve.InnerRadius, f.Sleeve.OuterRadius
	if s.bothSound(inner, pin) && !quantity.AtLeast(inner.V, pin.V) {
		s.fault(inner.Place, "the pin of "+quantity.Text(pin.V)+" does not go into the sleeve", "the bore is at least as wide as the pin; give radii, not diameters")
	}
	if s.bothSound(outer, hole) && !quantity.AtMost(outer.V, hole.V) {
		s.fault(outer.Place, "the sleeve does not go into the hole of "+quantity.Text(hole.V), "the sleeve is at most as wide as the hole; give radii, not diameters")
	}
	s.larger(f.Outer(), f.Inner(), "the sleeve has no wall", "the outer radius of the sleeve exceeds the inner one")
	s.annuli(f)
}

// larger reports a radius that does not exceed another.
func (s *survey) larger(outer, inner document.Given[quantity.Length], what, remedy string) {
	if s.bothSound(outer, inner) && quantity.AtMost(outer.V, inner.V) {
		s.fault(outer.Place, what+": "+quantity.Text(outer.V)+" against "+quantity.Text(inner.V), remedy)
	}
}

func (s *survey) bothSound(a, b document.Given[quantity.Length]) bool {
	return s.sound(a.Place) && s.sound(b.Place)
}

// rounding holds the edge against the plate that it is cut into.
func (s *survey) rounding(f *Feedthrough) {
	edge, plate := f.Hole.EdgeRadius, f.PlateThickness
	if s.bothSound(edge, plate) && !quantity.AtMost(edge.V, plate.V) {
		s.fault(edge.Place, "the edge is rounded by more than the plate is thick: "+quantity.Text(plate.V), "an edge radius is at most the thickness of the plate")
	}
}

// annuli asks that what fills an annulus is said only where there is one.
func (s *survey) annuli(f *Feedthrough) {
	known := func(r document.Given[quantity.Length]) bool { return s.sound(r.Place) || s.lacks(r.Place) }
	if !s.bothSound(f.Pin.Radius, f.Hole.Radius) || !known(f.Sleeve.InnerRadius) || !known(f.Sleeve.OuterRadius) {
		return
	}
	if f.Sleeve.InnerGap.Set() && !f.HasInnerGap() {
		s.fault(f.Sleeve.InnerGap.Place, "no gap between pin and sleeve to fill", "give inner_radius of the sleeve, larger than the pin, or leave it out")
	}
	if f.Sleeve.OuterGap.Set() && !f.HasOuterGap() {
		s.fault(f.Sleeve.OuterGap.Place, "no gap between sleeve and hole to fill", "give outer_radius of the sleeve, smaller than the hole, or leave it out")
	}
}

func (s *survey) feedthroughSurfaces(f *Feedthrough) {
	if a := f.AirSide; a != nil {
		s.alongNotShorter(a.Creepage, a.Clearance)
		if a.Ribs != nil && a.Creepage.Set() && s.bothSound(a.Creepage, a.Length) && !quantity.AtLeast(a.Creepage.V, a.Length.V) {
			s.fault(a.Creepage.Place, "the way over the ribs is shorter than the straight one of "+quantity.Text(a.Length.V), "measure the creepage over the ribs, or leave it out")
		}
	}
	if v := f.VacuumSide; v != nil {
		s.tested(v.TestedVoltage, v.TestedLength)
	}
	if sl := f.Sleeve; sl != nil {
		s.strengthOf(sl.Strength, sl.TestedThickness)
	}
}

// strengthOf asks for the strength beside its thickness.
func (s *survey) strengthOf(strength document.Given[quantity.Field], thickness document.Given[quantity.Length]) {
	if s.sound(thickness.Place) && s.lacks(strength.Place) {
		s.fault(thickness.Place, "a tested thickness without the strength", `give strength, as in strength = "15 kV/mm"`)
	}
}

// alongNotShorter reports a surface that is shorter than the straight way.
func (s *survey) alongNotShorter(creepage, clearance document.Given[quantity.Length]) {
	if s.bothSound(creepage, clearance) && !quantity.AtLeast(creepage.V, clearance.V) {
		s.fault(creepage.Place, "the way along the surface is shorter than the clearance of "+quantity.Text(clearance.V), "the clearance is the shortest way of all")
	}
}

// tested asks for both halves of a tested pair.
func (s *survey) tested(voltage document.Given[quantity.Voltage], length document.Given[quantity.Length]) {
	switch {
	case s.sound(voltage.Place) && s.lacks(length.Place):
		s.fault(voltage.Place, "a tested voltage without the tested length", `give tested_length, as in tested_length = "30 mm"`)
	case s.sound(length.Place) && s.lacks(voltage.Place):
		s.fault(length.Place, "a tested length without the tested voltage", `give tested_voltage, as in tested_voltage = "45 kV"`)
	}
}
