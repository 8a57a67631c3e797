package field

import (
	"errors"
	"strings"
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/profile"
	"kilovet/hv/quantity"
)

// cell is a coaxial cell, 2 to 10 mm, 20 mm long, with natural ends.
func cell(t testing.TB) Arrangement {
	return Arrangement{
		Electrodes: []Electrode{
			{"pin", []profile.Profile{path(t, "pin", 2, 0, 2, 20)}},
			{"wall", []profile.Profile{path(t, "wall", 10, 0, 10, 20)}},
		},
		Boundaries: []Boundary{
			{Natural, path(t, "foot", 2, 0, 10, 0)},
			{Natural, path(t, "top", 2, 20, 10, 20)},
		},
	}
}

func ringOf(t testing.TB, name string, r0, z0, r1, z1 float64) profile.Profile {
	return path(t, name, r0, z0, r1, z0, r1, z1, r0, z1, r0, z0)
}

func sleeve(t testing.TB, name string, r0, z0, r1, z1 float64) Dielectric {
	return Dielectric{Name: name, Permittivity: 4, Profile: ringOf(t, name, r0, z0, r1, z1)}
}

func TestFaultsOfArrangements(t *testing.T) {
	for _, c := range []struct {
		name    string
		spoil   func(a *Arrangement)
		profile string
		stroke  int
		says    string
	}{
		{"dielectrics overlap", func(a *Arrangement) {
			a.Dielectrics = []Dielectric{sleeve(t, "one", 4, 2, 7, 9), sleeve(t, "two", 5, 5, 8, 12)}
		}, "two", 1, "overlaps one"},
		{"dielectric in the pin", func(a *Arrangement) {
			a.Dielectrics = []Dielectric{sleeve(t, "one", 1, 2, 7, 9)}
		}, "one", 1, "sticks out of it"},
		{"dielectric outside", func(a *Arrangement) {
			a.Dielectrics = []Dielectric{sleeve(t, "one", 11, 2, 12, 9)}
		}, "one", 1, "sticks out of it"},
		{"dielectric open", func(a *Arrangement) {
			a.Dielectrics = []Dielectric{{Name: "one", Permittivity: 4, Profile: path(t, "one", 4, 2, 7, 2, 7, 9)}}
		}, "one", 2, "must be closed"},
		{"boundary does not close", func(a *Arrangement) {
			a.Boundaries[1].Profile = path(t, "top", 2, 20, 9, 20)
		}, "top", 1, "meets nothing"},
		{"dielectric partly in the pin", func(a *Arrangement) {
			a.Electrodes[0].Profiles[0] = ringOf(t, "pin", 2, 5, 4, 10)
			a.Boundaries[0].Profile, a.Boundaries[1].Profile = path(t, "foot", 0, 0, 10, 0), path(t, "top", 0, 20, 10, 20)
			a.Dielectrics = []Dielectric{sleeve(t, "one", 3, 8, 7, 12)}
		}, "one", 0, "a part of the dielectric lies inside an electrode"},
		{"electrode out of sight", func(a *Arrangement) {
			a.Electrodes = append(a.Electrodes, Electrode{"lid", []profile.Profile{path(t, "lid", 0, 30, 8, 30)}})
		}, "lid", 0, "borders no part of the model"},
		{"electrode on the axis", func(a *Arrangement) {
			a.Electrodes[0].Profiles[0] = path(t, "pin", 0, 5, 0, 10)
			a.Boundaries[0].Profile, a.Boundaries[1].Profile = path(t, "foot", 0, 0, 10, 0), path(t, "top", 0, 20, 10, 20)
		}, "pin", 1, "needs a radius"},
		{"outlines almost meet", func(a *Arrangement) {
			a.Dielectrics = []Dielectric{sleeve(t, "one", 2.0001, 2, 7, 9)}
		}, "pin", 1, "let them meet, or part them"},
		{"name twice", func(a *Arrangement) {
			a.Electrodes[1].Name = "pin"
		}, "pin", 0, "name of its own"},
		{"permittivity", func(a *Arrangement) {
			d := sleeve(t, "one", 4, 2, 7, 9)
			d.Permittivity = 0.5
			a.Dielectrics = []Dielectric{d}
		}, "one", 0, "at least 1"},
		{"one electrode only", func(a *Arrangement) {
			a.Electrodes = a.Electrodes[:1]
			a.Boundaries = append(a.Boundaries, Boundary{Natural, path(t, "side", 10, 0, 10, 20)})
		}, "pin", 0, "nowhere is there a field"},
		{"no outline", func(a *Arrangement) {
			a.Electrodes[0].Profiles = nil
		}, "pin", 0, "has no outline"},
		{"bare dielectric", func(a *Arrangement) {
			a.Dielectrics = []Dielectric{sleeve(t, "one", 4, 0, 7, 9)}
			a.Boundaries[0].Profile = path(t, "foot", 2, 0, 4, 0)
			a.Boundaries = append(a.Boundaries, Boundary{Natural, path(t, "foot2", 7, 0, 10, 0)})
		}, "one", 1, "a boundary is wanting"},
	} {
		a := cell(t)
		c.spoil(&a)
		_, err := Solve(a)
		var faults profile.Faults
		if !errors.As(err, &faults) {
			t.Errorf("%s: got %v", c.name, err)
			continue
		}
		if f := faults[0]; f.Profile != c.profile || f.Stroke != c.stroke || !strings.Contains(f.What, c.says) {
			t.Errorf("%s: got %v, want %q, stroke %d, %q", c.name, f, c.profile, c.stroke, c.says)
		}
	}
}

// Electrodes that touch are one conductor, as long as their potentials are the same.
func TestTouchingElectrodes(t *testing.T) {
	a := cell(t)
	a.Electrodes[1].Profiles[0] = path(t, "wall", 10, 0, 10, 12)
	a.Electrodes = append(a.Electrodes, Electrode{"lid", []profile.Profile{path(t, "lid", 10, 12, 10, 20)}})
	s, err := Solve(a)
	if err != nil {
		t.Fatal(err)
	}
	if _, err := s.Under(map[string]quantity.Voltage{"pin": 100, "wall": 0, "lid": 0}); err != nil {
		t.Error(err)
	}
	_, err = s.Under(map[string]quantity.Voltage{"pin": 100, "wall": 0, "lid": 1})
	if err == nil || !strings.Contains(err.Error(), "lid touches wall") || !strings.Contains(err.Error(), "z = 12 mm") {
		t.Errorf("different potentials: %v", err)
	}
	one, err1 := s.Capacitance("wall", "pin")
	two, err2 := s.Capacitance("lid", "pin")
	if err1 != nil || err2 != nil || one != two {
		t.Errorf("touching electrodes count as one: %v, %v", one, two)
	}
}

func TestPotentialsAreAsked(t *testing.T) {
	s, err := Solve(cell(t))
	if err != nil {
		t.Fatal(err)
	}
	if _, err := s.Under(map[string]quantity.Voltage{"pin": 1}); lack.Of(err) == nil || lack.Of(err).Kind != lack.Missing {
		t.Errorf("a potential is missing: %v", err)
	}
	if _, err := s.Under(map[string]quantity.Voltage{"pin": 1, "wall": 0, "nose": 0}); lack.Of(err) == nil {
		t.Errorf("an unknown electrode: %v", err)
	}
}

// Sharp edges are named and judged at a distance.
func TestSharpEdgeHasNoPeak(t *testing.T) {
	a := cell(t)
	a.Electrodes[1].Profiles[0] = path(t, "wall", 10, 0, 10, 8, 8, 8, 8, 12, 10, 12, 10, 20)
	f := under(t, a, map[string]quantity.Voltage{"pin": 0, "wall": 1000})
	_, err := f.Peak("wall")
	if l := lack.Of(err); l == nil || l.Kind != lack.Outside || !strings.Contains(l.Why, "-0.333") {
		t.Errorf("got %v", err)
	}
	near, err := f.PeakBeyond("wall", 0.005e-3)
	if err != nil {
		t.Fatal(err)
	}
	far, err := f.PeakBeyond("wall", 0.01e-3)
	if err != nil {
		t.Fatal(err)
	}
	within(t, "ratio of the field at twice the distance", float64(near.Strength/far.Strength), 1.2599, 0.02)
	if _, err := f.Peak("pin"); err != nil {
		t.Errorf("the pin is smooth: %v", err)
	}
	sharp := 0
	for _, e := range f.Edges() {
		if e.Sharp {
			sharp++
			within(t, "exponent of a square edge", e.Exponent, -1.0/3, 1e-6)
		}
	}
	if sharp != 2 {
		t.Errorf("%d sharp edges, want 2", sharp)
	}
}

// What the work limit does not allow is a lack, not a number.
func TestWorkLimit(t *testing.T) {
	a := cell(t)
	var strokes []profile.Stroke
	strokes = append(strokes, profile.Stroke{From: mm([2]float64{10, 0})})
	for k := range 300 { // a comb with hundreds of edges
		z := float64(k) * 20 / 300
		strokes = append(strokes, profile.Stroke{To: mm([2]float64{9.9, z + 0.02})}, profile.Stroke{To: mm([2]float64{10, z + 20.0/300})})
	}
	a.Electrodes[1].Profiles[0] = mustProfile(t, "wall", strokes...)
	_, err := Solve(a)
	if l := lack.Of(err); l == nil || l.Kind != lack.NotReached {
		t.Errorf("got %v", err)
	}
}
