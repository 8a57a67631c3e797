package network

import (
	"math"
	"math/cmplx"

	"kilovet/hv/lack"
)

// settle finds which diodes conduct after a jump, or through a burst of switchings,
// with one short step of the implicit Euler method. Its solution is the minimum of
// a convex function, which Newton's method with a line search always reaches.
func (w *walker) settle(h float64) error {
	w.sine[0] = imag(w.wave)
	w.next = w.wave * cmplx.Rect(1, w.omega*h)
	end := imag(w.next)
	w.sine[1], w.sine[2], w.sine[3] = end, end, end
	u := w.stage[2]
	copy(u, w.u)
	small := 1e-13 * w.scale
	for pass := range 50 + 4*len(w.diodes) {
		w.switched()
		w.euler(h, end)
		far, whole := w.descend(h, end)
		if pass > 20 && small < 1e-6*w.scale {
			small *= 2 // a column of capacitors drowned in rounding
		}
		if far <= small || !w.conduct(end, small) && whole {
			w.settled(h, end)
			return nil
		}
	}
	return lack.Failed("which diodes conduct after a jump was not found")
}

// euler solves (C + h G + h²/L) u = q − … into the real lane.
func (w *walker) euler(h, end float64) {
	w.work.Factorisations++
	for k, c := range w.cap {
		m := c + h*(w.matrix[k]+h*w.coil[k])
		w.factor[k] = trio{m, m, 0}
	}
	for k := range w.lanes {
		w.lanes[k] = trio{r: w.pull(k, h, end) - h*(w.steady[k]+(w.swing[k]-w.condSine[k])*end)}
	}
	for i := range w.inductors {
		l := &w.inductors[i]
		l.injectTrio(w.lanes, trio{r: -h * (w.amps[i] + h/l.value*l.offset.at(w.sign, end))})
	}
	w.pattern.factorise(w.factor, w.lanes)
}

// pull is the charge that the rest of an unknown's network is left with, without
// direct currents.
func (w *walker) pull(k int, h, end float64) float64 {
	return w.q[k] - w.held[k] - (w.capSine[k]+h*w.condSine[k])*end
}

// descend goes towards the solution in the real lane as far as the convex function
// falls; it returns how far the solution was and whether it went all the way.
func (w *walker) descend(h, end float64) (far float64, whole bool) {
	u, d := w.stage[2], w.stage[1]
	for k := range d {
		d[k] = w.lanes[k].r - u[k]
		far = math.Max(far, math.Abs(d[k]))
	}
	w.way.start, w.way.curve = w.slope(u, d, h, end)
	w.way.kinks = w.way.kinks[:0]
	for i := range w.diodes {
		p := &w.diodes[i]
		rate := p.difference(d)
		w.way.kinks = append(w.way.kinks, kink{p.volts(u, w.sign, end) - p.drop, rate, h * p.on * rate})
	}
	t := w.way.least()
	if t == 1 {
		for k := range u {
			u[k] = w.lanes[k].r
		}
		return far, true
	}
	axpy(t, d, u)
	return far, false
}

// slope is the derivative of the convex function without the conducting diodes
// along d, and its rate of change.
func (w *walker) slope(u, d []float64, h, end float64) (start, curve float64) {
	for _, m := range []struct {
		entries []float64
		factor  float64
	}{{w.cap, 1}, {w.cond, h}, {w.coil, h * h}} {
		start += m.factor * w.form(m.entries, d, u)
		curve += m.factor * w.form(m.entries, d, d)
	}
	for k := range d {
		start -= d[k] * (w.pull(k, h, end) - h*(w.condDirect[k]+w.sign*w.condSquare[k]))
	}
	for i := range w.inductors {
		l := &w.inductors[i]
		start += l.difference(d) * h * (w.amps[i] + h/l.value*l.offset.at(w.sign, end))
	}
	return start, curve
}

// form is x·M·y for admittances given to ground and between unknowns.
func (s *system) form(m, x, y []float64) float64 {
	sum := 0.0
	for k := range s.n {
		sum += m[k] * x[k] * y[k]
		for e := s.pattern.start[k]; e < s.pattern.start[k+1]; e++ {
			i := s.pattern.row[e]
			sum += m[s.n+int(e)] * (x[i] - x[k]) * (y[i] - y[k])
		}
	}
	return sum
}

// conduct brings the diodes' states up to date, but for what rounding may decide, and
// reports whether any changed.
func (w *walker) conduct(end, small float64) (changed bool) {
	for i := range w.diodes {
		d := &w.diodes[i]
		over := d.volts(w.stage[2], w.sign, end) - d.drop
		if on := over > 0; on != w.on[i] && math.Abs(over) > small {
			w.on[i], changed = on, true
			w.work.Events++
		}
	}
	return changed
}

// settled makes the solution the trial step: every stage stands at its end.
func (w *walker) settled(h, end float64) {
	copy(w.stage[0], w.stage[2])
	copy(w.stage[1], w.stage[2])
	for i := range w.inductors {
		l := &w.inductors[i]
		a := w.amps[i] + h/l.value*l.volts(w.stage[2], w.sign, end)
		w.branch[0][i], w.branch[1][i], w.branch[2][i] = a, a, a
	}
}
