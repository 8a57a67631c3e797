package drawing

import (
	"cmp"
	"math"
	"slices"
	"strconv"

	"gonum.org/v1/plot/vg"

	"kilovet/reports/digest"
	"kilovet/rules/exhibit"
)

// trace is how a line is drawn.
type trace struct {
	width float64
	dash  []float64
}

// traces tell lines apart in black on white.
var traces = []trace{
	{0.35, nil},
	{0.35, []float64{2, 1}},
	{0.35, []float64{0.6, 0.8}},
	{0.35, []float64{3, 0.8, 0.6, 0.8}},
	{0.35, []float64{3, 0.7, 0.5, 0.7, 0.5, 0.7}},
	{0.7, nil},
	{0.7, []float64{2, 1}},
	{0.7, []float64{0.7, 0.9}},
}

func traceOf(i int) trace { return traces[i%len(traces)] }

func (s *sheet) trace(path vg.Path, p trace) {
	var dash []vg.Length
	for _, d := range p.dash {
		dash = append(dash, mm(d))
	}
	s.stroke(path, p.width, dash)
}

// polyline draws a line; points nearer to each other than can be seen are joined.
func (p *plot) polyline(i int, l exhibit.Line) {
	if len(l.Points) == 0 {
		return
	}
	const least = 0.04
	points := []at{p.place(l.Points[0])}
	for n, q := range l.Points[1:] {
		next, last := p.place(q), points[len(points)-1]
		if math.Hypot(next.x-last.x, next.y-last.y) >= least || n == len(l.Points)-2 {
			points = append(points, next)
		}
	}
	if len(points) == 1 {
		points = append(points, points[0].plus(0.3, 0))
	}
	p.trace(lines(points, false), p.traceOf(i))
	if p.first(i) != i {
		return // it is explained already
	}
	sample := func(q at) { p.trace(lines([]at{q, q.plus(sampleWidth, 0)}, false), p.traceOf(i)) }
	p.key = append(p.key, entry{sample: sample, tag: p.lineTag(i), text: l.Name})
}

// lineTag is the number of a line; a line alone needs none.
func (p *plot) lineTag(i int) string {
	if len(p.Lines) < 2 {
		return ""
	}
	return strconv.Itoa(p.number(i))
}

// numberLine puts the number of a line onto it, as far from the other lines as can be,
// and where no other tag stands.
func (p *plot) numberLine(i int, l exhibit.Line) {
	tag := p.lineTag(i)
	if tag == "" {
		return
	}
	if p.courses == nil {
		p.courses = p.everyCourse()
	}
	type candidate struct {
		at
		clear float64
	}
	var all []candidate
	for _, q := range p.spread(l, 16, (2*i+1)*8/len(p.Lines)) {
		all = append(all, candidate{q, p.clear(q, i)})
	}
	slices.SortStableFunc(all, func(a, b candidate) int { return cmp.Compare(b.clear, a.clear) })
	for _, c := range all {
		if p.tagAt(c.at, tag) {
			return
		}
	}
}

// spread is the places of about so many points along a line, beginning with one of
// them.
func (p *plot) spread(l exhibit.Line, count, first int) []at {
	var all []at
	step := max(1, len(l.Points)/count)
	for n := 0; n < len(l.Points); n += step {
		all = append(all, p.place(l.Points[(first*step+n)%len(l.Points)]))
	}
	return all
}

// everyCourse is where each line goes.
func (p *plot) everyCourse() [][]at {
	all := make([][]at, len(p.Lines))
	for i, l := range p.Lines {
		all[i] = p.spread(l, 48, 0)
	}
	return all
}

// clear is the distance of a place on a line to the other lines; beyond enough all are
// alike.
func (p *plot) clear(q at, i int) float64 {
	const enough = 7.0
	least := enough
	for j, course := range p.courses {
		if j == i {
			continue
		}
		for _, o := range course {
			if dx, dy := q.x-o.x, q.y-o.y; math.Abs(dx) < least && math.Abs(dy) < least {
				least = min(least, math.Hypot(dx, dy))
			}
		}
	}
	return math.Round(least*2) / 2
}

// mark draws a mark: a ring with its letter beside it.
func (p *plot) mark(i int, m exhibit.Mark) {
	q := p.place(m.Point)
	p.circle(q, 0.7)
	p.tags = append(p.tags, box{q.x - 0.9, q.y - 0.9, q.x + 0.9, q.y + 0.9})
	tag := letter(i, 'A')
	p.keyed(tag, m.Name+": "+p.coordinates(m.Point))
	for _, reach := range []float64{2.6, 4.2, 6, 8, 10, 13, 16} {
		for _, d := range around8 {
			if to := q.plus(d[0]*reach, d[1]*reach); p.tagAt(to, tag) {
				if reach > 3 {
					p.leader(q.plus(0.7*d[0], 0.7*d[1]), to.plus(-1.3*d[0], -1.3*d[1]))
				}
				return
			}
		}
	}
}

// around8 are the directions in which a letter may stand from its mark, the best first.
var around8 = [][2]float64{{0.8, 0.8}, {-0.8, 0.8}, {0.8, -0.8}, {-0.8, -0.8}, {1.1, 0}, {-1.1, 0}, {0, 1.1}, {0, -1.1}}

// leader joins a letter to what it names.
func (s *sheet) leader(from, to at) {
	s.add(shape{path: lines([]at{from, to}, false), width: mm(0.12), ink: ink})
}

func (p *plot) coordinates(q exhibit.Point) string {
	return digest.Value(q.Y, p.Y.Unit) + " at " + digest.Value(q.X, p.X.Unit)
}

// level draws a limit through the whole frame, its letter outside.
func (p *plot) level(i int, l exhibit.Level) {
	tag := letter(i, 'a')
	right, high := p.x.start+p.x.length, p.y.start+p.y.length
	if l.Along {
		x := p.x.at(l.Value)
		p.trace(lines([]at{{x, p.y.start}, {x, high}}, false), levelTrace)
		p.letterOf(tag, at{x, high + 1.6}, at{x, high - 2}, at{x, high - p.y.length*0.9})
	} else {
		y := p.y.at(l.Value)
		p.trace(lines([]at{{p.x.start, y}, {right, y}}, false), levelTrace)
		p.letterOf(tag, at{right + 1.8, y}, at{right - 2, y}, at{right - p.x.length*0.9, y})
	}
	sample := func(q at) { p.trace(lines([]at{q, q.plus(sampleWidth, 0)}, false), levelTrace) }
	axis := p.Y
	if l.Along {
		axis = p.X
	}
	p.key = append(p.key, entry{sample: sample, tag: tag, text: l.Name + ": " + digest.Value(l.Value, axis.Unit)})
}

var levelTrace = trace{0.2, []float64{4, 0.6, 0.3, 0.6}}

// letterOf writes the letter of a level outside the frame, or where others stand on
// its line, between two places.
func (p *plot) letterOf(tag string, outside, from, to at) {
	if p.tagAt(outside, tag) {
		return
	}
	const places = 16
	for k := range places + 1 {
		share := float64(k) / places
		if p.tagAt(at{from.x + (to.x-from.x)*share, from.y + (to.y-from.y)*share}, tag) {
			return
		}
	}
}

// tagAt writes a number or letter on a patch of paper, if its place is free and near
// the frame.
func (p *plot) tagAt(q at, text string) bool {
	half := p.wide(tag, text)/2 + 0.4
	b := box{q.x - half, q.y - 1.4, q.x + half, q.y + 1.4}
	if b.left < p.x.start-1 || b.right > p.x.start+p.x.length+endRoom || b.low < p.y.start-0.5 || b.high > p.y.start+p.y.length+3 {
		return false
	}
	if b.high > p.y.start+p.y.length+0.5 && b.left < min(p.width, p.wide(named, p.y.title))+1 {
		return false // the title of the axis stands there
	}
	for _, t := range p.tags {
		if b.left < t.right && t.left < b.right && b.low < t.high && t.low < b.high {
			return false
		}
	}
	p.tags = append(p.tags, b)
	p.fill(paper, at{b.left, b.low}, at{b.right, b.low}, at{b.right, b.high}, at{b.left, b.high})
	p.write(q, centred, tag, text)
	return true
}

// letter counts A to Z, then A2 and so on.
func letter(i int, first rune) string {
	l := string(first + rune(i%26))
	if i < 26 {
		return l
	}
	return l + strconv.Itoa(i/26+1)
}
