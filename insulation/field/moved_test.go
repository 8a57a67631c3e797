package field

import (
	"math"
	"testing"

	"kilovet/hv/profile"
	"kilovet/hv/quantity"
)

// balls is a ball in a ball, radii in mm.
func balls(t testing.TB, inner, outer float64) Arrangement {
	shell := func(name string, radius float64) Electrode {
		return Electrode{name, []profile.Profile{mustProfile(t, name, profile.Stroke{From: mm([2]float64{0, -radius})},
			profile.Stroke{To: mm([2]float64{0, radius}), Centre: mm([2]float64{0, 0}), Turn: profile.Left})}}
	}
	return Arrangement{Electrodes: []Electrode{shell("inner", inner), shell("outer", outer)}}
}

func peakOf(t testing.TB, s *Solution, name string, potentials map[string]quantity.Voltage) float64 {
	t.Helper()
	f, err := s.Under(potentials)
	if err != nil {
		t.Fatal(err)
	}
	p, err := f.Peak(name)
	if err != nil {
		t.Fatal(err)
	}
	return float64(p.Strength)
}

// E = V b/(a (b − a)) between concentric spheres: its power of a is −(b − 2a)/(b − a).
func TestMovedLengthsGiveThePower(t *testing.T) {
	const a, b, step = 3.0, 12.0, 1.02
	volts := map[string]quantity.Voltage{"inner": 1000, "outer": 0}
	s, err := Solve(balls(t, a, b))
	if err != nil {
		t.Fatal(err)
	}
	m, err := s.Moved(balls(t, a*step, b), Fine)
	if err != nil {
		t.Fatal(err)
	}
	got := math.Log(peakOf(t, m, "inner", volts)/peakOf(t, s, "inner", volts)) / math.Log(step)
	within(t, "power", got, math.Log((b-a)/(step*(b-a*step)))/math.Log(step), 1e-5)
	if m.Work().Factorisations != 1 {
		t.Errorf("%+v", m.Work())
	}
}

// What has moved far is refined again; where nothing has moved nothing is worked out anew,
// and walls that have come are divided from the first.
func TestMovedIsWhatIsSolved(t *testing.T) {
	volts := map[string]quantity.Voltage{"inner": 1000, "outer": 0}
	s, err := Solve(balls(t, 3, 12))
	if err != nil {
		t.Fatal(err)
	}
	far, err := s.MovedFar(balls(t, 11.7, 12), Rough)
	if err != nil {
		t.Fatal(err)
	}
	within(t, "peak in a narrow gap", peakOf(t, far, "inner", volts), 1e3*12/(11.7e-3*0.3), 5e-3)
	still, err := s.Moved(balls(t, 3, 12), Fine)
	if err != nil {
		t.Fatal(err)
	}
	if still.Work().Blocks != 0 {
		t.Errorf("%d blocks for what has not moved", still.Work().Blocks)
	}
	with := balls(t, 3, 12)
	with.Dielectrics = []Dielectric{{Name: "ring", Permittivity: 9.4, Profile: ringOf(t, "ring", 5, -2, 7, 2)}}
	other, err := s.Moved(with, Fine)
	if err != nil {
		t.Fatal(err)
	}
	fresh, err := Solve(with)
	if err != nil {
		t.Fatal(err)
	}
	within(t, "peak beside a ring", peakOf(t, other, "inner", volts), peakOf(t, fresh, "inner", volts), 1e-6)
}

// The outside of a sleeve: moved on the same division its peak is that of a fresh solution.
func TestMovedSleeve(t *testing.T) {
	c := reference(t, "c1_annulus0.5")
	s := c.solution(t)
	a := c.arrangement(t)
	widen := func(p *profile.Profile) {
		for i := range p.Segments {
			for _, x := range []*profile.Point{&p.Segments[i].From, &p.Segments[i].To} {
				if x.R > 6.9e-3 && x.R < 7.1e-3 {
					x.R *= 1.01
				}
			}
		}
	}
	widen(&a.Dielectrics[0].Profile)
	for i := range a.Boundaries {
		widen(&a.Boundaries[i].Profile)
	}
	m, err := s.Moved(a, Fine)
	if err != nil {
		t.Fatal(err)
	}
	fresh, err := Solve(a)
	if err != nil {
		t.Fatal(err)
	}
	for _, name := range []string{"pin", "ground"} {
		within(t, "peak on "+name, peakOf(t, m, name, c.potentials(m)), peakOf(t, fresh, name, c.potentials(m)), 2e-4)
	}
	if m.Work().Factorisations != 1 || m.Work().Blocks > 2*m.Work().Panels*m.Work().Panels/3 {
		t.Errorf("%+v", m.Work())
	}
}
