package field

import (
	"math"
	"math/cmplx"
	"testing"

	"kilovet/hv/profile"
	"kilovet/hv/quantity"
)

// Charges add up to nothing in a closed figure, and C is symmetric.
func TestGaussAndReciprocity(t *testing.T) {
	for _, id := range []string{"f1_gun", "c1_annulus0.5", "c3_outer_gap0.1", "e_disc_rim1"} {
		f := reference(t, id).solve(t)
		names := f.Electrodes()
		for _, i := range names {
			sum, self := 0.0, 0.0
			for _, j := range names {
				ij, _ := f.Capacitance(i, j)
				ji, _ := f.Capacitance(j, i)
				scale, _ := f.Capacitance(j, j)
				if math.Abs(float64(ij-ji)) > 1e-6*float64(scale) {
					t.Errorf("%s: C(%s, %s) = %v, but %v the other way", id, i, j, ij, ji)
				}
				sum += float64(ij)
				if i == j {
					self = float64(ij)
				}
			}
			if math.Abs(sum) > 1e-6*self {
				t.Errorf("%s: row %s adds up to %.1e of its own", id, i, sum/self)
			}
		}
	}
}

// The flux through a sphere drawn in the gap is the charge on the ball within.
func TestGaussThroughTheGap(t *testing.T) {
	f := reference(t, "z_sphere_box_gap40").solve(t)
	const n = 400
	flux, centre, radius := 0.0, 50e-3, 22e-3
	for k := range n {
		theta := math.Pi * (float64(k) + 0.5) / n
		sin, cos := math.Sincos(theta)
		list, err := f.At(profile.Point{R: quantity.Length(radius * sin), Z: quantity.Length(centre + radius*cos)})
		if err != nil {
			t.Fatal(err)
		}
		normal := float64(list[0].Radial)*sin + float64(list[0].Axial)*cos
		flux += normal * 2 * math.Pi * radius * sin * radius * math.Pi / n
	}
	q, err := f.Charge("sphere")
	if err != nil {
		t.Fatal(err)
	}
	within(t, "flux", flux*vacuumPermittivity, float64(q), 1e-4)
}

// The energy of the field, summed over the volume, is that of the charges.
func TestEnergyInTheVolume(t *testing.T) {
	a := cell(t)
	a.Dielectrics = []Dielectric{{Name: "core", Permittivity: 5, Profile: ringOf(t, "core", 2, 0, 5, 20)}}
	f := under(t, a, map[string]quantity.Voltage{"pin": 1000, "wall": 0})
	sum := 0.0
	for _, part := range [][3]float64{{2, 5, 5}, {5, 10, 1}} {
		const n = 60
		for k := range n {
			r := part[0] + (part[1]-part[0])*(float64(k)+0.5)/n
			e := float64(reading(t, f, r, 7).Strength())
			sum += vacuumPermittivity * part[2] / 2 * e * e * 2 * math.Pi * r * 1e-3 * 20e-3 * (part[1] - part[0]) * 1e-3 / n
		}
	}
	energy, err := f.Energy()
	if err != nil {
		t.Fatal(err)
	}
	within(t, "energy", sum, float64(energy), 5e-4)
}

// stretched is an arrangement with all lengths times a factor, and turned upside
// down if the factor for z is negative.
func stretched(a Arrangement, r, z float64) Arrangement {
	point := func(p profile.Point) profile.Point {
		return profile.Point{R: p.R * quantity.Length(r), Z: p.Z * quantity.Length(z)}
	}
	shape := func(p profile.Profile) profile.Profile {
		out := profile.Profile{Name: p.Name}
		for _, s := range p.Segments {
			n := profile.Segment{From: point(s.From), To: point(s.To), Centre: point(s.Centre), Turn: s.Turn}
			if z < 0 && s.Turn != profile.Straight {
				n.Turn = 3 - s.Turn
			}
			out.Segments = append(out.Segments, n)
		}
		return out
	}
	b := Arrangement{Permittivity: a.Permittivity}
	for _, e := range a.Electrodes {
		n := Electrode{Name: e.Name}
		for _, p := range e.Profiles {
			n.Profiles = append(n.Profiles, shape(p))
		}
		b.Electrodes = append(b.Electrodes, n)
	}
	for _, d := range a.Dielectrics {
		d.Profile = shape(d.Profile)
		b.Dielectrics = append(b.Dielectrics, d)
	}
	for _, x := range a.Boundaries {
		b.Boundaries = append(b.Boundaries, Boundary{x.Kind, shape(x.Profile)})
	}
	return b
}

func TestScalingAndMirroring(t *testing.T) {
	c := reference(t, "c1_tight")
	f := c.solve(t)
	p, err := f.Peak("ground")
	if err != nil {
		t.Fatal(err)
	}
	charge, _ := f.Charge("pin")
	for name, k := range map[string][2]float64{"thousand times": {1000, 1000}, "a tenth": {0.1, 0.1}, "upside down": {1, -1}} {
		s, err := Solve(stretched(c.arrangement(t), k[0], k[1]))
		if err != nil {
			t.Fatal(err)
		}
		g, err := s.Under(map[string]quantity.Voltage{"pin": 3000, "ground": 0})
		if err != nil {
			t.Fatal(err)
		}
		q, err := g.Peak("ground")
		if err != nil {
			t.Fatal(err)
		}
		within(t, name+": peak", float64(q.Strength), float64(p.Strength)*3/k[0], 1e-6)
		within(t, name+": r of peak", float64(q.At.R), float64(p.At.R)*k[0], 1e-4)
		other, _ := g.Charge("pin")
		within(t, name+": charge", float64(other), float64(charge)*3*k[0], 1e-8)
		if s.Work() != f.Work() {
			t.Errorf("%s: work %v, was %v", name, s.Work(), f.Work())
		}
	}
}

func TestSuperposition(t *testing.T) {
	s := reference(t, "f3_gun").solution(t)
	whole, err := s.Under(map[string]quantity.Voltage{"control": -950, "tip": -1000, "anode": 120})
	if err != nil {
		t.Fatal(err)
	}
	for _, at := range [][2]float64{{0, 2}, {0.7, -0.4}, {3, 4.9}} {
		var sum complex128
		for name, v := range map[string]quantity.Voltage{"control": -950, "tip": -1000, "anode": 120} {
			f, err := s.Under(alone(s, name, v))
			if err != nil {
				t.Fatal(err)
			}
			r := reading(t, f, at[0], at[1])
			sum += complex(float64(r.Radial), float64(r.Axial))
		}
		r := reading(t, whole, at[0], at[1])
		if cmplx.Abs(sum-complex(float64(r.Radial), float64(r.Axial))) > 1e-9*cmplx.Abs(sum) {
			t.Errorf("at %v: %v, not %v", at, sum, r)
		}
	}
	if s.Work().Factorisations > rounds {
		t.Errorf("%d factorisations for four conditions", s.Work().Factorisations)
	}
}

// Half a figure with a plane of symmetry is the whole: two balls of one potential,
// and two of opposite ones, in open space.
func TestHalvesOfFigures(t *testing.T) {
	arcOf := func(name string, z float64) profile.Profile {
		return mustProfile(t, name, profile.Stroke{From: mm([2]float64{0, z - 5})},
			profile.Stroke{To: mm([2]float64{0, z + 5}), Centre: mm([2]float64{0, z}), Turn: profile.Left})
	}
	upper := Electrode{"upper", []profile.Profile{arcOf("upper", 8)}}
	lower := Electrode{"lower", []profile.Profile{arcOf("lower", -8)}}
	for kind, opposite := range map[BoundaryKind]quantity.Voltage{Natural: 1000, Earth: -1000} {
		whole := under(t, Arrangement{Electrodes: []Electrode{upper, lower}}, map[string]quantity.Voltage{"upper": 1000, "lower": opposite})
		half := under(t, Arrangement{Electrodes: []Electrode{upper}, Boundaries: []Boundary{{kind, path(t, "plane", 0, 0, 50, 0)}}},
			map[string]quantity.Voltage{"upper": 1000})
		p, err := whole.Peak("upper")
		if err != nil {
			t.Fatal(err)
		}
		q, err := half.Peak("upper")
		if err != nil {
			t.Fatal(err)
		}
		within(t, "peak", float64(q.Strength), float64(p.Strength), 2e-4)
		a, b := reading(t, whole, 3, 1), reading(t, half, 3, 1)
		within(t, "potential", float64(b.Potential), float64(a.Potential), 1e-5)
		within(t, "field", float64(b.Strength()), float64(a.Strength()), 1e-5)
		if _, err := half.At(*mm([2]float64{3, -1})); err == nil {
			t.Error("a point beyond the plane has a reading")
		}
		if kind == Earth {
			plane, err := half.Peak(Earthed)
			if err != nil {
				t.Fatal(err)
			}
			within(t, "peak on the plane", float64(plane.Strength), float64(reading(t, whole, 0, 0).Strength()), 1e-5)
			on, _ := half.Charge(Earthed)
			ball, _ := half.Charge("upper")
			within(t, "charge of the plane", float64(on), -float64(ball), 1e-9)
		}
	}
}

// A model that ends at natural boundaries and one that goes on beyond them by its own
// mirror image agree.
func TestNaturalBoundaryIsSymmetry(t *testing.T) {
	half := reference(t, "b1_feedthrough").solve(t)
	c, _ := half.Capacitance("pin", "pin")
	edge := func(name string, sign float64) profile.Profile {
		turn := profile.Right
		if sign < 0 {
			turn = profile.Left
		}
		return mustProfile(t, name, profile.Stroke{From: mm([2]float64{10, 0})},
			profile.Stroke{To: mm([2]float64{13, 3 * sign}), Centre: mm([2]float64{13, 0}), Turn: turn},
			profile.Stroke{To: mm([2]float64{60, 3 * sign})}, profile.Stroke{To: mm([2]float64{60, 80 * sign})})
	}
	whole := under(t, Arrangement{
		Electrodes: []Electrode{{"pin", []profile.Profile{path(t, "pin", 3, -80, 3, 80)}},
			{"ground", []profile.Profile{edge("upper", 1), edge("lower", -1)}}},
		Boundaries: []Boundary{{Natural, path(t, "top", 3, 80, 60, 80)}, {Natural, path(t, "bottom", 3, -80, 60, -80)}},
	}, map[string]quantity.Voltage{"pin": 1000, "ground": 0})
	cc, err := whole.Capacitance("pin", "pin")
	if err != nil {
		t.Fatal(err)
	}
	within(t, "capacitance", float64(cc), 2*float64(c), 1e-6)
	a, _ := half.Peak("pin")
	b, err := whole.Peak("pin")
	if err != nil {
		t.Fatal(err)
	}
	within(t, "peak", float64(b.Strength), float64(a.Strength), 5e-5)
}

// A thin disc in open space: C = 8 ε₀ a, potential on the axis 2/π V atan(a/z)
// (Smythe, Static and Dynamic Electricity, 5.03, from memory); its rim goes with the
// power −1/2.
func TestThinDisc(t *testing.T) {
	disc := Electrode{"disc", []profile.Profile{path(t, "disc", 0, 0, 10, 0)}}
	f := under(t, Arrangement{Electrodes: []Electrode{disc}}, map[string]quantity.Voltage{"disc": 1000})
	c, err := f.Capacitance("disc", "disc")
	if err != nil {
		t.Fatal(err)
	}
	within(t, "capacitance", float64(c), 8*vacuumPermittivity*10e-3, 1e-4)
	for _, z := range []float64{0.5, 3, -8, 40} {
		r := reading(t, f, 0, z)
		within(t, "potential", float64(r.Potential), 1000*2/math.Pi*math.Atan(10/math.Abs(z)), 1e-4)
		want := 1000 * 2 / math.Pi * 10 / (100 + z*z) * 1000
		within(t, "field", float64(r.Axial), math.Copysign(want, z), 1e-3)
	}
	for _, e := range f.Edges() {
		within(t, "exponent", e.Exponent, -0.5, 1e-6)
	}
	list, err := f.At(*mm([2]float64{5, 0}))
	if err != nil || len(list) != 2 {
		t.Fatal(list, err)
	}
	want := 1000 / math.Pi / math.Sqrt(100-25) * 1000 * 2
	for i, sign := range []float64{1, -1} {
		within(t, "field on a side", float64(list[i].Axial), sign*want, 1e-3)
	}
}

// A thin disc between a near plate and a far one: both sides have their own field.
func TestThinDiscHasTwoSides(t *testing.T) {
	a := Arrangement{
		Electrodes: []Electrode{{"disc", []profile.Profile{path(t, "disc", 0, 10, 40, 10)}},
			{"box", []profile.Profile{path(t, "box", 0, 0, 60, 0, 60, 14, 0, 14)}}},
	}
	f := under(t, a, map[string]quantity.Voltage{"disc": 1000, "box": 0})
	list, err := f.At(*mm([2]float64{5, 10}))
	if err != nil || len(list) != 2 {
		t.Fatal(list, err)
	}
	for _, r := range list {
		gap := 10.0
		if r.Axial > 0 {
			gap = 4
		}
		within(t, "field on a side", math.Abs(float64(r.Axial)), 1000/gap*1000, 1e-3)
		above := reading(t, f, 5, 10+math.Copysign(0.01, float64(r.Axial)))
		within(t, "field beside the surface", float64(above.Axial), float64(r.Axial), 2e-3)
	}
}
