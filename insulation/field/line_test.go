package field

import (
	"math"
	"testing"

	"kilovet/hv/profile"
	"kilovet/hv/quantity"
)

func alone2(hot, cold string) map[string]quantity.Voltage {
	return map[string]quantity.Voltage{hot: 1000, cold: 0}
}

// The critical line ends on the other electrode, and the field along it adds up to
// the voltage.
func TestCriticalLines(t *testing.T) {
	for _, c := range []struct{ id, from, to string }{
		{"z_sphere_box_gap2", "sphere", "ground"},
		{"a_rod_gap/R=3", "rod", "ground"},
		{"b1_feedthrough", "pin", "ground"},
		{"b1_feedthrough", "ground", "pin"},
		{"c1_annulus0.5", "pin", "ground"},
		{"c1_annulus0.5", "ground", "pin"},
		{"c3_outer_gap0.1", "ground", "pin"},
		{"e_disc_rim1", "disc", "ground"},
		{"f1_gun", "control", "anode"},
		{"f3_gun", "anode", "control"},
	} {
		ref := reference(t, c.id)
		f := ref.solve(t)
		peak, err := f.Peak(c.from)
		if err != nil {
			t.Fatal(err)
		}
		line, err := f.Line(peak)
		if err != nil {
			t.Errorf("%s from %s: %v", c.id, c.from, err)
			continue
		}
		if line.Ends != c.to {
			t.Errorf("%s from %s: ends on %q, want %s", c.id, c.from, line.Ends, c.to)
		}
		first := line.Points[0]
		within(t, c.id+" field at the start", float64(first.Strength), float64(peak.Strength), 1e-9)
		sum := 0.0
		for i := 1; i < len(line.Points); i++ {
			a, b := line.Points[i-1], line.Points[i]
			sum += float64(b.Along-a.Along) * float64(a.Strength+b.Strength) / 2
		}
		span := (ref.Potentials[c.from] - ref.Potentials[c.to]) * 1e3
		within(t, c.id+" from "+c.from+": field along the line", sum, math.Abs(span), 3e-3)
		if n := len(line.Points); n < 20 || n > 400 {
			t.Errorf("%s: %d points", c.id, n)
		}
	}
}

// Through the layers of a coaxial cable the line is straight and E falls with 1/r.
func TestLineThroughLayers(t *testing.T) {
	f := reference(t, "x_coax2_2_5_10_er9.4_1").solve(t)
	peak, err := f.Peak("inner")
	if err != nil {
		t.Fatal(err)
	}
	line, err := f.Line(peak)
	if err != nil || line.Ends != "outer" {
		t.Fatal(line.Ends, err)
	}
	d := math.Log(5.0/2)/9.4 + math.Log(2)
	seen := map[string]bool{}
	for _, p := range line.Points {
		seen[p.Body] = true
		eps := 1.0
		if p.Body == "in" {
			eps = 9.4
		}
		within(t, "field on the line", float64(p.Strength), 1000/(eps*float64(p.At.R)*d), 2e-4)
	}
	if !seen["in"] || !seen[Medium] {
		t.Errorf("bodies on the line: %v", seen)
	}
}

// Lines of equal potential lie at their level, and around a ball in a box they run
// from axis to axis.
func TestEquipotentials(t *testing.T) {
	for _, id := range []string{"z_sphere_box_gap40", "c1_tight", "f3_gun", "x_two_spheres_5_20_c26_1_-1"} {
		f := reference(t, id).solve(t)
		low, span := math.Inf(1), f.span()
		for _, v := range f.volts {
			low = math.Min(low, v)
		}
		var levels []quantity.Voltage
		for k := 1; k < 10; k += 2 {
			levels = append(levels, quantity.Voltage(low+span*(float64(k)+0.001)/10))
		}
		lines, err := f.Equipotentials(levels...)
		if err != nil {
			t.Errorf("%s: %v", id, err)
			continue
		}
		drawn := map[quantity.Voltage]bool{}
		for _, l := range lines {
			drawn[l.Level] = true
			for i := 0; i < len(l.Points); i += 7 {
				list, err := f.At(l.Points[i])
				if err != nil {
					t.Errorf("%s: %v", id, err)
					break
				}
				if miss := math.Abs(float64(list[0].Potential - l.Level)); miss > 2e-3*span {
					t.Errorf("%s: %v V at %v on the line of %v V", id, list[0].Potential, l.Points[i], l.Level)
				}
			}
		}
		if len(drawn) != len(levels) {
			t.Errorf("%s: %d of %d levels drawn", id, len(drawn), len(levels))
		}
		if len(lines) > 4*len(levels) {
			t.Errorf("%s: %d lines for %d levels", id, len(lines), len(levels))
		}
	}
}

// The readings along the surface of a body: the flux passes, the tangential field is
// the same, and inside the body, a little off, the field is what the surface says.
func TestAlongSurfaces(t *testing.T) {
	f := reference(t, "c1_tight").solve(t)
	runs, err := f.Along("ceramic")
	if err != nil || len(runs) != 2 {
		t.Fatal(len(runs), err)
	}
	for _, run := range runs {
		last := quantity.Length(-1)
		for _, s := range run {
			if s.Along <= last {
				t.Error("places out of order")
			}
			last = s.Along
			if s.Inside.Body != "ceramic" || s.Outside.Body != Medium {
				t.Fatalf("bodies %q, %q", s.Inside.Body, s.Outside.Body)
			}
			normal, along := float64(s.Inside.Radial), float64(s.Inside.Axial)
			outer, beside := float64(s.Outside.Radial), float64(s.Outside.Axial)
			if s.Inside.At.Z > 19.9999999e-3 { // the end, across the axis
				normal, along, outer, beside = along, normal, beside, outer
			}
			scale := math.Hypot(outer, beside)
			if math.Abs(9.4*normal-outer) > 1e-9*scale || math.Abs(along-beside) > 1e-9*scale {
				t.Errorf("at %v: inside %v, outside %v", s.Inside.At, s.Inside, s.Outside)
			}
		}
	}
	on := reading(t, f, 7, 10)
	off := reading(t, f, 6.999, 10)
	if on.Body != "ceramic" {
		t.Fatalf("%v: the ceramic is on the left", on)
	}
	within(t, "field off the surface", float64(off.Axial), float64(on.Axial), 2e-3)
}

// A sphere over an earthed plane without end: the line from the sphere ends on the plane,
// that from the plane on the sphere; both are as long as the gap and bear its voltage,
// however far the plane is.
func TestLineToAPlaneWithoutEnd(t *testing.T) {
	for _, c := range []struct{ radius, gap, side float64 }{{5, 20, 1}, {5, 20, -1}, {1, 40, 1}} {
		turn := profile.Left
		if c.side < 0 {
			turn = profile.Right
		}
		at := func(z float64) *profile.Point { return mm([2]float64{0, z * c.side}) }
		ball := mustProfile(t, "ball", profile.Stroke{From: at(c.gap)}, profile.Stroke{To: at(c.gap + 2*c.radius), Centre: at(c.gap + c.radius), Turn: turn})
		f := under(t, Arrangement{
			Electrodes: []Electrode{{"ball", []profile.Profile{ball}}},
			Boundaries: []Boundary{{Earth, path(t, "floor", 0, 0, 90, 0)}},
		}, map[string]quantity.Voltage{"ball": 1000})
		for from, to := range map[string]string{"ball": Earthed, Earthed: "ball"} {
			p, err := f.Peak(from)
			if err != nil {
				t.Fatal(err)
			}
			for _, follow := range []func(Peak) (Line, error){f.Line, f.Within} {
				l, err := follow(p)
				if err != nil || l.Ends != to {
					t.Fatalf("the line from %s ends on %q: %v", from, l.Ends, err)
				}
				last := l.Points[len(l.Points)-1]
				within(t, "length", float64(last.Along), c.gap*1e-3, 1e-5)
				within(t, "voltage", math.Abs(float64(l.Points[0].Potential-last.Potential)), 1000, 1e-6)
			}
		}
	}
}

// A peak at the rim of the model, where nothing holds its line: thin layers of coaxial
// dielectrics between natural ends.
func TestLineFromTheRimOfTheModel(t *testing.T) {
	ring := func(name string, a, b float64) profile.Profile { return path(t, name, a, 0, b, 0, b, 4, a, 4, a, 0) }
	f := under(t, Arrangement{
		Electrodes:  []Electrode{{"in", []profile.Profile{path(t, "in", 3, 0, 3, 4)}}, {"out", []profile.Profile{path(t, "out", 3.2, 0, 3.2, 4)}}},
		Dielectrics: []Dielectric{{Name: "d1", Permittivity: 1000, Profile: ring("d1", 3, 3.05)}, {Name: "d2", Permittivity: 2, Profile: ring("d2", 3.05, 3.2)}},
		Boundaries:  []Boundary{{Natural, path(t, "low", 3, 0, 3.2, 0)}, {Natural, path(t, "top", 3, 4, 3.2, 4)}},
	}, alone2("in", "out"))
	for body, long := range map[string]float64{"d1": 0.05e-3, "d2": 0.15e-3} {
		p, err := f.PeakIn(body)
		if err != nil {
			t.Fatal(err)
		}
		l, err := f.Within(p)
		if err != nil {
			t.Fatal(body, err)
		}
		within(t, "length in "+body, float64(l.Points[len(l.Points)-1].Along), long, 1e-2)
	}
}

// A ring over a plane without end: on the axis below it the line from the plane runs into
// a place without a field; the one beside it ends on the ring.
func TestLineThatGetsNowhereOnTheAxis(t *testing.T) {
	ring := mustProfile(t, "ring", profile.Stroke{From: mm([2]float64{10, 25})},
		profile.Stroke{To: mm([2]float64{12, 25}), Centre: mm([2]float64{11, 25}), Turn: profile.Left},
		profile.Stroke{To: mm([2]float64{10, 25}), Centre: mm([2]float64{11, 25}), Turn: profile.Left})
	f := under(t, Arrangement{
		Electrodes: []Electrode{{"ring", []profile.Profile{ring}}},
		Boundaries: []Boundary{{Earth, path(t, "floor", 0, 0, 90, 0)}},
	}, map[string]quantity.Voltage{"ring": 1000})
	p, err := f.Peak(Earthed)
	if err != nil || p.At.R > 1e-4 {
		t.Fatal(p.At, err)
	}
	l, err := f.Within(p)
	if err != nil || l.Ends != "ring" {
		t.Fatalf("it ends on %q: %v", l.Ends, err)
	}
	if last := l.Points[len(l.Points)-1]; last.Along < 24e-3 || math.Abs(float64(last.Potential-l.Points[0].Potential)-1000) > 0.01 {
		t.Errorf("%v long, %v across", last.Along, last.Potential)
	}
}

// A post that fills a stretch of a uniform field: the peak may lie anywhere on its side,
// which the line runs along, or at its corners. It is the whole height in each case.
func TestLineAlongTheSideOfAPost(t *testing.T) {
	for _, h := range []float64{2, 3, 4, 6, 7, 10, 15} {
		for _, permittivity := range []float64{2.1, 9.4} {
			plate := func(name string, face, back float64) Electrode {
				return Electrode{name, []profile.Profile{path(t, name, 0, face, 40, face, 40, back, 0, back)}}
			}
			f := under(t, Arrangement{
				Electrodes:  []Electrode{plate("top", h, h+10), plate("bottom", 0, -10)},
				Dielectrics: []Dielectric{{Name: "post", Permittivity: permittivity, Profile: path(t, "post", 0, 0, 15, 0, 15, h, 0, h, 0, 0)}},
			}, alone2("top", "bottom"))
			p, err := f.PeakIn("post")
			if err != nil {
				t.Fatal(err)
			}
			l, err := f.Within(p)
			if err != nil {
				t.Fatal(h, err)
			}
			last := l.Points[len(l.Points)-1]
			within(t, "length", float64(last.Along), h*1e-3, 5e-2)
			within(t, "potential across", math.Abs(float64(last.Potential-l.Points[0].Potential)), 1000, 1e-3)
		}
	}
}
