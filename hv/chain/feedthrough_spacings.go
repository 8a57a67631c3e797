package chain

import (
	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// The surfaces and gaps of a feedthrough, by what follows the colon of their names.
const (
	AirSurface    = "air side"
	VacuumSurface = "vacuum side"
	VacuumGap     = "vacuum side, electrodes"
	BareStrip     = "cable strip"
	PinGap        = "pin to plate"
	EdgeGap       = "edge of the hole"
	SleeveWall    = "sleeve"
	InnerAnnulus  = "pin to sleeve"
	OuterAnnulus  = "sleeve to hole"
)

// Spacings are the gaps and surfaces of a feedthrough that are judged as spacings are:
// those of the whole voltage. What shares it with the sleeve is not among them. Every
// length keeps the place of the key it comes from.
func (f *Feedthrough) Spacings() []Spacing {
	var all []Spacing
	if f.AirSide != nil {
		all = append(all, f.airSide())
	}
	if f.VacuumSide != nil {
		all = append(all, f.vacuumSide()...)
	}
	if f.Strip != nil {
		all = append(all, f.bareStrip())
	}
	if f.Sleeve == nil {
		return append(all, f.open()...)
	}
	return append(all, f.wall())
}

// spacing is a spacing between pin and plate in a medium.
func (f *Feedthrough) spacing(part, medium string) Spacing {
	s := Spacing{
		Table: f.Table, Name: at(f.Name, f.Name.V+": "+part), From: f.Node, Also: f.Also, Voltage: f.Voltage,
		Medium: at(f.Name, medium), Insulation: f.Insulation, Of: f,
	}
	if f.Node.Set() {
		s.To = at(f.Node, f.To.Or("ground"))
	}
	if f.Sleeve != nil {
		s.Material, s.CTI = f.Sleeve.Material, f.Sleeve.CTI
	}
	return s
}

// at is a value that stands where another was given.
func at[T, U any](where document.Given[U], v T) document.Given[T] {
	return document.Given[T]{V: v, Place: where.Place}
}

func (f *Feedthrough) airSide() Spacing {
	a := f.AirSide
	s := f.spacing(AirSurface, "air")
	s.Clearance, s.Creepage, s.Ribs, s.Shape = a.Length, a.Creepage, a.Ribs, a.Shape
	if a.Clearance.Set() {
		s.Clearance = a.Clearance
	}
	if !a.Creepage.Set() {
		s.Creepage = at(a.Length, a.Length.V+a.Ribs.Contour())
	}
	return s
}

// Contour is what like ribs add to the straight way along a surface: both flanks of each.
func (r *Ribs) Contour() quantity.Length {
	if r == nil {
		return 0
	}
	return 2 * quantity.Length(r.Count.V) * r.Depth.V
}

// vacuumSide is the surface in vacuum, and the gap beside it where its shape is known.
func (f *Feedthrough) vacuumSide() []Spacing {
	v := f.VacuumSide
	if f.Sleeve == nil {
		return nil
	}
	s := f.spacing(VacuumSurface, "vacuum")
	s.Creepage, s.JunctionAngle, s.Shielded, s.TestedVoltage, s.TestedLength = v.Length, v.JunctionAngle, v.Shielded, v.TestedVoltage, v.TestedLength
	if v.Shape == nil {
		return []Spacing{s}
	}
	g := f.spacing(VacuumGap, "vacuum")
	g.Clearance, g.Shape = v.Length, v.Shape
	return []Spacing{s, g}
}

// bareStrip is the bared insulation of the cable: surface and gap alike.
func (f *Feedthrough) bareStrip() Spacing {
	s := f.spacing(BareStrip, "air")
	s.Material, s.CTI = f.Strip.Material, f.Strip.CTI
	s.Clearance, s.Creepage = f.Strip.Length, f.Strip.Length
	return s
}

// open is the gap between a bare pin and the hole, and the edge of the hole.
func (f *Feedthrough) open() []Spacing {
	medium := "air"
	if f.AirSide == nil {
		medium = "vacuum"
	}
	s := f.spacing(PinGap, medium)
	s.Clearance = at(f.Hole.Radius, f.Hole.Radius.V-f.Pin.Radius.V)
	s.Shape = &Shape{Kind: at(f.Hole.Radius, "coaxial"), InnerRadius: f.Pin.Radius, OuterRadius: f.Hole.Radius}
	s.SharperElectrode = f.sharper("from")
	if !f.Hole.EdgeRadius.Set() {
		return []Spacing{s}
	}
	edge := f.spacing(EdgeGap, medium)
	edge.Clearance = s.Clearance
	edge.Shape = &Shape{Kind: at(f.Hole.EdgeRadius, "rounded edge"), EdgeRadius: f.Hole.EdgeRadius}
	edge.SharperElectrode = f.sharper("to")
	return []Spacing{s, edge}
}

// sharper is the side of the sharper electrode where the pin has a node: of the pin between
// it and the plate, of the plate at its edge.
func (f *Feedthrough) sharper(side string) document.Given[string] {
	if !f.Node.Set() {
		return document.Given[string]{}
	}
	return at(f.Node, side)
}

// wall is the sleeve alone under the whole voltage, as when the annuli have discharged.
func (f *Feedthrough) wall() Spacing {
	s := f.spacing(SleeveWall, "solid")
	s.Strength, s.TestedThickness = f.Sleeve.Strength, f.Sleeve.TestedThickness
	s.Clearance = at(f.Outer(), f.Outer().V-f.Inner().V)
	s.Shape = &Shape{Kind: at(f.Outer(), "coaxial"), InnerRadius: f.Inner(), OuterRadius: f.Outer()}
	return s
}
