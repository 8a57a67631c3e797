package steady

import (
	"math"

	"kilovet/hv/lack"
)

// gamma makes the two stages of the step L-stable and of second order, both with
// the same matrix: 1 − 1/√2 (R. Alexander, SIAM J. Numer. Anal. 14 (1977) 1006; memory).
const gamma = 1 - math.Sqrt2/2

// Where the diodes have no resistance of their own, a conducting one conducts this
// many times better than the best of what it ends on does within a step: ideal to a
// part in ten thousand, and its voltage, whose sign tells whether it should conduct,
// still stands clear of rounding.
const idealDiode = 1e4

const (
	firstStep = 1e-12 // s: shorter than any time constant of a chain
	horizon   = 1e12  // s: what has not happened by then never will
	growth    = 5     // at most from one step to the next
)

// pace says how closely a run is followed.
type pace struct {
	tolerance float64 // relative change of a capacitor's voltage left unexplained in a step
	floor     float64 // V, below which a voltage need not be followed relatively
	done      float64 // V: the run ends when no capacitor has more
}

// run follows the circuit until all voltages are down or nothing moves any more; see
// is told every time reached, the first being right after the start.
func (r *rundown) run(p pace, see func(t float64)) error {
	r.jump()
	see(0)
	for t, h := 0.0, firstStep; t < horizon && r.highest() > p.done; {
		strain := r.step(h, p)
		if strain > 1 && h > firstStep/growth {
			h *= math.Max(0.2, 0.9/math.Sqrt(strain))
			continue
		}
		t += h
		r.accept(h)
		see(t)
		h *= math.Min(growth, 0.9/math.Sqrt(math.Max(strain, 1e-3)))
	}
	if r.lost {
		return lack.Failed("the diodes do not settle while the chain runs down")
	}
	return nil
}

// jump lets capacitors in ideal loops share their charge, through diodes too, which
// takes no time; a second time for what the diodes held back at first.
func (r *rundown) jump() {
	const instant = 1e-3 * firstStep
	for range 2 {
		for i := range r.stores {
			r.stores[i].start = r.stores[i].u
		}
		r.settle(instant)
		for i := range r.stores {
			r.stores[i].u = r.over(&r.stores[i].edge)
		}
		r.eachFlow(func(f *flow, current float64) { f.charge += instant * current })
	}
}

// step tries a step of length h. It reports the part of the change that a straight
// line would not explain, in units of the tolerance.
func (r *rundown) step(h float64, p pace) (strain float64) {
	const again = (1 - gamma) / gamma
	for i := range r.stores {
		r.stores[i].start = r.stores[i].u
	}
	r.settle(gamma * h)
	for i := range r.stores {
		s := &r.stores[i]
		s.start = s.u + again*(r.over(&s.edge)-s.u)
	}
	r.eachFlow(func(f *flow, current float64) { f.first = current })
	r.settle(gamma * h)
	floor := math.Max(p.floor, 1e-3*r.highest())
	for i := range r.stores {
		s := &r.stores[i]
		end, straight := r.over(&s.edge), s.u+(s.start-s.u)/(1-gamma)
		strain = math.Max(strain, math.Abs(end-straight)/(p.tolerance*(math.Abs(end)+floor)))
	}
	return strain
}

// accept makes the end of the step tried the present.
func (r *rundown) accept(h float64) {
	r.work.Steps++
	for i := range r.stores {
		r.stores[i].u = r.over(&r.stores[i].edge)
	}
	r.eachFlow(func(f *flow, current float64) { f.charge += h * ((1-gamma)*f.first + gamma*current) })
}

// eachFlow visits what charge can flow through, with the present current.
func (r *rundown) eachFlow(visit func(f *flow, current float64)) {
	for i := range r.wires {
		w := &r.wires[i]
		visit(&w.flow, w.g*r.over(&w.edge))
	}
	for i := range r.valves {
		v := &r.valves[i]
		current := 0.0
		if v.on {
			current = r.gOn * r.over(&v.edge)
		}
		visit(&v.flow, current)
	}
}

// settle finds the potentials a time h after the capacitors had their starting
// voltages, by an implicit Euler stage, with every diode as its voltage asks.
func (r *rundown) settle(h float64) {
	r.still.clear()
	for i := range r.stores {
		r.still.lay(&r.stores[i].edge, r.stores[i].c/h, r.stores[i].start)
	}
	for i := range r.wires {
		r.still.lay(&r.wires[i].edge, r.wires[i].g, 0)
	}
	r.gOn = idealDiode * r.still.best(r.valves)
	if r.diode > 0 {
		r.gOn = 1 / r.diode
	}
	const tries = 200
	for try := range tries {
		r.solve()
		if !r.turn(try) {
			return
		}
	}
	r.lost = true
}

// best is the largest conductance at the ends of the diodes.
func (f *feed) best(valves []valve) float64 {
	most := 0.0
	for i := range valves {
		for _, joint := range []int{valves[i].from, valves[i].to} {
			if joint != 0 {
				most = math.Max(most, f.sum[joint])
			}
		}
	}
	return most
}

func (r *rundown) solve() {
	copy(r.g, r.still.g)
	copy(r.current, r.still.current)
	for i := range r.valves {
		v := &r.valves[i]
		if v.on && v.slot != noSlot {
			r.g[v.slot] += r.gOn
			r.current[v.from] -= r.gOn * v.offset
			r.current[v.to] += r.gOn * v.offset
		}
	}
	r.factors.factor(r.g)
	r.factors.solve(r.current, r.v)
	r.work.Factorisations++
}

// turn switches the diodes that disagree with their voltage: all at once, and where
// that goes round in circles the first alone, which does not. The more tries it has
// taken, the more is put down to rounding.
func (r *rundown) turn(try int) (turned bool) {
	const patience = 20
	noise := 1e-14 * math.Pow(10, float64(try/patience)) * r.topmost()
	for i := range r.valves {
		v := &r.valves[i]
		over := r.over(&v.edge)
		if v.slot == noSlot || v.on && over >= -noise || !v.on && over <= noise {
			continue
		}
		v.on, turned = !v.on, true
		if try%patience > patience/2 {
			return true
		}
	}
	return turned
}

func (r *rundown) topmost() float64 {
	most := 0.0
	for _, v := range r.v {
		most = math.Max(most, math.Abs(v))
	}
	return most
}
