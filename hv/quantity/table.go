package quantity

// The units table. The first unit of a row is the one messages offer first.
var (
	voltage        = &Dimension{Name: "voltage", SI: "V", Example: "1.5 kV", prefixed: true, units: decades("V", "- k m u n M")}
	current        = &Dimension{Name: "current", SI: "A", Example: "60 uA", prefixed: true, units: decades("A", "- m u n p f k")}
	resistance     = &Dimension{Name: "resistance", SI: "ohm", Example: "4.7 Mohm", prefixed: true, units: decades("ohm", "- k M G T m u")}
	capacitance    = &Dimension{Name: "capacitance", SI: "F", Example: "2.2 nF", prefixed: true, units: decades("F", "p n u m f -")}
	inductance     = &Dimension{Name: "inductance", SI: "H", Example: "3 mH", prefixed: true, units: decades("H", "- m u n p k")}
	frequency      = &Dimension{Name: "frequency", SI: "Hz", Example: "38 kHz", prefixed: true, units: decades("Hz", "- k M G m")}
	length         = &Dimension{Name: "length", SI: "m", Example: "60 mm", prefixed: true, units: decades("m", "m c - u n p k")}
	charge         = &Dimension{Name: "charge", SI: "C", Example: "45 uC", prefixed: true, units: decades("C", "- m u n p f")}
	energy         = &Dimension{Name: "energy", SI: "J", Example: "1 J", prefixed: true, units: decades("J", "- m u n k M")}
	electronEnergy = &Dimension{Name: "electron energy", SI: "eV", Example: "1.5 eV", prefixed: true, units: decades("eV", "- m k M")}
	power          = &Dimension{Name: "power", SI: "W", Example: "500 mW", prefixed: true, units: decades("W", "- m u n k M")}

	duration = &Dimension{Name: "time", SI: "s", Example: "60 s", prefixed: true,
		units: append(decades("s", "- m u n p"), scaled("min", 60), scaled("h", 3600))}
	area = &Dimension{Name: "area", SI: "m2", Example: "0.03 mm2",
		units: []unit{exactly("mm2", -6), exactly("cm2", -4), exactly("m2", 0), exactly("um2", -12)}}
	temperature = &Dimension{Name: "temperature", SI: "K", Example: "30 degC",
		units: []unit{{symbol: "degC", scale: 1, offset: 273.15}, {symbol: "°C", scale: 1, offset: 273.15}, exactly("K", 0)}}
	temperatureRise   = &Dimension{Name: "temperature difference", SI: "K", Example: "20 K", units: []unit{exactly("K", 0)}}
	thermalResistance = &Dimension{Name: "thermal resistance", SI: "K/W", Example: "85 K/W", units: []unit{exactly("K/W", 0)}}
	pressure          = &Dimension{Name: "pressure", SI: "Pa", Example: "4e-5 mbar", units: []unit{
		exactly("mbar", 2), exactly("Pa", 0), exactly("hPa", 2), exactly("kPa", 3), exactly("MPa", 6), exactly("mPa", -3),
		exactly("uPa", -6), exactly("bar", 5), scaled("Torr", 101325.0/760), scaled("mTorr", 101.325/760), scaled("atm", 101325)}}
	field = &Dimension{Name: "field strength", SI: "V/m", Example: "3 kV/mm", prefixed: true, units: []unit{
		exactly("kV/mm", 6), exactly("kV/cm", 5), exactly("V/mm", 3), exactly("V/m", 0), exactly("kV/m", 3), exactly("MV/m", 6), exactly("GV/m", 9), exactly("V/um", 6)}}
	angle = &Dimension{Name: "angle", SI: "rad", Example: "5 mrad", prefixed: true,
		units: append(decades("rad", "m - u"), scaled("deg", 0.017453292519943295))}
	fraction = &Dimension{Name: "fraction", SI: "1", Example: "10 %", units: []unit{exactly("%", -2), exactly("ppm", -6), exactly("1", 0)}}

	linearCapacitance = &Dimension{Name: "capacitance per length", SI: "F/m", Example: "110 pF/m", prefixed: true, units: decades("F/m", "p n -")}
	perKelvin         = &Dimension{Name: "change per kelvin", SI: "1/K", Example: "50 ppm/K", units: []unit{exactly("ppm/K", -6), exactly("%/K", -2), exactly("1/K", 0)}}
	perVolt           = &Dimension{Name: "change per volt", SI: "1/V", Example: "-1 ppm/V", units: []unit{exactly("ppm/V", -6), exactly("%/V", -2), exactly("1/V", 0), exactly("%/kV", -5)}}
	humidity          = &Dimension{Name: "absolute humidity", SI: "kg/m3", Example: "11 g/m3", units: []unit{exactly("g/m3", -3), exactly("kg/m3", 0)}}
	resistivity       = &Dimension{Name: "resistivity", SI: "ohm m", Example: "1e12 ohm m", prefixed: true, units: append(decades("ohm m", "- k M G T m u"), exactly("ohm cm", -2))}
	currentDensity    = &Dimension{Name: "current density", SI: "A/m2", Example: "1.6 A/cm2", units: []unit{exactly("A/cm2", 4), exactly("A/m2", 0), exactly("mA/cm2", 1)}}
	richardson        = &Dimension{Name: "Richardson constant", SI: "A/m2K2", Example: "60 A/cm2K2", units: []unit{exactly("A/cm2K2", 4), exactly("A/m2K2", 0)}}
	kermaRate         = &Dimension{Name: "air kerma rate", SI: "Gy/s", Example: "1 uGy/h", units: []unit{
		scaled("uGy/h", 1e-6/3600), scaled("nGy/h", 1e-9/3600), scaled("mGy/h", 1e-3/3600), exactly("Gy/s", 0)}}
	pressureLength = &Dimension{Name: "pressure times length", SI: "Pa m", Example: "0.76 Pa m", units: []unit{exactly("Pa m", 0), exactly("mbar mm", -1), scaled("Torr cm", 1.01325/0.76)}}
)
