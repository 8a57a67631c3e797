package drawing

import (
	"image/color"
	"math"

	"gonum.org/v1/plot/font"
	"gonum.org/v1/plot/vg"

	"kilovet/rules/diagram"
)

// at is a place on the sheet in millimetres, to the right and up.
type at struct{ x, y float64 }

func (p at) plus(x, y float64) at { return at{p.x + x, p.y + y} }

func (p at) point() vg.Point { return vg.Point{X: mm(p.x), Y: mm(p.y)} }

func mm(v float64) vg.Length { return vg.Length(v) * vg.Millimeter }

// shape is a stroked path, a filled one (without width) or a text.
type shape struct {
	path  vg.Path
	width vg.Length
	dash  []vg.Length
	ink   color.Gray
	of    string // the part or node it belongs to; empty for the rest

	text string
	face font.Face
	wide float64 // of the text, in millimetres
	at   vg.Point
}

// sheet collects shapes; its lengths are in millimetres.
type sheet struct {
	*faces
	shapes []shape
	marks  []diagram.Mark
	bare   bool   // without a legend
	of     string // what is being drawn belongs to it
}

func (s *sheet) add(sh shape) {
	sh.of = s.of
	s.shapes = append(s.shapes, sh)
}

// belonging marks what is drawn until the end that it returns is called as belonging
// to a part or node.
func (s *sheet) belonging(name string) (end func()) {
	before := s.of
	s.of = name
	return func() { s.of = before }
}

// Widths of lines and the pattern of broken ones.
const (
	fine  = 0.25
	heavy = 0.6
)

func broken() []vg.Length { return []vg.Length{mm(1.2), mm(0.8)} }

func (s *sheet) stroke(path vg.Path, width float64, dash []vg.Length) {
	s.add(shape{path: path, width: mm(width), dash: dash, ink: ink})
}

func lines(points []at, closed bool) vg.Path {
	var path vg.Path
	for i, p := range points {
		if i == 0 {
			path.Move(p.point())
		} else {
			path.Line(p.point())
		}
	}
	if closed {
		path.Close()
	}
	return path
}

// line draws a wire or the line of a symbol.
func (s *sheet) line(points ...at) { s.stroke(lines(points, false), fine, nil) }

// heavyLine draws an electrode.
func (s *sheet) heavyLine(points ...at) { s.stroke(lines(points, false), heavy, nil) }

// brokenLine draws what nobody fitted, a beam or a hidden edge.
func (s *sheet) brokenLine(points ...at) { s.stroke(lines(points, false), fine, broken()) }

// outline draws a closed figure filled with paper.
func (s *sheet) outline(points ...at) {
	s.fill(paper, points...)
	s.stroke(lines(points, true), fine, nil)
}

// fill fills a figure.
func (s *sheet) fill(c color.Gray, points ...at) {
	s.add(shape{path: lines(points, true), ink: c})
}

// circle draws a circle filled with paper.
func (s *sheet) circle(centre at, radius float64) {
	path := round(centre, radius, 0, 2*math.Pi)
	s.add(shape{path: path, ink: paper})
	s.stroke(path, fine, nil)
}

// arc draws a part of a circle; angles in radians, from the right and upwards.
func (s *sheet) arc(centre at, radius, from, turn float64) {
	s.stroke(round(centre, radius, from, turn), fine, nil)
}

func round(centre at, radius, from, turn float64) vg.Path {
	var path vg.Path
	path.Move(centre.plus(radius*math.Cos(from), radius*math.Sin(from)).point())
	path.Arc(centre.point(), mm(radius), from, turn)
	return path
}

// dot draws a joint of wires.
func (s *sheet) dot(p at) {
	s.add(shape{path: round(p, 0.55, 0, 2*math.Pi), ink: ink})
}

// align is on which side of its place a text stands.
type align float64

// The alignments, as the share of the text's width to the left of its place.
const (
	toRight align = 0
	centred align = 0.5
	toLeft  align = 1
)

// write sets a text, its middle at the height of the place.
func (s *sheet) write(p at, a align, t style, text string) { s.writeIn(ink, p, a, t, text) }

func (s *sheet) writeIn(c color.Gray, p at, a align, t style, text string) {
	if text = clean(text); text == "" {
		return
	}
	width := s.wide(t, text)
	p = p.plus(-float64(a)*width, -0.36*t.size)
	s.add(shape{ink: c, text: text, face: s.face(t), wide: width, at: p.point()})
}

// margin is left free around a picture.
const margin = 1.0

// picture is what was drawn, cut to its size.
func (s *sheet) picture() *Picture {
	if len(s.shapes) == 0 {
		return &Picture{}
	}
	b := s.box()
	corner := at{b.left - margin, b.low - margin}
	return &Picture{Width: mm(b.right - b.left + 2*margin), Height: mm(b.high - b.low + 2*margin), shapes: s.shapes, corner: corner.point()}
}

// box is the sides of a rectangle.
type box struct{ left, low, right, high float64 }

// box is what the shapes drawn so far take.
func (s *sheet) box() box {
	all := box{math.Inf(1), math.Inf(1), math.Inf(-1), math.Inf(-1)}
	for _, sh := range s.shapes {
		all = all.with(sh.box())
	}
	return all
}

func (b box) with(c box) box {
	return box{min(b.left, c.left), min(b.low, c.low), max(b.right, c.right), max(b.high, c.high)}
}

// lowest is how low the shapes drawn so far reach to the right of a place.
func (s *sheet) lowest(x float64) float64 {
	low := math.Inf(1)
	for _, sh := range s.shapes {
		if b := sh.box(); b.right > x {
			low = min(low, b.low)
		}
	}
	return low
}

// box is the rectangle that a shape stays within; of an arc that of its circle.
func (sh shape) box() box {
	r := sh.bounds()
	return box{millimetres(r.Min.X), millimetres(r.Min.Y), millimetres(r.Max.X), millimetres(r.Max.Y)}
}

func millimetres(l vg.Length) float64 { return float64(l / vg.Millimeter) }

// bounds is the rectangle that a shape stays within; of an arc that of its circle.
func (sh shape) bounds() vg.Rectangle {
	if sh.text != "" {
		size := sh.face.Font.Size
		return vg.Rectangle{Min: sh.at.Sub(vg.Point{Y: size / 4}), Max: sh.at.Add(vg.Point{X: mm(sh.wide), Y: size * 3 / 4})}
	}
	var b vg.Rectangle
	for i, c := range sh.path {
		reach := vg.Point{X: c.Radius, Y: c.Radius}
		low, high := c.Pos.Sub(reach), c.Pos.Add(reach)
		switch {
		case c.Type == vg.CloseComp:
		case i == 0:
			b = vg.Rectangle{Min: low, Max: high}
		default:
			b.Min.X, b.Min.Y = min(b.Min.X, low.X), min(b.Min.Y, low.Y)
			b.Max.X, b.Max.Y = max(b.Max.X, high.X), max(b.Max.Y, high.Y)
		}
	}
	return b
}
