package field

import (
	"math"
	"testing"
)

func TestWedgeExponents(t *testing.T) {
	deg := math.Pi / 180
	for _, c := range []struct {
		name string
		w    wedge
		want float64
	}{
		// π over the angle, between conductors; half of that to a natural boundary.
		{"square edge", wedge{[]sector{{270 * deg, 1}}, atConductor, atConductor}, 2.0 / 3},
		{"rim of a sheet", wedge{[]sector{{360 * deg, 1}}, atConductor, atConductor}, 0.5},
		{"flat", wedge{[]sector{{180 * deg, 1}}, atConductor, atConductor}, 1},
		{"inner corner", wedge{[]sector{{90 * deg, 1}}, atConductor, atConductor}, 2},
		{"conductor to natural", wedge{[]sector{{180 * deg, 1}}, atConductor, atNatural}, 0.5},
		{"dielectric square on a conductor", wedge{[]sector{{90 * deg, 9.4}, {90 * deg, 1}}, atConductor, atConductor}, 1},
		{"the same all around", wedge{[]sector{{100 * deg, 3}, {260 * deg, 3}}, open, open}, 1},
	} {
		got := c.w.exponents()
		if len(got) == 0 || math.Abs(got[0]-c.want) > 1e-8 {
			t.Errorf("%s: %v, want %v first", c.name, got, c.want)
		}
	}
}

// A dielectric wedge in open space: by symmetry about its bisector the potential is
// even or odd, ε tan(λα/2) = −tan(λ(π − α/2)) or tan(λα/2) = −ε tan(λ(π − α/2)).
func TestDielectricWedge(t *testing.T) {
	for _, eps := range []float64{1.5, 3, 9.4, 100} {
		for _, angle := range []float64{30, 90, 150, 210} {
			a := angle / 2 * math.Pi / 180
			b := math.Pi - a
			w := wedge{[]sector{{2 * a, eps}, {2 * b, 1}}, open, open}
			list := w.exponents()
			lambda := list[0]
			sin, cos := math.Sin, math.Cos
			even := eps*sin(lambda*a)*cos(lambda*b) + cos(lambda*a)*sin(lambda*b)
			odd := sin(lambda*a)*cos(lambda*b) + eps*cos(lambda*a)*sin(lambda*b)
			if math.Min(math.Abs(even), math.Abs(odd)) > 1e-6*eps {
				t.Errorf("ε %v, %v°: λ = %v fulfils neither: %v, %v", eps, angle, lambda, even, odd)
			}
			if lambda <= 0.5 || lambda >= 1 {
				t.Errorf("ε %v, %v°: λ = %v", eps, angle, lambda)
			}
		}
	}
}

func TestConeExponents(t *testing.T) {
	// A metal cone of half angle 49.2905° (Taylor, Proc. R. Soc. A 280, 383, 1964):
	// P_½ vanishes at its complement.
	cone := func(half float64) cone {
		from := half * math.Pi / 180
		return cone{wedge: wedge{[]sector{{math.Pi - from, 1}}, atConductor, open}, from: from}
	}
	if got := cone(49.2905).exponents()[0]; math.Abs(got-0.5) > 2e-5 {
		t.Errorf("Taylor's cone: %v, want 0.5", got)
	}
	if got := cone(90).exponents()[0]; math.Abs(got-1) > 1e-9 {
		t.Errorf("flat: %v, want 1", got)
	}
	// P₂ vanishes at cos θ = 1/√3: a hollow of that half angle has the exponent 2.
	if got := cone(180 - math.Acos(1/math.Sqrt(3))*180/math.Pi).exponents()[0]; math.Abs(got-2) > 1e-5 {
		t.Errorf("hollow: %v, want 2", got)
	}
	// Without a jump of the permittivity there is no cone: 1 is an exponent, whole ones only.
	none := dielectricCone(40, 1)
	for _, x := range none.exponents() {
		if math.Abs(x-math.Round(x)) > 1e-5 {
			t.Errorf("no cone: exponent %v", x)
		}
	}
	if got := dielectricCone(40, 9.4).exponents()[0]; got <= 0.5 || got >= 1 {
		t.Errorf("dielectric cone: %v is not between 1/2 and 1", got)
	}
}

func dielectricCone(half, eps float64) cone {
	a := half * math.Pi / 180
	return cone{wedge: wedge{[]sector{{a, eps}, {math.Pi - a, 1}}, open, open}}
}

// The slope of the field near the tip of a sharp cone on the axis is its exponent.
func TestFieldNearConeTip(t *testing.T) {
	a := Arrangement{
		Electrodes: []Electrode{{"cone", nil}, {"box", nil}},
	}
	a.Electrodes[0].Profiles = append(a.Electrodes[0].Profiles, path(t, "cone", 0, 10, 10, 20, 0, 20))
	a.Electrodes[1].Profiles = append(a.Electrodes[1].Profiles, path(t, "box", 0, 0, 40, 0, 40, 50, 0, 50))
	f := under(t, a, alone2("cone", "box"))
	found := false
	for _, e := range f.Edges() {
		if e.At.R > 1e-9 || !e.Sharp {
			continue
		}
		found = true
		near, err := f.Near(e, 0.05e-3)
		if err != nil {
			t.Fatal(err)
		}
		far, err := f.Near(e, 0.1e-3)
		if err != nil {
			t.Fatal(err)
		}
		slope := math.Log(float64(far[0].Strength()/near[0].Strength())) / math.Ln2
		if math.Abs(slope-e.Exponent) > 0.01 {
			t.Errorf("slope %v, exponent %v", slope, e.Exponent)
		}
	}
	if !found {
		t.Error("the tip is not recognised")
	}
}
