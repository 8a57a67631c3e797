package drawing

import (
	"fmt"
	"strings"

	"kilovet/rules/diagram"
)

// Sizes of the whole.
const (
	rowWidth = 185 // of the rows beside the ladder
	lane     = 6   // between two rows, for the wire that joins them
	overTop  = 12  // the first row over the top of the ladder
	apart    = 10  // between the parts of the drawing
)

// schematic lays out a whole diagram: the ladder to the left, beside it the rail in
// rows of at most a width, which go on under the ladder; below them loose parts and
// the legend.
func (s *sheet) schematic(d *diagram.Diagram, width float64) {
	s.marks = d.Marks
	top := s.ladder(d.Ladder)
	over := top.plus(0, overTop)
	start := at{s.box().right + apart, over.y}
	s.line(top, over, start)
	s.rail(s.zones(d), start, width)
	box := s.box()
	low := s.loose(d.Loose, at{box.left, box.low - apart}, box.right-box.left)
	if !s.bare {
		s.legend(d, at{box.left, low - apart/2}, box.right-box.left)
	}
}

// zones lists the pieces along the rail.
func (s *sheet) zones(d *diagram.Diagram) []zone {
	var all []zone
	for _, span := range d.Rail {
		all = append(all, s.spanZone(span))
	}
	if d.Gun != nil {
		return append(all, s.gunZone(d.Gun))
	}
	return all
}

// rail draws zones in rows under each other, joined by wires: beside the ladder rows
// of at most a width where that can be; a zone that is wider, and all that would begin
// lower than the ladder ends, stands under it.
func (s *sheet) rail(zones []zone, start at, width float64) {
	ladder := s.box()
	whole := start.x + width - ladder.left
	row := inRow(zones, width)
	p := start
	for len(zones) > 0 {
		for _, z := range zones[:row] {
			z.draw(p)
			p = p.plus(z.width, 0)
		}
		last := zones[row-1]
		if zones = zones[row:]; len(zones) == 0 {
			if !last.ends {
				s.terminal(p)
			}
			return
		}
		row = inRow(zones, width)
		next := s.nextRow(start, zones[:row])
		if start.x > ladder.left+8 && (next.y < ladder.low || wide(zones[:row]) > width) {
			start.x, width = ladder.left+8, whole-8
			row = inRow(zones, width)
			next = s.nextRow(start, zones[:row])
		}
		lane := next.y + tallest(zones[:row]) + lane
		s.line(p, p.plus(3, 0), at{p.x + 3, lane}, at{start.x - 3, lane}, at{start.x - 3, next.y}, next)
		p = next
	}
}

// nextRow is where a row begins under all that is drawn at its place.
func (s *sheet) nextRow(start at, row []zone) at {
	return at{start.x, s.lowest(start.x-4) - 2*lane - tallest(row)}
}

// inRow is how many of the zones fit into a width, at least one.
func inRow(zones []zone, width float64) int {
	n := 1
	for n < len(zones) && wide(zones[:n+1]) <= width {
		n++
	}
	return min(n, len(zones))
}

func wide(row []zone) float64 {
	sum := 0.0
	for _, z := range row {
		sum += z.width
	}
	return sum
}

func tallest(row []zone) float64 {
	over := 0.0
	for _, z := range row {
		over = max(over, z.over)
	}
	return over
}

// terminal draws the end of a rail that feeds nothing described.
func (s *sheet) terminal(p at) { s.circle(p.plus(0.8, 0), 0.8) }

// loose draws parts between the names of their nodes, in columns; it returns how low
// they reach.
func (s *sheet) loose(parts []diagram.Part, start at, width float64) float64 {
	if len(parts) == 0 {
		return start.y + apart
	}
	s.write(start, toRight, tag, "Further parts")
	cell := s.looseCell(parts)
	columns := max(1, int(width/cell.width))
	for i := range parts {
		row, column := i/columns, i%columns
		s.loosePart(&parts[i], start.plus(cell.width*float64(column), -cell.height*float64(row)-cell.over), cell)
	}
	return start.y - cell.height*float64((len(parts)-1)/columns+1) - leading
}

// cell is the room of a loose part: its names to the left and right, its label above.
type cell struct{ width, height, over, names float64 }

func (s *sheet) looseCell(parts []diagram.Part) cell {
	c := cell{}
	label := 0.0
	for i := range parts {
		w, h := s.labelSize(s.label(&parts[i]))
		label, c.over = max(label, w), max(c.over, h)
		for _, node := range []string{parts[i].From, parts[i].To} {
			c.names = max(c.names, s.widest(named, s.wrapped(named, node, labelWidth)))
		}
	}
	c.over += leading + 3
	c.height = c.over + 6
	c.width = 2*c.names + max(label, 18) + 14
	return c
}

func (s *sheet) loosePart(p *diagram.Part, origin at, c cell) {
	left, right := origin.plus(c.names+2, 0), origin.plus(c.width-c.names-8, 0)
	s.part(p, left, right)
	s.circle(left, 0.6)
	s.circle(right, 0.6)
	s.beside(left.plus(-1.5, 0), toLeft, label{names: s.wrapped(named, p.From, labelWidth)})
	s.beside(right.plus(1.5, 0), toRight, label{names: s.wrapped(named, p.To, labelWidth)})
	s.above(at{(left.x + right.x) / 2, origin.y + 3}, centred, s.label(p))
}

// legend says what the flags mean, in two columns, and what the drawing leaves out.
func (s *sheet) legend(d *diagram.Diagram, p at, width float64) {
	const gap = 6
	half := (len(d.Marks) + 1) / 2
	left := s.explained(d.Marks[:half], p, (width-gap)/2)
	right := s.explained(d.Marks[half:], p.plus((width+gap)/2, 0), (width-gap)/2)
	p.y = min(left, right)
	for _, note := range notes(d) {
		for _, line := range s.filled(note, width) {
			s.write(p, toRight, named, line)
			p = p.plus(0, -leading)
		}
	}
}

// explained writes out marks below each other; it returns where the next would stand.
func (s *sheet) explained(marks []diagram.Mark, p at, width float64) float64 {
	for _, m := range marks {
		f := pennant{m.Number, m.Verdict, true}
		s.flag(p, f)
		x := s.flagWidth(f) + 2
		for _, line := range s.filled(m.Subject+": "+strings.Join(m.Rules, ", "), width-x) {
			s.write(p.plus(x, 0), toRight, named, line)
			p = p.plus(0, -leading)
		}
		p = p.plus(0, -0.8)
	}
	return p.y - 0.4
}

// notes are the remarks under a drawing.
func notes(d *diagram.Diagram) []string {
	all := []string{"Potentials are means to ground in the working state. Strays and leakage of clamps are not drawn."}
	if d.Unknown != "" {
		all[0] = "Potentials are not known: " + d.Unknown + ". Strays and leakage of clamps are not drawn."
	}
	switch {
	case d.Elsewhere == 1:
		all = append(all, "1 finding speaks of what is not drawn here.")
	case d.Elsewhere > 1:
		all = append(all, fmt.Sprintf("%d findings speak of what is not drawn here.", d.Elsewhere))
	}
	return all
}

// filled breaks a text into lines of at most a width, at spaces where that can be.
func (s *sheet) filled(text string, width float64) []string {
	var all []string
	line := ""
	for _, word := range strings.Fields(clean(text)) {
		if joined := strings.TrimSpace(line + " " + word); s.wide(named, joined) <= width {
			line = joined
			continue
		}
		if line != "" {
			all = append(all, line)
		}
		for s.wide(named, word) > width {
			n := s.fits(named, word, width)
			all, word = append(all, string([]rune(word)[:n])), string([]rune(word)[n:])
		}
		line = word
	}
	return append(all, line)
}
