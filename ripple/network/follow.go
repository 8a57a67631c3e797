package network

import (
	"math"
	"sync"
)

// followed is what a small change of its start makes of a track.
type followed struct {
	*track
	du, damps []float64 // changes at fixed instants, as the track keeps potentials and currents
	later     []float64 // by which the end of each step moves
	misplaced float64   // the largest charge that is lost sight of at a switching
}

// unlike is the part by which a step may become longer or shorter.
const unlike = 0.1

// follow changes a track as a small change of charges and inductor currents at its start
// does, to first order: by what it makes of every instant, and by moving the instants of
// switching, with those between them in proportion. Between those the network is linear, so
// what is lost is what a diode that switches earlier or later passes meanwhile. It reports
// whether that is no more than a charge; else the track is as it was. The factors are not
// those of the changed steps.
func (t *track) follow(dq, di []float64, lanes []trio, most float64) bool {
	f := changes.Get().(*followed)
	defer func() { f.track = nil; changes.Put(f) }()
	f.track, f.misplaced = t, 0
	f.du, f.damps, f.later = sized(f.du, len(t.u)), sized(f.damps, len(t.amps)), sized(f.later, len(t.steps))
	for k := range t.steps {
		f.carryOver(k, dq, di, lanes)
	}
	if !f.delay() || !(f.misplaced <= most) {
		return false
	}
	for k := range t.steps {
		f.move(k)
	}
	return true
}

// changes is memory that serves one track after another.
var changes = sync.Pool{New: func() any { return new(followed) }}

// sized is a vector of a length, its values left from before.
func sized(x []float64, n int) []float64 {
	if cap(x) < n {
		return make([]float64, n)
	}
	return x[:n]
}

// carryOver takes the change over a step.
func (f *followed) carryOver(k int, dq, di []float64, lanes []trio) {
	n, m := f.n, len(f.inductors)
	pole, stages := f.atPoles(k, dq, di, lanes)
	for i := range f.inductors {
		x := f.changeOfCoil(i, f.steps[k].length, pole, di[i], f.inductors[i].differenceTrio(lanes))
		for j := range stages {
			f.damps[(4*k+j+1)*m+i] = stages[j].of(&x)
		}
		di[i] = f.damps[(4*k+3)*m+i]
	}
	for j := range stages {
		du := f.du[(4*k+j+1)*n : (4*k+j+2)*n]
		for i := range lanes {
			du[i] = stages[j].of(&lanes[i])
		}
	}
	f.charge(f.du[(4*k+3)*n:(4*k+4)*n], dq)
}

// delay finds by how much the end of each step moves, and reports whether all steps stay
// about as they are. Where diodes settled, nothing moves.
func (f *followed) delay() bool {
	first, since := 0, 0.0 // of the steps from the last switching on, and by how much that moves
	for k := range f.steps {
		end := &f.steps[k]
		if end.euler && !end.jump {
			return false
		}
		last := k+1 == len(f.steps) || f.steps[k+1].jump
		if !end.event && !last {
			continue
		}
		until := 0.0
		if !last {
			until = f.switching(k)
		}
		from, to := f.steps[first].start, end.start+end.length
		change := (until - since) / (to - from)
		if !(math.Abs(change) <= unlike) {
			return false
		}
		for j := first; j <= k; j++ {
			f.later[j] = since + change*(f.steps[j].start+f.steps[j].length-from)
		}
		first, since = k+1, until
	}
	return true
}

// switching is by how much later the diode switches that does so at the end of a step: it
// is at its drop then. Of several it is the mean.
func (f *followed) switching(k int) float64 {
	now, next, sum, count := f.conducting(k), f.conducting(k+1), 0.0, 0.0
	for i := range f.diodes {
		if now[i] == next[i] {
			continue
		}
		d := &f.diodes[i]
		y := f.stages(k, &d.span)
		dv := d.difference(f.du[(4*k+3)*f.n : (4*k+4)*f.n])
		dt := -dv * f.steps[k].length / slopeAt(2, &y)
		sum += dt
		f.misplaced = math.Max(f.misplaced, d.on*math.Abs(dv*dt)/2)
		count++
	}
	return sum / count
}

// slopeAt is the slope at a stage of the cubic through samples, in parts of the step.
func slopeAt(stage int, y *samples) float64 {
	s := &slopes[stage]
	return s[0]*(y[1]-y[0]) + s[1]*(y[2]-y[0]) + s[2]*(y[3]-y[0])
}

// move changes a step.
func (f *followed) move(k int) {
	st := &f.steps[k]
	from, to := 0.0, f.later[k]
	if k > 0 && !st.jump {
		from = f.later[k-1]
	}
	var along [3]float64 // by how many steps the stages move
	if !st.euler {
		for j, c := range [3]float64{node1, node2, 1} {
			along[j] = (from + (to-from)*c) / st.length
		}
	}
	f.moveRows(f.u, f.du, k, f.n, &along)
	f.moveRows(f.amps, f.damps, k, len(f.inductors), &along)
	y := samples(st.sine)
	for j, a := range along {
		st.sine[j+1] += a * slopeAt(j, &y)
	}
	if k > 0 && !st.jump {
		st.sine[0] = f.steps[k-1].sine[3]
	}
	st.start += from
	st.length += to - from
}

// moveRows changes the potentials or the currents of a step, n at the start and at each
// stage: the start is the end of the step before.
func (f *followed) moveRows(rows, change []float64, k, n int, along *[3]float64) {
	at := rows[4*k*n : 4*(k+1)*n]
	for i := range n {
		y := samples{at[i], at[n+i], at[2*n+i], at[3*n+i]}
		for j, a := range along {
			at[(j+1)*n+i] += change[(4*k+j+1)*n+i] + a*slopeAt(j, &y)
		}
	}
	if k > 0 && !f.steps[k].jump {
		copy(at[:n], rows[(4*k-1)*n:4*k*n])
	}
}
