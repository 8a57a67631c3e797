package profile

import (
	"fmt"
	"math"
	"math/cmplx"
	"strings"

	"kilovet/hv/quantity"
)

// Stroke is one entry of an outline as it is described: where the path starts
// (From, first entry only), or a line to the next point (To), or an arc to it
// (To, Centre and Turn).
type Stroke struct {
	From, To, Centre *Point
	Turn             Turn
}

// Profile is a path of segments, each beginning where the last one ended.
// Segment k comes from stroke k+1.
type Profile struct {
	Name     string
	Segments []Segment
}

// Fault is something wrong with a profile: at which stroke (the index into what
// was described), where, and what.
type Fault struct {
	Profile string
	Stroke  int
	At      Point
	What    string
}

// Error says what is wrong with the outline.
func (f Fault) Error() string {
	return fmt.Sprintf("profile %q, stroke %d, at %v: %s", f.Profile, f.Stroke+1, f.At, f.What)
}

// Faults are all that is wrong, in the order of the strokes.
type Faults []Fault

// Error says all that is wrong.
func (f Faults) Error() string {
	lines := make([]string, len(f))
	for i := range f {
		lines[i] = f[i].Error()
	}
	return strings.Join(lines, "\n")
}

// radiusMismatch is how far the ends of an arc may differ in their distance from
// the centre, relative to the radius: rounding of a drawing, no more. The centre
// is then moved to where both are equal.
const radiusMismatch = 2e-3

// New builds a profile from its strokes and checks it by itself: the order of the
// strokes, arcs whose ends lie on one circle, nothing beyond the axis, no crossing
// of its own path. The error is of type Faults.
func New(name string, strokes []Stroke) (Profile, error) {
	b := builder{profile: Profile{Name: name}}
	for i, s := range strokes {
		b.add(i, s)
	}
	if len(b.faults) == 0 && len(b.profile.Segments) == 0 {
		b.fault(len(strokes)-1, Point{}, "the outline has no line and no arc")
	}
	if len(b.faults) == 0 {
		b.faults = b.profile.check()
	}
	if len(b.faults) > 0 {
		return Profile{}, b.faults
	}
	return b.profile, nil
}

// builder follows the pen.
type builder struct {
	profile Profile
	pen     *Point
	faults  Faults
}

func (b *builder) fault(stroke int, at Point, what string, args ...any) {
	b.faults = append(b.faults, Fault{b.profile.Name, max(stroke, 0), at, fmt.Sprintf(what, args...)})
}

func (b *builder) add(i int, s Stroke) {
	for _, p := range []*Point{s.From, s.To, s.Centre} {
		if p != nil && !finite(*p) {
			b.fault(i, Point{}, "a coordinate is not a number")
			return
		}
	}
	switch {
	case i == 0 && (s.From == nil || s.To != nil || s.Centre != nil):
		b.fault(i, Point{}, "an outline begins with `from` alone")
	case i == 0:
		b.pen = s.From
	case s.From != nil || s.To == nil:
		b.fault(i, Point{}, "after the start every stroke has `to`, and no `from`")
	case (s.Centre == nil) != (s.Turn == Straight):
		b.fault(i, *s.To, "an arc needs both `centre` and `turn`")
	case b.pen == nil:
		b.pen = s.To
	default:
		b.draw(i, s)
	}
}

func (b *builder) draw(i int, s Stroke) {
	seg := Segment{From: *b.pen, To: *s.To, Turn: s.Turn}
	b.pen = s.To
	if s.Centre != nil {
		centre, ok := centred(seg.From, seg.To, *s.Centre)
		if !ok {
			b.fault(i, *s.To, "the ends of the arc are %.6g mm and %.6g mm from its centre",
				float64(s.Centre.Distance(seg.From))*1e3, float64(s.Centre.Distance(seg.To))*1e3)
			return
		}
		seg.Centre = centre
	}
	if seg.Length() == 0 {
		b.fault(i, *s.To, "the stroke has no length")
		return
	}
	b.profile.Segments = append(b.profile.Segments, seg)
}

// centred moves a centre onto the perpendicular bisector of the ends of its arc.
func centred(from, to, centre Point) (Point, bool) {
	a, b := centre.Distance(from), centre.Distance(to)
	if a == 0 || b == 0 || math.Abs(float64(a-b)) > radiusMismatch*float64(max(a, b)) {
		return centre, false
	}
	if from == to {
		return centre, true
	}
	f, chord := from.plane(), to.plane()-from.plane()
	height := imag((centre.plane() - f) * cmplx.Conj(chord) / complex(cmplx.Abs(chord), 0))
	unit := chord / complex(cmplx.Abs(chord), 0)
	return point(f + chord/2 + unit*complex(0, height)), true
}

func finite(p Point) bool {
	ok := func(x quantity.Length) bool { return !math.IsNaN(float64(x)) && !math.IsInf(float64(x), 0) }
	return ok(p.R) && ok(p.Z)
}
