package field

import (
	"math"
	"math/cmplx"

	"kilovet/hv/profile"
	"kilovet/hv/quantity"
)

// Equipotential is one line of equal potential.
type Equipotential struct {
	Level  quantity.Voltage
	Points []profile.Point
}

const (
	longestChord = 0.03 // of the extent, in a picture
	widestTurn   = 0.15 // radians in one step
)

// Equipotentials are the lines of equal potential for pictures, level by level. They
// are found where they cross the axis, boundaries, surfaces of dielectrics and field
// lines from all electrodes. Levels at which an electrode stands have none.
func (f *Field) Equipotentials(levels ...quantity.Voltage) (lines []Equipotential, err error) {
	tracks := f.tracks()
	for _, level := range levels {
		if f.isElectrode(float64(level)) {
			continue
		}
		var drawn [][]complex128
		for _, track := range tracks {
			for _, s := range track.crossing(float64(level)) {
				if passes(drawn, s.x) {
					continue
				}
				path, err := f.contour(s, float64(level))
				if err != nil {
					return nil, err
				}
				drawn = append(drawn, path)
				lines = append(lines, Equipotential{level, f.outerPath(path)})
			}
		}
	}
	return lines, nil
}

func (f *Field) outerPath(path []complex128) []profile.Point {
	out := make([]profile.Point, len(path))
	for i, x := range path {
		out[i] = f.outer(x)
	}
	return out
}

// isElectrode reports whether some electrode stands at a level.
func (f *Field) isElectrode(level float64) bool {
	for _, v := range f.volts {
		if math.Abs(v-level) <= 1e-6*f.span() {
			return true
		}
	}
	return false
}

// seed is a place with its region and potential.
type seed struct {
	x      complex128
	u      float64
	region int
}

// track is a path along which potentials are known.
type track []seed

// crossing lists where a track passes a level, by straight interpolation.
func (t track) crossing(level float64) (list []seed) {
	for i := 1; i < len(t); i++ {
		a, b := t[i-1], t[i]
		if a.region != b.region || (a.u-level)*(b.u-level) > 0 || a.u == b.u {
			continue
		}
		part := complex((level-a.u)/(b.u-a.u), 0)
		list = append(list, seed{a.x + part*(b.x-a.x), level, a.region})
	}
	return list
}

// tracks are the axis, the walls that are no conductors, and a field line from the
// middle of every conductor.
func (f *Field) tracks() []track {
	tracks := f.axisTracks()
	for _, fc := range f.values.faces() {
		sd := &f.values.sides[fc.side]
		if f.walls[sd.wall].electrode < 0 {
			tracks = append(tracks, f.panelTrack(fc))
			continue
		}
		w := &f.walls[sd.wall]
		if m := w.curve.length / 2; sd.panel.start <= m && m < sd.panel.start+sd.panel.h {
			tracks = append(tracks, f.lineTrack(fc, 2*(m-sd.panel.start)/sd.panel.h-1))
		}
	}
	return tracks
}

func (f *Field) panelTrack(fc face) (t track) {
	for _, r := range f.fineRule {
		x, u, _ := f.surface(f.values, fc, r.t)
		t = append(t, seed{x, u, f.regionOf(fc)})
	}
	return t
}

func (f *Field) lineTrack(fc face, at float64) (t track) {
	line, _ := f.lineFrom(Peak{face: fc, t: at}, false) // what there is of it serves
	region := f.regionOf(fc)
	for i, p := range line.Points {
		if i > 0 && p.Body != line.Points[i-1].Body {
			region = f.faceOf[f.plane.FaceAt(f.nudged(line.Points[min(i+1, len(line.Points)-1)].At))]
		}
		t = append(t, seed{f.inner(p.At), float64(p.Potential), region})
	}
	return t
}

// axisTracks are the stretches of the axis beside regions, and beyond the figure
// as far as lines are followed.
func (f *Field) axisTracks() (tracks []track) {
	const points = 60
	for _, e := range f.plane.Edges {
		if !onAxis(e) {
			continue
		}
		region := f.faceOf[f.plane.FaceAt(f.nudged(e.At(0.5)))]
		if region < 0 {
			continue
		}
		var t track
		for k := range points + 1 {
			x := f.inner(e.At(float64(k) / points))
			if f.beyondMirror(x) {
				continue
			}
			u, _ := f.look(f.values, region, x)
			t = append(t, seed{x, u, region})
		}
		tracks = append(tracks, t)
	}
	return tracks
}

// passes reports whether one of the paths passes through a point.
func passes(paths [][]complex128, x complex128) bool {
	for _, path := range paths {
		for i := 1; i < len(path); i++ {
			a, b := path[i-1], path[i]
			along := b - a
			part := real((x-a)*cmplx.Conj(along)) / math.Max(real(along*cmplx.Conj(along)), 1e-300)
			foot := a + along*complex(math.Max(0, math.Min(1, part)), 0)
			if apart(foot, x) < 1e-5+0.06*cmplx.Abs(along) {
				return true
			}
		}
	}
	return false
}

// contour is the path of equal potential through a seed, both ways.
func (f *Field) contour(s seed, level float64) ([]complex128, error) {
	forth, closed, err := f.half(s, level, 1i)
	if err != nil || closed {
		return forth, err
	}
	back, _, err := f.half(s, level, -1i)
	path := make([]complex128, 0, len(back)+len(forth))
	for i := len(back) - 1; i > 0; i-- {
		path = append(path, back[i])
	}
	return append(path, forth...), err
}

// half follows one way, pulling every point back to the level.
func (f *Field) half(s seed, level float64, sense complex128) (path []complex128, closed bool, err error) {
	t := &tracer{Field: f, region: s.region, along: sense, tolerance: 3e-3}
	var last chord
	t.longest = func(x, g complex128) float64 {
		return last.longest(x, g*sense/complex(cmplx.Abs(g), 0))
	}
	t.put = func(x complex128, u float64, g complex128) complex128 {
		if size := real(g * cmplx.Conj(g)); size > 0 {
			x -= g * complex((u-level)/size, 0)
		}
		x = complex(math.Max(0, real(x)), imag(x))
		path = append(path, x)
		return x
	}
	t.done = func(x complex128) bool {
		n := len(path)
		closed = n > 4 && apart(path[n-1], path[0]) < 1.01*apart(path[n-1], path[n-2])
		return closed
	}
	t.arrive(s.x)
	_, err = t.follow(s.x)
	if closed {
		path = append(path, path[0])
	}
	return path, closed, err
}

// chord is a step over which the line, bent as it was over the last one, does not
// turn too far for a picture.
type chord struct{ x, d complex128 }

func (c *chord) longest(x, d complex128) float64 {
	way := apart(x, c.x)
	turn := 0.0
	if c.d != 0 && way > 0 {
		turn = math.Abs(cmplx.Phase(d/c.d)) / way
	}
	*c = chord{x, d}
	return math.Min(longestChord, widestTurn/math.Max(turn, 1e-9))
}
