// Package chain is the declaration of a description: every key of the file once,
// as a tagged field, and the checks that run across keys. Reading, messages, the
// nearest known key and the draft are derived from the tags:
//
//	key      the name in the file
//	range    bounds in the field's own units, as in "> 0 V, <= 1 MV"
//	words    the accepted words, separated by " | "
//	list     "2" (exactly two), "one or many" (a single value counts as a list), "many"
//	means    what it is, in a clause
//	example  as it would stand in a file; a list of tables with one is drafted in braces
//	needed   "yes" where the table makes no sense without it
package chain

import (
	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// Chain is one described supply chain. Absent tables are nil or empty.
type Chain struct {
	document.Table

	Format       document.Given[int]    `key:"format" range:">= 1, <= 1" needed:"yes" means:"version of this format" example:"1"`
	Title        document.Given[string] `key:"title" means:"what the chain is" example:"Thin-film bench, 20 kV diffraction column"`
	Document     document.Given[string] `key:"document" means:"document number (ISO 7200)" example:"HV-0042"`
	Revision     document.Given[string] `key:"revision" means:"revision index (ISO 7200)" example:"B"`
	Owner        document.Given[string] `key:"owner" means:"legal owner (ISO 7200)" example:"Bench group"`
	Creator      document.Given[string] `key:"creator" means:"who drew this up (ISO 7200)" example:"A. N. Other"`
	Approver     document.Given[string] `key:"approver" means:"who approves it (ISO 7200)" example:"A. N. Other"`
	Date         document.Given[string] `key:"date" means:"date of issue (ISO 7200)" example:"2025-03-01"`
	DocumentType document.Given[string] `key:"document_type" means:"kind of document (ISO 7200)" example:"design review"`

	Site       *Site       `key:"site" means:"where it stands"`
	Drive      *Drive      `key:"drive" means:"what feeds the multiplier; each half, if symmetrical"`
	Regulation *Regulation `key:"regulation" means:"closed loop on the output; absent: open loop"`
	Multiplier *Multiplier `key:"multiplier" means:"the diode-capacitor cascade"`
	Filters    []Filter    `key:"filter" means:"filter sections in order, from the multiplier to the supply terminal"`
	Cable      *Cable      `key:"cable" means:"cable from the supply terminal to the gun"`
	Loads      []Load      `key:"load" means:"any other load"`
	Divider    *Divider    `key:"divider" means:"measuring divider"`
	Bleeders   []Bleeder   `key:"bleeder" means:"resistor that discharges the chain"`
	Bias       *Bias       `key:"bias" means:"bias between cathode and control electrode"`
	Gun        *Gun        `key:"gun" means:"electron gun"`
	Heater     *Heater     `key:"heater" means:"filament supply floating on the cathode"`
	Beam       *Beam       `key:"beam" means:"the optics that the beam energy matters to"`
	Vacuum     *Vacuum     `key:"vacuum" means:"the vessel"`
	Protection *Protection `key:"protection" means:"measures against faults; each counts only if independent of what failed"`
	Access     *Access     `key:"access" means:"people's access"`
	Targets    []Target    `key:"target" means:"where electrons may stop"`
	Shields    []Shield    `key:"shield" means:"wall between a target and people"`
	Spacings   []Spacing   `key:"spacing" means:"a gap with its surfaces"`
	Parts      []Part      `key:"part" means:"anything else between two nodes"`
	Fields     []Field     `key:"field" means:"axisymmetric arrangement of electrodes and dielectrics"`
	Accepted   []Accepted  `key:"accepted" means:"what is to become of an open point of the review when people sign"`

	Feedthroughs []Feedthrough `key:"feedthrough" means:"conductor through the hole of a plate"`
	Instruments  []Instrument  `key:"instrument" means:"what is read at the first switching on, beside the meter of the divider"`
}

// Site is where the chain stands.
type Site struct {
	document.Table
	Altitude            document.Given[quantity.Length]          `key:"altitude" range:">= -500 m, <= 9000 m" means:"height above sea level" example:"240 m"`
	AirTemperature      document.Given[quantity.Temperature]     `key:"air_temperature" range:">= -40 degC, <= 90 degC" means:"hottest air at the parts" example:"30 degC"`
	TemperatureChange   document.Given[quantity.TemperatureRise] `key:"temperature_change" range:">= 0 K, <= 100 K" means:"by how much the air at the parts changes during one exposure" example:"1 K"`
	PollutionDegree     document.Given[int]                      `key:"pollution_degree" range:">= 1, <= 4" means:"pollution degree (IEC 60664-1)" example:"2"`
	Mains               document.Given[quantity.Voltage]         `key:"mains" range:"> 0 V, <= 1000 V" means:"mains voltage, rms" example:"230 V"`
	MainsFrequency      document.Given[quantity.Frequency]       `key:"mains_frequency" range:"> 0 Hz, <= 1 kHz" means:"mains frequency" example:"50 Hz"`
	OvervoltageCategory document.Given[int]                      `key:"overvoltage_category" range:">= 1, <= 4" means:"overvoltage category (IEC 60664-1)" example:"2"`
}

// Drive feeds the multiplier.
type Drive struct {
	document.Table
	Waveform   document.Given[string]              `key:"waveform" words:"sine | square" means:"wave-form of the source" example:"sine"`
	Frequency  document.Given[quantity.Frequency]  `key:"frequency" range:"> 0 Hz, <= 100 MHz" needed:"yes" means:"drive frequency" example:"38 kHz"`
	Peak       document.Given[quantity.Voltage]    `key:"peak" range:"> 0 V, <= 1 MV" needed:"yes" means:"zero to peak, unloaded" example:"1.75 kV"`
	PeakLimit  document.Given[quantity.Voltage]    `key:"peak_limit" range:"> 0 V, <= 1 MV" means:"the most the peak can reach if regulation is lost" example:"2.1 kV"`
	Resistance document.Given[quantity.Resistance] `key:"resistance" range:">= 0 ohm, <= 1 Gohm" means:"in series with the source" example:"900 ohm"`
	Inductance document.Given[quantity.Inductance] `key:"inductance" range:">= 0 H, <= 1 kH" means:"leakage inductance, in series" example:"0 H"`
	Ramp       document.Given[quantity.Time]       `key:"ramp" range:"> 0 s, <= 1 h" means:"time over which the drive rises after switching on (default: at once)" example:"2 s"`
	Unbalance  document.Given[quantity.Fraction]   `key:"unbalance" range:">= 0 %, <= 100 %" means:"amplitude mismatch of the halves of a symmetrical drive" example:"2 %"`
}

// Regulation holds the sensed node at its set value.
type Regulation struct {
	document.Table
	Set                    document.Given[quantity.Voltage]   `key:"set" range:"> 0 V, <= 1 MV" needed:"yes" means:"voltage held at the node the divider senses, magnitude" example:"20 kV"`
	TemperatureCoefficient document.Given[quantity.PerKelvin] `key:"temperature_coefficient" range:">= -1 %/K, <= 1 %/K" means:"relative change of the reference and its amplifier per kelvin" example:"10 ppm/K"`
	Stability              document.Given[quantity.Fraction]  `key:"stability" range:">= 0 %, <= 10 %" means:"relative drift of reference and amplifier over one exposure at even temperature, peak to peak" example:"20 ppm"`
}

// Filter is one section between multiplier and supply terminal.
type Filter struct {
	document.Table
	Resistor          *Resistor                            `key:"resistor" needed:"yes" means:"series resistor"`
	Capacitor         *Capacitor                           `key:"capacitor" means:"capacitor to ground"`
	BypassCapacitance document.Given[quantity.Capacitance] `key:"bypass_capacitance" range:">= 0 F, <= 1 uF" means:"stray across the resistor" example:"0.5 pF"`
}

// Cable joins the supply terminal and the gun.
type Cable struct {
	document.Table
	Length         document.Given[quantity.Length]            `key:"length" range:"> 0 m, <= 1 km" needed:"yes" means:"length" example:"1.2 m"`
	Capacitance    document.Given[quantity.LinearCapacitance] `key:"capacitance" range:"> 0 F/m, <= 100 nF/m" means:"capacitance per length" example:"110 pF/m"`
	RatedVoltage   document.Given[quantity.Voltage]           `key:"rated_voltage" range:"> 0 V, <= 1 MV" means:"rated DC voltage" example:"30 kV"`
	GunEndResistor *Resistor                                  `key:"gun_end_resistor" means:"series resistor at the gun end"`
	ScreenEarths   document.Given[int]                        `key:"screen_earths" range:">= 0, <= 2" means:"ends at which the screen is bolted to earth" example:"2"`
}

// Load is any load beside divider, bleeder and gun.
type Load struct {
	document.Table
	Name       document.Given[string]              `key:"name" needed:"yes" means:"name of the load" example:"monitor"`
	At         document.Given[string]              `key:"at" needed:"yes" means:"node it hangs on" example:"output"`
	Current    document.Given[quantity.Current]    `key:"current" range:">= 0 A, <= 100 A" means:"constant current" example:"10 uA"`
	Resistance document.Given[quantity.Resistance] `key:"resistance" range:"> 0 ohm, <= 1000 Tohm" means:"resistance, in place of a current" example:"2 Gohm"`
	Permanent  document.Given[bool]                `key:"permanent" means:"stays connected when all is off" example:"true"`
}

// Divider measures the voltage of a node.
type Divider struct {
	document.Table
	Senses    document.Given[string] `key:"senses" means:"node it measures (default: output)" example:"output"`
	Upper     *Resistor              `key:"upper" needed:"yes" means:"arm from the sensed node to the tap"`
	Lower     *Resistor              `key:"lower" needed:"yes" means:"arm from the tap to ground"`
	Meter     *Meter                 `key:"meter" means:"what reads the tap"`
	Clamp     *Clamp                 `key:"clamp" means:"what limits the tap if the lower arm opens"`
	Permanent document.Given[bool]   `key:"permanent" means:"cannot be unplugged" example:"true"`
}

// Meter reads the tap of the divider.
type Meter struct {
	document.Table
	Resistance   document.Given[quantity.Resistance] `key:"resistance" range:"> 0 ohm, <= 1000 Tohm" needed:"yes" means:"input resistance" example:"10 Mohm"`
	RatedVoltage document.Given[quantity.Voltage]    `key:"rated_voltage" range:"> 0 V, <= 1 MV" means:"highest input voltage" example:"300 V"`
}

// Clamp limits a voltage.
type Clamp struct {
	document.Table
	Voltage document.Given[quantity.Voltage] `key:"voltage" range:"> 0 V, <= 1 MV" needed:"yes" means:"voltage at which it conducts" example:"90 V"`
	Kind    document.Given[string]           `key:"kind" words:"gas tube | spark gap | varistor | zener" means:"what it is" example:"gas tube"`
	Leakage document.Given[quantity.Current] `key:"leakage" range:">= 0 A, <= 1 A" means:"leakage at the clamp voltage" example:"1 nA"`
}

// Bleeder discharges a node.
type Bleeder struct {
	document.Table
	At        document.Given[string] `key:"at" needed:"yes" means:"node it discharges" example:"supply"`
	Resistor  *Resistor              `key:"resistor" needed:"yes" means:"the resistor"`
	Permanent document.Given[bool]   `key:"permanent" means:"cannot be unplugged" example:"true"`
}

// Part is anything else between two nodes.
type Part struct {
	document.Table
	Name  document.Given[string] `key:"name" needed:"yes" means:"name of the part" example:"arc limiter"`
	Kind  document.Given[string] `key:"kind" needed:"yes" words:"resistor | capacitor | inductor | spark gap | varistor | diode | meter" means:"what it is" example:"resistor"`
	From  document.Given[string] `key:"from" needed:"yes" means:"node; a new name makes a new node; a diode's anode" example:"output"`
	To    document.Given[string] `key:"to" needed:"yes" means:"node; a new name makes a new node; a diode's cathode" example:"gun.inner"`
	Value document.Given[string] `key:"value" means:"resistance, capacitance or inductance with its unit; the striking voltage of a gap or varistor" example:"22 kohm"`

	RatedVoltage      document.Given[quantity.Voltage]     `key:"rated_voltage" range:"> 0 V, <= 1 MV" means:"rated voltage" example:"10 kV"`
	RatedPower        document.Given[quantity.Power]       `key:"rated_power" range:"> 0 W, <= 1 MW" means:"rated power" example:"1 W"`
	RatedPulseVoltage document.Given[quantity.Voltage]     `key:"rated_pulse_voltage" range:"> 0 V, <= 1 MV" means:"rated single-pulse voltage" example:"30 kV"`
	RatedEnergy       document.Given[quantity.Energy]      `key:"rated_energy" range:"> 0 J, <= 1 MJ" means:"rated single-pulse energy" example:"1 J"`
	Tolerance         document.Given[quantity.Fraction]    `key:"tolerance" range:">= 0 %, < 100 %" means:"tolerance of the value" example:"5 %"`
	ForwardDrop       document.Given[quantity.Voltage]     `key:"forward_drop" range:">= 0 V, <= 10 kV" means:"diode: forward drop of the stack" example:"12 V"`
	Resistance        document.Given[quantity.Resistance]  `key:"resistance" range:">= 0 ohm, <= 1000 Tohm" means:"diode: on-resistance; meter: input resistance" example:"40 ohm"`
	Capacitance       document.Given[quantity.Capacitance] `key:"capacitance" range:">= 0 F, <= 1 F" means:"diode: junction capacitance" example:"1 pF"`
	Leakage           document.Given[quantity.Current]     `key:"leakage" range:">= 0 A, <= 1 A" means:"diode: leakage at the rated voltage" example:"100 nA"`
	Permanent         document.Given[bool]                 `key:"permanent" means:"stays connected when all is off (default: only where neither end is ground)" example:"true"`
}
