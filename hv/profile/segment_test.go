package profile

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/quantity"
)

func at(r, z float64) Point { return Point{quantity.Length(r), quantity.Length(z)} }

func near1(a, b, tol float64) bool { return math.Abs(a-b) <= tol }

func TestSegments(t *testing.T) {
	quarter := math.Pi / 2
	for _, c := range []struct {
		name          string
		s             Segment
		length, sweep float64
		middle        Point
		heading       float64 // at the start
	}{
		{"line", Segment{From: at(0, 0), To: at(3, 4)}, 5, 0, at(1.5, 2), math.Atan2(4, 3)},
		{"left quarter", Segment{From: at(1, 0), To: at(0, 1), Turn: Left}, quarter, quarter, at(math.Sqrt2/2, math.Sqrt2/2), quarter},
		{"right three quarters", Segment{From: at(1, 0), To: at(0, 1), Turn: Right}, 3 * quarter, -3 * quarter, at(-math.Sqrt2/2, -math.Sqrt2/2), -quarter},
		{"half", Segment{From: at(2, 0), To: at(0, 0), Centre: at(1, 0), Turn: Left}, 2 * quarter, 2 * quarter, at(1, 1), quarter},
		{"circle", Segment{From: at(1, 0), To: at(1, 0), Turn: Right}, 4 * quarter, -4 * quarter, at(-1, 0), -quarter},
	} {
		if !near1(float64(c.s.Length()), c.length, 1e-12) || !near1(float64(c.s.Sweep()), c.sweep, 1e-12) {
			t.Errorf("%s: length %v, sweep %v", c.name, c.s.Length(), c.s.Sweep())
		}
		if d := c.s.At(0.5).Distance(c.middle); d > 1e-12 {
			t.Errorf("%s: middle %v, want %v", c.name, c.s.At(0.5), c.middle)
		}
		if !near1(float64(c.s.Heading(0)), c.heading, 1e-12) {
			t.Errorf("%s: heading %v, want %v", c.name, c.s.Heading(0), c.heading)
		}
	}
}

// drawSegment draws a line or an arc.
func drawSegment(t *rapid.T, label string) Segment {
	coordinate := rapid.Float64Range(-5, 5)
	from := at(coordinate.Draw(t, label+" r"), coordinate.Draw(t, label+" z"))
	if rapid.Bool().Draw(t, label+" straight") {
		to := at(coordinate.Draw(t, label+" to r"), coordinate.Draw(t, label+" to z"))
		if from.Distance(to) < 1e-3 {
			to.R++
		}
		return Segment{From: from, To: to}
	}
	radius, phase := rapid.Float64Range(0.1, 4).Draw(t, label+" radius"), rapid.Float64Range(0, 6).Draw(t, label+" phase")
	sweep := rapid.Float64Range(0.05, 6.2).Draw(t, label+" sweep")
	s := Segment{Centre: from, Turn: Left}
	if rapid.Bool().Draw(t, label+" right") {
		s.Turn, sweep = Right, -sweep
	}
	spoke := func(a float64) Point {
		return at(float64(from.R)+radius*math.Cos(a), float64(from.Z)+radius*math.Sin(a))
	}
	s.From, s.To = spoke(phase), spoke(phase+sweep)
	return s
}

func TestPartsAddUp(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		s, f := drawSegment(t, "s"), rapid.Float64Range(0.05, 0.95).Draw(t, "cut")
		a, b := s.Part(0, f), s.Part(f, 1)
		if sum := a.Length() + b.Length(); !near1(float64(sum), float64(s.Length()), 1e-9) {
			t.Fatalf("parts %v, whole %v", sum, s.Length())
		}
		if d := s.Reversed().At(1 - f).Distance(s.At(f)); d > 1e-9 {
			t.Fatalf("reversed is off by %v", d)
		}
	})
}

func TestClosestIsClosest(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		s := drawSegment(t, "s")
		p := at(rapid.Float64Range(-6, 6).Draw(t, "r"), rapid.Float64Range(-6, 6).Draw(t, "z"))
		f, d := s.Closest(p)
		if !near1(float64(s.At(f).Distance(p)), float64(d), 1e-12) {
			t.Fatalf("distance %v at %v is %v", d, f, s.At(f).Distance(p))
		}
		for i := range 101 {
			if e := s.At(float64(i) / 100).Distance(p); e < d-1e-9 {
				t.Fatalf("%v is closer than %v", e, d)
			}
		}
	})
}

func TestMeetIsMutual(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		a, b := drawSegment(t, "a"), drawSegment(t, "b")
		for _, p := range meet(a, b, 1e-6) {
			_, da := a.Closest(p)
			_, db := b.Closest(p)
			if da > 1e-6 || db > 1e-6 {
				t.Fatalf("%v is off by %v and %v", p, da, db)
			}
		}
		// Where the distance from a changes side along b there is a crossing of a line.
		if a.Turn != Straight {
			return
		}
		side := func(p Point) float64 {
			u, v := a.To.plane()-a.From.plane(), p.plane()-a.From.plane()
			return real(u)*imag(v) - imag(u)*real(v)
		}
		for i := range 50 {
			p, q := b.At(float64(i)/50), b.At(float64(i+1)/50)
			foot, _ := a.Closest(p)
			if side(p)*side(q) < -1e-6 && foot > 0.2 && foot < 0.8 && p.Distance(q) < 0.1*a.Length() && len(meet(a, b, 1e-6)) == 0 {
				t.Fatalf("crossing near %v not found", p)
			}
		}
	})
}
