package drawing

import (
	"fmt"
	"slices"

	"kilovet/rules/diagram"
)

// Sizes of the ladder.
const (
	rung       = 20 // height of a stage
	mostStages = 8  // more are folded
	keptStages = 2  // at each end of a folded ladder
	driveStep  = 20 // height of a part of the drive
)

// step is one rung of the drawn ladder: a stage, or a fold that stands for several.
type step struct {
	stage    int // from zero; the first of a fold
	fold     bool
	lastFold int // the last stage of a fold, from zero
}

// steps lists the rungs to draw.
func steps(stages int) []step {
	var all []step
	if stages <= mostStages {
		for k := range stages {
			all = append(all, step{stage: k})
		}
		return all
	}
	for k := range keptStages {
		all = append(all, step{stage: k})
	}
	all = append(all, step{stage: keptStages, fold: true, lastFold: stages - keptStages - 1})
	for k := stages - keptStages; k < stages; k++ {
		all = append(all, step{stage: k})
	}
	return all
}

// ladder draws the multiplier with the foot of its first coupling column over the
// origin; it returns the top of the smoothing column.
func (s *sheet) ladder(l diagram.Ladder) (top at) {
	column := s.columnDistance(l)
	rungs := steps(len(l.Stages))
	smoothing := at{column, 0}
	low := 0.0
	for i := range l.Columns {
		low = min(low, s.drive(&l.Columns[i], at{2 * column * float64(i), -rung / 2}, sides[i]))
	}
	s.foot(l, smoothing, low)
	for i, st := range rungs {
		s.smoothing(l, st, smoothing.plus(0, rung*float64(i)))
		for j := range l.Columns {
			s.coupling(&l.Columns[j], st, at{2 * column * float64(j), rung * (float64(i) - 0.5)}, smoothing.x, sides[j])
		}
		if st.fold {
			s.foldText(l, st, smoothing.plus(-column/2, rung*(float64(i)+0.5)))
		}
	}
	return smoothing.plus(0, rung*float64(len(rungs)))
}

// side is where the labels of a column stand.
type side struct {
	align   align
	outward float64 // the sign of x away from the ladder
}

// sides are those of the first and the second column.
var sides = [2]side{{toLeft, -1}, {toRight, 1}}

// columnDistance leaves room between two columns for what stands there: the labels of
// the stages, where the lines part more slowly the farther the columns are, and those
// of the capacitors before the flags of the diodes.
func (s *sheet) columnDistance(l diagram.Ladder) float64 {
	if len(l.Columns) == 1 {
		return 30
	}
	most := 0.0
	for _, n := range l.Stages {
		most = max(most, 1.13*s.inlineWidth(n)+9)
	}
	flags := 0.0
	for _, d := range slices.Concat(l.Columns[1].Lower, l.Columns[1].Upper) {
		flags = max(flags, s.flagWidth(s.flagOf(d.Mark, false)))
	}
	for _, c := range l.Smoothing {
		width, _ := s.labelSize(s.smoothingLabel(c))
		most = max(most, 2*(smoothingRoom+width+1+flags/2-flagLeft))
	}
	return most
}

// Where labels and flags stand beside the smoothing column.
const (
	smoothingRoom = 4    // from the column to the label of a capacitor
	flagLeft      = -2.2 // from the middle of a diode
)

func (s *sheet) smoothingLabel(p diagram.Part) label {
	return label{value: p.Value, flag: s.flagOf(p.Mark, false), of: p.Name}
}

// inlineRoom is the distance of a label in one line from its node, where the lines
// that part at the node leave room for it.
func (s *sheet) inlineRoom(l diagram.Ladder, n diagram.Node) float64 {
	return s.columnDistance(l) - s.inlineWidth(n) - 6
}

// drive draws the source of a column and what is in series with it downwards from
// the column's foot; it returns how low it reaches.
func (s *sheet) drive(c *diagram.Column, top at, o side) float64 {
	s.dot(top)
	s.beside(top.plus(3*o.outward, 0), o.align, s.nodeLabel(c.Drive))
	p := top
	for i := len(c.Series) - 1; i >= 0; i-- {
		s.standing(&c.Series[i], p.plus(0, -driveStep), p, o)
		p = p.plus(0, -driveStep)
	}
	s.standing(&c.Source, p, p.plus(0, -driveStep), o)
	return p.y - driveStep
}

// standing draws an upright part with its label outwards.
func (s *sheet) standing(p *diagram.Part, from, to at, o side) {
	s.part(p, from, to)
	s.beside(at{from.x + 5*o.outward, (from.y + to.y) / 2}, o.align, s.label(p))
}

// foot draws the return of the multiplier: from the foot of the smoothing column to
// the drive and to earth.
func (s *sheet) foot(l diagram.Ladder, foot at, low float64) {
	s.dot(foot)
	s.beside(foot.plus(3, -1), toRight, label{names: []string{l.Foot.Name}})
	s.line(foot, at{foot.x, low})
	for i := range l.Columns {
		s.line(at{2 * foot.x * float64(i), low}, at{foot.x, low})
	}
	s.dot(at{foot.x, low})
	s.earth(at{foot.x, low})
}

// smoothing draws the capacitor of one stage of the smoothing column upwards from its
// lower node, and its upper node.
func (s *sheet) smoothing(l diagram.Ladder, st step, from at) {
	to := from.plus(0, rung)
	if st.fold {
		s.foldMark(from, to)
		s.dot(to)
		return
	}
	part := l.Smoothing[st.stage]
	s.part(&part, to, from)
	s.beside(from.plus(smoothingRoom, rung/2), toRight, s.smoothingLabel(part))
	s.dot(to)
	if len(l.Columns) > 1 {
		n := l.Stages[st.stage]
		s.inline(to.plus(s.inlineRoom(l, n), 0), n)
	} else {
		s.beside(to.plus(3, 0), toRight, s.nodeLabel(l.Stages[st.stage]))
	}
}

// coupling draws one stage of a coupling column upwards from its lower node: the
// capacitor, its upper node, and the diodes to the smoothing column.
func (s *sheet) coupling(c *diagram.Column, st step, from at, across float64, o side) {
	to := from.plus(0, rung)
	if st.fold {
		s.foldMark(from, to)
		s.dot(to)
		return
	}
	part := c.Coupling[st.stage]
	s.part(&part, to, from)
	s.beside(from.plus(4*o.outward, rung/2), o.align, label{value: part.Value, flag: s.flagOf(part.Mark, false), of: part.Name})
	s.dot(to)
	s.beside(to.plus(3*o.outward, 0), o.align, s.nodeLabel(c.Nodes[st.stage]))
	own := c.Nodes[st.stage].Name
	s.rectifier(c.Lower[st.stage], own, to, at{across, to.y - rung/2})
	s.rectifier(c.Upper[st.stage], own, to, at{across, to.y + rung/2})
}

// rectifier draws a diode between the column's own node and one across, turned as it
// conducts.
func (s *sheet) rectifier(d diagram.Part, own string, near, far at) {
	defer s.belonging(d.Name)()
	from, to := near, far
	if d.From != own {
		from, to = far, near
	}
	s.part(&d, from, to)
	f := s.flagOf(d.Mark, false)
	middle := at{(near.x+far.x)/2 - s.flagWidth(f)/2, (near.y + far.y) / 2}
	switch {
	case f.number == 0:
	case near.x < far.x:
		s.flag(middle.plus(0, 4.6), f)
	case near.y > far.y: // right of the smoothing column, whose labels stand between the stages
		s.flag(middle.plus(flagLeft, 3.4), f)
	default:
		s.flag(middle.plus(flagLeft, -3.4), f)
	}
}

// foldMark draws a column that is not drawn in full: broken, with two strokes across.
func (s *sheet) foldMark(from, to at) {
	f, length := between(from, to)
	s.line(from, f.at(-length/4, 0))
	s.brokenLine(f.at(-length/4, 0), f.at(length/4, 0))
	s.line(f.at(length/4, 0), to)
	for _, x := range []float64{-0.8, 0.8} {
		s.line(f.all(at{x - 1, -2}, at{x + 1, 2})...)
	}
}

// foldText says what a fold stands for.
func (s *sheet) foldText(l diagram.Ladder, st step, p at) {
	s.write(p.plus(0, leading/2), centred, named, fmt.Sprintf("stages %d to %d", st.stage+1, st.lastFold+1))
	text := "like the others"
	if !alike(l) {
		text = "of several values"
	}
	s.write(p.plus(0, -leading/2), centred, named, text)
}

// alike reports whether all stages have the same values.
func alike(l diagram.Ladder) bool {
	for k := range l.Smoothing {
		if l.Smoothing[k].Value != l.Smoothing[0].Value || l.Columns[0].Coupling[k].Value != l.Columns[0].Coupling[0].Value {
			return false
		}
	}
	return true
}
