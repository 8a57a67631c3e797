package drawing

import (
	"bytes"
	"fmt"
	"html"
	"math"
	"strconv"
	"strings"

	xfont "golang.org/x/image/font"
	"gonum.org/v1/plot/vg"
)

// SVG writes the picture as one svg element, to stand in a page or, as it is, in a
// file. Ink is the current colour of the page; what is paper has the class "paper", so
// that a page can give it its own. It holds no style attributes, which a strict
// content security policy would refuse. Title and description are for those who do
// not see it; id makes their names unique in the page.
func (p *Picture) SVG(id, title, description string) []byte {
	w := &svgWriter{height: p.Height, corner: p.corner}
	fmt.Fprintf(w, `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 %s %s" role="img" aria-labelledby="%s-title %s-description">`,
		decimal(p.Width), decimal(p.Height), id, id)
	fmt.Fprintf(w, "\n<title id=\"%s-title\">%s</title>\n<desc id=\"%s-description\">%s</desc>\n", id, escaped(title), id, escaped(description))
	w.WriteString(`<g fill="none" stroke="currentColor" stroke-linecap="round" stroke-linejoin="round" font-family="DejaVu Sans, Verdana, sans-serif">` + "\n")
	w.all(p.shapes)
	w.WriteString("</g>\n</svg>\n")
	return w.Bytes()
}

// all writes shapes; those that belong together in a group that names what they show.
func (w *svgWriter) all(shapes []shape) {
	of := ""
	for _, s := range shapes {
		if s.of != of && of != "" {
			w.WriteString("</g>\n")
		}
		if s.of != of && s.of != "" {
			fmt.Fprintf(w, "<g data-of=\"%s\">\n", escaped(s.of))
		}
		of = s.of
		w.shape(s)
	}
	if of != "" {
		w.WriteString("</g>\n")
	}
}

func escaped(text string) string { return html.EscapeString(clean(text)) }

type svgWriter struct {
	bytes.Buffer
	height vg.Length
	corner vg.Point
}

func (w *svgWriter) shape(s shape) {
	switch {
	case s.text != "":
		w.text(s)
	case s.width == 0:
		w.data(s.path)
		w.WriteString(paint(s) + "/>\n")
	default:
		w.data(s.path)
		w.WriteString(` stroke-width="` + decimal(s.width) + `"` + dashes(s.dash) + faint(s) + "/>\n")
	}
}

// paint fills a shape or text.
func paint(s shape) string {
	if s.ink == paper {
		return ` class="paper" fill="#fff" stroke="none"`
	}
	return ` fill="currentColor" stroke="none"`
}

// faint lines take their strength from the ink of the page.
func faint(s shape) string {
	if s.ink == grid {
		return ` class="grid" opacity="0.3"`
	}
	return ""
}

func dashes(dash []vg.Length) string {
	if dash == nil {
		return ""
	}
	parts := make([]string, len(dash))
	for i, d := range dash {
		parts[i] = decimal(d)
	}
	return ` stroke-dasharray="` + strings.Join(parts, " ") + `" stroke-linecap="butt"`
}

// text is held to the width it was laid out with, whatever font shows it.
func (w *svgWriter) text(s shape) {
	weight := ""
	if s.face.Font.Weight == xfont.WeightBold {
		weight = ` font-weight="bold"`
	}
	w.place(`<text x="`, s.at, `" y="`)
	fmt.Fprintf(w, "\" font-size=\"%s\" textLength=\"%s\" lengthAdjust=\"spacingAndGlyphs\"%s%s>%s</text>\n",
		decimal(s.face.Font.Size), decimal(mm(s.wide)), weight, paint(s), escaped(s.text))
}

// place writes a point with the picture's upper left corner as its origin, and what
// stands before each of its numbers.
func (w *svgWriter) place(before string, p vg.Point, between string) {
	p = p.Sub(w.corner)
	w.WriteString(before)
	w.Write(appended(w.AvailableBuffer(), p.X))
	w.WriteString(between)
	w.Write(appended(w.AvailableBuffer(), w.height-p.Y))
}

// data begins an element with a path in SVG's own terms.
func (w *svgWriter) data(path vg.Path) {
	w.WriteString(`<path d="`)
	for _, c := range path {
		switch c.Type {
		case vg.MoveComp:
			w.place("M", c.Pos, " ")
		case vg.LineComp:
			w.place("L", c.Pos, " ")
		case vg.ArcComp:
			w.arc(c)
		case vg.CurveComp:
			w.WriteString(map[int]string{1: "Q", 2: "C"}[len(c.Control)])
			for _, p := range c.Control {
				w.place("", p, " ")
				w.WriteByte(' ')
			}
			w.place("", c.Pos, " ")
		case vg.CloseComp:
			w.WriteByte('Z')
		}
	}
	w.WriteByte('"')
}

// arc draws an arc in two halves, since SVG knows none that ends where it began.
func (w *svgWriter) arc(c vg.PathComp) {
	sweep := "0" // of angles that grow upwards, while SVG's grow downwards
	if c.Angle < 0 {
		sweep = "1"
	}
	radius := decimal(c.Radius)
	for _, share := range []float64{0.5, 1} {
		angle := c.Start + c.Angle*share
		end := c.Pos.Add(vg.Point{X: c.Radius * vg.Length(math.Cos(angle)), Y: c.Radius * vg.Length(math.Sin(angle))})
		w.place("A"+radius+" "+radius+" 0 0 "+sweep+" ", end, " ")
	}
}

// decimal is a length in millimetres to a hundredth.
func decimal(l vg.Length) string { return string(appended(nil, l)) }

// appended writes a length in millimetres to a hundredth into an empty line.
func appended(line []byte, l vg.Length) []byte {
	line = strconv.AppendFloat(line, millimetres(l), 'f', 2, 64)
	line = bytes.TrimRight(bytes.TrimRight(line, "0"), ".")
	if string(line) == "-0" {
		return line[1:]
	}
	return line
}
