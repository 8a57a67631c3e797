package drawing

import (
	"fmt"
	"math"
	"os"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/recorder"
	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/quantity"
	"kilovet/reports/digest"
	"kilovet/reports/internal/sample"
	"kilovet/rules/exhibit"
)

func newPen(t testing.TB) *Pen {
	t.Helper()
	pen, err := NewPen()
	if err != nil {
		t.Fatal(err)
	}
	return pen
}

// The golden files are drawings: open them in a browser after -update.
func TestCurveGolden(t *testing.T) {
	pen := newPen(t)
	for _, c := range sample.Curves()[:3] {
		golden := "testdata/curve_" + c.ID + ".svg"
		got := pen.Curve(c, mm(90)).SVG("curve", c.Title, digest.CurveWords(c))
		if *update {
			if err := os.WriteFile(golden, got, 0o644); err != nil {
				t.Fatal(err)
			}
		}
		want, err := os.ReadFile(golden)
		if err != nil {
			t.Fatal(err)
		}
		if diff := cmp.Diff(string(want), string(got)); diff != "" {
			t.Errorf("%s: %s", c.ID, diff)
		}
	}
}

// No text covers another or leaves the width that was asked for.
func TestCurvesStayInTheirWidth(t *testing.T) {
	pen := newPen(t)
	for _, c := range sample.Curves() {
		for _, width := range []float64{60, 82, 170} {
			p := pen.Curve(c, mm(width))
			if p.Width != mm(width) {
				t.Errorf("%s: %g mm wide", c.ID, millimetres(p.Width))
			}
			for _, flaw := range p.covered() {
				t.Errorf("%s, %g mm: %s", c.ID, width, flaw)
			}
			for _, s := range p.shapes {
				b := s.box()
				if left := b.left - millimetres(p.corner.X); left < 0 || left+b.right-b.left > width+0.01 {
					t.Errorf("%s, %g mm: %q from %g to %g", c.ID, width, s.text, left, left+b.right-b.left)
				}
			}
		}
	}
}

// A canvas is given finite numbers only, whatever is drawn.
func TestCurveCanvasCalls(t *testing.T) {
	pen := newPen(t)
	for _, c := range sample.Curves() {
		var canvas recorder.Canvas
		p := pen.Curve(c, mm(82))
		p.Draw(&canvas)
		for _, a := range canvas.Actions {
			if s, ok := a.(*recorder.Stroke); ok {
				inside(t, c.ID, s.Path, p)
			}
		}
	}
}

// The places of points are linear, or linear in the logarithm, along the axes.
func TestPlaces(t *testing.T) {
	lin := newScale(exhibit.Axis{Unit: "V"}, -2, 8, false)
	lin.length, lin.start = 100, 10
	logarithmic := newScale(exhibit.Axis{Unit: "Pa m", Log: true}, 0.1, 1000, true)
	logarithmic.length = 40
	for _, c := range []struct {
		a       scale
		v, want float64
	}{{lin, -2, 10}, {lin, 3, 60}, {lin, 8, 110}, {logarithmic, 0.1, 0}, {logarithmic, 10, 20}, {logarithmic, 1000, 40}} {
		if got := c.a.at(c.v); math.Abs(got-c.want) > 1e-9 {
			t.Errorf("%g lies at %g, want %g", c.v, got, c.want)
		}
	}
}

func labels(a scale) string {
	var all []string
	for _, t := range a.ticks {
		all = append(all, t.label)
	}
	return strings.Join(all, " ")
}

func TestTicks(t *testing.T) {
	for _, c := range []struct {
		axis     exhibit.Axis
		from, to float64
		parts    int
		free     bool
		want     string
		title    string
	}{
		{exhibit.Axis{What: "voltage", Unit: "V"}, 0, 22870, 5, false, "0 5 10 15 20 25", "voltage (kV)"},
		{exhibit.Axis{What: "voltage", Unit: "V"}, -20e3, -100, 4, false, "-20 -15 -10 -5 0", "voltage (kV)"},
		{exhibit.Axis{What: "current", Unit: "A"}, -22e-9, 9.8e-3, 5, false, "0 2 4 6 8 10", "current (mA)"},
		{exhibit.Axis{What: "current", Unit: "A"}, -9.8e-3, 22e-9, 5, false, "-10 -8 -6 -4 -2 0", "current (mA)"},
		{exhibit.Axis{What: "current", Unit: "A"}, -22e-6, 9.8e-3, 5, false, "-2 0 2 4 6 8 10", "current (mA)"},
		{exhibit.Axis{What: "time", Unit: "s"}, 0, 40e-6, 4, true, "0 10 20 30 40", "time (µs)"},
		{exhibit.Axis{What: "time", Unit: "s"}, 0, 7200, 4, true, "0 50 100", "time (min)"},
		{exhibit.Axis{What: "ripple", Unit: "V"}, 1.2, 1.3, 5, false, "1.20 1.22 1.24 1.26 1.28 1.30", "ripple (V)"},
		{exhibit.Axis{What: "share", Unit: "1"}, 0, 0.3, 3, false, "0 0.1 0.2 0.3", "share"},
		{exhibit.Axis{What: "pressure", Unit: "Pa", Log: true}, 1e-3, 1e5, 4, true, "1e-5 mbar  0.001 mbar  0.1 mbar  10 mbar  1000 mbar", "pressure"},
		{exhibit.Axis{What: "resistance", Unit: "ohm"}, 0, 5e6, 5, false, "0 1 2 3 4 5", "resistance (MΩ)"},
		{exhibit.Axis{What: "dose rate", Unit: "Gy/s"}, 0, 1e-9, 4, false, "0 1 2 3 4", "dose rate (µGy/h)"},
		{exhibit.Axis{What: "temperature", Unit: "K"}, 290, 310, 4, true, "290 295 300 305 310", "temperature (K)"},
	} {
		a := newScale(c.axis, c.from, c.to, c.free)
		a.mark(c.parts, !c.free)
		if got := labels(a); got != c.want || a.title != c.title {
			t.Errorf("%s from %g to %g: %q, %q, want %q, %q", c.axis.What, c.from, c.to, got, a.title, c.want, c.title)
		}
	}
}

// Of any values, the axis holds all, and its ticks lie on it, in order, at most one
// more than twice what was asked.
func TestTicksOfAnyValues(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		from := rapid.Float64Range(-1e6, 1e6).Draw(t, "from")
		to := from + rapid.Float64Range(0, 1e6).Draw(t, "span")
		parts := rapid.IntRange(1, 12).Draw(t, "parts")
		a := newScale(exhibit.Axis{Unit: rapid.SampledFrom([]string{"V", "1", "s", "m", "Pa", "K", "ohm"}).Draw(t, "unit")}, from, to, false)
		a.mark(parts, true)
		// A value a billionth of a step beyond a round end, as rounding leaves it, and one a
		// thousandth of the axis beyond nought count as on it; no drawing shows that.
		slack := 1e-9 * max(math.Abs(from), math.Abs(to), a.to-a.from)
		if quantity.Equal(a.from, 0) || quantity.Equal(a.to, 0) {
			slack = 1.01e-3 * (a.to - a.from)
		}
		if a.from > from+slack || a.to < to-slack || len(a.ticks) < 2 || len(a.ticks) > 2*parts+2 {
			t.Fatalf("%d ticks from %g to %g for values from %g to %g", len(a.ticks), a.from, a.to, from, to)
		}
		for i, tick := range a.ticks[1:] {
			if tick.value <= a.ticks[i].value {
				t.Fatalf("tick %g after %g", tick.value, a.ticks[i].value)
			}
		}
	})
}

// Values so small that no step between them is a number are shown as nought.
func TestTicksOfTheLeastValues(t *testing.T) {
	for _, v := range []float64{math.SmallestNonzeroFloat64, -1e-310, 0} {
		a := newScale(exhibit.Axis{Unit: "V"}, min(v, 0), max(v, 0), false)
		if a.mark(4, true); len(a.ticks) < 2 || !(a.from < 0 && a.to > 0) {
			t.Errorf("%g: %d ticks from %g to %g", v, len(a.ticks), a.from, a.to)
		}
	}
}

// Two lengths have one scale.
func TestSectionsAreDrawnToScale(t *testing.T) {
	c := sample.Curves()[2]
	p := &plot{sheet: &sheet{faces: newPen(t).faces}, Curve: c, width: 160}
	p.layOut()
	x, y := p.x.length/(p.x.to-p.x.from), p.y.length/(p.y.to-p.y.from)
	if math.Abs(x/y-1) > 0.02 {
		t.Errorf("%g mm a metre along x, %g along y", x, y)
	}
}

// Lines are told apart without colour, by dashes for the first eight, and by numbers.
func TestLinesAreToldApart(t *testing.T) {
	seen := map[string]bool{}
	for i := range traces {
		how := fmt.Sprint(traces[i])
		if seen[how] {
			t.Errorf("line %d looks like another: %s", i, how)
		}
		seen[how] = true
	}
	p := newPen(t).Curve(sample.Curves()[0], mm(82))
	texts, _ := p.texts()
	for _, tag := range []string{"1", "2", "3", "a", "b"} {
		if n := count(texts, tag); n != 2 { // on the curve and in the key
			t.Errorf("%q stands %d times", tag, n)
		}
	}
}

func count(texts []string, want string) int {
	n := 0
	for _, text := range texts {
		if text == want {
			n++
		}
	}
	return n
}

// What belongs to a part or node is known by its name, in the drawing and as a place.
func TestSpots(t *testing.T) {
	d := sample.Diagram(3)
	p := newPen(t).SchematicIn(d, 170*vg.Millimeter, 200*vg.Millimeter)
	found := map[string]bool{}
	for _, s := range p.Spots() {
		found[s.Of] = true
		if s.Area.Min.X < 0 || s.Area.Min.Y < 0 || s.Area.Max.X > p.Width || s.Area.Max.Y > p.Height {
			t.Errorf("%s lies outside", s.Of)
		}
	}
	svg := string(p.SVG("s", "", ""))
	for _, name := range []string{"cable", "output", "stage.2", "multiplier.diode.4", "multiplier.coupling_capacitor.3", "drive.source"} {
		if !found[name] || !strings.Contains(svg, `<g data-of="`+name+`">`) {
			t.Errorf("%s has no place", name)
		}
	}
	if strings.Count(svg, "<g") != strings.Count(svg, "</g>") {
		t.Error("a group has no end")
	}
}

// A schematic is laid out for the room it has: it fills a sheet better than the one for
// a screen would.
func TestSchematicInARoom(t *testing.T) {
	width, height := mm(170), mm(220)
	for name, d := range diagrams(t) {
		p := newPen(t).SchematicIn(d, width, height)
		if got, plain := p.Scale(width, height), drawn(t, d).Scale(width, height); got < plain || got < 0.6 {
			t.Errorf("%s: scale %.2f, for a screen %.2f", name, got, plain)
		}
		for _, flaw := range append(p.covered(), p.crossed()...) {
			t.Errorf("%s: %s", name, flaw)
		}
	}
}
