package drawing

import (
	"math"

	"kilovet/rules/diagram"
)

// frame lays a symbol along a line: x along it from the symbol's middle, y to the left.
type frame struct {
	middle at
	dx, dy float64 // unit vector along the line
}

func between(from, to at) (f frame, length float64) {
	length = math.Hypot(to.x-from.x, to.y-from.y)
	return frame{at{(from.x + to.x) / 2, (from.y + to.y) / 2}, (to.x - from.x) / length, (to.y - from.y) / length}, length
}

func (f frame) at(x, y float64) at {
	return f.middle.plus(x*f.dx-y*f.dy, x*f.dy+y*f.dx)
}

func (f frame) all(points ...at) []at {
	out := make([]at, len(points))
	for i, p := range points {
		out[i] = f.at(p.x, p.y)
	}
	return out
}

// rectangle is the corners of one around the middle.
func (f frame) rectangle(halfLength, halfWidth float64) []at {
	return f.all(at{-halfLength, -halfWidth}, at{halfLength, -halfWidth}, at{halfLength, halfWidth}, at{-halfLength, halfWidth})
}

// bodies holds, for each kind of part, its symbol and half its length.
var bodies = map[diagram.Kind]struct {
	half float64
	draw func(*sheet, frame)
}{
	diagram.Resistor:    {3.5, (*sheet).resistor},
	diagram.Capacitor:   {0.7, (*sheet).capacitor},
	diagram.Inductor:    {4, (*sheet).inductor},
	diagram.Diode:       {1.6, (*sheet).diode},
	diagram.Alternating: {3.2, (*sheet).alternating},
	diagram.Direct:      {3.2, (*sheet).direct},
	diagram.Battery:     {1.9, (*sheet).battery},
	diagram.Drain:       {3.2, (*sheet).drain},
	diagram.SparkGap:    {2.9, (*sheet).sparkGap},
	diagram.GasTube:     {3.2, (*sheet).gasTube},
	diagram.Varistor:    {3.5, (*sheet).varistor},
	diagram.Zener:       {1.6, (*sheet).zener},
	diagram.Meter:       {3.2, (*sheet).meter},
	diagram.Cable:       {7, (*sheet).cable},
	diagram.Transformer: {4.8, (*sheet).transformer},
}

// part draws a part with its leads between two places, its own From at the first.
func (s *sheet) part(p *diagram.Part, from, to at) {
	defer s.belonging(p.Name)()
	f, length := between(from, to)
	body := bodies[p.Kind]
	lead := s.line
	if p.Stray {
		lead = s.brokenLine
	}
	if length > 2*body.half {
		lead(from, f.at(-body.half, 0))
		lead(f.at(body.half, 0), to)
	}
	body.draw(s, f)
}

func (s *sheet) resistor(f frame) { s.outline(f.rectangle(3.5, 1.3)...) }

func (s *sheet) capacitor(f frame) {
	for _, x := range []float64{-0.7, 0.7} {
		s.line(f.all(at{x, -2.8}, at{x, 2.8})...)
	}
}

func (s *sheet) inductor(f frame) {
	along := math.Atan2(f.dy, f.dx)
	for _, x := range []float64{-3, -1, 1, 3} {
		s.arc(f.at(x, 0), 1, along, math.Pi)
	}
}

func (s *sheet) diode(f frame) {
	s.outline(f.all(at{-1.6, -1.8}, at{-1.6, 1.8}, at{1.6, 0})...)
	s.line(f.all(at{1.6, -1.8}, at{1.6, 1.8})...)
}

func (s *sheet) zener(f frame) {
	s.diode(f)
	s.line(f.all(at{1.6, 1.8}, at{0.7, 1.8})...)
}

func (s *sheet) alternating(f frame) {
	s.circle(f.middle, 3.2)
	s.arc(f.middle.plus(-0.9, 0), 0.9, 0, math.Pi)
	s.arc(f.middle.plus(0.9, 0), 0.9, math.Pi, math.Pi)
}

// direct is a source with its positive end marked.
func (s *sheet) direct(f frame) {
	s.circle(f.middle, 3.2)
	plus, minus := f.at(-1.6, 0), f.at(1.6, 0)
	s.line(plus.plus(-0.7, 0), plus.plus(0.7, 0))
	s.line(plus.plus(0, -0.7), plus.plus(0, 0.7))
	s.line(minus.plus(-0.7, 0), minus.plus(0.7, 0))
}

func (s *sheet) battery(f frame) {
	for _, x := range []float64{-1.9, 0.5} {
		s.line(f.all(at{x, -2.8}, at{x, 2.8})...)
		s.heavyLine(f.all(at{x + 1.4, -1.4}, at{x + 1.4, 1.4})...)
	}
	s.line(f.all(at{-0.5, 0}, at{0.5, 0})...)
	plus := f.at(-3.2, -2)
	s.line(plus.plus(-0.7, 0), plus.plus(0.7, 0))
	s.line(plus.plus(0, -0.7), plus.plus(0, 0.7))
}

// drain is a constant current with its direction.
func (s *sheet) drain(f frame) {
	s.circle(f.middle, 3.2)
	s.line(f.all(at{-2.2, 0}, at{1, 0})...)
	s.fill(ink, f.all(at{2.2, 0}, at{0.6, 0.9}, at{0.6, -0.9})...)
}

func (s *sheet) sparkGap(f frame) {
	for _, side := range []float64{-1, 1} {
		s.fill(ink, f.all(at{side * 0.5, 0}, at{side * 2.9, 1.2}, at{side * 2.9, -1.2})...)
	}
}

func (s *sheet) gasTube(f frame) {
	s.circle(f.middle, 3.2)
	for _, side := range []float64{-1, 1} {
		s.line(f.all(at{side * 3.2, 0}, at{side * 1, 0})...)
		s.heavyLine(f.all(at{side * 1, -1.4}, at{side * 1, 1.4})...)
	}
	s.dot(f.at(0, -2.1))
}

func (s *sheet) varistor(f frame) {
	s.resistor(f)
	s.line(f.all(at{-4.2, -2.4}, at{-3, -2.4}, at{3, 2.4})...)
}

func (s *sheet) meter(f frame) {
	s.circle(f.middle, 3.2)
	s.write(f.middle, centred, value, "V")
}

// cable is a line within its screen, which is earthed.
func (s *sheet) cable(f frame) {
	s.line(f.all(at{-7, 0}, at{7, 0})...)
	for _, y := range []float64{-1.5, 1.5} {
		s.line(f.all(at{-6, y}, at{6, y})...)
	}
	for _, x := range []float64{-6, 6} {
		s.ellipse(f.at(x, 0), 0.7, 1.5)
	}
	s.line(f.at(-4, -1.5), f.at(-4, -4))
	s.earth(f.at(-4, -4))
}

// ellipse draws an upright one, as four cubic curves.
func (s *sheet) ellipse(centre at, rx, ry float64) {
	const k = 0.5523 // control points that come nearest to a quarter of a circle
	c := func(x, y float64) at { return centre.plus(x*rx, y*ry) }
	path := lines([]at{c(1, 0)}, false)
	for _, q := range [][3]at{{c(1, k), c(k, 1), c(0, 1)}, {c(-k, 1), c(-1, k), c(-1, 0)}, {c(-1, -k), c(-k, -1), c(0, -1)}, {c(k, -1), c(1, -k), c(1, 0)}} {
		path.CubeTo(q[0].point(), q[1].point(), q[2].point())
	}
	s.stroke(path, fine, nil)
}

// transformer is two windings that overlap.
func (s *sheet) transformer(f frame) {
	s.circle(f.at(-1.8, 0), 3)
	s.circle(f.at(1.8, 0), 3)
	s.arc(f.at(-1.8, 0), 3, 0, 2*math.Pi)
}

// earth draws the earth symbol hanging from a place.
func (s *sheet) earth(p at) {
	s.line(p, p.plus(0, -1.5))
	for i, half := range []float64{2.4, 1.5, 0.6} {
		y := -1.5 - 0.9*float64(i)
		s.line(p.plus(-half, y), p.plus(half, y))
	}
}
