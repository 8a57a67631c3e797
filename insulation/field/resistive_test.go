package field

import (
	"math"
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/profile"
	"kilovet/hv/quantity"
)

// Two layers between plates: the currents pass, so E goes with ρ; against the
// capacitive distribution, where it goes with 1/ε.
func TestLayersAtDirectVoltage(t *testing.T) {
	layer := func(name string, z0, z1, eps float64, rho quantity.Resistivity) Dielectric {
		return Dielectric{Name: name, Permittivity: eps, Resistivity: rho, Profile: path(t, name, 0, z0, 10, z0, 10, z1, 0, z1)}
	}
	a := Arrangement{
		Electrodes: []Electrode{{"low", []profile.Profile{path(t, "low", 0, 0, 10, 0)}}, {"high", []profile.Profile{path(t, "high", 0, 10, 10, 10)}}},
		Dielectrics: []Dielectric{
			layer("below", 0, 4, 9.4, 1e12), layer("above", 4, 10, 2, 3e12)},
		Boundaries: []Boundary{{Natural, path(t, "side", 10, 0, 10, 10)}},
	}
	s, err := SolveResistive(a)
	if err != nil {
		t.Fatal(err)
	}
	f, err := s.Under(map[string]quantity.Voltage{"low": 0, "high": 1000})
	if err != nil {
		t.Fatal(err)
	}
	density := 1000 / (4e-3*1e12 + 6e-3*3e12)
	within(t, "below", float64(reading(t, f, 5, 2).Strength()), density*1e12, 1e-6)
	within(t, "above", float64(reading(t, f, 5, 8).Strength()), density*3e12, 1e-6)
	i, err := f.Current("high")
	if err != nil {
		t.Fatal(err)
	}
	within(t, "current", float64(i), density*math.Pi*1e-4, 1e-6)
	if _, err := f.Capacitance("low", "high"); err == nil {
		t.Error("a resistive distribution has a capacitance")
	}
}

// A post between plates in a perfect insulator: the current flows straight, whatever
// the shape of the space around.
func TestPostInAnInsulator(t *testing.T) {
	c := reference(t, "d90_cylinder")
	a := c.arrangement(t)
	a.Dielectrics[0].Resistivity = 1e13
	s, err := SolveResistive(a)
	if err != nil {
		t.Fatal(err)
	}
	f, err := s.Under(map[string]quantity.Voltage{"cathode": -1000, "anode": 0})
	if err != nil {
		t.Fatal(err)
	}
	i, err := f.Current("anode")
	if err != nil {
		t.Fatal(err)
	}
	within(t, "current", float64(i), 1000/(1e13*10e-3/(math.Pi*1e-4)), 1e-5)
	within(t, "field outside", float64(reading(t, f, 20, 5).Strength()), 1e5, 1e-5)
}

// A frustum between plates: its resistance lies between that of the cylinder within
// and that of discs stacked without spreading.
func TestFrustumInAnInsulator(t *testing.T) {
	a := reference(t, "d45_frustum").arrangement(t)
	a.Dielectrics[0].Resistivity = 1e13
	s, err := SolveResistive(a)
	if err != nil {
		t.Fatal(err)
	}
	f, err := s.Under(map[string]quantity.Voltage{"cathode": -1000, "anode": 0})
	if err != nil {
		t.Fatal(err)
	}
	i, err := f.Current("anode")
	if err != nil {
		t.Fatal(err)
	}
	resistance := 1000 / float64(i)
	discs := 1e13 * 10e-3 / (math.Pi * 10e-3 * 20e-3) // ∫ ρ dz/π r², no radial resistance
	cylinder := 1e13 * 10e-3 / (math.Pi * 1e-4)
	if resistance < discs || resistance > cylinder {
		t.Errorf("resistance %v, not between %v and %v", resistance, discs, cylinder)
	}
}

func TestResistiveLacks(t *testing.T) {
	a := cell(t)
	if _, err := SolveResistive(a); lack.Of(err) == nil || lack.Of(err).Kind != lack.Missing {
		t.Errorf("nothing conducts: %v", err)
	}
	d := sleeve(t, "ring", 4, 5, 7, 9)
	a.Dielectrics = []Dielectric{d}
	if _, err := SolveResistive(a); lack.Of(err) == nil || lack.Of(err).Kind != lack.Missing {
		t.Errorf("no resistivity: %v", err)
	}
	a.Dielectrics[0].Resistivity = 1e12
	if _, err := SolveResistive(a); lack.Of(err) == nil || lack.Of(err).Kind != lack.Outside {
		t.Errorf("a floating ring: %v", err)
	}
	a.Resistivity = 1e15
	if _, err := SolveResistive(a); err != nil {
		t.Errorf("a ring in a medium that conducts: %v", err)
	}
}
