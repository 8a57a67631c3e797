package pdf

import (
	"fmt"
	"image"
	"image/color"
	"math"

	xfont "golang.org/x/image/font"
	"gonum.org/v1/plot/font"
	"gonum.org/v1/plot/vg"
)

// matrix turns a place on a canvas into one on the sheet: x' = a x + c y + e and
// y' = b x + d y + f, in millimetres.
type matrix struct{ a, b, c, d, e, f float64 }

func (m matrix) at(p vg.Point) (x, y float64) {
	px, py := float64(p.X/vg.Millimeter), float64(p.Y/vg.Millimeter)
	return m.a*px + m.c*py + m.e, m.b*px + m.d*py + m.f
}

// after is the matrix that first does n.
func (m matrix) after(n matrix) matrix {
	return matrix{
		m.a*n.a + m.c*n.b, m.b*n.a + m.d*n.b, m.a*n.c + m.c*n.d, m.b*n.c + m.d*n.d,
		m.a*n.e + m.c*n.f + m.e, m.b*n.e + m.d*n.f + m.f,
	}
}

// size is by how much lengths grow.
func (m matrix) size() float64 { return math.Sqrt(math.Abs(m.a*m.d - m.b*m.c)) }

// canvas is a vg.Canvas on the present sheet; y grows upwards on it.
type canvas struct {
	out   *painter
	now   canvasState
	saved []canvasState
	err   error
}

type canvasState struct {
	matrix
	ink    color.Color
	width  vg.Length
	dash   []vg.Length
	offset vg.Length
}

var _ vg.Canvas = (*canvas)(nil)

// newCanvas has its origin at a place and shows all lengths at a scale.
func newCanvas(out *painter, x, y, scale float64) *canvas {
	c := &canvas{out: out, now: canvasState{matrix: matrix{scale, 0, 0, -scale, x, y}}}
	vg.Initialize(c)
	return c
}

func (c *canvas) SetLineWidth(w vg.Length) { c.now.width = w }
func (c *canvas) SetColor(ink color.Color) { c.now.ink = ink }
func (c *canvas) Rotate(angle float64) {
	s, k := math.Sincos(angle)
	c.now.matrix = c.now.after(matrix{k, s, -s, k, 0, 0})
}
func (c *canvas) Translate(p vg.Point) {
	c.now.matrix = c.now.after(matrix{1, 0, 0, 1, float64(p.X / vg.Millimeter), float64(p.Y / vg.Millimeter)})
}
func (c *canvas) Scale(x, y float64) { c.now.matrix = c.now.after(matrix{x, 0, 0, y, 0, 0}) }
func (c *canvas) Push()              { c.saved = append(c.saved, c.now) }
func (c *canvas) Pop() {
	c.now = c.saved[len(c.saved)-1]
	c.saved = c.saved[:len(c.saved)-1]
}

func (c *canvas) SetLineDash(pattern []vg.Length, offset vg.Length) {
	c.now.dash, c.now.offset = pattern, offset
}

// DrawImage refuses pixels: the sheets hold none.
func (c *canvas) DrawImage(vg.Rectangle, image.Image) {
	c.err = fmt.Errorf("a picture holds pixels")
}

func (c *canvas) Stroke(p vg.Path) {
	if c.now.width <= 0 {
		return
	}
	size := c.now.size()
	c.out.stroke(inkOf(c.now.ink))
	c.out.wide(float64(c.now.width/vg.Millimeter) * size)
	c.out.dashed(dashes(c.now.dash, size), float64(c.now.offset/vg.Millimeter)*size)
	c.path(p, "S\n")
}

func dashes(pattern []vg.Length, size float64) []float64 {
	var all []float64
	for _, d := range pattern {
		all = append(all, float64(d/vg.Millimeter)*size)
	}
	return all
}

func (c *canvas) Fill(p vg.Path) {
	c.out.fill(inkOf(c.now.ink))
	c.path(p, "f\n")
}

// path writes a path and how it is drawn.
func (c *canvas) path(p vg.Path, how string) {
	for _, s := range p {
		switch s.Type {
		case vg.MoveComp:
			c.to(s.Pos)
			c.out.put("m\n")
		case vg.LineComp:
			c.to(s.Pos)
			c.out.put("l\n")
		case vg.CurveComp:
			c.curve(s)
		case vg.ArcComp:
			c.arc(s)
		case vg.CloseComp:
			c.out.put("h\n")
		}
	}
	c.out.put(how)
}

// to writes a place.
func (c *canvas) to(p vg.Point) {
	x, y := c.place(p)
	c.out.at(x, y)
}

// place is where a point lies on the sheet; one that lies nowhere is refused.
func (c *canvas) place(p vg.Point) (x, y float64) {
	x, y = c.now.at(p)
	if math.IsNaN(x) || math.IsNaN(y) || math.Abs(x) > 1e4 || math.Abs(y) > 1e4 {
		c.err = fmt.Errorf("a picture reaches nowhere")
		return 0, 0
	}
	return x, y
}

func (c *canvas) curve(s vg.PathComp) {
	for _, p := range s.Control {
		c.to(p)
	}
	c.to(s.Pos)
	if len(s.Control) == 1 {
		c.out.put("v\n")
		return
	}
	c.out.put("c\n")
}

// arc draws an arc as cubic curves of at most a quarter turn each, which stay within
// 3e-4 of its radius.
func (c *canvas) arc(s vg.PathComp) {
	pieces := max(1, int(math.Ceil(math.Abs(s.Angle)/(math.Pi/2)-1e-9)))
	step := s.Angle / float64(pieces)
	k := vg.Length(4.0 / 3 * math.Tan(step/4))
	for i := range pieces {
		from, to := s.Start+step*float64(i), s.Start+step*float64(i+1)
		sin, cos := math.Sincos(from)
		sin2, cos2 := math.Sincos(to)
		p := s.Pos.Add(vg.Point{X: s.Radius * vg.Length(cos), Y: s.Radius * vg.Length(sin)})
		q := s.Pos.Add(vg.Point{X: s.Radius * vg.Length(cos2), Y: s.Radius * vg.Length(sin2)})
		c.curve(vg.PathComp{Pos: q, Control: []vg.Point{
			p.Add(vg.Point{X: -k * s.Radius * vg.Length(sin), Y: k * s.Radius * vg.Length(cos)}),
			q.Add(vg.Point{X: k * s.Radius * vg.Length(sin2), Y: -k * s.Radius * vg.Length(cos2)}),
		}})
	}
}

// FillString writes a text; that it is turned is known from the matrix.
func (c *canvas) FillString(f font.Face, p vg.Point, text string) {
	x, y := c.place(p)
	cut := regular
	if f.Font.Weight >= xfont.WeightBold {
		cut = bold
	}
	c.out.fill(inkOf(c.now.ink))
	c.out.letters(cut, float64(f.Font.Size/vg.Points(1))*c.now.size())
	text = c.out.fonts.guard(cut, text)
	angle := -math.Atan2(c.now.b, c.now.a)
	if math.Abs(angle) < 1e-9 {
		c.out.text(x, y, text)
		return
	}
	c.out.turned(x, y, angle, func() { c.out.text(x, y, text) })
}
