package field

import (
	"math"
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/profile"
	"kilovet/hv/quantity"
)

// Another permittivity on the same outlines gives what a fresh solution gives, from the
// integrals of the first.
func TestOtherPermittivitiesReuseTheIntegrals(t *testing.T) {
	for _, id := range []string{"c1_annulus0.5", "c3_outer_gap0.1", "d45_frustum"} {
		ref := reference(t, id)
		first := ref.solution(t)
		body := first.Dielectrics[0].Name
		second, err := first.With(map[string]float64{body: 4})
		if err != nil {
			t.Fatal(err)
		}
		if first.Dielectrics[0].Permittivity != 9.4 {
			t.Errorf("%s: the first solution was touched", id)
		}
		a := ref.arrangement(t)
		a.Dielectrics[0].Permittivity = 4
		fresh, err := Solve(a)
		if err != nil {
			t.Fatal(err)
		}
		if 3*second.Work().Blocks > 2*fresh.Work().Blocks || second.Work().Factorisations > 4 {
			t.Errorf("%s: took %+v, afresh %+v", id, second.Work(), fresh.Work())
		}
		for _, name := range first.Electrodes() {
			c, err1 := second.Capacitance(name, name)
			want, err2 := fresh.Capacitance(name, name)
			if err1 != nil || err2 != nil {
				t.Fatal(err1, err2)
			}
			within(t, id+" capacitance of "+name, float64(c), float64(want), 1e-5)
		}
	}
}

func TestOtherPermittivitiesOfAnUnknownBody(t *testing.T) {
	if _, err := reference(t, "c1_tight").solution(t).With(map[string]float64{"nose": 3}); lack.Of(err) == nil {
		t.Errorf("got %v", err)
	}
}

// twoLayers are two discs between plates, one of which conducts ten times as well.
func twoLayers(t testing.TB) (a Arrangement, seconds float64) {
	layer := func(name string, z0, z1, eps float64, rho quantity.Resistivity) Dielectric {
		return Dielectric{Name: name, Permittivity: eps, Resistivity: rho, Profile: path(t, name, 0, z0, 10, z0, 10, z1, 0, z1)}
	}
	a = Arrangement{
		Electrodes:  []Electrode{{"low", []profile.Profile{path(t, "low", 0, 0, 10, 0)}}, {"high", []profile.Profile{path(t, "high", 0, 10, 10, 10)}}},
		Dielectrics: []Dielectric{layer("below", 0, 4, 9.4, 1e12), layer("above", 4, 10, 2, 1e13)},
		Boundaries:  []Boundary{{Natural, path(t, "side", 10, 0, 10, 10)}},
	}
	// τ = (ε₁ d₂ + ε₂ d₁)/(σ₁ d₂ + σ₂ d₁), Maxwell and Wagner.
	return a, vacuumPermittivity * (9.4*6 + 2*4) / (1e-12*6 + 1e-13*4)
}

// Two layers pass from one distribution to the other with the time constant of Maxwell
// and Wagner.
func TestPassageOfTwoLayers(t *testing.T) {
	a, tau := twoLayers(t)
	s, err := Solve(a)
	if err != nil {
		t.Fatal(err)
	}
	volts := map[string]quantity.Voltage{"low": 0, "high": 1000}
	settled, err := s.Settled()
	if err != nil {
		t.Fatal(err)
	}
	alone, err := SolveResistive(a)
	if err != nil {
		t.Fatal(err)
	}
	at := func(s *Solution) float64 {
		f, err := s.Under(volts)
		if err != nil {
			t.Fatal(err)
		}
		return float64(reading(t, f, 5, 8).Strength())
	}
	within(t, "settled, reused", at(settled), at(alone), 1e-6)
	for _, part := range []float64{0.01, 0.3, 1, 4, 200} {
		p, err := s.Passing(quantity.Time(part * tau))
		if err != nil {
			t.Fatal(err)
		}
		want := at(settled) + (at(s)-at(settled))/(1+part) // transform of an exponential
		within(t, "on the way", at(p), want, 1e-6)
	}
	f, err := s.Under(volts)
	if err != nil {
		t.Fatal(err)
	}
	peak, err := f.PeakFacing("high", "above", 0)
	if err != nil {
		t.Fatal(err)
	}
	time, err := f.RelaxationTime(settled, peak)
	if err != nil {
		t.Fatal(err)
	}
	within(t, "time constant", float64(time), tau, 1e-3)
}

// A sleeve around a conductor in a perfect insulator: the annulus is left with the whole
// voltage in the time of the sleeve's resistance and the capacitances of both layers.
func TestPassageOfASleeve(t *testing.T) {
	const a, b, c, eps, rho = 2e-3, 5e-3, 10e-3, 9.4, 1e12
	arr := cell(t)
	arr.Dielectrics = []Dielectric{{Name: "sleeve", Permittivity: eps, Resistivity: rho, Profile: ringOf(t, "sleeve", 5, 0, 10, 20)}}
	s, err := Solve(arr)
	if err != nil {
		t.Fatal(err)
	}
	settled, err := s.Settled()
	if err != nil {
		t.Fatal(err)
	}
	volts := map[string]quantity.Voltage{"pin": 1000, "wall": 0}
	f, _ := s.Under(volts)
	peak, err := f.Peak("pin")
	if err != nil {
		t.Fatal(err)
	}
	got, err := f.RelaxationTime(settled, peak)
	if err != nil {
		t.Fatal(err)
	}
	inner, outer := 1/math.Log(b/a), eps/math.Log(c/b) // capacitances of a length over 2πε₀
	within(t, "time constant", float64(got), rho*vacuumPermittivity*math.Log(c/b)*(inner+outer), 1e-3)
	g, _ := settled.Under(volts)
	after, err := g.Peak("pin")
	if err != nil {
		t.Fatal(err)
	}
	within(t, "field at last", float64(after.Strength), 1000/a/math.Log(b/a), 1e-4)
}

func TestPassageLacks(t *testing.T) {
	s := reference(t, "c1_annulus0.5").solution(t)
	if _, err := s.Settled(); lack.Of(err) == nil {
		t.Errorf("without resistivities: %v", err)
	}
	if _, err := s.Passing(1); lack.Of(err) == nil {
		t.Errorf("without resistivities: %v", err)
	}
	a, _ := twoLayers(t)
	s, err := Solve(a)
	if err != nil {
		t.Fatal(err)
	}
	for _, over := range []quantity.Time{0, -1, quantity.Time(math.NaN())} {
		if _, err := s.Passing(over); lack.Of(err) == nil {
			t.Errorf("over %v: %v", over, err)
		}
	}
}
