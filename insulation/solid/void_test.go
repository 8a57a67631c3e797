package solid_test

import (
	"fmt"
	"math"
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"
	"kilovet/insulation/solid"
)

var air = gas.State{Gas: gap.AirGas, Pressure: 101325, Temperature: 293.15}

// Naidu and Kamaraju, High Voltage Engineering, ex. 4.2: a flat void of 1 mm in 10 mm of ε 4
// starts at 9.75 kV peak, far under the 80 kV rms of its test.
func ExampleVoid_Inception() {
	v, _ := solid.Void{Cavity: solid.FlatVoid, Size: 1 * mm, Wall: 10 * mm, Permittivity: 4}.Inception(3 * kVmm)
	fmt.Println(quantity.Text(v))
	// Output: 9.75 kV
}

// The voltage across the void is then what its gas stands: the wall is a void and a solid
// in series.
func TestFlatVoidIsALayer(t *testing.T) {
	v, err := solid.Void{Cavity: solid.FlatVoid, Size: 0.4 * mm, Wall: 6 * mm, Permittivity: 3.7}.Inception(3 * kVmm)
	if err != nil {
		t.Fatal(err)
	}
	w := solid.Wall{Layers: []solid.Layer{{Thickness: 0.4 * mm, Permittivity: 1}, {Thickness: 5.6 * mm, Permittivity: 3.7}}}
	e, _ := w.Fields(v, solid.Switched)
	near(t, "field in the void", float64(e[0]), 3*kVmm, 1e-12)
}

func TestFieldFactorLimits(t *testing.T) {
	for _, row := range []struct{ er, flat, sphere, cylinder float64 }{{1, 1, 1, 1}, {4, 4, 4.0 / 3, 1.6}, {1e9, 1e9, 1.5, 2}} {
		for c, want := range map[solid.Cavity]float64{solid.FlatVoid: row.flat, solid.SphericalVoid: row.sphere, solid.CylindricalVoid: row.cylinder} {
			f, err := solid.FieldFactor(c, row.er)
			if err != nil {
				t.Fatal(err)
			}
			near(t, string(c), f, want, 1e-8)
		}
	}
	_, err := solid.FieldFactor("cubic", 3)
	lacks(t, "shape", err, lack.Outside)
	_, err = solid.FieldFactor(solid.FlatVoid, 0)
	lacks(t, "permittivity", err, lack.Missing)
}

// Voids in epoxy (Moore et al., Sandia 2020, abstract): flat ones broke down from 6 to 8.5 kV,
// 0.5 mm spheres from 18.5 to 20 kV; the thickness is not told, the ratio of 2 to 3 is.
func TestBubblesStartTwoToThreeTimesHigherThanFlatVoids(t *testing.T) {
	ratio := func(er float64) float64 {
		flat, err := solid.Void{solid.FlatVoid, 0.5 * mm, 10 * mm, er}.Inception(3 * kVmm)
		bubble, err2 := solid.Void{solid.SphericalVoid, 0.5 * mm, 10 * mm, er}.Inception(3 * kVmm)
		if err != nil || err2 != nil {
			t.Fatal(err, err2)
		}
		return float64(bubble / flat)
	}
	if low, high := ratio(3.4), ratio(3.7); low < 18.5/8.5 || high > 20.0/6 {
		t.Errorf("ratio %.3g to %.3g", low, high)
	}
}

// 24.22 + 6.08/√d kV/cm of Naidu, ex. 2.1: voids of 0.1, 0.2, 0.5 and 1 mm stand 0.85, 1.34,
// 2.57 and 4.34 kV peak (worked out apart from this code), all more than the books' 3 kV/mm.
func TestVoidField(t *testing.T) {
	for d, want := range map[float64]float64{0.1: 0.85, 0.2: 1.34, 0.5: 2.57, 1: 4.34} {
		a, err := solid.VoidField(air, quantity.Length(d*mm))
		if err != nil {
			t.Fatal(err)
		}
		marked(t, "void", a)
		near(t, fmt.Sprintf("%g mm", d), float64(a.Value)*d*mm, want*kV, 6e-3)
		if a.Value <= solid.TextbookVoidField || len(a.Assumptions) == 0 {
			t.Errorf("%g mm: %v, %v", d, a.Value, a.Assumptions)
		}
	}
	_, err := solid.VoidField(air, 1e-6)
	lacks(t, "a micrometre", err, lack.Outside)
}

// Small voids stand more, large ones leave less solid: the worst lies between, and no
// other size of the range starts lower.
func TestWorstVoidLiesBetween(t *testing.T) {
	size, v, err := solid.WorstVoid(air, 5*mm, 3.7, 0.05*mm, 4*mm)
	if err != nil {
		t.Fatal(err)
	}
	if size <= 0.05*mm || size >= 4*mm {
		t.Errorf("the worst void is %v, at an end", size)
	}
	for _, other := range []quantity.Length{0.05 * mm, size / 2, size * 0.97, size * 1.03, size * 2, 4 * mm} {
		e, err := solid.VoidField(air, other)
		if err != nil {
			t.Fatal(err)
		}
		u, err := solid.Void{solid.FlatVoid, other, 5 * mm, 3.7}.Inception(e.Value)
		if err != nil || float64(u) < float64(v)*(1-1e-3) {
			t.Errorf("%v starts at %v, the worst at %v (%v)", other, u, v, err)
		}
	}
}

func TestVoidLacks(t *testing.T) {
	for what, row := range map[string]struct {
		c    solid.Void
		e    quantity.Field
		kind lack.Kind
	}{
		"no size":          {solid.Void{solid.FlatVoid, 0, 1 * mm, 3}, 3e6, lack.Missing},
		"no strength":      {solid.Void{solid.FlatVoid, 0.1 * mm, 1 * mm, 3}, 0, lack.Missing},
		"larger than wall": {solid.Void{solid.FlatVoid, 2 * mm, 1 * mm, 3}, 3e6, lack.Outside},
		"large bubble":     {solid.Void{solid.SphericalVoid, 0.5 * mm, 1 * mm, 3}, 3e6, lack.Outside},
	} {
		_, err := row.c.Inception(row.e)
		lacks(t, what, err, row.kind)
	}
	_, _, err := solid.WorstVoid(air, 1*mm, 3, 0.1*mm, 2*mm)
	lacks(t, "voids past the wall", err, lack.Outside)
	_, _, err = solid.WorstVoid(air, 1*mm, 0, 0.1*mm, 0.5*mm)
	lacks(t, "no permittivity", err, lack.Missing)
	if _, v, err := solid.WorstVoid(air, 1*mm, 3, 1e-6, 0.5*mm); lack.Of(err) == nil || math.IsInf(float64(v), 0) {
		t.Errorf("a micrometre of void: %v (%v)", v, err)
	}
}
