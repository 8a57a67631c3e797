package network

import (
	"math"
	"sync"
)

// followed is what a small change of its start makes of a track.
type followed struct {
	*track
	du, damps []float64 // changes at fixed instants, as the track keeps potentials and currents
	pulses    []pulse
	later     []float64 // by which the end of each step moves
	misplaced float64   // the largest charge that is lost sight of at a switching
}

// bearing is what a change that is followed to first order may do.
type bearing struct {
	misplaced float64 // charge lost sight of at a switching
	faint     float64 // part by which steps become longer or shorter and pulses of current change: the square of it is lost
}

// follow changes a track as a small change of charges and inductor currents at its start
// does, to first order: by what it makes of every instant, and by moving the instants of
// switching, with those between them in proportion. Between those the network is linear, so
// what is lost is what a diode that switches earlier or later passes meanwhile, and what the
// pulses of current bend. It reports whether the change is bearable; else the track is as it
// was. The factors are not those of the changed steps.
func (t *track) follow(dq, di []float64, lanes []trio, most bearing) bool {
	f := changes.Get().(*followed)
	defer func() { f.track = nil; changes.Put(f) }()
	f.track, f.misplaced = t, 0
	f.du, f.damps, f.later = sized(f.du, len(t.u)), sized(f.damps, len(t.amps)), sized(f.later, len(t.steps))
	for k := range t.steps {
		f.carryOver(k, dq, di, lanes)
	}
	if !f.delay(most.faint) || !(f.misplaced <= most.misplaced) || !f.faint(most.faint) {
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

// pulse is a diode's current over a period: what the change makes of the charge that passes and
// of the largest current at a stage of a step.
type pulse struct {
	charge, more float64 // passed, and more after the change
	peak, then   float64 // before the change, and after it
}

// faint reports whether the change makes little of the diodes' currents.
func (f *followed) faint(part float64) bool {
	f.pulses = f.pulses[:0]
	for i := range f.diodes {
		f.pulses = append(f.pulses, f.pulse(i))
	}
	return faintly(f.pulses, part)
}

// faintly reports whether pulses change by no more than a part: of the largest charge, and of each
// peak, or of the largest a hundredth of that.
func faintly(pulses []pulse, part float64) bool {
	charge, peak := 0.0, 0.0
	for _, p := range pulses {
		charge, peak = math.Max(charge, p.charge), math.Max(peak, p.peak)
	}
	for _, p := range pulses {
		if !(math.Abs(p.more) <= part*charge && math.Abs(p.then-p.peak) <= part*math.Max(p.peak, 0.01*peak)) {
			return false
		}
	}
	return true
}

func (f *followed) pulse(i int) (p pulse) {
	d := &f.diodes[i]
	for k := range f.steps {
		if !f.conducting(k)[i] {
			continue
		}
		y, along := f.stages(k, &d.span), f.along(k)
		for j, c := range share {
			amps, more := d.on*(y[j+1]-d.drop), d.on*d.difference(f.du[(4*k+j+1)*f.n:(4*k+j+2)*f.n])
			p.charge += c * f.steps[k].length * amps
			p.more += c * f.steps[k].length * more
			p.peak = math.Max(p.peak, math.Abs(amps))
			p.then = math.Max(p.then, math.Abs(amps+more+d.on*along[j]*slopeAt(j, &y)))
		}
	}
	return p
}

// delay finds by how much the end of each step moves, and reports whether no step becomes longer
// or shorter by more than a part. Where diodes settled, nothing moves.
func (f *followed) delay(most float64) bool {
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
		if !(math.Abs(change) <= most) {
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
	from, to := f.ends(k)
	along := f.along(k)
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

// ends are by how much the start and the end of a step move.
func (f *followed) ends(k int) (from, to float64) {
	if k > 0 && !f.steps[k].jump {
		from = f.later[k-1]
	}
	return from, f.later[k]
}

// along is by how many steps the stages of a step move; where diodes settled, by none.
func (f *followed) along(k int) (along [3]float64) {
	if f.steps[k].euler {
		return along
	}
	from, to := f.ends(k)
	for j, c := range [3]float64{node1, node2, 1} {
		along[j] = (from + (to-from)*c) / f.steps[k].length
	}
	return along
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
