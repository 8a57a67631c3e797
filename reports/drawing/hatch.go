package drawing

import (
	"cmp"
	"math"
	"slices"

	"gonum.org/v1/plot/vg"

	"kilovet/rules/exhibit"
)

// hatching is how an area is hatched: the closer the darker, and crossed where it is
// darkest, so that areas are told apart in black on white.
type hatching struct {
	pitch   float64 // between two lines, in millimetres
	crossed bool
}

// Pitches of the lightest and the darkest area, and the share from which lines cross.
const (
	widePitch   = 4.5
	narrowPitch = 0.5
	crossedFrom = 0.7
	hatchWidth  = 0.1
)

func hatchingOf(share float64) hatching {
	h := hatching{widePitch * math.Pow(narrowPitch/widePitch, math.Min(math.Max(share, 0), 1)), share >= crossedFrom}
	if h.crossed {
		h.pitch *= 1.4 // two families of lines
	}
	return h
}

// areas hatches the areas, each under the lines, and explains them.
func (p *plot) areas() {
	for _, a := range p.Areas {
		h := hatchingOf(a.Share)
		boxes := make([]box, len(a.Boxes))
		for i, b := range a.Boxes {
			low, high := p.place(b[0]), p.place(b[1])
			boxes[i] = box{low.x, low.y, high.x, high.y}
		}
		p.hatch(h, boxes)
		p.key = append(p.key, entry{text: a.Name, sample: func(q at) {
			frame := box{q.x, q.y - 1.3, q.x + sampleWidth, q.y + 1.3}
			p.hatch(h, []box{frame})
			p.stroke(lines([]at{{frame.left, frame.low}, {frame.right, frame.low}, {frame.right, frame.high}, {frame.left, frame.high}}, true), hatchWidth, nil)
		}})
	}
}

// hatch draws the lines through boxes; they run on from box to box.
func (s *sheet) hatch(h hatching, boxes []box) {
	var path vg.Path
	families := []float64{1}
	if h.crossed {
		families = []float64{1, -1}
	}
	for _, rise := range families {
		for _, piece := range hatched(h.pitch, rise, boxes) {
			path.Move(piece[0].point())
			path.Line(piece[1].point())
		}
	}
	if len(path) > 0 {
		s.stroke(path, hatchWidth, nil)
	}
}

// hatched are the pieces of lines y = rise·x + c that lie in boxes, those that follow on
// each other joined. The lines stand at the same places whatever the boxes are.
func hatched(pitch, rise float64, boxes []box) (pieces [][2]at) {
	apart := pitch * math.Sqrt2 // along y
	parts := map[int][]span{}   // along x, by the number of the line
	for _, b := range boxes {
		corners := []float64{b.low - rise*b.left, b.low - rise*b.right, b.high - rise*b.left, b.high - rise*b.right}
		for k := int(math.Ceil(slices.Min(corners) / apart)); float64(k)*apart <= slices.Max(corners); k++ {
			c := float64(k) * apart
			one, other := (b.low-c)/rise, (b.high-c)/rise
			from, to := math.Max(b.left, math.Min(one, other)), math.Min(b.right, math.Max(one, other))
			if to > from {
				parts[k] = append(parts[k], span{from, to})
			}
		}
	}
	numbers := make([]int, 0, len(parts))
	for k := range parts {
		numbers = append(numbers, k)
	}
	slices.Sort(numbers)
	for _, k := range numbers {
		c := float64(k) * apart
		for _, x := range joined(parts[k]) {
			pieces = append(pieces, [2]at{{x.low, rise*x.low + c}, {x.high, rise*x.high + c}})
		}
	}
	return pieces
}

// joined are spans with those that touch made one, in rising order.
func joined(all []span) (list []span) {
	slices.SortFunc(all, func(a, b span) int { return cmp.Compare(a.low, b.low) })
	for _, s := range all {
		if n := len(list); n > 0 && s.low <= list[n-1].high+1e-6 {
			list[n-1].high = max(list[n-1].high, s.high)
			continue
		}
		list = append(list, s)
	}
	return list
}

// kindTraces are the strokes of the lines of pictures.
var kindTraces = map[exhibit.Kind]trace{
	exhibit.Outline:       {0.6, nil},
	exhibit.Equipotential: {0.18, nil},
	exhibit.CriticalLine:  {0.6, []float64{1.6, 0.8}},
}

// traceOf is the stroke of a line: that of its kind, or one of its own.
func (p *plot) traceOf(i int) trace {
	if t, known := kindTraces[p.Lines[i].Kind]; known {
		return t
	}
	return traceOf(i)
}

// first is the first of the lines that belong together with one: of its kind and name.
// Lines without a kind stand for themselves.
func (p *plot) first(i int) int {
	l := p.Lines[i]
	if l.Kind == "" {
		return i
	}
	return slices.IndexFunc(p.Lines, func(o exhibit.Line) bool { return o.Kind == l.Kind && o.Name == l.Name })
}

// number of a line among those that do not belong together.
func (p *plot) number(i int) int {
	n := 0
	for k := range p.first(i) + 1 {
		if p.first(k) == k {
			n++
		}
	}
	return n
}
