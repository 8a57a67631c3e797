package profile

import (
	"cmp"
	"math"
	"math/cmplx"
	"slices"

	"kilovet/hv/quantity"
)

// A dart is an edge walked one way: dart 2k along edge k, dart 2k+1 against it.
// The face on its left is the one it bounds.

func (p *Plane) segment(dart int) Segment {
	if dart%2 == 0 {
		return p.Edges[dart/2].Segment
	}
	return p.Edges[dart/2].Reversed()
}

func (p *Plane) tail(dart int) int {
	if dart%2 == 0 {
		return p.Edges[dart/2].Start
	}
	return p.Edges[dart/2].End
}

// Around lists the darts that leave a node, counter-clockwise: 2k leaves along
// edge k, 2k+1 against it.
func (p *Plane) Around(node int) []int {
	var darts []int
	reach := quantity.Length(math.Inf(1))
	for d := range 2 * len(p.Edges) {
		if p.tail(d) != node {
			continue
		}
		darts = append(darts, d)
		reach = min(reach, p.segment(d).Length()/4)
		if r := p.segment(d).Radius(); r > 0 {
			reach = min(reach, r/5)
		}
	}
	// Edges may leave a node in one direction and part later: they are sorted by
	// where they are after the same short way.
	angle := func(d int) float64 { return p.leaves(d, reach) }
	slices.SortFunc(darts, func(a, b int) int { return cmp.Compare(angle(a), angle(b)) })
	return darts
}

// leaves is the direction in which a dart has gone after a short way.
func (p *Plane) leaves(dart int, way quantity.Length) float64 {
	s := p.segment(dart)
	return cmplx.Phase(s.At(float64(way/s.Length())).plane() - s.From.plane())
}

// traceFaces walks every loop of darts with its face on the left. A loop that runs
// counter-clockwise bounds a new face from outside; any other is the rim of a hole
// in the face around it.
func (p *Plane) traceFaces() {
	loops := p.loops()
	face := make([]int, len(loops))
	p.Faces = 1
	for i, l := range loops {
		if p.area(l) > float64(p.Tolerance*p.Tolerance) {
			face[i] = p.Faces
			p.Faces++
		}
	}
	for i, l := range loops {
		if face[i] == 0 {
			face[i] = p.holeIn(l, loops, face)
		}
	}
	for i, l := range loops {
		for _, d := range l {
			p.setLeft(d, face[i])
		}
	}
}

func (p *Plane) setLeft(dart, face int) {
	if dart%2 == 0 {
		p.Edges[dart/2].Left = face
	} else {
		p.Edges[dart/2].Right = face
	}
}

// loops follows the darts around.
func (p *Plane) loops() [][]int {
	next := make([]int, 2*len(p.Edges))
	for n := range p.Nodes {
		around := p.Around(n)
		for i, d := range around {
			next[d^1] = around[(i+len(around)-1)%len(around)]
		}
	}
	seen := make([]bool, len(next))
	var loops [][]int
	for d := range next {
		var loop []int
		for ; !seen[d]; d = next[d] {
			seen[d] = true
			loop = append(loop, d)
		}
		if loop != nil {
			loops = append(loops, loop)
		}
	}
	return loops
}

// area enclosed by a loop, positive counter-clockwise.
func (p *Plane) area(loop []int) float64 {
	sum := 0.0
	for _, d := range loop {
		s := p.segment(d)
		sum += imag(cmplx.Conj(s.From.plane())*s.To.plane()) / 2
		if s.Turn != Straight { // the sliver between chord and arc
			r, a := float64(s.Radius()), float64(s.Sweep())
			sum += r * r * (a - math.Sin(a)) / 2
		}
	}
	return sum
}

// holeIn is the face in which a loop is the rim of a hole: the smallest around it
// of a part that it does not hang together with.
func (p *Plane) holeIn(hole []int, loops [][]int, face []int) int {
	in, smallest := 0, math.Inf(1)
	at := p.segment(hole[0]).From
	for i, l := range loops {
		a := p.area(l)
		if face[i] == 0 || a <= 0 || a >= smallest || p.touches(l, p.tail(hole[0])) {
			continue
		}
		if p.winds(l, at) {
			in, smallest = face[i], a
		}
	}
	return in
}

func (p *Plane) touches(loop []int, node int) bool {
	return slices.ContainsFunc(loop, func(d int) bool { return p.tail(d) == node })
}

// winds reports whether a loop goes around a point.
func (p *Plane) winds(loop []int, at Point) bool {
	turn := 0.0
	for _, d := range loop {
		turn += subtended(p.segment(d), at, 0)
	}
	return math.Abs(turn) > math.Pi
}

// subtended is the angle a segment is seen under from a point, with sign. An arc
// is halved until the point cannot lie between it and its chord.
func subtended(s Segment, at Point, depth int) float64 {
	if s.Turn != Straight && depth < 40 {
		if _, d := s.Closest(at); d < s.Length() {
			return subtended(s.Part(0, 0.5), at, depth+1) + subtended(s.Part(0.5, 1), at, depth+1)
		}
	}
	a, b := s.From.plane()-at.plane(), s.To.plane()-at.plane()
	return cmplx.Phase(b * cmplx.Conj(a))
}

// FaceAt is the face a point lies in; of a point on an edge, one of those beside it.
func (p *Plane) FaceAt(at Point) int {
	turn := make([]float64, p.Faces)
	for _, e := range p.Edges {
		a := subtended(e.Segment, at, 0)
		turn[e.Left] += a
		turn[e.Right] -= a
	}
	for f := 1; f < p.Faces; f++ {
		if turn[f] > math.Pi {
			return f
		}
	}
	return 0
}
