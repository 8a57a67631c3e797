package network

import (
	"math"
)

// heed sets what may escape the cubic through a sine in a step: twice its largest error.
func (w *walker) heed(h float64) {
	x := w.omega * h
	w.margin = 1e-3 * x * x * x * x * w.scale
}

// crossing finds the first diode that leaves its state during the trial step and
// the part of the step at which it does; none is −1.
func (w *walker) crossing() (diode int, at float64) {
	diode, at = -1, math.Inf(1)
	w.watch()
	for _, i := range w.near {
		y := w.beyond(i)
		if y.farBelow(w.slack[i]) {
			continue
		}
		p := through(y[0], y[1], y[2], y[3])
		level := math.Max(w.slack[i], p[0]*(1+1e-9)) // a diode that just switched may start beyond its slack
		if _, high := p.hull(); high <= level {
			continue
		}
		if x := p.rise(level); x < at {
			diode, at = i, x
		}
	}
	return diode, at
}

// watch lists the diodes that may leave their state during the trial step, or come so
// near to it that the cubic cannot tell. A cubic through samples leaves their range by
// less than the range itself.
func (w *walker) watch() {
	w.near = w.near[:0]
	u0, u1, u2, u3 := w.u, w.stage[0], w.stage[1], w.stage[2]
	s0, s1, s2, s3 := w.sine[0], w.sine[1], w.sine[2], w.sine[3]
	for i := range w.diodes {
		d := &w.diodes[i]
		fixed, swing := d.offset.direct+w.sign*d.offset.square-d.drop, d.offset.sine
		y0, y1, y2, y3 := fixed+swing*s0, fixed+swing*s1, fixed+swing*s2, fixed+swing*s3
		if k := d.a; k >= 0 {
			y0, y1, y2, y3 = y0+u0[k], y1+u1[k], y2+u2[k], y3+u3[k]
		}
		if k := d.b; k >= 0 {
			y0, y1, y2, y3 = y0-u0[k], y1-u1[k], y2-u2[k], y3-u3[k]
		}
		low, high := rangeOf(y0, y1, y2, y3)
		if w.on[i] {
			low, high = -high, -low
		}
		if high+(high-low) >= -w.margin {
			w.near = append(w.near, i)
		}
	}
}

// doubtful finds the first place within the trial step at which a diode comes so
// near to leaving its state that the cubic cannot tell whether it does; one where
// there is none. A step to there can.
func (w *walker) doubtful() float64 {
	at := 1.0
	for _, i := range w.near {
		if w.on[i] {
			continue
		}
		y := w.beyond(i)
		p := through(y[0], y[1], y[2], y[3])
		if p.monotonic() {
			continue
		}
		for _, t := range p.turns() {
			if t > 1e-3 && t < math.Min(at, 0.999) && p.at(t) > -w.margin {
				at = t
			}
		}
	}
	return at
}

// rise is the first place in [0, 1] where a cubic rises through zero on its way
// above a level; infinite where it stays below. A cubic that starts between zero
// and the level is followed to the level.
func (p *cubic) rise(level float64) float64 {
	target := 0.0
	if p[0] > 0 {
		target = level
	}
	low := 0.0
	for _, high := range p.turns() {
		if p.at(high) > level {
			return p.between(low, high, target)
		}
		low = high
	}
	return math.Inf(1)
}

// turns are the ends of the pieces of [0, 1] on which a cubic is monotonic.
func (p *cubic) turns() [3]float64 {
	t := [3]float64{1, 1, 1}
	a, b, c := 3*p[3], p[2], p[1] // slope a x² + 2 b x + c
	d := b*b - a*c
	if d < 0 {
		return t
	}
	r := -(b + math.Copysign(math.Sqrt(d), b))
	x, y := r/a, c/r
	if r == 0 {
		x, y = 1, 1
	}
	if x > y {
		x, y = y, x
	}
	n := 0
	for _, v := range [2]float64{x, y} {
		if v > 0 && v < 1 {
			t[n] = v
			n++
		}
	}
	return t
}

// between solves p = target on a piece where p rises from low to high.
func (p *cubic) between(low, high, target float64) float64 {
	x := (low + high) / 2
	for range 60 {
		y := p.at(x) - target
		if y > 0 {
			high = x
		} else {
			low = x
		}
		next := x - y/p.slope(x)
		if !(next > low && next < high) {
			next = (low + high) / 2
		}
		if math.Abs(next-x) <= 1e-14 {
			return next
		}
		x = next
	}
	return x
}

// locate shortens the trial step until a diode that leaves its state within it
// just does so at its end; it returns the length and the diode, −1 where none does.
// A diode that does so at once is returned with the shortest step.
func (w *walker) locate(h float64) (float64, int) {
	w.heed(h)
	target, at := w.crossing()
	if target < 0 {
		if at = w.doubtful(); at < 1 {
			h *= at
			w.try(h)
			target, at = w.crossing()
		}
		if target < 0 {
			return h, -1
		}
	}
	low, high := 0.0, h
	least := w.grain
	for range 16 {
		h = math.Max(at*h, least)
		w.try(h)
		diode, x := w.crossing()
		if diode >= 0 {
			if target, at, high = diode, x, h; h <= least {
				return h, target
			}
			continue
		}
		p := w.excess(target)
		if p.at(1) >= -w.slack[target] {
			return w.polish(h, target), target
		}
		low = h
		if at = 1 - p.at(1)/p.slope(1); !(at > 1 && at*h < high) {
			return h, -1 // the crossing was the polynomial's, not the network's
		}
	}
	if low <= least {
		return least, target
	}
	w.try(low)
	return low, -1
}

// polish brings an event nearer to the instant at which the diode is at its drop
// exactly, where the period has to be a smooth function of its start.
func (w *walker) polish(h float64, target int) float64 {
	if !w.smooth {
		return h
	}
	p := w.excess(target)
	for range 3 {
		step := p.at(1) / p.slope(1) * h
		if math.Abs(p.at(1)) <= 1e-2*w.slack[target] || !(math.Abs(step) < 0.1*h) {
			break
		}
		w.try(h - step)
		next := w.excess(target)
		if math.Abs(next.at(1)) >= math.Abs(p.at(1)) {
			w.try(h)
			break
		}
		h, p = h-step, next
	}
	return h
}

// flip changes the state of a diode at its drop, and of all others that are
// leaving theirs at the same instant.
func (w *walker) flip(diode int) {
	for i := range w.diodes {
		if end := w.beyond(i)[3]; i != diode && math.Abs(end) > 2*w.slack[i] {
			continue
		}
		p := w.excess(i)
		leaving := math.Abs(p.at(1)) <= w.slack[i] && p.slope(1) > 0 && math.Abs(p[0]) > w.slack[i]
		if i == diode || leaving {
			w.on[i] = !w.on[i]
			w.work.Events++
		}
	}
	w.switched()
}
