package field

import (
	"math"
	"math/cmplx"

	"kilovet/hv/lack"
)

const (
	traceSteps = 3000 // at most
	traceWide  = 5.0  // extents of the figure a line may go away from its start
	firstStep  = 1e-4 // of the extent
	leastStep  = 1e-9
	lastStep   = 2e-4 // within this of a wall a line goes straight to it
)

// tracer follows a line along the field or across it.
type tracer struct {
	*Field
	region    int
	within    bool       // the line ends where it leaves its region
	along     complex128 // ±1 with or against the gradient, ±i across it
	tolerance float64    // of a step, relative
	longest   func(x, g complex128) float64
	put       func(x complex128, u float64, g complex128) complex128 // the place it is put at
	done      func(x complex128) bool                                // nil: never
}

// direction of the line at a point, a unit vector, and the field there.
func (t *tracer) direction(x complex128) (d complex128, u float64, g complex128) {
	u, g = t.look(t.values, t.region, x)
	if size := cmplx.Abs(g); size > 0 {
		d = g * t.along / complex(size, 0)
	}
	return d, u, g
}

// follow goes on by Bogacki and Shampine's rule of third order with its error
// estimate (Appl. Math. Lett. 2, 321, 1989), until a wall without a way through, the
// axis across, or far away. It returns the wall.
func (t *tracer) follow(start complex128) (*wall, error) {
	x, h, wide, ends := start, firstStep, t.wide(), false
	for range traceSteps {
		d, _, g := t.direction(x)
		if d == 0 || apart(x, start) > wide || t.done != nil && t.done(x) {
			return nil, nil
		}
		longest := t.longest(x, g)
		h = min(h, longest)
		if w, at := t.crossed(x, x+d*complex(h+lastStep, 0)); w != nil {
			ahead := apart(x, at)
			if last := min(longest, lastStep); ahead <= last {
				if x, ends = t.meet(w, at, d); ends {
					return w, nil
				}
				h = firstStep
				continue
			} else {
				h = min(h, ahead-last/2)
			}
		}
		next, miss := t.step(x, d, h)
		w, _ := t.crossed(x, next)
		if w != nil || miss > t.tolerance*h && h > leastStep {
			h = max(h/2, leastStep)
			continue
		}
		if real(next) < 0 {
			if t.across() {
				t.arrive(t.atAxis(x, next))
				return nil, nil
			}
			next = complex(0, imag(next))
		}
		x = t.arrive(next)
		if miss < t.tolerance*h/8 {
			h *= 1.6
		}
	}
	return nil, lack.Failed("a line from %s does not end within %d steps", t.describe(start), traceSteps)
}

// across reports whether the line is an equipotential.
func (t *tracer) across() bool { return imag(t.along) != 0 }

// arrive puts a point on the line.
func (t *tracer) arrive(x complex128) complex128 {
	_, u, g := t.direction(x)
	return t.put(x, u, g)
}

// atAxis is where a step meets the axis.
func (t *tracer) atAxis(x, next complex128) complex128 {
	part := real(x) / (real(x) - real(next))
	return complex(0, imag(x)+part*(imag(next)-imag(x)))
}

func (t *tracer) step(x, d1 complex128, h float64) (next complex128, miss float64) {
	hc := complex(h, 0)
	d2, _, _ := t.direction(x + d1*hc/2)
	d3, _, _ := t.direction(x + d2*hc*0.75)
	next = x + hc*(2*d1+3*d2+4*d3)/9
	d4, _, _ := t.direction(next)
	return next, cmplx.Abs(hc * (-5*d1/72 + d2/12 + d3/9 - d4/8))
}

// crossed finds the wall that a step from x runs into first, and where. A natural
// boundary is met only across the field: along it a line stays beside it.
func (t *tracer) crossed(x, next complex128) (first *wall, at complex128) {
	best := math.Inf(1)
	for i := range t.walls {
		w := &t.walls[i]
		if w.kind == natural && !t.across() || w.left != t.region && w.right != t.region {
			continue
		}
		for _, p := range w.curve.crossings(x, next) {
			if d := apart(p, x); d > 2*onSurface && d < best {
				best, first, at = d, w, p
			}
		}
	}
	if m := t.mirror; m != nil && m.earthed && !t.across() {
		if d, p := t.toMirror(x, next); d < best {
			return &wall{kind: conductor, electrode: len(t.names) - 1}, p
		}
	}
	return first, at
}

// through takes the line beyond a wall, if there is a way.
func (t *tracer) through(w *wall, at complex128) bool {
	if w.kind != interfaces || t.within {
		return false
	}
	t.region = w.left + w.right - t.region
	t.arrive(at)
	return true
}

// grazing is the sine of the angle below which a line that is to stay in its body runs
// along a surface of it and does not leave it: what is left of the angle is rounding.
const grazing = 1e-2

// meet puts a line on a wall that it runs into; where it goes on and whether it ends there.
func (t *tracer) meet(w *wall, at, d complex128) (x complex128, ends bool) {
	if inside, grazes := t.grazed(w, at, d); grazes {
		return t.arrive(inside), false
	}
	return t.arrive(at), !t.through(w, at)
}

// grazed reports whether a line in a direction only grazes a surface of the body that it
// is to stay in, and the place from which it goes on beside it.
func (t *tracer) grazed(w *wall, at, d complex128) (inside complex128, grazes bool) {
	if !t.within || w.kind != interfaces {
		return at, false
	}
	_, path := w.curve.at(min(max(w.curve.project(at), 0), w.curve.length))
	inward := path * 1i
	if w.left != t.region {
		inward = -inward
	}
	return at + inward*lastStep, math.Abs(real(d*cmplx.Conj(inward))) < grazing
}
