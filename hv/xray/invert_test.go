package xray_test

import (
	"fmt"
	"math"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/hv/xray"
)

func ExampleStop_VoltageFor() {
	anode, _ := xray.FindTarget("iron")
	steel, _ := xray.FindMaterial("iron")
	column := xray.Wall{Layers: []xray.Layer{{Material: steel, Thickness: 2e-3}}, Distance: 0.3}
	v, _ := xray.Stop{Target: anode, Current: 100e-6}.VoltageFor(column, 1e-6/3600)
	fmt.Println("1 µGy/h is reached at", quantity.Text(v))
	// Output: 1 µGy/h is reached at 38.38 kV
}

// Voltages once found with 1.1e-9 for 1 µGy/h in the same place (derived).
func TestVoltagesReckonedElsewhere(t *testing.T) {
	for _, c := range []struct {
		material string
		mm, want float64
	}{
		{"glass", 3, 11.8}, {"glass", 6, 15.1}, {"glass", 10, 18.1}, {"aluminium", 1, 9.97}, {"aluminium", 3, 14.6},
		{"iron", 1, 30.1}, {"iron", 2, 38.8}, {"iron", 3, 45.0}, {"iron", 5, 54.3}, {"copper", 2, 45.3},
		{"lead", 1, 57.9}, {"lead", 2, 75.1}, {"lead", 3, 87.3}, {"lead glass", 6, 82.0},
	} {
		s, w := stop(t, "iron", 0, 100e-6), wall(t, 0.3, c.material, c.mm, "air", 300.0)
		v, err := s.VoltageFor(w, perHour(1)*quantity.KermaRate(xray.Coefficient/xray.LowCoefficient))
		if err != nil {
			t.Fatal(err)
		}
		near(t, fmt.Sprint(c.mm, " mm ", c.material), v, quantity.Voltage(c.want*1e3), 0.005)
		s.Voltage = v
		near(t, "there", behind(t, s, w).Low, perHour(1), 1e-6)
	}
}

func TestInversionsFailClosed(t *testing.T) {
	s, w := stop(t, "iron", 20, 1e-4), wall(t, 0.3, "glass", 3.0)
	for _, rate := range []quantity.KermaRate{0, -1, quantity.KermaRate(math.NaN())} {
		_, err := s.VoltageFor(w, rate)
		lacking(t, "rate", err, lack.Outside)
		_, err = s.ThicknessFor(w, material(t, "lead"), rate)
		lacking(t, "rate", err, lack.Outside)
	}
	_, err := s.VoltageFor(wall(t, 0.3, "lead", 30.0), perHour(1))
	lacking(t, "never reached", err, lack.Outside)
	_, err = s.VoltageFor(wall(t, 0.3, "beryllium", 0.001), 1e-300)
	lacking(t, "reached below the model", err, lack.Outside)
	_, err = s.ThicknessFor(w, xray.Material{}, perHour(1))
	lacking(t, "no material", err, lack.Outside)
	_, err = stop(t, "iron", 20, 0).VoltageFor(w, perHour(1))
	lacking(t, "no current", err, lack.Outside)
}

// What the inversions and half-value layers find, the estimate confirms.
func TestInversionsRoundTrip(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		s, w := drawn(t)
		e := behind(t, s, w)
		if e.Rate < 1e-250 {
			t.Skip("too little to compare")
		}
		v, err := s.VoltageFor(w, e.Rate)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "voltage", v, s.Voltage, 1e-6)
		m := material(t, rapid.SampledFrom(xray.Materials()).Draw(t, "added"))
		share := quantity.KermaRate(math.Pow(10, rapid.Float64Range(-6, 0).Draw(t, "log share")))
		x, err := s.ThicknessFor(w, m, e.Rate*share)
		if err != nil {
			t.Fatal(err)
		}
		with := w
		with.Layers = append(append([]xray.Layer{}, w.Layers...), xray.Layer{Material: m, Thickness: x + 1e-15})
		near(t, "thickness", behind(t, s, with).Rate, e.Rate*share, 1e-6)
		first, second, err := s.HalfValueLayers(w, m)
		if err != nil {
			t.Fatal(err)
		}
		with.Layers[len(w.Layers)].Thickness = first
		near(t, "half", behind(t, s, with).Rate, e.Rate/2, 1e-4)
		with.Layers[len(w.Layers)].Thickness = first + second
		near(t, "quarter", behind(t, s, with).Rate, e.Rate/4, 1e-4)
		if !(second >= first*(1-1e-9)) {
			t.Errorf("second half-value layer %v before the first %v", second, first)
		}
	})
}

// Nothing more is needed where the rate is kept already.
func TestNoThicknessNeeded(t *testing.T) {
	x, err := stop(t, "iron", 10, 1e-4).ThicknessFor(wall(t, 0.3, "steel", 3.0), material(t, "lead"), perHour(1))
	if err != nil || x != 0 {
		t.Errorf("%v, %v", x, err)
	}
}
