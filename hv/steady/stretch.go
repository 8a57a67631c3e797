package steady

import (
	"math"

	"kilovet/hv/quantity"
)

// arrival is how fast the potentials move at the end of a step, by joint, in volts a step.
type arrival struct {
	net    *network
	slopes []float64
}

// arrival is that of the step taken last, whose last stage is its end.
func (r *rundown) arrival() arrival {
	a := arrival{r.net, make([]float64, r.net.joints)}
	for j, d := range r.change[stages-1] {
		a.slopes[j] = d / gamma
	}
	return a
}

// byNode are the slopes of the nodes.
func (a *arrival) byNode() Voltages {
	v := make(Voltages, len(a.net.spots))
	for n := range v {
		v[n] = quantity.Voltage(a.slopes[a.net.spots[n].joint])
	}
	return v
}

// stretch is a voltage over a step: an exponential towards some voltage, which has both ends
// and the slope at the second; a line where none has them.
type stretch struct{ begin, end, fold float64 }

func (d *Decay) stretch(i int, voltage func(Voltages) quantity.Voltage) stretch {
	s := stretch{begin: float64(voltage(d.history[i])), end: float64(voltage(d.history[i+1]))}
	if d.Times[i+1] > d.Times[i] {
		s.fold = foldOf((s.end - s.begin) / float64(voltage(d.arrivals[i+1].byNode())))
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
