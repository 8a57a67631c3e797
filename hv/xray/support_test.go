package xray_test

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/hv/xray"
)

// reporter is what a test and a property share.
type reporter interface {
	Helper()
	Errorf(format string, args ...any)
	Fatal(args ...any)
}

func near[Q ~float64](t reporter, what string, got, want Q, tolerance float64) {
	t.Helper()
	if !(math.Abs(float64(got-want)) <= tolerance*math.Abs(float64(want))) {
		t.Errorf("%s: got %.9g, want %.9g within %g", what, got, want, tolerance)
	}
}

func lacking(t reporter, what string, err error, kind lack.Kind) {
	t.Helper()
	if l := lack.Of(err); l == nil || l.Kind != kind {
		t.Errorf("%s: got %v, want a lack of kind %d", what, err, kind)
	}
}

// wall is made of words and millimetres.
func wall(t reporter, metres quantity.Length, layers ...any) xray.Wall {
	t.Helper()
	w := xray.Wall{Distance: metres}
	for i := 0; i < len(layers); i += 2 {
		w.Layers = append(w.Layers, xray.Layer{Material: material(t, layers[i].(string)), Thickness: quantity.Length(layers[i+1].(float64) * 1e-3)})
	}
	return w
}

func material(t reporter, word string) xray.Material {
	t.Helper()
	m, err := xray.FindMaterial(word)
	if err != nil {
		t.Fatal(err)
	}
	return m
}

func stop(t reporter, target string, kilovolts float64, current quantity.Current) xray.Stop {
	t.Helper()
	found, err := xray.FindTarget(target)
	if err != nil {
		t.Fatal(err)
	}
	return xray.Stop{Target: found, Voltage: quantity.Voltage(kilovolts * 1e3), Current: current}
}

func behind(t reporter, s xray.Stop, w xray.Wall) xray.Estimate {
	t.Helper()
	e, err := s.Behind(w)
	if err != nil {
		t.Fatal(err)
	}
	return e
}

// perHour is a kerma rate of µGy/h.
func perHour(micrograys float64) quantity.KermaRate {
	return quantity.KermaRate(micrograys * 1e-6 / 3600)
}
