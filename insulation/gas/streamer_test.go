package gas_test

import (
	"math"
	"testing"

	"kilovet/hv/chance"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"
	"kilovet/insulation/shape"

	"pgregory.net/rapid"
)

// Between plates the criterion is the uniform-field law itself; the other coefficient,
// from memory, lies 3 to 10 % above it.
func TestStreamerBetweenPlates(t *testing.T) {
	for d, other := range map[quantity.Length]float64{0.5e-3: 2.83e3, 1e-3: 4.68e3, 10e-3: 31.1e3, 50e-3: 139e3} {
		l := line(t, gap.Plates, 0, d)
		v, err1 := gas.AirByUniformLaw.Onset(l, 1)
		q, err2 := gas.AirQuadratic.Onset(l, 1)
		u, _ := gas.UniformAir(1, d)
		if err1 != nil || err2 != nil {
			t.Fatal(err1, err2)
		}
		near(t, "law", float64(v), float64(u), 1e-9)
		near(t, "other coefficient", float64(q), other, 3e-3)
	}
}

// Georghiou et al., J. Phys. D 32 (1999) 1370: no streamer at or below 2.5 kV from a
// positive hyperboloid of 50 µm, 1 mm from a plane (a simulation). Onset comes at most
// a fifth before, never far above.
func TestOnsetOfAFinePoint(t *testing.T) {
	v, err := gas.AirByUniformLaw.Onset(line(t, gap.PointPlane, 50e-6, 1e-3), 1)
	if err != nil || v < 1800 || v > 2700 {
		t.Errorf("onset %v V (%v)", v, err)
	}
}

// Coaxial cylinders in a fixed outer one: onset is highest near, and past the field's
// own optimum R/r = e, and falls for a thicker and a much thinner inner one.
func TestOnsetInAFixedOuterCylinder(t *testing.T) {
	const outer = 50e-3
	at := func(ratio float64) float64 {
		l, err := shape.Of(gap.Shape{Kind: gap.Coaxial, InnerRadius: quantity.Length(outer / ratio), OuterRadius: outer}, 0)
		if err != nil {
			t.Fatal(err)
		}
		v, err := gas.AirByUniformLaw.Onset(l, 1)
		if err != nil {
			t.Fatal(err)
		}
		return float64(v)
	}
	if !(at(1.5) < at(2.2) && at(2.2) < at(math.E) && at(math.E) > at(6) && at(6) > at(20)) {
		t.Errorf("onsets %g %g %g %g %g", at(1.5), at(2.2), at(math.E), at(6), at(20))
	}
}

// IEC 60052 (values from memory), one sphere earthed in free space: at most 8 % under
// the table to half the diameter, never above it.
func TestStreamerAgainstSphereGaps(t *testing.T) {
	for _, diameter := range []quantity.Length{50e-3, 100e-3, 250e-3} {
		for _, part := range []quantity.Length{0.1, 0.2, 0.4, 0.5} {
			d := diameter * part
			iec, err := gas.SphereGap(normal, diameter, d)
			if lack.Of(err) != nil {
				continue // not tabulated
			}
			v, err := gas.AirByUniformLaw.Onset(line(t, gap.SphereSphere, diameter/2, d), 1)
			if ratio := float64(v / iec.Value); err != nil || ratio > 1 || ratio < 0.92 {
				t.Errorf("spheres %v, gap %v: %v, table %v (%v)", diameter, d, v, iec.Value, err)
			}
		}
	}
}

func TestRoughSurfacesStartEarlier(t *testing.T) {
	l := line(t, gap.Coaxial, 3e-3, 60e-3)
	last := quantity.Voltage(math.Inf(1))
	for _, s := range []gap.Surface{gap.Smooth, gap.Weathered, gap.Stranded} {
		a, err := gas.Onset(normal, l, s)
		if err != nil || a.Value >= last {
			t.Errorf("%s: %v after %v (%v)", s, a.Value, last, err)
		}
		last = a.Value
	}
	if _, err := gas.Onset(normal, l, "furry"); lack.Of(err) == nil {
		t.Error("an unknown surface has a factor")
	}
}

func TestOnsetRefusesWhatItDoesNotKnow(t *testing.T) {
	helium := normal
	helium.Gas = gap.Helium
	dense := normal
	dense.Pressure = 2e6
	for name, c := range map[string]struct {
		s gas.State
		l shape.Line
	}{
		"helium":      {helium, line(t, gap.Coaxial, 3e-3, 60e-3)},
		"2 MPa":       {dense, line(t, gap.Coaxial, 3e-3, 60e-3)},
		"fine tip":    {normal, line(t, gap.PointPlane, 5e-6, 1e-3)},
		"shortest":    {normal, line(t, gap.SpherePlane, 1e-3, 0.05e-3)},
		"rarefied":    {gas.State{Gas: gap.AirGas, Pressure: 100, Temperature: 293.15}, line(t, gap.SpherePlane, 1e-3, 10e-3)},
		"sharp, thin": {gas.State{Gas: gap.AirGas, Pressure: 10e3, Temperature: 293.15}, line(t, gap.PointPlane, 50e-6, 10e-3)},
	} {
		if _, err := gas.Onset(c.s, c.l, gap.Smooth); lack.Of(err) == nil {
			t.Errorf("%s: no lack", name)
		}
	}
}

// Density and length enter together: twice the density at half the size is the same
// discharge at the same voltage.
func TestSimilarity(t *testing.T) {
	chance.Check(t, func(rt *rapid.T) {
		k := rapid.SampledFrom([]gap.Kind{gap.Coaxial, gap.SpherePlane, gap.PointPlane, gap.ParallelCylinders, gap.SphereSphere}).Draw(rt, "kind")
		r := quantity.Length(math.Pow(10, rapid.Float64Range(-4, -1.5).Draw(rt, "log r")))
		d := quantity.Length(math.Pow(10, rapid.Float64Range(-3.5, -1).Draw(rt, "log d")))
		factor := rapid.Float64Range(0.5, 2).Draw(rt, "factor")
		a, err1 := gas.AirByUniformLaw.Onset(line(t, k, r, d), 1)
		b, err2 := gas.AirByUniformLaw.Onset(line(t, k, r/quantity.Length(factor), d/quantity.Length(factor)), quantity.Fraction(factor))
		if err1 != nil || err2 != nil || math.Abs(float64(b/a)-1) > 1e-6 {
			rt.Fatalf("%s: %v and %v (%v, %v)", k, a, b, err1, err2)
		}
	})
}

// A larger gap or radius never lowers the onset, a lower place neither. The spheres of
// either kind are the hardest: a larger radius lets the far one count.
func TestOnsetRises(t *testing.T) {
	kinds := []gap.Kind{gap.Coaxial, gap.ConcentricSpheres, gap.SpherePlane, gap.SphereSphere, gap.CylinderPlane, gap.ParallelCylinders, gap.PointPlane}
	chance.Check(t, func(rt *rapid.T) {
		k := rapid.SampledFrom(kinds).Draw(rt, "kind")
		d := quantity.Length(math.Pow(10, rapid.Float64Range(-3.5, -0.7).Draw(rt, "log d")))
		r := d * quantity.Length(math.Pow(10, rapid.Float64Range(-2.5, 1.5).Draw(rt, "log r/d")))
		if r < 50e-6 {
			rt.Skip()
		}
		more := quantity.Length(rapid.Float64Range(1.001, 1.5).Draw(rt, "more"))
		onset := func(r, d quantity.Length, density quantity.Fraction) quantity.Voltage {
			v, err := gas.AirByUniformLaw.Onset(line(t, k, r, d), density)
			if err != nil {
				rt.Fatal(err)
			}
			return v
		}
		base := onset(r, d, 0.9)
		for what, better := range map[string]quantity.Voltage{
			"gap": onset(r, d*more, 0.9), "radius": onset(r*more, d, 0.9), "density": onset(r, d, 0.9*quantity.Fraction(more)),
		} {
			if !quantity.AtLeast(better, base) {
				rt.Fatalf("%s r %v d %v: onset %v, with more %s %v", k, r, d, base, what, better)
			}
		}
	})
}

// Forty gaps in one review: their onsets together are a few milliseconds.
func BenchmarkFortyOnsets(b *testing.B) {
	kinds := []gap.Kind{gap.Coaxial, gap.SpherePlane, gap.SphereSphere, gap.ParallelCylinders, gap.PointPlane}
	var lines []shape.Line
	for i := range 40 {
		r := quantity.Length(0.2e-3 * math.Pow(1.12, float64(i)))
		lines = append(lines, line(b, kinds[i%len(kinds)], r, 20e-3))
	}
	for b.Loop() {
		for _, l := range lines {
			if _, err := gas.AirByUniformLaw.Onset(l, 1); err != nil {
				b.Fatal(err)
			}
		}
	}
}
