package touch_test

import (
	"math"
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/hv/touch"
)

// reporter is what a test and a property share.
type reporter interface {
	Helper()
	Errorf(format string, args ...any)
}

func near[Q ~float64](t reporter, what string, got, want Q, tolerance float64) {
	t.Helper()
	if !(math.Abs(float64(got-want)) <= tolerance*math.Abs(float64(want))) {
		t.Errorf("%s: got %.9g, want %.9g within %g", what, got, want, tolerance)
	}
}

func lacking(t reporter, what string, err error) {
	t.Helper()
	if l := lack.Of(err); l == nil || l.Kind != lack.Outside {
		t.Errorf("%s: got %v, want a lack outside", what, err)
	}
}

func TestFailsClosed(t *testing.T) {
	nan := math.NaN()
	for what, err := range map[string]error{
		"no body":             second(touch.Through(1e-9, 1e3, 0)),
		"negative voltage":    second(touch.Through(1e-9, -1e3, 500)),
		"no capacitance":      second(touch.Through(quantity.Capacitance(nan), 1e3, 500)),
		"a rod of nothing":    second(touch.Earth(1e-9, 1e3, 0)),
		"to 0 V":              second(touch.DischargeTime(1e3, 1e-9, 1e3, 0)),
		"NaN volts":           second(touch.DischargeTime(1e3, 1e-9, quantity.Voltage(nan), 60)),
		"NaN ohms":            second(touch.DischargeTime(quantity.Resistance(nan), 1e-9, 1e3, 60)),
		"negative time":       second(touch.Remaining(1e3, 1e-9, 1e3, -1)),
		"curve at 0 V":        second(touch.PermissibleCapacitance(0)),
		"curve past its end":  second(touch.PermissibleCapacitance(101e3)),
		"approach past table": second(touch.Approach(701e3)),
		"approach to NaN":     second(touch.Approach(quantity.Voltage(nan))),
		"impulse past table":  second(touch.ImpulseDistance(1051e3)),
		"impulse below zero":  second(touch.ImpulseDistance(-1)),
		"fence":               second(touch.FlashoverDistance(-1)),
		"mesh past table":     second(touch.MeshDistance(touch.Slot, 0.121)),
		"mesh of nothing":     second(touch.MeshDistance(touch.Slot, 0)),
	} {
		lacking(t, what, err)
	}
	_, _, err := touch.ComparisonVoltage(quantity.Capacitance(nan))
	lacking(t, "comparison", err)
}

func second[T any](_ T, err error) error { return err }
