package field

import (
	"testing"

	"kilovet/hv/profile"
	"kilovet/hv/quantity"
)

// The same figure drawn in other ways has the same field.
func TestDrawnOtherwise(t *testing.T) {
	ball := ballAt(t, "ball", 10, 2)
	inBox := func(a Arrangement) *Field {
		t.Helper()
		v := map[string]quantity.Voltage{"ball": 1000}
		for _, e := range a.Electrodes[1:] {
			v[e.Name] = 0
		}
		return under(t, a, v)
	}
	box := path(t, "box", 0, 0, 100, 0, 100, 150, 0, 150)
	pieces := []profile.Profile{path(t, "floor", 0, 0, 100, 0), path(t, "wall", 100, 150, 100, 0), path(t, "roof", 0, 150, 100, 150)}
	thick := path(t, "thick", 0, 0, 100, 0, 100, 150, 0, 150, 0, 160, 110, 160, 110, -10, 0, -10)
	cut := mustProfile(t, "ball", profile.Stroke{From: mm([2]float64{0, 2})},
		profile.Stroke{To: mm([2]float64{10, 12}), Centre: mm([2]float64{0, 12}), Turn: profile.Left},
		profile.Stroke{To: mm([2]float64{0, 22}), Centre: mm([2]float64{0, 12}), Turn: profile.Left},
		profile.Stroke{To: mm([2]float64{0, 2})})
	for name, a := range map[string]Arrangement{
		"an electrode":         {Electrodes: []Electrode{ball, {"box", []profile.Profile{box}}}},
		"in pieces":            {Electrodes: []Electrode{ball, {"box", pieces}}},
		"with a thickness":     {Electrodes: []Electrode{ball, {"box", []profile.Profile{thick}}}},
		"an earthed boundary":  {Electrodes: []Electrode{ball}, Boundaries: []Boundary{{Earth, box}}},
		"a closed ball":        {Electrodes: []Electrode{{"ball", []profile.Profile{cut}}, {"box", []profile.Profile{box}}}},
		"two names that touch": {Electrodes: []Electrode{ball, {"floor", pieces[:1]}, {"walls", pieces[1:]}}},
	} {
		f := inBox(a)
		p, err := f.Peak("ball")
		if err != nil {
			t.Fatalf("%s: %v", name, err)
		}
		within(t, name+": peak", float64(p.Strength)/kVmm, 0.568537021, 2e-4)
		c, err := f.Capacitance("ball", "ball")
		if err != nil {
			t.Fatal(err)
		}
		within(t, name+": capacitance", float64(c)/pF, 2.07854141, 1e-6)
		inside, err := f.At(*mm([2]float64{1, 12}))
		if err != nil || inside[0].Strength() != 0 || inside[0].Potential != 1000 || inside[0].Body != "ball" {
			t.Errorf("%s: inside the ball %v, %v", name, inside, err)
		}
		if _, err := f.At(*mm([2]float64{300, 12})); err == nil {
			t.Errorf("%s: a point outside the box has a reading", name)
		}
	}
}

// A plane drawn as an electrode three metres wide is as good as an infinite one.
func TestWidePlate(t *testing.T) {
	for id, h := range map[string]float64{"x_sphere_plane_h/r=1.02": 10.2, "x_sphere_plane_h/r=5": 50} {
		c := reference(t, id)
		a := Arrangement{Electrodes: []Electrode{ballAt(t, "ball", 10, h-10), {"plate", []profile.Profile{path(t, "plate", 0, 0, 3000, 0)}}}}
		f := under(t, a, map[string]quantity.Voltage{"ball": 1000, "plate": 0})
		p, err := f.Peak("ball")
		if err != nil {
			t.Fatal(err)
		}
		within(t, id, float64(p.Strength)/kVmm, c.Results.Exact["Emax"].Value, exactField)
		got, _ := f.Capacitance("ball", "ball")
		within(t, id, float64(got)/pF, c.Results.Exact["C"].Value, 1e-4)
	}
}

// Half a feedthrough in open space, its plane of symmetry drawn in pieces, against
// the whole.
func TestHalfInOpenSpace(t *testing.T) {
	pin := func(sign float64) profile.Profile {
		return path(t, "pin", 3, 0, 3, 40*sign, 0, 40*sign)
	}
	plate := path(t, "plate", 10, 0, 10, 3, 40, 3, 40, 0)
	whole := path(t, "plate", 10, -3, 10, 3, 40, 3, 40, -3, 10, -3)
	half := under(t, Arrangement{
		Electrodes: []Electrode{{"pin", []profile.Profile{pin(1)}}, {"plate", []profile.Profile{plate}}},
		Boundaries: []Boundary{{Natural, path(t, "inner", 3, 0, 10, 0)}, {Natural, path(t, "outer", 40, 0, 90, 0)}},
	}, map[string]quantity.Voltage{"pin": 1000, "plate": 0})
	full := under(t, Arrangement{
		Electrodes: []Electrode{{"pin", []profile.Profile{pin(1), pin(-1)}}, {"plate", []profile.Profile{whole}}},
	}, map[string]quantity.Voltage{"pin": 1000, "plate": 0})
	a, _ := half.Capacitance("pin", "plate")
	b, _ := full.Capacitance("pin", "plate")
	within(t, "capacitance", 2*float64(a), float64(b), 1e-5)
	within(t, "field in the hole", float64(reading(t, half, 6, 0).Strength()), float64(reading(t, full, 6, 0).Strength()), 1e-4)
	within(t, "field beside the plate", float64(reading(t, half, 45, 1).Strength()), float64(reading(t, full, 45, 1).Strength()), 1e-3)
}
