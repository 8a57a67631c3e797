package chain

import (
	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// Vacuum is the vessel.
type Vacuum struct {
	document.Table
	Gas            document.Given[string]            `key:"gas" words:"air | nitrogen | sulphur hexafluoride | helium | argon | hydrogen | carbon dioxide" means:"gas let in (default: air)" example:"air"`
	PressurePermit document.Given[quantity.Pressure] `key:"pressure_permit" range:"> 0 Pa, <= 100 Pa" means:"high voltage is permitted below this" example:"4e-5 mbar"`
	LongestPath    document.Given[quantity.Length]   `key:"longest_path" range:"> 0 mm, <= 100 m" means:"longest straight path between parts at different potential" example:"300 mm"`
	GaugeFactor    document.Given[float64]           `key:"gauge_factor" range:"> 0, <= 100" means:"true pressure over gauge reading (default: 1)" example:"1.0"`
}

// Protection holds the measures against faults.
type Protection struct {
	document.Table
	OverVoltage *VoltageTrip           `key:"over_voltage" means:"switches off above a voltage"`
	OverCurrent *CurrentTrip           `key:"over_current" means:"switches off above a current"`
	Restart     document.Given[string] `key:"restart" words:"manual | automatic" means:"how it comes back after a trip or a mains failure" example:"manual"`
}

// VoltageTrip switches off above a voltage.
type VoltageTrip struct {
	document.Table
	Trip   document.Given[quantity.Voltage] `key:"trip" range:"> 0 V, <= 1 MV" needed:"yes" means:"trip point, magnitude" example:"23 kV"`
	Senses document.Given[string]           `key:"senses" means:"what it reads" example:"second divider"`
	ActsOn document.Given[string]           `key:"acts_on" means:"what it switches off" example:"drive supply"`
}

// CurrentTrip switches off above a current.
type CurrentTrip struct {
	document.Table
	Trip   document.Given[quantity.Current] `key:"trip" range:"> 0 A, <= 1 kA" needed:"yes" means:"trip point" example:"200 uA"`
	Senses document.Given[string]           `key:"senses" means:"whose current it reads: return, that of the multiplier (default, an assumption), or a part of the circuit by its name" example:"return"`
	ActsOn document.Given[string]           `key:"acts_on" means:"what it switches off" example:"drive supply"`
}

// Access says how people are kept away, and what they can reach.
type Access struct {
	document.Table
	Enclosure      document.Given[string]        `key:"enclosure" words:"interlocked | tool | open" means:"how the enclosure opens" example:"interlocked"`
	Interlock      *Interlock                    `key:"interlock" means:"what happens when it opens"`
	EarthBond      *EarthBond                    `key:"earth_bond" means:"protective earth of the enclosure"`
	EarthingRod    *EarthingRod                  `key:"earthing_rod" means:"resistor stick for discharging by hand"`
	WaitingTime    document.Given[quantity.Time] `key:"waiting_time" range:">= 0 s, <= 24 h" means:"stated wait before the enclosure is opened" example:"60 s"`
	Touchable      document.Given[[]string]      `key:"touchable" list:"many" means:"nodes a person or tool can reach" example:"[\"divider.tap\"]"`
	PortsDescribed document.Given[bool]          `key:"ports_described" means:"every port and window has its own [[shield]]" example:"true"`
}

// Interlock switches off when the enclosure opens.
type Interlock struct {
	document.Table
	Switches document.Given[int]    `key:"switches" range:">= 0, <= 100" needed:"yes" means:"independent switches at each door" example:"2"`
	ActsOn   document.Given[string] `key:"acts_on" means:"what it switches off" example:"drive supply"`
	Restart  document.Given[string] `key:"restart" words:"manual | automatic" means:"how it comes back after closing" example:"manual"`
}

// EarthBond is the protective earth connection.
type EarthBond struct {
	document.Table
	Count       document.Given[int]                 `key:"count" range:">= 0, <= 100" means:"separate bonds" example:"2"`
	Resistance  document.Given[quantity.Resistance] `key:"resistance" range:">= 0 ohm, <= 1 Mohm" means:"measured resistance of each" example:"0.05 ohm"`
	TestCurrent document.Given[quantity.Current]    `key:"test_current" range:"> 0 A, <= 1 kA" means:"current it was measured with" example:"25 A"`
}

// EarthingRod is the stick a person discharges nodes with.
type EarthingRod struct {
	document.Table
	Resistance   document.Given[quantity.Resistance] `key:"resistance" range:">= 0 ohm, <= 1 Gohm" needed:"yes" means:"series resistance" example:"100 kohm"`
	RatedVoltage document.Given[quantity.Voltage]    `key:"rated_voltage" range:"> 0 V, <= 1 MV" means:"rated voltage" example:"40 kV"`
	RatedEnergy  document.Given[quantity.Energy]     `key:"rated_energy" range:"> 0 J, <= 1 MJ" means:"rated energy of one discharge" example:"20 J"`
}

// Target is where electrons may stop.
type Target struct {
	document.Table
	Name     document.Given[string]           `key:"name" needed:"yes" means:"name of the target" example:"anode"`
	Material document.Given[string]           `key:"material" needed:"yes" means:"what it is made of" example:"stainless steel"`
	Current  document.Given[quantity.Current] `key:"current" range:">= 0 A, <= 10 A" means:"electron current that stops there" example:"60 uA"`
}

// Shield is a wall between a target and people.
type Shield struct {
	document.Table
	Name     document.Given[string]          `key:"name" needed:"yes" means:"name of the wall, port or window" example:"column wall"`
	Target   document.Given[string]          `key:"target" needed:"yes" means:"name of the target behind it" example:"anode"`
	Layers   []Layer                         `key:"layers" needed:"yes" means:"what the radiation passes" example:"[{ material = \"stainless steel\", thickness = \"3 mm\" }]"`
	Distance document.Given[quantity.Length] `key:"distance" range:"> 0 mm, <= 100 m" means:"from the stop to the outer surface" example:"120 mm"`
}

// Layer is one layer of a shield.
type Layer struct {
	document.Table
	Material  document.Given[string]          `key:"material" needed:"yes" means:"what it is made of" example:"stainless steel"`
	Thickness document.Given[quantity.Length] `key:"thickness" range:"> 0 mm, <= 10 m" needed:"yes" means:"thickness" example:"3 mm"`
}

// Spacing is a gap with its surfaces, between two nodes or for a stated voltage.
type Spacing struct {
	document.Table
	Name          document.Given[string]               `key:"name" needed:"yes" means:"name of the spacing" example:"gun feedthrough, air side"`
	From          document.Given[string]               `key:"from" means:"node on one side" example:"output"`
	To            document.Given[string]               `key:"to" means:"node on the other side" example:"ground"`
	Also          document.Given[[]string]             `key:"also" list:"many" means:"further nodes it holds for, of no higher voltage" example:"[\"stage.4\"]"`
	Voltage       document.Given[quantity.Voltage]     `key:"voltage" range:"> 0 V, <= 1 MV" means:"DC or peak voltage, in place of from and to" example:"20 kV"`
	Medium        document.Given[string]               `key:"medium" needed:"yes" words:"air | gas | vacuum | oil | solid | printed board" means:"what fills the gap" example:"air"`
	Insulation    document.Given[string]               `key:"insulation" words:"functional | basic | reinforced" means:"what it must do (default: basic)" example:"basic"`
	Clearance     document.Given[quantity.Length]      `key:"clearance" range:"> 0 mm, <= 100 m" means:"shortest distance in gas, vacuum or oil; thickness in solids" example:"60 mm"`
	Creepage      document.Given[quantity.Length]      `key:"creepage" range:"> 0 mm, <= 100 m" means:"shortest distance along the surface" example:"150 mm"`
	Material      document.Given[string]               `key:"material" means:"what the surface or solid is made of" example:"alumina"`
	CTI           document.Given[quantity.Voltage]     `key:"cti" range:">= 0 V, <= 1000 V" means:"comparative tracking index, in place of a material" example:"200 V"`
	Field         document.Given[string]               `key:"field" means:"name of the [[field]] whose computed field judges in place of a shape" example:"gun feedthrough"`
	Shape         *Shape                               `key:"shape" means:"shape of the electrodes; the gap is the clearance"`
	Gas           document.Given[string]               `key:"gas" words:"air | nitrogen | sulphur hexafluoride | helium | argon | hydrogen | carbon dioxide" means:"gas, where the medium is gas" example:"nitrogen"`
	Pressure      document.Given[quantity.Pressure]    `key:"pressure" range:"> 0 Pa, <= 10 MPa" means:"absolute pressure" example:"1013 mbar"`
	Temperature   document.Given[quantity.Temperature] `key:"temperature" range:">= -60 degC, <= 300 degC" means:"temperature of the gas (default: the site's air)" example:"30 degC"`
	Humidity      document.Given[quantity.Humidity]    `key:"humidity" range:">= 0 g/m3, <= 60 g/m3" means:"absolute humidity" example:"11 g/m3"`
	GaugeFactor   document.Given[float64]              `key:"gauge_factor" range:"> 0, <= 100" means:"true pressure over gauge reading" example:"1.0"`
	Transients    document.Given[bool]                 `key:"mains_transients" means:"transients of the mains reach this gap; where its voltage is stated, or it is at a coupling node, nothing else tells" example:"false"`
	ImpulseTested document.Given[bool]                 `key:"impulse_tested" means:"an impulse voltage test was done" example:"false"`

	Ribs             *Ribs                            `key:"ribs" means:"ribs across the surface; the creepage is measured over them"`
	Board            document.Given[string]           `key:"board" words:"external uncoated | internal | polymer coated | conformal coated | termination bare | termination coated" means:"printed board: where the conductors lie (default: external uncoated)" example:"conformal coated"`
	ElectrodeSurface document.Given[string]           `key:"electrode_surface" words:"smooth | weathered | stranded" means:"air and gas: surface of the electrodes (default: smooth)" example:"smooth"`
	SharperElectrode document.Given[string]           `key:"sharper_electrode" words:"positive | negative | from | to" means:"air: polarity of the sharper electrode where a voltage is given, between nodes its side (default: the worse polarity; without a shape two needles)" example:"from"`
	Finish           document.Given[string]           `key:"finish" words:"machined | polished" means:"vacuum: finish of the electrodes" example:"polished"`
	Conditioned      document.Given[bool]             `key:"conditioned" means:"vacuum: the electrodes were conditioned above their working voltage" example:"true"`
	StressedArea     document.Given[quantity.Area]    `key:"stressed_area" range:"> 0 mm2, <= 100 m2" means:"vacuum: area of electrode above 90 % of the peak field" example:"80 mm2"`
	JunctionAngle    document.Given[quantity.Angle]   `key:"junction_angle" range:"> 0 deg, < 180 deg" means:"vacuum: angle inside the insulator between its surface and the negative electrode" example:"45 deg"`
	Shielded         document.Given[bool]             `key:"shielded" means:"vacuum: a shield covers the junction at the negative electrode" example:"true"`
	TestedVoltage    document.Given[quantity.Voltage] `key:"tested_voltage" range:"> 0 V, <= 1 MV" means:"flashover voltage of a like surface in the same medium, at tested_length" example:"45 kV"`
	TestedLength     document.Given[quantity.Length]  `key:"tested_length" range:">= 1 mm, <= 300 mm" means:"length of the surface that was tested" example:"30 mm"`
	Strength         document.Given[quantity.Field]   `key:"strength" range:"> 0 kV/mm, <= 1000 kV/mm" means:"solid: short-time strength of the maker, at tested_thickness" example:"15 kV/mm"`
	TestedThickness  document.Given[quantity.Length]  `key:"tested_thickness" range:"> 0 mm, <= 1 m" means:"solid: thickness that the strength was measured at" example:"3 mm"`
	OilTest          document.Given[quantity.Voltage] `key:"oil_test" range:"> 0 V, <= 200 kV" means:"oil: mean breakdown voltage over 2.5 mm in the standard test, rms" example:"60 kV"`

	Of *Feedthrough // the feedthrough it was derived from; nil where it was described
}

// Shape is the shape of the electrodes on both sides of a gap.
type Shape struct {
	document.Table
	Kind        document.Given[string]          `key:"kind" needed:"yes" words:"plates | coaxial | concentric spheres | sphere-plane | sphere-sphere | cylinder-plane | parallel cylinders | point-plane | rounded edge" means:"kind of arrangement" example:"coaxial"`
	InnerRadius document.Given[quantity.Length] `key:"inner_radius" range:"> 0 mm, <= 10 m" means:"coaxial, concentric spheres" example:"3 mm"`
	OuterRadius document.Given[quantity.Length] `key:"outer_radius" range:"> 0 mm, <= 10 m" means:"coaxial, concentric spheres" example:"63 mm"`
	Radius      document.Given[quantity.Length] `key:"radius" range:"> 0 mm, <= 10 m" means:"sphere or cylinder" example:"10 mm"`
	TipRadius   document.Given[quantity.Length] `key:"tip_radius" range:"> 0 mm, <= 10 m" means:"point-plane" example:"0.5 mm"`
	EdgeRadius  document.Given[quantity.Length] `key:"edge_radius" range:"> 0 mm, <= 10 m" means:"rounded edge" example:"2 mm"`
	Earthed     document.Given[bool]            `key:"earthed" means:"sphere-sphere: one sphere is earthed (default: true)" example:"true"`

	BodyRadius document.Given[quantity.Length] `key:"body_radius" range:"> 0 mm, <= 10 m" means:"plates, rounded edge: radius of the round body whose rim the edge is; its field is then worked out" example:"30 mm"`
	WallRadius document.Given[quantity.Length] `key:"wall_radius" range:"> 0 mm, <= 10 m" means:"radius of an earthed wall around the gap; the field is then worked out" example:"200 mm"`
	Computed   document.Given[bool]            `key:"computed" means:"the field is worked out and judges, its closed form stands beside it (default: false)" example:"false"`
}

// IsComputed reports whether the field of a shape is worked out: on demand, and with sizes
// for which there is no closed form.
func (sh *Shape) IsComputed() bool {
	return sh != nil && (sh.Computed.V || sh.BodyRadius.Set() || sh.WallRadius.Set())
}

// Field is an axisymmetric arrangement whose electrostatic field is wanted.
type Field struct {
	document.Table
	Name        document.Given[string]               `key:"name" needed:"yes" means:"name of the arrangement" example:"gun feedthrough"`
	Medium      document.Given[string]               `key:"medium" words:"air | gas | vacuum | oil" means:"what fills the space between" example:"vacuum"`
	Gas         document.Given[string]               `key:"gas" words:"air | nitrogen | sulphur hexafluoride | helium | argon | hydrogen | carbon dioxide" means:"gas, where the medium is gas" example:"sulphur hexafluoride"`
	Pressure    document.Given[quantity.Pressure]    `key:"pressure" range:"> 0 Pa, <= 10 MPa" means:"absolute pressure of the gas" example:"3 bar"`
	Temperature document.Given[quantity.Temperature] `key:"temperature" range:">= -60 degC, <= 300 degC" means:"temperature of the gas (default: the site's air)" example:"30 degC"`
	Electrodes  []Electrode                          `key:"electrodes" needed:"yes" means:"conductors"`
	Dielectrics []Dielectric                         `key:"dielectrics" means:"insulators"`
	Boundary    []Boundary                           `key:"boundary" means:"where the model ends"`
	Probes      []Probe                              `key:"probes" means:"points at which the field is wanted"`
}

// Electrode is a conductor at the potential of a node or at a fixed one.
type Electrode struct {
	document.Table
	Name    document.Given[string]           `key:"name" needed:"yes" means:"name; several pieces may bear the same" example:"pin"`
	Node    document.Given[string]           `key:"node" means:"node whose potential it has" example:"cathode"`
	Voltage document.Given[quantity.Voltage] `key:"voltage" range:">= -1 MV, <= 1 MV" means:"fixed potential, in place of a node" example:"0 V"`
	Profile []Stroke                         `key:"profile" needed:"yes" means:"outline in r and z" example:"[{ from = [\"0 mm\", \"5 mm\"] }, { to = [\"12 mm\", \"5 mm\"] }, { to = [\"15 mm\", \"8 mm\"], centre = [\"12 mm\", \"8 mm\"], turn = \"left\" }]"`
}

// Dielectric is an insulating body with a closed profile.
type Dielectric struct {
	document.Table
	Name            document.Given[string]               `key:"name" needed:"yes" means:"name of the body" example:"sleeve"`
	Permittivity    document.Given[float64]              `key:"permittivity" range:">= 1, <= 100000" needed:"yes" means:"relative permittivity" example:"9.4"`
	Resistivity     document.Given[quantity.Resistivity] `key:"resistivity" range:"> 0 ohm m, <= 1e25 ohm m" means:"resistivity" example:"1e12 ohm m"`
	Material        document.Given[string]               `key:"material" means:"what it is made of: its strength is judged" example:"alumina"`
	Strength        document.Given[quantity.Field]       `key:"strength" range:"> 0 kV/mm, <= 1000 kV/mm" means:"short-time strength of the maker, at tested_thickness" example:"15 kV/mm"`
	TestedThickness document.Given[quantity.Length]      `key:"tested_thickness" range:"> 0 mm, <= 1 m" means:"thickness that the strength was measured at" example:"3 mm"`
	Fill            document.Given[string]               `key:"fill" words:"air | vacuum" means:"it is a space that this fills, apart from the medium around" example:"vacuum"`
	Profile         []Stroke                             `key:"profile" needed:"yes" means:"closed outline in r and z" example:"[{ from = [\"20 mm\", \"0 mm\"] }, { to = [\"30 mm\", \"0 mm\"] }, { to = [\"30 mm\", \"10 mm\"] }, { to = [\"20 mm\", \"0 mm\"] }]"`
}

// Boundary is where the model ends.
type Boundary struct {
	document.Table
	Kind    document.Given[string] `key:"kind" words:"earth | natural" needed:"yes" means:"earthed wall, or symmetry and end of the model" example:"natural"`
	Profile []Stroke               `key:"profile" needed:"yes" means:"line in r and z" example:"[{ from = [\"0 mm\", \"20 mm\"] }, { to = [\"40 mm\", \"20 mm\"] }]"`
}

// Stroke is the start of a profile, or a line or arc to its next point.
type Stroke struct {
	document.Table
	From   document.Given[[]quantity.Length] `key:"from" list:"2" range:">= -100 m, <= 100 m" means:"start, r and z" example:"[\"0 mm\", \"5 mm\"]"`
	To     document.Given[[]quantity.Length] `key:"to" list:"2" range:">= -100 m, <= 100 m" means:"next point, r and z" example:"[\"12 mm\", \"5 mm\"]"`
	Centre document.Given[[]quantity.Length] `key:"centre" list:"2" range:">= -100 m, <= 100 m" means:"centre of an arc, r and z" example:"[\"12 mm\", \"8 mm\"]"`
	Turn   document.Given[string]            `key:"turn" words:"left | right" means:"which way an arc turns, seen along the path" example:"left"`
}

// Probe is a point at which the field is wanted.
type Probe struct {
	document.Table
	Name document.Given[string]            `key:"name" needed:"yes" means:"name of the point" example:"rim"`
	At   document.Given[[]quantity.Length] `key:"at" list:"2" range:">= -100 m, <= 100 m" needed:"yes" means:"r and z" example:"[\"3 mm\", \"2 mm\"]"`
}
