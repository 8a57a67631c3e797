package pdf

import (
	"fmt"
	"math"
)

// sheet is what stands on one page, in order, in millimetres from its top left.
type sheet struct{ items []item }

// item is a piece of text, a line or a box, or what the file notes of the sheet.
type item interface{ nowhere() bool }

// seen is an item that is drawn.
type seen interface{ draw(*painter) }

// noted is an item that the file notes.
type noted interface{ note(*binding) }

// written is text on a base line.
type written struct {
	x, y float64
	set
	white bool
}

// stroke is a straight line.
type stroke struct {
	x1, y1, x2, y2, width float64
	grey                  uint8
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
func (p *painter) paint(s *sheet) error {
	for _, i := range s.items {
		if i.nowhere() {
			return fmt.Errorf("%T lies nowhere", i)
		}
		if i, is := i.(seen); is {
			i.draw(p)
		}
	}
	return p.err
}

// lost reports whether some coordinate is no number, or on no sheet.
func lost(all ...float64) bool {
	for _, v := range all {
		if math.IsNaN(v) || math.Abs(v) > 1e4 {
			return true
		}
	}
	return false
}

func (w written) nowhere() bool { return lost(w.x, w.y, w.style.size) }

func (w written) draw(p *painter) {
	ink := black
	if w.white {
		ink = white
	}
	p.letters(w.style.face, w.style.size)
	p.fill(ink)
	p.text(w.x, w.y, w.text)
}

func (l stroke) nowhere() bool { return lost(l.x1, l.y1, l.x2, l.y2, l.width) }

func (l stroke) draw(p *painter) {
	p.stroke(grey(l.grey))
	p.wide(l.width)
	p.dashed(nil, 0)
	p.at(l.x1, l.y1)
	p.put("m ")
	p.at(l.x2, l.y2)
	p.put("l S\n")
}

func (b box) nowhere() bool { return lost(b.x, b.y, b.w, b.h, b.width) }

func (b box) draw(p *painter) {
	how := "S"
	if b.filled {
		how = "f"
		p.fill(black)
	} else {
		p.stroke(black)
		p.wide(b.width)
		p.dashed(b.pattern(), 0)
	}
	p.at(b.x, b.y)
	p.lengths(b.w, -b.h)
	p.put("re ")
	p.put(how)
	p.put("\n")
}

func (b box) pattern() []float64 {
	if b.dashed {
		return []float64{1.2, 0.8}
	}
	return nil
}
