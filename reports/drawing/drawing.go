// Package drawing draws the schematic of a chain on a vector canvas, with symbols
// after IEC 60617, in black on white: what the rules say against a part stands beside
// it as a flag whose outline and word tell the verdict without colour.
package drawing

import (
	"image/color"
	"slices"

	"gonum.org/v1/plot/vg"

	"kilovet/rules/diagram"
)

// Picture is a drawing of a fixed size, made of lines, filled shapes and text.
type Picture struct {
	Width, Height vg.Length
	shapes        []shape
	corner        vg.Point // lower left
}

// Spot is where a part or node stands in a picture, from its lower left corner.
type Spot struct {
	Of   string
	Area vg.Rectangle
}

// Spots lists where parts and nodes stand, each place of each once.
func (p *Picture) Spots() []Spot {
	var all []Spot
	for _, s := range p.shapes {
		b := s.bounds()
		area := vg.Rectangle{Min: b.Min.Sub(p.corner), Max: b.Max.Sub(p.corner)}
		switch last := len(all) - 1; {
		case s.of == "":
		case last >= 0 && all[last].Of == s.of:
			all[last].Area = around(all[last].Area, area)
		default:
			all = append(all, Spot{s.of, area})
		}
	}
	return all
}

// around is the smallest rectangle that holds both.
func around(a, b vg.Rectangle) vg.Rectangle {
	return vg.Rectangle{
		Min: vg.Point{X: min(a.Min.X, b.Min.X), Y: min(a.Min.Y, b.Min.Y)},
		Max: vg.Point{X: max(a.Max.X, b.Max.X), Y: max(a.Max.Y, b.Max.Y)},
	}
}

// Pen draws; it knows the type. It is not for several goroutines at once.
type Pen struct{ faces *faces }

// NewPen reads the type.
func NewPen() (*Pen, error) {
	faces, err := newFaces()
	if err != nil {
		return nil, err
	}
	return &Pen{faces}, nil
}

// Schematic draws a diagram with its legend; an empty picture where there is none.
func (pen *Pen) Schematic(d *diagram.Diagram) *Picture {
	s := &sheet{faces: pen.faces}
	if d != nil {
		s.schematic(d, rowWidth)
	}
	return s.picture()
}

// SchematicIn draws a diagram without a legend, laid out so that it need be made
// smaller as little as can be to fit into a room.
func (pen *Pen) SchematicIn(d *diagram.Diagram, width, height vg.Length) *Picture {
	best, most := &Picture{}, 0.0
	for row := 80.0; d != nil && row <= rowWidth; row += 25 {
		s := &sheet{faces: pen.faces, bare: true}
		s.schematic(d, row)
		p := s.picture()
		if scale := p.Scale(width, height); scale > most*1.01 {
			best, most = p, scale
		}
	}
	return best
}

// Scale is by how much the picture is to be made smaller to fit into a room; at most 1.
func (p *Picture) Scale(width, height vg.Length) float64 {
	return min(1, float64(width/p.Width), float64(height/p.Height))
}

// Draw puts the picture on a canvas, its lower left corner at the canvas's origin.
func (p *Picture) Draw(c vg.Canvas) {
	for _, s := range p.shapes {
		c.SetColor(s.ink)
		if s.text != "" {
			c.FillString(s.face, s.at.Sub(p.corner), s.text)
			continue
		}
		path := moved(s.path, p.corner)
		if s.width == 0 {
			c.Fill(path)
			continue
		}
		c.SetLineWidth(s.width)
		c.SetLineDash(s.dash, 0)
		c.Stroke(path)
	}
	vg.Initialize(c)
}

// moved is a path seen from another origin.
func moved(path vg.Path, origin vg.Point) vg.Path {
	out := make(vg.Path, len(path))
	for i, c := range path {
		c.Pos = c.Pos.Sub(origin)
		c.Control = slices.Clone(c.Control)
		for j := range c.Control {
			c.Control[j] = c.Control[j].Sub(origin)
		}
		out[i] = c
	}
	return out
}

// The inks of a drawing.
var (
	ink   = color.Gray{0}
	paper = color.Gray{255}
	grid  = color.Gray{180}
)
