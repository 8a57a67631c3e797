package drawing

import "kilovet/rules/diagram"

// Sizes along the rail.
const (
	drop       = 26 // height of what hangs at a node
	seriesRoom = 5  // of wire at each side of a part in series
	hangRoom   = 4  // between a part and its label
	labelRoom  = 6  // between the label of one and the next
	earthDepth = 4
)

// zone is a piece of the drawing along the rail, which enters at its left: how far it
// reaches to the right, above and below the rail.
type zone struct {
	width, over, under float64
	ends               bool // the rail does not go on
	draw               func(origin at)
}

// spanZone is a part in series and what hangs at the node behind it.
func (s *sheet) spanZone(span diagram.Span) zone {
	series := s.seriesZone(span.Series)
	node := s.nodeZone(span)
	return zone{
		width: series.width + node.width, over: max(series.over, node.over), under: max(series.under, node.under),
		draw: func(origin at) {
			series.draw(origin)
			node.draw(origin.plus(series.width, 0))
		},
	}
}

func (s *sheet) seriesZone(p *diagram.Part) zone {
	if p == nil {
		return zone{draw: func(at) {}}
	}
	l := s.label(p)
	l.flag = pennant{} // below the part
	width, height := s.labelSize(l)
	f := s.flagOf(p.Mark, true)
	width = max(width, 2*flagReach(p, s.flagWidth(f)), 2*bodies[p.Kind].half) + 2*seriesRoom
	return zone{
		width: width, over: height + 2, under: earthDepth + 4,
		draw: func(origin at) {
			defer s.belonging(p.Name)()
			s.part(p, origin, origin.plus(width, 0))
			s.above(origin.plus(width/2, 2), centred, l)
			if f.number > 0 {
				s.flag(origin.plus(width/2-flagShift(p, s.flagWidth(f)), -4), f)
			}
		},
	}
}

// flagShift is how far to the left of a part's middle its flag begins: of a cable, to
// the right of the earth of its screen.
func flagShift(p *diagram.Part, width float64) float64 {
	if p.Kind == diagram.Cable {
		return 1
	}
	return width / 2
}

// flagReach is how far it reaches to the right of the middle.
func flagReach(p *diagram.Part, width float64) float64 { return width - flagShift(p, width) }

// nodeZone is a node with its label above the rail and what hangs at it below.
func (s *sheet) nodeZone(span diagram.Span) zone {
	if span.Node.Name == "" && len(span.Hanging) == 0 {
		return zone{draw: func(at) {}}
	}
	l := s.nodeLabel(span.Node)
	width, height := s.labelSize(l)
	z := zone{over: height + 1}
	var hanging []zone
	x := 0.0
	for _, h := range span.Hanging {
		next := s.hangingZone(h)
		hanging = append(hanging, next)
		x += next.width
		z.under = max(z.under, next.under)
	}
	z.width = max(width+3, x)
	z.draw = func(origin at) {
		s.line(origin, origin.plus(z.width, 0))
		s.dot(origin)
		s.above(origin.plus(1, 1), toRight, l)
		p := origin
		for _, h := range hanging {
			s.dot(p)
			h.draw(p)
			p = p.plus(h.width, 0)
		}
	}
	return z
}

// hangingZone is what lies between a node and earth.
func (s *sheet) hangingZone(h diagram.Hanging) zone {
	z := zone{under: drop*float64(len(h.Parts)) + earthDepth}
	for i := range h.Parts {
		z.width = max(z.width, s.uprightWidth(&h.Parts[i]))
	}
	beside := 0.0
	for i := range h.Beside {
		beside += s.uprightWidth(&h.Beside[i])
	}
	lower := z.width // of the part that others stand beside
	if len(h.Beside) > 0 {
		tap, _ := s.labelSize(s.nodeLabel(h.Tap))
		lower = max(lower, tap+labelRoom)
		z.width = lower + beside
	}
	z.draw = func(origin at) {
		p := origin
		for i := range h.Parts {
			s.uprightLine(&h.Parts[i], p, "ground")
			switch last := len(h.Parts) - 1; {
			case i < last: // out of the way of the tap's label
				s.stacked(p.plus(hangRoom, -2.5), toRight, s.label(&h.Parts[i]))
			case i > 0:
				s.tapped(h, p, lower)
				fallthrough
			default:
				s.beside(p.plus(hangRoom, -drop/2), toRight, s.label(&h.Parts[i]))
			}
			p = p.plus(0, -drop)
		}
		s.earth(p)
	}
	return z
}

// tapped draws the tap and what stands beside the last part.
func (s *sheet) tapped(h diagram.Hanging, tap at, right float64) {
	s.dot(tap)
	s.above(tap.plus(2, 0.5), toRight, s.nodeLabel(h.Tap))
	p, last := tap.plus(right, 0), tap
	for i := range h.Beside {
		s.line(last, p)
		s.upright(&h.Beside[i], p, "ground")
		s.earth(p.plus(0, -drop))
		last = p
		p = p.plus(s.uprightWidth(&h.Beside[i]), 0)
	}
}

// uprightWidth is the room of an upright part with its label to the right.
func (s *sheet) uprightWidth(p *diagram.Part) float64 {
	width, _ := s.labelSize(s.label(p))
	return hangRoom + width + labelRoom
}

// upright draws a part downwards from a place, with its label to the right; low names
// the node at its lower end.
func (s *sheet) upright(p *diagram.Part, top at, low string) {
	s.uprightLine(p, top, low)
	s.beside(top.plus(hangRoom, -drop/2), toRight, s.label(p))
}

func (s *sheet) uprightLine(p *diagram.Part, top at, low string) {
	bottom := top.plus(0, -drop)
	if p.From == low {
		top, bottom = bottom, top
	}
	s.part(p, top, bottom)
}
