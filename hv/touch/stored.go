package touch

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Charge of a capacitance at a voltage.
func Charge(c quantity.Capacitance, u quantity.Voltage) quantity.Charge {
	return quantity.Charge(float64(c) * float64(u))
}

// Energy of a capacitance at a voltage.
func Energy(c quantity.Capacitance, u quantity.Voltage) quantity.Energy {
	return quantity.Energy(float64(c) * float64(u) * float64(u) / 2)
}

// VoltageOf is the voltage at which a capacitance holds an energy.
func VoltageOf(c quantity.Capacitance, e quantity.Energy) (quantity.Voltage, error) {
	if !positive(c) || !notNegative(e) {
		return 0, lack.Range("no voltage belongs to %s in %s", quantity.Text(e), quantity.Text(c))
	}
	return quantity.Voltage(math.Sqrt(2 * float64(e) / float64(c))), nil
}

// CapacitanceOf is the capacitance that holds a charge at a voltage; a lack at no voltage.
func CapacitanceOf(q quantity.Charge, u quantity.Voltage) (quantity.Capacitance, error) {
	if !positive(u) || !notNegative(q) {
		return 0, lack.Range("no capacitance belongs to %s at %s", quantity.Text(q), quantity.Text(u))
	}
	return quantity.Capacitance(float64(q) / float64(u)), nil
}
