package solid_test

import (
	"math"
	"testing"

	"kilovet/hv/chance"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/solid"

	"pgregory.net/rapid"
)

// walls are two to four layers, flat or coaxial.
func walls(t *rapid.T) solid.Wall {
	w := solid.Wall{InnerRadius: quantity.Length(rapid.SampledFrom([]float64{0, 1 * mm, 30 * mm}).Draw(t, "radius"))}
	for range rapid.IntRange(2, 4).Draw(t, "layers") {
		w.Layers = append(w.Layers, solid.Layer{
			Thickness:    quantity.Length(rapid.Float64Range(0.1*mm, 20*mm).Draw(t, "thickness")),
			Permittivity: rapid.Float64Range(1, 10).Draw(t, "permittivity"),
			Resistivity:  quantity.Resistivity(math.Pow(10, rapid.Float64Range(10, 16).Draw(t, "log resistivity"))),
		})
	}
	return w
}

// The layers take the whole voltage, and flux (or current) passes their faces.
func TestLayersShareTheVoltageAndPassFluxOrCurrent(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		w := walls(t)
		for _, how := range []solid.Sharing{solid.Switched, solid.Settled} {
			v, err := w.Voltages(10*kV, how)
			e, err2 := w.Fields(10*kV, how)
			if err != nil || err2 != nil {
				t.Fatal(err, err2)
			}
			sum, r, first := 0.0, 1.0, 0.0
			if w.InnerRadius > 0 {
				r = float64(w.InnerRadius)
			}
			for i, l := range w.Layers {
				sum += float64(v[i])
				through := l.Permittivity * float64(e[i]) * r
				if how == solid.Settled {
					through = float64(e[i]) * r / float64(l.Resistivity)
				}
				if i == 0 {
					first = through
				}
				if math.Abs(through/first-1) > 1e-9 {
					t.Fatalf("layer %d: %v passes, %v entered", i, through, first)
				}
				if w.InnerRadius > 0 {
					r += float64(l.Thickness)
				}
			}
			if math.Abs(sum/(10*kV)-1) > 1e-9 {
				t.Fatalf("the layers take %v of 10 kV", sum)
			}
		}
	})
}

// Layers of one material are a single one, and a wide cylinder is flat.
func TestWallLimits(t *testing.T) {
	l := solid.Layer{Thickness: 1 * mm, Permittivity: 3, Resistivity: 1e12}
	e, _ := solid.Wall{Layers: []solid.Layer{l, l, l}}.Fields(9*kV, solid.Settled)
	for _, e := range e {
		near(t, "three alike", float64(e), 3*kVmm, 1e-12)
	}
	m := solid.Layer{Thickness: 2 * mm, Permittivity: 9, Resistivity: 1e10}
	flat, _ := solid.Wall{Layers: []solid.Layer{l, m}}.Fields(9*kV, solid.Switched)
	round, _ := solid.Wall{InnerRadius: 1e3, Layers: []solid.Layer{l, m}}.Fields(9*kV, solid.Switched)
	near(t, "wide cylinder", float64(round[1]), float64(flat[1]), 1e-5)
}

// The better insulator takes the field of DC, the lesser permittivity that of AC: glass and
// PTFE change places between the two.
func TestLastingVoltageGoesToTheBetterInsulator(t *testing.T) {
	w := solid.Wall{Layers: []solid.Layer{
		{Thickness: 5 * mm, Permittivity: 4.6, Resistivity: 1e12},
		{Thickness: 5 * mm, Permittivity: 2.1, Resistivity: 1e16},
	}}
	switched, _ := w.Fields(20*kV, solid.Switched)
	settled, _ := w.Fields(20*kV, solid.Settled)
	near(t, "PTFE at once", float64(switched[1]), 20*kV/5e-3*4.6/6.7, 1e-12)
	near(t, "PTFE in the end", float64(settled[1]), 4*kVmm, 1e-3)
	if settled[0] >= switched[0]/1000 {
		t.Errorf("the glass keeps %v of %v", settled[0], switched[0])
	}
	// τ of flat layers of one thickness is (ε₁ + ε₂)/(σ₁ + σ₂): here that of the glass and a half.
	tau, err := w.Settling()
	if err != nil {
		t.Fatal(err)
	}
	near(t, "settling", float64(tau), 8.8541878128e-12*(4.6+2.1)/(1e-12+1e-16), 1e-12)
}

// Between switching and settling a step by step solution of the two layers follows the
// exponential with the settling time, coaxial and flat.
func TestSettlingAgainstTheLayersStepByStep(t *testing.T) {
	layers := []solid.Layer{{Thickness: 2 * mm, Permittivity: 4, Resistivity: 3e11}, {Thickness: 3 * mm, Permittivity: 2, Resistivity: 1e12}}
	for _, r := range []quantity.Length{0, 2 * mm} {
		w := solid.Wall{InnerRadius: r, Layers: layers}
		tau, err := w.Settling()
		if err != nil {
			t.Fatal(err)
		}
		start, _ := w.Voltages(1, solid.Switched)
		end, _ := w.Voltages(1, solid.Settled)
		extent := func(i int) float64 {
			if r == 0 {
				return float64(layers[i].Thickness)
			}
			return math.Log([]float64{4.0 / 2, 7.0 / 4}[i])
		}
		c := func(i int) float64 { return 8.8541878128e-12 * layers[i].Permittivity / extent(i) }
		g := func(i int) float64 { return 1 / (float64(layers[i].Resistivity) * extent(i)) }
		u, step := float64(start[0]), float64(tau)/20000
		for range 20000 { // charge of the face between the layers
			u += step * (g(1)*(1-u) - g(0)*u) / (c(0) + c(1))
		}
		near(t, "after one settling time", u, float64(end[0])+(float64(start[0])-float64(end[0]))/math.E, 1e-4)
	}
}

func TestWithstandIsWhereTheFirstLayerReachesItsLimit(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		w := walls(t)
		limits := make([]quantity.Field, len(w.Layers))
		for i := range limits {
			limits[i] = quantity.Field(rapid.Float64Range(1e6, 50e6).Draw(t, "limit"))
		}
		v, first, err := w.Withstand(limits, solid.Settled)
		if err != nil {
			t.Fatal(err)
		}
		e, _ := w.Fields(v, solid.Settled)
		for i := range e {
			if !quantity.AtMost(e[i], limits[i]) || i == first && !quantity.Equal(e[i], limits[i]) {
				t.Fatalf("layer %d at %v of %v, first %d", i, e[i], limits[i], first)
			}
		}
	})
}

func TestWallLacks(t *testing.T) {
	whole := solid.Layer{Thickness: 1 * mm, Permittivity: 2, Resistivity: 1e12}
	for what, broken := range map[string]solid.Layer{
		"thickness":    {Permittivity: 2, Resistivity: 1e12},
		"permittivity": {Thickness: 1 * mm, Resistivity: 1e12},
		"resistivity":  {Thickness: 1 * mm, Permittivity: 2},
	} {
		_, err := solid.Wall{Layers: []solid.Layer{whole, broken}}.Settling()
		lacks(t, what, err, lack.Missing)
	}
	_, err := solid.Wall{}.Voltages(1, solid.Switched)
	lacks(t, "no layers", err, lack.Missing)
	_, err = solid.Wall{Layers: []solid.Layer{whole, whole, whole}}.Settling()
	lacks(t, "three time constants", err, lack.Outside)
	_, _, err = solid.Wall{Layers: []solid.Layer{whole}}.Withstand([]quantity.Field{0}, solid.Switched)
	lacks(t, "no strength", err, lack.Missing)
	noRho := solid.Layer{Thickness: 1 * mm, Permittivity: 2}
	if _, err := (solid.Wall{Layers: []solid.Layer{noRho}}).Voltages(1, solid.Switched); err != nil {
		t.Errorf("switched sharing needs no resistivity: %v", err)
	}
}
