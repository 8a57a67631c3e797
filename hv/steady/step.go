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

// weights by stage: what the slopes of the stages before add to where it starts from; what
// a stage changes is γ of its slope.
var weights = [stages][stages]float64{
	{},
	{(1 - gamma) / 2},
	{(16*gamma - 6*gamma*gamma - 1) / 4, (6*gamma*gamma - 20*gamma + 5) / 4},
}

// share are the weights of the step.
var share = [stages]float64{weights[2][0], weights[2][1], gamma}

const (
	firstStep = 1e-12   // s: shorter than any time constant of a chain with ideal diodes
	horizon   = 1e12    // s: what has not happened by then never will
	shortest  = 1.0 / 5 // of the first step: below that a step is taken whatever it is wrong by
	growth    = 20      // at most from one step to the next
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
	for t, h, longer := 0.0, r.first, float64(growth); t < horizon && r.most > p.done; {
		h = r.untilSwitching(h)
		strain := r.step(h, p)
		if strain > 1 && h > shortest*r.first {
			h *= math.Max(0.2, 0.8/math.Cbrt(strain))
			longer, r.before = 1, 0 // what refused this step refuses the next long one as well
			continue
		}
		t += h
		r.accept(h)
		see(t)
		h *= math.Min(longer, 0.9/math.Cbrt(math.Max(strain, 1e-4)))
		longer = growth
	}
	for i := range r.stores {
		r.stores[i].u = r.over(&r.stores[i].edge)
	}
	if r.lost {
		return lack.Failed("the diodes do not settle while the chain runs down")
	}
	return nil
}

// jump lets capacitors in ideal loops share their charge, through diodes too, which
// takes no time; a second time for what the diodes held back at first.
func (r *rundown) jump() {
	instant := 1e-3 * r.first
	r.prepare(instant)
	copy(r.v, r.state)
	for again := range 2 {
		r.begin(0)
		if again == 0 {
			r.loops()
		}
		r.settle(0)
		r.flows(1, 0)
		r.arrive(instant)
	}
	r.most = r.least
	for i := range r.links {
		r.most = max(r.most, math.Abs(r.links[i].over(r.state)))
	}
}

// loops feeds in what the capacitors hold beyond what the joints stand at.
func (r *rundown) loops() {
	for i := range r.stores {
		if s := &r.stores[i]; s.slot != noSlot {
			beyond := s.c * r.rate * (s.u - r.over(&s.edge))
			r.fed[s.from] += beyond
			r.fed[s.to] -= beyond
		}
	}
}

// step tries a step of length h. It reports its doubt in units of the tolerance.
func (r *rundown) step(h float64, p pace) (strain float64) {
	r.prepare(gamma * h)
	for stage := range stages {
		r.begin(stage)
		r.settle(stage)
		r.flows(share[stage], stage)
	}
	return r.strain(p)
}

// strain compares the slopes of the stages at every capacitor.
func (r *rundown) strain(p pace) (strain float64) {
	bend, first, second, third := r.start, r.change[0], r.change[1], r.change[2]
	for j := range bend {
		bend[j] = first[j] - 2*second[j] + third[j]
	}
	next, floor := r.least, max(p.floor, 1e-3*r.most)
	for i := range r.links {
		l := &r.links[i]
		end, wrong := math.Abs(l.over(r.v)), math.Abs(bend[l.from]-bend[l.to])
		if end > next {
			next = end
		}
		if bound := p.tolerance * (end + floor*l.slack); wrong > strain*bound {
			strain = wrong / bound
		}
	}
	r.next = next
	return strain
}

// over is the voltage over a link.
func (l *link) over(v []float64) float64 { return v[l.from] - v[l.to] + l.offset }

// begin is what a stage starts from, and what the wires feed in there.
func (r *rundown) begin(stage int) {
	x := r.start
	copy(x, r.state)
	for k, w := range weights[stage][:stage] {
		for j, d := range r.change[k] {
			x[j] += w / gamma * d
		}
	}
	clear(r.fed)
	for i := range r.wires {
		w := &r.wires[i]
		current := w.g * (x[w.from] - x[w.to] + w.offset)
		r.fed[w.from] -= current
		r.fed[w.to] += current
	}
}

// accept makes the end of the step tried the present.
func (r *rundown) accept(h float64) {
	r.work.Steps++
	r.most, r.before = r.next, h
	r.arrive(h)
}

// flows adds the present currents to those of the step with the weight of a stage.
func (r *rundown) flows(weight float64, stage int) {
	for _, w := range r.counted {
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

// arrive makes the end of the last stage the state, and counts the charge of the step.
func (r *rundown) arrive(h float64) {
	copy(r.state, r.v)
	for _, w := range r.counted {
		w.charge += h * w.passed
	}
	for i := range r.valves {
		r.valves[i].charge += h * r.valves[i].passed
	}
}
