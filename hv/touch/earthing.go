package touch

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Discharged is the voltage at which a node counts as discharged, DC: IEC 60204-1 6.2.4
// (read).
const Discharged quantity.Voltage = 60

// DischargeTime is how long a resistance takes to bring a capacitance from one voltage
// down to another, R C ln(U/u); zero where it is there already. Five time constants
// leave 0.67 %, which of 30 kV is 202 V. An open resistance never does it: a lack.
func DischargeTime(r quantity.Resistance, c quantity.Capacitance, from, to quantity.Voltage) (quantity.Time, error) {
	folds, err := decay(c, from, to)
	if err != nil || folds == 0 {
		return 0, err
	}
	if !notNegative(r) {
		return 0, lack.Range("a resistance of %s never discharges anything", quantity.Text(r))
	}
	return quantity.Time(float64(r) * float64(c) * folds), nil
}

// ResistanceFor is the highest resistance that brings a capacitance from one voltage to
// another within a time; a lack where any does, or none.
func ResistanceFor(t quantity.Time, c quantity.Capacitance, from, to quantity.Voltage) (quantity.Resistance, error) {
	folds, err := decay(c, from, to)
	switch {
	case err != nil:
		return 0, err
	case folds == 0 || c == 0:
		return 0, lack.Range("from %s there is nothing to discharge to %s", quantity.Text(from), quantity.Text(to))
	case !positive(t):
		return 0, lack.Range("no resistance discharges within %s", quantity.Text(t))
	}
	return quantity.Resistance(float64(t) / (float64(c) * folds)), nil
}

// Remaining is the voltage a resistance has left of a capacitance's after a time.
func Remaining(r quantity.Resistance, c quantity.Capacitance, from quantity.Voltage, t quantity.Time) (quantity.Voltage, error) {
	if err := charged(c, from); err != nil {
		return 0, err
	}
	if !(r > 0) || !positive(c) || !notNegative(t) {
		return 0, lack.Range("a decay needs a resistance, a capacitance and a time, not %s, %s and %s", quantity.Text(r), quantity.Text(c), quantity.Text(t))
	}
	return from * quantity.Voltage(math.Exp(-float64(t)/(float64(r)*float64(c)))), nil
}

// decay is ln(from/to), zero where nothing is left to do.
func decay(c quantity.Capacitance, from, to quantity.Voltage) (float64, error) {
	if err := charged(c, from); err != nil {
		return 0, err
	}
	if !positive(to) {
		return 0, lack.Range("a capacitance never decays to %s", quantity.Text(to))
	}
	return math.Log(math.Max(1, float64(from/to))), nil
}

// Earthing is what an earthing rod goes through.
type Earthing struct {
	Peak         quantity.Current
	TimeConstant quantity.Time
	Time         quantity.Time // to Discharged
	Energy       quantity.Energy
}

// Earth discharges a capacitance at a voltage through the resistance of a rod. A rod
// without resistance has no peak that could be told: a lack.
func Earth(c quantity.Capacitance, u quantity.Voltage, rod quantity.Resistance) (Earthing, error) {
	if !positive(rod) {
		return Earthing{}, lack.Range("nothing limits the current of a rod of %s", quantity.Text(rod))
	}
	t, err := DischargeTime(rod, c, u, Discharged)
	if err != nil {
		return Earthing{}, err
	}
	return Earthing{
		Peak:         quantity.Current(float64(u) / float64(rod)),
		TimeConstant: quantity.Time(float64(rod) * float64(c)),
		Time:         t,
		Energy:       Energy(c, u),
	}, nil
}
