package steady

import "math"

// Where the diodes have no resistance of their own, a conducting one conducts so many
// times better than the best of what it ends on does within a step: ideal to less than
// a step is wrong by, and its voltage, whose sign tells whether it should conduct,
// still stands clear of rounding. Between the bounds it stays as it is, since its
// voltage would move with it.
const (
	leastIdeal = 1e7
	goodIdeal  = 3e8
	mostIdeal  = 1e10
)

// prepare sets up the conductances of implicit Euler stages of length h.
func (r *rundown) prepare(h float64) {
	r.fresh, r.rate = false, 1/h
	for i, c := range r.held.g {
		r.still[i] = r.always.g[i] + r.rate*c
	}
	if r.diode > 0 {
		r.gOn = 1 / r.diode
		return
	}
	r.gOn = r.ideal(r.gOn)
}

// settle finds the potentials at the end of a stage from those at its start, with every
// diode as its voltage asks.
func (r *rundown) settle(stage int) {
	const tries = 200
	for try := range tries {
		r.solve(r.change[stage])
		if !r.turn(try) {
			return
		}
		r.fresh = false
	}
	r.lost = true
}

// ideal is the conductance of an ideal diode, as it was where that still serves.
func (r *rundown) ideal(was float64) float64 {
	most := 0.0
	for _, joint := range r.ends {
		most = max(most, r.always.sum[joint]+r.rate*r.held.sum[joint])
	}
	if was >= leastIdeal*most && was <= mostIdeal*most {
		return was
	}
	return goodIdeal * most
}

// solve finds how the potentials change in a stage with the diodes as they are; the factors
// serve as long as neither the step nor a diode changes. Seeking the change and not the
// potentials leaves what hangs on next to nothing where it is, whatever is joined to it.
func (r *rundown) solve(change []float64) {
	x := r.start
	copy(r.current, r.fed)
	for i := range r.valves {
		if v := &r.valves[i]; v.on {
			current := r.gOn * (x[v.from] - x[v.to] + v.offset)
			r.current[v.from] -= current
			r.current[v.to] += current
		}
	}
	if !r.fresh {
		r.factor()
	}
	clear(change)
	r.factors.solve(r.current, change)
	for j, d := range change {
		r.v[j] = x[j] + d
	}
}

// factor removes all nodes with the diodes as they are.
func (r *rundown) factor() {
	g := r.factors.g
	clear(g[copy(g, r.still):])
	for i := range r.valves {
		if v := &r.valves[i]; v.on {
			g[v.slot] += r.gOn
		}
	}
	r.factors.remove()
	r.fresh = true
	r.work.Factorisations++
}

// turn switches the diodes that disagree with their voltage: all at once, and where
// that goes round in circles the first alone, which does not. The more tries it has
// taken, the more is put down to rounding.
func (r *rundown) turn(try int) (turned bool) {
	const patience = 20
	noise := -1.0 // not known yet
	for i := range r.valves {
		v := &r.valves[i]
		over := r.over(&v.edge)
		if v.slot == noSlot || v.on == (over >= 0) || !v.on && over <= 0 {
			continue
		}
		if noise < 0 {
			noise = 1e-15 * math.Pow(10, float64(try/patience)) * r.topmost()
		}
		if math.Abs(over) <= noise {
			continue
		}
		v.on, turned = !v.on, true
		if try%patience > patience/2 {
			return true
		}
	}
	return turned
}

// topmost is the largest potential before and after, from which the change was found.
func (r *rundown) topmost() float64 {
	most := 0.0
	for j, v := range r.v {
		most = max(most, math.Abs(v), math.Abs(r.start[j]))
	}
	return most
}
