package drawing

import (
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/rules/exhibit"
)

// inked is the length of hatching for each area of a square.
func inked(share float64) float64 {
	h, square, length := hatchingOf(share), []box{{0, 0, 60, 60}}, 0.0
	families := []float64{1}
	if h.crossed {
		families = []float64{1, -1}
	}
	for _, rise := range families {
		for _, p := range hatched(h.pitch, rise, square) {
			length += math.Hypot(p[1].x-p[0].x, p[1].y-p[0].y)
		}
	}
	return length / (60 * 60)
}

// A darker area bears at least a third more ink than the next lighter one, so that they
// are told apart; lines at a pitch bear its inverse.
func TestHatchingByShare(t *testing.T) {
	last := 0.0
	for _, share := range []float64{0.2, 0.4, 0.6, 0.8} {
		ink := inked(share)
		if !(ink > 1.33*last) {
			t.Errorf("share %g: %g of lines each mm², the lighter one %g", share, ink, last)
		}
		last = ink
	}
	if h := hatchingOf(0.4); math.Abs(inked(0.4)*h.pitch-1) > 0.03 {
		t.Errorf("%g of lines at a pitch of %g", inked(0.4), h.pitch)
	}
}

// Hatching stays in its boxes, and what many boxes bear is what the one that they make up
// does.
func TestHatchingKeepsToItsBoxes(t *testing.T) {
	chance.Check(t, func(rt *rapid.T) {
		pitch, rise := rapid.Float64Range(0.4, 5).Draw(rt, "pitch"), rapid.SampledFrom([]float64{1, -1}).Draw(rt, "rise")
		left, low := rapid.Float64Range(-50, 50).Draw(rt, "left"), rapid.Float64Range(-50, 50).Draw(rt, "low")
		size := rapid.Float64Range(0.5, 40).Draw(rt, "size")
		n := rapid.IntRange(1, 6).Draw(rt, "parts")
		var small []box
		step := size / float64(n)
		for i := range n * n {
			x, y := left+step*float64(i%n), low+step*float64(i/n)
			small = append(small, box{x, y, x + step, y + step})
		}
		one, many := 0.0, 0.0
		for _, p := range hatched(pitch, rise, []box{{left, low, left + size, low + size}}) {
			one += math.Hypot(p[1].x-p[0].x, p[1].y-p[0].y)
			for _, q := range p {
				if q.x < left-1e-6 || q.x > left+size+1e-6 || q.y < low-1e-6 || q.y > low+size+1e-6 {
					rt.Fatalf("%v lies outside", q)
				}
			}
		}
		for _, p := range hatched(pitch, rise, small) {
			many += math.Hypot(p[1].x-p[0].x, p[1].y-p[0].y)
		}
		if math.Abs(one-many) > 1e-3*(1+one) {
			rt.Fatalf("%g in one box, %g in its parts", one, many)
		}
	})
}

// A picture explains its areas, and every body, potential and critical line once however
// many pieces it comes in.
func TestPicturesExplainWhatIsDrawn(t *testing.T) {
	line := func(name string, kind exhibit.Kind, x float64) exhibit.Line {
		return exhibit.Line{Name: name, Kind: kind, Points: []exhibit.Point{{X: x, Y: 0}, {X: x, Y: 0.01}}}
	}
	c := exhibit.Curve{
		ID: "field.picture", Title: "field", X: exhibit.Axis{What: "radius", Unit: "m"}, Y: exhibit.Axis{What: "height", Unit: "m"},
		Lines: []exhibit.Line{line("pin", exhibit.Outline, 0.001), line("pin", exhibit.Outline, 0.002), line("-5 kV", exhibit.Equipotential, 0.004),
			line("-5 kV", exhibit.Equipotential, 0.006), line("critical line", exhibit.CriticalLine, 0.008)},
		Areas: []exhibit.Area{{Name: "weak", Share: 0.2, Boxes: [][2]exhibit.Point{{{X: 0, Y: 0}, {X: 0.01, Y: 0.01}}}}},
	}
	words := map[string]int{}
	widths := map[float64]bool{}
	for _, s := range newPen(t).Curve(c, mm(120)).shapes {
		words[strings.TrimSpace(s.text)]++
		widths[math.Round(millimetres(s.width)*100)/100] = true
	}
	for _, want := range []string{"pin", "-5 kV", "critical line", "weak"} {
		if words[want] != 1 {
			t.Errorf("%q stands %d times", want, words[want])
		}
	}
	for _, want := range []float64{0.6, 0.18, hatchWidth} {
		if !widths[want] {
			t.Errorf("nothing is %g mm wide", want)
		}
	}
}
