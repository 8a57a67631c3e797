package exhibit

import "math"

// Thin keeps at most so many points of a line that runs along X: its ends, its highest
// and lowest point, and then each time the point that lies farthest, along Y, from the
// line drawn so far. A line of no more points is kept whole.
func Thin(points []Point, most int) []Point {
	if len(points) <= most || most < 4 {
		return points
	}
	keep := make([]bool, len(points))
	keep[0], keep[len(points)-1] = true, true
	low, high := 0, 0
	for i, p := range points {
		if p.Y < points[low].Y {
			low = i
		}
		if p.Y > points[high].Y {
			high = i
		}
	}
	keep[low], keep[high] = true, true
	parts := stretches(points, keep)
	for kept := len(parts) + 1; kept < most; kept++ {
		i := widest(parts)
		if parts[i].off == 0 {
			break
		}
		keep[parts[i].at] = true
		first, second := stretch(points, parts[i].from, parts[i].at), stretch(points, parts[i].at, parts[i].to)
		parts[i] = first
		parts = append(parts, second)
	}
	var thin []Point
	for i, k := range keep {
		if k {
			thin = append(thin, points[i])
		}
	}
	return thin
}

// part is a stretch between two kept points and the point in it farthest off.
type part struct {
	from, to, at int
	off          float64
}

func stretches(points []Point, keep []bool) []part {
	var parts []part
	from := 0
	for i := 1; i < len(points); i++ {
		if keep[i] {
			parts = append(parts, stretch(points, from, i))
			from = i
		}
	}
	return parts
}

func stretch(points []Point, from, to int) part {
	p := part{from: from, to: to, at: from}
	a, b := points[from], points[to]
	slope := 0.0
	if b.X > a.X {
		slope = (b.Y - a.Y) / (b.X - a.X)
	}
	for i := from + 1; i < to; i++ {
		if off := math.Abs(points[i].Y - a.Y - slope*(points[i].X-a.X)); off > p.off {
			p.at, p.off = i, off
		}
	}
	return p
}

func widest(parts []part) int {
	at := 0
	for i, p := range parts {
		if p.off > parts[at].off {
			at = i
		}
	}
	return at
}
