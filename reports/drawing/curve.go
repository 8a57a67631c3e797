package drawing

import (
	"math"

	"gonum.org/v1/plot/vg"

	"kilovet/rules/exhibit"
)

// Sizes of a curve in millimetres.
const (
	frameShare = 0.56 // height of the frame over its width
	mostTall   = 1.2  // of one drawn to scale
	tickLength = 1.2
	tickRoom   = 15.0 // between two labels along a side, about
	tickRise   = 9.0  // and up one
	endRoom    = 5.0  // right of the frame: half a label, and the letters of levels
)

// Curve draws a curve of a given width: a frame with its axes, lines told apart by
// their dashes and numbers, marks and levels by their letters, and a key under it that
// says what they are. Two lengths are drawn to the same scale.
func (pen *Pen) Curve(c exhibit.Curve, width vg.Length) *Picture {
	s := &plot{sheet: &sheet{faces: pen.faces}, Curve: c, width: millimetres(width) - 2*margin}
	s.draw()
	p := s.picture()
	p.Width = width // also where little is drawn
	return p
}

// plot draws one curve.
type plot struct {
	*sheet
	exhibit.Curve
	width   float64
	x, y    scale
	tags    []box  // places taken by numbers and letters
	courses [][]at // of all lines, once they are numbered
	key     []entry
}

func (p *plot) draw() {
	if p.holdsNothing() {
		p.write(at{0, 0}, toRight, named, "Nothing to draw.")
		return
	}
	p.layOut()
	p.axes()
	p.areas()
	for i, l := range p.Lines {
		p.polyline(i, l)
	}
	for i, l := range p.Levels {
		p.level(i, l)
	}
	for i, m := range p.Marks {
		p.mark(i, m)
	}
	for i, l := range p.Lines {
		if p.first(i) == i {
			p.numberLine(i, l)
		}
	}
	p.explain()
}

func (p *plot) holdsNothing() bool {
	for _, l := range p.Lines {
		if len(l.Points) > 0 {
			return false
		}
	}
	return len(p.Marks) == 0
}

// layOut chooses ranges and ticks: the labels at the left take the room that they
// need, the frame what is left.
func (p *plot) layOut() {
	x, y := p.reach()
	p.x, p.y = newScale(p.X, x.low, x.high, true), newScale(p.Y, y.low, y.high, false)
	p.y.length = p.width * frameShare
	p.y.mark(int(p.y.length/tickRise), true)
	left := p.labelRoom()
	p.x.start, p.x.length = left, p.width-left-endRoom
	p.x.mark(int(p.x.length/tickRoom), false)
	p.y.length = p.x.length * frameShare
	if p.toScale() {
		p.equalise()
	}
	p.y.mark(int(p.y.length/tickRise), true)
	for parts := int(p.x.length / tickRoom); parts > 1 && p.crowded(); parts-- {
		p.x.mark(parts-1, false)
	}
}

func (p *plot) labelRoom() float64 {
	most := 0.0
	for _, t := range p.y.ticks {
		most = max(most, p.wide(named, t.label))
	}
	return most + tickLength + 1
}

// crowded reports whether labels under the frame come too near to each other.
func (p *plot) crowded() bool {
	end := math.Inf(-1)
	for _, t := range p.x.ticks {
		if t.label == "" {
			continue
		}
		half := p.wide(named, t.label) / 2
		if p.x.at(t.value)-half < end+1.5 {
			return true
		}
		end = p.x.at(t.value) + half
	}
	return false
}

// toScale reports whether both sides are lengths, as in a section through a body.
func (p *plot) toScale() bool {
	return p.X.Unit == "m" && p.Y.Unit == "m" && !p.X.Log && !p.Y.Log
}

// equalise gives both axes the same scale, whatever is higher than wide being made
// smaller.
func (p *plot) equalise() {
	p.y.length = p.x.length * (p.y.to - p.y.from) / (p.x.to - p.x.from)
	switch {
	case p.y.length > mostTall*p.x.length:
		tall := mostTall * p.x.length
		p.x.length *= tall / p.y.length
		p.y.length = tall
	case p.y.length < 0.15*p.x.length: // room for two labels
		p.y.length = 0.15 * p.x.length
		middle, half := (p.y.from+p.y.to)/2, 0.15*(p.x.to-p.x.from)/2
		p.y.from, p.y.to = middle-half, middle+half
	}
}

// span is the least and greatest of some values.
type span struct{ low, high float64 }

func (s *span) take(v float64) { s.low, s.high = min(s.low, v), max(s.high, v) }

// reach is what the curve spans along both axes.
func (p *plot) reach() (x, y span) {
	x, y = span{math.Inf(1), math.Inf(-1)}, span{math.Inf(1), math.Inf(-1)}
	for _, l := range p.Lines {
		for _, q := range l.Points {
			x.take(q.X)
			y.take(q.Y)
		}
	}
	for _, m := range p.Marks {
		x.take(m.X)
		y.take(m.Y)
	}
	for _, l := range p.Levels {
		if l.Along {
			x.take(l.Value)
		} else {
			y.take(l.Value)
		}
	}
	return x, y
}

// place is where a point stands.
func (p *plot) place(q exhibit.Point) at { return at{p.x.at(q.X), p.y.at(q.Y)} }

// axes draws the frame, ticks with their labels, and what the sides show.
func (p *plot) axes() {
	left, right, low, high := p.x.start, p.x.start+p.x.length, p.y.start, p.y.start+p.y.length
	for _, t := range p.x.ticks {
		x := p.x.at(t.value)
		p.gridLine(at{x, low}, at{x, high})
		p.line(at{x, low}, at{x, low - p.tickReach(t)})
		p.write(at{x, low - tickLength - 2}, centred, named, t.label)
	}
	for _, t := range p.y.ticks {
		y := p.y.at(t.value)
		p.gridLine(at{left, y}, at{right, y})
		p.line(at{left, y}, at{left - p.tickReach(t), y})
		p.write(at{left - tickLength - 0.8, y}, toLeft, named, t.label)
	}
	p.stroke(lines([]at{{left, low}, {right, low}, {right, high}, {left, high}}, true), fine, nil)
	p.write(at{0, high + 3.4}, toRight, named, p.shortened(p.y.title, p.width))
	p.write(at{right, low - tickLength - 5.4}, toLeft, named, p.shortened(p.x.title, right))
}

// tickReach is shorter where a tick bears no label.
func (p *plot) tickReach(t tick) float64 {
	if t.label == "" {
		return tickLength / 2
	}
	return tickLength
}

func (p *plot) gridLine(from, to at) {
	p.add(shape{path: lines([]at{from, to}, false), width: mm(0.15), ink: grid})
}

// shortened cuts a text to a width, and shows that it did.
func (s *sheet) shortened(text string, width float64) string {
	text = clean(text)
	if s.wide(named, text) <= width {
		return text
	}
	return string([]rune(text)[:s.fits(named, text, width-s.wide(named, "…"))]) + "…"
}
