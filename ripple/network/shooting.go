package network

import (
	"math"

	"kilovet/hv/lack"
)

// shooter finds the state that a period brings back to itself: Newton's method on
// the map of the period (Aprille and Trick, Proc. IEEE 60 (1972) 108), its linear
// equations solved by changes carried through the period. The network is passive
// and its diodes monotonic, so a period brings any two states closer together and
// the periodic state is the only one.
type shooter struct {
	*system
	root   []float64
	peaks  *peaks
	solver *krylov
	pace   *pace

	x, r, step, old []float64 // state, its change over a period, its correction
	q, amps         []float64
	dq, di, du      []float64
	lanes           []trio
	on              []bool
	reach           float64 // of a correction that is not Newton's
	work            Work
}

func newShooter(s *system) *shooter {
	m := s.states()
	h := &shooter{system: s, root: s.roots(), solver: newKrylov(m), peaks: newPeaks(s)}
	h.pace = &pace{walker: newWalker(s), track: &track{system: s}, energy: s.measureOfEnergy()}
	h.x, h.r, h.step, h.old = make([]float64, m), make([]float64, m), make([]float64, m), make([]float64, m)
	h.q, h.dq, h.du = make([]float64, s.n), make([]float64, s.n), make([]float64, s.n)
	h.amps, h.di = make([]float64, len(s.inductors)), make([]float64, len(s.inductors))
	h.lanes, h.on = make([]trio, s.n), make([]bool, len(s.diodes))
	return h
}

// measureOfEnergy is what the roughness of a step is relative to: the root of twice
// the energy of a typical capacitor at the drive's peak.
func (s *system) measureOfEnergy() float64 {
	if s.typical == 0 {
		return 1
	}
	return math.Sqrt(s.typical) * s.scale
}

// guess starts from the charges at the negative peak of the drive.
func (s *shooter) guess() {
	p := s.peaks
	p.solve()
	p.lean()
	p.charge(p.u[s.n:], s.q)
	for k := range s.q {
		s.q[k] += s.capDirect[k] - s.capSquare[k] - s.capSine[k]
	}
	s.pack(s.q, s.amps, s.root, s.x)
	s.judge(p.passed())
}

// judge takes the largest charge a diode passes in a period as the measure of what
// matters in its current.
func (s *shooter) judge(passed float64) {
	s.pace.passed = passed
	s.pace.tolerate(passed / s.period)
}

// walk takes the state through one period; r is its change.
func (s *shooter) walk() error {
	s.unpack(s.x, s.root, s.q, s.amps)
	p := s.pace
	p.place(s.q, s.amps, s.on)
	if err := p.walk(); err != nil {
		return err
	}
	copy(s.on, p.on)
	s.pack(p.q, p.walker.amps, s.root, s.r)
	axpy(-1, s.x, s.r)
	if !finite(s.r) {
		return lack.Failed("the arithmetic left its range")
	}
	return nil
}

func finite(x []float64) bool {
	for _, v := range x {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			return false
		}
	}
	return true
}

// bold is how many times the correction of the circuit between the peaks a
// correction may be. Where some diode does not conduct at all, Newton's method may
// ask for anything; between the peaks every diode has its part.
const bold = 10

// correct computes Newton's correction of the state into step, or where that is
// beyond belief takes that of the circuit between the peaks. As long as those
// change nothing, each is longer than the last.
func (s *shooter) correct() {
	copy(s.step, s.r)
	s.solver.solve(s.step, s.minusPeriod, s.precondition, 1e-3)
	copy(s.old, s.r)
	s.precondition(s.old)
	most := bold * s.reach * norm(s.old)
	if n := norm(s.step); n <= most {
		s.reach = 1
		return
	}
	copy(s.step, s.old)
	scaleBy(s.step, s.reach)
	s.reach *= 4
}

// minusPeriod replaces a change of the start by what the period leaves of the
// difference between it and the change of the end.
func (s *shooter) minusPeriod(x []float64) { s.minus(s.pace.track, x) }

func (s *shooter) minus(t *track, x []float64) {
	s.work.Products++
	s.unpack(x, s.root, s.dq, s.di)
	t.carry(s.dq, s.di, s.lanes, s.du)
	copy(s.old, x)
	s.pack(s.dq, s.di, s.root, x)
	for i, v := range s.old {
		x[i] = v - x[i]
	}
}

// precondition answers a change over the period as the circuit between the peaks
// would.
func (s *shooter) precondition(x []float64) {
	s.unpack(x, s.root, s.dq, s.di)
	s.peaks.answer(s.dq)
	s.pack(s.dq, s.di, s.root, x)
}

// exacting is the part of what the diodes pass below which corrections of the
// charges ask for events to be located as well as the arithmetic allows.
const exacting = 0.05

// approach corrects the state in one grade until a correction is a small part of it.
func (s *shooter) approach(g grade, small float64, most int) error {
	return s.correctUntil(g, most, func() bool {
		if norm(s.step) > small*norm(s.x) {
			return false
		}
		axpy(1, s.step, s.x)
		return true
	})
}

// converge corrects the state until the charges come back.
func (s *shooter) converge(g grade, most int) error {
	last := math.Inf(1)
	return s.correctUntil(g, most, func() bool {
		size := norm(s.r)
		stalled := size > 0.3*last
		last = size
		small := 1e-9
		if stalled { // what is left is rounding, which a mode that only leakage ties down makes much of
			small = 1e-5
		}
		return norm(s.step) <= small*norm(s.x) && s.balanced(stalled)
	})
}

func (s *shooter) correctUntil(g grade, most int, done func() bool) error {
	p := s.pace
	p.grade, p.smooth = g, false
	s.reach = 1
	last := math.Inf(1)
	for range most {
		size, err := s.residual(last)
		if err != nil {
			return err
		}
		last = size
		s.correct()
		s.work.Iterations++
		if done() {
			return nil
		}
		axpy(1, s.step, s.x)
		p.smooth = s.largestCharge(s.step) <= exacting*p.passed
	}
	return lack.Failed("the periodic state was not reached in %d corrections", most)
}

// residual walks the period; where that ended much further from rest than the last
// time, it takes back most of the correction, again and again.
func (s *shooter) residual(last float64) (float64, error) {
	for back := 0; ; back++ {
		if err := s.walk(); err != nil {
			return 0, err
		}
		if size := norm(s.r); size <= 3*last || back == 12 {
			return size, nil
		}
		s.reach = 1
		axpy(-0.75, s.step, s.x)
		scaleBy(s.step, 0.25)
	}
}

// balanced reports whether the charges come back to 1e-8 of what the diodes pass,
// or, where rounding keeps them from coming any closer, to 3e-7.
func (s *shooter) balanced(stalled bool) bool {
	worst, most := s.largestCharge(s.r), s.largestCharge(s.x)
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
