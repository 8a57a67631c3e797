package field

import (
	"encoding/json"
	"fmt"
	"os"
	"strings"
	"sync"
	"testing"

	"kilovet/hv/profile"
	"kilovet/hv/quantity"
)

// The cases of testdata/cases.json are independent finite-element results and exact
// solutions, with their uncertainty; lengths in mm, potentials in kV, fields in
// kV/mm, capacitances in pF.

type refCase struct {
	ID, Group string
	Geometry  struct {
		Segments []refSegment
		Regions  []struct {
			Name string
			Er   float64
			Loop [][2]int
		}
	}
	Potentials map[string]float64 `json:"potentials_kV"`
	Results    struct {
		Exact       map[string]refValue
		Emax        map[string]refPeak
		Capacitance map[string]refValue `json:"capacitance_pF"`
		Samples     map[string]refSample
		Other       map[string]refValue
	}
	Exact map[string]any `json:"exact_values"`
}

type refSegment struct {
	Kind, Tag        string
	From, To, Center [2]float64
	CCW              bool
}

type refValue struct{ Value, Unc float64 }

type refPeak struct {
	Value, Unc float64
	At         [2]float64 `json:"at_rz"`
}

type refSample struct {
	At              [2]float64 `json:"at_rz"`
	V, Er, Ez, Emag refValue
}

func references(t testing.TB) []refCase {
	t.Helper()
	data, err := os.ReadFile("testdata/cases.json")
	if err != nil {
		t.Fatal(err)
	}
	var file struct{ Cases []refCase }
	if err := json.Unmarshal(data, &file); err != nil {
		t.Fatal(err)
	}
	return file.Cases
}

func reference(t testing.TB, id string) refCase {
	t.Helper()
	for _, c := range references(t) {
		if c.ID == id {
			return c
		}
	}
	t.Fatalf("no case %q", id)
	return refCase{}
}

func mm(x [2]float64) *profile.Point {
	return &profile.Point{R: quantity.Length(x[0] * 1e-3), Z: quantity.Length(x[1] * 1e-3)}
}

// stroke is a segment walked forward or back: where it starts, and its stroke.
func (s refSegment) stroke(back bool) (*profile.Point, profile.Stroke) {
	from, to := mm(s.From), mm(s.To)
	turn := profile.Straight
	if s.Kind == "arc" {
		turn = profile.Right
		if s.CCW != back {
			turn = profile.Left
		}
	}
	if back {
		from, to = to, from
	}
	st := profile.Stroke{To: to, Turn: turn}
	if turn != profile.Straight {
		st.Centre = mm(s.Center)
	}
	return from, st
}

func mustProfile(t testing.TB, name string, strokes ...profile.Stroke) profile.Profile {
	t.Helper()
	p, err := profile.New(name, strokes)
	if err != nil {
		t.Fatal(err)
	}
	return p
}

// arrangement is the case as a description would give it: every segment of an
// electrode an outline named by its tag, "plane" an earthed boundary.
func (c refCase) arrangement(t testing.TB) Arrangement {
	t.Helper()
	var a Arrangement
	number := map[string]int{}
	for i, s := range c.Geometry.Segments {
		name, _, _ := strings.Cut(s.Tag, ":")
		if name == "axis" || name == "interface" || name == "robin" {
			continue
		}
		from, st := s.stroke(false)
		p := mustProfile(t, fmt.Sprintf("%s#%d", s.Tag, i), profile.Stroke{From: from}, st)
		switch name {
		case "neumann":
			a.Boundaries = append(a.Boundaries, Boundary{Natural, p})
		case "plane":
			a.Boundaries = append(a.Boundaries, Boundary{Earth, p})
		default:
			if _, known := number[name]; !known {
				number[name] = len(a.Electrodes)
				a.Electrodes = append(a.Electrodes, Electrode{Name: name})
			}
			e := &a.Electrodes[number[name]]
			e.Profiles = append(e.Profiles, p)
		}
	}
	a.Dielectrics = c.dielectrics(t)
	return a
}

func (c refCase) dielectrics(t testing.TB) (list []Dielectric) {
	t.Helper()
	for _, r := range c.Geometry.Regions {
		if r.Er == 1 {
			continue
		}
		var strokes []profile.Stroke
		for _, l := range r.Loop {
			from, st := c.Geometry.Segments[l[0]].stroke(l[1] < 0)
			if strokes == nil {
				strokes = append(strokes, profile.Stroke{From: from})
			}
			strokes = append(strokes, st)
		}
		list = append(list, Dielectric{Name: r.Name, Permittivity: r.Er, Profile: mustProfile(t, r.Name, strokes...)})
	}
	return list
}

// potentials of the case in volts, for the electrodes it has.
func (c refCase) potentials(s *Solution) map[string]quantity.Voltage {
	out := map[string]quantity.Voltage{}
	for _, name := range s.Electrodes() {
		if name != Earthed {
			out[name] = quantity.Voltage(c.Potentials[name] * 1e3)
		}
	}
	return out
}

// solutions keeps the cases that several tests look at: a solution does not change.
var solutions sync.Map

func (c refCase) solution(t testing.TB) *Solution {
	t.Helper()
	if s, known := solutions.Load(c.ID); known {
		return s.(*Solution)
	}
	s, err := Solve(c.arrangement(t))
	if err != nil {
		t.Fatalf("%s: %v", c.ID, err)
	}
	solutions.Store(c.ID, s)
	return s
}

// solve is the case solved, for its potentials.
func (c refCase) solve(t testing.TB) *Field {
	t.Helper()
	s := c.solution(t)
	f, err := s.Under(c.potentials(s))
	if err != nil {
		t.Fatalf("%s: %v", c.ID, err)
	}
	return f
}
