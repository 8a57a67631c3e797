package network

import "math"

// search corrects a state until a period brings it back. Newton's correction is
// taken where it can be believed; where some diodes do not conduct yet it cannot,
// and the state is led on in leaps of many periods, as time itself would.
type search struct {
	*envelope
	recall    recall
	level     *level  // the voltage to be held; nil where the drive is given
	sound     spot    // the last state that was not a step back
	most      int     // steps that all attempts together may take; zero is about two budgets
	patience  int     // leaps it may take
	slight    float64 // largest correction that a swift search carries through
	last      float64 // change over the period at the state corrected last
	trial     bool    // the last correction has yet to prove itself
	still     int     // corrections in a row that led hardly nearer
	leaps     int     // taken
	amplified float64 // largest correction so far over the change over the period it answers
	creeping  bool    // creeps first
	stray     bool    // Newton's method led astray: leap next
	stillest  stillest
	rousing
}

// Most corrections, and most periods walked, in each grade.
const (
	mostCorrections = 60
	mostWalks       = 600
)

func newSearch(s *shooter) *search {
	e := newEnvelope(s)
	e.hurried = true
	return &search{envelope: e, slight: slight}
}

// approach corrects the state in one grade until a correction is a small part of it.
func (s *search) approach(g grade, small float64) error {
	return s.until(g, func() bool {
		return norm(s.step) <= small*norm(s.x)
	})
}

// follows takes the correction in hand, and with it what the drive lacks.
func (s *search) follows(f float64) {
	axpy(1, s.step, s.x)
	if s.level != nil {
		s.lift(f)
	}
}

// converge corrects the state until the charges come back.
func (s *search) converge(g grade) error {
	last := math.Inf(1)
	return s.until(g, func() bool {
		size := norm(s.r)
		stalled := size > 0.3*last
		last = size
		small := s.small()
		switch { // what is left is rounding, which a mode that only leakage ties down makes much of
		case stalled && size <= worthless*norm(s.x):
			small = 1e-3
		case stalled:
			small = 1e-5
		}
		s.keepStillest(g, size)
		return norm(s.step) <= small*norm(s.x) && s.balanced(stalled)
	})
}

// worthless is the change over a period, in parts of the state, that is rounding alone.
const worthless = 1e-12

// small is the correction, in parts of the state, that ends a search.
func (s *search) small() float64 {
	if s.swift {
		return 1e-6
	}
	return 1e-9
}

// until walks and corrects until told that it is done.
func (s *search) until(g grade, done func() bool) error {
	s.pace.smooth, s.stray, s.last, s.leap, s.trial, s.still, s.leaps = false, false, math.Inf(1), 1, false, 0, 0
	s.stillest.times = 0
	walked, stepped := s.pace.work.Periods, s.pace.work.Steps
	for range mostCorrections {
		if s.rings() || s.pace.work.Periods-walked > mostWalks || s.pace.work.Steps-stepped > s.budget() || s.spent() {
			break
		}
		finished, err := s.once(g, done)
		if finished || err != nil {
			return err
		}
	}
	return s.unreached()
}

// budget is the number of steps after which a search is given up: ten times what any
// ordinary ladder takes, and where a period rings in a thousand steps as many of such
// periods as settle it, but for a swift search.
func (s *search) budget() int {
	n := 20000 + 500*len(s.diodes)
	if s.swift {
		return n
	}
	return n + ringingPeriods*s.pace.work.ringing(len(s.diodes))
}

// ringingPeriods is the number of periods that a circuit that rings is walked for.
const ringingPeriods = 100

// spent reports whether all attempts together have had their steps: about two searches.
func (s *search) spent() bool {
	if s.most > 0 {
		return s.pace.work.Steps > s.most
	}
	return s.pace.work.Steps > 20000+s.budget()
}

// exacting is the part of what the diodes pass below which corrections of the
// charges ask for events to be located as well as the arithmetic allows.
const exacting = 0.05

// once walks one period and corrects the state.
func (s *search) once(g grade, done func() bool) (finished bool, err error) {
	if err := s.here(g); err != nil {
		return false, err
	}
	if s.rouse() {
		return false, nil
	}
	size := norm(s.r)
	if s.still++; size < 0.7*s.last {
		s.still = 0
	}
	if size > 3*s.last || s.trial && size > s.last {
		s.goBack(&s.sound)
		s.stray, s.last, s.trial, s.still = true, math.Inf(1), false, 0
		return false, nil
	}
	if g == fine && s.atRest(size) {
		s.pace.track = s.linear
		return true, nil
	}
	if s.stray || s.still > 2 || !s.correct() {
		return false, s.leapOn()
	}
	return s.improve(g, size, done)
}

// improve follows the correction in hand, or is done with it.
func (s *search) improve(g grade, size float64, done func() bool) (finished bool, err error) {
	s.work.Iterations++
	f, err := s.lacking()
	if err != nil {
		return false, err
	}
	near := math.Abs(f-1) <= s.tolerated(g)
	if near && g == fine && s.swift && norm(s.step) <= s.slight*norm(s.x) && s.closing(size) && s.carryThrough() {
		return true, nil
	}
	if near && done() {
		if g == rough {
			s.follows(f)
		}
		s.pace.track = s.linear
		return true, nil
	}
	s.mark(&s.sound)
	s.last = size
	s.follows(f)
	if math.Abs(f-1) > strange {
		s.last, s.trial = math.Inf(1), false
	}
	s.pace.smooth = s.largestCharge(s.step) <= exacting*s.pace.passed
	return false, nil
}

// slight is the largest correction, in parts of the state, that a swift search carries through
// the period instead of walking it again.
const slight = 1e-5

// faint is the part by which such a correction may change steps and pulses of current.
const faint = 0.01

// closing reports whether corrections are known to lead to the state: Newton's method never went
// astray, and what a period changes fell to a tenth with the last one, if there was one.
func (s *search) closing(size float64) bool { return s.leaps == 0 && size <= 0.1*s.last }

// carryThrough carries the correction in hand through the period walked last, to the end of the
// search. It reports whether the currents change so faintly, and so little charge is misplaced,
// that neither they nor the balance nor, by the largest correction that a charge ever asked for,
// the state suffers.
func (s *search) carryThrough() bool {
	bears := s.small() * norm(s.x) * math.Sqrt(s.typical) / s.amplified
	s.unpack(s.step, s.root, s.dq, s.di)
	if !s.linear.follow(s.dq, s.di, s.lanes, bearing{math.Min(swiftly*s.pace.passed, bears), faint}) {
		return false
	}
	axpy(1, s.step, s.x)
	s.pace.track = s.linear
	return true
}

// atRest reports whether the largest correction that ever answered such a change over the
// period would end a swift search: then none is worked out.
func (s *search) atRest(size float64) bool {
	return s.swift && s.level == nil && s.amplified > 0 && s.amplified*size <= s.small()*norm(s.x) && s.balanced(false)
}

// leapOn leads the state on in a leap, where Newton's method cannot be believed.
func (s *search) leapOn() error {
	s.stray, s.still, s.last, s.pace.smooth, s.trial = false, 0, math.Inf(1), false, false
	if s.leaps++; s.leaps > s.patience {
		return s.unreached()
	}
	return s.advance(math.Inf(1))
}

// bold is how many times the correction of the circuit between the peaks one of
// Newton's may be. Where some diode does not conduct at all, Newton's method may ask
// for anything; between the peaks every diode has its part.
const bold = 10

// daring is the part of the state beyond which such a correction is not even tried.
const daring = 0.05

// correct computes Newton's correction of the state into step and reports whether
// it can be believed.
func (s *search) correct() bool {
	s.peaks.prepare(0)
	s.newton()
	copy(s.old, s.r)
	s.precondition(s.old)
	s.trial = norm(s.step) > bold*norm(s.old)
	return !s.trial || norm(s.step) < daring*norm(s.x)
}

// newton solves Newton's equations, and again for what the solution leaves of them,
// until that can no longer stand for a tenth of the correction: where only leakage
// ties a mode down, a little of it makes much.
func (s *search) newton() {
	for i := range s.step {
		s.step[i] = 0
	}
	left := s.k1
	copy(left, s.r)
	size := norm(s.r)
	for range 4 {
		rest := s.solver.solve(left, func(x []float64) { s.minus(s.linear, x) }, s.answer, 1e-3)
		s.recall.learn(s.solver)
		axpy(1, left, s.step)
		if size == 0 {
			return
		}
		s.amplified = math.Max(s.amplified, norm(s.step)/norm(s.r))
		if size *= rest; s.amplified*size <= 0.1*norm(s.step) {
			return
		}
		copy(left, s.step)
		s.minus(s.linear, left)
		for i, r := range s.r {
			left[i] = r - left[i]
		}
	}
}

// answer is the precondition made better by what was learnt.
func (s *search) answer(x []float64) {
	s.recall.improve(x)
	s.precondition(x)
}

// swiftly is the part of what the diodes pass to which the charges come back in a swift search.
const swiftly = 1e-5

// balanced reports whether the charges come back to 1e-8 of what the diodes pass,
// or, where rounding keeps them from coming any closer, to 3e-7; in a swift search to 1e-5.
func (s *shooter) balanced(stalled bool) bool {
	worst, most := s.largestCharge(s.r), s.largestCharge(s.x)
	if s.swift {
		return worst <= math.Max(swiftly*s.pace.passed, 1e-11*most)
	}
	if stalled {
		return worst <= math.Max(3e-7*s.pace.passed, 1e-11*most)
	}
	return worst <= math.Max(1e-8*s.pace.passed, 1e-13*most)
}

// largestCharge is the largest charge in a state or a change of it.
func (s *shooter) largestCharge(x []float64) float64 {
	most := 0.0
	for j := range s.inner {
		most = math.Max(most, math.Abs(x[j]/s.root[j]))
	}
	return most
}
