package chain

import (
	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// Bias stands between cathode and control electrode.
type Bias struct {
	document.Table
	Kind     document.Given[string]           `key:"kind" words:"self | fixed" needed:"yes" means:"made by the emission in a resistor, or by a source" example:"self"`
	Voltage  document.Given[quantity.Voltage] `key:"voltage" range:">= 0 V, <= 100 kV" means:"fixed bias: how far the control electrode is below the cathode" example:"300 V"`
	Fed      document.Given[string]           `key:"fed" words:"control | cathode" means:"which electrode the output feeds (default: control)" example:"control"`
	Resistor *Resistor                        `key:"resistor" means:"bias resistor between control electrode and cathode"`
	Bypass   *Capacitor                       `key:"bypass" means:"capacitor across the bias resistor"`
	Lowest   document.Given[quantity.Voltage] `key:"lowest" range:">= 0 V, <= 100 kV" means:"fixed bias: lower end of its adjustment" example:"100 V"`
	Highest  document.Given[quantity.Voltage] `key:"highest" range:"> 0 V, <= 100 kV" means:"fixed bias: upper end of its adjustment" example:"800 V"`

	LowestResistance  document.Given[quantity.Resistance] `key:"lowest_resistance" range:">= 0 ohm, <= 1000 Tohm" means:"bias resistor: lower end of its adjustment" example:"2 Mohm"`
	HighestResistance document.Given[quantity.Resistance] `key:"highest_resistance" range:"> 0 ohm, <= 1000 Tohm" means:"bias resistor: upper end of its adjustment" example:"10 Mohm"`

	Clamp *Clamp `key:"clamp" means:"what limits the bias if the resistor opens"`
}

// Gun is the electron gun.
type Gun struct {
	document.Table
	Fitted             document.Given[bool]                        `key:"fitted" means:"whether the gun is in place (default: true)" example:"true"`
	Emission           document.Given[quantity.Current]            `key:"emission" range:">= 0 A, <= 10 A" means:"what is wanted or read; solved where absent" example:"60 uA"`
	Cutoff             document.Given[quantity.Voltage]            `key:"cutoff" range:"> 0 V, <= 100 kV" means:"bias at which emission stops, at the working voltage" example:"420 V"`
	Exponent           document.Given[float64]                     `key:"exponent" range:">= 1, <= 5" means:"n in emission ~ (cutoff - bias)^n (default 2)" example:"2.0"`
	ZeroBiasEmission   document.Given[quantity.Current]            `key:"zero_bias_emission" range:"> 0 A, <= 10 A" means:"emission without bias: the law's scale" example:"900 uA"`
	EmittingArea       document.Given[quantity.Area]               `key:"emitting_area" range:"> 0 mm2, <= 1 m2" means:"area that emits" example:"0.03 mm2"`
	CathodeTemperature document.Given[quantity.Temperature]        `key:"cathode_temperature" range:">= 300 K, <= 3700 K" means:"temperature of the cathode" example:"2700 K"`
	WorkFunction       document.Given[quantity.ElectronEnergy]     `key:"work_function" range:"> 0.5 eV, <= 7 eV" means:"work function" example:"4.5 eV"`
	RichardsonConstant document.Given[quantity.RichardsonConstant] `key:"richardson_constant" range:"> 0 A/cm2K2, <= 1000 A/cm2K2" means:"Richardson's constant, measured or from the source of the work function (default: tungsten's)" example:"60 A/cm2K2"`
	Earthed            document.Given[string]                      `key:"earthed" words:"anode | cathode" means:"which end of the gun is at earth (default: anode)" example:"anode"`
	Geometry           *GunGeometry                                `key:"geometry" means:"dimensions that set the cutoff"`
}

// IsFitted reports whether the gun is in place.
func (g *Gun) IsFitted() bool { return g != nil && g.Fitted.Or(true) }

// EarthedCathode reports whether the cathode is the end at earth, and the output feeds
// the anode.
func (g *Gun) EarthedCathode() bool { return g != nil && g.Earthed.V == "cathode" }

// GunGeometry is the geometry of cathode, control electrode and anode.
type GunGeometry struct {
	document.Table
	ApertureRadius      document.Given[quantity.Length] `key:"aperture_radius" range:"> 0 mm, <= 100 mm" means:"radius of the hole in the control electrode" example:"0.5 mm"`
	PlateThickness      document.Given[quantity.Length] `key:"plate_thickness" range:">= 0 mm, <= 100 mm" means:"thickness of the control electrode at the hole" example:"0.1 mm"`
	TipRadius           document.Given[quantity.Length] `key:"tip_radius" range:"> 0 mm, <= 100 mm" means:"radius of the cathode's tip" example:"60 um"`
	Setback             document.Given[quantity.Length] `key:"setback" range:">= -10 mm, <= 100 mm" means:"tip behind the plate" example:"0.3 mm"`
	SetbackTolerance    document.Given[quantity.Length] `key:"setback_tolerance" range:">= 0 mm, <= 10 mm" means:"how far the setback may be off, to either side" example:"0.05 mm"`
	Cathode             document.Given[string]          `key:"cathode" words:"tip | flat" means:"shape of the cathode's end (default: tip, of tip_radius)" example:"tip"`
	AnodeDistance       document.Given[quantity.Length] `key:"anode_distance" range:"> 0 mm, <= 1000 mm" means:"plate to anode" example:"10 mm"`
	AnodeApertureRadius document.Given[quantity.Length] `key:"anode_aperture_radius" range:">= 0 mm, <= 100 mm" means:"radius of the hole in the anode" example:"0.75 mm"`
}

// Heater is the filament supply floating on the cathode; voltages are rms.
type Heater struct {
	document.Table
	Supply              document.Given[string]               `key:"supply" words:"dc | ac" means:"what flows in the filament" example:"dc"`
	Frequency           document.Given[quantity.Frequency]   `key:"frequency" range:"> 0 Hz, <= 10 MHz" means:"frequency of an AC heater (default: mains)" example:"50 Hz"`
	Voltage             document.Given[quantity.Voltage]     `key:"voltage" range:"> 0 V, <= 1 kV" means:"filament voltage, rms" example:"1.9 V"`
	Current             document.Given[quantity.Current]     `key:"current" range:"> 0 A, <= 1 kA" means:"filament current, rms" example:"2.4 A"`
	CentreResistors     *CentreResistors                     `key:"centre_resistors" means:"two resistors whose junction is the cathode"`
	Feed                *Feed                                `key:"feed" means:"what brings the heater's power up to the cathode's potential"`
	CapacitanceToGround document.Given[quantity.Capacitance] `key:"capacitance_to_ground" range:">= 0 F, <= 1 uF" means:"of the floating heater supply, without the feed" example:"60 pF"`
	WireDiameter        document.Given[quantity.Length]      `key:"wire_diameter" range:"> 0 mm, <= 10 mm" means:"diameter of the filament's wire" example:"0.125 mm"`
	Ripple              document.Given[quantity.Voltage]     `key:"ripple" range:">= 0 V, <= 1 kV" means:"ripple of a DC heater's voltage, peak to peak" example:"20 mV"`
	RippleFrequency     document.Given[quantity.Frequency]   `key:"ripple_frequency" range:"> 0 Hz, <= 10 MHz" means:"frequency of that ripple (default: twice the mains)" example:"100 Hz"`
}

// CentreResistors join the ends of the filament to the cathode node.
type CentreResistors struct {
	document.Table
	Value        document.Given[[]quantity.Resistance] `key:"value" range:"> 0 ohm, <= 1 Gohm" list:"2" needed:"yes" means:"from heater.a and from heater.b to the cathode" example:"[\"22 ohm\", \"22 ohm\"]"`
	Tolerance    document.Given[quantity.Fraction]     `key:"tolerance" range:">= 0 %, < 100 %" means:"tolerance of the values" example:"1 %"`
	RatedVoltage document.Given[quantity.Voltage]      `key:"rated_voltage" range:"> 0 V, <= 1 MV" means:"rated voltage" example:"200 V"`
	RatedPower   document.Given[quantity.Power]        `key:"rated_power" range:"> 0 W, <= 1 kW" means:"rated power" example:"500 mW"`
}

// Feed carries the heater's power across the high voltage.
type Feed struct {
	document.Table
	Kind         document.Given[string]               `key:"kind" words:"isolation transformer | battery" needed:"yes" means:"what it is" example:"isolation transformer"`
	RatedVoltage document.Given[quantity.Voltage]     `key:"rated_voltage" range:"> 0 V, <= 1 MV" means:"rated working voltage between the sides" example:"30 kV"`
	Capacitance  document.Given[quantity.Capacitance] `key:"capacitance" range:">= 0 F, <= 1 uF" means:"between the sides" example:"45 pF"`
	Screen       document.Given[bool]                 `key:"screen" means:"whether an earthed screen lies between the sides" example:"true"`
	CommonMode   document.Given[quantity.Voltage]     `key:"common_mode" range:">= 0 V, <= 10 kV" means:"common-mode voltage of the earthed side, rms" example:"115 V"`
	TestVoltage  document.Given[quantity.Voltage]     `key:"test_voltage" range:"> 0 V, <= 1 MV" means:"DC voltage it was tested with" example:"40 kV"`
	RatedPower   document.Given[quantity.Power]       `key:"rated_power" range:"> 0 W, <= 1 MW" means:"power it can deliver to the heater" example:"15 W"`
}

// Beam is what the energy of the beam matters to.
type Beam struct {
	document.Table
	Particle            document.Given[string]                  `key:"particle" words:"electron | ion" means:"what is accelerated" example:"electron"`
	MassNumber          document.Given[float64]                 `key:"mass_number" range:">= 0.5, <= 1000" means:"ion: mass in atomic mass units" example:"40"`
	ChargeNumber        document.Given[int]                     `key:"charge_number" range:">= 1, <= 100" means:"ion: charges it carries (default 1)" example:"1"`
	From                document.Given[string]                  `key:"from" means:"node the particles start from (default: cathode, else output)" example:"cathode"`
	Purpose             document.Given[string]                  `key:"purpose" words:"probe | x-ray tube | other" means:"what the beam is for (default: probe); blur is reckoned for a probe alone" example:"probe"`
	ChromaticAberration document.Given[quantity.Length]         `key:"chromatic_aberration" range:"> 0 mm, <= 10 m" means:"coefficient of chromatic aberration, image side" example:"9 mm"`
	SphericalAberration document.Given[quantity.Length]         `key:"spherical_aberration" range:"> 0 mm, <= 1000 m" means:"coefficient of spherical aberration" example:"25 mm"`
	HalfAngle           document.Given[quantity.Angle]          `key:"half_angle" range:"> 0 rad, <= 0.5 rad" means:"semi-angle at the specimen" example:"5 mrad"`
	SourceImage         document.Given[quantity.Length]         `key:"source_image" range:">= 0 m, <= 1 mm" means:"image of the source at the specimen, FW50" example:"4 nm"`
	EnergyWidth         document.Given[quantity.ElectronEnergy] `key:"energy_width" range:"> 0 eV, <= 1 keV" means:"FWHM of the source where measured; else thermal" example:"1.5 eV"`
	BlurAllowance       document.Given[quantity.Length]         `key:"blur_allowance" range:"> 0 m, <= 1 mm" means:"accepted for the whole spot, FW50" example:"12 nm"`
	Exposure            document.Given[quantity.Time]           `key:"exposure" range:"> 0 s, <= 1000 h" means:"time over which one image or record is gathered" example:"60 s"`
	Dwell               document.Given[quantity.Time]           `key:"dwell" range:"> 0 s, <= 1000 h" means:"time on one point" example:"1 ms"`
	FieldWidth          document.Given[quantity.Length]         `key:"field_width" range:"> 0 m, <= 1 m" means:"scanned field, edge to edge" example:"100 um"`
	Deflection          document.Given[string]                  `key:"deflection" words:"magnetic | electrostatic" means:"what scans the beam (default: magnetic)" example:"magnetic"`
	MeasuredRipple      document.Given[string]                  `key:"measured_ripple" means:"file of a ripple measured at the cathode, comma-separated time and volts; path from the description; in place of the computed one" example:"scope.csv"`
	Measurement         *Measurement                            `key:"measurement" means:"how measured_ripple is to be read"`
}

// Measurement is how a record of an oscilloscope is to be read.
type Measurement struct {
	document.Table
	ProbeFactor document.Given[float64] `key:"probe_factor" range:"> 0, <= 1000000" means:"volts at the cathode for one volt of the record (default 1)" example:"1000"`
	HeaderLines document.Given[int]     `key:"header_lines" range:">= 0, <= 10000" means:"lines before the numbers (default: all that hold none)" example:"2"`
	TimeUnit    document.Given[string]  `key:"time_unit" words:"s | ms | us | ns | ps" means:"unit of the first column (default: as headed, else s)" example:"us"`
	VoltageUnit document.Given[string]  `key:"voltage_unit" words:"kV | V | mV | uV" means:"unit of the second column (default: as headed, else V)" example:"mV"`
}
