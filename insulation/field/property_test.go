package field

import (
	"math"
	"math/rand/v2"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/profile"
	"kilovet/hv/quantity"
)

// ballAt is a ball of a radius with its lowest point at z, in mm.
func ballAt(t testing.TB, name string, radius, z float64) Electrode {
	p := mustProfile(t, name, profile.Stroke{From: mm([2]float64{0, z})},
		profile.Stroke{To: mm([2]float64{0, z + 2*radius}), Centre: mm([2]float64{0, z + radius}), Turn: profile.Left})
	return Electrode{name, []profile.Profile{p}}
}

// The peak between two balls at opposite potentials falls as the gap grows, is
// never below the mean field, and never below that of the smaller ball alone.
func TestPeakFallsWithTheGap(t *testing.T) {
	chance.Check(t, func(rt *rapid.T) {
		a := rapid.Float64Range(1, 20).Draw(rt, "one radius")
		b := rapid.Float64Range(1, 20).Draw(rt, "other radius")
		gap := rapid.Float64Range(0.02, 3).Draw(rt, "gap") * math.Min(a, b)
		last := math.Inf(1)
		for range 3 {
			f := under(t, Arrangement{Electrodes: []Electrode{ballAt(t, "one", a, gap), ballAt(t, "other", b, -2*b)}},
				map[string]quantity.Voltage{"one": 500, "other": -500})
			peak := 0.0
			for _, name := range f.Electrodes() {
				p, err := f.Peak(name)
				if err != nil {
					rt.Fatal(err)
				}
				peak = math.Max(peak, float64(p.Strength))
			}
			if peak >= last {
				rt.Fatalf("gap %v mm: peak %v, was %v", gap, peak, last)
			}
			if peak < 1000/(gap*1e-3) || peak < 500/(math.Min(a, b)*1e-3) {
				rt.Fatalf("gap %v mm: peak %v is less than possible", gap, peak)
			}
			last, gap = peak, gap*1.3
		}
	})
}

// bushing draws a rod through a plate with a rounded hole, perhaps with a sleeve, in
// a can: the shape of most feedthroughs.
func bushing(t testing.TB, draw func(low, high float64, label string) float64) Arrangement {
	pin := draw(0.5, 5, "pin radius")
	hole := pin + draw(0.3, 10, "gap")
	edge := draw(0.1, 3, "edge radius")
	thick := edge + draw(0.05, 8, "half thickness")
	can := hole + edge + draw(3, 40, "can")
	top := thick + draw(5, 60, "height")
	a := Arrangement{
		Electrodes: []Electrode{
			{"pin", []profile.Profile{path(t, "pin", pin, top, pin, 0)}},
			{"plate", []profile.Profile{mustProfile(t, "plate", profile.Stroke{From: mm([2]float64{hole, 0})},
				profile.Stroke{To: mm([2]float64{hole, thick - edge})},
				profile.Stroke{To: mm([2]float64{hole + edge, thick}), Centre: mm([2]float64{hole + edge, thick - edge}), Turn: profile.Right},
				profile.Stroke{To: mm([2]float64{can, thick})}, profile.Stroke{To: mm([2]float64{can, top})})}},
		},
		Boundaries: []Boundary{{Natural, path(t, "middle", pin, 0, hole, 0)}, {Natural, path(t, "top", pin, top, can, top)}},
	}
	if draw(0, 1, "sleeve") < 0.6 {
		width := hole - pin
		inner := pin + width*draw(0.05, 0.4, "bore")
		outer := hole - width*draw(0.05, 0.4, "play")
		length := thick + (top-thick)*draw(0.1, 0.8, "sleeve length")
		a.Dielectrics = []Dielectric{{Name: "sleeve", Permittivity: draw(1.5, 30, "permittivity"), Profile: ringOf(t, "sleeve", inner, 0, outer, length)}}
	}
	return a
}

// Random bushings are solved; what comes out keeps the laws: C symmetric with rows
// of nothing, energy from charges, peaks not below the mean field of the gap.
func TestRandomBushings(t *testing.T) {
	count := 8
	if testing.Short() {
		count = 2
	}
	for seed := range count {
		r := rand.New(rand.NewPCG(uint64(seed), 20))
		s, err := Solve(bushing(t, func(low, high float64, _ string) float64 { return low + (high-low)*r.Float64() }))
		if err != nil {
			t.Errorf("bushing %d: %v", seed, err)
			continue
		}
		checkLaws(t, s)
	}
}

func checkLaws(t *testing.T, s *Solution) {
	f, err := s.Under(map[string]quantity.Voltage{"pin": 1000, "plate": 0})
	if err != nil {
		t.Fatal(err)
	}
	self, _ := f.Capacitance("pin", "pin")
	mutual, _ := f.Capacitance("plate", "pin")
	back, _ := f.Capacitance("pin", "plate")
	if math.Abs(float64(self+mutual)) > 1e-5*float64(self) || math.Abs(float64(mutual-back)) > 1e-5*float64(self) {
		t.Fatalf("C: %v, %v, %v", self, mutual, back)
	}
	energy, _ := f.Energy()
	if math.Abs(float64(energy)-float64(self)*5e5) > 1e-5*float64(energy) {
		t.Fatalf("energy %v, C %v", energy, self)
	}
	peak, err := f.Peak("pin")
	if err != nil {
		t.Fatal(err)
	}
	gap := float64(s.outlines[1].Segments[0].From.R - s.outlines[0].Segments[0].From.R)
	if len(s.Dielectrics) == 0 && float64(peak.Strength) < 1000/gap {
		t.Fatalf("peak %v in a gap of %v", peak, gap)
	}
	if peak.Error > 0.01 {
		t.Fatalf("peak claims %v", peak.Error)
	}
}

// What is drawn at random must come back with an answer, a fault or a lack, never a
// panic, a hang, or a number that is none. go test -fuzz=FuzzSolve ./insulation/field
func FuzzSolve(f *testing.F) {
	f.Add([]byte{1, 8, 40, 8, 0, 255, 1, 60, 0, 60, 40, 255, 3, 8, 0, 60, 0, 255, 3, 8, 40, 60, 40})
	f.Add([]byte{1, 0, 20, 20, 20, 20, 40, 0, 40, 255, 0, 0, 0, 90, 0, 90, 90, 0, 90, 255, 2, 30, 0, 40, 0, 40, 10, 30, 10, 30, 0})
	f.Add([]byte{1, 10, 20, 30, 20, 255, 4, 0, 0, 99, 0})
	f.Add([]byte("\x01\x03\b\x00<\x00")) // a needle on the axis
	f.Add([]byte("\x01\b(\b\x00\xff\x01<\x00<(\x03\b\x00<\x00\xff\x03\b(<\x04\xf7\\a\xaf\xa0\xfc[("))
	f.Fuzz(func(t *testing.T, data []byte) {
		a := arrangementOf(data)
		s, err := Solve(a)
		if err != nil {
			return
		}
		if w := s.Work(); w.Factorisations > rounds || w.Unknowns > maxUnknowns || w.Panels > maxPanels {
			t.Fatalf("work without bound: %+v", w)
		}
		v := map[string]quantity.Voltage{}
		for i, n := range s.Electrodes() {
			if n != Earthed {
				v[n] = quantity.Voltage(i + 1)
			}
		}
		fd, err := s.Under(v)
		if err != nil {
			return
		}
		for _, n := range s.Electrodes() {
			if p, err := fd.Peak(n); err == nil && !(p.Strength >= 0 && float64(p.Strength) < math.MaxFloat64) {
				t.Fatalf("peak on %s: %v", n, p)
			}
			if q, err := fd.Charge(n); err != nil || math.IsNaN(float64(q)) {
				t.Fatalf("charge on %s: %v, %v", n, q, err)
			}
		}
	})
}

// arrangementOf reads bytes as outlines parted by 255: a kind, then points in mm/4.
func arrangementOf(data []byte) (a Arrangement) {
	var outlines [][]byte
	last := 0
	for i, b := range append(data[:len(data):len(data)], 255) {
		if b == 255 {
			outlines, last = append(outlines, data[last:min(i, len(data))]), i+1
		}
		if last > len(data) || len(outlines) == 6 {
			break
		}
	}
	for i, o := range outlines {
		if len(o) < 5 || len(o) > 25 {
			continue
		}
		name := string(rune('a' + i))
		var strokes []profile.Stroke
		for k := 1; k+1 < len(o); k += 2 {
			p := mm([2]float64{float64(o[k]) / 4, float64(o[k+1]) / 4})
			if k == 1 {
				strokes = append(strokes, profile.Stroke{From: p})
			} else {
				strokes = append(strokes, profile.Stroke{To: p})
			}
		}
		p, err := profile.New(name, strokes)
		if err != nil {
			continue
		}
		switch o[0] % 5 {
		case 0, 1:
			a.Electrodes = append(a.Electrodes, Electrode{name, []profile.Profile{p}})
		case 2:
			a.Dielectrics = append(a.Dielectrics, Dielectric{Name: name, Permittivity: 1 + float64(o[0])/8, Profile: p})
		case 3:
			a.Boundaries = append(a.Boundaries, Boundary{Natural, p})
		case 4:
			a.Boundaries = append(a.Boundaries, Boundary{Earth, p})
		}
	}
	return a
}
