package steady

import (
	"math"

	"kilovet/hv/lack"
)

// The step is the diagonally implicit method of three stages, L-stable and of third
// order (R. Alexander, SIAM J. Numer. Anal. 14 (1977) 1006; memory, its order
// conditions checked). All stages have the same matrix; the last is the end of the
// step. The second difference of the slopes is what a method of second order would
// be wrong by.
const (
	stages = 3
	gamma  = 0.435866521508458999416019451193556
)

// weights by stage: what the slopes of the stages before add to where it starts from.
var weights = [stages][stages]float64{
	{},
	{(1 - gamma) / 2},
	{(16*gamma - 6*gamma*gamma - 1) / 4, (6*gamma*gamma - 20*gamma + 5) / 4},
}

// share are the weights of the step.
var share = [stages]float64{weights[2][0], weights[2][1], gamma}

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

const (
	firstStep = 1e-12 // s: shorter than any time constant of a chain
	horizon   = 1e12  // s: what has not happened by then never will
	growth    = 5     // at most from one step to the next
)

// pace says how closely a run is followed.
type pace struct {
	tolerance float64 // what a step of second order may be wrong by, relative; the step is far better
	floor     float64 // V, below which a voltage need not be followed relatively
	done      float64 // V: the run ends when no capacitor has more
}

// run follows the circuit until all voltages are down or nothing moves any more; see
// is told every time reached, the first being right after the start.
func (r *rundown) run(p pace, see func(t float64)) error {
	r.jump()
	see(0)
	for t, h, longer := 0.0, firstStep, float64(growth); t < horizon && r.most > p.done; {
		strain := r.step(h, p)
		if strain > 1 && h > firstStep/growth {
			h *= math.Max(0.2, 0.8/math.Cbrt(strain))
			longer = 1 // what refused this step refuses the next long one as well
			continue
		}
		t += h
		r.accept(h)
		see(t)
		h *= math.Min(longer, 0.9/math.Cbrt(math.Max(strain, 1e-3)))
		longer = growth
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
	r.prepare(instant)
	for range 2 {
		r.begin(0)
		r.settle()
		for i := range r.stores {
			r.stores[i].u = r.over(&r.stores[i].edge)
		}
		r.flows(1, 0)
		r.passed(instant)
	}
	r.most = r.highest()
}

// step tries a step of length h. It reports its doubt in units of the tolerance.
func (r *rundown) step(h float64, p pace) (strain float64) {
	r.prepare(gamma * h)
	for stage := range stages {
		r.begin(stage)
		r.settle()
		for i := range r.stores {
			s := &r.stores[i]
			s.end = r.over(&s.edge)
			s.rise[stage] = (s.end - s.start) * (1 / gamma)
		}
		r.flows(share[stage], stage)
	}
	floor := max(p.floor, 1e-3*r.most)
	for i := range r.stores {
		s := &r.stores[i]
		wrong := math.Abs(s.rise[0] - 2*s.rise[1] + s.rise[2])
		if bound := p.tolerance / gamma * (math.Abs(s.end) + floor); wrong > strain*bound {
			strain = wrong / bound
		}
	}
	return strain
}

// begin is where the capacitors start a stage from, and what they feed in then.
func (r *rundown) begin(stage int) {
	w := &weights[stage]
	copy(r.still.current, r.always.current)
	for i := range r.stores {
		s := &r.stores[i]
		switch s.start = s.u; stage {
		case 1:
			s.start += w[0] * s.rise[0]
		case 2:
			s.start += w[0]*s.rise[0] + w[1]*s.rise[1]
		}
		if s.slot != noSlot {
			i := s.g * (s.start - s.offset)
			r.still.current[s.from] += i
			r.still.current[s.to] -= i
		}
	}
}

// accept makes the end of the step tried the present.
func (r *rundown) accept(h float64) {
	r.work.Steps++
	for i := range r.stores {
		r.stores[i].u = r.stores[i].end
	}
	r.most = r.highest()
	r.passed(h)
}

// flows adds the present currents to those of the step with the weight of a stage.
func (r *rundown) flows(weight float64, stage int) {
	for i := range r.wires {
		w := &r.wires[i]
		w.add(weight*w.g*r.over(&w.edge), stage)
	}
	for i := range r.valves {
		v := &r.valves[i]
		current := 0.0
		if v.on {
			current = weight * r.gOn * r.over(&v.edge)
		}
		v.add(current, stage)
	}
}

func (f *flow) add(current float64, stage int) {
	if stage == 0 {
		f.passed = 0
	}
	f.passed += current
}

// passed counts the charge of a step.
func (r *rundown) passed(h float64) {
	for i := range r.wires {
		r.wires[i].charge += h * r.wires[i].passed
	}
	for i := range r.valves {
		r.valves[i].charge += h * r.valves[i].passed
	}
}

// prepare sets up the conductances of implicit Euler stages of length h.
func (r *rundown) prepare(h float64) {
	r.fresh = false
	r.still.copy(&r.always)
	for i := range r.stores {
		s := &r.stores[i]
		s.g = s.c / h
		r.still.lay(&s.edge, s.g)
	}
	if r.diode > 0 {
		r.gOn = 1 / r.diode
		return
	}
	r.gOn = r.still.ideal(r.valves, r.gOn)
}

// settle finds the potentials at the end of a stage from the capacitors' starting
// voltages, with every diode as its voltage asks.
func (r *rundown) settle() {
	const tries = 200
	for try := range tries {
		r.solve()
		if !r.turn(try) {
			return
		}
		r.fresh = false
	}
	r.lost = true
}

// ideal is the conductance of an ideal diode, as it was where that still serves.
func (f *feed) ideal(valves []valve, was float64) float64 {
	most := 0.0
	for i := range valves {
		for _, joint := range [2]int{valves[i].from, valves[i].to} {
			if joint != 0 {
				most = max(most, f.sum[joint])
			}
		}
	}
	if was >= leastIdeal*most && was <= mostIdeal*most {
		return was
	}
	return goodIdeal * most
}

// solve finds the potentials with the diodes as they are; the factors serve as long
// as neither the step nor a diode changes.
func (r *rundown) solve() {
	copy(r.current, r.still.current)
	for i := range r.valves {
		if v := &r.valves[i]; v.on && v.slot != noSlot && v.offset != 0 {
			r.current[v.from] -= r.gOn * v.offset
			r.current[v.to] += r.gOn * v.offset
		}
	}
	if !r.fresh {
		r.factor()
	}
	r.factors.solve(r.current, r.v)
}

// factor removes all nodes with the diodes as they are.
func (r *rundown) factor() {
	copy(r.g, r.still.g)
	for i := range r.valves {
		if v := &r.valves[i]; v.on && v.slot != noSlot {
			r.g[v.slot] += r.gOn
		}
	}
	r.factors.factor(r.g)
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

func (r *rundown) topmost() float64 {
	most := 0.0
	for _, v := range r.v {
		if v = math.Abs(v); v > most {
			most = v
		}
	}
	return most
}
