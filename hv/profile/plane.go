package profile

import (
	"slices"

	"kilovet/hv/quantity"
)

// Axis is the profile number of edges that lie on the axis of revolution alone.
const Axis = -1

// Origin says where an edge comes from: which profile, and which of its segments.
type Origin struct{ Profile, Segment int }

// Edge is a piece between two nodes that meets others only there. Left and Right
// are the faces on its sides, seen along it.
type Edge struct {
	Segment
	Start, End  int
	Left, Right int
	Origins     []Origin
}

// Plane is the half plane cut up by several profiles and the axis. Face 0 is the
// unbounded one; beyond the axis it is entered too, and means nothing there.
type Plane struct {
	Tolerance quantity.Length
	Nodes     []Point
	Edges     []Edge
	Faces     int
}

// piece is a segment on its way to becoming edges.
type piece struct {
	Segment
	origin Origin
	cuts   []float64
}

// NewPlane cuts profiles at every point where they meet each other or the axis,
// merges what coincides, and finds the faces.
func NewPlane(profiles []Profile) *Plane {
	p := &Plane{Tolerance: sameness * Extent(profiles...)}
	pieces := p.pieces(profiles)
	for i := range pieces {
		for j := range pieces[:i] {
			p.cut(&pieces[i], &pieces[j])
		}
	}
	for i := range pieces {
		p.lay(&pieces[i])
	}
	p.traceFaces()
	return p
}

// pieces lists all segments, circles halved, and the axis beside them.
func (p *Plane) pieces(profiles []Profile) []piece {
	var all []piece
	var b box
	for i, pr := range profiles {
		for j, s := range pr.Segments {
			b.hold(s)
			pc := piece{Segment: s, origin: Origin{i, j}, cuts: []float64{0, 1}}
			if s.From.Distance(s.To) <= 2*p.Tolerance {
				pc.cuts = append(pc.cuts, 0.5)
			}
			all = append(all, pc)
		}
	}
	pad := b.diagonal()
	axis := Segment{From: Point{0, b.low.Z - pad}, To: Point{0, b.top.Z + pad}}
	return append(all, piece{Segment: axis, origin: Origin{Profile: Axis}, cuts: []float64{0, 1}})
}

func (p *Plane) cut(a, b *piece) {
	for _, at := range meet(a.Segment, b.Segment, p.Tolerance) {
		fa, _ := a.Closest(at)
		fb, _ := b.Closest(at)
		a.cuts, b.cuts = append(a.cuts, fa), append(b.cuts, fb)
	}
}

// lay turns a piece into edges between its cuts.
func (p *Plane) lay(pc *piece) {
	slices.Sort(pc.cuts)
	last := pc.cuts[0]
	start := p.node(pc.At(last))
	for _, f := range pc.cuts[1:] {
		end := p.node(pc.At(f))
		if end == start {
			continue
		}
		p.addEdge(Edge{Segment: pc.Part(last, f), Start: start, End: end, Origins: []Origin{pc.origin}})
		start, last = end, f
	}
}

// node is the number of the node at a point, a new one where there was none.
func (p *Plane) node(at Point) int {
	for i, n := range p.Nodes {
		if at.Distance(n) <= 2*p.Tolerance {
			return i
		}
	}
	p.Nodes = append(p.Nodes, at)
	return len(p.Nodes) - 1
}

// addEdge adds an edge, or its origin to one that is already there.
func (p *Plane) addEdge(e Edge) {
	for i := range p.Edges {
		if o := &p.Edges[i]; p.coincide(e, *o) {
			o.Origins = append(o.Origins, e.Origins...)
			return
		}
	}
	p.Edges = append(p.Edges, e)
}

func (p *Plane) coincide(a, b Edge) bool {
	same := a.Start == b.Start && a.End == b.End
	opposite := a.Start == b.End && a.End == b.Start
	return (same || opposite) && a.At(0.5).Distance(b.At(0.5)) <= 4*p.Tolerance
}

// Inside reports for every face whether a closed profile encloses it.
func (p *Plane) Inside(profile int) []bool {
	inside, known := make([]bool, p.Faces), make([]bool, p.Faces)
	known[0] = true
	for changed := true; changed; {
		changed = false
		for _, e := range p.Edges {
			if known[e.Left] == known[e.Right] {
				continue
			}
			from, to := e.Left, e.Right
			if known[to] {
				from, to = to, from
			}
			inside[to], known[to], changed = inside[from] != e.crosses(profile), true, true
		}
	}
	return inside
}

// crosses reports whether stepping over the edge enters or leaves a profile.
func (e Edge) crosses(profile int) bool {
	n := 0
	for _, o := range e.Origins {
		if o.Profile == profile {
			n++
		}
	}
	return n%2 == 1
}

// Of reports whether an edge belongs to a profile.
func (e Edge) Of(profile int) bool {
	return slices.ContainsFunc(e.Origins, func(o Origin) bool { return o.Profile == profile })
}
