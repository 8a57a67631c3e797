package exhibit_test

import (
	"math"
	"testing"

	"kilovet/rules/exhibit"
)

// sine has a spike of one point beside its crest.
func spiked(n int) []exhibit.Point {
	points := make([]exhibit.Point, n)
	for i := range points {
		x := float64(i) / float64(n-1)
		points[i] = exhibit.Point{X: x, Y: math.Sin(2 * math.Pi * x)}
	}
	points[n/3].Y = 5
	points[n/2].Y = -7
	return points
}

func TestThinKeepsEndsAndExtremes(t *testing.T) {
	all := spiked(1000)
	thin := exhibit.Thin(all, 60)
	if len(thin) != 60 || thin[0] != all[0] || thin[59] != all[999] {
		t.Fatalf("%d points, from %v to %v", len(thin), thin[0], thin[len(thin)-1])
	}
	low, high := thin[0], thin[0]
	for i, p := range thin {
		if i > 0 && p.X <= thin[i-1].X {
			t.Fatal("the points are out of order")
		}
		if p.Y < low.Y {
			low = p
		}
		if p.Y > high.Y {
			high = p
		}
	}
	if low.Y != -7 || high.Y != 5 {
		t.Errorf("extremes %v and %v", low, high)
	}
}

// A sine drawn through 60 points is nowhere off by more than half a per cent of its
// amplitude: the sagitta of an arc of a sixtieth of a turn, (2π/60)²/8 = 0.14 %, and what
// uneven parts add.
func TestThinFollowsTheLine(t *testing.T) {
	all := make([]exhibit.Point, 2001)
	for i := range all {
		all[i] = exhibit.Point{X: float64(i) / 2000, Y: math.Sin(2 * math.Pi * float64(i) / 2000)}
	}
	thin, at := exhibit.Thin(all, 60), 1
	for _, p := range all {
		for thin[at].X < p.X {
			at++
		}
		a, b := thin[at-1], thin[at]
		if off := math.Abs(p.Y - a.Y - (b.Y-a.Y)*(p.X-a.X)/(b.X-a.X)); off > 0.005 {
			t.Fatalf("off by %g at %g", off, p.X)
		}
	}
}

func TestThinLeavesShortAndFlatLines(t *testing.T) {
	short := spiked(40)
	if got := exhibit.Thin(short, 60); len(got) != 40 {
		t.Errorf("a line of 40 points has %d left", len(got))
	}
	flat := make([]exhibit.Point, 500)
	for i := range flat {
		flat[i].X = float64(i)
	}
	if got := exhibit.Thin(flat, 60); len(got) != 2 {
		t.Errorf("a flat line needs %d points", len(got))
	}
}
