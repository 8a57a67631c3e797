package chain

import (
	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// Resistor is Count × Strings equal elements: Count in series in each of Strings
// parallel strings. Value and ratings are those of one element.
type Resistor struct {
	document.Table
	Value                  document.Given[quantity.Resistance]        `key:"value" range:"> 0 ohm, <= 1000 Tohm" needed:"yes" means:"resistance of each element" example:"1 Mohm"`
	Count                  document.Given[int]                        `key:"count" range:">= 1, <= 10000" means:"elements in series (default 1)" example:"10"`
	Strings                document.Given[int]                        `key:"strings" range:">= 1, <= 1000" means:"strings in parallel (default 1)" example:"2"`
	RatedVoltage           document.Given[quantity.Voltage]           `key:"rated_voltage" range:"> 0 V, <= 1 MV" means:"rated voltage of each element" example:"10 kV"`
	RatedPower             document.Given[quantity.Power]             `key:"rated_power" range:"> 0 W, <= 1 MW" means:"rated power of each element at 70 degC" example:"1 W"`
	RatedPulseVoltage      document.Given[quantity.Voltage]           `key:"rated_pulse_voltage" range:"> 0 V, <= 1 MV" means:"rated single-pulse voltage of each element" example:"30 kV"`
	RatedEnergy            document.Given[quantity.Energy]            `key:"rated_energy" range:"> 0 J, <= 1 MJ" means:"rated single-pulse energy of each element" example:"1 J"`
	Tolerance              document.Given[quantity.Fraction]          `key:"tolerance" range:">= 0 %, < 100 %" means:"tolerance of the value" example:"1 %"`
	TemperatureCoefficient document.Given[quantity.PerKelvin]         `key:"temperature_coefficient" range:">= -1 %/K, <= 1 %/K" means:"relative change per kelvin" example:"50 ppm/K"`
	VoltageCoefficient     document.Given[quantity.PerVolt]           `key:"voltage_coefficient" range:">= -0.1 %/V, <= 0.1 %/V" means:"relative change per volt across each element" example:"-1 ppm/V"`
	ThermalResistance      document.Given[quantity.ThermalResistance] `key:"thermal_resistance" range:"> 0 K/W, <= 100000 K/W" means:"rise per watt of each element (default: 85 K at rated power)" example:"85 K/W"`
}

// Elements is the number in series and in parallel, one where not given.
func (r *Resistor) Elements() (count, strings int) { return r.Count.Or(1), r.Strings.Or(1) }

// Total is the resistance of the whole network of elements.
func (r *Resistor) Total() quantity.Resistance {
	count, strings := r.Elements()
	return r.Value.V * quantity.Resistance(count) / quantity.Resistance(strings)
}

// Capacitor is one capacitor, or one position of a column.
type Capacitor struct {
	document.Table
	Value          document.Given[[]quantity.Capacitance] `key:"value" range:"> 0 F, <= 1 F" list:"one or many" needed:"yes" means:"capacitance; in a multiplier a list gives one a stage, from the grounded end" example:"2.2 nF"`
	RatedVoltage   document.Given[quantity.Voltage]       `key:"rated_voltage" range:"> 0 V, <= 1 MV" means:"rated DC voltage" example:"6 kV"`
	Tolerance      document.Given[quantity.Fraction]      `key:"tolerance" range:">= 0 %, < 100 %" means:"tolerance of the value" example:"10 %"`
	Dielectric     document.Given[string]                 `key:"dielectric" words:"C0G | NP0 | film | mica | glass | X5R | X6S | X7R | X7S | X7T | X8R | Y5P | Y5U | Y5V | Z5U" means:"dielectric" example:"C0G"`
	ValueAtVoltage document.Given[[]quantity.Capacitance] `key:"value_at_voltage" range:"> 0 F, <= 1 F" list:"one or many" means:"capacitance at the part's own working DC voltage" example:"1.4 nF"`
}

// Class2 reports whether the dielectric loses capacitance under DC voltage.
func (c *Capacitor) Class2() bool {
	switch c.Dielectric.V {
	case "X5R", "X6S", "X7R", "X7S", "X7T", "X8R", "Y5P", "Y5U", "Y5V", "Z5U":
		return true
	}
	return false
}

// Diode is the whole stack of one position.
type Diode struct {
	document.Table
	RatedVoltage document.Given[quantity.Voltage]     `key:"rated_voltage" range:"> 0 V, <= 1 MV" means:"rated repetitive reverse voltage of the stack" example:"8 kV"`
	ForwardDrop  document.Given[quantity.Voltage]     `key:"forward_drop" range:">= 0 V, <= 10 kV" means:"forward drop of the stack" example:"12 V"`
	Resistance   document.Given[quantity.Resistance]  `key:"resistance" range:">= 0 ohm, <= 1 Gohm" means:"on-resistance of the stack" example:"40 ohm"`
	Capacitance  document.Given[quantity.Capacitance] `key:"capacitance" range:">= 0 F, <= 1 uF" means:"junction capacitance of the stack" example:"1 pF"`
	Leakage      document.Given[quantity.Current]     `key:"leakage" range:">= 0 A, <= 1 A" means:"leakage at the rated voltage" example:"100 nA"`
	RecoveryTime document.Given[quantity.Time]        `key:"recovery_time" range:">= 0 s, <= 1 s" means:"reverse recovery time" example:"80 ns"`
	RatedCurrent document.Given[quantity.Current]     `key:"rated_current" range:"> 0 A, <= 1 kA" means:"rated mean forward current" example:"5 mA"`
	SurgeCurrent document.Given[quantity.Current]     `key:"surge_current" range:"> 0 A, <= 100 kA" means:"rated single-pulse peak current" example:"500 mA"`
}

// Multiplier is the cascade of N stages: one stage is two capacitors and two
// diodes (half-wave), or three capacitors and four diodes (symmetrical).
type Multiplier struct {
	document.Table
	Topology            document.Given[string]               `key:"topology" words:"half-wave | symmetrical" means:"one coupling column, or two in antiphase" example:"half-wave"`
	Polarity            document.Given[string]               `key:"polarity" words:"positive | negative" needed:"yes" means:"polarity of the output" example:"negative"`
	Stages              document.Given[int]                  `key:"stages" range:">= 1, <= 60" needed:"yes" means:"number of stages" example:"6"`
	Medium              document.Given[string]               `key:"medium" words:"air | oil | gas | potting" means:"what surrounds the parts" example:"air"`
	CouplingCapacitor   *Capacitor                           `key:"coupling_capacitor" needed:"yes" means:"capacitors of the column that swings"`
	SmoothingCapacitor  *Capacitor                           `key:"smoothing_capacitor" needed:"yes" means:"capacitors of the column that holds"`
	Diode               *Diode                               `key:"diode" means:"one diode position, the whole stack"`
	StrayBetweenColumns document.Given[quantity.Capacitance] `key:"stray_between_columns" range:">= 0 F, <= 1 uF" means:"stray from coupling.k to stage.k" example:"0.5 pF"`
	StrayToGround       document.Given[quantity.Capacitance] `key:"stray_to_ground" range:">= 0 F, <= 1 uF" means:"stray from stage.k to ground" example:"1 pF"`
	PickupToOutput      document.Given[quantity.Capacitance] `key:"pickup_to_output" range:">= 0 F, <= 1 uF" means:"stray from the coupling column to the output, past the filter" example:"0.1 pF"`
}

// Negative reports whether the output is negative.
func (m *Multiplier) Negative() bool { return m.Polarity.V == "negative" }

// Symmetrical reports whether there are two coupling columns in antiphase.
func (m *Multiplier) Symmetrical() bool { return m.Topology.V == "symmetrical" }
