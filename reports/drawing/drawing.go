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

// Schematic draws a diagram; an empty picture where there is none.
func Schematic(d *diagram.Diagram) (*Picture, error) {
	faces, err := newFaces()
	if err != nil {
		return nil, err
	}
	s := &sheet{faces: faces}
	if d != nil {
		s.schematic(d)
	}
	return s.picture(), nil
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
)
