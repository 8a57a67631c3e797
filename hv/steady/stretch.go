package steady

import (
	"math"

	"kilovet/hv/quantity"
)

// arrivals puts into a row how fast the potentials of the nodes move at the end of the step
// taken last, whose last stage that is, in volts a step.
func (r *rundown) arrivals(v Voltages) Voltages {
	slopes := r.change[stages-1]
	for n := range v {
		v[n] = quantity.Voltage(slopes[r.net.spots[n].joint] / gamma)
	}
	return v
}

// rows gives rows of voltages, many of which lie together.
type rows struct{ left Voltages }

func (r *rows) take(n int) Voltages {
	const together = 64
	if len(r.left) < n {
		r.left = make(Voltages, together*n)
	}
	row := r.left[:n:n]
	r.left = r.left[n:]
	return row
}

// stretch is a voltage over a step: an exponential towards some voltage, which has both ends
// and the slope at the second; a line where none has them.
type stretch struct{ begin, end, fold float64 }

func (d *Decay) stretch(i int, voltage func(Voltages) quantity.Voltage) stretch {
	s := stretch{begin: float64(voltage(d.history[i])), end: float64(voltage(d.history[i+1]))}
	if d.Times[i+1] > d.Times[i] {
		s.fold = foldOf((s.end - s.begin) / float64(voltage(d.arrivals[i+1])))
	}
	return s
}

// foldOf is κ in (e^κ − 1)/κ = r, by which the slope of an exponential falls; zero where
// there is none between −20 and 20.
func foldOf(r float64) float64 {
	const most = 20
	of := func(k float64) float64 {
		if k == 0 {
			return 1
		}
		return math.Expm1(k) / k
	}
	low, high := -float64(most), float64(most)
	if !(r > of(low) && r < of(high)) {
		return 0
	}
	for range 60 {
		if k := (low + high) / 2; of(k) < r {
			low = k
		} else {
			high = k
		}
	}
	return high
}

// at is the voltage a part of the way along.
func (s *stretch) at(along float64) float64 {
	if math.Abs(s.fold) > 1e-9 {
		along = math.Expm1(-s.fold*along) / math.Expm1(-s.fold)
	}
	return s.begin + (s.end-s.begin)*along
}

// along is where, from 0 to 1, the voltage reaches a level between both ends.
func (s *stretch) along(level float64) float64 {
	part := (level - s.begin) / (s.end - s.begin)
	if math.Abs(s.fold) > 1e-9 {
		part = -math.Log1p(part*math.Expm1(-s.fold)) / s.fold
	}
	return part
}

// crossing is when the voltage falls to the limit between two times.
func (d *Decay) crossing(i int, voltage func(Voltages) quantity.Voltage) quantity.Time {
	s := d.stretch(i, voltage)
	limit := math.Copysign(float64(d.Limit), s.begin)
	return d.Times[i] + quantity.Time(s.along(limit))*(d.Times[i+1]-d.Times[i])
}
