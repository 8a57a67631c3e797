package pdf

import (
	"errors"
	"fmt"
	"math"

	"github.com/jung-kurt/gofpdf"
)

// sheet is what is drawn on one page, in order, in millimetres from its top left.
type sheet struct{ items []item }

// item is a piece of text, a line or a box.
type item interface {
	draw(*painter)
	numbers() []float64
}

// painter puts items into a file; it knows where links lead.
type painter struct {
	*gofpdf.Fpdf
	operators
	fonts *fonts
	links map[string]int
	err   error // what a picture could not draw
	ink   [3]int
	cut   string  // of the type that is set
	size  float64 // in points
}

// letters sets the type, once for all that has it.
func (p *painter) letters(c face, size float64) {
	cut := ""
	if c == bold {
		cut = "B"
	}
	if p.cut != cut || math.Abs(p.size-size) > 0 {
		p.cut, p.size = cut, size
		p.SetFont(family, cut, size)
	}
}

// write sets the colour of text, once for all that has it.
func (p *painter) write(r, g, b int) {
	if want := [3]int{r, g, b}; p.ink != want {
		p.ink = want
		p.SetTextColor(r, g, b)
	}
}

// written is text on a base line.
type written struct {
	x, y float64
	set
	white bool
}

// stroke is a straight line.
type stroke struct {
	x1, y1, x2, y2, width float64
	grey                  int
}

// box is a rectangle: filled black, or outlined.
type box struct {
	x, y, w, h, width float64
	filled, dashed    bool
}

func (s *sheet) add(i item) { s.items = append(s.items, i) }

// lines places set lines below a height.
func (s *sheet) lines(x, y float64, lines []set) {
	for _, l := range lines {
		s.add(written{x: x, y: y + l.style.size*points, set: l})
		y += l.style.leading()
	}
}

// paint draws a sheet; a coordinate that is no number is refused.
func paint(out *painter, s *sheet) error {
	for _, i := range s.items {
		for _, v := range i.numbers() {
			if math.IsNaN(v) || math.Abs(v) > 1e4 {
				return fmt.Errorf("%T lies nowhere", i)
			}
		}
		i.draw(out)
	}
	return errors.Join(out.err, out.Error())
}

func (w written) numbers() []float64 { return []float64{w.x, w.y, w.style.size} }

func (w written) draw(out *painter) {
	ink := 0
	if w.white {
		ink = 255
	}
	out.letters(w.style.face, w.style.size)
	out.write(ink, ink, ink)
	out.Text(w.x, w.y, w.text)
}

func (l stroke) numbers() []float64 { return []float64{l.x1, l.y1, l.x2, l.y2, l.width} }

func (l stroke) draw(out *painter) {
	out.SetDrawColor(l.grey, l.grey, l.grey)
	out.SetLineWidth(l.width)
	out.Line(l.x1, l.y1, l.x2, l.y2)
}

func (b box) numbers() []float64 { return []float64{b.x, b.y, b.w, b.h, b.width} }

func (b box) draw(out *painter) {
	out.SetDrawColor(0, 0, 0)
	out.SetFillColor(0, 0, 0)
	out.SetLineWidth(b.width)
	how := "D"
	if b.filled {
		how = "F"
	}
	if b.dashed {
		out.SetDashPattern([]float64{1.2, 0.8}, 0)
		defer out.SetDashPattern(nil, 0)
	}
	out.Rect(b.x, b.y, b.w, b.h, how)
}
