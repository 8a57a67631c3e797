package drawing

import (
	"fmt"

	"gonum.org/v1/plot/vg"

	"kilovet/reports/digest"
	"kilovet/rules/diagram"
	"kilovet/rules/rule"
)

// label is what stands beside a part or node: names, a value, and a flag where a rule
// has something against it.
type label struct {
	names []string
	value string
	flag  pennant
	of    string // the part or node it speaks of
}

// pennant tells a verdict: the number under which the legend explains it, and the word.
type pennant struct {
	number  int
	verdict rule.Verdict
	word    bool // the number alone does not do
}

func (f pennant) text() string {
	if f.word {
		return fmt.Sprintf("%d %s", f.number, f.verdict)
	}
	return fmt.Sprint(f.number)
}

// Sizes of a flag.
const (
	flagHeight = 3.2
	flagEdge   = 0.9 // between text and outline
)

// labelWidth is how wide names may become before they are wrapped.
const labelWidth = 24

// label makes the label of a part.
func (s *sheet) label(p *diagram.Part) label {
	return label{s.wrapped(named, p.Name, labelWidth), p.Value, s.flagOf(p.Mark, true), p.Name}
}

// nodeLabel makes the label of a node.
func (s *sheet) nodeLabel(n diagram.Node) label {
	return label{s.wrapped(named, n.Name, labelWidth), n.Potential, s.flagOf(n.Mark, true), n.Name}
}

func (s *sheet) flagOf(number int, word bool) pennant {
	if number == 0 {
		return pennant{}
	}
	return pennant{number, s.marks[number-1].Verdict, word}
}

func (s *sheet) labelSize(l label) (width, height float64) {
	width = max(s.widest(named, l.names), s.wide(value, l.value), s.flagWidth(l.flag))
	height = leading * float64(len(l.names))
	if l.value != "" {
		height += leading
	}
	if l.flag.number > 0 {
		height += leading + 0.4
	}
	return width, height
}

// beside sets a label, the middle of its lines at the height of the place.
func (s *sheet) beside(p at, a align, l label) {
	_, height := s.labelSize(l)
	s.stacked(p.plus(0, height/2), a, l)
}

// above sets a label so that its last line stands just over the place.
func (s *sheet) above(p at, a align, l label) {
	_, height := s.labelSize(l)
	s.stacked(p.plus(0, height), a, l)
}

// stacked sets the lines of a label downwards from a place.
func (s *sheet) stacked(p at, a align, l label) {
	defer s.belonging(l.of)()
	p = p.plus(0, -leading/2)
	for _, name := range l.names {
		s.write(p, a, named, name)
		p = p.plus(0, -leading)
	}
	if l.value != "" {
		s.write(p, a, value, digest.Clean(l.value))
		p = p.plus(0, -leading)
	}
	if l.flag.number > 0 {
		s.flag(p.plus(-float64(a)*s.flagWidth(l.flag), -0.2), l.flag)
	}
}

// inline sets name and potential of a node in one line, a flag behind them.
func (s *sheet) inline(p at, n diagram.Node) {
	defer s.belonging(n.Name)()
	s.write(p, toRight, named, inlineText(n))
	if f := s.flagOf(n.Mark, false); f.number > 0 {
		s.flag(p.plus(s.wide(named, inlineText(n))+1, 0), f)
	}
}

func (s *sheet) inlineWidth(n diagram.Node) float64 {
	return s.wide(named, inlineText(n)) + 1 + s.flagWidth(s.flagOf(n.Mark, false))
}

func inlineText(n diagram.Node) string { return n.Name + " " + n.Potential }

func (s *sheet) flagWidth(f pennant) float64 {
	if f.number == 0 {
		return 0
	}
	return s.wide(tag, f.text()) + 2*flagEdge
}

// inset is how far the second outline of what is unassessed lies within the first.
const inset = 0.5

// flag draws a flag to the right of a place: filled for what fails, with a double outline
// for what is unassessed, with a broken one for what is marginal, as the sheets mark them.
func (s *sheet) flag(p at, f pennant) {
	width := s.flagWidth(f)
	corners := func(in float64) []at {
		return []at{p.plus(in, in-flagHeight/2), p.plus(width-in, in-flagHeight/2), p.plus(width-in, flagHeight/2-in), p.plus(in, flagHeight/2-in)}
	}
	colour := ink
	switch f.verdict {
	case rule.Marginal:
		s.fill(paper, corners(0)...)
		s.stroke(lines(corners(0), true), 1.5*fine, []vg.Length{mm(0.9), mm(0.6)})
	case rule.Unassessed:
		s.outline(corners(0)...)
		s.stroke(lines(corners(inset), true), fine/2, nil)
	default:
		s.fill(ink, corners(0)...)
		colour = paper
	}
	s.writeIn(colour, p.plus(flagEdge, 0), toRight, tag, f.text())
}
