package profile

import (
	"math"
	"math/cmplx"

	"kilovet/hv/quantity"
)

// Turn says which way a stroke goes, seen along the path.
type Turn int

const (
	// Straight is a line.
	Straight Turn = iota
	// Left is an arc that turns counter-clockwise.
	Left
	// Right is an arc that turns clockwise.
	Right
)

// Segment is a line, or an arc about a centre, from one point to another. An arc
// whose ends are one point is a full circle.
type Segment struct {
	From, To Point
	Centre   Point // of an arc
	Turn     Turn
}

// Sweep is the angle an arc turns through, positive to the left; 0 for a line.
func (s Segment) Sweep() quantity.Angle {
	if s.Turn == Straight {
		return 0
	}
	c := s.Centre.plane()
	turn := cmplx.Phase((s.To.plane() - c) / (s.From.plane() - c))
	if s.From == s.To {
		turn = 0
	}
	if s.Turn == Left && turn <= 0 {
		turn += 2 * math.Pi
	}
	if s.Turn == Right && turn >= 0 {
		turn -= 2 * math.Pi
	}
	return quantity.Angle(turn)
}

// Radius of an arc; 0 for a line.
func (s Segment) Radius() quantity.Length {
	if s.Turn == Straight {
		return 0
	}
	return s.Centre.Distance(s.From)
}

// Length along the segment.
func (s Segment) Length() quantity.Length {
	if s.Turn == Straight {
		return s.From.Distance(s.To)
	}
	return s.Radius() * quantity.Length(math.Abs(float64(s.Sweep())))
}

// At is the point at a fraction of the length.
func (s Segment) At(fraction float64) Point {
	switch {
	case fraction == 0:
		return s.From
	case fraction == 1:
		return s.To
	case s.Turn == Straight:
		return point(s.From.plane() + complex(fraction, 0)*(s.To.plane()-s.From.plane()))
	}
	c := s.Centre.plane()
	return point(c + (s.From.plane()-c)*cmplx.Rect(1, fraction*float64(s.Sweep())))
}

// Heading is the direction of the path at a fraction of the length, from the r axis.
func (s Segment) Heading(fraction float64) quantity.Angle {
	if s.Turn == Straight {
		return quantity.Angle(cmplx.Phase(s.To.plane() - s.From.plane()))
	}
	spoke := s.At(fraction).plane() - s.Centre.plane()
	if s.Turn == Left {
		return quantity.Angle(cmplx.Phase(spoke * 1i))
	}
	return quantity.Angle(cmplx.Phase(spoke * -1i))
}

// Part is the piece between two fractions of the length.
func (s Segment) Part(from, to float64) Segment {
	return Segment{From: s.At(from), To: s.At(to), Centre: s.Centre, Turn: s.Turn}
}

// Reversed is the same path walked from its end.
func (s Segment) Reversed() Segment {
	s.From, s.To = s.To, s.From
	switch s.Turn {
	case Left:
		s.Turn = Right
	case Right:
		s.Turn = Left
	}
	return s
}

// Closest is the fraction of the length at which the segment comes closest to a
// point, and the distance there.
func (s Segment) Closest(p Point) (fraction float64, distance quantity.Length) {
	fraction = s.project(p)
	distance = p.Distance(s.At(fraction))
	for _, end := range []float64{0, 1} {
		if d := p.Distance(s.At(end)); d < distance {
			fraction, distance = end, d
		}
	}
	return fraction, distance
}

// project drops a point onto the segment, not past its ends.
func (s Segment) project(p Point) float64 {
	if s.Turn == Straight {
		along := s.To.plane() - s.From.plane()
		f := real((p.plane()-s.From.plane())*cmplx.Conj(along)) / real(along*cmplx.Conj(along))
		return math.Max(0, math.Min(1, f))
	}
	c, sweep := s.Centre.plane(), float64(s.Sweep())
	turn := cmplx.Phase((p.plane() - c) / (s.From.plane() - c))
	if turn*sweep < 0 {
		turn += math.Copysign(2*math.Pi, sweep)
	}
	if math.Abs(turn) > math.Abs(sweep) || math.IsNaN(turn) {
		return 0
	}
	return turn / sweep
}
