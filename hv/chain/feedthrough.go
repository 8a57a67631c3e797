package chain

import (
	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// Feedthrough carries a conductor through the hole of an earthed plate, mostly from
// air into vacuum. All radii are those of the parts, not diameters.
type Feedthrough struct {
	document.Table
	Name       document.Given[string]           `key:"name" needed:"yes" means:"name of the feedthrough" example:"gun feedthrough"`
	Node       document.Given[string]           `key:"node" means:"node of the pin" example:"cathode"`
	To         document.Given[string]           `key:"to" means:"node of the plate (default: ground)" example:"ground"`
	Also       document.Given[[]string]         `key:"also" list:"many" means:"further nodes on pins of the same sizes, of no higher voltage" example:"[\"heater.a\"]"`
	Voltage    document.Given[quantity.Voltage] `key:"voltage" range:"> 0 V, <= 1 MV" means:"DC or peak voltage, in place of node" example:"20 kV"`
	Insulation document.Given[string]           `key:"insulation" words:"functional | basic | reinforced" means:"what it must do (default: basic)" example:"basic"`

	Pin            *Pin                            `key:"pin" needed:"yes" means:"the conductor"`
	Hole           *Hole                           `key:"hole" needed:"yes" means:"the hole of the plate"`
	PlateThickness document.Given[quantity.Length] `key:"plate_thickness" range:"> 0 mm, <= 1 m" means:"thickness of the plate at the hole" example:"12 mm"`
	Sleeve         *Sleeve                         `key:"sleeve" means:"insulating tube between pin and hole"`
	AirSide        *AirSide                        `key:"air_side" means:"the sleeve outside the vessel"`
	VacuumSide     *VacuumSide                     `key:"vacuum_side" means:"the sleeve inside the vessel"`
	Strip          *Strip                          `key:"strip" means:"bared insulation of the cable on the air side"`
}

// Pin is the conductor of a feedthrough.
type Pin struct {
	document.Table
	Radius document.Given[quantity.Length] `key:"radius" range:"> 0 mm, <= 1 m" needed:"yes" means:"radius of the conductor" example:"3 mm"`
}

// Hole is the hole of the plate.
type Hole struct {
	document.Table
	Radius     document.Given[quantity.Length] `key:"radius" range:"> 0 mm, <= 1 m" needed:"yes" means:"radius of the hole" example:"22 mm"`
	EdgeRadius document.Given[quantity.Length] `key:"edge_radius" range:"> 0 mm, <= 100 mm" means:"rounding of its edges" example:"2 mm"`
}

// Sleeve is the insulating tube of a feedthrough.
type Sleeve struct {
	document.Table
	Material        document.Given[string]               `key:"material" needed:"yes" means:"what it is made of" example:"alumina"`
	CTI             document.Given[quantity.Voltage]     `key:"cti" range:">= 0 V, <= 1000 V" means:"comparative tracking index of a material that is not known here" example:"600 V"`
	InnerRadius     document.Given[quantity.Length]      `key:"inner_radius" range:"> 0 mm, <= 1 m" means:"radius of the bore (default: that of the pin)" example:"3.2 mm"`
	OuterRadius     document.Given[quantity.Length]      `key:"outer_radius" range:"> 0 mm, <= 1 m" means:"outer radius (default: that of the hole)" example:"12 mm"`
	InnerGap        document.Given[string]               `key:"inner_gap" words:"air | vacuum" means:"what fills the annulus between pin and sleeve" example:"vacuum"`
	OuterGap        document.Given[string]               `key:"outer_gap" words:"air | vacuum" means:"what fills the annulus between sleeve and hole" example:"air"`
	JointWidth      document.Given[quantity.Length]      `key:"joint_width" range:"> 0 mm, <= 100 mm" means:"sleeve that fills a hole with rounded edges: how wide the wedge beside the edge is where braze or cement ends; its field is then worked out" example:"0.1 mm"`
	Permittivity    document.Given[float64]              `key:"permittivity" range:">= 1, <= 100" means:"relative permittivity (default: that of the material)" example:"9.2"`
	Resistivity     document.Given[quantity.Resistivity] `key:"resistivity" range:"> 0 ohm m, <= 1e25 ohm m" means:"resistivity (default: that of the material)" example:"1e12 ohm m"`
	Strength        document.Given[quantity.Field]       `key:"strength" range:"> 0 kV/mm, <= 1000 kV/mm" means:"short-time strength of the maker, at tested_thickness" example:"15 kV/mm"`
	TestedThickness document.Given[quantity.Length]      `key:"tested_thickness" range:"> 0 mm, <= 1 m" means:"thickness that the strength was measured at" example:"3 mm"`
}

// AirSide is the sleeve outside the vessel.
type AirSide struct {
	document.Table
	Length    document.Given[quantity.Length] `key:"length" range:"> 0 mm, <= 10 m" needed:"yes" means:"sleeve from the plate to the live metal, straight" example:"60 mm"`
	Clearance document.Given[quantity.Length] `key:"clearance" range:"> 0 mm, <= 10 m" means:"shortest distance in air from live metal to the plate (default: length)" example:"60 mm"`
	Creepage  document.Given[quantity.Length] `key:"creepage" range:"> 0 mm, <= 10 m" means:"shortest distance along the surface, over the ribs (default: length and twice the depth of each rib)" example:"140 mm"`
	Ribs      *Ribs                           `key:"ribs" means:"ribs on the surface"`
	Shape     *Shape                          `key:"shape" means:"shape of live metal and plate; the gap is the clearance"`
}

// VacuumSide is the sleeve inside the vessel.
type VacuumSide struct {
	document.Table
	Length        document.Given[quantity.Length]  `key:"length" range:"> 0 mm, <= 10 m" needed:"yes" means:"surface of the sleeve from the plate to the live metal" example:"60 mm"`
	JunctionAngle document.Given[quantity.Angle]   `key:"junction_angle" range:"> 0 deg, < 180 deg" means:"angle inside the insulator between its surface and the negative electrode" example:"45 deg"`
	Shielded      document.Given[bool]             `key:"shielded" means:"a shield covers the junction of metal, insulator and vacuum at the negative end" example:"true"`
	TestedVoltage document.Given[quantity.Voltage] `key:"tested_voltage" range:"> 0 V, <= 1 MV" means:"flashover voltage in vacuum of a like surface, at tested_length" example:"45 kV"`
	TestedLength  document.Given[quantity.Length]  `key:"tested_length" range:">= 1 mm, <= 300 mm" means:"length of the surface that was tested" example:"30 mm"`
	Shape         *Shape                           `key:"shape" means:"shape of live metal and plate; the gap is the length"`
}

// Strip is cable insulation bared of its screen.
type Strip struct {
	document.Table
	Length   document.Given[quantity.Length]  `key:"length" range:"> 0 mm, <= 10 m" needed:"yes" means:"bared insulation from the screen to the live metal" example:"120 mm"`
	Material document.Given[string]           `key:"material" means:"insulation of the cable" example:"polyethylene"`
	CTI      document.Given[quantity.Voltage] `key:"cti" range:">= 0 V, <= 1000 V" means:"comparative tracking index, in place of a material" example:"600 V"`
}

// Ribs are like ribs across a surface.
type Ribs struct {
	document.Table
	Count     document.Given[int]             `key:"count" range:">= 1, <= 1000" needed:"yes" means:"how many ribs" example:"5"`
	Depth     document.Given[quantity.Length] `key:"depth" range:"> 0 mm, <= 1 m" needed:"yes" means:"height of a rib over the ground of the groove beside it" example:"8 mm"`
	Width     document.Given[quantity.Length] `key:"width" range:"> 0 mm, <= 1 m" needed:"yes" means:"clear width of the grooves between them" example:"5 mm"`
	Thickness document.Given[quantity.Length] `key:"thickness" range:"> 0 mm, <= 1 m" means:"thickness of a rib along the surface; pollution degree 3 asks for less creepage where ribs are large enough" example:"12 mm"`
}

// Inner is the radius of the bore: that of the pin where none is given.
func (f *Feedthrough) Inner() document.Given[quantity.Length] {
	if f.Sleeve.InnerRadius.Set() {
		return f.Sleeve.InnerRadius
	}
	return f.Pin.Radius
}

// Outer is the outer radius of the sleeve: that of the hole where none is given.
func (f *Feedthrough) Outer() document.Given[quantity.Length] {
	if f.Sleeve.OuterRadius.Set() {
		return f.Sleeve.OuterRadius
	}
	return f.Hole.Radius
}

// HasInnerGap reports whether there is an annulus between pin and sleeve.
func (f *Feedthrough) HasInnerGap() bool { return !quantity.AtMost(f.Inner().V, f.Pin.Radius.V) }

// HasOuterGap reports whether there is an annulus between sleeve and hole.
func (f *Feedthrough) HasOuterGap() bool { return !quantity.AtLeast(f.Outer().V, f.Hole.Radius.V) }
