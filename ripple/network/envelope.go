package network

import "math"

// envelope follows the state from period to period in leaps of many periods. With
// g(x) the change of the state over the period that starts at x, it takes the
// two-stage Rosenbrock step
//
//	(1 + γH(1 − M)) k₁ = g(x),  (1 + γH(1 − M)) k₂ = g(x + H k₁) − 2 k₁,
//	x(H) = x + (1 + w) H k₁ + w H k₂
//
// (Hairer and Wanner II, IV.7, with M the map of small changes over the period),
// whose parameters are chosen for periods instead of a continuous time: a mode that
// falls to m in a period has to come out as m^H to second order in 1 − m, and
// vanish where m is zero: γ = 1 − √((1 + 1/H)/2), w = γ(1 − γ)/(1 − 2γ). A leap of
// one period is the period itself.
type envelope struct {
	*shooter
	periods  float64   // since the start
	leap     float64   // the next, in periods
	from     []float64 // the state before the leap
	start    []float64 // its change over a period
	k1, k2   []float64
	landed   []float64 // the state after the last leap
	foreseen []float64 // change over the period after it, or over the next
	doubtful bool      // what is foreseen after leaps
	linear   *track    // of the period at the start of the leap
	spare    *track
	ahead    float64 // γH of the equations in hand
	hurried  bool    // time does not matter
	way      float64 // length of the way, where that and not the state itself is the measure
}

func newEnvelope(s *shooter) *envelope {
	m := len(s.x)
	return &envelope{shooter: s, leap: 1, from: make([]float64, m), start: make([]float64, m),
		k1: make([]float64, m), k2: make([]float64, m), foreseen: make([]float64, m), landed: make([]float64, m), linear: s.pace.track, spare: &track{system: s.system}}
}

// What a leap may be wrong by: a part of the state where time matters, a part of
// the leap where it is only to lead nearer to rest.
const (
	deviation = 4e-3
	detour    = 0.3
)

// The parts of its change by which a period after a leap may differ from what was foreseen of
// it: with more than the first, currents of ladders with stiff diodes were up to a sixth off,
// and one more period sets them right; with more than the second the leap itself suffers, and
// its period is walked.
const (
	wandering = 0.01
	lost      = 0.1
)

// coarse is the part of a diode's mean current that may flow or fail to flow before its
// switching is located, where a period need not come back to its start: it does so for a
// moment only, so the charge it makes is a far smaller part.
const coarse = 0.05

// here walks the period at the present state.
func (e *envelope) here(g grade) error {
	e.pace.bounds, e.pace.track = g.bounds(), e.linear
	if err := e.walk(); err != nil {
		return err
	}
	copy(e.from, e.x)
	copy(e.start, e.r)
	e.pace.track = e.spare
	return nil
}

// advance leaps on from the period walked last, by at most a number of periods. It
// shortens the leap until the two orders of the method agree well enough.
func (e *envelope) advance(most float64) error {
	e.leap = math.Max(1, math.Min(math.Floor(e.leap), most))
	if !e.hurried && e.leap == 1 {
		e.single()
		return nil
	}
	for {
		wrong, err := e.try()
		if err != nil {
			return err
		}
		limit := deviation * (norm(e.x) + e.pace.energy)
		if e.way > 0 {
			limit = deviation * e.way
		}
		if e.hurried {
			limit = detour * e.leap * norm(e.start)
		}
		more := 0.8 * math.Sqrt(limit/(wrong+1e-30))
		if wrong <= limit {
			e.periods += e.leap
			if e.leap > 1 && !e.hurried {
				if err := e.relax(); err != nil {
					return err
				}
			}
			e.leap *= math.Max(0.5, math.Min(3, more))
			return nil
		}
		e.leap = math.Max(1, math.Floor(e.leap*math.Max(0.2, more)))
	}
}

// pass takes one period as it was walked.
func (e *envelope) pass() {
	copy(e.x, e.from)
	axpy(1, e.start, e.x)
	e.periods++
}

// single takes one period as it was walked and foresees the next leap from how much
// its change differs from that of the period before.
func (e *envelope) single() {
	e.pass()
	axpy(-1, e.start, e.k1)
	limit := deviation * (norm(e.x) + e.pace.energy)
	e.leap = math.Min(2, math.Sqrt(2*limit/(norm(e.k1)+1e-30)))
	copy(e.k1, e.start)
}

// relax lets a single period pass after a leap, which leaves the swift modes less exact
// than the envelope: they decide the currents. Foreseen, it is the period that was walked from
// where the first order leads, and what the change to the second makes of it; where that did
// not hold after the leap before, it is walked.
func (e *envelope) relax() error {
	copy(e.landed, e.x)
	x := e.foreseen
	copy(x, e.x)
	axpy(-1, e.from, x)
	axpy(-e.leap, e.k1, x)
	e.minus(e.spare, x)
	scaleBy(x, -1)
	axpy(1, e.r, x)
	if e.doubtful {
		return e.relaxWalking()
	}
	axpy(1, x, e.x)
	e.periods++
	copy(e.step, x)
	e.minus(e.spare, e.step)
	axpy(-1, e.step, x)
	return nil
}

// relaxWalking walks the period after a leap, and tells whether the next may be foreseen again.
func (e *envelope) relaxWalking() error {
	copy(e.x, e.landed)
	if err := e.walk(); err != nil {
		return err
	}
	copy(e.start, e.r)
	e.doubtful = e.wandered() > lost
	axpy(1, e.r, e.x)
	e.periods++
	return nil
}

// wandered is by how much the change over the period walked last differs from what was foreseen
// of it, in parts of it.
func (e *envelope) wandered() float64 {
	copy(e.step, e.start)
	axpy(-1, e.foreseen, e.step)
	return norm(e.step) / (norm(e.start) + 1e-30)
}

// again takes back the period that passed after the leap where the one after it is not as
// foreseen, and walks it; it reports whether it did.
func (e *envelope) again() (bool, error) {
	if e.doubtful || e.wandered() <= lost {
		return false, nil
	}
	e.periods--
	if err := e.relaxWalking(); err != nil {
		return false, err
	}
	e.doubtful = true
	return true, nil
}

// try takes the leap from the state before it and returns how far the first order
// of the method is from the second.
func (e *envelope) try() (float64, error) {
	h := e.leap
	copy(e.x, e.from)
	if h == 1 {
		axpy(1, e.start, e.x)
		return 0, nil
	}
	gamma := 1 - math.Sqrt((1+1/h)/2)
	w := gamma * (1 - gamma) / (1 - 2*gamma)
	e.ahead = gamma * h
	e.peaks.prepare(1 / e.ahead)
	copy(e.k1, e.start)
	e.resolve(e.k1)
	axpy(h, e.k1, e.x)
	if err := e.walk(); err != nil {
		return 0, err
	}
	copy(e.k2, e.r)
	axpy(-2, e.k1, e.k2)
	e.resolve(e.k2)
	copy(e.x, e.from)
	axpy((1+w)*h, e.k1, e.x)
	axpy(w*h, e.k2, e.x)
	axpy(1, e.k1, e.k2)
	return w * h * norm(e.k2), nil
}

// resolve solves (1 + γH(1 − M)) x = b in place.
func (e *envelope) resolve(b []float64) {
	e.solver.solve(b, func(x []float64) {
		copy(e.step, x)
		e.minus(e.linear, x)
		scaleBy(x, e.ahead)
		axpy(1, e.step, x)
	}, func(x []float64) {
		e.precondition(x)
		scaleBy(x, 1/e.ahead)
	}, 0.1)
}
