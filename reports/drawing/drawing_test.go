package drawing

import (
	"flag"
	"fmt"
	"math"
	"os"
	"slices"
	"strings"
	"testing"
	"unicode/utf8"

	"github.com/google/go-cmp/cmp"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/recorder"

	"kilovet/hv/chain"
	"kilovet/reports/internal/sample"
	"kilovet/rules/diagram"
	"kilovet/rules/evidence"
)

var update = flag.Bool("update", false, "rewrite the golden files")

func schematic(d *diagram.Diagram) (*Picture, error) {
	pen, err := NewPen()
	if err != nil {
		return nil, err
	}
	return pen.Schematic(d), nil
}

func drawn(t testing.TB, d *diagram.Diagram) *Picture {
	t.Helper()
	p, err := schematic(d)
	if err != nil {
		t.Fatal(err)
	}
	return p
}

// The golden files are drawings: open them in a browser after -update.
func TestGolden(t *testing.T) {
	all := diagrams(t)
	for _, name := range []string{"column", "positive_marked", "folded"} {
		golden := "testdata/" + name + ".svg"
		got := drawn(t, all[name]).SVG("schematic", "Schematic", name)
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
			t.Errorf("%s: %s", name, diff)
		}
	}
}

// hair is what two boxes may share without anybody seeing it.
const hair = 0.15

func (b box) touches(c box) bool {
	return b.left+hair < c.right && c.left+hair < b.right && b.low+hair < c.high && c.low+hair < b.high
}

// middle is the box of the letters of a text, without what hangs below the line.
func (sh shape) middle() box {
	b := sh.box()
	size := millimetres(sh.face.Font.Size)
	return box{b.left, b.low + size/4, b.right, b.high}
}

// texts are the texts of a picture with the boxes of their letters.
func (p *Picture) texts() (texts []string, boxes []box) {
	for _, s := range p.shapes {
		if s.text != "" {
			texts, boxes = append(texts, s.text), append(boxes, s.middle())
		}
	}
	return texts, boxes
}

// covered lists texts that cover each other.
func (p *Picture) covered() (flaws []string) {
	texts, boxes := p.texts()
	for i := range texts {
		for j := range i {
			if boxes[i].touches(boxes[j]) {
				flaws = append(flaws, fmt.Sprintf("%q covers %q", texts[i], texts[j]))
			}
		}
	}
	return flaws
}

// crossed lists texts that a wire crosses.
func (p *Picture) crossed() (flaws []string) {
	texts, boxes := p.texts()
	for _, w := range p.shapes {
		for i := 1; i < len(w.path); i++ {
			for j := range texts {
				if w.width > 0 && w.path[i].Type == vg.LineComp && boxes[j].crossed(w.path[i-1].Pos, w.path[i].Pos) {
					flaws = append(flaws, fmt.Sprintf("a wire crosses %q", texts[j]))
				}
			}
		}
	}
	return flaws
}

func TestEveryTextCanBeRead(t *testing.T) {
	for name, d := range diagrams(t) {
		p := drawn(t, d)
		for _, flaw := range append(p.covered(), p.crossed()...) {
			t.Errorf("%s: %s", name, flaw)
		}
	}
}

// crossed reports whether a line between two points passes through a box: what is left
// of it after cutting at each of the four sides.
func (b box) crossed(p, q vg.Point) bool {
	from, to := 0.0, 1.0
	x, y := millimetres(p.X), millimetres(p.Y)
	dx, dy := millimetres(q.X)-x, millimetres(q.Y)-y
	for _, side := range [4][2]float64{{dx, b.right - hair - x}, {-dx, x - b.left - hair}, {dy, b.high - hair - y}, {-dy, y - b.low - hair}} {
		switch slope, room := side[0], side[1]; {
		case slope == 0 && room < 0:
			return false
		case slope > 0:
			to = min(to, room/slope)
		case slope < 0:
			from = max(from, room/slope)
		}
	}
	return from < to
}

// Each part's name and value, each node's name and potential and each mark are there
// to be read, but for the names of the ladder's parts, which their nodes give, and for
// what a fold leaves out.
func TestEverythingIsThereToRead(t *testing.T) {
	for name, d := range diagrams(t) {
		var all strings.Builder
		for _, s := range drawn(t, d).shapes {
			all.WriteString(s.text)
		}
		text := strings.ReplaceAll(all.String(), " ", "")
		want := func(s string) {
			if !strings.Contains(text, strings.ReplaceAll(s, " ", "")) {
				t.Errorf("%s: %q is not drawn", name, s)
			}
		}
		hidden := func(s string) bool {
			return name[:4] == "fold" && strings.ContainsAny(s, "345678") && strings.ContainsAny(s[:3], "sc")
		}
		for _, p := range d.Parts() {
			if strings.HasPrefix(p.Name, "multiplier.") {
				continue
			}
			want(p.Name)
			want(p.Value)
		}
		for _, n := range d.Nodes() {
			if !hidden(n.Name) {
				want(n.Name)
				want(n.Potential)
			}
		}
		for _, m := range d.Marks {
			want(string(m.Verdict))
			want(m.Subject + ": " + m.Rules[0])
		}
	}
}

// A fold draws the first and the last stages and says which it leaves out.
func TestFolding(t *testing.T) {
	for stages, want := range map[int]int{1: 1, 8: 8, 9: 5, 60: 5} {
		if got := len(steps(stages)); got != want {
			t.Errorf("%d stages: %d steps, want %d", stages, got, want)
		}
	}
	got := steps(12)
	if fold := got[2]; !fold.fold || fold.stage != 2 || fold.lastFold != 9 || got[3].stage != 10 || got[4].stage != 11 {
		t.Errorf("%+v", got)
	}
}

func TestNegativeDiodesPointTheOtherWay(t *testing.T) {
	text := func(polarity string) []byte {
		c, faults := chain.Read([]byte(strings.Replace(single, `"positive"`, polarity, 1)))
		if len(faults) > 0 {
			t.Fatal(faults)
		}
		d := diagram.Of(evidence.New(c), nil)
		for _, n := range d.Nodes() {
			n.Potential = ""
		}
		return drawn(t, d).SVG("s", "", "")
	}
	if string(text(`"positive"`)) == string(text(`"negative"`)) {
		t.Error("the polarity does not show")
	}
}

// A canvas is given finite numbers only, no transforms and no pixels, and black and
// white alone.
func TestCanvasCalls(t *testing.T) {
	for name, d := range diagrams(t) {
		var c recorder.Canvas
		p := drawn(t, d)
		p.Draw(&c)
		if len(c.Actions) < 100 {
			t.Errorf("%s: %d actions", name, len(c.Actions))
		}
		for _, a := range c.Actions {
			switch a := a.(type) {
			case *recorder.Stroke:
				inside(t, name, a.Path, p)
			case *recorder.Fill:
				inside(t, name, a.Path, p)
			case *recorder.SetColor:
				if a.Color != ink && a.Color != paper && name != "" {
					if r, g, b, _ := a.Color.RGBA(); r+g+b != 0 {
						t.Errorf("%s: colour %v", name, a.Color)
					}
				}
			case *recorder.SetLineWidth, *recorder.SetLineDash, *recorder.FillString, *recorder.Comment:
			default:
				t.Errorf("%s: %s", name, a.Call())
			}
		}
	}
}

func inside(t *testing.T, name string, path vg.Path, p *Picture) {
	t.Helper()
	for _, c := range path {
		for _, q := range append(slices.Clone(c.Control), c.Pos) {
			if !(q.X >= 0 && q.Y >= 0 && q.X <= p.Width && q.Y <= p.Height) || math.IsNaN(c.Start+c.Angle) {
				t.Fatalf("%s: %v outside of %v by %v", name, c, p.Width, p.Height)
			}
		}
	}
}

func TestForeignTextIsHeldBack(t *testing.T) {
	d := diagrams(t)["folded"]
	for _, p := range d.Parts() {
		p.Name, p.Value = p.Name+sample.LongName+sample.LongName+sample.Foreign, sample.Foreign
	}
	p := drawn(t, d)
	if svg := string(p.SVG("s", sample.Foreign, `"<&>`)); strings.Contains(svg, "\x1b") || !utf8.ValidString(svg) || !strings.Contains(svg, "<desc id=\"s-description\">&#34;&lt;&amp;&gt;</desc>") {
		t.Error("foreign text stands as it came")
	}
	for _, s := range p.shapes {
		if s.text != "" && millimetres(s.face.Width(s.text)) > 300 {
			t.Errorf("%q is too long", s.text)
		}
	}
}

func TestNoDiagramIsAnEmptyPicture(t *testing.T) {
	if p := drawn(t, nil); p.Width != 0 || len(p.shapes) != 0 {
		t.Errorf("%+v", p)
	}
}
