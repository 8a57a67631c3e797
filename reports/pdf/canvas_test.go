package pdf

import (
	"image"
	"image/color"
	"math"
	"strings"
	"testing"

	"gonum.org/v1/plot/vg"

	"kilovet/reports/internal/sample"
	"kilovet/reports/page"
)

// drawnOn is the content of a sheet on which a canvas was drawn, 10 mm from its left
// and 100 mm from its top.
func drawnOn(t *testing.T, draw func(*canvas)) (content string, err error) {
	t.Helper()
	out := testPainter(t)
	c := newCanvas(out, 10, 100, 0.5)
	draw(c)
	return string(out.content), c.err
}

// testPainter has an empty sheet of A4.
func testPainter(t *testing.T) *painter {
	t.Helper()
	return newPainter(testFonts(t), [2]string{"R", "B"}, A4)
}

// Places in points from the lower left of the sheet: 297 mm less 100 mm is 558.43 pt,
// 10 mm is 28.35 pt; at half the scale 20 mm are 28.35 pt.
func TestCanvasPlaces(t *testing.T) {
	mm := func(v float64) vg.Length { return vg.Length(v) * vg.Millimeter }
	got, err := drawnOn(t, func(c *canvas) {
		var line vg.Path
		line.Move(vg.Point{})
		line.Line(vg.Point{X: mm(20), Y: mm(20)})
		c.SetLineWidth(mm(1))
		c.SetLineDash([]vg.Length{mm(2), mm(4)}, 0)
		c.SetColor(color.Gray{128})
		c.Stroke(line)
		c.Push()
		c.Translate(vg.Point{X: mm(20)})
		c.Rotate(math.Pi / 2)
		c.Scale(2, 2)
		c.Fill(line)
		c.Pop()
		c.Stroke(line)
	})
	if err != nil {
		t.Fatal(err)
	}
	for _, want := range []string{
		"0.502 G", "1.42 w", "[2.83 5.67 ] 0 d",
		"28.35 558.43 m\n56.69 586.77 l\nS",
		"56.69 558.43 m\n0 615.12 l\nf", // turned to the left and twice as large
	} {
		if !strings.Contains(got, want) {
			t.Errorf("%q is missing in\n%s", want, got)
		}
	}
	if strings.Count(got, "56.69 586.77 l") != 2 {
		t.Error("what was pushed was not restored")
	}
}

// A quarter of a circle of 10 mm, at half the scale: from the right to the top, with
// control points that lie 0.5523 of the radius from its ends.
func TestCanvasArc(t *testing.T) {
	got, err := drawnOn(t, func(c *canvas) {
		var arc vg.Path
		arc.Move(vg.Point{X: 10 * vg.Millimeter})
		arc.Arc(vg.Point{}, 10*vg.Millimeter, 0, math.Pi/2)
		c.SetLineWidth(vg.Millimeter)
		c.Stroke(arc)
	})
	const want = "42.52 558.43 m\n42.52 566.26 36.17 572.60 28.35 572.60 c"
	if err != nil || !strings.Contains(got, "558.43 m") || !near(got, want) {
		t.Errorf("%v\n%s", err, got)
	}
}

// near compares the numbers of a text with those of another, to a hundredth.
func near(text, want string) bool {
	for _, line := range strings.Split(want, "\n") {
		found := false
		for _, other := range strings.Split(text, "\n") {
			found = found || alike(strings.Fields(other), strings.Fields(line))
		}
		if !found {
			return false
		}
	}
	return true
}

func alike(a, b []string) bool {
	if len(a) != len(b) {
		return false
	}
	for i := range a {
		x, err := number(a[i])
		y, err2 := number(b[i])
		if err != nil || err2 != nil {
			if a[i] != b[i] {
				return false
			}
		} else if math.Abs(x-y) > 0.02 {
			return false
		}
	}
	return true
}

func TestCanvasRefuses(t *testing.T) {
	for name, draw := range map[string]func(*canvas){
		"pixels": func(c *canvas) { c.DrawImage(vg.Rectangle{}, image.NewGray(image.Rect(0, 0, 1, 1))) },
		"no number": func(c *canvas) {
			var p vg.Path
			p.Move(vg.Point{X: vg.Length(math.NaN())})
			p.Line(vg.Point{})
			c.SetLineWidth(1)
			c.Stroke(p)
		},
	} {
		if _, err := drawnOn(t, draw); err == nil {
			t.Errorf("%s: drawn", name)
		}
	}
}

// Pictures stand in the body of their sheet, clear of every text.
func TestPicturesStandClear(t *testing.T) {
	f := testFonts(t)
	for name, r := range samples {
		for _, paper := range Papers {
			a := paper.area()
			for n, s := range layout(f, a, testPen(), nil, page.New(r)).sheets {
				texts := places(f, s)
				for _, p := range pictures(s) {
					if p.left < a.left-0.01 || p.right > a.right+0.01 || p.top < a.top-0.01 || p.bottom > a.bottom {
						t.Errorf("%s on %s, sheet %d: a picture leaves the body: %+v", name, paper, n+1, p)
					}
					checkPlaces(t, name, a, append([]place{p}, texts...))
				}
			}
		}
	}
}

func pictures(s *sheet) []place {
	var all []place
	for _, i := range s.items {
		if p, ok := i.(picture); ok {
			wide, tall := float64(p.drawn.Width/vg.Millimeter)*p.scale, float64(p.drawn.Height/vg.Millimeter)*p.scale
			all = append(all, place{p.x, p.y, p.x + wide, p.y + tall, "a picture"})
		}
	}
	return all
}

// The text of a picture is guarded as all text is.
func TestForeignTextInAPicture(t *testing.T) {
	c := sample.Curves()[3]
	d := &page.Document{Sections: []page.Section{{Title: "Curve", Blocks: []page.Block{page.Gallery{Figures: []page.Figure{{Curve: &c, Caption: sample.Foreign}}}}}}}
	if got := readBack(t, render(t, d)); !strings.Contains(got, "µ Ω ≤ ²") || strings.Contains(got, "\x1b") {
		t.Errorf("got %q", got)
	}
}
