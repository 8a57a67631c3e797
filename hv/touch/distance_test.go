package touch_test

import (
	"fmt"
	"math"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/quantity"
	"kilovet/hv/touch"
)

// Points of line A (derived from its two rules).
func TestPermissibleCapacitance(t *testing.T) {
	for u, nano := range map[quantity.Voltage]float64{
		100: 450, 450: 100, 1e3: 45, 5e3: 9, 10e3: 4.5, 15e3: 3, 15.001e3: 3.111, 20e3: 1.75, 30e3: 0.7778, 50e3: 0.28, 60e3: 0.1944, 80e3: 0.1094, 100e3: 0.07,
	} {
		c, err := touch.PermissibleCapacitance(u)
		if err != nil {
			t.Fatal(err)
		}
		near(t, fmt.Sprint(u, " V"), float64(c)*1e9, nano, 3e-4)
	}
	// A bare sphere of 10 cm radius, 11 pF, stays below the line at 100 kV.
	if c, _ := touch.PermissibleCapacitance(100e3); c < 11.13e-12 {
		t.Error("56 mJ are less than 350 mJ")
	}
}

// IEC 62368-1 Table 5 (read in a digest): rows, between them, beyond them; from 8 nF down
// to 0.2 nF a charge of 4 and 8 µC, 5.6 times below line A.
func TestComparisonLine(t *testing.T) {
	for nano, want := range map[float64][2]quantity.Voltage{
		300: {60, 120}, 1000: {60, 120}, 170: {75, 150}, 8: {500, 1000}, 0.4: {10e3, 20e3}, 0.133: {25e3, 50e3}, 0.01: {25e3, 50e3}, 0.3: {15e3, 30e3},
	} {
		normal, fault, err := touch.ComparisonVoltage(quantity.Capacitance(nano * 1e-9))
		if err != nil {
			t.Fatal(err)
		}
		near(t, fmt.Sprint(nano, " nF"), normal, want[0], 1e-9)
		near(t, "fault", fault, want[1], 1e-9)
	}
	for _, nano := range []float64{0.2, 0.4, 0.8, 1.6, 4, 8} {
		normal, fault, _ := touch.ComparisonVoltage(quantity.Capacitance(nano * 1e-9))
		near(t, "charge", nano*float64(normal), 4000, 1e-9)
		near(t, "in a fault", nano*float64(fault), 8000, 1e-9)
	}
}

// EN 50110-1 Table A.1 as printed to 60 kV; at 110 kV the older table's 1100 mm; the
// interpolation of its note at 50 kV (derived).
func TestApproach(t *testing.T) {
	for kilovolts, want := range map[float64][2]float64{
		0.4: {0, 300}, 1: {0, 300}, 2: {60, 1120}, 3: {60, 1120}, 10: {120, 1150}, 20: {220, 1220}, 30: {320, 1320}, 36: {380, 1380}, 45: {480, 1480},
		50: {530, 1530}, 60: {630, 1630}, 110: {1100, 2000}, 220: {2100, 3000}, 275: {2100, 4000}, 380: {2500, 4000}, 700: {5300, 8400},
	} {
		z, err := touch.Approach(quantity.Voltage(kilovolts * 1e3))
		if err != nil {
			t.Fatal(err)
		}
		near(t, fmt.Sprint(kilovolts, " kV"), float64(z.Danger)*1e3, want[0], 1e-9)
		near(t, "vicinity", float64(z.Vicinity)*1e3, want[1], 1e-9)
	}
}

// 30 kV DC are a system of 36.8 kV, which asks for 388 mm; the laboratory's 10.5 cm are
// for the spark alone (derived from the read rules).
func TestApproachOfDirectVoltage(t *testing.T) {
	near(t, "system", touch.SystemVoltage(30e3), 36.8e3, 2e-3)
	z, err := touch.ApproachDC(30e3)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "danger", z.Danger, 0.388, 2e-3)
	fence, err := touch.FlashoverDistance(30e3)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "fence", fence, 0.105, 1e-9)
	if fence > z.Danger {
		t.Error("the danger zone must be the wider")
	}
}

// The older table's rows by their impulse voltage.
func TestImpulseDistance(t *testing.T) {
	for kilovolts, want := range map[float64]quantity.Length{0: 60e-3, 40: 60e-3, 41: 90e-3, 125: 220e-3, 126: 320e-3, 550: 1.1, 1050: 2.1} {
		d, err := touch.ImpulseDistance(quantity.Voltage(kilovolts * 1e3))
		if err != nil {
			t.Fatal(err)
		}
		near(t, fmt.Sprint(kilovolts, " kV"), d, want, 1e-9)
	}
}

// EN 294 Table 4 by way of BGI 891, read.
func TestMeshDistance(t *testing.T) {
	for _, row := range []struct {
		shape      touch.Opening
		size, want quantity.Length
	}{
		{touch.Slot, 5e-3, 10e-3}, {touch.Slot, 6e-3, 10e-3}, {touch.Slot, 6.1e-3, 20e-3}, {touch.Slot, 25e-3, 850e-3}, {touch.Square, 25e-3, 120e-3},
		{touch.Square, 40e-3, 200e-3}, {touch.Circle, 10e-3, 20e-3}, {touch.Circle, 40e-3, 120e-3}, {touch.Circle, 120e-3, 850e-3},
	} {
		d, err := touch.MeshDistance(row.shape, row.size)
		if err != nil {
			t.Fatal(err)
		}
		near(t, fmt.Sprint(row.size), d, row.want, 1e-9)
	}
}

// More voltage never asks for less distance, nor allows more capacitance but for the step
// at 15 kV; a larger opening never for less.
func TestTablesAreMonotone(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		u := quantity.Voltage(rapid.Float64Range(1, 99e3).Draw(t, "voltage"))
		more := u + quantity.Voltage(rapid.Float64Range(1, 500e3).Draw(t, "more"))
		a, err := touch.Approach(u)
		b, err2 := touch.Approach(more)
		if err != nil || err2 != nil || b.Danger < a.Danger || b.Vicinity < a.Vicinity {
			t.Errorf("%v V: %v, %v V: %v", u, a, more, b)
		}
		size := quantity.Length(rapid.Float64Range(1e-4, 0.12).Draw(t, "size"))
		for _, shape := range []touch.Opening{touch.Slot, touch.Square, touch.Circle} {
			wide, _ := touch.MeshDistance(shape, size)
			narrow, _ := touch.MeshDistance(shape, size/2)
			if narrow > wide {
				t.Errorf("shape %d: %v for %v, %v for half", shape, wide, size, narrow)
			}
		}
		c := quantity.Capacitance(math.Pow(10, rapid.Float64Range(-10, -6).Draw(t, "log capacitance")))
		v, _, _ := touch.ComparisonVoltage(c)
		w, _, _ := touch.ComparisonVoltage(c * 2)
		line, _ := touch.PermissibleCapacitance(v)
		if w > v || line < c && v > 60 && v < 25e3 {
			t.Errorf("%v F: %v V, twice %v V, line A %v F", c, v, w, line)
		}
	})
}

func TestNoSuchOpening(t *testing.T) {
	defer func() {
		if recover() == nil {
			t.Error("must panic")
		}
	}()
	_, _ = touch.MeshDistance(touch.Circle+1, 1e-3)
}
