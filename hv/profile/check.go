package profile

import (
	"fmt"

	"kilovet/hv/quantity"
)

// check finds what is wrong with a profile by itself.
func (p Profile) check() Faults {
	var faults Faults
	tol := sameness * Extent(p)
	for i, s := range p.Segments {
		faults = append(faults, p.checkAxis(i, s, tol)...)
	}
	for i := range p.Segments {
		for j := i + 1; j < len(p.Segments); j++ {
			faults = append(faults, p.checkCrossing(i, j, tol)...)
		}
	}
	return faults
}

func (p Profile) fault(i int, at Point, what string, args ...any) Fault {
	return Fault{p.Name, i + 1, at, fmt.Sprintf(what, args...)}
}

// checkAxis reports a segment that reaches beyond the axis or is too short.
func (p Profile) checkAxis(i int, s Segment, tol quantity.Length) Faults {
	if s.Length() < 3*tol {
		return Faults{p.fault(i, s.To, "the stroke is shorter than a millionth of the outline")}
	}
	if low := s.leftmost(); low.R < -tol {
		return Faults{p.fault(i, low, "the outline reaches beyond the axis; r is never negative")}
	}
	return nil
}

// leftmost is the point of a segment nearest the axis, or farthest beyond it.
func (s Segment) leftmost() Point {
	low := s.From
	if s.To.R < low.R {
		low = s.To
	}
	if s.Turn != Straight {
		west := Point{s.Centre.R - s.Radius(), s.Centre.Z}
		if _, d := s.Closest(west); d <= 1e-9*s.Radius() && west.R < low.R {
			low = west
		}
	}
	return low
}

// checkCrossing reports where two segments of one path meet other than end to end.
func (p Profile) checkCrossing(i, j int, tol quantity.Length) Faults {
	a, b := p.Segments[i], p.Segments[j]
	if along(a, b, tol) {
		return Faults{p.fault(j, b.From, "the outline runs back along its own stroke %d", i+2)}
	}
	for _, at := range meet(a, b, tol) {
		follows := j == i+1 && at.Distance(a.To) <= 2*tol
		closes := i == 0 && j == len(p.Segments)-1 && at.Distance(b.To) <= 2*tol && at.Distance(a.From) <= 2*tol
		if !follows && !closes {
			return Faults{p.fault(j, at, "the outline crosses or touches its own stroke %d", i+2)}
		}
	}
	return nil
}

// along reports whether b, or a good part of it, lies on a, or a on b.
func along(a, b Segment, tol quantity.Length) bool {
	share := func(s, of Segment) (n int) {
		for i := range 9 {
			if _, d := s.Closest(of.At(float64(i+1) / 10)); d <= tol {
				n++
			}
		}
		return n
	}
	return share(a, b) > 2 || share(b, a) > 2
}

// Closed reports whether the path ends where it began.
func (p Profile) Closed() bool {
	if len(p.Segments) == 0 {
		return false
	}
	first, last := p.Segments[0].From, p.Segments[len(p.Segments)-1].To
	return first.Distance(last) <= 2*sameness*Extent(p)
}

// ClosedByAxis closes a path whose two ends lie on the axis by a line along it;
// a closed path is returned as it is. The error, of type Faults, says where an
// open path ends.
func (p Profile) ClosedByAxis() (Profile, error) {
	if p.Closed() || len(p.Segments) == 0 {
		return p, nil
	}
	first, last := p.Segments[0].From, p.Segments[len(p.Segments)-1].To
	tol := sameness * Extent(p)
	if first.R > tol || last.R > tol {
		return p, Faults{p.fault(len(p.Segments)-1, last,
			"the outline must be closed, but it began at %v", first)}
	}
	closing := Segment{From: last, To: first}
	return Profile{p.Name, append(p.Segments[:len(p.Segments):len(p.Segments)], closing)}, nil
}
