package touch

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// ThresholdSource says where ThresholdCharge comes from and what it is for.
const ThresholdSource = "charge model of ventricular fibrillation, Pratt et al., EMBC 2016, abstract alone (read)"

// The corners of the charge model, as its abstract gives them.
const (
	thresholdLeast   quantity.Charge  = 1e-3   // of an impulse of a microsecond
	thresholdPlateau quantity.Charge  = 100e-3 // about, from 10 ms to 5 s
	thresholdCurrent quantity.Current = 38e-3  // beyond
	impulseLeast     quantity.Time    = 1e-6
	plateauFrom      quantity.Time    = 10e-3
	plateauTo        quantity.Time    = 5
)

// ThresholdCharge is the charge from which an impulse of a duration can make a heart
// fibrillate, by a published model: 1 mC at a microsecond, from there in proportion to the
// duration (Weiss's law, Q = Q0 + I t) to about 100 mC at 10 ms, the same up to 5 s, then
// 38 mA times the duration, from where that is more. It is information and permits nothing:
// what may be touched is limited by charge and energy far below it. A lack below a
// microsecond.
func ThresholdCharge(duration quantity.Time) (quantity.Charge, error) {
	switch {
	case !quantity.AtLeast(duration, impulseLeast):
		return 0, lack.Range("the charge model of fibrillation begins at %s, above %s", quantity.Text(impulseLeast), quantity.Text(duration))
	case duration < plateauFrom:
		share := float64((duration - impulseLeast) / (plateauFrom - impulseLeast))
		return thresholdLeast + quantity.Charge(share)*(thresholdPlateau-thresholdLeast), nil
	case duration <= plateauTo:
		return thresholdPlateau, nil
	}
	return max(thresholdPlateau, quantity.Charge(float64(thresholdCurrent)*float64(duration))), nil
}
