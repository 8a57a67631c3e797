package quantity

// The quantities, each in the SI unit of its dimension.
type (
	// Voltage is in volts; peak, rms or mean is said by the name that bears it.
	Voltage float64
	// Current is in amperes.
	Current float64
	// Resistance is in ohms.
	Resistance float64
	// Capacitance is in farads.
	Capacitance float64
	// Inductance is in henries.
	Inductance float64
	// Frequency is in hertz.
	Frequency float64
	// Time is in seconds.
	Time float64
	// Length is in metres.
	Length float64
	// Area is in square metres.
	Area float64
	// Energy is in joules.
	Energy float64
	// ElectronEnergy is the energy of one electron, in electronvolts.
	ElectronEnergy float64
	// Power is in watts.
	Power float64
	// Charge is in coulombs.
	Charge float64
	// Temperature is absolute, in kelvins.
	Temperature float64
	// TemperatureRise is a difference of temperatures, in kelvins.
	TemperatureRise float64
	// ThermalResistance is in kelvins per watt.
	ThermalResistance float64
	// Pressure is in pascals.
	Pressure float64
	// Field is an electric field strength in volts per metre.
	Field float64
	// Angle is in radians.
	Angle float64
	// Fraction is a ratio of like quantities; 0.01 is one per cent.
	Fraction float64
	// LinearCapacitance is a capacitance per length, in farads per metre.
	LinearCapacitance float64
	// PerKelvin is a relative change per kelvin.
	PerKelvin float64
	// PerVolt is a relative change per volt.
	PerVolt float64
	// Humidity is the mass of water in air, in kilograms per cubic metre.
	Humidity float64
	// Resistivity is in ohm metres.
	Resistivity float64
	// CurrentDensity is in amperes per square metre.
	CurrentDensity float64
	// RichardsonConstant is in amperes per square metre and kelvin squared.
	RichardsonConstant float64
	// KermaRate is an air kerma rate in grays per second.
	KermaRate float64
	// PressureLength is a pressure times a gap, in pascal metres.
	PressureLength float64
)

// Dimension methods tie each type to its row in the units table.

// Dimension is voltage.
func (Voltage) Dimension() *Dimension { return voltage }

// Dimension is current.
func (Current) Dimension() *Dimension { return current }

// Dimension is resistance.
func (Resistance) Dimension() *Dimension { return resistance }

// Dimension is capacitance.
func (Capacitance) Dimension() *Dimension { return capacitance }

// Dimension is inductance.
func (Inductance) Dimension() *Dimension { return inductance }

// Dimension is frequency.
func (Frequency) Dimension() *Dimension { return frequency }

// Dimension is time.
func (Time) Dimension() *Dimension { return duration }

// Dimension is length.
func (Length) Dimension() *Dimension { return length }

// Dimension is area.
func (Area) Dimension() *Dimension { return area }

// Dimension is energy.
func (Energy) Dimension() *Dimension { return energy }

// Dimension is the energy of an electron.
func (ElectronEnergy) Dimension() *Dimension { return electronEnergy }

// Dimension is power.
func (Power) Dimension() *Dimension { return power }

// Dimension is charge.
func (Charge) Dimension() *Dimension { return charge }

// Dimension is temperature.
func (Temperature) Dimension() *Dimension { return temperature }

// Dimension is a difference of temperatures.
func (TemperatureRise) Dimension() *Dimension { return temperatureRise }

// Dimension is thermal resistance.
func (ThermalResistance) Dimension() *Dimension { return thermalResistance }

// Dimension is pressure.
func (Pressure) Dimension() *Dimension { return pressure }

// Dimension is field strength.
func (Field) Dimension() *Dimension { return field }

// Dimension is angle.
func (Angle) Dimension() *Dimension { return angle }

// Dimension is a pure ratio.
func (Fraction) Dimension() *Dimension { return fraction }

// Dimension is capacitance per length.
func (LinearCapacitance) Dimension() *Dimension { return linearCapacitance }

// Dimension is relative change per kelvin.
func (PerKelvin) Dimension() *Dimension { return perKelvin }

// Dimension is relative change per volt.
func (PerVolt) Dimension() *Dimension { return perVolt }

// Dimension is absolute humidity.
func (Humidity) Dimension() *Dimension { return humidity }

// Dimension is resistivity.
func (Resistivity) Dimension() *Dimension { return resistivity }

// Dimension is current density.
func (CurrentDensity) Dimension() *Dimension { return currentDensity }

// Dimension is that of Richardson's constant.
func (RichardsonConstant) Dimension() *Dimension { return richardson }

// Dimension is air kerma rate.
func (KermaRate) Dimension() *Dimension { return kermaRate }

// Dimension is pressure times length.
func (PressureLength) Dimension() *Dimension { return pressureLength }

// Number is any quantity of this package.
type Number interface {
	~float64
	Dimension() *Dimension
}
