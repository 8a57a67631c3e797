package vacuum_test

import (
	"math"
	"testing"

	"kilovet/hv/chance"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/vacuum"

	"pgregory.net/rapid"
)

const degree = math.Pi / 180

// Two wedges on a plane electrode, worked out apart from this code: ±0.114, ±0.208, ±0.262
// at 45 and 135 degrees for permittivities 2.1, 4.6, 9.
func TestEdgeExponentAt45And135Degrees(t *testing.T) {
	for er, m := range map[float64]float64{2.1: 0.114, 4.6: 0.208, 9: 0.262} {
		for angle, want := range map[quantity.Angle]float64{45 * degree: m, 135 * degree: -m} {
			a, err := vacuum.EdgeExponent(er, angle)
			if err != nil {
				t.Fatal(err)
			}
			marked(t, "edge", a)
			if math.Abs(float64(a.Value)-want) > 5e-4 {
				t.Errorf("ε %g at %s: %v, want %v", er, quantity.Text(angle), a.Value, want)
			}
		}
		if a, err := vacuum.EdgeExponent(er, 90*degree); err != nil || a.Value != 0 {
			t.Errorf("ε %g at 90 degrees: %v (%v)", er, a.Value, err)
		}
	}
}

// At 45 degrees cos nπ/2 = −K/2 in closed form; of a very high permittivity the insulator
// acts as a conductor, with an exponent of 4/3 between planes at 135 degrees.
func TestEdgeExponentLimits(t *testing.T) {
	for _, er := range []float64{1.5, 4, 10, 80} {
		k := (er - 1) / (er + 1)
		a, _ := vacuum.EdgeExponent(er, 45*degree)
		near(t, "closed form", float64(a.Value), 2/math.Pi*math.Acos(-k/2)-1, 1e-9)
	}
	a, _ := vacuum.EdgeExponent(1e9, 45*degree)
	near(t, "conductor", float64(a.Value), 1.0/3, 1e-6)
	a, _ = vacuum.EdgeExponent(1e9, 120*degree)
	near(t, "flux kept inside 120 degrees", float64(a.Value), 0.75-1, 1e-6)
	for _, angle := range []quantity.Angle{10 * degree, 60 * degree, 170 * degree} {
		if a, err := vacuum.EdgeExponent(1, angle); err != nil || math.Abs(float64(a.Value)) > 1e-9 {
			t.Errorf("no insulator at all: %v (%v)", a.Value, err)
		}
	}
}

// The exponent satisfies the conditions at the surface between vacuum and insulator, and
// no lesser one does: potential and flux pass.
func TestEdgeExponentIsTheLeastThatPassesTheSurface(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		er := rapid.Float64Range(1.05, 100).Draw(t, "permittivity")
		angle := rapid.Float64Range(2*degree, 178*degree).Draw(t, "angle")
		a, err := vacuum.EdgeExponent(er, quantity.Angle(angle))
		if err != nil {
			t.Fatal(err)
		}
		mismatch := func(n float64) float64 {
			vs, vc := math.Sincos(n * (math.Pi - angle))
			is, ic := math.Sincos(n * angle)
			return er*vs*ic + vc*is
		}
		n := float64(a.Value) + 1
		if math.Abs(mismatch(n)) > 1e-9*er {
			t.Fatalf("ε %v at %v: flux does not pass for n %v", er, angle, n)
		}
		for x := 0.01; x < n-1e-3; x += 0.01 {
			if mismatch(x) < 0 {
				t.Fatalf("ε %v at %v: a lesser exponent near %v than %v", er, angle, x, n)
			}
		}
		if (angle < math.Pi/2) != (a.Value > 0) && math.Abs(angle-math.Pi/2) > 1e-6 {
			t.Fatalf("ε %v at %v: exponent %v has the wrong side", er, angle, a.Value)
		}
	})
}

func TestEdgeExponentLacks(t *testing.T) {
	_, err := vacuum.EdgeExponent(0, 1)
	lacks(t, "no permittivity", err, lack.Missing)
	for _, angle := range []quantity.Angle{0, math.Pi, -1} {
		_, err = vacuum.EdgeExponent(9, angle)
		lacks(t, "angle", err, lack.Outside)
	}
}
