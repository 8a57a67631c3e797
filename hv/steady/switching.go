package steady

import "math"

// soonest is the part of a step within which no switching is foreseen: what is left of the
// last one, by which the step before did not quite reach it.
const soonest = 0.1

// untilSwitching is a step cut short where the first diode is foreseen to switch: within a
// step that would bend what its error is told from, and a step that is refused costs as much
// as one that counts.
func (r *rundown) untilSwitching(h float64) float64 {
	first := h
	if r.before == 0 {
		return first
	}
	for i := range r.valves {
		v := &r.valves[i]
		if v.slot == noSlot {
			continue
		}
		if t := r.switching(v); t > soonest*h && t < first {
			first = t
		}
	}
	return first
}

// switching is when the voltage over a diode will be nought if it goes on as an exponential
// with the slopes at the last two stages of the step before; infinite or no number where it
// will not.
func (r *rundown) switching(v *valve) float64 {
	volts := r.state[v.from] - r.state[v.to] + v.offset
	if v.on != (volts > 0) {
		return math.Inf(1)
	}
	slope, earlier := r.slope(v, stages-1), r.slope(v, stages-2)
	line := -volts / slope
	bend := (slope - earlier) / ((1 - gamma) / 2 * r.before)
	if bend == 0 {
		return line
	}
	lasting := -slope / bend
	return -lasting * math.Log1p(-line/lasting)
}

// slope is how fast the voltage over a diode moved at a stage of the step before, in V/s.
func (r *rundown) slope(v *valve, stage int) float64 {
	return (r.change[stage][v.from] - r.change[stage][v.to]) / (gamma * r.before)
}
